import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { countOdds } from '../../src/decision/odds.ts'
import { latinHypercube } from '../../src/numerics/latin-hypercube.ts'
import { seededStream } from '../../src/numerics/seeded-stream.ts'
import { candidate, companies, shuffledCompanies } from './candidates.ts'

describe('countOdds', () => {
  it('counts the draws in which each accepted part is the cheapest, lost draws against it', () => {
    const odds = countOdds([
      candidate('a', [1, 5, Infinity, 1]),
      candidate('b', [2, 2, 2, 2]),
      candidate('c', [0, 0, 0, 0], { accepted: false }),
    ])
    expect(odds.map(({ best }) => best)).toEqual([0.5, 0.5, 0])
    expect(odds.map(({ lostShare }) => lostShare)).toEqual([0.25, 0, 0])
    expect(odds[2]!.error).toBe(0)
  })

  it('shares an exact tie equally', () => {
    const odds = countOdds([candidate('a', [1, 1]), candidate('b', [1, 3]), candidate('c', [1, 3])])
    expect(odds.map(({ best }) => best)).toEqual([(1 / 3 + 1) / 2, 1 / 6, 1 / 6])
  })

  it('adds up to 1 minus the share of draws in which every accepted part is lost', () => {
    fc.assert(
      fc.property(companies, (company) => {
        const accepted = company.filter((one) => one.accepted)
        const draws = company[0]!.stageLoss.length
        let lostByAll = 0
        for (let draw = 0; draw < draws; draw++)
          if (accepted.every((one) => one.stageLoss[draw] === Infinity)) lostByAll++
        const sum = countOdds(company).reduce((total, { best }) => total + best, 0)
        expect(sum).toBeCloseTo(1 - lostByAll / draws, 12)
      }),
      { seed: 1 },
    )
  })

  it('gives the same bytes whatever the order of the candidates', () => {
    fc.assert(
      fc.property(shuffledCompanies, ({ company, shuffled }) => {
        const byId = new Map(countOdds(shuffled).map((odds) => [odds.id, odds]))
        for (const odds of countOdds(company)) expect(byId.get(odds.id)).toEqual(odds)
      }),
      { seed: 2 },
    )
  })

  it('never gains a part anything when a rival gets cheaper', () => {
    fc.assert(
      fc.property(companies, (company) => {
        const [first, ...others] = company
        const cheaper = { ...first!, accepted: true, stageLoss: first!.stageLoss.map((loss) => loss - 1) }
        const before = countOdds(company)
        const after = countOdds([cheaper, ...others])
        for (let index = 1; index < company.length; index++) {
          expect(after[index]!.best).toBeLessThanOrEqual(before[index]!.best)
        }
        expect(after[0]!.best).toBeGreaterThanOrEqual(before[0]!.best)
      }),
      { seed: 3 },
    )
  })

  it('states an error that bounds what repetition shows and is never 0 for an accepted part', () => {
    const repeated = Array.from({ length: 200 }, (_, repetition) => {
      const [shared, own, other] = latinHypercube({
        draws: 100,
        dimensions: 3,
        stream: seededStream('odds', repetition),
      })
      const losses = (offset: number, part: Float64Array) =>
        Array.from(part, (value, draw) => offset + value + shared![draw]!)
      return countOdds([candidate('a', losses(0, own!)), candidate('b', losses(1, other!))])[0]!
    })
    const mean = repeated.reduce((sum, { best }) => sum + best, 0) / 200
    const scatter = Math.sqrt(repeated.reduce((sum, { best }) => sum + (best - mean) ** 2, 0) / 199)
    const stated = repeated.reduce((sum, { error }) => sum + error, 0) / 200
    // Φ(1/√2) = 0.7602; the mean of 200 repetitions is within four standard errors.
    expect(Math.abs(mean - 0.7602)).toBeLessThan((4 * scatter) / Math.sqrt(200))
    expect(scatter).toBeLessThan(stated)
    expect(stated).toBeLessThan(0.045)
    const sure = countOdds([candidate('a', new Array(1000).fill(1)), candidate('b', new Array(1000).fill(2))])
    expect(sure.map(({ best }) => best)).toEqual([1, 0])
    for (const { error } of sure) expect(error).toBeCloseTo(0.001, 4)
  })

  it('is empty for nobody', () => {
    expect(countOdds([])).toEqual([])
  })
})
