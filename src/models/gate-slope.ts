/** Inputs of {@link gateDrivenSlope}. */
export interface GateDrivenSlopeInput {
  /** Drive voltage. [V] */
  readonly drive: number
  /** Total gate resistance. [Ω] */
  readonly resistance: number
  /** [F] */
  readonly inputCapacitance: number
  /** [A/V] */
  readonly transconductance: number
  /** [V] */
  readonly threshold: number
  /** Gate voltage at the plateau; null takes threshold + I/gm. [V] */
  readonly plateau: number | null
  /** Inductance shared by gate and power loop. [H] */
  readonly sourceInductance: number
  /** Current that the switch takes over. [A] */
  readonly current: number
}

/** Slope of the switch's current at turn-on, from its gate drive. [A/s] */
export function gateDrivenSlope(input: GateDrivenSlopeInput): number {
  const { drive, threshold, plateau, transconductance } = input
  const middle = plateau === null ? threshold + input.current / (2 * transconductance) : 0.5 * (threshold + plateau)
  return (
    (transconductance * (drive - middle)) /
    (input.resistance * input.inputCapacitance + transconductance * input.sourceInductance)
  )
}
