/** Inputs of {@link leakageCurrent}. */
export interface LeakageCurrentInput {
  /** ln of the leakage at T0 and V0. [ln A] */
  readonly logarithm: number
  /** Activation energy over Boltzmann's constant. [K] */
  readonly activation: number
  /** Exponent of the voltage. [1] */
  readonly exponent: number
  /** Reverse voltage. [V] */
  readonly voltage: number
  /** V0. [V] */
  readonly ratedVoltage: number
  /** Junction temperature. [K] */
  readonly temperature: number
  /** T0. [K] */
  readonly referenceTemperature: number
}

/** Leakage current at a voltage and a temperature. */
export function leakageCurrent(input: LeakageCurrentInput): number {
  if (!(input.voltage > 0)) return 0
  return Math.exp(
    input.logarithm +
      input.activation * (1 / input.referenceTemperature - 1 / input.temperature) +
      input.exponent * Math.log(input.voltage / input.ratedVoltage),
  )
}

/** Relative growth of the leakage per kelvin, d ln I_R/dT. [1/K] */
export function leakageSlopeTemperature(input: { readonly activation: number; readonly temperature: number }): number {
  return input.activation / (input.temperature * input.temperature)
}

/** Inputs of {@link leakageRunawayLimit}. */
export interface LeakageRunawayLimitInput {
  /** [V] */
  readonly voltage: number
  /** Share of the period in which the rectifier conducts. [1] */
  readonly conductionShare: number
  /** d ln I_R/dT. [1/K] */
  readonly coefficient: number
  /** [K/W] */
  readonly thermalResistance: number
}

/**
 * Largest leakage with a stable junction temperature.
 * @example leakageRunawayLimit({ voltage: 15, conductionShare: 0.5, coefficient: 0.055, thermalResistance: 10.1 }) // 0.240024
 */
export function leakageRunawayLimit(input: LeakageRunawayLimitInput): number {
  return 1 / (input.voltage * (1 - input.conductionShare) * input.coefficient * input.thermalResistance)
}
