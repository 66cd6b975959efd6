import { describe, expect, it } from 'vitest'
import { inductiveJump } from '../../src/capture/find-shunt-inductance.ts'
import { voltageOnsetAfterPeak } from '../../src/capture/find-skew.ts'
import { handCorner, handCourse, handCurve, handRamp, windowOf } from './handmade.ts'

const grid = { start: 0, interval: 1, count: 60 }

/** The current with readings `above` the line at some times. */
const lifted = (above: Readonly<Record<number, number>>) => windowOf(grid, (t) => handCourse(t) + (above[t] ?? 0))

describe('the jump of an inductive shunt', () => {
  it('is how long the plateau outlasts the corner of line and plateau', () => {
    expect(inductiveJump(lifted({ 10: 3, 11: 3, 12: 3, 13: 3 }), handRamp())).toBe(3)
  })

  it('is the height over the slope', () => {
    const steep = handRamp({ line: { ...handRamp().line, rise: -2 } })
    const window = windowOf(grid, (t) => (t >= 10 && t < 14 ? 43 - 2 * t : 40 - 2 * t))
    expect(inductiveJump(window, steep)).toBe(1.5)
  })

  it('is the least of three neighbours: one high reading makes none', () => {
    expect(inductiveJump(lifted({ 11: 9 }), handRamp())).toBeNull()
    expect(inductiveJump(lifted({ 11: 9, 12: 9 }), handRamp())).toBeNull()
    expect(inductiveJump(lifted({ 11: 9, 12: 4, 13: 9 }), handRamp())).toBe(4)
  })

  it('is looked for in the first half of the ramp', () => {
    // onset at 10, crossing at 20: samples 10 to 14 are the middle of three
    expect(inductiveJump(lifted({ 13: 3, 14: 3, 15: 3 }), handRamp())).toBe(3)
    expect(inductiveJump(lifted({ 14: 3, 15: 3, 16: 3 }), handRamp())).toBeNull()
    expect(inductiveJump(lifted({ 9: 3, 10: 3, 11: 3 }), handRamp())).toBe(2)
    expect(inductiveJump(lifted({ 7: 30, 8: 30, 9: 30 }), handRamp())).toBeNull()
  })

  it('stands 2.5 times above the noise, 1 % above the swing, and 1.2 samples long', () => {
    const window = lifted({ 10: 3, 11: 3, 12: 3 })
    const noisy = (residual: number) => handRamp({ plateau: { ...handRamp().plateau, residual } })
    expect(inductiveJump(window, noisy(1.19))).toBe(3)
    expect(inductiveJump(window, noisy(1.2))).toBeNull()
    // 10 A and a reverse amplitude of 289 A: a swing of 299
    const swing = (amplitude: number) => handRamp({ curve: { ...handCurve, amplitude } })
    expect(inductiveJump(window, swing(289))).toBe(3)
    expect(inductiveJump(window, swing(290))).toBeNull()
    expect(inductiveJump({ ...window, interval: 2.4 }, handRamp())).toBe(3)
    expect(inductiveJump({ ...window, interval: 2.5 }, handRamp())).toBeNull()
  })

  it('is looked for up to the end of a short window', () => {
    const short = windowOf({ ...grid, count: 13 }, (t) => handCourse(t) + (t >= 10 ? 3 : 0))
    expect(inductiveJump(short, handRamp())).toBe(3)
    const first = windowOf({ ...grid, start: 10 }, (t) => handCourse(t) + (t < 13 ? 3 : 0))
    expect(inductiveJump(first, handRamp())).toBe(3)
  })
})

