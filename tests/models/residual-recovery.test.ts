import { describe, expect, it } from 'vitest'
import { rampRecovery } from '../../src/models/charge-control.ts'
import { residualRecovery } from '../../src/models/residual-recovery.ts'

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

  it('is zero for an empty junction, without a division of nothing by nothing', () => {
    const empty = { ...input, storedChargeAtZero: 0 }
    expect(residualRecovery(empty, fresh())).toEqual({ peakReverseCurrent: 0, charge: 0, timeToPeak: 0 })
    expect(residualRecovery({ ...empty, idleTime: 1e-7 }, fresh())).toEqual({
      peakReverseCurrent: 0,
      charge: 0,
      timeToPeak: 0,
    })
  })

  it('names the input that has no meaning', () => {
    const refused = (change: Partial<typeof input>) => () => residualRecovery({ ...input, ...change }, fresh())
    expect(refused({ slope: 0 })).toThrow('residualRecovery: slope = 0 has no meaning')
    expect(refused({ slopeOfDecay: -1 })).toThrow('residualRecovery: slopeOfDecay = -1 has no meaning')
    expect(refused({ lifetime: 0 })).toThrow('residualRecovery: lifetime = 0 has no meaning')
    expect(refused({ tailTime: 0 })).toThrow('residualRecovery: tailTime = 0 has no meaning')
    expect(refused({ tailTime: 1 })).toThrow('residualRecovery: tailTime = 1 has no meaning')
    expect(refused({ storedChargeAtZero: -1 })).toThrow('residualRecovery: storedChargeAtZero = -1 has no meaning')
  })
})
