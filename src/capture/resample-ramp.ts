import type { RecoveryTimeDefinition } from '../domain/rectifier.ts'
import type { EventWindow } from './event-window.ts'
import { lineAt } from './fit-line.ts'
import { type FitConditions, type FittedRamp, fitRamp, type WindowMarks } from './fit-ramp.ts'
import { type RampFigures, rampFigures } from './ramp-figures.ts'
import { reverseCurrentAt } from './recovery-curve.ts'

/**
 * Relative standard deviation of each figure from the noise: the fitted event with residuals drawn anew, fitted again
 * (residual bootstrap; B. Efron & R. J. Tibshirani, An Introduction to the Bootstrap, 1993, section 9.5, from memory).
 */
export function resampleRamp(input: {
  readonly window: EventWindow
  readonly marks: WindowMarks
  readonly conditions: FitConditions
  readonly ramp: FittedRamp
  readonly figures: RampFigures
  readonly definition: RecoveryTimeDefinition
  readonly chargeUntil: number
  /** Even numbers from 0 to 1 from a seeded generator. */
  readonly uniform: () => number
  readonly refits: number
}): Readonly<Record<(typeof resampled)[number], number>> {
  const { window, ramp, figures, uniform, refits } = input
  const fitted = window.current.map((_, k) => fittedAt(window, ramp, k))
  const residuals = window.current.map((value, k) => value - fitted[k]!)
  const sums = new Float64Array(resampled.length)
  for (let round = 0; round < refits; round++) {
    const current = fitted.map((value) => value + residuals[Math.floor(uniform() * residuals.length)]!)
    const again = fitRamp({ ...window, current }, input.marks, input.conditions, ramp)
    const drawn = rampFigures({ ...window, current }, again, input.definition, input.chargeUntil)
    resampled.forEach((name, i) => {
      // one fit in a wild corner says "unsure", not "infinitely so"
      const ratio = Math.min(1, Math.max(-1, drawn[name] / figures[name] - 1))
      sums[i] = sums[i]! + (Number.isFinite(ratio) ? ratio * ratio : 1)
    })
  }
  return Object.fromEntries(resampled.map((name, i) => [name, Math.sqrt(sums[i]! / Math.max(1, refits))])) as Record<
    (typeof resampled)[number],
    number
  >
}

const resampled = [
  'current',
  'slope',
  'peakReverseCurrent',
  'timeToPeak',
  'fallTime',
  'recoveryTime',
  'charge',
  'softness',
  'softnessBySlopes',
] as const

/** Plateau, ramp and tail as fitted, at one sample. */
function fittedAt(window: EventWindow, ramp: FittedRamp, k: number): number {
  const time = window.time[k]!
  if (k >= ramp.fitted.from) return ramp.fitted.base - reverseCurrentAt(ramp.fitted.curve, time)
  return time < ramp.onset ? lineAt(ramp.plateau, time) : lineAt(ramp.line, time)
}
