/** Inputs of {@link leakageCurrent}. */
export interface LeakageCurrentInput {
  /** ln of the leakage at T0 and V0. [ln A] */
  readonly logarithm: number
  /** Ea/k, activation energy over Boltzmann's constant. [K] */
  readonly activation: number
  /** n, exponent of the voltage. [1] */
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

/**
 * Leakage current at a reverse voltage and a junction temperature.
 *
 * Equation: ln I_R = ln I_R(T0, V0) + (Ea/k)(1/T0 − 1/T) + n ln(V/V0).
 *
 * Valid for: T > 0; 0 at V ≤ 0. Deviations: breakdown and surface leakage are not in it.
 *
 * @returns I_R. [A]
 * @throws Never.
 * @see Arrhenius form of thermionic and generation current, common practice.
 * @example leakageCurrent({ logarithm: Math.log(50e-6), activation: 0.7 / 8.617333e-5, exponent: 1, voltage: 50, ratedVoltage: 100, temperature: 398.15, referenceTemperature: 298.15 }) // 0.0234313
 */
export function leakageCurrent(input: LeakageCurrentInput): number {
  if (!(input.voltage > 0)) return 0
  return Math.exp(
    input.logarithm +
      input.activation * (1 / input.referenceTemperature - 1 / input.temperature) +
      input.exponent * Math.log(input.voltage / input.ratedVoltage),
  )
}

/** Inputs of {@link leakageSlopeTemperature}. */
export interface LeakageSlopeInput {
  /** Ea/k. [K] */
  readonly activation: number
  /** T. [K] */
  readonly temperature: number
}

/**
 * Relative growth of the leakage per kelvin.
 *
 * Equation: c = d ln I_R/dT = Ea/(k T²). Valid for: T > 0. Deviations: none.
 *
 * @returns c. [1/K]
 * @throws Never.
 * @see Derivative of {@link leakageCurrent}.
 * @example leakageSlopeTemperature({ activation: 0.7 / 8.617333e-5, temperature: 398.15 }) // 0.0512427
 */
export function leakageSlopeTemperature(input: LeakageSlopeInput): number {
  return input.activation / (input.temperature * input.temperature)
}

/** Inputs of {@link leakageRunawayLimit}. */
export interface LeakageRunawayLimitInput {
  /** V, reverse voltage. [V] */
  readonly voltage: number
  /** d, share of the period in which the rectifier conducts. [1] */
  readonly conductionShare: number
  /** c, d ln I_R/dT at the operating point. [1/K] */
  readonly coefficient: number
  /** Rth, junction to reference. [K/W] */
  readonly thermalResistance: number
}

/**
 * Largest leakage with a stable junction temperature, where leakage is all that grows with it.
 *
 * Equation: I_R = 1/(V (1 − d) c Rth).
 *
 * Valid for: 0 ≤ d < 1 and positive inputs. Deviations: the source takes c = 0.055/K, here c is the part's at its temperature.
 *
 * @returns Leakage at the edge of runaway. [A]
 * @throws Never.
 * @see STMicroelectronics AN869, 2004.
 * @example leakageRunawayLimit({ voltage: 15, conductionShare: 0.5, coefficient: 0.055, thermalResistance: 10.1 }) // 0.240024
 */
export function leakageRunawayLimit(input: LeakageRunawayLimitInput): number {
  return 1 / (input.voltage * (1 - input.conductionShare) * input.coefficient * input.thermalResistance)
}

/** Inputs of {@link leakageCriticalTemperature}. */
export interface LeakageCriticalInput {
  /** V, reverse voltage. [V] */
  readonly voltage: number
  /** Leakage at the reference temperature. [A] */
  readonly current: number
  /** T0. [K] */
  readonly referenceTemperature: number
  /** n, constant relative growth per kelvin. [1/K] */
  readonly coefficient: number
  /** Rth. [K/W] */
  readonly thermalResistance: number
}

/**
 * Junction temperature at which a leakage that grows by a constant factor per kelvin runs away; used as a check only.
 *
 * Equation: T = T0 + ln(1/(Rth n V I0))/n.
 *
 * Valid for: a blocking rectifier without other loss. Deviations: constant n; {@link leakageCurrent} has n falling as 1/T².
 *
 * @returns Critical junction temperature. [K]
 * @throws Never.
 * @see A note on Schottky runaway, 2008.
 * @example leakageCriticalTemperature({ voltage: 11, current: 1e-4, referenceTemperature: 298.15, coefficient: Math.log(100) / 60, thermalResistance: 25 }) // 378.417
 */
export function leakageCriticalTemperature(input: LeakageCriticalInput): number {
  const { voltage, current, referenceTemperature, coefficient, thermalResistance } = input
  return referenceTemperature - Math.log(thermalResistance * coefficient * voltage * current) / coefficient
}
