/** Inputs of the sharing functions. */
export interface ParallelSharingInput {
  /** Number of equal parts. */
  readonly parts: number
  /** How much more than its equal share the hottest part carries. [1] */
  readonly imbalance: number
}

/**
 * Share of the part that carries most.
 * @example hottestShare({ parts: 2, imbalance: 0.1 }) // 0.550000
 */
export function hottestShare(input: ParallelSharingInput): number {
  return input.parts > 1 ? Math.min(1, (1 + input.imbalance) / input.parts) : 1
}

/**
 * Share of each of the others; 0 where there are none.
 * @example otherShare({ parts: 3, imbalance: 0.2 }) // 0.300000
 */
export function otherShare(input: ParallelSharingInput): number {
  return input.parts > 1 ? (1 - hottestShare(input)) / (input.parts - 1) : 0
}
