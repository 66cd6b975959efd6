import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { type AcceptanceInput, judgeCandidate } from '../../src/decision/accept.ts'

/** A part at every limit at once. */
const atEveryLimit: AcceptanceInput = {
  peakReverseVoltage: 32,
  reverseVoltage: 40,
  voltageUse: 0.8,
  meanCurrent: 10,
  averageCurrent: 5,
  parts: 2,
  junction: 398.15,
  junctionLimit: 398.15,
  settledAtMaximumLeakage: true,
  recovery: { value: 2e-6, limit: 2e-6 },
}
const reasons = (change: Partial<AcceptanceInput>) => judgeCandidate({ ...atEveryLimit, ...change })

describe('judgeCandidate', () => {
  it('accepts a part that stands exactly at its limits: 32 V need a 40 V part at 80 %', () => {
    expect(judgeCandidate(atEveryLimit)).toEqual([])
    expect(reasons({ peakReverseVoltage: 32 * (1 + 1e-12), settledAtMaximumLeakage: null, recovery: null })).toEqual([])
  })

  it.each([
    ['voltage-margin', { peakReverseVoltage: 32.001 }, 32.001, 32],
    ['average-current', { meanCurrent: 10.001 }, 10.001, 10],
    ['average-current', { parts: 1 }, 10, 5],
    ['junction-over-limit', { junction: 398.2 }, 398.2, 398.15],
    ['runaway-at-maximum-leakage', { settledAtMaximumLeakage: false }, null, null],
    ['recovery-too-slow', { recovery: { value: 2.1e-6, limit: 2e-6 } }, 2.1e-6, 2e-6],
  ] as const)('says %s with the figure and its limit', (code, change, value, limit) => {
    expect(reasons(change)).toEqual([{ code, value, limit }])
  })

  it('says every reason at once, in a fixed order', () => {
    const all = reasons({
      peakReverseVoltage: 50,
      meanCurrent: 11,
      junction: 400,
      settledAtMaximumLeakage: false,
      recovery: { value: 3e-6, limit: 2e-6 },
    })
    expect(all.map(({ code }) => code)).toEqual([
      'voltage-margin',
      'average-current',
      'junction-over-limit',
      'runaway-at-maximum-leakage',
      'recovery-too-slow',
    ])
  })

  it('never accepts what is not a number', () => {
    expect(reasons({ peakReverseVoltage: Number.NaN })).toHaveLength(1)
    expect(reasons({ junction: Number.NaN })).toHaveLength(1)
  })

  it('never rejects a part for a better rating', () => {
    const figure = fc.double({ min: 0.1, max: 100, noNaN: true })
    fc.assert(
      fc.property(figure, figure, figure, figure, (peakReverseVoltage, reverseVoltage, meanCurrent, averageCurrent) => {
        const input = { ...atEveryLimit, peakReverseVoltage, reverseVoltage, meanCurrent, averageCurrent }
        const better = { ...input, reverseVoltage: reverseVoltage * 1.5, averageCurrent: averageCurrent * 1.5 }
        expect(judgeCandidate(better).length).toBeLessThanOrEqual(judgeCandidate(input).length)
      }),
      { seed: 1 },
    )
  })
})
