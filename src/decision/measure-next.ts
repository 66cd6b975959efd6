import type { MeasureNext } from '../domain/result.ts'
import { compareIds } from './order-candidates.ts'
import type { GapRegression } from './regress-gap.ts'
import { shareVariance } from './sensitivity.ts'

/** A measurement that could be made, and the input of the gap it would tell about. */
export interface MeasurementOption {
  /** Name of the input in the regression. */
  readonly input: string
  readonly advice: Omit<MeasureNext, 'share'>
}

/** Covariances of the columns of one input, k × k by rows, unit-to-unit spread included. */
export interface MeasurementEffect {
  readonly before: Float64Array
  /** With one more row of grade `measured` at the advised condition. */
  readonly after: Float64Array
}

/** How many pieces of advice are given. */
const mostAdvice = 3

/**
 * What to measure next: the options by the expected share of the gap's variance that one more measured row removes.
 *
 * For a Gaussian model the covariance after a row does not depend on the value it will show, so the expectation is in
 * closed form: share = S (1 − gᵀ A g / gᵀ B g), with S the input's first-order share, g its gradient, B and A the
 * covariances before and after. One condition, the best, is named for each part and property.
 *
 * @returns At most three, largest first; options that remove nothing are left out.
 * @throws Never.
 * @see H. Raiffa, R. Schlaifer, Applied Statistical Decision Theory, 1961: preposterior analysis.
 */
export function adviseMeasurement(
  regression: GapRegression,
  options: readonly MeasurementOption[],
  effectOf: (option: MeasurementOption) => MeasurementEffect,
): MeasureNext[] {
  const shares = new Map(shareVariance(regression).map(({ input, share }) => [input, share]))
  const gradients = new Map(regression.parts.map(({ name, gradient }) => [name, gradient]))
  const advice = options
    .map((option) => {
      const gradient = gradients.get(option.input)
      const removed = gradient ? removedShare(gradient, effectOf(option)) : 0
      return { ...option.advice, share: (shares.get(option.input) ?? 0) * removed }
    })
    .filter(({ share }) => share > 0)
    .sort(compareAdvice)
  const firstOfKind = advice.filter(
    (one, index) => advice.findIndex(({ id, property }) => id === one.id && property === one.property) === index,
  )
  return firstOfKind.slice(0, mostAdvice)
}

function removedShare(gradient: Float64Array, { before, after }: MeasurementEffect): number {
  const varianceBefore = quadraticForm(gradient, before)
  if (!(varianceBefore > 0)) return 0
  return Math.min(1, Math.max(0, 1 - quadraticForm(gradient, after) / varianceBefore))
}

function quadraticForm(vector: Float64Array, matrix: Float64Array): number {
  let sum = 0
  vector.forEach((one, row) => {
    vector.forEach((other, column) => {
      sum += one * other * matrix[row * vector.length + column]!
    })
  })
  return sum
}

function compareAdvice(a: MeasureNext, b: MeasureNext): number {
  return (
    b.share - a.share ||
    compareIds(a.id, b.id) ||
    compareIds(a.property, b.property) ||
    a.current_a - b.current_a ||
    (a.slope_a_per_s ?? 0) - (b.slope_a_per_s ?? 0) ||
    a.junction_c - b.junction_c
  )
}
