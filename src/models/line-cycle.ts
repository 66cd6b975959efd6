/** Inputs of {@link mainsBoostRectifierRms}. */
export interface MainsBoostInput {
  /** Output power. [W] */
  readonly power: number
  /** Root-mean-square mains voltage. [V] */
  readonly mainsVoltage: number
  /** [V] */
  readonly outputVoltage: number
}

/**
 * Mean rectifier current of a drop-free mains boost with power factor 1; a check on the line-cycle integration.
 *
 * Equation: P/Vo. Valid for: continuous conduction, Vo above the mains peak. Deviations: none.
 *
 * @returns Mean over the line cycle. [A]
 * @throws Never.
 * @see R. W. Erickson & D. Maksimovic, Fundamentals of Power Electronics, table 18.3, from memory.
 * @example mainsBoostRectifierMean({ power: 1200, mainsVoltage: 85, outputVoltage: 400 }) // 3.00000
 */
export function mainsBoostRectifierMean(input: MainsBoostInput): number {
  return input.power / input.outputVoltage
}

/**
 * Root-mean-square rectifier current of a drop-free, ripple-free mains boost with power factor 1.
 *
 * Equation: (P/Vpk) sqrt(16 Vpk/(3 π Vo)). Valid for: continuous conduction, Vo above the mains peak. Deviations: no ripple.
 *
 * @returns Root mean square over the line cycle, switching included. [A]
 * @throws Never.
 * @see R. W. Erickson & D. Maksimovic, Fundamentals of Power Electronics, table 18.3, from memory; equal to integration.
 * @example mainsBoostRectifierRms({ power: 1200, mainsVoltage: 85, outputVoltage: 400 }) // 7.13031
 */
export function mainsBoostRectifierRms(input: MainsBoostInput): number {
  const peak = Math.SQRT2 * input.mainsVoltage
  return (input.power / peak) * Math.sqrt((16 * peak) / (3 * Math.PI * input.outputVoltage))
}
