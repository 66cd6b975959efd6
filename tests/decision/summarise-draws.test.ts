import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { drawInterval, summariseDraws } from '../../src/decision/summarise-draws.ts'
import { candidate, companies } from './candidates.ts'

describe('summariseDraws', () => {
  it('takes the 5th and 95th percentile of the draws that have a temperature', () => {
    const losses = Array.from({ length: 101 }, (_, k) => k)
    const summary = summariseDraws(candidate('a', [Infinity, ...losses, Infinity]))
    expect(summary.total!.low).toBeCloseTo(2.5, 12)
    expect(summary.total!.high).toBeCloseTo(47.5, 12)
    expect(summary.junctionHigh).toBeCloseTo(395, 12)
    expect(summary.lostShare).toBe(2 / 103)
  })

  it('has no number where every draw is lost', () => {
    const summary = summariseDraws(candidate('a', [Infinity, Infinity]))
    expect(summary).toEqual({ total: null, junctionHigh: null, lostShare: 1 })
    expect(drawInterval(new Float64Array(0))).toBeNull()
  })

  it('never lets an infinite or missing number out', () => {
    fc.assert(
      fc.property(companies, (company) => {
        for (const one of company) {
          const { total, junctionHigh, lostShare } = summariseDraws(one)
          expect(total === null).toBe(lostShare === 1)
          for (const figure of [total?.low ?? 0, total?.high ?? 0, junctionHigh ?? 0])
            expect(figure).toSatisfy(Number.isFinite)
          if (total) expect(total.low).toBeLessThanOrEqual(total.high)
        }
      }),
      { seed: 1 },
    )
  })
})
