import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { chargeAtTurnOff, rampRecovery } from '../../src/models/charge-control.ts'
import { baseEnergy, rectifierEnergy, switchAddedEnergy, tailShare } from '../../src/models/commutation-energy.ts'
import { residualRecovery } from '../../src/models/residual-recovery.ts'
import { evenly, spread } from '../models/random-inputs.ts'

/** Rounding of a few operations on numbers of like size. */
const rounding = 1e-12
const runs = { numRuns: 1000, endOnFailure: true }

const part = fc
  .record({ lifetime: spread(2e-9, 10e-6), ratio: spread(0.01, 0.99) })
  .map(({ lifetime, ratio }) => ({ lifetime, tailTime: ratio * lifetime }))
const current = spread(0.01, 100)
const slope = spread(5e6, 5e9)
const voltage = spread(5, 1200)
const voltageFall = fc.oneof(fc.constant(0), spread(0.1e-9, 200e-9))
const factor = spread(1.0001, 30)

type Part = { readonly lifetime: number; readonly tailTime: number }

/** Event from the steady charge. */
const steady = (p: Part, i: number, a: number) =>
  rampRecovery({ ...p, current: i, slope: a, storedCharge: p.lifetime * i })

/** Event from a charge built in a conduction interval. */
const built = (p: Part, i: number, a: number, peakCurrent: number, conductionTime: number) =>
  rampRecovery({
    ...p,
    current: i,
    slope: a,
    storedCharge: chargeAtTurnOff({ peakCurrent, current: i, conductionTime, lifetime: p.lifetime }),
  })

interface Energies {
  readonly base: number
  readonly rectifier: number
  readonly added: number
  readonly claimed: number
}

function energies(p: Part, i: number, a: number, v: number, fall: number): Energies {
  const event = steady(p, i, a)
  const shared = { ...event, voltage: v, current: i, tailShare: tailShare({ voltageFall: fall, tailTime: p.tailTime }) }
  return {
    base: baseEnergy({ voltage: v, current: i, slope: a, voltageFall: fall }),
    rectifier: rectifierEnergy(shared),
    added: switchAddedEnergy(shared),
    claimed: v * (event.charge + i * event.timeToPeak),
  }
}

describe('laws of the recovery event', () => {
  it('rectifier and switch together take V (Qrr + I ta) exactly, whatever the voltage fall', () => {
    fc.assert(
      fc.property(part, current, slope, voltage, voltageFall, (p, i, a, v, fall) => {
        const { rectifier, added, claimed } = energies(p, i, a, v, fall)
        expect(Math.abs(rectifier + added - claimed)).toBeLessThanOrEqual(rounding * claimed)
      }),
      runs,
    )
  })

  it('the charge never falls with the current at a given lifetime and tail', () => {
    fc.assert(
      fc.property(part, current, slope, factor, (p, i, a, more) => {
        expect(steady(p, i * more, a).charge).toBeGreaterThanOrEqual(steady(p, i, a).charge * (1 - rounding))
      }),
      runs,
    )
  })

  it('the charge never falls with the slope at a given lifetime and tail', () => {
    fc.assert(
      fc.property(part, current, slope, factor, (p, i, a, more) => {
        expect(steady(p, i, a * more).charge).toBeGreaterThanOrEqual(steady(p, i, a).charge * (1 - rounding))
      }),
      runs,
    )
  })

  it('keeps the law of the current while a constant current fills the junction', () => {
    fc.assert(
      fc.property(part, current, slope, factor, spread(1e-8, 1e-4), (p, i, a, more, time) => {
        const charge = built(p, i, a, i, time).charge
        expect(built(p, i * more, a, i * more, time).charge).toBeGreaterThanOrEqual(charge * (1 - rounding))
      }),
      runs,
    )
  })

  it('but not with a charge left from a higher current: it has longer to die away in a longer ramp', () => {
    const p = { lifetime: 2e-9, tailTime: 0.05e-9 }
    const charge = (i: number) => built(p, i, 5e6, 1.93 * i, 10.3e-9).charge
    expect(charge(2.4)).toBeLessThan(charge(0.15))
    // by less than a millionth here: a curiosity, not an error of the model
    expect(charge(2.4)).toBeGreaterThan(charge(0.15) * (1 - 1e-5))
  })

  it('nor the law of the slope with a short interval: a junction still filling goes on filling while a slow ramp lasts', () => {
    const p = { lifetime: 1e-6, tailTime: 0.1e-6 }
    const slow = built(p, 10, 20e6, 10, 10e-9).charge
    expect(built(p, 10, 2e9, 10, 10e-9).charge).toBeLessThan(slow)
  })

  it('the isothermal total of base, rectifier and switch never rises with the slope', () => {
    fc.assert(
      fc.property(part, current, slope, factor, voltageFall, (p, i, a, more, fall) => {
        const total = ({ base, rectifier, added }: Energies) => base + rectifier + added
        const slow = total(energies(p, i, a, 400, fall))
        expect(total(energies(p, i, a * more, 400, fall))).toBeLessThanOrEqual(slow * (1 + rounding))
      }),
      runs,
    )
  })

  it("while the rectifier's own share never falls with the slope", () => {
    fc.assert(
      fc.property(part, current, slope, factor, voltageFall, (p, i, a, more, fall) => {
        const slow = energies(p, i, a, 400, fall).rectifier
        expect(energies(p, i, a * more, 400, fall).rectifier).toBeGreaterThanOrEqual(slow * (1 - rounding))
      }),
      runs,
    )
  })

  it('no energy, time or charge is negative, and none is more than the steady charge and the ramp allow', () => {
    fc.assert(
      fc.property(part, current, slope, voltage, voltageFall, (p, i, a, v, fall) => {
        const event = steady(p, i, a)
        const { base, rectifier, added } = energies(p, i, a, v, fall)
        for (const value of [event.timeToPeak, event.charge, base, rectifier, added]) {
          expect(value).toBeGreaterThanOrEqual(0)
          expect(Number.isFinite(value)).toBe(true)
        }
        // what comes back was stored: tau I, less what recombines on the way
        expect(event.charge).toBeLessThanOrEqual(p.lifetime * i * (1 + rounding))
        expect(event.timeToPeak).toBeLessThanOrEqual(p.lifetime - p.tailTime + rounding * p.lifetime)
      }),
      runs,
    )
  })

  it('the share of the tail lies between 0 and 1 and falls with the voltage fall', () => {
    fc.assert(
      fc.property(spread(1e-10, 1e-6), voltageFall, factor, (tailTime, fall, more) => {
        const share = tailShare({ voltageFall: fall, tailTime })
        expect(share).toBeGreaterThan(0)
        expect(share).toBeLessThanOrEqual(1)
        expect(tailShare({ voltageFall: fall * more, tailTime })).toBeLessThanOrEqual(share)
      }),
      runs,
    )
    expect(tailShare({ voltageFall: 1e-20, tailTime: 1e-8 })).toBeCloseTo(1, 11)
  })
})

