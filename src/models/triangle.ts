/** A triangular recovery: current falls to the peak in `timeToPeak` and back to zero in `tailDuration`. */
export interface TriangleRecovery {
  /** [s] */
  readonly timeToPeak: number
  /** [s] */
  readonly tailDuration: number
  /** [s] */
  readonly recoveryTime: number
  /** [A] */
  readonly peakReverseCurrent: number
  /** [C] */
  readonly charge: number
}

/** Triangle from recovery time, slope and softness S = tb/ta. */
export function triangleFromTime(input: {
  readonly recoveryTime: number
  readonly slope: number
  readonly softness: number
}): TriangleRecovery {
  const timeToPeak = input.recoveryTime / (1 + input.softness)
  const peakReverseCurrent = input.slope * timeToPeak
  return {
    timeToPeak,
    tailDuration: input.softness * timeToPeak,
    recoveryTime: input.recoveryTime,
    peakReverseCurrent,
    charge: 0.5 * peakReverseCurrent * input.recoveryTime,
  }
}

/** Triangle from charge, slope and softness. */
export function triangleFromCharge(input: {
  readonly charge: number
  readonly slope: number
  readonly softness: number
}): TriangleRecovery {
  const recoveryTime = Math.sqrt((2 * input.charge * (1 + input.softness)) / input.slope)
  return triangleFromTime({ recoveryTime, slope: input.slope, softness: input.softness })
}
