import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { RankResult } from '../../src/domain/result.ts'
import type { Stage } from '../../src/domain/stage.ts'
import { rank } from '../../src/study/rank.ts'
import { inventedParts, openStage, settings } from './parts.ts'

/** Figures of a part that do not come from company: all but the odds, which depend on who else was drawn. */
const alone = ({ candidates }: RankResult, most: number) =>
  candidates.slice(0, most).map(({ odds_best, odds_error, ...rest }) => rest)

function both(stage: Stage, parts: readonly RectifierRecord[], top: number) {
  return {
    fast: rank(stage, parts, { ...settings, top }),
    full: rank(stage, parts, { ...settings, top: parts.length }),
  }
}

describe('a ranking that lists only the first of many', () => {
  const stage = openStage('pump-boost')
  const parts = inventedParts(2500, 3)
  const { fast, full } = both(stage, parts, 50)

  it('lists the same parts at the same places with the same figures as ranking all', () => {
    expect(full.candidates).toHaveLength(parts.length)
    expect(alone(fast, 50)).toEqual(alone(full, 50))
  })

  it('names the same best part and runner-up with the same gap', () => {
    const { best, runner_up, gap_w, gap_low_w, gap_high_w } = full.verdict
    expect(fast.verdict).toMatchObject({ best, runner_up, gap_w, gap_low_w, gap_high_w })
  })

  it('counts every other part once, the rejected ones under a rule that they break', () => {
    const rest = fast.not_listed!
    const rejected = rest.rejected.reduce((sum, { count }) => sum + count, 0)
    expect(rest.count).toBe(parts.length - 50)
    expect(rest.costlier + rejected).toBe(rest.count)
    for (const { code, count } of rest.rejected) {
      const broken = full.candidates.filter(({ reasons }) => reasons.some((reason) => reason.code === code))
      expect(count, code).toBeLessThanOrEqual(broken.length)
    }
    expect(full.not_listed).toBeNull()
  })

  it('states odds that ranking all would state, but for the share it gives for parts it did not draw', () => {
    const beyond = fast.warnings.find(({ code }) => code === 'odds-beyond-list')!
    expect(beyond.data.last).toBeLessThan(0.01)
    const all = new Map(full.candidates.map(({ id, odds_best }) => [id, odds_best!]))
    const excess = fast.candidates.reduce((sum, { id, odds_best }) => sum + odds_best! - all.get(id)!, 0)
    expect(excess).toBeGreaterThanOrEqual(-1e-12)
    expect(excess).toBeLessThan(0.05)
  })

  it('warns about listed parts only', () => {
    const listed = new Set(['', ...fast.candidates.map(({ id }) => id)])
    expect(fast.warnings.filter(({ candidate }) => !listed.has(candidate))).toEqual([])
  })
})

describe('where fewer are accepted than are listed', () => {
  it('fills the list with rejected parts by id, as ranking all does', () => {
    const stage = openStage('pump-boost')
    const hot: Stage = { ...stage, limits: { ...stage.limits, junction: 273.15 + 78 } }
    const { fast, full } = both(hot, inventedParts(300, 5), 40)
    expect(full.candidates.filter(({ accepted }) => accepted).length).toBeLessThan(40)
    expect(alone(fast, 40)).toEqual(alone(full, 40))
    expect(fast.not_listed!.costlier).toBe(0)
    expect(fast.not_listed!.rejected.reduce((sum, { count }) => sum + count, 0)).toBe(fast.not_listed!.count)
  })

  it('tells why nothing is acceptable', () => {
    const stage = openStage('pump-boost')
    const none: Stage = { ...stage, limits: { ...stage.limits, junction: 273.15 + 46 } }
    const { fast, full } = both(none, inventedParts(120, 5), 10)
    expect(fast.verdict.best).toBeNull()
    expect(alone(fast, 10)).toEqual(alone(full, 10))
  })
})

describe.each(['cold-store-mains', 'pack-buck', 'sprayer-inverting', 'quick-estimate'])('on the stage %s', (name) => {
  it('the list is the beginning of ranking all', () => {
    const { fast, full } = both(openStage(name), inventedParts(80, 11), 12)
    expect(alone(fast, 12)).toEqual(alone(full, 12))
    expect(fast.verdict.best).toBe(full.verdict.best)
  })
})

it('lists everything where there are no more parts than it may list', () => {
  const result = rank(openStage('pump-boost'), inventedParts(30, 1), settings)
  expect(result.not_listed).toBeNull()
  expect(result.warnings.map(({ code }) => code)).not.toContain('odds-beyond-list')
})
