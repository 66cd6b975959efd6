import { type CaptureContext, instrumentTime } from './capture-context.ts'
import type { EventWindow } from './event-window.ts'
import { type FittedStep, fitStep } from './fit-step.ts'
import { reverseCurrentAt } from './recovery-curve.ts'
import { type StepFigures, stepFigures } from './step-figures.ts'
import { marksIn } from './window-marks.ts'

const resampled = ['current', 'reverse', 'storageTime', 'recoveryTime', 'lifetime', 'tailTime'] as const

/** Relative standard deviation of each figure from the noise, by refitting the event with residuals drawn anew. */
export function resampleStep(input: {
  readonly context: CaptureContext
  readonly window: EventWindow
  readonly step: FittedStep
  readonly figures: StepFigures
  readonly shortest: number
}): Readonly<Record<(typeof resampled)[number], number>> {
  const { context, window, step, figures, shortest } = input
  const { fitted } = step
  const fittedAt = (k: number) => fitted.base - reverseCurrentAt(fitted.curve, window.time[k]!)
  const residuals = Float64Array.from(
    { length: fitted.to - fitted.from },
    (_, j) => window.current[fitted.from + j]! - fittedAt(fitted.from + j),
  )
  const draw = () => residuals[Math.floor(context.uniform() * residuals.length)]!
  const marks = marksIn(window, context)
  const sums = new Float64Array(resampled.length)
  for (let round = 0; round < context.refits; round++) {
    // the edge keeps its samples: its shape has no model
    const current = window.current.map((value, k) => {
      if (k >= fitted.from && k < fitted.to) return fittedAt(k) + draw()
      return window.time[k]! < step.crossing - 2 * step.edgeTime ? step.forward.value + draw() : value + draw()
    })
    const again = stepFigures(
      window,
      fitStep({ ...window, current }, marks, { instrument: instrumentTime(context.settings) }, shortest, step),
      context.settings.recoveryTimeBy,
    )
    resampled.forEach((name, i) => {
      const ratio = Math.min(1, Math.max(-1, (again[name] ?? 0) / (figures[name] ?? 1) - 1))
      sums[i] = sums[i]! + (Number.isFinite(ratio) ? ratio * ratio : 1)
    })
  }
  return Object.fromEntries(
    resampled.map((name, i) => [name, Math.sqrt(sums[i]! / Math.max(1, context.refits))]),
  ) as Record<(typeof resampled)[number], number>
}
