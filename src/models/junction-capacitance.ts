import type { JunctionCapacitance } from '../domain/calibrated-rectifier.ts'
import { meaningless } from './meaningless.ts'

/** The law C0/(1 + v/Vj)^m. */
export type CapacitanceLaw = Extract<JunctionCapacitance, { kind: 'law' }>

/** Inputs of the capacitance functions. */
export interface JunctionCapacitanceInput {
  /** The law C0 [F], Vj [V], m [1]; or one charge [C] at a voltage [V]. */
  readonly capacitance: JunctionCapacitance
  /** Reverse voltage, not negative. [V] */
  readonly voltage: number
}

/** Vj and m of an abrupt silicon junction, assumed where one charge is all that is known. */
const assumedBuiltIn = 0.8
const assumedGrading = 0.5

/**
 * Capacitance of equal parts in parallel as a law; one charge becomes the m 0.5, Vj 0.8 V law through that charge.
 *
 * Equation: C0 = Q/(2 Vj (sqrt(1 + Vq/Vj) − 1)) for one charge. Valid for: parts > 0, Vq > 0. Deviations: none.
 *
 * @returns C0 [F], Vj [V], m [1].
 * @throws Never.
 * @see Abrupt-junction law, common practice.
 * @example capacitanceLaw({ kind: 'charge', charge: 20e-9, voltage: 400 }, 1).zeroBias // 5.84576e-10
 */
export function capacitanceLaw(capacitance: JunctionCapacitance, parts: number): CapacitanceLaw {
  if (capacitance.kind === 'law') return { ...capacitance, zeroBias: capacitance.zeroBias * parts }
  const perZeroBias = assumedBuiltIn * powerIntegral(capacitance.voltage / assumedBuiltIn, 1 - assumedGrading)
  const zeroBias = (parts * capacitance.charge) / perZeroBias
  return { kind: 'law', zeroBias, builtIn: assumedBuiltIn, grading: assumedGrading }
}

/**
 * Junction capacitance at a reverse voltage.
 *
 * Equation: C(v) = C0/(1 + v/Vj)^m; one charge through {@link capacitanceLaw}.
 *
 * Valid for: v ≥ 0 (below zero: C0). Deviations: none.
 *
 * @returns C. [F]
 * @throws Never.
 * @see Depletion-layer law, common practice.
 * @example capacitanceAt({ capacitance: { kind: 'law', zeroBias: 400e-12, builtIn: 1.2, grading: 0.46 }, voltage: 400 }) // 2.76018e-11
 */
export function capacitanceAt(input: JunctionCapacitanceInput): number {
  const { zeroBias, builtIn, grading } = capacitanceLaw(input.capacitance, 1)
  return input.voltage > 0 ? zeroBias * (1 + input.voltage / builtIn) ** -grading : zeroBias
}

/**
 * Charge moved between 0 and the voltage.
 *
 * Equation: Qc = C0 Vj/(1 − m) ((1 + V/Vj)^(1−m) − 1); one charge: Qc = Q (V/Vq)^0.5.
 *
 * Valid for: V ≥ 0, any m (m = 1 by its logarithm). Deviations: none.
 *
 * @returns Qc. [C]
 * @throws RangeError when voltage is negative.
 * @see Integral of the depletion-layer law; checked against quadrature.
 * @example capacitiveCharge({ capacitance: { kind: 'law', zeroBias: 400e-12, builtIn: 1.2, grading: 0.46 }, voltage: 400 }) // 1.96182e-8
 */
export function capacitiveCharge(input: JunctionCapacitanceInput): number {
  const { capacitance, voltage } = input
  if (!(voltage >= 0)) throw meaningless('capacitiveCharge', 'voltage', voltage)
  if (capacitance.kind === 'charge') return capacitance.charge * Math.sqrt(voltage / capacitance.voltage)
  const { zeroBias, builtIn, grading } = capacitance
  return zeroBias * builtIn * powerIntegral(voltage / builtIn, 1 - grading)
}

/**
 * Energy stored in the junction at the voltage.
 *
 * Equation: Ec = ∫ v C(v) dv = C0 Vj² [((1+V/Vj)^(2−m) − 1)/(2−m) − ((1+V/Vj)^(1−m) − 1)/(1−m)]; one charge: Ec = Qc V/3.
 *
 * Valid for: V ≥ 0, any m. Deviations: below 1e-4 Vj its series, where the difference loses its digits.
 *
 * @returns Ec. [J]
 * @throws RangeError when voltage is negative.
 * @see Integral of the depletion-layer law; checked against quadrature.
 * @example capacitiveEnergy({ capacitance: { kind: 'law', zeroBias: 400e-12, builtIn: 1.2, grading: 0.46 }, voltage: 400 }) // 2.86104e-6
 */
export function capacitiveEnergy(input: JunctionCapacitanceInput): number {
  const { capacitance, voltage } = input
  if (!(voltage >= 0)) throw meaningless('capacitiveEnergy', 'voltage', voltage)
  if (capacitance.kind === 'charge') return (capacitiveCharge(input) * voltage) / 3
  const { zeroBias, builtIn, grading } = capacitance
  const x = voltage / builtIn
  if (x < 1e-4) return 0.5 * zeroBias * voltage * voltage * (1 - (2 * grading * x) / 3)
  return zeroBias * builtIn * builtIn * (powerIntegral(x, 2 - grading) - powerIntegral(x, 1 - grading))
}

/**
 * Energy the switch loses when it charges the rectifier's junction from a constant voltage, once per turn-on.
 *
 * Equation: V Qc − Ec. Valid for: V ≥ 0; independent of current, slope and temperature. Deviations: none.
 *
 * @returns Loss in the switch. [J]
 * @throws RangeError when voltage is negative.
 * @see Energy balance of a capacitor charged from a constant voltage.
 * @example chargingCost({ capacitance: { kind: 'law', zeroBias: 400e-12, builtIn: 1.2, grading: 0.46 }, voltage: 400 }) // 4.98625e-6
 */
export function chargingCost(input: JunctionCapacitanceInput): number {
  return input.voltage * capacitiveCharge(input) - capacitiveEnergy(input)
}

/** ((1 + x)^p − 1)/p, its limit ln(1 + x) at p = 0. */
function powerIntegral(x: number, p: number): number {
  const logarithm = Math.log1p(x)
  return Math.abs(p) < 1e-12 ? logarithm : Math.expm1(p * logarithm) / p
}
