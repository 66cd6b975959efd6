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
  for (const { row, away } of distancesFromOthers(prior, rows)) {
    if (away > distance && away > distanceFrom(prior, row.observation)) {
      distance = away
      worst = row
    }
  }
  if (worst === null) return []
  const other = farthestFrom(worst, rows, prior)
  return [{ code: 'rows-contradict', candidate, data: { row: worst.name, other: other.name, distance } }]
}

interface RowDistance {
  readonly row: NamedObservation
  readonly away: number
}

/**
 * How far each row is from what `known` and all others of the list predict for it. Each half is looked at with the
 * other half taken in, so that a record of thousands of rows does not take millions of steps.
 */
function distancesFromOthers(known: Gaussian, rows: readonly NamedObservation[]): readonly RowDistance[] {
  const [row] = rows
  if (rows.length === 1) return [{ row: row!, away: distanceFrom(known, row!.observation) }]
  const halves = [rows.slice(0, rows.length / 2), rows.slice(rows.length / 2)] as const
  const knowing = (half: readonly NamedObservation[]) =>
    conditioned(
      known,
      half.map(({ observation }) => observation),
    )
  return [...distancesFromOthers(knowing(halves[1]), halves[0]), ...distancesFromOthers(knowing(halves[0]), halves[1])]
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
