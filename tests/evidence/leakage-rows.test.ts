import { describe, expect, it } from 'vitest'
import type { LeakageRow, RectifierRecord } from '../../src/domain/rectifier.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { leakageCurrentAt } from '../../src/evidence/recovery-at.ts'
import { kelvin, leakageRow, place, record } from './records.ts'

function part(...leakage: readonly Partial<LeakageRow>[]) {
  const fields: Partial<RectifierRecord> = { class: 'schottky', leakage: leakage.map(leakageRow) }
  const { rectifier, read, caveats } = calibrate({ record: record(fields), blockingVoltage: 400 })
  return {
    leakage: rectifier.leakage!,
    read: read.leakage.map((row) => row.place.name),
    told: caveats.filter(({ code }) => code === 'row-impossible' || code === 'row-junction-assumed'),
    at: (voltage: number, celsius: number) => leakageCurrentAt({ rectifier, voltage, junction: kelvin(celsius) })!,
  }
}

describe('a leakage row', () => {
  // Schottky, at V0 and 25 °C: ln 50 µA ± 1.5
  const weighed = (value: number, error: number) => {
    const precision = 1 / 1.5 ** 2 + 1 / error ** 2
    return { ln: (Math.log(50e-6) / 1.5 ** 2 + value / error ** 2) / precision, deviation: 1 / Math.sqrt(precision) }
  }

  it.each([
    ['typical', { current: 10e-6 }, Math.log(10e-6), 0.2],
    ['measured', { current: 10e-6, grade: 'measured' }, Math.log(10e-6), 0.1],
    ['maximum', { current: 10e-6, grade: 'maximum' }, Math.log(10e-6) - 1.6, 0.8],
    ['estimated', { current: 10e-6, grade: 'estimated' }, Math.log(10e-6), 0.7],
    ['its own spread', { current: 10e-6, spread: 0.4 }, Math.log(10e-6), 0.4],
  ] as const)('of grade %s pulls the class towards it by its share of the doubt', (_, fields, value, error) => {
    const found = part(fields).at(600, 25)
    const expected = weighed(value, error)
    expect(Math.log(found.current)).toBeCloseTo(expected.ln, 10)
    expect(found.deviation).toBeCloseTo(expected.deviation, 10)
  })

  it('without temperature is taken at 25 °C and says so', () => {
    const assumed = part({ junction: null })
    expect(assumed.leakage).toEqual(part({}).leakage)
    expect(assumed.told).toEqual([
      { code: 'row-junction-assumed', candidate: 'test-part', data: { row: 'leakage row 1' } },
    ])
    expect(part({}).told).toEqual([])
  })

  it('of no current or at no voltage is told with both and left out', () => {
    const impossible = (found: string) => [
      { code: 'row-impossible', candidate: 'test-part', data: { row: 'leakage row 1', found, bound: '0' } },
    ]
    const dark = part({ current: 0, junction: null }, { place: place('good') })
    expect(dark.told).toEqual(impossible('I_R 0 A at 600 V'))
    expect(dark.read).toEqual(['good'])
    expect(dark.leakage).toEqual(part({}).leakage)
    expect(part({ voltage: 0 }).told).toEqual(impossible('I_R 0.000001 A at 0 V'))
    expect(part({ voltage: 0 }).leakage).toMatchObject({ origin: 'class-guess', unitSpread: 0.7, maximumShift: 0 })
    expect(part({}).leakage.origin).toBe('given')
  })
})

describe('the way from the centre of leakage to its maximum', () => {
  it('is two spreads between units without a maximum row, the least of its rows', () => {
    expect(part({ grade: 'measured' }, {}).leakage.maximumShift).toBeCloseTo(0.6, 12)
    expect(part({ grade: 'estimated' }).leakage.maximumShift).toBeCloseTo(1.4, 12)
  })

  it('reaches the maximum row that is highest above the centre, at that row’s own voltage and temperature', () => {
    const maximum = { grade: 'maximum' } as const
    const rows: readonly (Partial<LeakageRow> & { readonly current: number })[] = [
      { ...maximum, current: 200e-6, voltage: 300 },
      { ...maximum, current: 90e-3, junction: kelvin(125) },
      { ...maximum, current: 250e-6 },
    ]
    const held = part(...rows)
    const above = rows.map(({ current, voltage = 600, junction = kelvin(25) }) =>
      Math.log(current / held.at(voltage, junction! - 273.15).current),
    )
    expect(held.leakage.maximumShift).toBeCloseTo(Math.max(...above), 12)
    expect(held.leakage.maximumShift).toBeGreaterThan(Math.min(...above) + 0.1)
  })

  it('never leads below the centre', () => {
    const low = { grade: 'maximum', current: 1e-9, spread: 1 } as const
    expect(part(low, { current: 1e-3, grade: 'measured' }).leakage.maximumShift).toBe(0)
  })
})
