import { describe, expect, it } from 'vitest'
import type { ForwardRow, LeakageRow, RampRow } from '../../src/domain/rectifier.ts'
import { compareRows } from '../../src/evidence/compare-rows.ts'
import { forwardRow, kelvin, leakageRow, place, rampRow, record, stepRow } from './records.ts'

const candidate = 'test-part'

function recovery(...rows: readonly Partial<RampRow>[]) {
  return compareRows(record({ recovery: rows.map(rampRow) }))
}

function leakage(...rows: readonly Partial<LeakageRow>[]) {
  return compareRows(record({ leakage: rows.map(leakageRow) }))
}

function forward(...rows: readonly Partial<ForwardRow>[]) {
  return compareRows(record({ forward: rows.map(forwardRow) }))
}

describe('a hot recovery row held against a cold one', () => {
  const cold = { charge: 90e-9, junction: 300 }
  const hot = { charge: 70e-9, junction: 320 }
  const told = [
    { code: 'hot-below-cold', candidate, data: { hot: 70e-9, cold: 90e-9, hotAt: 320, coldAt: 300 } },
  ] as const

  it('is told for less charge from 20 K apart on, whichever stands first', () => {
    expect(recovery(cold, hot)).toEqual(told)
    expect(recovery(hot, cold)).toEqual(told)
    expect(recovery(cold, { ...hot, junction: 319.9 })).toEqual([])
  })

  it('is not told for as much charge, nor for a shorter time with it', () => {
    expect(recovery(cold, { ...hot, charge: 90e-9 })).toEqual([])
    expect(recovery({ ...cold, recoveryTime: 60e-9 }, { ...hot, charge: 90e-9, recoveryTime: 50e-9 })).toEqual([])
  })

  it('is told only at one grade, current and slope, each within a factor of 1.3', () => {
    expect(recovery(cold, { ...hot, grade: 'measured' })).toEqual([])
    expect(recovery(cold, { ...hot, current: 10.4 })).toEqual(told)
    expect(recovery(cold, { ...hot, current: 10.5 })).toEqual([])
    expect(recovery(cold, { ...hot, current: 6.1 })).toEqual([])
    expect(recovery(cold, { ...hot, slope: 130e6 })).toEqual(told)
    expect(recovery(cold, { ...hot, slope: 131e6 })).toEqual([])
  })

  it('has the same unknown current as another without one, and not that of a row that states it', () => {
    expect(recovery({ ...cold, current: null }, { ...hot, current: null })).toEqual(told)
    expect(recovery({ ...cold, current: null }, hot)).toEqual([])
    expect(recovery(cold, { ...hot, slope: null })).toEqual([])
  })

  it('is not told where either does not state its temperature', () => {
    expect(recovery({ ...cold, junction: null }, hot)).toEqual([])
    expect(recovery(cold, { ...hot, junction: null })).toEqual([])
    expect(recovery(hot, { ...cold, junction: null })).toEqual([])
  })

  it('goes by trr, then I_RM, where one of them has no charge', () => {
    const [
      {
        code,
        data: { hotAt, coldAt },
      },
    ] = told
    const heat = [{ code, candidate, data: { hotAt, coldAt } }]
    const time = { ...cold, recoveryTime: 60e-9, peakReverseCurrent: 2 }
    const bare = { ...hot, charge: null }
    expect(recovery(time, { ...bare, recoveryTime: 59e-9 })).toEqual(heat)
    expect(recovery(time, { ...bare, recoveryTime: 61e-9, peakReverseCurrent: 1.9 })).toEqual(heat)
    expect(recovery({ ...time, charge: null }, { ...hot, recoveryTime: 59e-9 })).toEqual(heat)
    expect(recovery(time, { ...bare, recoveryTime: 60e-9, peakReverseCurrent: 2 })).toEqual([])
    expect(recovery(time, { ...bare, softness: 1 })).toEqual([])
    expect(recovery({ ...cold, softness: 1 }, { ...bare, recoveryTime: 10e-9, softness: 1 })).toEqual([])
  })

  it('is looked for among the ramp rows of the record, and told once', () => {
    const rows = [stepRow({ recoveryTime: 30e-9 }), rampRow(cold), rampRow(hot), rampRow({ ...hot, charge: 60e-9 })]
    expect(compareRows(record({ recovery: rows }))).toEqual(told)
    const last = [rampRow({ ...cold, current: 1 }), rampRow(cold), rampRow(hot)]
    expect(compareRows(record({ recovery: last }))).toEqual(told)
  })
})

describe('a hot leakage row held against a cold one', () => {
  const cold = { current: 5e-6, junction: 300, place: place('cold') }
  const hot = { current: 4e-6, junction: 330, place: place('hot') }
  const told = [{ code: 'rows-contradict', candidate, data: { row: 'hot', other: 'cold' } }]

  it('contradicts it with no more current at no less voltage', () => {
    expect(leakage(cold, hot)).toEqual(told)
    expect(leakage(hot, cold)).toEqual(told)
    expect(leakage(cold, { ...hot, current: 5e-6 })).toEqual(told)
    expect(leakage(cold, { ...hot, voltage: 900 })).toEqual(told)
  })

  it('is as it should be with more current, or with less of it at less voltage', () => {
    expect(leakage(cold, { ...hot, current: 5.1e-6 })).toEqual([])
    expect(leakage(cold, { ...hot, voltage: 599 })).toEqual([])
  })

  it('of another grade, or not clearly hotter, contradicts nothing', () => {
    expect(leakage(cold, { ...hot, grade: 'measured' })).toEqual([])
    expect(leakage(cold, { ...hot, junction: 319 })).toEqual([])
    expect(leakage(cold, { ...hot, junction: null })).toEqual([])
  })
})

