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
 * Time in which a bleeder discharges the bulk capacitor.
 * @example bulkDischargeTime({ resistance: 10e3, capacitance: 470e-6, from: 400, to: 60 }) // 8.91636
 */
export function bulkDischargeTime(input: BulkDischargeInput): number {
  if (input.from <= input.to) return 0
  return input.resistance * input.capacitance * Math.log(input.from / input.to)
}

/**
 * Energy in the bulk capacitor.
 * @example bulkEnergy({ capacitance: 470e-6, voltage: 400 }) // 37.6000
 */
export function bulkEnergy(input: { readonly capacitance: number; readonly voltage: number }): number {
  return 0.5 * input.capacitance * input.voltage * input.voltage
}
