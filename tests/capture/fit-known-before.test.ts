import { describe, expect, it } from 'vitest'
import { fitCorner } from '../../src/capture/fit-corner.ts'
import { handCourse, windowOf } from './handmade.ts'

const line = { at: 20, value: 0, rise: -1, residual: 0, count: 10 }
const guess = { corner: 25.8, tailTime: 4, rounding: 0.2, roundingDoubt: 0.1, base: 0.3, baseDoubt: 0.1, noise: 0.05 }

/** A noisy record that ends at 26.1, just after the corner, or `more` samples of 0.4 later. */
function shortFit(change: Partial<typeof guess>, more = 0) {
  const window = windowOf({ start: 22.1, interval: 0.4, count: 11 + more }, handCourse)
  const current = window.current.map((value, k) => value + (k % 2 === 0 ? 0.05 : -0.05))
  return fitCorner({ ...window, current }, line, 2, 11 + more, { ...guess, ...change })
}

describe('what a record does not show', () => {
  it.each([{}, { tailTime: 6 }, { rounding: 0.5 }, { baseDoubt: 0.02 }, { roundingDoubt: 3 }])(
    'stays what it was before: tail, rounding, and a baseline of nothing (%j)',
    (change) => {
      const { base, curve } = shortFit(change)
      const known = { ...guess, ...change }
      expect(base).toBeCloseTo(0, 6)
      expect(curve.tailTime).toBeCloseTo(known.tailTime, 5)
      expect(curve.rounding).toBeCloseTo(known.rounding, 5)
    },
  )

  it('leaves noise over the samples less four parameters', () => {
    // nine samples, 0.05 A each: 0.05 sqrt(9/5), less what a corner in the middle of them takes
    expect(shortFit({}).noise / (0.05 * Math.sqrt(9 / 5))).toBeCloseTo(1, 0.9)
  })
})

describe('what a record shows a little of', () => {
  it('is held by its doubt: a baseline by how far a zero may be off', () => {
    const loose = Math.abs(shortFit({ baseDoubt: 0.1 }, 9).base)
    const tight = Math.abs(shortFit({ baseDoubt: 0.02 }, 9).base)
    // as long as the doubt is small against what the record says, the base goes with its square
    expect(loose / tight).toBeGreaterThan(10)
    expect(loose).toBeLessThan(0.1)
  })

  it('is held by its doubt: a rounding by that of its logarithm', () => {
    const moved = (roundingDoubt: number) => Math.abs(Math.log(shortFit({ roundingDoubt }, 9).curve.rounding / 0.2))
    expect(moved(0.1)).toBeLessThan(0.05)
    expect(moved(1)).toBeGreaterThan(0.2)
  })
})
