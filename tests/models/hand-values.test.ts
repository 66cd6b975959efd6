import { describe, expect, it } from 'vitest'
import { bulkDischargeTime, bulkEnergy } from '../../src/models/bulk-discharge.ts'
import { chargeAtTurnOff, recoveryTimeFactor, timeToPeak } from '../../src/models/charge-control.ts'
import { baseEnergy, rectifierEnergy, switchAddedEnergy, tailShare } from '../../src/models/commutation-energy.ts'
import { conventionEnergies } from '../../src/models/energy-conventions.ts'
import { forwardDropUsable } from '../../src/models/forward-drop.ts'
import { gateDrivenSlope } from '../../src/models/gate-slope.ts'
import { capacitiveCharge, capacitiveEnergy, chargingCost } from '../../src/models/junction-capacitance.ts'
import { leakageCurrent, leakageRunawayLimit } from '../../src/models/leakage-current.ts'
import { triangleFromTime } from '../../src/models/triangle.ts'

/** Agreement with a number that was worked out by hand, to rounding. */
function expectRounded(actual: number, byHand: number): void {
  expect(Math.abs(actual - byHand), `${actual} instead of ${byHand}`).toBeLessThanOrEqual(1e-12 * Math.abs(byHand))
}

describe('the bulk capacitor by hand', () => {
  it('of 470 µF holds 37.6 J at 400 V, and falls by a factor e in 4.7 s over 10 kΩ', () => {
    expectRounded(bulkEnergy({ capacitance: 470e-6, voltage: 400 }), 37.6)
    const input = { resistance: 10e3, capacitance: 470e-6, from: 400, to: 400 / Math.E }
    expectRounded(bulkDischargeTime(input), 4.7)
    expectRounded(bulkDischargeTime({ ...input, to: 400 / Math.E ** 2 }), 9.4)
  })
})

describe('the energies of one turn-on by hand', () => {
  it('take 64 µJ for the rise of 8 A in 40 ns at 400 V and 24 µJ for a fall of the voltage in 15 ns', () => {
    expectRounded(baseEnergy({ voltage: 400, current: 8, slope: 200e6, voltageFall: 15e-9 }), 88e-6)
  })

  it('share 400 V × 5 A × 20 ns of tail: a fall of one tail time leaves the rectifier 1 − 1/e of it', () => {
    const share = tailShare({ voltageFall: 20e-9, tailTime: 20e-9 })
    expectRounded(share, 1 - 1 / Math.E)
    const event = { voltage: 400, current: 8, peakReverseCurrent: 5, timeToPeak: 25e-9, tailTime: 20e-9 }
    expectRounded(rectifierEnergy({ ...event, tailShare: share }), 40e-6 * (1 - 1 / Math.E))
    // 400 V × 25 ns × (8 A + 2.5 A) before the peak
    expectRounded(switchAddedEnergy({ ...event, tailShare: share }), 105e-6 + 40e-6 / Math.E)
  })

  it('leave the rectifier the whole tail at a step of the voltage, and nothing of a tail without duration', () => {
    expect(tailShare({ voltageFall: 0, tailTime: 20e-9 })).toBe(1)
    expect(tailShare({ voltageFall: 0, tailTime: 0 })).toBe(1)
    expect(tailShare({ voltageFall: 15e-9, tailTime: 0 })).toBe(0)
  })

  it('are called six things by six conventions', () => {
    const event = { voltage: 400, current: 6, peakReverseCurrent: 8, timeToPeak: 40e-9, recoveryTime: 60e-9 }
    const claims = conventionEnergies({ ...event, charge: 240e-9 })
    // V Qrr is 96 µJ, V I_RM tb is 64 µJ, V I trr is 144 µJ
    expect(claims.map(({ name, heats, energy }) => `${name}: ${(energy * 1e6).toFixed(6)} µJ, ${heats}`)).toEqual([
      'V (Qrr + I trr): 240.000000 µJ, both',
      'V Qrr: 96.000000 µJ, both',
      'V Qrr/2: 48.000000 µJ, rectifier',
      'V I_RM tb/2: 32.000000 µJ, rectifier',
      'V Qrr/4: 24.000000 µJ, rectifier',
      'V I_RM tb/6: 10.666667 µJ, rectifier',
    ])
  })
})