describe('a maximum held against a typical row', () => {
  const maximum = { grade: 'maximum' } as const

  it('of recovery is told when below it in Qrr, trr or I_RM, with both figures', () => {
    const told = (high: string, low: string) => [
      { code: 'maximum-below-typical', candidate, data: { property: 'recovery', maximum: low, typical: high } },
    ]
    expect(recovery({ charge: 90e-9 }, { ...maximum, charge: 80e-9 })).toEqual(told('Qrr 90 nC', 'Qrr 80 nC'))
    expect(recovery({ ...maximum, charge: 80e-9 }, { charge: 90e-9 })).toEqual(told('Qrr 90 nC', 'Qrr 80 nC'))
    expect(recovery({ charge: 90e-9, grade: 'measured' }, { ...maximum, charge: 80e-9 })).toHaveLength(1)
    const both = { charge: 90e-9, recoveryTime: 42e-9 }
    expect(recovery(both, { ...maximum, charge: 95e-9, recoveryTime: 40e-9 })).toEqual(told('trr 42 ns', 'trr 40 ns'))
    expect(recovery(both, { ...maximum, recoveryTime: 40e-9 })).toEqual(told('trr 42 ns', 'trr 40 ns'))
    expect(recovery({ peakReverseCurrent: 2.5 }, { ...maximum, peakReverseCurrent: 2.4 })).toEqual(
      told('I_RM 2.5 A', 'I_RM 2.4 A'),
    )
  })

  it('is not told when equal, of an estimate, of two of one kind, or at another condition', () => {
    const typical = { charge: 90e-9 }
    const low = { ...maximum, charge: 80e-9 }
    expect(recovery(typical, { ...low, charge: 90e-9 })).toEqual([])
    expect(recovery({ ...typical, grade: 'estimated' }, low)).toEqual([])
    expect(recovery(low, { ...typical, grade: 'estimated' })).toEqual([])
    expect(recovery({ ...typical, grade: 'measured' }, { charge: 80e-9 })).toEqual([])
    expect(recovery({ ...maximum, ...typical }, low)).toEqual([])
    expect(recovery(typical, { ...low, slope: 200e6 })).toEqual([])
  })

  it('is not held against a figure that it does not state', () => {
    expect(recovery({ ...maximum, recoveryTime: 50e-9 }, { charge: 90e-9, recoveryTime: 40e-9 })).toEqual([])
    expect(recovery({ charge: 90e-9, recoveryTime: 40e-9 }, { ...maximum, recoveryTime: 50e-9 })).toEqual([])
  })

  it('has trr compared only where it ends the same way', () => {
    const level = { recoveryTimeBy: { kind: 'level-10' } } as const
    expect(recovery({ recoveryTime: 42e-9 }, { ...maximum, recoveryTime: 40e-9, ...level })).toEqual([])
    expect(recovery({ recoveryTime: 42e-9, ...level }, { ...maximum, recoveryTime: 40e-9, ...level })).toHaveLength(1)
    const peaks = recovery({ peakReverseCurrent: 3 }, { ...maximum, peakReverseCurrent: 2, ...level })
    expect(peaks).toHaveLength(1)
  })

  it('counts as at the same temperature within 10 K, 25 °C where none is stated', () => {
    const at = (one: number | null, other: number | null) =>
      recovery({ charge: 90e-9, junction: one }, { ...maximum, charge: 80e-9, junction: other }).length
    expect(at(300, 310)).toBe(1)
    expect(at(300, 310.1)).toBe(0)
    expect(at(null, kelvin(34))).toBe(1)
    expect(at(null, kelvin(36))).toBe(0)
    expect(at(kelvin(36), null)).toBe(0)
  })

  it('of leakage is told within a tenth of the voltage', () => {
    const typical = { current: 3e-4 }
    expect(leakage(typical, { ...maximum, current: 2e-4, voltage: 650 })).toEqual([
      {
        code: 'maximum-below-typical',
        candidate,
        data: { property: 'leakage', maximum: '0.0002 A', typical: '0.0003 A' },
      },
    ])
    expect(leakage(typical, { ...maximum, current: 2e-4, voltage: 670 })).toEqual([])
  })

  it('of forward voltage is told within a tenth of the current', () => {
    const typical = { drop: 1.5 }
    expect(forward(typical, { ...maximum, drop: 1.4, current: 7.5 })).toEqual([
      {
        code: 'maximum-below-typical',
        candidate,
        data: { property: 'forward voltage', maximum: '1.4 V', typical: '1.5 V' },
      },
    ])
    expect(forward(typical, { ...maximum, drop: 1.4, current: 7 })).toEqual([])
  })
})
