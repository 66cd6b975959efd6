import { describe, expect, it } from 'vitest'
import { readCapture } from '../../src/input/capture-settings.ts'

const least = 'capture: ramp\nfile: a.csv\ncolumns:\n  time: {column: 1, unit: ns}\n  current: {column: i, unit: A}\n'

function read(text: string) {
  const { value, problems } = readCapture(text, 'c.yaml')
  if (value === null) throw new Error(JSON.stringify(problems))
  return value
}

function told(text: string) {
  return readCapture(text, 'c.yaml').problems.map(({ code, line, column, path }) => `${line}:${column} ${code} ${path}`)
}

describe('capture settings', () => {
  it('the least there may be has the documented defaults', () => {
    expect(read(least)).toEqual({
      fixture: 'ramp',
      file: 'a.csv',
      time: { column: 1, factor: 1e-9, unit: 'ns', shunt: null },
      interval: null,
      current: { column: 'i', factor: 1, unit: 'A', shunt: null },
      voltage: null,
      decimal: 'auto',
      segment: 1,
      recoveryTimeBy: { kind: 'line-90-25' },
      chargeUntil: 0.02,
      bandwidth: null,
      currentDelay: 0,
      reference: null,
      device: { id: null, junction: null },
      assumed: [
        { path: 'trr_by', value: 'line-90-25' },
        { path: 'charge_until', value: '2 %' },
        { path: 'current_delay', value: '0 ns' },
      ],
    })
  })

  it('everything there may be is in SI', () => {
    const text = `capture: step
file: a.csv
interval: 0.4 ns
columns:
  current: {column: 2, unit: mV, across: 50 mohm, invert: true}
  voltage: {column: 3, unit: kV}
decimal: comma
segment: average
trr_by: level
until: 2.5 mA
charge_until: 10 %
bandwidth: 200 MHz
current_delay: -1.2 ns
reference: short.csv
device: {id: bench-unit-3, junction: 125 degC}
`
    const settings = read(text)
    expect(settings).toMatchObject({
      interval: 0.4e-9,
      time: null,
      voltage: { column: 3, factor: 1000 },
      decimal: 'comma',
      segment: 'average',
      recoveryTimeBy: { kind: 'level', until: 2.5e-3 },
      chargeUntil: 0.1,
      bandwidth: 200e6,
      currentDelay: -1.2e-9,
      reference: 'short.csv',
      device: { id: 'bench-unit-3', junction: 398.15 },
    })
    expect(settings.current.factor).toBeCloseTo(-0.02, 12)
    expect(settings.current.shunt).toBeCloseTo(0.05, 12)
  })

  it('a step ends at a quarter of the plateau by default', () => {
    expect(read(least.replace('ramp', 'step')).recoveryTimeBy).toEqual({ kind: 'level-25' })
  })

  it('a capture with ten faults tells ten', () => {
    const text = `capture: slope
file: a.csv
colums: {}
columns:
  time: {column: 0, unit: ns}
  current: {column: 2, unit: mV}
  voltage: {column: 3, unit: furlong, across: 3 ohm}
interval: 5
decimal: dot
segment: none
trr_by: level
charge_until: 80 %
bandwidth: 200 mHzz
`
    expect(told(text)).toEqual([
      '1:1 key-missing until',
      '1:10 word-unknown capture',
      '3:1 key-unknown ',
      '5:18 number-out-of-range columns.time.column',
      '6:3 key-missing columns.current.across',
      '7:30 unit-dimension columns.voltage.unit',
      '7:39 key-not-here columns.voltage.across',
      '8:1 key-not-here interval',
      '8:11 unit-missing interval',
      '9:10 word-unknown decimal',
      '10:10 value-kind segment',
      '12:15 number-out-of-range charge_until',
      '13:12 unit-unknown bandwidth',
    ])
  })

  it('needs a time column or an interval, and for a step a level', () => {
    expect(told(least.replace('  time: {column: 1, unit: ns}\n', ''))).toEqual(['3:1 key-missing columns.time'])
    expect(told(`${least.replace('ramp', 'step')}trr_by: line-75-50\n`)).toEqual(['6:9 values-contradict trr_by'])
    expect(told(`${least}until: 1 A\n`)).toEqual(['6:1 key-not-here until'])
  })
})