describe('the recovery event by hand', () => {
  it('ends at the level or line that its definition names', () => {
    const factor = (kind: 'level-10' | 'level-25' | 'line-90-25' | 'unknown') =>
      recoveryTimeFactor({ definition: { kind }, peakReverseCurrent: 3 })
    expectRounded(factor('level-10'), Math.log(10))
    expectRounded(factor('level-25'), Math.log(4))
    expect(factor('unknown')).toBe(factor('line-90-25'))
  })

  it('without a tail peaks at the lifetime less what the ramp leaves of it', () => {
    // from a steady 8 A down a ramp of 100 A/µs, tau 80 ns: x = 1 − exp(−1 − x), found by hand to 0.8414057
    const event = { current: 8, slope: 100e6, lifetime: 80e-9, tailTime: 0, storedCharge: 640e-9 }
    const x = timeToPeak(event) / 80e-9
    expectRounded(x, 1 - Math.exp(-1 - x))
    expect(x).toBeCloseTo(0.8414057, 6)
  })

  it('starts with the charge of a steady current after many lifetimes, less the slope over one lifetime', () => {
    // q0 = tau (I + m tau) with m = 8 A/40 µs
    const input = { peakCurrent: 16, current: 8, conductionTime: 40e-6, lifetime: 0.5e-6 }
    expectRounded(chargeAtTurnOff(input), 0.5e-6 * (8 + 0.1))
  })

  it('is a right-angled triangle where it snaps off at its peak', () => {
    expect(triangleFromTime({ recoveryTime: 50e-9, slope: 200e6, softness: 0 })).toEqual({
      timeToPeak: 50e-9,
      tailDuration: 0,
      recoveryTime: 50e-9,
      peakReverseCurrent: 10,
      charge: 250e-9,
    })
  })
})

describe('the junction capacitance by hand', () => {
  const law = (grading: number) => ({ kind: 'law', zeroBias: 1e-9, builtIn: 2, grading }) as const

  it('holds C V and half of C V² where it is constant', () => {
    expectRounded(capacitiveCharge({ capacitance: law(0), voltage: 30 }), 30e-9)
    expectRounded(capacitiveEnergy({ capacitance: law(0), voltage: 30 }), 450e-9)
    expectRounded(chargingCost({ capacitance: law(0), voltage: 30 }), 450e-9)
  })

  it('has the logarithm in its charge at m = 1 and in its energy at m = 2', () => {
    // V = (e − 1) Vj, so that 1 + V/Vj is e
    const voltage = 2 * (Math.E - 1)
    expectRounded(capacitiveCharge({ capacitance: law(1), voltage }), 2e-9)
    expectRounded(capacitiveEnergy({ capacitance: law(1), voltage }), 4e-9 * (Math.E - 2))
    expectRounded(capacitiveCharge({ capacitance: law(2), voltage }), 2e-9 * (1 - 1 / Math.E))
    expectRounded(capacitiveEnergy({ capacitance: law(2), voltage }), 4e-9 / Math.E)
  })

  it('holds half of C0 V² less a share of 2 m V/(3 Vj) at small voltages', () => {
    // m 0.5, V = 0.00005 Vj: 1 − 1.6667e-5; the next term is below 1e-9
    const energy = capacitiveEnergy({ capacitance: law(0.5), voltage: 1e-4 })
    expect(Math.abs(energy / (0.5e-9 * 1e-8) - (1 - 5e-5 / 3))).toBeLessThan(2e-9)
    expect(capacitiveCharge({ capacitance: law(0.5), voltage: 0 })).toBe(0)
  })
})

describe('operation by hand', () => {
  it('turns on at gm 8 V/(20 ns + 100 ns) with 10 Ω × 2 nF and 20 A/V × 5 nH in the way', () => {
    const gate = { drive: 12, resistance: 10, inputCapacitance: 2e-9, transconductance: 20 }
    expectRounded(
      gateDrivenSlope({ ...gate, threshold: 3, plateau: 5, sourceInductance: 5e-9, current: 8 }),
      160 / 120e-9,
    )
  })

  it('leaks e² times as much where the activation over both temperatures differs by 2, e³ with the voltage', () => {
    const leakage = { activation: 2400, temperature: 400, referenceTemperature: 300, exponent: 1, ratedVoltage: 50 }
    expectRounded(leakageCurrent({ ...leakage, logarithm: Math.log(1e-6), voltage: 50 }), 1e-6 * Math.E ** 2)
    expectRounded(leakageCurrent({ ...leakage, logarithm: Math.log(1e-6), voltage: 50 * Math.E }), 1e-6 * Math.E ** 3)
  })

  it('runs away from 0.25 A where 20 V block half the time over 10 K/W and leakage grows by 4 % per kelvin', () => {
    const thermal = { voltage: 20, conductionShare: 0.5, coefficient: 0.04, thermalResistance: 10 }
    expectRounded(leakageRunawayLimit(thermal), 0.25)
  })

  it('can use a drop that neither rises nor falls', () => {
    const flat = { constant: 0.7, logarithmic: 0, linear: 0, ratedCurrent: 8, valley: 1, peak: 8 }
    expect(forwardDropUsable({ ...flat, line: true })).toBe(true)
    expect(forwardDropUsable({ ...flat, line: false })).toBe(true)
    expect(forwardDropUsable({ ...flat, line: true, constant: 0 })).toBe(false)
    expect(forwardDropUsable({ ...flat, line: true, peak: 1 })).toBe(true)
    expect(forwardDropUsable({ ...flat, line: true, constant: -0.1, peak: 1 })).toBe(false)
  })
})
