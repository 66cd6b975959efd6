import { describe, expect, it } from 'vitest'
import { fitRamp } from '../../src/capture/fit-ramp.ts'
import { fitStep } from '../../src/capture/fit-step.ts'
import { handCourse, windowOf } from './handmade.ts'

/** Marks on two samples per unit of time from -5.125 on; of other windows only the numbers move. */
const marks = { edge: 40, crossing: 51, peak: 63, half: 68, quarter: 73, forward: 10, base: 0, lowest: -6 }
const shifted = (by: number) => ({
  ...marks,
  edge: marks.edge + by,
  crossing: marks.crossing + by,
  peak: marks.peak + by,
  half: marks.half + by,
  quarter: marks.quarter + by,
})
/** The sharp commutation on samples from `start` on, every half. */
const sampled = (start: number, count: number, course = handCourse) => windowOf({ start, interval: 0.5, count }, course)

describe('the samples of a commutation', () => {
  // sample k stands at -5.125 + k/2; the current is 5 A at 15, -3 A at 23, and the corner stands at 26
  it('through which the line goes lie between half the forward current and half the peak', () => {
    const { line } = fitRamp(sampled(-5.125, 140), marks, { instrument: null })
    // 15.375 to 22.875
    expect(line.count).toBe(16)
    expect(line.at).toBeCloseTo(19.125, 9)
    expect(line.rise).toBeCloseTo(-1, 9)
  })

  it('of the line begin three time constants of the instrument after the start of the ramp', () => {
    // 10 + 3 x 2 = 16: from 16.375 on; 10 + 3 x 3 would be too near the crossing and is not asked for
    const { line } = fitRamp(sampled(-5.125, 140), marks, { instrument: 2 })
    expect([line.count, line.at]).toEqual([14, expect.closeTo(19.625, 9)])
    expect(fitRamp(sampled(-5.125, 140), marks, { instrument: 3 }).line.count).toBe(16)
  })

  it('of the line reach further where there would be fewer than four', () => {
    // every third: 15.5, 18.5, 21.5 up to a share of 0.7; at 0.8 there are 12.5 and 24.5 as well
    const window = windowOf({ start: -50.5, interval: 3, count: 60 }, handCourse)
    const few = { ...marks, edge: 20, crossing: 24, peak: 26, half: 27, quarter: 28 }
    const { line } = fitRamp(window, few, { instrument: null })
    expect([line.count, line.at]).toEqual([5, expect.closeTo(18.5, 9)])
  })

  it('of the plateau end a quarter of the ramp before it, without the first tenth', () => {
    // 7.5: 26 samples, of which two are left out
    const { plateau, onset } = fitRamp(sampled(-5.125, 140), marks, { instrument: null })
    expect([plateau.count, plateau.at]).toEqual([24, expect.closeTo(1.625, 9)])
    expect(onset).toBeCloseTo(10, 6)
  })

  it('of the plateau reach back over eight ramps', () => {
    const { plateau } = fitRamp(sampled(-95.125, 320), shifted(180), { instrument: null })
    expect(Math.abs(plateau.count - 160)).toBeLessThanOrEqual(1)
  })

  it.each([
    // up to two samples before the ramp where fewer than eight lie before its rounding
    [3.375, 9],
    [3.875, 8],
    [4.375, 9],
    [8.875, 2],
  ])('of a plateau that begins at %d are %d', (start, count) => {
    const by = -2 * (start + 5.125)
    expect(fitRamp(sampled(start, 130), shifted(by), { instrument: null }).plateau.count).toBe(count)
  })

  it('of the tail run from half the peak over twelve tail times, and are eight at least', () => {
    // from 23.375 to 26 + 48 = 74
    const whole = fitRamp(sampled(-5.125, 200), marks, { instrument: null }).fitted
    expect([whole.from, whole.to]).toEqual([57, 159])
    const cut = fitRamp(sampled(-5.125, 62), marks, { instrument: null }).fitted
    expect([cut.from, cut.to]).toEqual([54, 62])
  })

  it('show a droop of the plateau, and the current at its end', () => {
    const drooping = (t: number) => (t < 10 ? 10 + 0.1 * (10 - t) : handCourse(t))
    const { plateau, onset, current } = fitRamp(sampled(-5.125, 140, drooping), marks, { instrument: null })
    expect(plateau.rise).toBeCloseTo(-0.1, 9)
    expect(onset).toBeCloseTo(10, 6)
    expect(current).toBeCloseTo(10, 2)
  })

  it.each([
    // noise of 0.05 A tilts 24 samples by 0.05 x sqrt(12/24) = 0.035 A: three times that is 0.106 A over 11.5
    [0.013, true],
    [0.007, false],
  ])('show a droop of %d A per unit against their noise: %s', (droop, shown) => {
    const window = sampled(-5.125, 140, (t) => (t < 10 ? 10 - droop * t : handCourse(t)))
    const current = window.current.map((value, k) => (k < 28 ? value + (k % 2 === 0 ? 0.05 : -0.05) : value))
    const { plateau } = fitRamp({ ...window, current }, marks, { instrument: null })
    expect(plateau.rise < 0).toBe(shown)
  })
})

describe('the samples of a reversal', () => {
  /** An edge that is straight from 1 to -1.5 A alone, a plateau of -3 A up to 20, a tail of 4. */
  const course = (t: number) => {
    if (t < -1.4) return 2
    if (t < -0.4) return 0.6 - t
    if (t < 0.6) return -2.5 * t
    if (t < 2.1) return -0.9 - t
    return t < 20 ? -3 : -3 * Math.exp(-(t - 20) / 4)
  }
  const fitted = (count = 280) =>
    fitStep(
      windowOf({ start: -15.06, interval: 0.25, count }, course),
      { edge: 58, crossing: 61, peak: 100, half: 151, quarter: 163, forward: 2, base: 0, lowest: -3 },
      { instrument: null },
      0.1,
    )

  it('around zero lie between half the forward and half the reverse current', () => {
    expect(fitted().crossing).toBeCloseTo(0, 5)
  })

  it('of the edge are those between 10 and 90 %', () => {
    // 1.5 A at -0.9: the sample before it at -1.06; -2.5 A at 1.6: the sample after it at 1.69
    const { edgeTime, edgeEnd } = fitted()
    expect(edgeTime).toBeCloseTo(2.75, 9)
    expect(edgeEnd).toBeCloseTo(1.69 + 0.3 * 2.75, 9)
  })

  it('of the plateau are its middle three fifths', () => {
    // from 2.515 to 20: 6.012 to 16.503
    const { plateau } = fitted()
    expect([plateau!.count, plateau!.at]).toEqual([42, expect.closeTo(11.315, 9)])
  })

  it('of the corner begin in its first third, and end with twelve tail times', () => {
    // 2.515 + 0.3 x 17.485 = 7.76, and 20 + 48 = 68
    expect([fitted().fitted.from, fitted().fitted.to]).toEqual([92, 280])
    expect(fitted(400).fitted.to).toBe(333)
  })

  it('of the conduction end three falls before the edge, without the first three tenths of many', () => {
    // three samples a fall: up to 58 - 9 - 1 = 48, from 14 on
    const { forward } = fitted()
    expect([forward.count, forward.value]).toEqual([34, 2])
  })
})
