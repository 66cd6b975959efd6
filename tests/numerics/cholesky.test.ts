import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { choleskyFactor, NotCovarianceError } from '../../src/numerics/cholesky.ts'

/** A Aᵀ for A of n × m by rows. */
function timesTransposed(a: Float64Array, size: number): Float64Array {
  const width = a.length / size
  const product = new Float64Array(size * size)
  for (let row = 0; row < size; row++)
    for (let column = 0; column < size; column++)
      for (let k = 0; k < width; k++) product[row * size + column]! += a[row * width + k]! * a[column * width + k]!
  return product
}

describe('choleskyFactor', () => {
  it('factors by hand: [[4, 2], [2, 10]] = [[2, 0], [1, 3]] times its transpose', () => {
    expect(choleskyFactor(Float64Array.of(4, 2, 2, 10), 2)).toEqual(Float64Array.of(2, 0, 1, 3))
  })

  it('rebuilds any covariance, also of deficient rank', () => {
    const shape = fc
      .integer({ min: 1, max: 6 })
      .chain((size) =>
        fc
          .integer({ min: 1, max: 6 })
          .chain((width) =>
            fc
              .array(fc.integer({ min: -9, max: 9 }), { minLength: size * width, maxLength: size * width })
              .map((entries) => ({ size, root: Float64Array.from(entries) })),
          ),
      )
    fc.assert(
      fc.property(shape, ({ size, root }) => {
        const covariance = timesTransposed(root, size)
        const factor = choleskyFactor(covariance, size)
        const largest = Math.max(...covariance, 1)
        timesTransposed(factor, size).forEach((value, index) => {
          expect(Math.abs(value - covariance[index]!)).toBeLessThan(1e-5 * largest)
        })
        for (let row = 0; row < size; row++)
          for (let column = row + 1; column < size; column++) expect(factor[row * size + column]).toBe(0)
      }),
      { seed: 5, numRuns: 300 },
    )
  })

  it('gives a repeated quantity no direction of its own', () => {
    expect(choleskyFactor(Float64Array.of(1, 1, 1, 1), 2)).toEqual(Float64Array.of(1, 0, 1, 0))
    expect(choleskyFactor(new Float64Array(4), 2)).toEqual(new Float64Array(4))
  })

  it('takes what cancels to a hair below zero for zero', () => {
    const hair = Float64Array.of(1, 0.1, 0.1, 0.1 * 0.1 * (1 - 1e-15))
    expect(choleskyFactor(hair, 2)[3]).toBe(0)
  })

  it('works in place and reads the lower triangle only', () => {
    const matrix = Float64Array.of(4, 99, 2, 10)
    expect(choleskyFactor(matrix, 2, matrix)).toBe(matrix)
    expect(matrix).toEqual(Float64Array.of(2, 0, 1, 3))
  })

  it('refuses what is no covariance and says where', () => {
    expect(() => choleskyFactor(Float64Array.of(1, 2, 2, 1), 2)).toThrow(new NotCovarianceError(1, -3))
    expect(() => choleskyFactor(Float64Array.of(Number.NaN), 1)).toThrow(NotCovarianceError)
    expect(() => choleskyFactor(Float64Array.of(1, 2, 2, 1), 2)).toThrow('not a covariance: pivot -3 in row 1')
  })
})
