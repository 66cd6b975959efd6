import { describe, expect, it } from 'vitest'
import { normalQuantile } from '../../src/numerics/normal-quantile.ts'

/** Density of the standard normal. */
const density = (x: number): number => Math.exp((-x * x) / 2) / Math.sqrt(2 * Math.PI)

/** Share beyond x > 0 by Simpson's rule on the density scaled by that at x, so that far tails keep all digits. */
function upperTail(x: number): number {
  const steps = 40000
  const width = Math.min(10, 42 / Math.max(1, x))
  let sum = 0
  for (let k = 0; k <= steps; k++) {
    const t = (k * width) / steps
    sum += (k === 0 || k === steps ? 1 : k % 2 === 1 ? 4 : 2) * Math.exp(-t * x - (t * t) / 2)
  }
  return (density(x) * sum * width) / steps / 3
}

describe('normalQuantile', () => {
  it.each([0.0001, 0.1, 0.5, 1, 1.4, 1.45, 2, 3, 4, 4.8, 5.5, 7, 10, 20, 37])(
    'finds -%d from the share below it, which Simpson integration gives independently',
    (x) => {
      const share = upperTail(x)
      // An error e in the share moves the quantile by e / density; the integration keeps about 13 digits.
      expect(Math.abs(normalQuantile(share) + x)).toBeLessThan((2e-13 * share) / density(x) + 4e-15 * x)
    },
  )

  it('is antisymmetric, increasing and zero in the middle', () => {
    expect(normalQuantile(0.5)).toBe(0)
    let last = -Infinity
    for (let k = 1; k < 4096; k++) {
      const value = normalQuantile(k / 4096)
      expect(value).toBeGreaterThan(last)
      expect(normalQuantile(1 - k / 4096) + value).toBe(0)
      last = value
    }
  })

  it('joins its ranges without a step', () => {
    for (const seam of [0.075, Math.exp(-25)]) {
      const below = normalQuantile(seam * (1 - 1e-12))
      const above = normalQuantile(seam * (1 + 1e-12))
      const expected = (2e-12 * seam) / density(below)
      expect(Math.abs(above - below - expected)).toBeLessThan(4e-15 * Math.abs(below))
    }
  })

  it('ends at infinity and has no value outside', () => {
    expect(normalQuantile(0)).toBe(-Infinity)
    expect(normalQuantile(1)).toBe(Infinity)
    expect(normalQuantile(-0.1)).toBeNaN()
    expect(normalQuantile(1.1)).toBeNaN()
  })
})
