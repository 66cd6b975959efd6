import { describe, expect, it } from 'vitest'
import { ringingPeakVoltage, storedChargePeakVoltage } from '../../src/models/peak-reverse-voltage.ts'
import { peakByOde } from './ringing-ode.ts'

const law = (zeroBias: number, builtIn: number, grading: number) =>
  ({ kind: 'law', zeroBias, builtIn, grading }) as const

describe('peak reverse voltage', () => {
  it('agrees with an ODE solver on a loop with two parts', () => {
    const loop = {
      voltage: 600,
      voltageFall: 12e-9,
      loopInductance: 12e-9,
      capacitance: law(4e-10, 0.7, 0.5),
      parts: 2,
    }
    expect(Math.abs(ringingPeakVoltage(loop) / peakByOde(loop) - 1)).toBeLessThan(1e-7)
  })

  it('is V (1 + |sin x|/x), x = ω t_fv/2, after a linear fall on a constant capacitance', () => {
    const period = 2 * Math.PI * Math.sqrt(20e-9 * 1e-10)
    const peak = (periods: number, voltage = 100) =>
      ringingPeakVoltage({
        voltage,
        voltageFall: periods * period,
        loopInductance: 20e-9,
        capacitance: law(1e-10, 1, 0),
        parts: 1,
      })
    for (const periods of [1e-4, 0.1, 0.25, 0.5, 0.9, 1.5, 2.25]) {
      const x = Math.PI * periods
      expect(Math.abs(peak(periods) / (100 * (1 + Math.abs(Math.sin(x)) / x)) - 1)).toBeLessThan(1e-7 * (1 + periods))
    }
    // at a microvolt as well
    expect(peak(0.25, 1e-6) / 1e-8).toBeCloseTo(peak(0.25), 9)
    // both corners cancel over whole periods, however many are followed step by step
    expect(peak(1)).toBeCloseTo(100, 4)
    // sin(0.01 π)/(312 π) of ringing is left
    expect(peak(311.99)).toBeCloseTo(100.0032, 2)
    // beyond that they are added up as if in step
    expect(peak(312.01)).toBeCloseTo(100 * (1 + 1 / (312.01 * Math.PI)), 9)
  })

  it('lets the ringing of the first corner of a slow fall grow as C^(-3/4), since C v² sqrt(L C) stays', () => {
    // C(255 V) = C0/16: the first corner grows to 8 sqrt(L C0), the second starts with sqrt(L C0)/4
    const loop = { voltage: 255, voltageFall: 1e-6, loopInductance: 4e-9, parts: 2, capacitance: law(5e-12, 1, 0.5) }
    const unit = Math.sqrt(4e-9 * 1e-11)
    expect(ringingPeakVoltage(loop)).toBeCloseTo(255 + (255 / 1e-6) * 8.25 * unit, 9)
  })

  it('is three times the voltage for an abrupt step on a charge-only junction, twice on a constant capacitance', () => {
    const loop = { voltage: 100, voltageFall: 0, loopInductance: 20e-9, parts: 1 }
    expect(ringingPeakVoltage({ ...loop, capacitance: law(1e-10, 1, 0) })).toBeCloseTo(200, 5)
    // the square-root charge law alone gives 3 V; Vj 0.8 V takes a little off it
    const charge = ringingPeakVoltage({ ...loop, capacitance: { kind: 'charge', charge: 10e-9, voltage: 100 } })
    expect(charge).toBeGreaterThan(280)
    expect(charge).toBeLessThan(300)
  })

  it('comes down to the blocking voltage when the switch is slow, and never falls below it', () => {
    const loop = { voltage: 400, loopInductance: 1e-9, capacitance: law(20e-12, 1, 0.46), parts: 1 }
    expect(ringingPeakVoltage({ ...loop, voltageFall: 2e-6 })).toBeLessThan(400.3)
    for (let fall = 0; fall < 20; fall++) {
      expect(ringingPeakVoltage({ ...loop, voltageFall: fall * 1e-9 })).toBeGreaterThanOrEqual(400)
    }
  })

  it('sees parallel parts as one junction of so many times the capacitance', () => {
    const loop = { voltage: 48, voltageFall: 8e-9, loopInductance: 12e-9 }
    const two = ringingPeakVoltage({ ...loop, capacitance: law(4e-10, 0.8, 0.46), parts: 2 })
    expect(two).toBeCloseTo(ringingPeakVoltage({ ...loop, capacitance: law(8e-10, 0.8, 0.46), parts: 1 }), 9)
  })

  it('is the blocking voltage where nothing rings or recovers', () => {
    const loop = { voltage: 48, voltageFall: 8e-9, loopInductance: 0, capacitance: law(4e-10, 0.8, 0.46), parts: 1 }
    expect(ringingPeakVoltage(loop)).toBe(48)
    expect(ringingPeakVoltage({ ...loop, loopInductance: 1e-8, voltage: 0 })).toBe(0)
    expect(ringingPeakVoltage({ ...loop, loopInductance: 1e-8, voltage: -5 })).toBe(-5)
    expect(storedChargePeakVoltage({ voltage: 48, loopInductance: 1e-8, peakReverseCurrent: 0, tailTime: 0 })).toBe(48)
  })

  it('adds the loop inductance times the steepest slope of the tail', () => {
    const input = { voltage: 400, loopInductance: 20e-9, peakReverseCurrent: 10, tailTime: 10e-9 }
    expect(storedChargePeakVoltage(input)).toBeCloseTo(420, 9)
  })
})

describe('a junction stated to have no capacitance', () => {
  it('rings with nothing: 0 F and 0 C leave the blocking voltage', () => {
    const none = [
      { kind: 'law', zeroBias: 0, builtIn: 0.8, grading: 0.45 },
      { kind: 'charge', charge: 0, voltage: 50 },
    ] as const
    for (const capacitance of none)
      for (const voltageFall of [0, 15e-9, 1e-3]) {
        const input = { voltage: 400, voltageFall, loopInductance: 20e-9, capacitance, parts: 2 }
        expect(ringingPeakVoltage(input)).toBe(400)
      }
  })
})
