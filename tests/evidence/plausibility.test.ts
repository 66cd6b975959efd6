import { describe, expect, it } from 'vitest'
import type { RampRow, RectifierClass, RectifierRecord } from '../../src/domain/rectifier.ts'
import { caveatsOf } from './caveats.ts'
import { lumpedFigures } from './lumped.ts'
import { forwardRow, kelvin, leakageRow, place, rampRow, stepRow } from './records.ts'

function caveats(code: string, fields: Partial<RectifierRecord>) {
  return caveatsOf(fields)
    .filter((caveat) => caveat.code === code)
    .map(({ candidate, data }): Record<string, unknown> => ({ candidate, ...data }))
}

const implausible = (fields: Partial<RectifierRecord>) => caveats('implausible-for-class', fields)

/** A row at I0, a0 whose Qrr and I_RM are those of u and y. */
function rowAt(u: number, y: number, fields: Partial<RampRow> = {}): RampRow {
  const { charge, peakReverseCurrent } = lumpedFigures({ current: 8, slope: 100e6, junction: 298 }, u, y)
  return rampRow({ charge, peakReverseCurrent, ...fields })
}

const rated = (reverseVoltage: number) => ({ reverseVoltage, averageCurrent: 8, junction: kelvin(150) })

describe('a recovery row', () => {
  // ultrafast at I0, a0, 25 °C: ln tau = ln 35 ns ± 0.45, y = 1 ± 0.5; told beyond 3, expected within 2 deviations
  const centre = Math.log(35e-9)
  const lifetime = { candidate: 'test-part', property: 'The carrier lifetime', row: 'recovery row 1', condition: '' }

  it('is told with the lifetime it means and that of its class, beyond three deviations', () => {
    expect(implausible({ recovery: [rowAt(centre + 1.34, 1)] })).toEqual([])
    expect(implausible({ recovery: [rowAt(centre - 1.34, 1)] })).toEqual([])
    // 35 ns e^±1.36 and 35 ns e^±0.9
    const expected = '14.2 ns to 86.1 ns'
    expect(implausible({ recovery: [rowAt(centre + 1.36, 1)] })).toEqual([{ ...lifetime, value: '136 ns', expected }])
    expect(implausible({ recovery: [rowAt(centre - 1.36, 1)] })).toEqual([{ ...lifetime, value: '8.98 ns', expected }])
  })

  it('of grade maximum may lie e^0.5 higher, and is told against that', () => {
    const grade = 'maximum'
    expect(implausible({ recovery: [rowAt(centre + 1.84, 1, { grade })] })).toEqual([])
    expect(implausible({ recovery: [rowAt(centre + 1.86, 1, { grade })] })).toEqual([
      { ...lifetime, value: '225 ns', expected: '23.5 ns to 142 ns' },
    ])
    expect(implausible({ recovery: [rowAt(centre - 0.86, 1, { grade })] })).toHaveLength(1)
  })

  it('is told with its lifetime over tail time, which is 1 + e^y', () => {
    expect(implausible({ recovery: [rowAt(centre, 2.49)] })).toEqual([])
    expect(implausible({ recovery: [rowAt(centre, 2.51)] })).toEqual([
      { ...lifetime, property: 'Lifetime over tail time', value: '13.3', expected: '2 to 8.39' },
    ])
  })

  it('of a step fixture may be off by what the fixture errs: 0.6 on ln tau, 0.4 and 0.2 on y', () => {
    // tau 150 ns and tau_rr 20 ns over s give ts 39.3546 ns and trr 67.0805 ns over s (PHYSICS section 1); u is ln 1.7 more
    const step = (scale: number) =>
      implausible({
        recovery: [stepRow({ storageTime: 39.3546e-9 * scale, recoveryTime: 67.0805e-9 * scale, spread: 1e-4 })],
      }).map(({ property }) => property)
    const deviation = Math.hypot(0.45, 0.15 * Math.log(0.5 / 8), 0.6)
    const most = Math.exp(centre + 3 * deviation) / (1.7 * 150e-9)
    expect(step(0.99 * most)).toEqual([])
    expect(step(1.01 * most)).toEqual(['The carrier lifetime'])
  })

  it('of a class without stored charge is told once and named, for it is not used', () => {
    const rows = [rampRow({ charge: 50e-9, place: place('first') }), rampRow({ charge: 60e-9, place: place('second') })]
    expect(implausible({ class: 'schottky', ratings: rated(100), recovery: rows })).toEqual([
      {
        candidate: 'test-part',
        property: 'A recovery row',
        row: 'first',
        value: 'stated',
        expected: 'no stored charge, so it is not used',
        condition: '',
      },
    ])
    expect(implausible({ class: 'schottky', ratings: rated(100) })).toEqual([])
  })
})

describe('a rated reverse voltage', () => {
  const told = (name: RectifierClass, volts: number) =>
    implausible({ class: name, ratings: rated(volts) }).map(({ value, expected }) => `${value}, ${expected}`)

  it('is told where no part of the class is made for it', () => {
    expect(told('schottky', 9)).toEqual(['9 V, 10 to 250 V'])
    expect(told('schottky', 10)).toEqual([])
    expect(told('schottky', 250)).toEqual([])
    expect(told('schottky', 251)).toEqual(['251 V, 10 to 250 V'])
    expect(told('sic-schottky', 250)).toEqual(['250 V, 300 to 3500 V'])
    expect(told('ultrafast', 5000)).toEqual([])
    expect(implausible({ class: 'schottky', ratings: rated(9) })[0]).toMatchObject({
      property: 'The rated reverse voltage',
      row: '',
    })
  })
})

