import { describe, expect, it } from 'vitest'
import { rampFigures } from '../../src/capture/ramp-figures.ts'
import { handCorner, handCourse, handCurve, handRamp, windowOf } from './handmade.ts'

const grid = { start: 0.125, interval: 0.25, count: 300 }
/** The tail's samples: from the corner at 26 on. */
const fitted = handCorner({ from: 104, to: 300, noise: 0.001 })
const ramp = handRamp({ fitted })
const byLine = { kind: 'line-90-25' } as const
/** (t_25 + (t_25 - t_90) 0.25/0.65) of an exponential of time 4. */
const fall = 4 * (Math.log(4) + ((Math.log(4) - Math.log(1 / 0.9)) * 0.25) / 0.65)

/** Figures of the hand-made commutation with `extra` reverse current in its samples. */
const figures = (
  chargeUntil = 0.02,
  extra: (time: number) => number = () => 0,
  definition: typeof byLine | { kind: 'level-10' } = byLine,
) =>
  rampFigures(
    windowOf(grid, (t) => handCourse(t) - extra(t)),
    ramp,
    definition,
    chargeUntil,
  )

describe('the figures of a commutation with a sharp corner', () => {
  it('are those of a triangle and an exponential', () => {
    const found = figures()
    expect(found.current).toBe(10)
    expect(found.slope).toBe(1)
    expect(found.peakReverseCurrent).toBeCloseTo(6, 9)
    expect(found.timeToPeak).toBeCloseTo(6, 9)
    expect(found.fallTime).toBeCloseTo(fall, 6)
    expect(found.recoveryTime).toBeCloseTo(6 + fall, 6)
    expect(found.softness).toBeCloseTo(fall / 6, 6)
    expect(found.endDoubt).toBeCloseTo(0, 6)
  })

  it('have the softness by slopes of a tail that starts with I/tau', () => {
    // over a hundredth of a tail time: 6 (1 - exp(-0.01))/0.04
    expect(figures().softnessBySlopes).toBeCloseTo(0.04 / (6 * -Math.expm1(-0.01)), 9)
  })

  it('of a rounded corner have the steepest fall after the peak', () => {
    // w dr/dt + r = I exp(-x/tau): the steepest of the closed form, on a grid of its own
    const curve = { ...handCurve, rounding: 1 }
    let steepest = 0
    for (let x = 0; x < 12; x += 0.001) {
      const rate = (8 * Math.exp(-x / 4)) / 4 + (6 - 1 - 8) * Math.exp(-x)
      steepest = Math.max(steepest, rate)
    }
    const found = rampFigures(windowOf(grid, handCourse), handRamp({ fitted, curve }), byLine, 0.02)
    expect(found.softnessBySlopes).toBeCloseTo(1 / steepest, 3)
  })

  it('end where they are told to', () => {
    expect(figures(0.02, undefined, { kind: 'level-10' }).fallTime).toBeCloseTo(4 * Math.log(10), 6)
  })
})

describe('the charge', () => {
  // a triangle of 6 A in 6, and 6 A times 4 less the share of the peak that is left
  const charge = (share: number) => 18 + 24 * (1 - share)

  it('ends at the stated share of the peak, and at two others beside it', () => {
    const rows = (until: number) => figures(until).chargeByEnd
    expect(figures(0.02).charge).toBeCloseTo(charge(0.02), 6)
    expect(rows(0.02).map(({ end }) => end)).toEqual([0.02, 0.1, 0])
    expect(rows(0.1).map(({ end }) => end)).toEqual([0.1, 0, 0.25])
    expect(rows(0).map(({ end }) => end)).toEqual([0, 0.1, 0.25])
    expect(rows(0.25).map(({ end }) => end)).toEqual([0.25, 0.1, 0])
    for (const row of [...rows(0.02), ...rows(0.1)]) expect(row.charge).toBeCloseTo(charge(row.end), 6)
  })

  it('counts what the samples have beside the exponential, over four tail times', () => {
    // from the corner at 26 to 42
    const whole = figures(0, (t) => (t > 26 && t < 42 ? 0.1 : 0))
    expect(whole.charge).toBeCloseTo(charge(0) + 0.1 * 16, 6)
    expect(figures(0, (t) => (t > 42 ? 5 : 0)).charge).toBeCloseTo(charge(0), 6)
    expect(figures(0, (t) => (t < 26 ? 5 : 0)).charge).toBeCloseTo(charge(0), 6)
  })

  it('counts from the baseline, over the fitted samples', () => {
    const lifted = handRamp({ fitted: { ...fitted, base: 0.5, to: 112 } })
    const found = rampFigures(
      windowOf(grid, (t) => handCourse(t) + 0.4),
      lifted,
      byLine,
      0,
    )
    expect(found.charge).toBeCloseTo(charge(0) + 0.1 * 2, 6)
  })
})

describe('a tail that is no exponential', () => {
  // half an ampere more between 26 and 46: the reverse current falls to 0.6 A where the exponential is at 0.1 A
  const more = (t: number) => (t > 26 ? 0.5 : 0)

  it('is read from the samples where they say so, and the doubt of the end is how far the two lie apart', () => {
    const { fallTime, recoveryTime, endDoubt } = figures(0.02, more, { kind: 'level-10' })
    const plain = 4 * Math.log(10)
    expect(fallTime).toBeCloseTo(4 * Math.log(6 / 0.1), 2)
    expect(endDoubt).toBeCloseTo((fallTime - plain) / recoveryTime, 6)
  })

  it('is read from the fit where noise explains it', () => {
    const noisy = handRamp({ fitted: { ...fitted, noise: 10 } })
    const window = windowOf(grid, (t) => handCourse(t) - more(t))
    const found = rampFigures(window, noisy, { kind: 'level-10' }, 0.02)
    expect(found.fallTime).toBeCloseTo(4 * Math.log(10), 6)
    expect(found.endDoubt).toBeCloseTo((4 * Math.log(60) - 4 * Math.log(10)) / found.recoveryTime, 2)
  })
})
