import type { Gaussian } from '../domain/calibrated-rectifier.ts'
import { boltzmannElectronvolt, referenceTemperature } from '../domain/constants.ts'
import type { RectifierClass } from '../domain/rectifier.ts'
import { type ClassPrior, classPriors, residualExponent, resistivePerKelvin, type Spread } from './class-priors.ts'

/** The class prior as normal distributions over the coefficients that CalibratedRectifier names. */
export interface PriorGaussians {
  readonly recovery: Gaussian | null
  readonly forward: Gaussian
  readonly leakage: Gaussian | null
}

/** Prior of a class. The bases are relative to I0, a0, T0 and V0, so one prior serves every part of the class. */
export function priorGaussians(rectifierClass: RectifierClass): PriorGaussians {
  return byClass[rectifierClass]
}

const byClass = Object.fromEntries(
  Object.entries(classPriors).map(([name, prior]) => [
    name,
    {
      recovery: prior.recovery && recoveryPrior(prior.recovery),
      forward: forwardPrior(prior.forward),
      leakage: prior.leakage && leakagePrior(prior.leakage),
    },
  ]),
) as Readonly<Record<RectifierClass, PriorGaussians>>

function recoveryPrior(prior: NonNullable<ClassPrior['recovery']>): Gaussian {
  const residual: Spread = [0, residualExponent]
  const [lifetime, deviation] = prior.lifetime
  return independent([
    [Math.log(lifetime), deviation],
    residual,
    residual,
    prior.lifetimeHeat,
    prior.ratio,
    residual,
    residual,
    prior.ratioHeat,
  ])
}

function leakagePrior(prior: NonNullable<ClassPrior['leakage']>): Gaussian {
  const [current, deviation] = prior.current
  const [activation, activationDeviation] = prior.activation
  return independent([
    [Math.log(current), deviation],
    [activation / boltzmannElectronvolt, activationDeviation / boltzmannElectronvolt],
    prior.exponent,
  ])
}

/**
 * V_F from level L, ln term n, resistive share s, tempco at I0 t and the resistive part's own growth k:
 * constant (1 − s) L, logarithmic n, linear s L; per kelvin: linear k s L, logarithmic n/T0 (a term proportional to T),
 * constant t − k s L, so that the tempco at I0 is t. Covariance by linearisation in (L, n, s, t, k); its rank is 5 of 6.
 */
function forwardPrior(prior: ClassPrior['forward']): Gaussian {
  const [level, levelDeviation] = prior.level
  const [logarithmic, logarithmicDeviation] = prior.logarithmic
  const [share, shareDeviation] = prior.share
  const [perKelvin, perKelvinDeviation] = prior.perKelvin
  const [growth, growthDeviation] = resistivePerKelvin
  const linear = share * level
  const mean = Float64Array.of(
    level - linear,
    logarithmic,
    linear,
    perKelvin - growth * linear,
    logarithmic / referenceTemperature,
    growth * linear,
  )
  return {
    mean,
    covariance: fromDirections([
      [1 - share, 0, share, -growth * share, 0, growth * share].map((d) => d * levelDeviation),
      [0, 1, 0, 0, 1 / referenceTemperature, 0].map((d) => d * logarithmicDeviation),
      [-level, 0, level, -growth * level, 0, growth * level].map((d) => d * shareDeviation),
      [0, 0, 0, 1, 0, 0].map((d) => d * perKelvinDeviation),
      [0, 0, 0, -linear, 0, linear].map((d) => d * growthDeviation),
    ]),
  }
}

function independent(coefficients: readonly Spread[]): Gaussian {
  const n = coefficients.length
  const covariance = new Float64Array(n * n)
  for (const [index, [, deviation]] of coefficients.entries()) covariance[index * n + index] = deviation * deviation
  return { mean: Float64Array.from(coefficients, ([centre]) => centre), covariance }
}

/** Sum of d d' over independent directions of one standard deviation each. */
export function fromDirections(directions: readonly (readonly number[])[]): Float64Array {
  const n = directions[0]!.length
  const covariance = new Float64Array(n * n)
  for (const d of directions) {
    for (let i = 0; i < n; i++)
      for (let j = 0; j < n; j++) covariance[i * n + j] = covariance[i * n + j]! + d[i]! * d[j]!
  }
  return covariance
}
