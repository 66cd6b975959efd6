import { describe, expect, it } from 'vitest'
import type { Gaussian } from '../../src/domain/calibrated-rectifier.ts'
import { findContradiction, type NamedObservation } from '../../src/evidence/find-contradiction.ts'

/** One coefficient, 0 ± 2, read directly with an error of 1. */
const prior: Gaussian = { mean: Float64Array.of(0), covariance: Float64Array.of(4) }

const reading = (name: string, value: number): NamedObservation => ({
  name,
  observation: { designs: [Float64Array.of(1)], values: [value], noise: [1] },
})

function found(...values: readonly number[]) {
  const rows = values.map((value, index) => reading(`row ${index + 1}`, value))
  const caveats = findContradiction('part', prior, rows)
  return caveats.map(({ code, candidate, data }) => ({ code, candidate, ...data }))
}

/** What others tell: precisions 1/4 and 1 each add; the distance counts the row's own error as well. */
function distance(value: number, ...others: readonly number[]): number {
  const variance = 1 / (1 / 4 + others.length)
  const mean = variance * others.reduce((sum, other) => sum + other, 0)
  return Math.abs(value - mean) / Math.sqrt(variance + 1)
}

describe('rows that contradict each other', () => {
  const told = (row: string, other: string, away: number) => [
    { code: 'rows-contradict', candidate: 'part', row, other, distance: expect.closeTo(away, 9) },
  ]

  it('are told by the row farther from what class and other rows predict, in its standard deviations', () => {
    // 10 against 0 ± sqrt(0.8 + 1); the other way round it is 0 against 8
    expect(found(0, 10)).toEqual(told('row 2', 'row 1', 10 / Math.sqrt(1.8)))
    expect(found(10, 0)).toEqual(told('row 1', 'row 2', 10 / Math.sqrt(1.8)))
    expect(found(-10, 0)).toEqual(told('row 1', 'row 2', 10 / Math.sqrt(1.8)))
  })

  it('are told beyond three deviations only', () => {
    expect(found(0, 3 * Math.sqrt(1.8) - 0.01)).toEqual([])
    expect(found(0, 3 * Math.sqrt(1.8) + 0.01)).toHaveLength(1)
  })

  it('are not accused where the class is the one that is far from both', () => {
    // 26 is 7.5 deviations from what 20 predicts but 11.6 from the class: 20 brings it nearer
    expect(distance(26, 20)).toBeGreaterThan(3)
    expect(found(20, 26)).toEqual([])
  })

  it('are told of the worst among many, with the row that alone makes it least likely', () => {
    expect(found(1, -1, 0.5, 12, 0)).toEqual(told('row 4', 'row 2', distance(12, 1, -1, 0.5, 0)))
    expect(found(-12, 1, -1, 9)).toEqual(told('row 1', 'row 4', distance(-12, 1, -1, 9)))
    expect(found(-1, 8, 1)).toEqual(told('row 2', 'row 1', distance(8, -1, 1)))
    expect(found(8, 1, -1)).toEqual(told('row 1', 'row 3', distance(8, 1, -1)))
  })

  it('are told by the first of two that are equally far, and of two equal others by the first', () => {
    expect(found(-10, 10)).toEqual(told('row 1', 'row 2', distance(-10, 10)))
    expect(found(0, 0, 10)).toEqual(told('row 3', 'row 1', distance(10, 0, 0)))
  })

  it('need two of them', () => {
    expect(found()).toEqual([])
    expect(found(100)).toEqual([])
  })

  it('of two values each are as far apart as both residuals and their correlation make them', () => {
    const wide: Gaussian = { mean: Float64Array.of(0, 0), covariance: Float64Array.of(3, 0, 0, 3) }
    const designs = [Float64Array.of(1, 0), Float64Array.of(0, 1)]
    const both = (name: string, values: readonly number[], noise: readonly number[]) => ({
      name,
      observation: { designs, values, noise },
    })
    // the first leaves 0 ± 1 on either; with the noise of the second S = [2, 0.5; 0.5, 2], S⁻¹ = [2, −0.5; −0.5, 2]/3.75
    const first = both('first', [0, 0], [1.5, 0, 0, 1.5])
    const squared = ([r, s]: readonly [number, number]) => (2 * r * r - r * s + 2 * s * s) / 3.75
    for (const values of [
      [6, 0],
      [0, -7],
      [6, 1],
      [5, -2],
    ] as const) {
      const rows = [first, both('second', values, [1, 0.5, 0.5, 1])]
      const [caveat] = findContradiction('part', wide, rows)
      expect(caveat!.data).toEqual({
        row: 'second',
        other: 'first',
        distance: expect.closeTo(Math.sqrt(squared(values)), 9),
      })
    }
    expect(findContradiction('part', wide, [first, both('second', [4, 4], [1, 0.5, 0.5, 1])])).toHaveLength(1)
    expect(findContradiction('part', wide, [first, both('second', [3, 3], [1, 0.5, 0.5, 1])])).toEqual([])
  })
})
