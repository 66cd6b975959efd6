import type { CaptureTrace, NothingMeasurable, ReducedCapture } from '../domain/capture.ts'
import { type CaptureContext, instrumentTime, resolution } from './capture-context.ts'
import { type EventWindow, eventWindow, leastWindow } from './event-window.ts'
import { channelQuantum } from './find-clipping.ts'
import { type FittedStep, fitStep } from './fit-step.ts'
import { generalCaveats } from './general-caveats.ts'
import { allPositive, knownDoubts } from './is-sound.ts'
import { reverseCurrentAt } from './recovery-curve.ts'
import { resampleStep } from './resample-step.ts'
import { rowSpread } from './row-spread.ts'
import { signOfVoltage } from './sign-of-voltage.ts'
import { stepDefects } from './step-defects.ts'
import { type StepFigures, stepFigures } from './step-figures.ts'
import { marksIn } from './window-marks.ts'

/** Reduces a resistor-limited reversal (PHYSICS: measured captures, step fixture). */
export function reduceStep(context: CaptureContext): ReducedCapture | null {
  const { settings } = context
  const voltageSign = signOfVoltage(context)
  const window = eventWindow(context.waveform, context.event, 'step', voltageSign)
  if (window.time.length < leastWindow) return null
  const marks = marksIn(window, context)
  const conditions = { instrument: instrumentTime(settings) }
  const shortest = Math.max(resolution(context), context.fixture?.edgeTime ?? 0)
  const step = fitStep(window, marks, conditions, shortest)
  const { fitted, curve, crossing } = step
  if (!allPositive([step.current, curve.tailTime, fitted.noise]) || !Number.isFinite(crossing + curve.corner))
    return null
  const shared = { offset: step.fitted.base, noise: step.fitted.noise, trace: traceOf(window, step) }
  const nothing = nothingMeasurable(window, step, shortest)
  if (nothing !== null && !allPositive([nothing.chargeUpperBound, nothing.timeUpperBound])) return null
  if (nothing !== null)
    return { figures: nothing, spread: {}, rowSpread: 0, caveats: generalCaveats(context, 1), ...shared }
  const figures = stepFigures(window, step, settings.recoveryTimeBy)
  const { endDoubt: _, ...plain } = figures
  if (!allPositive(Object.values(plain).filter((value) => value !== null))) return null
  const spread = stepSpread(context, window, step, figures, shortest)
  return {
    figures: { kind: 'step', ...plain },
    spread,
    rowSpread: rowSpread([spread.recoveryTime!, figures.storageTime === null ? 0 : spread.storageTime!]),
    caveats: [...generalCaveats(context, 1), ...stepDefects(context, window, step, figures)],
    ...shared,
  }
}

/** Widths of the reverse lobe, in shortest times told apart, that a charge needs to be one: with and without plateau. */
const needed = { plateau: 2, none: 6 }

/**
 * The fixture's own edge and the part's capacitance make a lobe as well: below these widths it cannot be told apart.
 * The bound adds the charge that the shortest time told apart may hide.
 */
function nothingMeasurable(window: EventWindow, step: FittedStep, shortest: number): NothingMeasurable | null {
  const lobe = reverseLobe(window, step)
  const told = Math.max(shortest, step.edgeTime, 2 * window.interval)
  const high = lobe.peak > Math.max(5 * step.fitted.noise, 0.02 * step.current)
  if (high && lobe.width > (step.plateau === null ? needed.none : needed.plateau) * told) return null
  return {
    kind: 'none-measurable',
    fixture: 'step',
    current: step.current,
    peakReverseCurrent: lobe.peak,
    chargeUpperBound: lobe.charge + 0.5 * lobe.peak * told,
    timeUpperBound: Math.max(lobe.width, told),
  }
}

/** First stretch of reverse current: its height, its width at half height, and its charge with the noise added. */
function reverseLobe(window: EventWindow, step: FittedStep): { peak: number; width: number; charge: number } {
  const { base, noise } = step.fitted
  const from = window.time.findIndex((time) => time > step.crossing)
  let peak = 0
  for (let k = from; k < window.time.length; k++) peak = Math.max(peak, base - window.current[k]!)
  let charge = 0
  let above = 0
  let count = 0
  let quiet = 0
  for (let k = from; k < window.time.length && quiet < 4; k++) {
    const reverse = base - window.current[k]!
    quiet = above > 0 && reverse < Math.max(2 * noise, 0.02 * peak) ? quiet + 1 : 0
    charge += Math.max(0, reverse)
    count += 1
    if (reverse > 0.5 * peak) above += 1
  }
  return {
    peak,
    width: above * window.interval,
    charge: (charge + 3 * noise * Math.sqrt(Math.max(1, count))) * window.interval,
  }
}

/** Noise by resampling, then edge, bandwidth and end rule; the lifetime carries the gap to the diffusion form. */
function stepSpread(
  context: CaptureContext,
  window: EventWindow,
  step: FittedStep,
  figures: StepFigures,
  shortest: number,
): Readonly<Record<string, number>> {
  const noise = resampleStep({ context, window, step, figures, shortest })
  // a crossing inside a finite edge is known to a fraction of it
  const edge =
    0.15 *
    Math.max(step.edgeTime, context.settings.bandwidth === null ? window.interval : 0.35 / context.settings.bandwidth)
  const converter = channelQuantum(context.waveform.current) / Math.sqrt(12)
  const model =
    figures.diffusionLifetime === null ? 0 : 0.5 * Math.abs(Math.log(figures.diffusionLifetime / figures.lifetime))
  return knownDoubts({
    current: Math.hypot(noise.current, converter / figures.current),
    reverse: Math.hypot(noise.reverse, converter / figures.reverse),
    ...(figures.storageTime === null ? {} : { storageTime: Math.hypot(noise.storageTime, edge / figures.storageTime) }),
    recoveryTime: Math.hypot(noise.recoveryTime, edge / figures.recoveryTime, figures.endDoubt),
    until: noise.reverse,
    lifetime: Math.hypot(noise.lifetime, model),
    tailTime: noise.tailTime,
  })
}

function traceOf(window: EventWindow, step: FittedStep): CaptureTrace {
  const { curve, base } = step.fitted
  const width = curve.corner - step.crossing
  const kept: number[] = []
  for (let k = 0; k < window.time.length; k++) {
    if (
      window.time[k]! > step.crossing - 0.4 * width - 2 * step.edgeTime &&
      window.time[k]! < curve.corner + 6 * curve.tailTime
    )
      kept.push(k)
  }
  return {
    time: Float64Array.from(kept, (k) => window.time[k]! - step.crossing),
    current: Float64Array.from(kept, (k) => window.current[k]! - base),
    fitted: Float64Array.from(kept, (k) => {
      const t = window.time[k]!
      // the edge has no model: it is drawn as it was sampled
      const sampled = window.current[k]! - base
      if (Math.abs(t - step.crossing) < 1.5 * step.edgeTime) return sampled
      const drawn = t < step.crossing ? step.forward.value - base : -reverseCurrentAt(curve, t)
      // a fit that means nothing (none measurable) may run out of numbers
      return Number.isFinite(drawn) ? drawn : sampled
    }),
    voltage: window.voltage === null ? null : Float64Array.from(kept, (k) => window.voltage![k]!),
  }
}
