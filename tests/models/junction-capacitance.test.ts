import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { JunctionCapacitance } from '../../src/domain/calibrated-rectifier.ts'
import {
  capacitanceAt,
  capacitanceLaw,
  capacitiveCharge,
  capacitiveEnergy,
  chargingCost,
} from '../../src/models/junction-capacitance.ts'
import { gaussLegendre, integrate } from '../../src/numerics/gauss-legendre.ts'
import { evenly, spread } from './random-inputs.ts'

const rule = gaussLegendre(24)
const laws = fc.record({
  kind: fc.constant('law' as const),
  zeroBias: spread(1e-12, 1e-8),
  builtIn: evenly(0.3, 2),
  grading: evenly(0, 1),
})
const voltages = spread(0.01, 1500)

/** ∫ f dv with v = Vj (exp(s) − 1), in which the law is smooth. */
function overVoltage(f: (v: number) => number, { builtIn }: { builtIn: number }, voltage: number): number {
  const g = (s: number) => f(builtIn * Math.expm1(s)) * builtIn * Math.exp(s)
  return integrate({ f: g, low: 0, high: Math.log1p(voltage / builtIn), rule })
}

describe('junction capacitance', () => {
  it('has the charge and the energy that quadrature of C(v) gives', () => {
    fc.assert(
      fc.property(laws, voltages, (capacitance, voltage) => {
        const c = (v: number) => capacitanceAt({ capacitance, voltage: v })
        const charge = overVoltage(c, capacitance, voltage)
        const energy = overVoltage((v) => v * c(v), capacitance, voltage)
        // below Vj the energy is a difference of nearly equal terms: that many digits go
        const lost = Math.max(1, capacitance.builtIn / voltage) ** 2
        expect(Math.abs(capacitiveCharge({ capacitance, voltage }) / charge - 1)).toBeLessThan(1e-11)
        expect(Math.abs(capacitiveEnergy({ capacitance, voltage }) / energy - 1)).toBeLessThan(1e-11 + 1e-15 * lost)
      }),
    )
  })

  it('loses V Qc − Ec in the switch, at least half of V Qc and never all of it', () => {
    fc.assert(
      fc.property(laws, voltages, (capacitance, voltage) => {
        const all = voltage * capacitiveCharge({ capacitance, voltage })
        const lost = chargingCost({ capacitance, voltage })
        expect(lost).toBeGreaterThanOrEqual(0.5 * all * (1 - 1e-9))
        expect(lost).toBeLessThan(all)
      }),
    )
  })

  it('keeps the small-voltage series and the closed form together where they meet', () => {
    const capacitance = { kind: 'law', zeroBias: 1e-9, builtIn: 1, grading: 0.46 } as const
    const below = capacitiveEnergy({ capacitance, voltage: 0.99999e-4 })
    const above = capacitiveEnergy({ capacitance, voltage: 1.00001e-4 })
    expect(above / below).toBeCloseTo((1.00001 / 0.99999) ** 2, 6)
    expect(capacitiveEnergy({ capacitance, voltage: 0 })).toBe(0)
    // half of C0 V² is all there is far below Vj
    for (const voltage of [1e-9, 3e-11, 7e-13]) {
      expect(Math.abs(capacitiveEnergy({ capacitance, voltage }) / (0.5e-9 * voltage * voltage) - 1)).toBeLessThan(1e-9)
    }
  })

  it('scales one charge by the square root of the voltage, its energy being a third of V Qc', () => {
    const capacitance: JunctionCapacitance = { kind: 'charge', charge: 20e-9, voltage: 400 }
    expect(capacitiveCharge({ capacitance, voltage: 400 })).toBeCloseTo(20e-9, 20)
    expect(capacitiveCharge({ capacitance, voltage: 100 })).toBeCloseTo(10e-9, 20)
    expect(capacitiveEnergy({ capacitance, voltage: 100 })).toBeCloseTo((10e-9 * 100) / 3, 18)
    expect(chargingCost({ capacitance, voltage: 100 })).toBeCloseTo((2 * 10e-9 * 100) / 3, 18)
  })

  it('turns one charge into the law m 0.5, Vj 0.8 V that holds that charge', () => {
    const capacitance = capacitanceLaw({ kind: 'charge', charge: 20e-9, voltage: 400 }, 3)
    expect(capacitance).toMatchObject({ kind: 'law', builtIn: 0.8, grading: 0.5 })
    expect(capacitiveCharge({ capacitance, voltage: 400 })).toBeCloseTo(60e-9, 18)
    expect(capacitanceAt({ capacitance: { kind: 'charge', charge: 20e-9, voltage: 400 }, voltage: 0 })).toBeCloseTo(
      capacitance.zeroBias / 3,
      20,
    )
  })

  it('multiplies the capacitance of parallel parts and nothing else', () => {
    const law: JunctionCapacitance = { kind: 'law', zeroBias: 4e-10, builtIn: 1.2, grading: 0.46 }
    expect(capacitanceLaw(law, 2)).toEqual({ ...law, zeroBias: 8e-10 })
  })

  it('is C0 below zero volts, and refuses a charge there', () => {
    const capacitance: JunctionCapacitance = { kind: 'law', zeroBias: 4e-10, builtIn: 1.2, grading: 0.46 }
    expect(capacitanceAt({ capacitance, voltage: -0.5 })).toBe(4e-10)
    expect(() => capacitiveCharge({ capacitance, voltage: -1 })).toThrow(
      'capacitiveCharge: voltage = -1 has no meaning',
    )
    expect(() => capacitiveEnergy({ capacitance, voltage: -1 })).toThrow(
      'capacitiveEnergy: voltage = -1 has no meaning',
    )
  })
})
