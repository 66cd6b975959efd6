import type { Gaussian } from '../domain/calibrated-rectifier.ts'

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
 * The covariance stays symmetric by construction; it may be singular, as the prior's may.
 *
 * Order of the observations changes rounding only. An empty list gives an equal copy.
 */
export function conditioned(prior: Gaussian, observations: readonly Observation[]): Gaussian {
  const posterior = { mean: prior.mean.slice(), covariance: prior.covariance.slice() }
  const direction = new Float64Array(prior.mean.length)
  for (const { designs, values, noise } of observations) {
    const first = designs[0]!
    absorb(posterior, first, values[0]!, noise[0]!, direction)
    if (designs.length < 2) continue
    const share = noise[2]! / noise[0]!
    const rest = designs[1]!.map((entry, index) => entry - share * first[index]!)
    absorb(
      posterior,
      rest,
      values[1]! - share * values[0]!,
      Math.max(noise[3]! - share * noise[1]!, leastVariance),
      direction,
    )
  }
  return posterior
}

/** Keeps a pair with perfectly correlated errors from claiming a value without any error. */
const leastVariance = 1e-14

/** Takes one value into a distribution, in place; `direction` is work space. */
function absorb(
  gaussian: Gaussian,
  design: Float64Array,
  value: number,
  variance: number,
  direction: Float64Array,
): void {
  const { mean, covariance } = gaussian
  const n = mean.length
  let predicted = 0
  let spread = variance
  for (let i = 0; i < n; i++) {
    let sum = 0
    for (let j = 0; j < n; j++) sum += covariance[i * n + j]! * design[j]!
    direction[i] = sum
    spread += design[i]! * sum
    predicted += design[i]! * mean[i]!
  }
  const innovation = (value - predicted) / spread
  for (let i = 0; i < n; i++) {
    mean[i] = mean[i]! + direction[i]! * innovation
    const weight = direction[i]! / spread
    for (let j = 0; j <= i; j++) {
      const updated = covariance[i * n + j]! - weight * direction[j]!
      covariance[i * n + j] = updated
      covariance[j * n + i] = updated
    }
  }
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
