import { leastSquares } from '../numerics/least-squares.ts'

/** One uncertain input of the gap: a group of columns that belong together. */
export interface GapInput {
  readonly name: string
  /**
   * Its value in each draw, one column for each scalar, e.g. u and y of one part's recovery at the operating point.
   * Columns of one input may depend on one another; different inputs must be independent.
   */
  readonly columns: readonly Float64Array[]
}

/** What one input does to the gap. */
interface GapPart {
  readonly name: string
  /** Variance of the gap's component that depends on this input alone. [W²] */
  readonly variance: number
  /** Mean derivative of the gap by each column of the input. [W per unit of the column] */
  readonly gradient: Float64Array
}

/** The gap as a sum of functions of one input each. */
export interface GapRegression {
  /** Variance of the gap over the draws not lost. [W²] */
  readonly variance: number
  /** Share of it that the sum explains, adjusted for the number of terms; the rest is interaction. [1] */
  readonly explained: number
  /** In the order of the inputs. */
  readonly parts: readonly GapPart[]
}

/** Draws needed for each fitted coefficient, or the fit would explain chance. */
const drawsPerTerm = 4
/** Products of the columns of one input are fitted up to this many columns. */
const mostColumnsWithProducts = 3
/** A spread below this share of the level is rounding. */
const constant = 1e-12

/**
 * Regresses the gap on its inputs: gap = mean + Σ f_g, each f_g a polynomial of degree two in the standardised columns
 * of input g (for normal inputs: the Hermite polynomials of degree one and two). For independent inputs the variance
 * of f_g is the first-order part of input g. Each variance is lowered by what chance alone would fit: σ² k/f for k
 * terms, residual variance σ² and its degrees of freedom f. With fewer than 4 draws for each term only the straight
 * terms are fitted.
 *
 * The linear coefficient of a normal input is the mean derivative (Stein's lemma), which is the gradient given.
 *
 * @param gap Not finite where the draw is lost; such draws are left out. [W]
 * @returns Null where nothing can be told: a constant gap, no varying column, or fewer than 4 draws for each column.
 * @throws Never.
 * @see I. M. Sobol', Global sensitivity indices for nonlinear mathematical models and their Monte Carlo estimates,
 *   Math. Comput. Simul. 55 (2001), 271-280: first-order indices, also of groups.
 * @see B. Sudret, Global sensitivity analysis using polynomial chaos expansions, Reliab. Eng. Syst. Saf. 93 (2008),
 *   964-979: the indices from the coefficients of a regression on polynomials.
 */
export function regressGap(gap: Float64Array, inputs: readonly GapInput[]): GapRegression | null {
  const target = centre(gap.filter(Number.isFinite))
  const draws = target.length
  const level = gap.reduce((most, value) => (Number.isFinite(value) ? Math.max(most, Math.abs(value)) : most), 0)
  const variance = meanSquare(target)
  if (Math.sqrt(variance) <= constant * level) return null
  const groups = inputs.map((input) => standardise(input, gap))
  const terms = chooseTerms(groups, draws)
  if (!terms) return null

  const fit = leastSquares(terms.flat(), target)
  const freedom = draws - 1 - fit.rank
  const residual = fit.residualSquares / freedom
  let next = 0
  const parts = groups.map((group, index): GapPart => {
    const own = fit.coefficients.subarray(next, next + terms[index]!.length)
    next += own.length
    const chance = (residual * own.length) / freedom
    return {
      name: group.name,
      variance: Math.max(0, meanSquare(addUp(terms[index]!, own, draws)) - chance),
      gradient: gradientOf(group, own),
    }
  })
  const explained = 1 - residual / ((variance * draws) / (draws - 1))
  return { variance, explained: Math.min(1, Math.max(0, explained)), parts }
}

interface Standardised {
  readonly name: string
  /** Zero mean and unit variance over the draws kept; null where the column is constant. */
  readonly columns: readonly (Float64Array | null)[]
  readonly deviations: readonly number[]
}

function standardise(input: GapInput, gap: Float64Array): Standardised {
  const columns: (Float64Array | null)[] = []
  const deviations: number[] = []
  for (const column of input.columns) {
    const kept = column.filter((_, draw) => Number.isFinite(gap[draw]!))
    const level = kept.reduce((most, value) => Math.max(most, Math.abs(value)), 0)
    const centred = centre(kept)
    const deviation = Math.sqrt(meanSquare(centred))
    const varies = deviation > constant * level
    columns.push(varies ? centred.map((value) => value / deviation) : null)
    deviations.push(deviation)
  }
  return { name: input.name, columns, deviations }
}

/** Columns of the regression for each input; straight ones first. Null with too few draws (or none), or nothing to fit. */
function chooseTerms(groups: readonly Standardised[], draws: number): Float64Array[][] | null {
  const straight = groups.map((group) => group.columns.filter((column) => column !== null))
  const full = straight.map((columns) => [...columns, ...products(columns)])
  for (const terms of [full, straight]) {
    const count = terms.flat().length
    if (count > 0 && count * drawsPerTerm <= draws) return terms
  }
  return null
}

/** Squares, and for a small group the mixed products too, with their means removed. */
function products(columns: readonly Float64Array[]): Float64Array[] {
  const mixed = columns.length <= mostColumnsWithProducts
  return columns.flatMap((one, i) =>
    columns
      .filter((_, j) => j === i || (mixed && j > i))
      .map((other) => centre(one.map((value, draw) => value * other[draw]!))),
  )
}

function gradientOf(group: Standardised, coefficients: Float64Array): Float64Array {
  let next = 0
  return Float64Array.from(group.columns, (column, index) =>
    column ? coefficients[next++]! / group.deviations[index]! : 0,
  )
}

function addUp(terms: readonly Float64Array[], coefficients: Float64Array, draws: number): Float64Array {
  const sum = new Float64Array(draws)
  terms.forEach((term, index) => {
    for (let draw = 0; draw < draws; draw++) sum[draw] = sum[draw]! + coefficients[index]! * term[draw]!
  })
  return sum
}

function centre(values: Float64Array): Float64Array {
  let sum = 0
  for (const value of values) sum += value
  const mean = sum / values.length
  return values.map((value) => value - mean)
}

function meanSquare(values: Float64Array): number {
  let sum = 0
  for (const value of values) sum += value * value
  return sum / values.length
}
