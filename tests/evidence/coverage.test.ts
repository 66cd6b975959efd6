import { describe, expect, it } from 'vitest'
import { coverageOf } from './coverage.ts'
import { priorWorld, roughWorld } from './worlds.ts'

/** Standard error of a share of 0.9 over 800 worlds is 0.011; the bounds lie three of them outside the claim's. */
const count = 800

describe('the 90 % interval of one recovery of the engineer’s own unit', () => {
  it('holds the truth in 85 to 95 of 100 worlds drawn from the priors, and is no wider than it has to be', () => {
    const { inside, ratio } = coverageOf(Array.from({ length: count }, (_, index) => priorWorld({ seed: 1, index })))
    expect(inside).toBeGreaterThan(0.85)
    expect(inside).toBeLessThan(0.95)
    expect(ratio).toBeGreaterThan(1.6)
    expect(ratio).toBeLessThan(2.2)
  })

  it('holds it in at least 80 of 100 rough worlds, whose power laws are none of the models', () => {
    const { inside, ratio } = coverageOf(Array.from({ length: count }, (_, index) => roughWorld({ seed: 1, index })))
    expect(inside).toBeGreaterThan(0.8)
    expect(ratio).toBeLessThan(2.2)
  })

  it('is narrower with four rows than with one', () => {
    const ratioOf = (rows: number) =>
      coverageOf(Array.from({ length: 200 }, (_, index) => priorWorld({ seed: 2, index, rows }))).ratio
    expect(ratioOf(4)).toBeLessThan(0.9 * ratioOf(1))
  })
})
