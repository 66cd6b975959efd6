import { describe, expect, it } from 'vitest'
import { correctionAt, tailCorrection } from '../../src/capture/tail-correction.ts'
import { handCorner, handCourse, handCurve, windowOf } from './handmade.ts'

/** Ten samples for each of the fourteen knots of five tail times: tau = 4, so 20/14 for a knot. */
const length = 20 / 14
const grid = { start: 26 + 0.05 * length, interval: 0.1 * length, count: 200 }
const knot = (g: number) => 26 + (g + 0.5) * length

/** Samples with `extra` reverse current beside the exponential. */
const withExtra = (extra: (time: number) => number, base = 0) => windowOf(grid, (t) => handCourse(t) - extra(t) + base)
const fitted = handCorner({ from: 0, to: 200, noise: 0.01 })

describe('the correction of a tail', () => {
  it('is nothing for an exponential, in fourteen knots over five tail times', () => {
    const { time, reverse, significant, largest } = tailCorrection(
      withExtra(() => 0),
      fitted,
    )
    expect(time).toHaveLength(14)
    for (const g of [0, 5, 13]) expect(time[g]!).toBeCloseTo(knot(g), 12)
    for (const value of reverse) expect(value).toBeCloseTo(0, 9)
    expect(significant).toBe(false)
    expect(largest).toBeCloseTo(0, 9)
  })

  it('is the mean of what is left at each knot', () => {
    // rises by 1 A per knot, so that its mean at knot g is g + 0.5
    const ramp = (t: number) => (t - 26) / length
    const { reverse, largest } = tailCorrection(withExtra(ramp), fitted)
    for (const g of [0, 6, 13]) expect(reverse[g]!).toBeCloseTo(g + 0.5, 9)
    expect(largest).toBeCloseTo(13.5, 9)
    const down = tailCorrection(
      withExtra((t) => -ramp(t)),
      fitted,
    )
    expect(down.reverse[6]!).toBeCloseTo(-6.5, 9)
    expect(down.largest).toBeCloseTo(13.5, 9)
  })

  it('counts from the baseline, and over the fitted samples only', () => {
    const lifted = tailCorrection(
      withExtra(() => 1, 3),
      { ...fitted, base: 3 },
    )
    expect(lifted.reverse[4]!).toBeCloseTo(1, 9)
    const part = tailCorrection(
      withExtra(() => 1),
      { ...fitted, from: 20, to: 30 },
    )
    for (const [g, value] of part.reverse.entries()) expect(value).toBeCloseTo(g === 2 ? 1 : 0, 9)
  })

  it('begins two roundings after the corner', () => {
    const rounded = { ...fitted, curve: { ...handCurve, rounding: 1.5 } }
    const { time } = tailCorrection(
      withExtra(() => 0),
      rounded,
    )
    expect(time[0]!).toBeCloseTo(29 + 0.5 * length, 12)
  })

  it.each([
    // 2 % of the amplitude of 6 A
    [0.121, 0.01, true],
    [0.119, 0.01, false],
    // four standard deviations of a mean of ten
    [0.2, 0.157, true],
    [0.2, 0.159, false],
  ])('of %d A at a noise of %d A is significant: %s', (extra, noise, wanted) => {
    const one = (t: number) => (Math.abs(t - knot(3)) < 0.5 * length ? extra : 0)
    expect(tailCorrection(withExtra(one), { ...fitted, noise }).significant).toBe(wanted)
    expect(
      tailCorrection(
        withExtra((t) => -one(t)),
        { ...fitted, noise },
      ).significant,
    ).toBe(wanted)
  })

  it('is not significant for the mean of two samples, but for that of three', () => {
    const extra = withExtra(() => 1)
    expect(tailCorrection(extra, { ...fitted, from: 20, to: 22 }).significant).toBe(false)
    expect(tailCorrection(extra, { ...fitted, from: 20, to: 23 }).significant).toBe(true)
  })
})

describe('the correction at a time', () => {
  const correction = {
    time: Float64Array.of(10, 12, 14),
    reverse: Float64Array.of(2, 6, -4),
    significant: true,
    largest: 6,
  }

  it('lies straight between the knots and fades to nothing outside them', () => {
    const at = [7, 8, 9, 10, 11, 12, 12.5, 14, 15, 16, 17]
    expect(at.map((time) => correctionAt(correction, time))).toEqual(
      [0, 0, 1, 2, 4, 6, 3.5, -4, -2, 0, 0].map((v) => v + 0),
    )
  })
})
