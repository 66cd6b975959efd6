import { describe, expect, it } from 'vitest'
import { rampRecovery } from '../../src/models/charge-control.ts'
import { residualRecovery } from '../../src/models/residual-recovery.ts'
import { rampByOde, softByOde } from './recovery-ode.ts'

const input = {
  slopeOfDecay: 5 / 3e-6,
  idleTime: 0,
  slope: 300e6,
  lifetime: 400e-9,
  tailTime: 120e-9,
  storedChargeAtZero: 265.413e-9,
}
const fresh = () => ({ peakReverseCurrent: -1, charge: -1, timeToPeak: -1 })
const at = (idleTime: number) => residualRecovery({ ...input, idleTime }, fresh())
/** ta,s: where the junction empties by itself. */
const soft = rampRecovery({ ...input, current: 0, slope: input.slopeOfDecay, storedCharge: input.storedChargeAtZero })

describe('residual recovery', () => {
  it('writes into the object it is given and returns it', () => {
    const out = fresh()
    expect(residualRecovery(input, out)).toBe(out)
    expect(out.charge).toBeGreaterThan(0)
  })

  it('takes what an ODE solver leaves in a junction that is still full or has emptied by itself', () => {
    // in units of tau = 0.5 and a = 8, hence 4 A and 2 C: m = 1/8, q0 = 0.1
    const [m, tail, charge] = [0.125, 0.3, 0.1]
    const scaled = {
      slopeOfDecay: 8 * m,
      slope: 8,
      lifetime: 0.5,
      tailTime: 0.5 * tail,
      storedChargeAtZero: 2 * charge,
    }
    const met = new Set<boolean>()
    for (const idleTime of [0.001, 0.05, 0.2, 0.4, 0.5, 0.8]) {
      const soft = softByOde(m, tail, charge, idleTime)
      met.add(soft.empty)
      const left = soft.empty
        ? { peak: -soft.current, reverseCharge: -soft.current * tail, timeToPeak: -soft.current }
        : rampByOde({ ...soft, tail })
      const ours = residualRecovery({ ...scaled, idleTime: 0.5 * idleTime }, fresh())
      expect(ours.peakReverseCurrent / 4).toBeCloseTo(left.peak, 9)
      expect(ours.charge / 2).toBeCloseTo(left.reverseCharge, 9)
      expect(ours.timeToPeak / 0.5).toBeCloseTo(left.timeToPeak + soft.current, 9)
    }
    expect(met.size).toBe(2)
  })

  it('does not jump where the junction has just emptied by itself', () => {
    const before = at(soft.timeToPeak * (1 - 1e-9))
    const after = at(soft.timeToPeak * (1 + 1e-9))
    expect(after.charge / before.charge).toBeCloseTo(1, 7)
    expect(after.peakReverseCurrent / before.peakReverseCurrent).toBeCloseTo(1, 7)
    expect(after.timeToPeak).toBe(0)
    expect(before.timeToPeak).toBeLessThan(1e-15)
  })

  it('decays with the tail after that', () => {
    const one = at(soft.timeToPeak + 120e-9)
    const two = at(soft.timeToPeak + 240e-9)
    expect(two.charge / one.charge).toBeCloseTo(Math.exp(-1), 12)
    expect(one.charge).toBeCloseTo(one.peakReverseCurrent * input.tailTime, 20)
  })

  it('is exactly zero once under a hundredth of the charge at no idle time is left', () => {
    const whole = at(0).charge
    // the idle time at which the tail holds just 1 %
    const left = soft.peakReverseCurrent * input.tailTime
    const edge = soft.timeToPeak + input.tailTime * Math.log(left / (0.01 * whole))
    expect(at(edge * (1 - 1e-6)).charge).toBeGreaterThan(0.0099 * whole)
    expect(at(edge * (1 + 1e-6))).toEqual({ peakReverseCurrent: 0, charge: 0, timeToPeak: 0 })
  })

  it('at no idle time is the hard event without current', () => {
    const hard = rampRecovery({ ...input, current: 0, storedCharge: input.storedChargeAtZero })
    for (const idleTime of [0, -1e-9]) {
      expect(at(idleTime).peakReverseCurrent).toBeCloseTo(hard.peakReverseCurrent, 12)
      expect(at(idleTime).charge / hard.charge).toBeCloseTo(1, 12)
      expect(at(idleTime).timeToPeak / hard.timeToPeak).toBeCloseTo(1, 12)
    }
  })

  it('is zero for an empty junction, without a division of nothing by nothing', () => {
    const empty = { ...input, storedChargeAtZero: 0 }
    expect(residualRecovery(empty, fresh())).toEqual({ peakReverseCurrent: 0, charge: 0, timeToPeak: 0 })
    expect(residualRecovery({ ...empty, idleTime: 1e-7 }, fresh())).toEqual({
      peakReverseCurrent: 0,
      charge: 0,
      timeToPeak: 0,
    })
  })

  it('has nothing to recover where the tail lasts as long as the lifetime', () => {
    for (const idleTime of [0, 1e-7]) {
      const out = residualRecovery({ ...input, tailTime: input.lifetime, idleTime }, fresh())
      expect(out).toEqual({ peakReverseCurrent: 0, charge: 0, timeToPeak: 0 })
    }
  })

  it('names the input that has no meaning', () => {
    const refused = (change: Partial<typeof input>) => () => residualRecovery({ ...input, ...change }, fresh())
    expect(refused({ slope: 0 })).toThrow('residualRecovery: slope = 0 has no meaning')
    expect(refused({ slopeOfDecay: 0 })).toThrow('residualRecovery: slopeOfDecay = 0 has no meaning')
    expect(refused({ slopeOfDecay: -1 })).toThrow('residualRecovery: slopeOfDecay = -1 has no meaning')
    expect(refused({ lifetime: 0 })).toThrow('residualRecovery: lifetime = 0 has no meaning')
    expect(refused({ tailTime: 0 })).toThrow('residualRecovery: tailTime = 0 has no meaning')
    expect(refused({ tailTime: 1 })).toThrow('residualRecovery: tailTime = 1 has no meaning')
    expect(refused({ storedChargeAtZero: -1 })).toThrow('residualRecovery: storedChargeAtZero = -1 has no meaning')
  })
})
