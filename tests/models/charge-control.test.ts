import { describe, expect, it } from 'vitest'
import { chargeAtTurnOff, rampRecovery, recoveryTimeFactor, timeToPeak } from '../../src/models/charge-control.ts'
import { exponentialExcess, scaledTimeToPeak } from '../../src/models/ramp-root.ts'
import { chargeByOde, rampByOde } from './recovery-ode.ts'

const event = { current: 8, slope: 200e6, lifetime: 60e-9, tailTime: 20e-9, storedCharge: 480e-9 }

/** Residual of the equation as published, for comparison with the root of the rearranged one. */
function published(ta: number, { current, slope, lifetime, tailTime, storedCharge }: typeof event): number {
  const decay = Math.exp(-(current / slope + ta) / lifetime)
  const start = 1 + (lifetime * current - storedCharge) / (slope * lifetime * lifetime)
  return ta - (lifetime - tailTime) * (1 - decay * start)
}

describe('time to the peak', () => {
  it('solves the equation as published', () => {
    for (const current of [0, 0.1, 1, 8, 100]) {
      for (const fill of [0.1, 0.9, 1, 1.4]) {
        const input = { ...event, current, storedCharge: fill * current * event.lifetime + 1e-9 }
        expect(Math.abs(published(timeToPeak(input), input))).toBeLessThan(1e-14 * input.lifetime)
      }
    }
  })

  it('is where an ODE solver finds the junction empty, with the charge that it finds', () => {
    for (const scaled of [
      { current: 0.5, charge: 0.4, tail: 0.3 },
      { current: 3, charge: 3.3, tail: 0.1 },
      { current: 0, charge: 0.2, tail: 0.6 },
    ]) {
      const solved = rampByOde(scaled)
      const { current, charge: storedCharge, tail: tailTime } = scaled
      const ours = rampRecovery({ current, storedCharge, tailTime, slope: 1, lifetime: 1 })
      expect(ours.timeToPeak).toBeCloseTo(solved.timeToPeak, 9)
      expect(ours.peakReverseCurrent).toBeCloseTo(solved.peak, 9)
      expect(ours.charge).toBeCloseTo(solved.reverseCharge, 9)
    }
  })

  it('keeps its digits where the ramp is far shorter than the lifetime: ta sqrt form, q0 given back by the reverse charge', () => {
    // tau → ∞ at a fixed transit time: q0 + I²/(2a) − a ta²/2 = TM a ta, a quadratic
    const [current, slope, transit, storedCharge] = [1, 1e9, 5e-9, 2e-8]
    const lifetime = 1
    const tailTime = 1 / (1 / lifetime + 1 / transit)
    const charge = storedCharge + (current * current) / (2 * slope)
    const root = -transit + Math.sqrt(transit * transit + (2 * charge) / slope)
    const ta = timeToPeak({ current, slope, lifetime, tailTime, storedCharge })
    expect(Math.abs(ta / root - 1)).toBeLessThan(1e-6)
    // the next order in ta/tau explains what is left
    expect(ta).toBeLessThan(root)
  })

  it('is exactly zero without charge and current, and with a tail as long as the lifetime', () => {
    expect(timeToPeak({ ...event, current: 0, storedCharge: 0 })).toBe(0)
    expect(timeToPeak({ ...event, tailTime: event.lifetime })).toBe(0)
    expect(timeToPeak({ ...event, current: 0, storedCharge: 0, tailTime: 0 })).toBe(0)
  })

  it('reaches tau − tau_rr, the quasi-static limit, for a long ramp', () => {
    const current = 8e3
    expect(timeToPeak({ ...event, current, storedCharge: current * 60e-9 })).toBeCloseTo(40e-9, 20)
  })

  it('takes a current that already flows backwards, and a junction that is then empty at once', () => {
    const flowing = { ...event, current: -1, storedCharge: 1e-7 }
    expect(timeToPeak(flowing)).toBeGreaterThan(1 / 200e6)
    expect(Math.abs(published(timeToPeak(flowing), flowing))).toBeLessThan(1e-14 * flowing.lifetime)
    expect(timeToPeak({ ...flowing, storedCharge: 0 })).toBeCloseTo(1 / 200e6, 20)
  })

  it('takes a charge from far above the steady one, where the equation bends the other way', () => {
    const high = { ...event, current: 1, storedCharge: 50 * 60e-9 }
    expect(Math.abs(published(timeToPeak(high), high) / timeToPeak(high))).toBeLessThan(1e-12)
  })

  it('names the input that has no meaning', () => {
    const refused = (change: Partial<typeof event>) => () => timeToPeak({ ...event, ...change })
    expect(refused({ slope: 0 })).toThrow('timeToPeak: slope = 0 has no meaning')
    expect(refused({ lifetime: 0 })).toThrow('timeToPeak: lifetime = 0 has no meaning')
    expect(refused({ lifetime: -1 })).toThrow('timeToPeak: lifetime = -1 has no meaning')
    expect(refused({ tailTime: 61e-9 })).toThrow('timeToPeak: tailTime = 6.1e-8 has no meaning')
    expect(refused({ tailTime: -1e-9 })).toThrow('timeToPeak: tailTime = -1e-9 has no meaning')
    expect(refused({ storedCharge: -1 })).toThrow('timeToPeak: storedCharge = -1 has no meaning')
    expect(refused({ slope: Number.NaN })).toThrow('timeToPeak: slope = NaN has no meaning')
  })

  it('gives the event of the same root as an object', () => {
    const ta = timeToPeak(event)
    const charge = event.slope * ta * (ta / 2 + event.tailTime)
    expect(rampRecovery(event)).toEqual({
      timeToPeak: ta,
      peakReverseCurrent: event.slope * ta,
      tailTime: 20e-9,
      charge,
    })
  })
})

