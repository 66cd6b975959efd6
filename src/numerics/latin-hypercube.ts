import { normalQuantile } from './normal-quantile.ts'
import type { SeededStream } from './seeded-stream.ts'

/** Inputs of {@link latinHypercube}. */
export interface LatinHypercubeInput {
  readonly draws: number
  readonly dimensions: number
  readonly stream: SeededStream
  /** Standard normal when left out. */
  readonly distribution?: 'normal' | 'uniform'
}

/**
 * Stratified draws of independent quantities: each column has exactly one draw in each of `draws` equally likely
 * strata, at a random place inside it, and the columns are shuffled independently.
 *
 * Columns made by separate calls on unrelated streams join to one larger Latin hypercube, so parts may be drawn one
 * by one. The estimate of a mean has never more variance than (n/(n − 1)) times that of plain draws, and far less
 * where the function is mostly additive.
 *
 * @returns One column of length `draws` for each dimension.
 * @throws Never.
 * @see M. D. McKay, R. J. Beckman, W. J. Conover, A comparison of three methods for selecting values of input
 *   variables in the analysis of output from a computer code, Technometrics 21 (1979), 239-245.
 * @see A. B. Owen, Monte Carlo variance of scrambled net quadrature, SIAM J. Numer. Anal. 34 (1997): the bound (from
 *   memory).
 */
export function latinHypercube(input: LatinHypercubeInput): Float64Array[] {
  const { draws, dimensions, stream, distribution = 'normal' } = input
  return Array.from({ length: dimensions }, () => {
    const column = new Float64Array(draws)
    for (let row = 0; row < draws; row++) {
      const level = (row + stream.uniform()) / draws
      // Rounding may carry the last stratum to exactly 1, which has no finite quantile.
      const inside = level < 1 ? level : 1 - Number.EPSILON / 2
      column[row] = distribution === 'normal' ? normalQuantile(inside) : inside
    }
    shuffle(column, stream)
    return column
  })
}

/** Fisher and Yates, in place. */
function shuffle(column: Float64Array, stream: SeededStream): void {
  for (let last = column.length - 1; last > 0; last--) {
    const chosen = stream.below(last + 1)
    const kept = column[last]!
    column[last] = column[chosen]!
    column[chosen] = kept
  }
}
