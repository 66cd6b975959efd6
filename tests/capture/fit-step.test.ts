import { describe, expect, it } from 'vitest'
import { type FittedStep, fitStep } from '../../src/capture/fit-step.ts'
import { windowOf } from './handmade.ts'
import { filtered } from './synthetic.ts'

/** 2 A forward, an edge of 2 from +2 to -3 A through zero at 0, a plateau up to 20, a tail of 4. */
const course = (t: number) => {
  if (t < -0.8) return 2
  if (t < 1.2) return 2 - 2.5 * (t + 0.8)
  return t < 20 ? -3 : -3 * Math.exp(-(t - 20) / 4)
}
const grid = { start: -15.125, interval: 0.5, count: 140 }
const lagged = (lag: number, change: (t: number) => number = course, over = grid) => ({
  ...windowOf(over, change),
  current: filtered(change, 1 / (2 * Math.PI * lag), over),
})
const marks = { edge: 28, crossing: 32, peak: 50, half: 76, quarter: 81, forward: 2, base: 0, lowest: -3 }

function expectTruth(step: FittedStep, digits: number): void {
  expect(step.current).toBeCloseTo(2, digits)
  expect(step.reverse).toBeCloseTo(3, digits)
  expect(step.crossing).toBeCloseTo(0, digits)
  expect(step.curve.corner).toBeCloseTo(20, digits)
  expect(step.curve.tailTime).toBeCloseTo(4, digits)
  expect(step.curve.amplitude).toBeCloseTo(3, digits)
  expect(step.curve.slope).toBeCloseTo(0, 9)
}

describe('the fit of a reversal with a plateau', () => {
  const fitted = () => fitStep(lagged(0.2), marks, { instrument: 0.2 }, 0.1)

  it('gives back the truth behind a stated bandwidth', () => {
    const step = fitted()
    expectTruth(step, 1)
    expect(step.curve.rounding).toBe(0)
    expect(step.plateau!.value).toBeCloseTo(-3, 2)
    // 10 to 90 % of an edge of 2
    expect(step.edgeTime).toBeCloseTo(1.6, -0.3)
    expect(step.edgeEnd).toBeGreaterThan(1.2)
    expect(step.edgeEnd).toBeLessThan(2.5)
  })

  it('starts from a fit nearby, in one round', () => {
    const step = fitted()
    const again = fitStep(lagged(0.2), marks, { instrument: 0.2 }, 0.1, step)
    expectTruth(again, 1)
    expect(again.curve.tailTime).toBeCloseTo(step.curve.tailTime, 2)
  })

  it('counts currents from the baseline', () => {
    const rough = { ...marks, base: 0.1, lowest: -2.6 }
    const lifted = fitStep(
      lagged(0.2, (t) => course(t) + 0.3),
      rough,
      { instrument: 0.2 },
      0.1,
    )
    expect(lifted.fitted.base).toBeCloseTo(0.3, 1)
    expect(lifted.current).toBeCloseTo(2, 1)
    expect(lifted.reverse).toBeCloseTo(3, 1)
    expect(lifted.crossing).toBeCloseTo(0, 1)
  })

  it('finds it from marks that are off by some samples', () => {
    const rough = { ...marks, edge: 27, crossing: 34, half: 73, quarter: 84 }
    expectTruth(fitStep(lagged(0.2), rough, { instrument: 0.2 }, 0.1), 1)
    expectTruth(fitStep(lagged(0.2), { ...rough, crossing: 30 }, { instrument: 0.2 }, 0.1), 1)
  })

  it('keeps ringing of the edge and rounding of the corner out of the plateau', () => {
    // the middle three fifths of the plateau from 1.7 to 20: from 5.4 to 16.3
    const spoiled = (t: number) => course(t) + (t > 2 && t < 5 ? 0.3 : t > 17 && t < 20 ? 0.1 : 0)
    expect(fitStep(lagged(0.1, spoiled), marks, { instrument: 0.1 }, 0.1).plateau!.value).toBeCloseTo(-3, 2)
  })

  it('takes the forward current from the later part of the conduction, short of the edge', () => {
    // 24 samples before the edge: the first three tenths and the last four falls are left out
    const early = { ...grid, start: -40.125, count: 190 }
    const later = { ...marks, edge: 78, crossing: 82, peak: 100, half: 126, quarter: 131 }
    const spoiled = (t: number) => course(t) + (t < -31 ? 1 : t > -5 && t < -2 ? 0.5 : 0)
    expect(fitStep(lagged(0.1, spoiled, early), later, { instrument: 0.1 }, 0.1).current).toBeCloseTo(2, 2)
  })
})

describe('a plateau', () => {
  it('is none where it is shorter than what the instrument tells apart', () => {
    // from the edge's end at about 2 to 20: 18, against 0.7 of the resolution
    expect(fitStep(lagged(0.2), marks, { instrument: 0.2 }, 22).plateau).not.toBeNull()
    expect(fitStep(lagged(0.2), marks, { instrument: 0.2 }, 30).plateau).toBeNull()
  })

  it('is none where the current turns back at once: the tail starts from the lowest reading', () => {
    const back = (t: number) => (t < -0.8 ? 2 : t < 1.2 ? 2 - 2.5 * (t + 0.8) : -3 * Math.exp(-(t - 1.2) / 12))
    const early = { ...marks, peak: 33, half: 50, quarter: 67, lowest: -2.7 }
    const { plateau, curve, reverse, fitted, crossing } = fitStep(lagged(0.2, back), early, { instrument: 0.2 }, 0.5)
    expect(plateau).toBeNull()
    expect(curve.tailTime / 12).toBeCloseTo(1, 1)
    expect(reverse).toBeCloseTo(fitted.base + 2.7, 9)
    expect(crossing).toBeCloseTo(0, 1)
  })
})
