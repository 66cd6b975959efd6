import { describe, expect, it } from 'vitest'
import { isReadable } from '../../src/evidence/is-readable.ts'
import { calibrated } from './calibrated.ts'
import { rampRow, stepRow } from './records.ts'

/** Least and greatest figure that is taken, with the fields that state it. */
const shared = [
  ['current', (current: number) => ({ current }), 1e-9, 1e7],
  ['junction', (junction: number) => ({ junction }), 1, 1e4],
  ['recovery time', (recoveryTime: number) => ({ recoveryTime }), 1e-16, 50],
] as const

const ramps = [
  ...shared,
  ['slope', (slope: number) => ({ slope }), 1e-3, 1e18],
  ['level', (until: number) => ({ recoveryTimeBy: { kind: 'level', until } as const }), 1e-9, 1e7],
  ['charge', (charge: number) => ({ charge }), 1e-18, 1e3],
  ['peak reverse current', (peakReverseCurrent: number) => ({ peakReverseCurrent }), 1e-9, 1e7],
] as const

const steps = [
  ...shared,
  ['reverse current', (reverse: number) => ({ reverse }), 1e-9, 1e7],
  ['level', (until: number) => ({ until }), 1e-9, 1e7],
  ['storage time', (storageTime: number) => ({ storageTime }), 1e-16, 50],
] as const

describe('a recovery row that can be read', () => {
  it.each(ramps)('of a ramp has its %s within its range, ends included', (_, stating, low, high) => {
    const readable = (value: number) => isReadable(rampRow(stating(value)), 8)
    expect([0.99 * low, low, high, 1.01 * high].map(readable)).toEqual([false, true, true, false])
  })

  it.each(steps)('of a step fixture has its %s within its range, ends included', (_, stating, low, high) => {
    const readable = (value: number) => isReadable(stepRow(stating(value)), 8)
    expect([0.99 * low, low, high, 1.01 * high].map(readable)).toEqual([false, true, true, false])
  })

  it('has a softness of at most a million, and may have one of nothing', () => {
    const readable = (softness: number) => isReadable(rampRow({ softness }), 8)
    expect([0, 1e6, 1.01e6].map(readable)).toEqual([true, true, false])
  })

  it('takes the rated current where it states none', () => {
    const bare = rampRow({ current: null })
    expect([8, 1e-10, 1e8].map((rated) => isReadable(bare, rated))).toEqual([true, false, false])
    expect(isReadable(rampRow(), 1e8)).toBe(true)
  })

  it('may be silent about everything else, and have a storage time of zero', () => {
    expect(isReadable(rampRow({ current: null, slope: null, voltage: null, junction: null }), 8)).toBe(true)
    expect(isReadable(stepRow({ until: null, junction: null, storageTime: 0 }), 8)).toBe(true)
  })
})

describe('the reading of a recovery row', () => {
  it('that is beyond all parts is told by its name alone', () => {
    const part = calibrated(rampRow({ charge: 1e4 }))
    expect(part.dataOf('row-impossible')).toEqual({ row: 'recovery row 1' })
    expect(part.codes).not.toContain('row-junction-assumed')
    for (const fields of [{ current: 1e-10 }, { slope: 1e19 }, { peakReverseCurrent: 1e8 }]) {
      const { rectifier, dataOf } = calibrated(rampRow({ charge: 50e-9, ...fields }))
      expect(dataOf('row-impossible')).toEqual({ row: 'recovery row 1' })
      expect(rectifier.recovery!.origin).toBe('class-guess')
    }
  })

  it('without temperature tells so, unless nothing could be read', () => {
    const part = calibrated(rampRow({ charge: 50e-9, junction: null }))
    expect(part.dataOf('row-junction-assumed')).toEqual({ row: 'recovery row 1' })
    expect(calibrated(rampRow({ charge: 50e-9 })).codes).not.toContain('row-junction-assumed')
    const unusable = calibrated(stepRow({ recoveryTime: 28e-9, until: 2, junction: null }))
    expect(unusable.codes).not.toContain('row-junction-assumed')
  })

  it('that states no figure tells nothing and is passed over', () => {
    const part = calibrated(rampRow({ junction: null, current: null }))
    expect(part.codes).toEqual(['recovery-guess', 'forward-guess', 'leakage-assumed'])
    const beside = calibrated(rampRow(), rampRow({ charge: 50e-9 }))
    expect(beside.rectifier.recovery!.origin).toBe('given')
    expect(beside.rectifier).toEqual(calibrated(rampRow({ charge: 50e-9 })).rectifier)
  })
})
