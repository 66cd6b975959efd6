/** A current that runs linearly between two values. */
export interface TrapezoidInput {
  /** [A] */
  readonly first: number
  /** [A] */
  readonly last: number
}

/**
 * Mean of a linear ramp.
 * @example trapezoidMean({ first: 11.8, last: 4 }) // 7.90000
 */
export function trapezoidMean(input: TrapezoidInput): number {
  return 0.5 * (input.first + input.last)
}

/**
 * Root mean square of a linear ramp.
 * @example trapezoidRms({ first: 11.8, last: 4 }) // 8.21462
 */
export function trapezoidRms(input: TrapezoidInput): number {
  const { first, last } = input
  return Math.sqrt((first * first + last * last + first * last) / 3)
}
