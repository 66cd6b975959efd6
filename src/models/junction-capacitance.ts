import type { JunctionCapacitance } from '../domain/calibrated-rectifier.ts'

/** Inputs of the capacitance functions. */
export interface JunctionCapacitanceInput {
  readonly capacitance: JunctionCapacitance
  /** Reverse voltage. [V] */
  readonly voltage: number
}

/** Built-in voltage and grading assumed where one charge is all that is known. */
const assumedBuiltIn = 0.8
const assumedGrading = 0.5

/** Capacitance at a reverse voltage. [F] */
export function capacitanceAt(input: JunctionCapacitanceInput): number {
  const { zeroBias, builtIn, grading } = capacitanceLaw(input.capacitance, 1)
  return input.voltage > 0 ? zeroBias * (1 + input.voltage / builtIn) ** -grading : zeroBias
}

/** The law C0/(1 + v/Vj)^m. */
export type CapacitanceLaw = Extract<JunctionCapacitance, { kind: 'law' }>

/** The capacitance of equal parts in parallel as a law; one charge becomes the m 0.5, Vj 0.8 V law through it. */
export function capacitanceLaw(capacitance: JunctionCapacitance, parts: number): CapacitanceLaw {
  if (capacitance.kind === 'law') return { ...capacitance, zeroBias: capacitance.zeroBias * parts }
  const perZeroBias = assumedBuiltIn * powerIntegral(capacitance.voltage / assumedBuiltIn, 1 - assumedGrading)
  const zeroBias = (parts * capacitance.charge) / perZeroBias
  return { kind: 'law', zeroBias, builtIn: assumedBuiltIn, grading: assumedGrading }
}

/** Charge moved from 0 to the voltage. [C] */
export function capacitiveCharge(input: JunctionCapacitanceInput): number {
  const { capacitance, voltage } = input
  if (capacitance.kind === 'charge') return capacitance.charge * Math.sqrt(voltage / capacitance.voltage)
  const { zeroBias, builtIn, grading } = capacitance
  return zeroBias * builtIn * powerIntegral(voltage / builtIn, 1 - grading)
}

/** Energy stored in the junction at the voltage. [J] */
export function capacitiveEnergy(input: JunctionCapacitanceInput): number {
  const { capacitance, voltage } = input
  if (capacitance.kind === 'charge') return (capacitiveCharge(input) * voltage) / 3
  const { zeroBias, builtIn, grading } = capacitance
  const x = voltage / builtIn
  if (x < 1e-4) return 0.5 * zeroBias * voltage * voltage * (1 - (2 * grading * x) / 3)
  return zeroBias * builtIn * builtIn * (powerIntegral(x, 2 - grading) - powerIntegral(x, 1 - grading))
}

/** Energy the switch loses when it charges the rectifier's junction. [J] */
export function chargingCost(input: JunctionCapacitanceInput): number {
  return input.voltage * capacitiveCharge(input) - capacitiveEnergy(input)
}

/** ((1 + x)^p − 1)/p, its limit ln(1 + x) at p = 0. */
function powerIntegral(x: number, p: number): number {
  const logarithm = Math.log1p(x)
  return Math.abs(p) < 1e-12 ? logarithm : Math.expm1(p * logarithm) / p
}
