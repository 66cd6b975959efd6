import type { CalibratedRectifier } from '../domain/calibrated-rectifier.ts'
import { predictedDeviation, predictedMean } from './bayesian-update.ts'
import { forwardDesign, leakageDesign, recoveryDesigns } from './design-rows.ts'

/** Recovery parameters at a condition: nominal values and the posterior's standard deviations, without unit spread. */
export interface RecoveryAt {
  /** exp of the mean of u. [s] */
  readonly lifetime: number
  /** tau_rr, always below the lifetime. [s] */
  readonly tailTime: number
  /** sd of u = ln tau. */
  readonly lifetimeDeviation: number
  /** sd of y = ln(tau/tau_rr − 1). */
  readonly ratioDeviation: number
}

/** Lifetime and tail time of the posterior mean; null for classes without stored charge. */
export function recoveryAt(input: {
  readonly rectifier: CalibratedRectifier
  readonly current: number
  readonly slope: number
  readonly junction: number
}): RecoveryAt | null {
  const { rectifier, current, slope, junction } = input
  if (rectifier.recovery === null) return null
  const { posterior } = rectifier.recovery
  const [u, y] = recoveryDesigns({ ratedCurrent: rectifier.ratedCurrent, current, slope, junction })
  const lifetime = Math.exp(predictedMean(posterior, u))
  return {
    lifetime,
    tailTime: lifetime / (1 + Math.exp(predictedMean(posterior, y))),
    lifetimeDeviation: predictedDeviation(posterior, u),
    ratioDeviation: predictedDeviation(posterior, y),
  }
}

/** V_F of the posterior mean at a current and a temperature, with its standard deviation. [V] */
export function forwardDropAt(input: {
  readonly rectifier: CalibratedRectifier
  readonly current: number
  readonly junction: number
}): { readonly drop: number; readonly deviation: number } {
  const { rectifier, current, junction } = input
  const { posterior, line } = rectifier.forward
  const design = forwardDesign({ ratedCurrent: rectifier.ratedCurrent, current, junction, line })
  return { drop: predictedMean(posterior, design), deviation: predictedDeviation(posterior, design) }
}

/** Leakage of the posterior mean [A] with the standard deviation of its ln; null where leakage is not used. */
export function leakageCurrentAt(input: {
  readonly rectifier: CalibratedRectifier
  readonly voltage: number
  readonly junction: number
}): { readonly current: number; readonly deviation: number } | null {
  const { rectifier, voltage, junction } = input
  if (rectifier.leakage === null) return null
  const { posterior } = rectifier.leakage
  const design = leakageDesign({ ratedVoltage: rectifier.ratedVoltage, voltage, junction })
  return { current: Math.exp(predictedMean(posterior, design)), deviation: predictedDeviation(posterior, design) }
}
