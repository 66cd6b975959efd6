import { describe, expect, it } from 'vitest'
import { leastSquares } from '../../src/numerics/least-squares.ts'
import { seededStream } from '../../src/numerics/seeded-stream.ts'

const column = (length: number, value: (row: number) => number): Float64Array =>
  Float64Array.from({ length }, (_, row) => value(row))

describe('leastSquares', () => {
  it('fits the line of a worked example: y = 2/3 + x/2 through (1,1), (2,2), (3,2)', () => {
    // Normal equations by hand: slope 1/2, intercept 2/3, residuals -1/6, 1/3, -1/6.
    const fit = leastSquares([column(3, () => 1), column(3, (row) => row + 1)], Float64Array.of(1, 2, 2))
    expect(fit.coefficients[0]).toBeCloseTo(2 / 3, 14)
    expect(fit.coefficients[1]).toBeCloseTo(1 / 2, 14)
    expect(fit.residualSquares).toBeCloseTo(1 / 6, 14)
    expect(fit.rank).toBe(2)
  })

  it('recovers coefficients of columns that differ by 1e15 in scale and nearly repeat one another', () => {
    const one = column(40, () => 1)
    const charge = column(40, (row) => 1e-9 * (1 + row))
    const slope = column(40, (row) => 1e6 * (1 + row + 1e-4 * Math.sin(row)))
    const target = column(40, (row) => 3 + 2e9 * charge[row]! - 5e-6 * slope[row]!)
    const { coefficients } = leastSquares([one, charge, slope], target)
    expect(coefficients[0]! / 3).toBeCloseTo(1, 9)
    expect(coefficients[1]! / 2e9).toBeCloseTo(1, 9)
    expect(coefficients[2]! / -5e-6).toBeCloseTo(1, 9)
  })

  it('leaves a residual orthogonal to every column', () => {
    const stream = seededStream('residual')
    const columns = Array.from({ length: 5 }, () => column(30, () => stream.uniform() - 0.3))
    const target = column(30, () => stream.uniform())
    const { coefficients, residualSquares } = leastSquares(columns, target)
    const residual = target.map((value, row) =>
      columns.reduce((rest, one, j) => rest - coefficients[j]! * one[row]!, value),
    )
    for (const one of columns)
      expect(Math.abs(residual.reduce((sum, value, row) => sum + value * one[row]!, 0))).toBeLessThan(1e-13)
    expect(residualSquares).toBeCloseTo(
      residual.reduce((sum, value) => sum + value * value, 0),
      12,
    )
  })

  it('gives repeated and zero columns coefficient 0 and counts the rank', () => {
    const line = column(10, (row) => row - 4.5)
    const fit = leastSquares(
      [new Float64Array(10), line, line.map((value) => -3 * value)],
      line.map((value) => 2 * value),
    )
    expect(fit.coefficients[0]).toBe(0)
    expect(fit.coefficients[1]).toBeCloseTo(2, 14)
    expect(fit.coefficients[2]).toBe(0)
    expect(fit.rank).toBe(1)
  })

  it('has nothing to say without columns', () => {
    const fit = leastSquares([], Float64Array.of(1, 2))
    expect(fit.coefficients).toHaveLength(0)
    expect(fit.residualSquares).toBe(5)
  })
})
