import type { Gaussian } from '../domain/calibrated-rectifier.ts'
import { choleskyFactor } from '../numerics/cholesky.ts'

/** One value, or two values whose errors are correlated, seen through the model: value = design · coefficients + error. */
export interface Observation {
  /** One design row per value. */
  readonly designs: readonly Float64Array[]
  readonly values: readonly number[]
  /** Covariance of the errors, by rows. */
  readonly noise: readonly number[]
}

/**
 * A normal distribution of coefficients conditioned on observations, one after the other (linear regression, closed form).
 *
 * Equation, per value z = h·b + e with var(e) = r: s = h P h' + r, b ← b + P h' (z − h b)/s, P ← P − (P h')(P h')'/s.
 * A correlated pair is first made independent: the second value less its share of the first (L D L' of the noise).
 * P is carried as S S' (Potter's update, from memory), so it stays symmetric and positive semi-definite however small
 * the errors are; it may be singular, as the forward prior is.
 *
 * Order of the observations changes rounding only. An empty list gives an equal copy.
 */
export function conditioned(prior: Gaussian, observations: readonly Observation[]): Gaussian {
  if (observations.length === 0) return { mean: prior.mean.slice(), covariance: prior.covariance.slice() }
  const n = prior.mean.length
  const work: SquareRootForm = {
    mean: prior.mean.slice(),
    root: choleskyFactor(prior.covariance, n),
    seen: new Float64Array(n),
  }
  for (const { designs, values, noise } of observations) {
    const first = designs[0]!
    absorb(work, first, values[0]!, noise[0]!)
    if (designs.length < 2) continue
    const share = noise[2]! / noise[0]!
    const rest = designs[1]!.map((entry, index) => entry - share * first[index]!)
    absorb(work, rest, values[1]! - share * values[0]!, Math.max(noise[3]! - share * noise[1]!, leastVariance))
  }
  return { mean: work.mean, covariance: squared(work.root, n) }
}

/** Keeps a pair with perfectly correlated errors from claiming a value without any error. */
const leastVariance = 1e-14

interface SquareRootForm {
  readonly mean: Float64Array
  /** S with P = S S', by rows. */
  readonly root: Float64Array
  /** Work space: S' h. */
  readonly seen: Float64Array
}

/** Takes one value into the distribution, in place. */
function absorb({ mean, root, seen }: SquareRootForm, design: Float64Array, value: number, variance: number): void {
  const n = mean.length
  let residual = value
  let spread = variance
  for (let j = 0; j < n; j++) {
    let sum = 0
    for (let i = 0; i < n; i++) sum += root[i * n + j]! * design[i]!
    seen[j] = sum
    spread += sum * sum
    residual -= design[j]! * mean[j]!
  }
  const shrink = 1 / (spread * (1 + Math.sqrt(variance / spread)))
  for (let i = 0; i < n; i++) {
    let sum = 0
    for (let j = 0; j < n; j++) sum += root[i * n + j]! * seen[j]!
    mean[i] = mean[i]! + (sum * residual) / spread
    const weight = sum * shrink
    for (let j = 0; j < n; j++) root[i * n + j] = root[i * n + j]! - weight * seen[j]!
  }
}

function squared(root: Float64Array, n: number): Float64Array {
  const covariance = new Float64Array(n * n)
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = 0
      for (let k = 0; k < n; k++) sum += root[i * n + k]! * root[j * n + k]!
      covariance[i * n + j] = sum
      covariance[j * n + i] = sum
    }
  }
  return covariance
}

/** Mean of design · coefficients. */
export function predictedMean(gaussian: Gaussian, design: Float64Array): number {
  let sum = 0
  for (let i = 0; i < design.length; i++) sum += design[i]! * gaussian.mean[i]!
  return sum
}

/** Covariance of two predictions; the variance of one when both designs are the same. Never below 0 for a variance. */
export function predictedCovariance(gaussian: Gaussian, left: Float64Array, right: Float64Array): number {
  const n = left.length
  let sum = 0
  for (let i = 0; i < n; i++) {
    const weight = left[i]!
    if (weight === 0) continue
    for (let j = 0; j < n; j++) sum += weight * gaussian.covariance[i * n + j]! * right[j]!
  }
  return left === right ? Math.max(sum, 0) : sum
}

/** Standard deviation of design · coefficients. */
export function predictedDeviation(gaussian: Gaussian, design: Float64Array): number {
  return Math.sqrt(predictedCovariance(gaussian, design, design))
}