describe('a forward voltage', () => {
  const forward = { candidate: 'test-part', property: 'The forward voltage', row: 'forward row 1' }

  it('is told beyond three deviations of its class, with current and temperature', () => {
    // ultrafast at I0 and 25 °C: 1.35 ± 0.3 V
    expect(implausible({ forward: [forwardRow({ drop: 0.46 })] })).toEqual([])
    expect(implausible({ forward: [forwardRow({ drop: 2.24 })] })).toEqual([])
    const told = { ...forward, expected: '0.75 to 1.95 V', condition: '8 A, 25 °C' }
    expect(implausible({ forward: [forwardRow({ drop: 0.44 })] })).toEqual([{ ...told, value: '0.44 V' }])
    expect(implausible({ forward: [forwardRow({ drop: 2.26, junction: null })] })).toEqual([
      { ...told, value: '2.26 V' },
    ])
  })

  it('of grade maximum may lie 8 % higher', () => {
    const row = (drop: number) => [forwardRow({ drop, grade: 'maximum' })]
    expect(implausible({ forward: row(2.42) })).toEqual([])
    expect(implausible({ forward: row(2.44) })).toEqual([
      { ...forward, value: '2.44 V', expected: '0.81 to 2.11 V', condition: '8 A, 25 °C' },
    ])
    expect(implausible({ forward: row(0.48) })).toHaveLength(1)
  })

  it('below the rated current is expected to fall with its logarithm', () => {
    // at a tenth of 8 A: 0.945 − 0.045 ln 10 + 0.0405 V; level, ln term and share give ± 0.2886 V
    const row = (drop: number) => implausible({ forward: [forwardRow({ current: 0.8, drop })] })
    expect(row(1.74)).toEqual([])
    expect(row(1.76)).toEqual([{ ...forward, value: '1.76 V', expected: '0.305 to 1.46 V', condition: '0.8 A, 25 °C' }])
  })

  it('is expected to be no less than 0 V', () => {
    const hot = [forwardRow({ current: 0.08, drop: 2, junction: kelvin(200) })]
    expect(implausible({ forward: hot })[0]!.expected).toMatch(/^0 to /)
  })

  it('given as a line is looked at at the rated current, in place of rows', () => {
    const line = (threshold: number) => ({
      ...forwardRow({ place: place('forward line') }),
      threshold,
      resistance: 0.02,
      thresholdPerKelvin: null,
      resistancePerKelvin: null,
    })
    const rows = [forwardRow({ drop: 0.1 })]
    expect(implausible({ forwardLine: line(0.3), forward: rows })).toEqual([])
    expect(implausible({ forwardLine: line(0.27), forward: rows })).toEqual([
      { ...forward, row: 'forward line', value: '0.43 V', expected: '0.75 to 1.95 V', condition: '8 A, 25 °C' },
    ])
  })

  it('of a Schottky part may rise by what its reverse voltage costs: 0.45 V at 40 V, 0.9 V at 200 V, no more from 250 V', () => {
    // 0.55 ± 0.12 V, and 0.125 V more at 120 V, 0.35 V at 200 V, 0.491 V from 250 V on
    const told = (volts: number, drop: number) =>
      implausible({ class: 'schottky', ratings: rated(volts), forward: [forwardRow({ drop })] })
        .filter(({ property }) => property === 'The forward voltage')
        .map(({ expected }) => expected)
    expect(told(40, 0.9)).toEqual([])
    expect(told(40, 0.92)).toEqual(['0.31 to 0.79 V'])
    expect(told(120, 1.03)).toEqual([])
    expect(told(120, 1.04)).toEqual(['0.31 to 0.915 V'])
    expect(told(200, 1.25)).toEqual([])
    expect(told(200, 1.27)).toEqual(['0.31 to 1.14 V'])
    expect(told(250, 1.41)).toEqual(['0.31 to 1.28 V'])
    expect(told(1000, 1.41)).toEqual(['0.31 to 1.28 V'])
    expect(told(200, 0.6)).toEqual([])
    expect(told(200, 0.2)).toEqual([])
    expect(told(200, 0.18)).toEqual(['0.31 to 1.14 V'])
  })
})

describe('a leakage', () => {
  const told = (microamperes: number, fields: Parameters<typeof leakageRow>[0] = {}) =>
    implausible({
      class: 'schottky',
      ratings: rated(100),
      leakage: [leakageRow({ voltage: 100, current: microamperes * 1e-6, ...fields })],
    })

  it('is told beyond three deviations of the ln of its class, with voltage and temperature', () => {
    // 50 µA, deviation of ln 1.5: e^4.5 = 90.02 told, e^3 = 20.09 expected
    expect(told(4490)).toEqual([])
    expect(told(0.56)).toEqual([])
    expect(told(4510)).toEqual([
      {
        candidate: 'test-part',
        property: 'The leakage',
        row: 'leakage row 1',
        value: '4510 µA',
        expected: '2.49 to 1000 µA',
        condition: '100 V, 25 °C',
      },
    ])
    expect(told(0.55, { junction: null })).toHaveLength(1)
  })

  it('of grade maximum may lie e^1.6 higher', () => {
    expect(told(22_200, { grade: 'maximum' })).toEqual([])
    expect(told(22_400, { grade: 'maximum' })[0]).toMatchObject({ value: '22400 µA', expected: '12.3 to 4970 µA' })
    expect(told(2.7, { grade: 'maximum' })).toHaveLength(1)
  })

  it('that is no reading is not held against the class as well', () => {
    expect(told(0)).toEqual([])
    expect(told(1e6, { voltage: 0 })).toEqual([])
  })
})
