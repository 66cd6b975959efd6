import { meaningless } from './meaningless.ts'

/** Inputs of {@link gateDrivenSlope}. */
export interface GateDrivenSlopeInput {
  /** V_drive, drive voltage. [V] */
  readonly drive: number
  /** R_g, total gate resistance. [Ω] */
  readonly resistance: number
  /** C_iss. [F] */
  readonly inputCapacitance: number
  /** gm. [A/V] */
  readonly transconductance: number
  /** Gate threshold. [V] */
  readonly threshold: number
  /** Gate voltage at the plateau; null takes threshold + I/gm. [V] */
  readonly plateau: number | null
  /** L_s, inductance shared by gate and power loop. [H] */
  readonly sourceInductance: number
  /** I, current that the switch takes over. [A] */
  readonly current: number
}

/**
 * Slope of the switch's current at turn-on, from its gate drive.
 *
 * Equation: di/dt = gm (V_drive − V_mid)/(R_g C_iss + gm L_s), V_mid = (threshold + plateau)/2, without plateau threshold + I/(2 gm).
 *
 * Valid for: V_drive > V_mid. Deviations: constant gm; the driver's own rise time is not in it.
 *
 * @returns di/dt; not positive where the drive cannot turn the switch on. [A/s]
 * @throws RangeError when neither gate resistance nor source inductance limits the slope.
 * @see First-order gate circuit, common practice, no source.
 * @example gateDrivenSlope({ drive: 12, resistance: 10, inputCapacitance: 2e-9, transconductance: 20, threshold: 3, plateau: 5, sourceInductance: 5e-9, current: 8 }) // 1.33333e9
 */
export function gateDrivenSlope(input: GateDrivenSlopeInput): number {
  const { drive, threshold, plateau, transconductance } = input
  const delay = input.resistance * input.inputCapacitance + transconductance * input.sourceInductance
  if (!(delay > 0)) throw meaningless('gateDrivenSlope', 'resistance', input.resistance)
  const middle = plateau === null ? threshold + input.current / (2 * transconductance) : 0.5 * (threshold + plateau)
  return (transconductance * (drive - middle)) / delay
}
