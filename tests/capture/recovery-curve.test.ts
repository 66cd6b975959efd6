import { describe, expect, it } from 'vitest'
import {
  chargeUnder,
  fallsTo,
  peakTime,
  type RecoveryCurve,
  reverseCurrentAt,
} from '../../src/capture/recovery-curve.ts'

/** A corner at 5 after a rise of 2 per unit of time, a tail of time 4. */
const sharp: RecoveryCurve = { corner: 5, slope: 2, amplitude: 10, tailTime: 4, rounding: 0 }
const round: RecoveryCurve = { ...sharp, rounding: 0.5 }
const plateau: RecoveryCurve = { ...sharp, slope: 0, rounding: 0.5 }

const curves: readonly (readonly [string, RecoveryCurve])[] = [
  ['a sharp corner', sharp],
  ['a rounded corner', round],
  ['a rounded plateau', plateau],
  ['a rounding slower than the tail', { ...sharp, rounding: 6 }],
  ['a rounding as slow as the tail', { ...sharp, rounding: 4 }],
  ['a rounding a hair off the tail', { ...sharp, rounding: 4.0002 }],
]

/** Simpson's rule, independent of every closed form. */
function integral(f: (x: number) => number, from: number, to: number, steps = 4000): number {
  const h = (to - from) / steps
  let sum = f(from) + f(to)
  for (let k = 1; k < steps; k++) sum += f(from + k * h) * (k % 2 === 1 ? 4 : 2)
  return (sum * h) / 3
}

describe('the reverse current', () => {
  it('of a sharp corner rises straight and falls by e in a tail time', () => {
    expect(reverseCurrentAt(sharp, 3)).toBe(10 - 2 * 2)
    expect(reverseCurrentAt(sharp, 5)).toBe(10)
    expect(reverseCurrentAt(sharp, 5.001)).toBeCloseTo(10 * Math.exp(-0.00025), 9)
    expect(reverseCurrentAt(sharp, 9)).toBeCloseTo(10 / Math.E, 9)
  })

  it('lags behind a straight rise by its rounding', () => {
    expect(reverseCurrentAt(round, 3)).toBe(10 + 2 * (-2 - 0.5))
    expect(reverseCurrentAt(round, 5)).toBe(9)
  })

  it.each(curves.slice(1))('of %s obeys w dr/dt + r = I exp(-x/tau) after the corner', (_name, curve) => {
    for (const x of [0.1, 0.7, 2, 5, 11]) {
      const t = curve.corner + x
      const h = 1e-4
      const rate = (reverseCurrentAt(curve, t + h) - reverseCurrentAt(curve, t - h)) / (2 * h)
      const driven = curve.amplitude * Math.exp(-x / curve.tailTime)
      expect((curve.rounding * rate + reverseCurrentAt(curve, t)) / driven).toBeCloseTo(1, 3)
    }
  })

  it.each(curves)('of %s is continuous at the corner', (_name, curve) => {
    // to a part in ten thousand of the peak where the time constants are equal
    expect(reverseCurrentAt(curve, curve.corner + 1e-9)).toBeCloseTo(reverseCurrentAt(curve, curve.corner), 2)
  })

  it('of a rounding a little off the tail is drawn with that very rounding', () => {
    // x = 3: I tau/(tau - w) = 40/0.002 and what falls with w
    const curve = { ...sharp, rounding: 3.998 }
    const settled = 40 / 0.002
    const exact = settled * Math.exp(-3 / 4) + (10 - 2 * 3.998 - settled) * Math.exp(-3 / 3.998)
    expect(reverseCurrentAt(curve, 8)).toBeCloseTo(exact, 9)
  })

  it('of a rounding as slow as the tail is its limit (I - a w + I x/tau) exp(-x/tau)', () => {
    const curve = { ...sharp, amplitude: 10, slope: 1, rounding: 4 }
    expect(reverseCurrentAt(curve, 8)).toBeCloseTo((10 - 4 + (10 * 3) / 4) * Math.exp(-0.75), 2)
  })
})

describe('the peak', () => {
  it('of a sharp corner is the corner, and so it is where nothing rises before it', () => {
    expect(peakTime(sharp)).toBeCloseTo(5, 7)
    expect(peakTime(plateau)).toBe(5)
  })

  it.each(curves.slice(1).filter(([, curve]) => curve.slope > 0 && curve.slope * curve.rounding < 10))(
    'of %s is higher than all around it',
    (_name, curve) => {
      const top = peakTime(curve)
      expect(top).toBeGreaterThan(curve.corner)
      const h = 1e-3
      expect(reverseCurrentAt(curve, top)).toBeGreaterThan(reverseCurrentAt(curve, top - h))
      expect(reverseCurrentAt(curve, top)).toBeGreaterThan(reverseCurrentAt(curve, top + h))
    },
  )

  it('of a rounded corner stands where its slope is nothing: both exponentials fall alike', () => {
    // I tau/(tau - w) = 80/7; from (80/7 - 9) exp(-x/0.5)/0.5 = (80/7) exp(-x/4)/4
    const x = Math.log(((80 / 7 - 9) * 4) / ((80 / 7) * 0.5)) / (2 - 0.25)
    expect(peakTime(round)).toBeCloseTo(5 + x, 12)
  })

  it('is never before the corner', () => {
    // a current that only falls, from its start on; one that never rises above zero
    expect(peakTime({ ...round, slope: -1 })).toBe(5)
    expect(peakTime({ ...round, slope: -100 })).toBe(5)
    expect(peakTime({ ...sharp, amplitude: -10, rounding: 0.5 })).toBe(5)
  })
})

describe('the fall to a level', () => {
  const reverse = (t: number) => reverseCurrentAt(sharp, t)

  it('is found wherever it is: tau ln(peak/level) after the peak', () => {
    for (const level of [9.9, 5, 1, 0.01, 1e-6])
      expect(fallsTo(reverse, 5, 4, level)).toBeCloseTo(5 + 4 * Math.log(10 / level), 9)
  })

  it('of a level never reached is given up after sixty tail times', () => {
    expect(fallsTo(() => 1, 5, 4, 0.5)).toBeCloseTo(5 + 61 * 4, 9)
  })
})

describe('the charge under the curve', () => {
  it.each(curves)('of %s is its integral', (_name, curve) => {
    const from = curve.corner - 3
    const to = curve.corner + 15
    const f = (t: number) => reverseCurrentAt(curve, t)
    const whole = integral(f, from, curve.corner) + integral(f, curve.corner + 1e-12, to)
    expect(chargeUnder(curve, from, to) / whole).toBeCloseTo(1, 6)
  })

  it('of a sharp corner is a trapezium and a tail', () => {
    expect(chargeUnder(sharp, 2, 5)).toBeCloseTo(3 * (10 - 3), 12)
    expect(chargeUnder(sharp, 5, 9)).toBeCloseTo(40 * (1 - 1 / Math.E), 6)
  })
})
