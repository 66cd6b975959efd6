import { meaningless } from './meaningless.ts'

/** Inputs of {@link triangularTailEnergies}. */
export interface TriangularTailInput {
  /** V, blocking voltage. [V] */
  readonly voltage: number
  /** I, current at turn-on. [A] */
  readonly current: number
  /** a. [A/s] */
  readonly slope: number
  /** I_RM. [A] */
  readonly peakReverseCurrent: number
  /** S = tb/ta. [1] */
  readonly softness: number
}

/** Energies of one event with a triangular tail. */
export interface TriangularTailEnergies {
  /** E_D. [J] */
  readonly rectifier: number
  /** E_Q, without V I (I/a)/2 of the rise to I. [J] */
  readonly switch: number
}

/**
 * Who is heated when the tail is a triangle and the voltage moves linearly over the whole of it: another event model, for comparison.
 *
 * Equation: E_D = V I_RM² S/(6a), E_Q = V I_RM² (3 + 2S)/(6a) + V I_RM I (S + 2)/(2a); their sum is V (Qrr + I ta + I tb/2).
 *
 * Valid for: S ≥ 0. Deviations: the base overlap V I tb/2 stands inside E_Q here, in E_base elsewhere.
 *
 * @returns Energies of one recovery. [J]
 * @throws RangeError when slope is not positive.
 * @see STMicroelectronics notes on fast diodes, from memory; the sum is an own identity.
 * @example triangularTailEnergies({ voltage: 400, current: 6, slope: 200e6, peakReverseCurrent: 8, softness: 0.5 }).rectifier // 1.06667e-5
 */
export function triangularTailEnergies(input: TriangularTailInput): TriangularTailEnergies {
  const { voltage, current, slope, peakReverseCurrent, softness } = input
  if (!(slope > 0)) throw meaningless('triangularTailEnergies', 'slope', slope)
  const unit = (voltage * peakReverseCurrent) / slope
  return {
    rectifier: (unit * peakReverseCurrent * softness) / 6,
    switch: (unit * peakReverseCurrent * (3 + 2 * softness)) / 6 + (unit * current * (softness + 2)) / 2,
  }
}
