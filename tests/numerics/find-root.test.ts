import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { findRoot } from '../../src/numerics/find-root.ts'

const find = (f: (x: number) => number, low: number, high: number, tolerance = 1e-14) =>
  findRoot({ f, low, high, tolerance, maxIterations: 200 })

describe('root finding', () => {
  it('finds known roots to the tolerance', () => {
    expect(find((x) => x * x - 2, 0, 2)?.root).toBeCloseTo(Math.SQRT2, 13)
    expect(find((x) => Math.cos(x) - x, 0, 1)?.root).toBeCloseTo(0.7390851332151607, 13)
    expect(find((x) => Math.exp(x) - 5, 5, -5)?.root).toBeCloseTo(Math.log(5), 13)
  })

  it('stays inside the bracket and ends where the sign changes, for every monotone cubic', () => {
    fc.assert(
      fc.property(fc.integer({ min: -1000, max: 1000 }), fc.integer({ min: 0, max: 50 }), (shift, linear) => {
        const f = (x: number) => x ** 3 + linear * x - shift
        const found = find(f, -20, 20)!
        expect(Math.abs(found.root)).toBeLessThanOrEqual(20)
        const near = 1e-12 * (1 + Math.abs(found.root)) + (linear === 0 ? 1e-4 : 0)
        expect(f(found.root - near) * f(found.root + near)).toBeLessThanOrEqual(0)
        expect(found.residual).toBe(f(found.root))
      }),
    )
  })

  it('needs far fewer steps than bisection on a smooth function, and never gives up on a jump', () => {
    expect(find((x) => Math.exp(x) - 5, -5, 5)!.iterations).toBeLessThan(15)
    const jump = find((x) => (x < 0.3 ? -1 : 1), 0, 1, 1e-10)!
    expect(jump.root).toBeCloseTo(0.3, 9)
  })

  it('returns an end that is a root, at once', () => {
    expect(find((x) => x, 0, 1)).toEqual({ root: 0, iterations: 0, residual: 0 })
    expect(find((x) => x - 1, 0, 1)).toEqual({ root: 1, iterations: 0, residual: 0 })
  })

  it('is null without a change of sign, and where a value is no number', () => {
    expect(find((x) => x * x + 1, -1, 1)).toBeNull()
    expect(find(() => Number.NaN, -1, 1)).toBeNull()
  })

  it('gives the best point so far when the iterations run out', () => {
    const found = findRoot({ f: (x) => x - 0.123, low: 0, high: 1, tolerance: 0, maxIterations: 1 })!
    expect(found.iterations).toBe(1)
    expect(Math.abs(found.residual)).toBeLessThan(1)
  })
})
