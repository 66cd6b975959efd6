/** Inputs of {@link triangularTailEnergies}. */
export interface TriangularTailInput {
  /** [V] */
  readonly voltage: number
  /** Current at turn-on. [A] */
  readonly current: number
  /** [A/s] */
  readonly slope: number
  /** [A] */
  readonly peakReverseCurrent: number
  /** tb/ta. [1] */
  readonly softness: number
}

/** Who is heated when the tail is a triangle and the voltage moves over it. */
export function triangularTailEnergies(input: TriangularTailInput): {
  readonly rectifier: number
  readonly switch: number
} {
  const { voltage, current, slope, peakReverseCurrent, softness } = input
  const unit = (voltage * peakReverseCurrent) / slope
  return {
    rectifier: (unit * peakReverseCurrent * softness) / 6,
    switch: (unit * peakReverseCurrent * (3 + 2 * softness)) / 6 + (unit * current * (softness + 2)) / 2,
  }
}
