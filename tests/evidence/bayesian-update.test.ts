import { describe, expect, it } from 'vitest'
import type { Gaussian } from '../../src/domain/calibrated-rectifier.ts'
import {
  conditioned,
  type Observation,
  predictedCovariance,
  predictedDeviation,
  predictedMean,
} from '../../src/evidence/bayesian-update.ts'

type Matrix = readonly (readonly number[])[]

/** Solves a x = b by elimination: small, symmetric and well behaved matrices only. */
function solved(a: Matrix, b: Matrix): number[][] {
  const rows = a.map((row, index) => [...row, ...b[index]!])
  for (const [k, pivot] of rows.entries()) {
    for (const [i, row] of rows.entries()) {
      if (i === k) continue
      const factor = row[k]! / pivot[k]!
      for (let j = k; j < row.length; j++) row[j]! -= factor * pivot[j]!
    }
  }
  return rows.map((row, index) => row.slice(a.length).map((value) => value / row[index]!))
}

function product(a: Matrix, b: Matrix): number[][] {
  return a.map((row) => b[0]!.map((_, j) => row.reduce((sum, value, k) => sum + value * b[k]![j]!, 0)))
}

const transposed = (a: Matrix): number[][] => a[0]!.map((_, j) => a.map((row) => row[j]!))
const plus = (a: Matrix, b: Matrix): number[][] => a.map((row, i) => row.map((value, j) => value + b[i]![j]!))
const squareOf = (values: ArrayLike<number>, n: number): number[][] =>
  Array.from({ length: n }, (_, i) => Array.from({ length: n }, (_, j) => values[i * n + j]!))

/** The same by the information form: precisions add, and so do precisions times values. */
function byInformation(prior: Gaussian, observations: readonly Observation[]) {
  const n = prior.mean.length
  const unit = squareOf(
    Array.from({ length: n * n }, (_, k) => (k % (n + 1) === 0 ? 1 : 0)),
    n,
  )
  let precision = solved(squareOf(prior.covariance, n), unit)
  let weighted = product(precision, transposed([[...prior.mean]]))
  for (const { designs, values, noise } of observations) {
    const h = designs.map((design) => [...design])
    const gain = transposed(solved(squareOf(noise, h.length), h))
    precision = plus(precision, product(gain, h))
    weighted = plus(weighted, product(gain, transposed([[...values]])))
  }
  return { mean: solved(precision, weighted).flat(), covariance: solved(precision, unit).flat() }
}

const prior: Gaussian = {
  mean: Float64Array.of(1, -2, 0.5),
  covariance: Float64Array.of(2, 0.3, -0.4, 0.3, 1, 0.2, -0.4, 0.2, 0.7),
}
const one: Observation = { designs: [Float64Array.of(1, 0.5, -1)], values: [3], noise: [0.04] }
const other: Observation = { designs: [Float64Array.of(0.3, -1, 2)], values: [-1], noise: [0.5] }
const pair: Observation = {
  designs: [Float64Array.of(1, 2, 0), Float64Array.of(0, 1, -0.7)],
  values: [2, -1.5],
  noise: [0.09, 0.04, 0.04, 0.06],
}

describe('a normal distribution of coefficients', () => {
  it.each([
    ['one value', [one]],
    ['two values', [one, other]],
    ['a pair with correlated errors', [pair]],
    ['all of them', [one, pair, other]],
  ])('given %s is what adding precisions gives', (_, observations) => {
    const found = conditioned(prior, observations)
    const expected = byInformation(prior, observations)
    for (const [index, value] of found.mean.entries()) expect(value).toBeCloseTo(expected.mean[index]!, 11)
    for (const [index, value] of found.covariance.entries()) expect(value).toBeCloseTo(expected.covariance[index]!, 11)
  })

  it('given nothing is an equal copy, to the last bit', () => {
    const thirds: Gaussian = { mean: Float64Array.of(1 / 3), covariance: Float64Array.of(1 / 3) }
    for (const held of [prior, thirds]) {
      const copy = conditioned(held, [])
      expect(copy).toEqual(held)
      expect(copy.mean).not.toBe(held.mean)
      expect(copy.covariance).not.toBe(held.covariance)
    }
  })

  it('given values leaves the prior itself alone', () => {
    const before = { mean: [...prior.mean], covariance: [...prior.covariance] }
    conditioned(prior, [one, pair])
    expect({ mean: [...prior.mean], covariance: [...prior.covariance] }).toEqual(before)
  })

  it('given a pair whose errors are one and the same knows their difference to 1e-7, never exactly', () => {
    const held: Gaussian = { mean: Float64Array.of(0, 0), covariance: Float64Array.of(1, 0, 0, 1) }
    const designs = [Float64Array.of(1, 0), Float64Array.of(0, 1)]
    const after = conditioned(held, [{ designs, values: [5, 3], noise: [1, 1, 1, 1] }])
    const difference = Float64Array.of(1, -1)
    expect(predictedMean(after, difference)).toBeCloseTo(2, 9)
    expect(predictedDeviation(after, difference) / 1e-7).toBeCloseTo(1, 1)
  })

  it('that is certain along a direction stays so: there is nothing to learn', () => {
    const flat: Gaussian = { mean: Float64Array.of(1, 2), covariance: Float64Array.of(1, 0, 0, 0) }
    const after = conditioned(flat, [{ designs: [Float64Array.of(1, 1)], values: [5], noise: [1] }])
    // 3 expected with variance 1, error variance 1: half the way to 5
    expect([...after.mean]).toEqual([expect.closeTo(2, 12), 2])
    expect([...after.covariance]).toEqual([expect.closeTo(0.5, 12), 0, 0, 0])
    const known = conditioned(flat, [{ designs: [Float64Array.of(0, 1)], values: [5], noise: [1] }])
    expect([...known.mean, ...known.covariance]).toEqual([1, 2, 1, 0, 0, 0])
  })
})

describe('a prediction', () => {
  const [h, g] = [Float64Array.of(1, 0, 2), Float64Array.of(0, 3, -1)]

  it('has the mean h·b, the variance h P h and the covariance h P g', () => {
    expect(predictedMean(prior, h)).toBeCloseTo(2, 12)
    // 2 + 2·2·(−0.4) + 4·0.7
    expect(predictedCovariance(prior, h, h)).toBeCloseTo(3.2, 12)
    expect(predictedDeviation(prior, h)).toBeCloseTo(Math.sqrt(3.2), 12)
    // 1·(3·0.3 + 0.4) + 2·(3·0.2 − 0.7)
    expect(predictedCovariance(prior, h, g)).toBeCloseTo(1.1, 12)
  })

  it('has no variance below zero, whatever rounding left, but may have such a covariance', () => {
    const rounded: Gaussian = { mean: Float64Array.of(0, 0), covariance: Float64Array.of(-1e-18, -0.5, -0.5, 1) }
    const [first, second] = [Float64Array.of(1, 0), Float64Array.of(0, 1)]
    expect(predictedDeviation(rounded, first)).toBe(0)
    expect(predictedCovariance(rounded, first, second)).toBe(-0.5)
  })
})
