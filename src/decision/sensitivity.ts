import { compareIds } from './order-candidates.ts'
import type { GapRegression } from './regress-gap.ts'

/** Share of the gap's variance that comes from one input alone. */
export interface InputShare {
  readonly input: string
  readonly share: number
}

/**
 * First-order shares of the gap's variance, largest first, equal ones by name.
 *
 * The parts of the regression, scaled so that they add up to the explained share: what 1 minus their sum leaves is
 * interaction between inputs and anything the polynomials miss.
 *
 * @throws Never.
 */
export function shareVariance(regression: GapRegression): InputShare[] {
  const sum = regression.parts.reduce((total, part) => total + part.variance, 0)
  return regression.parts
    .map((part) => ({ input: part.name, share: sum > 0 ? (regression.explained * part.variance) / sum : 0 }))
    .sort((a, b) => b.share - a.share || compareIds(a.input, b.input))
}