describe('charge at turn-off', () => {
  const interval = { peakCurrent: 16, current: 8, lifetime: 60e-9 }

  it('tends to the steady charge for a long interval and to mean current times time for a short one', () => {
    expect(chargeAtTurnOff({ ...interval, peakCurrent: 8, conductionTime: 1 })).toBeCloseTo(480e-9, 18)
    const short = chargeAtTurnOff({ ...interval, conductionTime: 1e-15 })
    expect(Math.abs(short / (12 * 1e-15) - 1)).toBeLessThan(1e-7)
  })

  it('stays at lifetime times current over any number of lifetimes, one beside which 1 is lost included', () => {
    for (const lifetimes of [1e3, 1e9, 2 ** 53 + 2, 1e20]) {
      const charge = chargeAtTurnOff({ ...interval, conductionTime: lifetimes, lifetime: 1 })
      expect(Math.abs(charge / (8 + 8 / lifetimes) - 1)).toBeLessThan(1e-15)
    }
  })

  it('is the same on both sides of the switch to the series at small times', () => {
    const at = (z: number) => chargeAtTurnOff({ ...interval, conductionTime: z * interval.lifetime }) / z
    expect(at(0.05 + 1e-12) / at(0.05 - 1e-12)).toBeCloseTo(1, 11)
  })

  it('is what an ODE solver fills in, over short and long intervals', () => {
    for (const time of [0.04, 0.3, 2, 39, 45]) {
      const charge = chargeAtTurnOff({ peakCurrent: 1, current: 0.4, conductionTime: time, lifetime: 1 })
      expect(charge).toBeCloseTo(chargeByOde(1, 0.4, time), 9)
    }
  })

  it('is 0 without an interval and names a lifetime without meaning', () => {
    expect(chargeAtTurnOff({ ...interval, conductionTime: 0 })).toBe(0)
    expect(() => chargeAtTurnOff({ ...interval, conductionTime: 1, lifetime: 0 })).toThrow(
      'chargeAtTurnOff: lifetime = 0 has no meaning',
    )
  })
})

describe('definitions of the recovery time', () => {
  it('put an absolute level at ln(I_RM/I_x), and at the peak when it is never exceeded', () => {
    const level = (until: number) => recoveryTimeFactor({ definition: { kind: 'level', until }, peakReverseCurrent: 4 })
    expect(level(0.4)).toBeCloseTo(Math.LN10, 14)
    expect(level(4)).toBe(0)
    expect(level(9)).toBe(0)
  })

  it('place the line by two readings of the tail itself', () => {
    const through = (high: number, low: number) => {
      const [first, second] = [-Math.log(high), -Math.log(low)]
      return second + (low * (second - first)) / (high - low)
    }
    const k = (kind: 'line-90-25' | 'line-75-50') => recoveryTimeFactor({ definition: { kind }, peakReverseCurrent: 1 })
    expect(k('line-90-25')).toBeCloseTo(through(0.9, 0.25), 14)
    expect(k('line-75-50')).toBeCloseTo(through(0.75, 0.5), 14)
  })
})

describe('the root without dimension', () => {
  it('has z − (1 − exp(−z)) to full precision on both sides of its series', () => {
    for (const z of [0, 1e-9, 1e-4, 0.01, 0.049, 0.051]) {
      let term = (z * z) / 2
      let sum = term
      for (let n = 3; n < 30; n++) {
        term *= -z / n
        sum += term
      }
      expect(Math.abs(exponentialExcess(z) - sum)).toBeLessThanOrEqual(5e-15 * sum)
    }
  })

  it('balances the charges to 1e-13 of itself, however short the ramp and the tail', () => {
    // from no current: (1 − ρ)(κ exp(−x) − (x − 1 + exp(−x))) = ρ x, by bisection
    for (const charge of [1e-10, 1e-8, 1e-6, 1e-4, 1e-2]) {
      for (const tail of [0.3, 1e-3, 1e-4]) {
        const balance = (x: number) => (1 - tail) * (charge * Math.exp(-x) - exponentialExcess(x)) - tail * x
        let [low, high] = [0, 1]
        for (let n = 0; n < 100; n++) {
          const middle = (low + high) / 2
          if (balance(middle) > 0) low = middle
          else high = middle
        }
        expect(Math.abs(scaledTimeToPeak(0, charge, tail) / low - 1)).toBeLessThan(1e-13)
      }
    }
  })

  it('is 1 − ρ after a ramp of a million lifetimes, and of so many that 1 is lost beside them', () => {
    expect(scaledTimeToPeak(2 ** 53 + 2, 2 ** 53 + 2, 0.3)).toBeCloseTo(0.7, 14)
    expect(scaledTimeToPeak(1e6, 1e6, 0.3)).toBeCloseTo(0.7, 14)
    expect(scaledTimeToPeak(1e12, 1e12, 0.2)).toBeCloseTo(0.8, 14)
  })

  it('rises with the stored charge', () => {
    let before = -1
    for (const charge of [0, 0.01, 0.1, 1, 3, 10]) {
      const x = scaledTimeToPeak(0.5, charge, 0.2)
      expect(x).toBeGreaterThan(before)
      before = x
    }
  })
})
