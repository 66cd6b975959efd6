import { meaningless } from './meaningless.ts'

/** Inputs of {@link bulkDischargeTime}. */
export interface BulkDischargeInput {
  /** [Ω] */
  readonly resistance: number
  /** [F] */
  readonly capacitance: number
  /** Voltage at the start. [V] */
  readonly from: number
  /** Voltage at the end. [V] */
  readonly to: number
}

/**
 * Time in which a bleeder discharges the bulk capacitor to a voltage.
 *
 * Equation: t = R C ln(V0/V); 0 where V0 ≤ V. Valid for: V > 0 and an unloaded output. Deviations: none.
 *
 * @returns Time. [s]
 * @throws RangeError when the end voltage is not positive: it is never reached.
 * @see Exponential discharge.
 * @example bulkDischargeTime({ resistance: 10e3, capacitance: 470e-6, from: 400, to: 60 }) // 8.91646
 */
export function bulkDischargeTime(input: BulkDischargeInput): number {
  if (!(input.to > 0)) throw meaningless('bulkDischargeTime', 'to', input.to)
  if (input.from <= input.to) return 0
  return input.resistance * input.capacitance * Math.log(input.from / input.to)
}

/**
 * Energy in the bulk capacitor.
 *
 * Equation: C V²/2. Valid for: constant capacitance. Deviations: none.
 *
 * @returns Energy. [J]
 * @throws Never.
 * @see Energy of a capacitor.
 * @example bulkEnergy({ capacitance: 470e-6, voltage: 400 }) // 37.6000
 */
export function bulkEnergy(input: {
  /** [F] */
  readonly capacitance: number
  /** [V] */
  readonly voltage: number
}): number {
  return 0.5 * input.capacitance * input.voltage * input.voltage
}
