import { describe, expect, it } from 'vitest'
import { fitCorner } from '../../src/capture/fit-corner.ts'
import { windowOf } from './handmade.ts'

/**
 * A fall of 1 A per unit of time through zero at 20 up to a corner at 26, an exponential of time 4 after it, both behind
 * a lag w of 0.5: after the corner w dr/dt + r = 6 exp(-x/4), from 6 - w on, solved by hand.
 */
const w = 0.5
const settled = (6 * 4) / (4 - w)
const truth = (t: number) => {
  const x = t - 26
  if (x < 0) return -(t - 20 - w)
  return -(settled * Math.exp(-x / 4) + (6 - w - settled) * Math.exp(-x / w))
}
/** The line as recorded: late by the lag. */
const line = { at: 20 + w, value: 0, rise: -1, residual: 0, count: 10 }
const grid = { start: 22.1, interval: 0.4, count: 80 }
const guess = { corner: 25, tailTime: 5, rounding: 0.7, roundingDoubt: 1, base: 0, baseDoubt: 0.5, noise: 1e-3 }

describe('the fit of corner and tail', () => {
  it('gives back corner, tail time, rounding, amplitude and baseline of a known curve', () => {
    const window = windowOf(grid, (t) => truth(t) + 0.2)
    const lifted = { ...line, value: 0.2 }
    const { curve, base, noise, from, to } = fitCorner(window, lifted, 0, 80, guess)
    expect(curve.corner).toBeCloseTo(26, 3)
    expect(curve.tailTime).toBeCloseTo(4, 3)
    expect(curve.rounding).toBeCloseTo(0.5, 3)
    expect(curve.amplitude).toBeCloseTo(6, 3)
    expect(curve.slope).toBe(1)
    expect(base).toBeCloseTo(0.2, 3)
    expect(noise).toBeLessThan(1e-3)
    expect([from, to]).toEqual([0, 80])
  })

  it('looks at the samples it is given alone', () => {
    const window = windowOf(grid, (t) => (t < 24 || t > 50 ? 99 : truth(t)))
    const { curve } = fitCorner(window, line, 5, 69, guess)
    expect(curve.corner).toBeCloseTo(26, 2)
    expect(curve.tailTime).toBeCloseTo(4, 2)
  })

  it('leaves the noise that there is: root mean square over the samples less four parameters', () => {
    const window = windowOf(grid, truth)
    const current = window.current.map((value, k) => value + (k % 2 === 0 ? 0.05 : -0.05))
    const { noise, curve } = fitCorner({ ...window, current }, line, 0, 80, guess)
    expect(noise).toBeCloseTo(0.05 * Math.sqrt(80 / 76), 3)
    expect(curve.corner).toBeCloseTo(26, 1)
  })

  it('stays with what is known before where a record shows nothing of it', () => {
    // five samples before the corner, on the line: nothing of corner and tail is in them
    const window = windowOf({ ...grid, count: 5 }, truth)
    const { curve, base } = fitCorner(window, line, 0, 5, { ...guess, corner: 40, base: 0.3 })
    expect(curve.tailTime).toBeCloseTo(5, 2)
    expect(curve.rounding).toBeCloseTo(0.7, 2)
    expect(curve.corner).toBe(40)
    expect(base).toBe(0.3)
  })
})
