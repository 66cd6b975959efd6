import { meaningless } from './meaningless.ts'

/** A triangular recovery: the current falls to its peak in ta and runs back to zero in tb = S ta. */
export interface TriangleRecovery {
  /** ta. [s] */
  readonly timeToPeak: number
  /** tb. [s] */
  readonly tailDuration: number
  /** trr = ta + tb. [s] */
  readonly recoveryTime: number
  /** I_RM. [A] */
  readonly peakReverseCurrent: number
  /** Qrr. [C] */
  readonly charge: number
}

/** Inputs of {@link triangleFromTime}. */
export interface TriangleTimeInput {
  /** trr. [s] */
  readonly recoveryTime: number
  /** a. [A/s] */
  readonly slope: number
  /** S = tb/ta. [1] */
  readonly softness: number
}

/**
 * Triangular recovery from recovery time, slope and softness.
 *
 * Equation: ta = trr/(1 + S), I_RM = a ta, Qrr = I_RM trr/2.
 *
 * Valid for: S ≥ 0. Deviations: a real tail is no triangle; 15 % between this charge and a stated one is usual.
 *
 * @returns The triangle. [s, A, C]
 * @throws RangeError when slope is not positive or softness is negative.
 * @see N. Mohan, T. M. Undeland & W. P. Robbins, Power Electronics, from memory.
 * @example triangleFromTime({ recoveryTime: 3.9e-6, slope: 50e6, softness: 0.3 }).charge // 2.92500e-4
 */
export function triangleFromTime({ recoveryTime, slope, softness }: TriangleTimeInput): TriangleRecovery {
  if (!(slope > 0)) throw meaningless('triangleFromTime', 'slope', slope)
  if (!(softness >= 0)) throw meaningless('triangleFromTime', 'softness', softness)
  const timeToPeak = recoveryTime / (1 + softness)
  const peakReverseCurrent = slope * timeToPeak
  return {
    timeToPeak,
    tailDuration: softness * timeToPeak,
    recoveryTime,
    peakReverseCurrent,
    charge: 0.5 * peakReverseCurrent * recoveryTime,
  }
}

/** Inputs of {@link triangleFromCharge}. */
export interface TriangleChargeInput {
  /** Qrr. [C] */
  readonly charge: number
  /** a. [A/s] */
  readonly slope: number
  /** S = tb/ta. [1] */
  readonly softness: number
}

/**
 * Triangular recovery from charge, slope and softness.
 *
 * Equation: trr = sqrt(2 Qrr (1 + S)/a), hence I_RM = sqrt(2 Qrr a/(1 + S)).
 *
 * Valid for: S ≥ 0, Qrr ≥ 0. Deviations: as {@link triangleFromTime}.
 *
 * @returns The triangle. [s, A, C]
 * @throws RangeError when slope is not positive or softness is negative.
 * @see N. Mohan, T. M. Undeland & W. P. Robbins, Power Electronics, from memory.
 * @example triangleFromCharge({ charge: 292.5e-6, slope: 50e6, softness: 0.3 }).peakReverseCurrent // 150.000
 */
export function triangleFromCharge({ charge, slope, softness }: TriangleChargeInput): TriangleRecovery {
  return triangleFromTime({ recoveryTime: Math.sqrt((2 * charge * (1 + softness)) / slope), slope, softness })
}
