import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { decide, pairedGap } from '../../src/decision/verdict.ts'
import { candidate, companies, shuffledCompanies } from './candidates.ts'

/** `count` draws at `low`, the rest of 100 at `high`. */
const mixed = (count: number, low: number, high: number): number[] =>
  Array.from({ length: 100 }, (_, draw) => (draw < count ? low : high))

describe('decide', () => {
  it('is decided from odds of 0.9 on', () => {
    const rival = candidate('b', mixed(100, 2, 2))
    const sure = decide([candidate('a', mixed(90, 1, 3)), rival])
    expect(sure).toMatchObject({ best: 'a', decided: true, odds: 0.9, tied: [], runnerUp: 'b', gap: 1 })
    const unsure = decide([candidate('a', mixed(89, 1, 3)), rival])
    expect(unsure).toMatchObject({ best: 'a', decided: false, odds: 0.89, tied: ['b'] })
  })

  it('takes the best by the nominal loss even where another wins more draws', () => {
    const verdict = decide([candidate('a', mixed(20, 1, 3)), candidate('b', mixed(0, 2, 2))])
    expect(verdict).toMatchObject({ best: 'a', decided: false, odds: 0.2, tied: ['b'] })
  })

  it('names as tied only those that are cheaper than the best in more than a tenth of the draws, by id', () => {
    const verdict = decide([
      candidate('best', mixed(50, 10, 20)),
      candidate('z-often', mixed(50, 15, 15)),
      candidate('a-often', mixed(100, 16, 16)),
      candidate('seldom', mixed(90, 30, 19)),
    ])
    expect(verdict.best).toBe('best')
    expect(verdict.tied).toEqual(['a-often', 'z-often'])
  })

  it('names the nearest rival where the doubt is spread over many', () => {
    const rivals = [0, 1, 2].map((k) =>
      candidate(
        `rival-${k}`,
        Array.from({ length: 100 }, (_, draw) => (draw >= 80 + 5 * k && draw < 85 + 5 * k + k ? 1 : 9)),
        {
          nominalStageLoss: 9,
        },
      ),
    )
    expect(decide([candidate('best', mixed(100, 5, 5)), ...rivals])).toMatchObject({
      decided: false,
      tied: ['rival-2'],
    })
  })

  it('holds two parts that never differ for tied', () => {
    const verdict = decide([candidate('b', mixed(100, 5, 5)), candidate('a', mixed(100, 5, 5))])
    expect(verdict).toMatchObject({ best: 'a', decided: false, odds: 0.5, tied: ['b'], gap: 0 })
    expect(verdict.gapInterval).toEqual({ low: 0, high: 0 })
  })

  it('compares draw by draw: common doubt does not blur the gap', () => {
    const common = Array.from({ length: 100 }, (_, draw) => draw)
    const verdict = decide([
      candidate('a', common),
      candidate(
        'b',
        common.map((loss) => loss + 0.5),
      ),
    ])
    expect(verdict).toMatchObject({ decided: true, odds: 1, gapInterval: { low: 0.5, high: 0.5 } })
  })

  it('leaves draws lost by either out of the interval and counts them against the loser', () => {
    const verdict = decide([candidate('a', mixed(80, 1, Infinity)), candidate('b', mixed(100, 2, 2))])
    expect(verdict).toMatchObject({ odds: 0.8, decided: false, tied: ['b'], gapLostShare: 0.2 })
    expect(verdict.gapInterval).toEqual({ low: 1, high: 1 })
    expect(decide([candidate('a', [Infinity], { nominalStageLoss: 1 }), candidate('b', [2])])).toMatchObject({
      best: 'a',
      gap: 1,
      gapInterval: null,
      gapLostShare: 1,
    })
  })

  it('decides for a single accepted part, with its lost draws in the odds', () => {
    const verdict = decide([
      candidate('a', mixed(70, 1, Infinity)),
      candidate('b', mixed(100, 0, 0), { accepted: false }),
    ])
    expect(verdict).toMatchObject({
      best: 'a',
      decided: true,
      odds: 0.7,
      tied: [],
      runnerUp: null,
      gap: null,
      gapDraws: null,
    })
  })

  it('names nobody where nothing is accepted', () => {
    expect(decide([candidate('a', [1], { accepted: false })])).toMatchObject({ best: null, decided: null, odds: null })
    expect(decide([])).toMatchObject({ best: null, decided: null })
  })

  it('does not depend on order, keeps the gap non-negative and names ties exactly while undecided', () => {
    fc.assert(
      fc.property(shuffledCompanies, ({ company, shuffled }) => {
        const verdict = decide(company)
        expect(decide(shuffled)).toEqual(verdict)
        if (verdict.gap !== null) expect(verdict.gap).toBeGreaterThanOrEqual(0)
        if (verdict.decided) expect(verdict.tied).toEqual([])
        expect(verdict.tied).not.toContain(verdict.best)
      }),
      { seed: 1 },
    )
  })

  it('is not moved by a rejected part', () => {
    fc.assert(
      fc.property(companies, (company) => {
        const accepted = company.filter((one) => one.accepted)
        fc.pre(accepted.length > 0)
        expect(decide(company)).toEqual(decide(accepted))
      }),
      { seed: 2 },
    )
  })
})

describe('pairedGap', () => {
  it('subtracts the first from the second and marks lost draws', () => {
    const gap = pairedGap(Float64Array.of(1, Infinity, 3, Infinity), Float64Array.of(4, 5, Infinity, Infinity))
    expect(gap).toEqual(Float64Array.of(3, Number.NaN, Number.NaN, Number.NaN))
  })
})
