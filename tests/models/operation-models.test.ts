import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { bulkDischargeTime } from '../../src/models/bulk-discharge.ts'
import { conventionEnergies } from '../../src/models/energy-conventions.ts'
import {
  leakageCriticalTemperature,
  leakageCurrent,
  leakageRunawayLimit,
  leakageSlopeTemperature,
} from '../../src/models/leakage-current.ts'
import { mainsBoostRectifierMean, mainsBoostRectifierRms } from '../../src/models/line-cycle.ts'
import { meaningless } from '../../src/models/meaningless.ts'
import { trapezoidMean, trapezoidRms } from '../../src/models/trapezoid.ts'
import { triangleFromCharge, triangleFromTime } from '../../src/models/triangle.ts'
import { triangularTailEnergies } from '../../src/models/triangular-tail.ts'
import { gaussLegendre, integrate } from '../../src/numerics/gauss-legendre.ts'
import { evenly, spread } from './random-inputs.ts'

const rule = gaussLegendre(40)

describe('leakage', () => {
  const leakage = {
    logarithm: Math.log(50e-6),
    activation: 0.7 / 8.617333e-5,
    exponent: 1.5,
    ratedVoltage: 100,
    voltage: 60,
    temperature: 398.15,
    referenceTemperature: 298.15,
  }

  it('is the reference at the reference, grows as a power of the voltage and vanishes without it', () => {
    const reference = { ...leakage, voltage: 100, temperature: 298.15 }
    expect(leakageCurrent(reference)).toBeCloseTo(50e-6, 18)
    expect(leakageCurrent({ ...reference, voltage: 25 })).toBeCloseTo(50e-6 / 8, 18)
    for (const exponent of [1.5, 0]) {
      expect(leakageCurrent({ ...reference, exponent, voltage: 0 })).toBe(0)
      expect(leakageCurrent({ ...reference, exponent, voltage: -5 })).toBe(0)
    }
  })

  it('has the stated slope in temperature', () => {
    const at = (temperature: number) => Math.log(leakageCurrent({ ...leakage, temperature }))
    const slope = (at(398.16) - at(398.14)) / 0.02
    expect(leakageSlopeTemperature(leakage)).toBeCloseTo(slope, 8)
  })

  it('runs away where its heat grows as fast as the way to ambient carries off', () => {
    const thermal = { voltage: 60, conductionShare: 0.4, thermalResistance: 25 }
    const coefficient = leakageSlopeTemperature(leakage)
    const limit = leakageRunawayLimit({ ...thermal, coefficient })
    // dP/dT = V (1 − d) c I = 1/Rth
    expect(60 * 0.6 * coefficient * limit * 25).toBeCloseTo(1, 12)
  })

  it('has its critical temperature where a constant exponent meets that limit', () => {
    const input = { voltage: 11, current: 1e-4, referenceTemperature: 298.15, coefficient: 0.07, thermalResistance: 25 }
    const temperature = leakageCriticalTemperature(input)
    const there = 1e-4 * Math.exp(0.07 * (temperature - 298.15))
    expect(there).toBeCloseTo(leakageRunawayLimit({ ...input, conductionShare: 0 }), 12)
  })
})

