import type { Gaussian } from '../domain/calibrated-rectifier.ts'
import type { Caveat } from '../domain/caveat.ts'
import { conditioned, type Observation, predictedCovariance, predictedMean } from './bayesian-update.ts'

/** One row's observation and where it stands. */
export interface NamedObservation {
  readonly name: string
  readonly observation: Observation
}

/** Beyond this many standard deviations from what the other rows predict, a row contradicts them. */
const contradictsBeyond = 3

/**
 * The row that is farthest from what the class and the other rows predict for it, when it is too far to be chance. The
 * prediction carries the class's doubt about the way from one condition to another, so rows far apart are not accused.
 */
export function findContradiction(candidate: string, prior: Gaussian, rows: readonly NamedObservation[]): Caveat[] {
  if (rows.length < 2) return []
  let worst: NamedObservation | null = null
  let distance = contradictsBeyond
  for (const row of rows) {
    const others = rows.filter((other) => other !== row).map((other) => other.observation)
    const away = distanceFrom(conditioned(prior, others), row.observation)
    if (away > distance && away > distanceFrom(prior, row.observation)) {
      distance = away
      worst = row
    }
  }
  if (worst === null) return []
  const other = farthestFrom(worst, rows, prior)
  return [{ code: 'rows-contradict', candidate, data: { row: worst.name, other: other.name, distance } }]
}

/** The other row that, alone beside the class, makes this row least likely. */
function farthestFrom(row: NamedObservation, rows: readonly NamedObservation[], prior: Gaussian): NamedObservation {
  const away = (other: NamedObservation) => distanceFrom(conditioned(prior, [other.observation]), row.observation)
  return rows.filter((other) => other !== row).reduce((worst, other) => (away(other) > away(worst) ? other : worst))
}

/** Mahalanobis distance of an observation from its prediction, noise included. */
function distanceFrom(gaussian: Gaussian, { designs, values, noise }: Observation): number {
  const first = designs[0]!
  const residual = values[0]! - predictedMean(gaussian, first)
  const variance = predictedCovariance(gaussian, first, first) + noise[0]!
  const second = designs[1]
  if (second === undefined) return Math.abs(residual) / Math.sqrt(variance)
  const cross = predictedCovariance(gaussian, first, second) + noise[1]!
  const otherResidual = values[1]! - predictedMean(gaussian, second) - (cross / variance) * residual
  const otherVariance = predictedCovariance(gaussian, second, second) + noise[3]! - (cross * cross) / variance
  return Math.sqrt((residual * residual) / variance + (otherResidual * otherResidual) / otherVariance)
}
