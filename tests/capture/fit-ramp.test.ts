import { describe, expect, it } from 'vitest'
import { type FittedRamp, firstAfter, fitRamp, withoutInstrument } from '../../src/capture/fit-ramp.ts'
import { handCourse, handCurve, windowOf } from './handmade.ts'
import { filtered } from './synthetic.ts'

const grid = { start: -5.125, interval: 0.5, count: 140 }
/** The course behind a first-order lag, by the exact filter. */
const lagged = (lag: number, change: (t: number) => number = handCourse, over = grid) => {
  const current = filtered(change, 1 / (2 * Math.PI * lag), over)
  return { ...windowOf(over, handCourse), current }
}
/** What a first look sees, on a grid of two samples per unit of time. */
const marks = { edge: 40, crossing: 51, peak: 63, half: 68, quarter: 73, forward: 10, base: 0, lowest: -5.7 }

function expectTruth(ramp: FittedRamp, digits: number): void {
  expect(ramp.current).toBeCloseTo(10, digits)
  expect(ramp.curve.slope).toBeCloseTo(1, digits)
  expect(ramp.crossing).toBeCloseTo(20, digits)
  expect(ramp.curve.corner).toBeCloseTo(26, digits)
  expect(ramp.curve.amplitude).toBeCloseTo(6, digits)
  expect(ramp.curve.tailTime).toBeCloseTo(4, digits)
  expect(ramp.fitted.base).toBeCloseTo(0, digits)
}

describe('the fit of a commutation', () => {
  const fitted = () => fitRamp(lagged(0.6), marks, { instrument: 0.6 })

  it('gives back the truth behind a stated bandwidth', () => {
    const ramp = fitted()
    expectTruth(ramp, 1)
    expect(ramp.curve.rounding).toBe(0)
    expect(ramp.fitted.curve.rounding).toBeCloseTo(0.6, 1)
    // line and plateau as recorded meet later by the lag
    expect(ramp.onset).toBeCloseTo(10.6, 1)
    expect(ramp.plateau.value).toBeCloseTo(10, 6)
    expect(ramp.plateau.rise).toBe(0)
  })

  it('takes half of the rounding out where no bandwidth is stated', () => {
    const unknown = fitRamp(lagged(0.6), marks, { instrument: null })
    expect(unknown.curve.rounding).toBeCloseTo(0.3, 1)
    expect(unknown.crossing).toBeCloseTo(20.6 - 0.3, 1)
  })

  it('counts currents from the baseline', () => {
    const lifted = fitRamp(
      lagged(0.6, (t) => handCourse(t) + 0.5),
      { ...marks, base: 0.4, lowest: -5.2 },
      { instrument: 0.6 },
    )
    expect(lifted.fitted.base).toBeCloseTo(0.5, 1)
    expect(lifted.current).toBeCloseTo(10, 1)
    expect(lifted.crossing).toBeCloseTo(20, 1)
  })

  it('finds it from marks that are off by some samples and levels off by a tenth', () => {
    const rough = {
      ...marks,
      edge: 38,
      crossing: 53,
      peak: 61,
      half: 70,
      quarter: 76,
      forward: 9,
      base: 0.2,
      lowest: -5.1,
    }
    expectTruth(fitRamp(lagged(0.6), rough, { instrument: 0.6 }), 1)
  })

  it('starts from a fit nearby, in one round', () => {
    const ramp = fitted()
    const again = fitRamp(lagged(0.6), marks, { instrument: 0.6 }, ramp)
    expectTruth(again, 1)
    expect(again.curve.tailTime).toBeCloseTo(ramp.curve.tailTime, 2)
    expect(again.onset).toBeCloseTo(ramp.onset, 3)
  })

  it('follows a plateau that droops, up to the start of the ramp', () => {
    // 0.1 A per unit of time: 10 A at the start of the ramp, 11.5 A at the start of the record
    const drooping = (t: number) => (t < 10 ? 10 + 0.1 * (10 - t) : handCourse(t))
    const found = fitRamp(lagged(0.3, drooping), marks, { instrument: 0.3 })
    expect(found.plateau.rise).toBeCloseTo(-0.1, 3)
    expect(found.current).toBeCloseTo(10, 1)
  })

  it('does not extend a tilt that is only noise', () => {
    const window = lagged(0.3)
    const noise = (k: number) => 0.3 * Math.sin(27.2 * k * k)
    const current = window.current.map((value, k) => value + noise(k))
    expect(fitRamp({ ...window, current }, marks, { instrument: 0.3 }).plateau.rise).toBe(0)
  })

  it('is had from a ramp of a handful of samples', () => {
    const coarse = { start: -50.5, interval: 3, count: 60 }
    const few = { edge: 20, crossing: 24, peak: 26, half: 27, quarter: 28, forward: 10, base: 0, lowest: -5.5 }
    const found = fitRamp(lagged(0.3, handCourse, coarse), few, { instrument: 0.3 })
    expect(found.curve.slope).toBeCloseTo(1, 1)
    expect(found.crossing).toBeCloseTo(20, 0.5)
    expect(found.current).toBeCloseTo(10, 1)
  })

  it('is had from a plateau of a few samples', () => {
    const short = { start: 8.625, interval: 0.5, count: 112 }
    const early = { ...marks, edge: 12, crossing: 23, peak: 35, half: 40, quarter: 45 }
    const found = fitRamp(lagged(0.3, handCourse, short), early, { instrument: 0.3 })
    expect(found.current).toBeCloseTo(10, 0.5)
    expect(found.curve.slope).toBeCloseTo(1, 1)
  })

  it('leaves the rise into the plateau out of it', () => {
    const rising = (t: number) => (t < -4.6 ? 0 : handCourse(t))
    const found = fitRamp(lagged(0.1, rising), marks, { instrument: 0.1 })
    expect(found.plateau.value).toBeCloseTo(10, 2)
  })
})

describe('the rounding without the instrument', () => {
  it('is what the stated bandwidth does not explain, and nothing up to half as much again', () => {
    const rounded = { ...handCurve, rounding: 1 }
    expect(withoutInstrument(rounded, 0.6).rounding).toBeCloseTo(0.4, 12)
    expect(withoutInstrument(rounded, 0.7).rounding).toBe(0)
    expect(withoutInstrument(rounded, 1 / 1.5).rounding).toBeCloseTo(1 / 3, 12)
    expect(withoutInstrument(rounded, null)).toEqual({ ...rounded, rounding: 0.5 })
  })
})

describe('the first sample after a time', () => {
  it('is counted on the grid and stays in it', () => {
    const window = windowOf({ start: 10, interval: 2, count: 5 }, () => 0)
    expect([9, 10, 10.1, 12, 17.9, 18, 19, 99].map((time) => firstAfter(window, time))).toEqual([
      0, 0, 1, 1, 4, 4, 5, 5,
    ])
  })
})