describe('triangles', () => {
  it('from time and from charge are the same triangle', () => {
    fc.assert(
      fc.property(spread(1e-9, 1e-5), spread(1e6, 1e9), evenly(0, 3), (recoveryTime, slope, softness) => {
        const one = triangleFromTime({ recoveryTime, slope, softness })
        const two = triangleFromCharge({ charge: one.charge, slope, softness })
        for (const key of ['timeToPeak', 'tailDuration', 'recoveryTime', 'peakReverseCurrent'] as const) {
          expect(Math.abs(two[key] - one[key])).toBeLessThanOrEqual(1e-12 * one[key])
        }
        expect(one.timeToPeak + one.tailDuration).toBeCloseTo(recoveryTime, 18)
        expect(two.peakReverseCurrent / Math.sqrt((2 * one.charge * slope) / (1 + softness))).toBeCloseTo(1, 12)
      }),
    )
  })

  it('name the input that has no meaning', () => {
    expect(meaningless('model', 'input', -2)).toEqual(new RangeError('model: input = -2 has no meaning'))
    expect(() => triangleFromTime({ recoveryTime: 1, slope: 0, softness: 1 })).toThrow(
      'triangleFromTime: slope = 0 has no meaning',
    )
    expect(() => triangleFromTime({ recoveryTime: 1, slope: 1, softness: -1 })).toThrow(
      'triangleFromTime: softness = -1 has no meaning',
    )
    const event = { voltage: 1, current: 1, slope: 0, peakReverseCurrent: 1, softness: 1 }
    expect(() => triangularTailEnergies(event)).toThrow('triangularTailEnergies: slope = 0 has no meaning')
  })

  it('heat rectifier and switch by V (Qrr + I ta + I tb/2), which is the integral of v i', () => {
    const event = { voltage: 400, current: 6, slope: 200e6, peakReverseCurrent: 8, softness: 0.7 }
    const { rectifier, switch: heated } = triangularTailEnergies(event)
    const ta = 8 / 200e6
    const tb = 0.7 * ta
    const tail = (s: number) => 8 * (1 - s)
    const over = (f: (s: number) => number) => tb * integrate({ f, low: 0, high: 1, rule })
    expect(rectifier).toBeCloseTo(
      over((s) => 400 * s * tail(s)),
      15,
    )
    const rise = 400 * (6 * ta + (8 * ta) / 2)
    expect(heated).toBeCloseTo(rise + over((s) => 400 * (1 - s) * (6 + tail(s))), 15)
    const charge = (8 * (ta + tb)) / 2
    expect(rectifier + heated).toBeCloseTo(400 * (charge + 6 * ta + (6 * tb) / 2), 15)
  })
})

describe('conventions of recovery loss', () => {
  it('stand in one list with a source each, and differ more than twentyfold for one event', () => {
    const event = {
      voltage: 400,
      current: 6,
      peakReverseCurrent: 8,
      timeToPeak: 40e-9,
      recoveryTime: 60e-9,
      charge: 240e-9,
    }
    const all = conventionEnergies(event)
    expect(new Set(all.map(({ name }) => name)).size).toBe(6)
    for (const { source, energy } of all) expect([source.length > 10, energy > 0]).toEqual([true, true])
    const energies = all.map(({ energy }) => energy)
    expect(Math.max(...energies) / Math.min(...energies)).toBeGreaterThan(20)
    // a recovery time that ends before the peak has no tail rather than a negative one
    const early = conventionEnergies({ ...event, recoveryTime: 30e-9 })
    expect(early.find(({ name }) => name === 'V I_RM tb/2')!.energy).toBe(0)
    expect(all.filter(({ heats }) => heats === 'both').map(({ name }) => name)).toEqual(['V (Qrr + I trr)', 'V Qrr'])
  })
})

describe('currents', () => {
  it('have the mean and the root mean square that quadrature gives', () => {
    fc.assert(
      fc.property(evenly(-5, 20), evenly(-5, 20), (first, last) => {
        const f = (s: number) => first + (last - first) * s
        const square = integrate({ f: (s) => f(s) ** 2, low: 0, high: 1, rule })
        expect(trapezoidMean({ first, last })).toBeCloseTo(integrate({ f, low: 0, high: 1, rule }), 10)
        expect(trapezoidRms({ first, last })).toBeCloseTo(Math.sqrt(square), 10)
      }),
    )
  })

  it('of a mains boost are those of an integration over the half cycle', () => {
    const input = { power: 1200, mainsVoltage: 85, outputVoltage: 400 }
    const peak = Math.SQRT2 * 85
    const average = (f: (angle: number) => number) => integrate({ f, low: 0, high: Math.PI, rule }) / Math.PI
    // inductor current × share of the period in which the rectifier carries it, vin/Vo
    const inductor = (angle: number) => ((2 * 1200) / peak) * Math.sin(angle)
    const share = (angle: number) => (peak * Math.sin(angle)) / 400
    expect(mainsBoostRectifierMean(input)).toBeCloseTo(
      average((t) => inductor(t) * share(t)),
      12,
    )
    expect(mainsBoostRectifierRms(input)).toBeCloseTo(Math.sqrt(average((t) => inductor(t) ** 2 * share(t))), 12)
  })
})

describe('bulk capacitor', () => {
  it('needs no time to be where it already is, and never reaches zero', () => {
    const input = { resistance: 10e3, capacitance: 470e-6, from: 48, to: 60 }
    expect(bulkDischargeTime(input)).toBe(0)
    expect(bulkDischargeTime({ ...input, to: 48 })).toBe(0)
    expect(() => bulkDischargeTime({ ...input, to: 0 })).toThrow('bulkDischargeTime: to = 0 has no meaning')
  })
})
