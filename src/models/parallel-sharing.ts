/** Inputs of the sharing functions. */
export interface ParallelSharingInput {
  /** n, number of equal parts. */
  readonly parts: number
  /** x, how much more than its equal share the hottest part carries. [1] */
  readonly imbalance: number
}

/**
 * Share of current and slope of the part that carries most.
 *
 * Equation: (1 + x)/n, at most 1; a single part carries all. Valid for: n ≥ 1, x ≥ 0. Deviations: none.
 *
 * @returns Share of the whole. [1]
 * @throws Never.
 * @see Own definition of imbalance.
 * @example hottestShare({ parts: 2, imbalance: 0.1 }) // 0.550000
 */
export function hottestShare(input: ParallelSharingInput): number {
  return Math.min(1, (1 + input.imbalance) / input.parts)
}

/**
 * Share of each of the other parts, which divide the rest equally.
 *
 * Equation: (1 − (1 + x)/n)/(n − 1); 0 where there is no other part. Valid for: n ≥ 1, x ≥ 0. Deviations: none.
 *
 * @returns Share of the whole. [1]
 * @throws Never.
 * @see Own definition of imbalance.
 * @example otherShare({ parts: 3, imbalance: 0.2 }) // 0.300000
 */
export function otherShare(input: ParallelSharingInput): number {
  return input.parts > 1 ? (1 - hottestShare(input)) / (input.parts - 1) : 0
}
