/** A current that runs linearly between two values. */
export interface TrapezoidInput {
  /** [A] */
  readonly first: number
  /** [A] */
  readonly last: number
}

/**
 * Mean of a current that runs linearly.
 *
 * Equation: (a + b)/2. Valid for: any ends. Deviations: none.
 *
 * @returns Mean over the interval. [A]
 * @throws Never.
 * @see STMicroelectronics AN604 rev. 3, 2011.
 * @example trapezoidMean({ first: 11.8, last: 4 }) // 7.90000
 */
export function trapezoidMean(input: TrapezoidInput): number {
  return 0.5 * (input.first + input.last)
}

/**
 * Root mean square of a current that runs linearly.
 *
 * Equation: sqrt((a² + b² + a b)/3); times sqrt(d) for a share d of the period. Valid for: any ends. Deviations: none.
 *
 * @returns Root mean square over the interval. [A]
 * @throws Never.
 * @see STMicroelectronics AN604 rev. 3, 2011, Eq. 15.
 * @example trapezoidRms({ first: 11.8, last: 4 }) // 8.21462
 */
export function trapezoidRms(input: TrapezoidInput): number {
  const { first, last } = input
  return Math.sqrt((first * first + last * last + first * last) / 3)
}
