import type { CaptureTrace, NothingMeasurable, ReducedCapture } from '../domain/capture.ts'
import { type CaptureContext, instrumentTime, resolution } from './capture-context.ts'
import { correctSkew } from './correct-skew.ts'
import { type EventWindow, eventWindow, leastWindow } from './event-window.ts'
import { channelQuantum } from './find-clipping.ts'
import { lineAt } from './fit-line.ts'
import { type FittedRamp, fitRamp, type WindowMarks } from './fit-ramp.ts'
import { generalCaveats } from './general-caveats.ts'
import { allPositive, knownDoubts } from './is-sound.ts'
import { rampDefects } from './ramp-defects.ts'
import { type RampFigures, rampFigures } from './ramp-figures.ts'
import { reverseCurrentAt } from './recovery-curve.ts'
import { type RecoveryEnergy, recoveryEnergy } from './recovery-energy.ts'
import { resampleRamp } from './resample-ramp.ts'
import { rowSpread } from './row-spread.ts'
import { signOfVoltage } from './sign-of-voltage.ts'
import { marksIn } from './window-marks.ts'

/** Reduces a commutation at a set slope (PHYSICS: measured captures). */
export function reduceRamp(given: CaptureContext): ReducedCapture | null {
  const voltageSign = signOfVoltage(given)
  const context = { ...given, waveform: correctSkew(given.waveform, given.settings.currentDelay) }
  const { settings } = context
  const window = eventWindow(context.waveform, context.event, 'ramp', voltageSign)
  if (window.time.length < leastWindow) return null
  const marks = marksIn(window, context)
  const conditions = { instrument: instrumentTime(settings) }
  const ramp = fitRamp(window, marks, conditions)
  const { fitted, curve, crossing } = ramp
  if (!allPositive([ramp.current, curve.slope, curve.tailTime, fitted.noise]) || !Number.isFinite(crossing)) return null
  // A peak that lies behind the record was never seen, whatever the fit says of it.
  if (curve.corner > window.time[window.time.length - 1]!) return null
  const figures = rampFigures(window, ramp, settings.recoveryTimeBy, settings.chargeUntil)
  const energy = recoveryEnergy(window, ramp)
  const shared = { offset: ramp.fitted.base, noise: ramp.fitted.noise, trace: traceOf(window, ramp) }
  const nothing = nothingMeasurable(context, ramp, figures)
  if (nothing !== null && !allPositive([nothing.chargeUpperBound, nothing.timeUpperBound])) return null
  if (nothing !== null)
    return { figures: nothing, spread: {}, rowSpread: 0, caveats: generalCaveats(context, voltageSign), ...shared }
  const { endDoubt: _, chargeByEnd, ...plain } = figures
  if (!allPositive([...Object.values(plain), ...chargeByEnd.map((row) => row.charge)])) return null
  const spread = rampSpread(context, window, marks, ramp, figures, energy)
  return {
    figures: { kind: 'ramp', ...plain, chargeByEnd, voltage: energy?.voltage ?? null, energy: energy?.energy ?? null },
    spread,
    rowSpread: rowSpread([spread.recoveryTime!, spread.charge!, spread.peakReverseCurrent!]),
    caveats: [...generalCaveats(context, voltageSign), ...rampDefects(context, window, ramp, figures, energy)],
    ...shared,
  }
}

/** Reverse peaks below this share of the forward current are the fixture's. */
const leastPeak = 0.02

function nothingMeasurable(context: CaptureContext, ramp: FittedRamp, figures: RampFigures): NothingMeasurable | null {
  const seen = figures.peakReverseCurrent > Math.max(5 * ramp.fitted.noise, leastPeak * figures.current)
  const lasts = figures.timeToPeak + ramp.fitted.curve.tailTime > resolution(context)
  if (seen && lasts) return null
  const peak = Math.max(figures.peakReverseCurrent, 5 * ramp.fitted.noise)
  const time = Math.max(resolution(context), figures.timeToPeak + 2 * ramp.fitted.curve.tailTime)
  return {
    kind: 'none-measurable',
    fixture: 'ramp',
    current: figures.current,
    peakReverseCurrent: peak,
    chargeUpperBound: Math.max(0.5 * peak * time, wholeCharge(figures)),
    timeUpperBound: time,
  }
}

