import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { chargeAtTurnOff, rampRecovery } from '../../src/models/charge-control.ts'
import { baseEnergy, rectifierEnergy, switchAddedEnergy, tailShare } from '../../src/models/commutation-energy.ts'
import { residualRecovery } from '../../src/models/residual-recovery.ts'
import { spread } from './random-inputs.ts'
import { chargeByOde, energiesByOde, rampByOde, softByOde } from './recovery-ode.ts'
import { odeTolerance } from './solve-ode.ts'

/** Seeds are fixed below, so that a failure comes back. */
const slope = spread(10e6, 2e9)
const lifetime = spread(5e-9, 5e-6)
/** tau_rr/tau: 0.02 (y = 3.9) to 0.9, beyond what any class prior draws at two standard deviations. */
const tailRatio = spread(0.02, 0.9)
/** I/(a tau): from a slow part hit hard to a fast one that has long reached its quasi-static charge. */
const crossing = spread(0.01, 20)
/** q0/(tau I): a short conduction interval to a current that has just fallen from above. */
const fill = spread(0.05, 1.5)

const events = fc.sample(fc.record({ slope, lifetime, tailRatio, crossing, fill }), { numRuns: 250, seed: 20261 })

/** The solver keeps 1e-11 per step of variables of size 1; small results lose relative to that size. */
function expectClose(actual: number, expected: number, scale = Math.abs(expected)): void {
  expect(Math.abs(actual - expected)).toBeLessThanOrEqual(100 * odeTolerance * Math.max(scale, Math.abs(expected), 0.1))
}

describe('ramp event against an ODE solver', () => {
  it('gives time to peak, peak and charge of 250 random events', () => {
    expect(events).toHaveLength(250)
    for (const event of events) {
      const current = event.crossing * event.slope * event.lifetime
      const storedCharge = event.fill * event.lifetime * current
      const tailTime = event.tailRatio * event.lifetime
      const ours = rampRecovery({ current, storedCharge, slope: event.slope, lifetime: event.lifetime, tailTime })
      const theirs = rampByOde({ current: event.crossing, charge: event.fill * event.crossing, tail: event.tailRatio })
      expectClose(ours.timeToPeak / event.lifetime, theirs.timeToPeak, 1 + event.crossing)
      expectClose(ours.peakReverseCurrent / (event.slope * event.lifetime), theirs.peak, 1 + event.crossing)
      expectClose(ours.charge / (event.slope * event.lifetime ** 2), theirs.reverseCharge, 1 + event.crossing)
    }
  })

  it('gives the charge of 250 random conduction intervals', () => {
    const intervals = fc.sample(fc.record({ time: spread(0.001, 50), valley: spread(0.01, 1) }), {
      numRuns: 250,
      seed: 20262,
    })
    for (const { time, valley } of intervals) {
      const ours = chargeAtTurnOff({
        peakCurrent: 7,
        current: 7 * valley,
        conductionTime: time * 40e-9,
        lifetime: 40e-9,
      })
      // on its way the charge passes through values near 1
      expectClose(ours / (7 * 40e-9), chargeByOde(1, valley, time), 1)
    }
  })
})

describe('residual recovery against an ODE solver', () => {
  const cases = fc.sample(
    fc.record({ lifetime, tailRatio, ratio: spread(2, 500), time: spread(0.2, 20), idle: spread(0.002, 3) }),
    { numRuns: 220, seed: 20263 },
  )

  it('gives peak, charge and time of 220 random idle times, or exactly 0 where under 1 % is left', () => {
    let zero = 0
    let emptied = 0
    for (const { lifetime: tau, tailRatio: tail, ratio, time, idle } of cases) {
      // scaled so that a = 1 and tau = 1: m = 1/ratio, the current fell from m × time to 0
      const m = 1 / ratio
      const charge = chargeByOde(m * time, 0, time)
      const soft = softByOde(m, tail, charge, idle)
      const whole = rampByOde({ current: 0, charge, tail }).reverseCharge
      const left = soft.empty
        ? { peak: -soft.current, reverseCharge: -soft.current * tail, timeToPeak: 0 }
        : rampByOde({ current: soft.current, charge: soft.charge, tail })
      const a = 300e6
      const input = {
        slopeOfDecay: a * m,
        idleTime: idle * tau,
        slope: a,
        lifetime: tau,
        tailTime: tail * tau,
        storedChargeAtZero: a * tau * tau * charge,
      }
      const out = residualRecovery(input, { peakReverseCurrent: 0, charge: 0, timeToPeak: 0 })
      const share = left.reverseCharge / whole
      if (Math.abs(share - 0.01) < 1e-6) continue
      if (share < 0.01) {
        expect(out).toEqual({ peakReverseCurrent: 0, charge: 0, timeToPeak: 0 })
        zero++
        continue
      }
      if (soft.empty) emptied++
      expectClose(out.charge / (a * tau * tau), left.reverseCharge)
      expectClose(out.peakReverseCurrent / (a * tau), left.peak)
      expectClose(out.timeToPeak / tau, soft.empty ? 0 : left.timeToPeak + soft.current)
    }
    // all three branches must have been met
    expect([zero > 20, emptied > 20, cases.length - zero - emptied > 20]).toEqual([true, true, true])
  })
})

describe('energies against time integration of v i', () => {
  it('books 250 random events to rectifier and switch as the integral does', () => {
    const falls = fc.sample(spread(0.01, 10), { numRuns: 249, seed: 20264 })
    for (const [index, event] of events.entries()) {
      // the last event has a voltage that moves at once
      const fall = (falls[index] ?? 0) * event.tailRatio
      const theirs = energiesByOde(
        { current: event.crossing, charge: event.fill * event.crossing, tail: event.tailRatio },
        fall,
      )
      const unit = { voltage: 1, slope: 1, current: event.crossing, voltageFall: fall, tailTime: event.tailRatio }
      const charge = event.fill * event.crossing
      const ramp = rampRecovery({ ...unit, lifetime: 1, storedCharge: charge })
      const input = { ...unit, ...ramp, tailShare: tailShare(unit) }
      const scale = event.crossing * event.crossing
      expectClose(rectifierEnergy(input), theirs.rectifier, scale)
      expectClose(baseEnergy(unit) + switchAddedEnergy(input), theirs.switch, scale)
    }
  })
})