describe('laws of the charge at turn-off', () => {
  it('lies between zero and the lifetime times the highest current, and grows with the interval', () => {
    fc.assert(
      fc.property(spread(2e-9, 10e-6), current, evenly(0, 1), spread(1e-10, 1e-2), (lifetime, peak, valley, time) => {
        const input = { peakCurrent: peak, current: valley * peak, conductionTime: time, lifetime }
        const charge = chargeAtTurnOff(input)
        expect(charge).toBeGreaterThan(0)
        expect(charge).toBeLessThanOrEqual(lifetime * peak * (1 + rounding))
        // never more than all that flowed
        expect(charge).toBeLessThanOrEqual(((1 + valley) / 2) * peak * time * (1 + rounding))
      }),
      runs,
    )
  })
})

describe('laws of discontinuous conduction', () => {
  const slopeOfDecay = spread(1e5, 1e8)
  const event = fc
    .record({ part, slope, slopeOfDecay, time: spread(1e-8, 1e-4), idle: spread(1e-10, 1e-4) })
    .map(({ part: p, slope: a, slopeOfDecay: m, time, idle }) => ({
      ...p,
      slope: a,
      slopeOfDecay: Math.min(m, a),
      idleTime: idle,
      storedChargeAtZero: chargeAtTurnOff({
        peakCurrent: Math.min(m, a) * time,
        current: 0,
        conductionTime: time,
        lifetime: p.lifetime,
      }),
    }))
  const fresh = () => ({ peakReverseCurrent: -1, charge: -1, timeToPeak: -1 })

  it('at no idle time it is the continuous event with no current, bit by bit within rounding', () => {
    fc.assert(
      fc.property(event, (e) => {
        const continuous = rampRecovery({ ...e, current: 0, storedCharge: e.storedChargeAtZero })
        const out = residualRecovery({ ...e, idleTime: 0 }, fresh())
        expect(Math.abs(out.charge - continuous.charge)).toBeLessThanOrEqual(rounding * continuous.charge)
        expect(Math.abs(out.timeToPeak - continuous.timeToPeak)).toBeLessThanOrEqual(rounding * continuous.timeToPeak)
        // and nothing jumps just after
        const soon = residualRecovery({ ...e, idleTime: 1e-9 * continuous.timeToPeak }, fresh())
        expect(Math.abs(soon.charge / continuous.charge - 1)).toBeLessThan(1e-6)
      }),
      runs,
    )
  })

  it('charge and peak never rise with the idle time, and end at exactly zero', () => {
    fc.assert(
      fc.property(event, factor, (e, more) => {
        const early = { ...residualRecovery(e, fresh()) }
        const late = residualRecovery({ ...e, idleTime: e.idleTime * more }, fresh())
        expect(late.charge).toBeLessThanOrEqual(early.charge * (1 + 1e-9))
        expect(early.charge).toBeGreaterThanOrEqual(0)
        expect(early.peakReverseCurrent).toBeGreaterThanOrEqual(0)
        expect(early.timeToPeak).toBeGreaterThanOrEqual(0)
        expect(residualRecovery({ ...e, idleTime: 1 }, fresh())).toEqual({
          peakReverseCurrent: 0,
          charge: 0,
          timeToPeak: 0,
        })
      }),
      runs,
    )
  })

  it('books nothing below a hundredth of the charge at no idle time, and everything above it', () => {
    fc.assert(
      fc.property(event, (e) => {
        const whole = residualRecovery({ ...e, idleTime: 0 }, fresh()).charge
        const { charge } = residualRecovery(e, fresh())
        if (charge === 0) return
        expect(charge).toBeGreaterThanOrEqual(0.01 * whole)
      }),
      runs,
    )
  })
})
