import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { quantile } from '../../src/numerics/quantile.ts'

/** The definition, by sorting. */
function bySorting(values: Float64Array, probability: number): number {
  const sorted = values.toSorted()
  const position = (sorted.length - 1) * probability
  const lower = sorted[Math.floor(position)]!
  const upper = sorted[Math.ceil(position)]!
  return lower === upper ? lower : lower + (position - Math.floor(position)) * (upper - lower)
}

describe('quantile', () => {
  it('interpolates between order statistics as type 7 of Hyndman and Fan (1996) does', () => {
    const values = Float64Array.of(40, 15, 50, 20, 35)
    // Positions 4p = 0.2, 1.6, 2: by hand.
    expect(quantile(values, 0.05)).toBe(16)
    expect(quantile(values, 0.4)).toBeCloseTo(29, 12)
    expect(quantile(values, 0.5)).toBe(35)
    expect([quantile(values, 0), quantile(values, 1)]).toEqual([15, 50])
  })

  it('equals the definition by sorting, whatever the order, repeats and size', () => {
    const sample = fc.float64Array({
      minLength: 1,
      maxLength: 60,
      noNaN: true,
      noDefaultInfinity: true,
      min: -1e6,
      max: 1e6,
    })
    const repeats = fc
      .array(fc.integer({ min: 0, max: 3 }), { minLength: 1, maxLength: 60 })
      .map((list) => Float64Array.from(list))
    fc.assert(
      fc.property(fc.oneof(sample, repeats), fc.double({ min: 0, max: 1, noNaN: true }), (values, probability) => {
        const before = values.slice()
        // == : the sign of a zero may differ.
        expect(quantile(values, probability) === bySorting(values, probability)).toBe(true)
        expect(values).toEqual(before)
      }),
      { seed: 3, numRuns: 500 },
    )
  })

  it.each([
    ['rising', (k: number) => k],
    ['falling', (k: number) => -k],
    ['constant', () => 1],
    ['sawtooth', (k: number) => k % 17],
    ['organ pipe', (k: number) => Math.min(k, 20000 - k)],
  ])('is right and quick on 20000 %s values', (_, shape) => {
    const values = Float64Array.from({ length: 20001 }, (_, k) => shape(k))
    expect(quantile(values, 0.95)).toBe(bySorting(values, 0.95))
    expect(quantile(values, 0.333)).toBe(bySorting(values, 0.333))
  })

  it('counts infinite values as the largest without making NaN of them', () => {
    const values = Float64Array.of(1, 2, Infinity, Infinity, Infinity)
    expect(quantile(values, 0.25)).toBe(2)
    expect(quantile(values, 0.3)).toBe(Infinity)
    expect(quantile(values, 0.9)).toBe(Infinity)
  })

  it('refuses an empty sample and an impossible probability', () => {
    expect(() => quantile(new Float64Array(0), 0.5)).toThrow('no quantile 0.5 of 0 values')
    expect(() => quantile(Float64Array.of(1), 1.5)).toThrow('no quantile 1.5 of 1 values')
    expect(() => quantile(Float64Array.of(1), Number.NaN)).toThrow(RangeError)
  })
})
