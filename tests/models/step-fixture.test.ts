import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { diffusionLifetime, diffusionStorageTime } from '../../src/models/diffusion-storage.ts'
import {
  lifetimeFromStep,
  simplestLifetime,
  simplestStorageTime,
  stepRecoveryTime,
  stepStorageTime,
} from '../../src/models/step-fixture.ts'
import { evenly, spread } from './random-inputs.ts'
import { solveOde, solveToEvent } from './solve-ode.ts'

const fixture = fc.record({
  lifetime: spread(5e-9, 10e-6),
  ratio: spread(0.01, 0.6),
  forwardCurrent: spread(1e-3, 10),
  /** I_R/I_F. */
  hard: spread(0.2, 5),
})

describe('step fixture', () => {
  it('agrees with an ODE solver, with and without a plateau', () => {
    const cases = fc.sample(fixture, { numRuns: 60, seed: 20266 })
    let without = 0
    for (const { lifetime, ratio, forwardCurrent, hard } of cases) {
      const input = {
        lifetime,
        tailTime: ratio * lifetime,
        forwardCurrent,
        reverseCurrent: hard * forwardCurrent,
        until: 0.1 * hard * forwardCurrent,
      }
      // tau = 1, I_F = 1: q starts at 1, the fixture takes I_R until q = TM I_R, then q decays with tau_rr
      const transit = ratio / (1 - ratio)
      const drained = (_t: number, [q]: number[]) => [-hard - q!]
      const plateau = transit * hard < 1
      const start = plateau
        ? solveToEvent(drained, { x: 0, y: [1], xMost: 5 }, (_t, [q]) => q! - transit * hard)
        : { x: 0, y: [1] }
      if (!plateau) without++
      const decay = (_t: number, [q]: number[]) => [-q! / transit - q!]
      const level = 0.1 * hard
      const end =
        start.y[0]! / transit > level
          ? solveToEvent(decay, { x: 0, y: start.y, xMost: 10 * ratio }, (_t, [q]) => q! / transit - level).x
          : 0
      expect(stepStorageTime(input) / lifetime).toBeCloseTo(plateau ? start.x : 0, 8)
      expect(stepRecoveryTime(input) / lifetime).toBeCloseTo(start.x + end, 8)
    }
    expect(without).toBeGreaterThan(3)
    expect(solveOde(() => [0], 0, [1], 0)).toEqual([1])
  })

  it('is turned round by its inverse wherever there is a plateau', () => {
    fc.assert(
      fc.property(fixture, evenly(0.02, 0.95), ({ lifetime, ratio, forwardCurrent, hard }, level) => {
        const reverseCurrent = hard * forwardCurrent
        const input = {
          lifetime,
          tailTime: ratio * lifetime,
          forwardCurrent,
          reverseCurrent,
          until: level * reverseCurrent,
        }
        const storageTime = stepStorageTime(input)
        fc.pre(storageTime > 1e-3 * lifetime)
        const found = lifetimeFromStep({ ...input, storageTime, recoveryTime: stepRecoveryTime(input) })
        expect(found!.lifetime / lifetime).toBeCloseTo(1, 8)
        expect(found!.tailTime / input.tailTime).toBeCloseTo(1, 8)
      }),
      { endOnFailure: true },
    )
  })

  it('is turned round where the plateau is short and the currents are small', () => {
    // (1 + 1/5)(1 − 0.15) is 1.02: the plateau lasts a fiftieth of the lifetime
    const input = { lifetime: 1e-6, tailTime: 0.15e-6, forwardCurrent: 1e-3, reverseCurrent: 5e-3, until: 1e-3 }
    const storageTime = 1e-6 * Math.log(1.02)
    expect(stepStorageTime(input)).toBeCloseTo(storageTime, 18)
    const found = lifetimeFromStep({ ...input, storageTime, recoveryTime: storageTime + 0.15e-6 * Math.log(5) })
    expect(found!.lifetime / 1e-6).toBeCloseTo(1, 9)
  })

  it('finds no pair without a plateau, before it or at a level it never falls to', () => {
    const row = { storageTime: 40e-9, recoveryTime: 70e-9, forwardCurrent: 0.5, reverseCurrent: 1, until: 0.25 }
    expect(lifetimeFromStep(row)).not.toBeNull()
    expect(lifetimeFromStep({ ...row, storageTime: 0 })).toBeNull()
    expect(lifetimeFromStep({ ...row, forwardCurrent: 0 })).toBeNull()
    expect(lifetimeFromStep({ ...row, recoveryTime: 40e-9 })).toBeNull()
    expect(lifetimeFromStep({ ...row, until: 1.5 })).toBeNull()
    expect(lifetimeFromStep({ ...row, until: 1.5, recoveryTime: 30e-9 })).toBeNull()
  })

  it('has no plateau when the fixture asks for more than the diode can give, and starts at that', () => {
    const input = { lifetime: 100e-9, tailTime: 50e-9, forwardCurrent: 1, reverseCurrent: 4, until: 0.5 }
    expect(stepStorageTime(input)).toBe(0)
    // tau I_F/TM = 1 A
    expect(stepRecoveryTime(input)).toBeCloseTo(50e-9 * Math.LN2, 20)
    expect(stepRecoveryTime({ ...input, until: 2 })).toBe(0)
  })
})

describe('published storage times', () => {
  it('are turned round by their inverses', () => {
    const currents = { forwardCurrent: 0.3, reverseCurrent: 0.7 }
    const simple = simplestStorageTime({ ...currents, lifetime: 2e-7 })
    expect(simplestLifetime({ ...currents, storageTime: simple })).toBeCloseTo(2e-7, 20)
    const diffused = diffusionStorageTime({ ...currents, lifetime: 2e-7 })
    expect(diffusionLifetime({ ...currents, storageTime: diffused })).toBeCloseTo(2e-7, 20)
  })

  it('agree with the step fixture when the tail is short', () => {
    const input = { lifetime: 1e-7, forwardCurrent: 0.5, reverseCurrent: 1 }
    expect(stepStorageTime({ ...input, tailTime: 1e-13 })).toBeCloseTo(simplestStorageTime(input), 12)
  })

  it('grow with the forward and fall with the reverse current, the diffusion form the shorter', () => {
    const input = { lifetime: 1e-6, forwardCurrent: 1, reverseCurrent: 1 }
    for (const storage of [simplestStorageTime, diffusionStorageTime]) {
      expect(storage({ ...input, forwardCurrent: 2 })).toBeGreaterThan(storage(input))
      expect(storage({ ...input, reverseCurrent: 2 })).toBeLessThan(storage(input))
    }
    expect(diffusionStorageTime(input)).toBeLessThan(simplestStorageTime(input))
    expect(diffusionStorageTime({ ...input, forwardCurrent: 1e3, reverseCurrent: 1e-3 })).toBeGreaterThan(8e-6)
    // a current that goes on forwards never empties the diode
    expect(diffusionStorageTime({ ...input, reverseCurrent: -0.5 })).toBe(Number.POSITIVE_INFINITY)
  })
})
