import { describe, expect, it } from 'vitest'
import { adviseMeasurement, type MeasurementOption } from '../../src/decision/measure-next.ts'
import { countOdds, lostShare } from '../../src/decision/odds.ts'
import { orderCandidates } from '../../src/decision/order-candidates.ts'
import { shareVariance } from '../../src/decision/sensitivity.ts'
import { decide } from '../../src/decision/verdict.ts'
import { candidate } from './candidates.ts'

const regression = (...variances: readonly number[]) =>
  ({
    explained: 0.8,
    parts: variances.map((variance, index) => ({ name: `input-${index}`, variance, gradient: Float64Array.of(1) })),
  }) as unknown as Parameters<typeof shareVariance>[0]

describe('decisions at their edges', () => {
  it('without a draw nothing is won and nothing lost', () => {
    expect(countOdds([candidate('a', []), candidate('b', [])])).toMatchObject([
      { id: 'a', best: 0, lostShare: 0 },
      { id: 'b', best: 0, lostShare: 0 },
    ])
    expect(countOdds([])).toEqual([])
    expect(lostShare(new Float64Array(0))).toBe(0)
  })

  it('accepted parts without a nominal loss come last among the accepted, by id', () => {
    const part = (id: string, nominalStageLoss: number | null, accepted = true) => ({ id, nominalStageLoss, accepted })
    const given = [part('z', null), part('c', 9), part('a', null), part('b', 1, false)]
    expect(orderCandidates(given).map(({ id }) => id)).toEqual(['c', 'a', 'z', 'b'])
  })

  it('a gap that nothing moves has no shares, and equal shares stand by name', () => {
    expect(shareVariance(regression(0, 0))).toEqual([
      { input: 'input-0', share: 0 },
      { input: 'input-1', share: 0 },
    ])
    const shares = shareVariance(regression(1, 2, 1))
    expect(shares.map(({ input }) => input)).toEqual(['input-1', 'input-0', 'input-2'])
    expect(shares.map(({ share }) => share)).toEqual([0.4, 0.2, 0.2])
  })

  it('equal advice stands by part, property, current, slope and temperature, whatever the order given', () => {
    const option = (
      id: string,
      property: 'recovery' | 'forward',
      current: number,
      slope: number | null,
      junction: number,
    ) =>
      ({
        input: 'input-0',
        advice: { id, property, current_a: current, slope_a_per_s: slope, junction_c: junction },
      }) as const satisfies MeasurementOption
    const better = [
      option('a', 'forward', 1, null, 25),
      option('a', 'recovery', 1, 1e8, 25),
      option('b', 'forward', 1, null, 25),
    ]
    const worse = [
      option('a', 'recovery', 2, 1e8, 25),
      option('a', 'recovery', 1, 2e8, 25),
      option('a', 'recovery', 1, 1e8, 80),
      option('a', 'forward', 1, null, 80),
      option('b', 'forward', 3, null, 25),
    ]
    const effect = () => ({ before: Float64Array.of(1), after: Float64Array.of(0.25) })
    for (const options of [[...better, ...worse], [...worse, ...better].reverse(), [...worse, ...better]]) {
      const advice = adviseMeasurement(regression(1), options, effect)
      expect(advice).toEqual(better.map((one) => ({ ...one.advice, share: 0.8 * 0.75 })))
    }
  })

  it('a row that tells nothing, or that would add doubt, is not advised', () => {
    const options = [
      { input: 'input-0', advice: { id: 'a', property: 'forward', current_a: 1, slope_a_per_s: null, junction_c: 25 } },
    ] as const
    const advise = (before: number, after: number) =>
      adviseMeasurement(regression(1), options, () => ({
        before: Float64Array.of(before),
        after: Float64Array.of(after),
      }))
    expect(advise(0, 0)).toEqual([])
    expect(advise(1, 1)).toEqual([])
    expect(advise(1, 2)).toEqual([])
    expect(advise(1, 0)[0]!.share).toBe(0.8)
    expect(
      adviseMeasurement(regression(), options, () => ({ before: Float64Array.of(1), after: Float64Array.of(0) })),
    ).toEqual([])
  })

  it('an undecided best names nobody where no rival is ever cheaper, and the first by id where two are as near', () => {
    const draws = (cheap: number, from: number) =>
      Array.from({ length: 100 }, (_, k) => (k >= from && k < from + cheap ? 1 : 9))
    const lost = Array.from({ length: 100 }, (_, k) => (k < 80 ? 5 : Number.POSITIVE_INFINITY))
    const never = candidate('never', Array<number>(100).fill(Number.POSITIVE_INFINITY), { nominalStageLoss: 9 })
    expect(decide([candidate('best', lost, { nominalStageLoss: 5 }), never])).toMatchObject({
      decided: false,
      tied: [],
    })
    const rivals = ['z', 'y'].map((id, k) => candidate(id, draws(7, 10 * k), { nominalStageLoss: 9 }))
    expect(decide([candidate('best', Array<number>(100).fill(5)), ...rivals])).toMatchObject({
      decided: false,
      tied: ['y'],
    })
  })
})