describe('the onset of the voltage after the peak', () => {
  /** From `low` to `high` V over a time of 20 from `start` on, by a shape from 0 to 1. */
  const rising = (shape: (x: number) => number, start = 30, low = 0, high = 100) =>
    windowOf({ start: 0, interval: 0.25, count: 300 }, handCourse, (t) => {
      const x = Math.min(1, Math.max(0, (t - start) / 20))
      return low + (high - low) * shape(x)
    })
  const onset = (window: ReturnType<typeof rising>, low = 0, high = 100, ramp = handRamp()) =>
    voltageOnsetAfterPeak(window, ramp, low, high)

  it('of a straight rise is where the line begins', () => {
    expect(onset(rising((x) => x))!).toBeCloseTo(30 - 26, 9)
    expect(onset(rising((x) => x, 24))!).toBeCloseTo(24 - 26, 9)
  })

  it('of a parabola is where it begins, to the rounding of its constants', () => {
    expect(onset(rising((x) => x * x))!).toBeCloseTo(30 - 26, 1)
  })

  it('of a rise gentler than that goes no further back', () => {
    // x^3: 5, 25 and 50 % at 0.3684, 0.6300 and 0.7937 of 20
    const start = 20 * (0.3684 - 0.81 * (0.63 - 0.3684))
    expect(onset(rising((x) => x ** 3))!).toBeCloseTo(4 + start, 1)
  })

  it('of a rise that begins faster than straight goes no less far back', () => {
    // sqrt(x): at 0.0025, 0.0625 and 0.25 of 20
    const start = 20 * (0.0025 - 0.25 * (0.0625 - 0.0025))
    const found = onset(windowOf({ start: 29, interval: 0.02, count: 1200 }, handCourse, rootAt))!
    expect(found).toBeCloseTo(4 + start, 1.5)
  })
  const rootAt = (t: number) => 100 * Math.sqrt(Math.min(1, Math.max(0, (t - 30) / 20)))

  it('of a rise between the two lies between', () => {
    // x^1.5: at 0.1357, 0.3969 and 0.6300, spaced 0.892: 0.716 of the way to the parabola
    const start = 20 * (0.1357 - (0.25 + 0.7155 * 0.56) * (0.3969 - 0.1357))
    expect(onset(rising((x) => x ** 1.5))!).toBeCloseTo(4 + start, 1)
  })

  it('counts from the corner as it was recorded, rounding and all', () => {
    const ramp = handRamp({ fitted: handCorner({ curve: { ...handCurve, corner: 25, rounding: 2 } }) })
    expect(
      onset(
        rising((x) => x),
        0,
        100,
        ramp,
      )!,
    ).toBeCloseTo(30 - 27, 9)
  })

  it('starts from the reading while it conducts', () => {
    const window = rising((x) => x, 30, -2, 98)
    expect(onset(window, -2, 98)!).toBeCloseTo(4, 9)
    // slow up to 5 %, then straight at 1.9 of the rest: 25 % a fifth of 20/1.9 after that, the onset a quarter of it before
    const bent = rising((x) => (x < 0.5 ? 0.1 * x : 0.05 + 1.9 * (x - 0.5)), 30, -2, 98)
    expect(onset(bent, -2, 98)!).toBeCloseTo(4 + 10 - (0.25 * 0.2 * 20) / 1.9, 9)
  })

  it('is the last rise before the highest reading', () => {
    const window = rising((x) => x)
    // a hump before the rise, and a fall after it, are passed over
    const volts = window.voltage!.map((v, k) => (k < 40 ? 60 : k > 250 ? 0 : v)).with(240, 101)
    expect(onset({ ...window, voltage: volts })!).toBeCloseTo(4, 9)
  })

  it('is not looked for where the voltage rises by less than five volts or five drops, or not at all', () => {
    expect(
      onset(
        rising((x) => x, 30, 0, 5.1),
        0,
        5.1,
      )!,
    ).toBeCloseTo(4, 9)
    expect(
      onset(
        rising((x) => x, 30, 0, 5),
        0,
        5,
      ),
    ).toBeNull()
    expect(
      onset(
        rising((x) => x, 30, -2, 8.1),
        -2,
        8.1,
      )!,
    ).toBeCloseTo(4, 9)
    expect(
      onset(
        rising((x) => x, 30, -2, 7.9),
        -2,
        7.9,
      ),
    ).toBeNull()
    expect(onset(windowOf(grid, handCourse))).toBeNull()
    expect(onset(windowOf(grid, handCourse, () => 100))).toBeNull()
    expect(
      onset(
        rising((x) => x),
        0,
        Number.NaN,
      ),
    ).toBeNull()
  })
})
