import { describe, expect, it } from 'vitest'
import { calibrated } from './calibrated.ts'
import { stepRow } from './records.ts'

describe('a step row', () => {
  // PHYSICS section 1: tau 150 ns, tau_rr 20 ns, 0.5 A, 1 A: ts 39.3546 ns, trr to 0.25 A 67.0805 ns
  const both = stepRow({ storageTime: 39.3546e-9, recoveryTime: 67.0805e-9, spread: 1e-5 })

  it('with storage and recovery time is centred at 1.7 times the lumped lifetime, and tells the ratio', () => {
    const wide = calibrated(both)
    expect(wide.rectifier.softnessKnown).toBe(true)
    const { lifetimeDeviation, ratioDeviation } = wide.at(0.5, 1e8, 25)
    // class 0.45 and ln(I/I0) against 0.6; class 0.5 against 0.4 and the unknown voltage
    expect(lifetimeDeviation).toBeLessThan(0.46)
    expect(ratioDeviation).toBeLessThan(0.4)
  })

  it('with recovery time alone says nothing about the ratio', () => {
    const part = calibrated(stepRow({ recoveryTime: 28e-9 }))
    expect(part.rectifier.recovery!.posterior.mean[4]).toBe(1)
    expect(part.rectifier.softnessKnown).toBe(false)
  })

  it('moves u by its share of the way to 1.7 times the lumped lifetime at the y of the class', () => {
    const part = calibrated(stepRow({ recoveryTime: 28e-9 }))
    // trr/tau at y = 1: ln((1 + IF/IR)/(1 + TM/tau)) + (tau_rr/tau) ln(IR/Ix), 0.5 A, 1 A, 0.25 A
    const factor = Math.log(1.5 / (1 + Math.exp(-1))) + Math.log(4) / (1 + Math.E)
    const lnCurrent = Math.log(0.5 / 8)
    const variance = 0.45 ** 2 + (0.15 * lnCurrent) ** 2
    const share = 0.45 ** 2 / (variance + 0.6 ** 2 + 0.05 ** 2)
    const expected = Math.log(35e-9) + share * Math.log((1.7 * 28e-9) / factor / 35e-9)
    expect(part.rectifier.recovery!.posterior.mean[0]).toBeCloseTo(expected, 10)
  })

  it('whose storage time is longer than its recovery time says so and keeps the recovery time', () => {
    const part = calibrated(stepRow({ storageTime: 70e-9, recoveryTime: 60e-9 }))
    expect(part.dataOf('row-impossible')).toEqual({ row: 'recovery row 1', found: 'storage 70 ns', bound: 'trr 60 ns' })
    expect(part.rectifier.recovery).toEqual(calibrated(stepRow({ recoveryTime: 60e-9 })).rectifier.recovery)
  })

  it('far from its class by no more than the fixture itself may err is not called implausible', () => {
    // 4 times the class's lifetime: 1.4 against sqrt(0.45² + 0.6²) and more
    expect(calibrated(stepRow({ recoveryTime: 60e-9 })).codes).not.toContain('implausible-for-class')
    expect(calibrated(stepRow({ recoveryTime: 600e-9 })).codes).toContain('implausible-for-class')
  })

  it('from which nothing can be read is told and leaves the class as it is', () => {
    const part = calibrated(stepRow({ recoveryTime: 28e-9, until: 2 }))
    expect(part.codes).toContain('row-impossible')
    expect(part.codes).toContain('recovery-guess')
    expect(part.rectifier.recovery!.origin).toBe('class-guess')
  })
})