/** Charge of the whole tail, which stands among the ends whatever the stated one is. [C] */
function wholeCharge({ chargeByEnd }: RampFigures): number {
  return chargeByEnd.find(({ end }) => end === 0)!.charge
}

/** Noise by resampling, then bandwidth and end rule, as independent parts. */
function rampSpread(
  context: CaptureContext,
  window: EventWindow,
  marks: WindowMarks,
  ramp: FittedRamp,
  figures: RampFigures,
  energy: RecoveryEnergy | null,
): Readonly<Record<string, number>> {
  const { settings } = context
  const conditions = { instrument: instrumentTime(settings) }
  const noise = resampleRamp({
    window,
    marks,
    conditions,
    ramp,
    figures,
    definition: settings.recoveryTimeBy,
    chargeUntil: settings.chargeUntil,
    uniform: context.uniform,
    refits: context.refits,
  })
  // the same event with nothing, or everything, of the rounding taken out
  const other = settings.bandwidth === null ? { ...ramp.curve, rounding: 0 } : ramp.fitted.curve
  const crossing = ramp.crossing + other.rounding - ramp.curve.rounding
  const without = rampFigures(
    window,
    { ...ramp, curve: other, crossing },
    settings.recoveryTimeBy,
    settings.chargeUntil,
  )
  const share = settings.bandwidth === null ? 1 : 0.5
  // what one step of the converter leaves open: no averaging of noise takes its unevenness away
  const step = channelQuantum(context.waveform.current) / Math.sqrt(12)
  const converter: Readonly<Record<string, number>> = {
    current: step / figures.current,
    slope: step / (figures.current + figures.peakReverseCurrent),
    peakReverseCurrent: step / figures.peakReverseCurrent,
  }
  const spread: Record<string, number> = {}
  for (const [name, value] of Object.entries(noise)) {
    const key = name as keyof typeof noise
    const bandwidth = share * (without[key] / figures[key] - 1)
    const end =
      key === 'charge' ? 0.5 * (1 - figures.charge / wholeCharge(figures)) : timesEnd[key] ? figures.endDoubt : 0
    const settling = key === 'slope' ? unsettled(ramp) : 0
    spread[name] = Math.hypot(value, bandwidth, end, settling, converter[key] ?? 0)
  }
  if (energy !== null) spread.energy = Math.hypot(spread.charge!, 0.01)
  if (energy !== null) spread.voltage = 0.01
  return knownDoubts(spread)
}

/** Share of the slope that the instrument still lacks where the line through zero begins. */
function unsettled({ curve, fitted, current }: FittedRamp): number {
  return Math.exp((-0.5 * current) / (curve.slope * fitted.curve.rounding))
}

/** Figures that move with the end of the recovery time. */
const timesEnd: Readonly<Record<string, boolean>> = { recoveryTime: true, fallTime: true, softness: true }

/** The event for plots: from one ramp time before the ramp to eight tail times after the peak. */
function traceOf(window: EventWindow, ramp: FittedRamp): CaptureTrace {
  const { curve, base } = ramp.fitted
  const lead = 0.6 * (ramp.crossing - ramp.onset)
  const kept: number[] = []
  for (let k = 0; k < window.time.length; k++) {
    if (window.time[k]! > ramp.onset - lead && window.time[k]! < curve.corner + 6 * curve.tailTime) kept.push(k)
  }
  return {
    time: Float64Array.from(kept, (k) => window.time[k]! - ramp.crossing),
    current: Float64Array.from(kept, (k) => window.current[k]! - base),
    fitted: Float64Array.from(kept, (k) => {
      const t = window.time[k]!
      const tail = t < curve.corner ? lineAt(ramp.line, t) - base : -reverseCurrentAt(curve, t)
      const drawn = t < ramp.onset ? lineAt(ramp.plateau, t) - base : tail
      return Number.isFinite(drawn) ? drawn : window.current[k]! - base
    }),
    voltage: window.voltage === null ? null : Float64Array.from(kept, (k) => window.voltage![k]!),
  }
}
