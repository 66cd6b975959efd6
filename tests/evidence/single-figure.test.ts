import { describe, expect, it } from 'vitest'
import { type FigureName, logFigure, type RampReading, steadyEvent } from '../../src/evidence/recovery-figures.ts'
import { type ExpectedPoint, lifetimeGiving, linearisedFigure } from '../../src/evidence/single-figure.ts'

const at: RampReading = { current: 8, slope: 100e6, recoveryTimeBy: { kind: 'line-90-25' }, softnessBy: 'times' }
const expected: ExpectedPoint = {
  lifetime: Math.log(35e-9),
  ratio: 1,
  lifetimeVariance: 0.45 ** 2,
  ratioVariance: 0.5 ** 2,
}
const ln = (name: FigureName, lifetime: number, ratio: number, reading = at) =>
  logFigure(steadyEvent(reading, lifetime, ratio), reading, name).value

describe('a lifetime that gives one figure', () => {
  it.each(['recoveryTime', 'charge', 'peakReverseCurrent'] as const)('is the one that %s was made with', (name) => {
    for (const lifetime of [1e-9, 20e-9, 35e-9, 100e-9, 2e-6]) {
      for (const ratio of [-1, 1, 3]) {
        const target = ln(name, Math.log(lifetime), ratio)
        const found = lifetimeGiving(at, name, target, { lifetime: expected.lifetime, ratio })!
        expect(found.figure.value).toBeCloseTo(target, 11)
        // a peak near its ceiling hardly tells the lifetime
        if (found.figure.byLifetime > 0.1) expect(found.point.lifetime).toBeCloseTo(Math.log(lifetime), 9)
        expect(found.point.ratio).toBe(ratio)
      }
    }
  })

  it('does not exist for a peak above its ceiling I e^y', () => {
    const ceiling = Math.log(8 * Math.E)
    expect(lifetimeGiving(at, 'peakReverseCurrent', ceiling - 0.01, expected)).not.toBeNull()
    expect(lifetimeGiving(at, 'peakReverseCurrent', ceiling + 0.01, expected)).toBeNull()
  })

  it('is found however close below that ceiling, where rounding hides the last digits of the lifetime', () => {
    for (const below of [1e-5, 1e-6, 1e-7, 2e-8]) {
      const target = Math.log(8 * Math.E) - below
      const { figure, point } = lifetimeGiving(at, 'peakReverseCurrent', target, expected)!
      expect(figure.value).toBeCloseTo(target, 13)
      // for tau far above I/a the peak misses I e^y by its share (I/a) (1 + e^y)²/(2 tau)
      expect((Math.exp(point.lifetime) * below) / (4e-8 * (1 + Math.E) ** 2)).toBeCloseTo(1, 4)
    }
  })

  it('does not exist beyond 0.1 fs and 50 s', () => {
    for (const [lifetime, target] of [
      [Math.log(1e-16), -1],
      [Math.log(50), 1],
    ] as const) {
      expect(lifetimeGiving(at, 'recoveryTime', ln('recoveryTime', lifetime, 1) + target, expected)).toBeNull()
      expect(lifetimeGiving(at, 'recoveryTime', ln('recoveryTime', lifetime, 1) - target, expected)).not.toBeNull()
    }
  })

  it('is found from a start outside those bounds too', () => {
    const target = ln('charge', expected.lifetime, 1)
    for (const lifetime of [-100, 100]) {
      const found = lifetimeGiving(at, 'charge', target, { lifetime, ratio: 1 })!
      expect(found.point.lifetime).toBeCloseTo(expected.lifetime, 9)
    }
  })
})

describe('one figure of a row', () => {
  it('is met at the y of the class where it tells the lifetime', () => {
    const value = Math.exp(ln('charge', Math.log(90e-9), 1))
    const { point, figure } = linearisedFigure(at, 'charge', value, expected)!
    expect(point.ratio).toBe(1)
    expect(point.lifetime).toBeCloseTo(Math.log(90e-9), 9)
    expect(figure.value).toBeCloseTo(Math.log(value), 11)
  })

  it.each([
    ['softness', 0.3],
    ['softness', 2.5],
    ['peakReverseCurrent', 18],
    ['peakReverseCurrent', 30],
  ] as const)('that is a %s of %d is met at the point nearest to the class, in its deviations', (name, value) => {
    const { point, figure } = linearisedFigure(at, name, value, expected)!
    expect(figure.value).toBeCloseTo(Math.log(value), 9)
    // nearest: the way from the centre lies along variance × gradient, so moving along the line of equal figure gains nothing
    const away = [
      (point.lifetime - expected.lifetime) / expected.lifetimeVariance,
      (point.ratio - expected.ratio) / expected.ratioVariance,
    ] as const
    expect(away[0] * figure.byRatio).toBeCloseTo(away[1] * figure.byLifetime, 8)
    expect(Math.sign(away[1])).toBe(Math.sign((Math.log(value) - ln(name, expected.lifetime, 1)) * figure.byRatio))
  })

  it('that the class shows itself is met at its centre', () => {
    const { point } = linearisedFigure(at, 'softness', Math.exp(ln('softness', expected.lifetime, 1)), expected)!
    expect(point.lifetime).toBeCloseTo(expected.lifetime, 12)
    expect(point.ratio).toBeCloseTo(1, 12)
  })

  it('that nothing within 8 of the class in y and 6 in u shows is none', () => {
    expect(linearisedFigure(at, 'softness', 1e6, expected)).toBeNull()
    // S → k (1 + e^y)/… grows as e^−y: 0.69 e^8 is within reach
    expect(linearisedFigure(at, 'softness', 500, expected)).not.toBeNull()
  })

  it('has its peak solved in u where a percent of lifetime is 0.6 % of peak and more, else by the nearest point', () => {
    const sensitivity = (lifetime: number) =>
      logFigure(steadyEvent(at, lifetime, 1), at, 'peakReverseCurrent').byLifetime
    let [low, high] = [Math.log(1e-9), Math.log(10e-6)]
    for (let step = 0; step < 60; step++) {
      const middle = (low + high) / 2
      if (sensitivity(middle) > 0.6) low = middle
      else high = middle
    }
    const peak = (lifetime: number) => Math.exp(ln('peakReverseCurrent', lifetime, 1))
    expect(linearisedFigure(at, 'peakReverseCurrent', peak(low - 0.01), expected)!.point.ratio).toBe(1)
    expect(linearisedFigure(at, 'peakReverseCurrent', peak(low + 0.01), expected)!.point.ratio).not.toBe(1)
  })
})
