import type { EventWindow } from './event-window.ts'
import { type FittedCorner, fitCorner } from './fit-corner.ts'
import { type FittedLine, fitLevel, fitLine, lineAt, lineReaches } from './fit-line.ts'
import type { RecoveryCurve } from './recovery-curve.ts'

/** What the settings say that the fit needs. */
export interface FitConditions {
  /** Time constant of probe and oscilloscope, 1/(2 pi bandwidth); null when unknown. [s] */
  readonly instrument: number | null
}

/** A commutation taken apart. */
export interface FittedRamp {
  readonly plateau: FittedLine
  readonly line: FittedLine
  readonly fitted: FittedCorner
  /** The curve with the stated bandwidth taken out; half of the rounding where none is stated. */
  readonly curve: RecoveryCurve
  /** Forward current at the start of the ramp. [A] */
  readonly current: number
  /** True time of the zero crossing, the instrument's delay removed. [s] */
  readonly crossing: number
  /** Where line and plateau meet. [s] */
  readonly onset: number
}

/** Where the event stands in the window, from the first look. */
export interface WindowMarks {
  readonly edge: number
  readonly crossing: number
  readonly peak: number
  readonly half: number
  readonly quarter: number
  readonly forward: number
  readonly base: number
  readonly lowest: number
}

/**
 * Baseline, plateau, line through zero from 0.5 I_F to −0.5 I_RM, corner and tail; three rounds settle the levels, one is
 * enough from a fit of nearly the same samples.
 */
export function fitRamp(
  window: EventWindow,
  marks: WindowMarks,
  conditions: FitConditions,
  near: FittedRamp | null = null,
): FittedRamp {
  let base = near?.fitted.base ?? marks.base
  let forward = near?.current ?? marks.forward
  let reverse = near?.curve.amplitude ?? marks.base - marks.lowest
  let result = near
  for (let round = near === null ? 0 : 2; round < 3; round++) {
    result = oneRound(window, marks, conditions, { base, forward, reverse }, result)
    base = result.fitted.base
    forward = result.current
    reverse = result.curve.amplitude
  }
  return result!
}

interface Levels {
  readonly base: number
  readonly forward: number
  readonly reverse: number
}

function oneRound(
  window: EventWindow,
  marks: WindowMarks,
  conditions: FitConditions,
  levels: Levels,
  previous: FittedRamp | null,
): FittedRamp {
  const settled = previous === null ? Number.NEGATIVE_INFINITY : previous.onset + 3 * (conditions.instrument ?? 0)
  const line = rampLine(window, marks, levels, settled)
  const plateau = plateauLine(window, marks, line, levels)
  const onset =
    (plateau.value - plateau.rise * plateau.at - line.value + line.rise * line.at) / (line.rise - plateau.rise)
  const current = lineAt(plateau, onset) - levels.base
  const guess = cornerGuess(window, marks, conditions, line, levels, previous, plateau.residual)
  const early = firstAfter(window, lineReaches(line, levels.base - 0.5 * levels.reverse))
  const from = Math.min(early, window.time.length - fewestSamples)
  const fitted = fitCorner(window, line, from, tailEnd(window, from, guess.corner, guess.tailTime), guess)
  const curve = withoutInstrument(fitted.curve, conditions.instrument)
  const delay = fitted.curve.rounding - curve.rounding
  return { plateau, line, fitted, curve, current, crossing: lineReaches(line, fitted.base) - delay, onset }
}

/**
 * A stated bandwidth explains that much of the rounding; what is left is the rectifier's own. Where none is stated, half of
 * it is taken as the instrument's: either extreme would be wrong by as much, and the doubt reaches both.
 */
export function withoutInstrument(curve: RecoveryCurve, instrument: number | null): RecoveryCurve {
  if (instrument === null) return { ...curve, rounding: 0.5 * curve.rounding }
  const rounding = curve.rounding < 1.5 * instrument ? 0 : curve.rounding - instrument
  return { ...curve, rounding }
}

/**
 * Line through the samples from 0.5 I_F to −0.5 I_RM. A first line finds them by their values, which cuts noise off on
 * one side at each end and tilts it; the second takes all samples between the times at which the first has those levels.
 * `settled`: before this time the instrument still bends the start of the ramp.
 */
function rampLine(window: EventWindow, marks: WindowMarks, levels: Levels, settled: number): FittedLine {
  const { time, current } = window
  const limit = settled < time[Math.max(0, marks.crossing - 4)]! ? settled : Number.NEGATIVE_INFINITY
  for (let share = 0.5; ; share += 0.1) {
    let from = marks.crossing
    while (from > 0 && current[from - 1]! < levels.base + share * levels.forward && time[from - 1]! > limit) from -= 1
    let to = marks.crossing
    while (to < marks.peak && current[to]! > levels.base - share * levels.reverse) to += 1
    // a ramp of a handful of samples: take in more of it
    if (to - from < 4 && share < 0.9) continue
    const first = fitLine(time, current, Math.min(from, to - 2), Math.max(to, from + 2))
    const begin = firstAfter(window, Math.max(limit, lineReaches(first, levels.base + share * levels.forward)))
    const end = firstAfter(window, lineReaches(first, levels.base - share * levels.reverse))
    return first.rise < 0 && end - begin >= 4 ? fitLine(time, current, begin, end) : first
  }
}

/** Plateau up to where the ramp's rounding may reach, on a sloping line where there is enough of it. */
function plateauLine(window: EventWindow, marks: WindowMarks, line: FittedLine, levels: Levels): FittedLine {
  const rampTime = -levels.forward / line.rise
  const onset = lineReaches(line, levels.base + levels.forward)
  let to = firstAfter(window, onset - 0.25 * rampTime)
  if (to < 8) to = Math.max(2, Math.min(marks.edge, firstAfter(window, onset)) - 2)
  let from = Math.max(0, firstAfter(window, window.time[to]! - 8 * rampTime))
  // the rise into a plateau that has only just begun is not plateau
  if (from === 0) from = Math.min(Math.floor(0.1 * to), to - 2)
  const sloping = fitLine(window.time, window.current, Math.max(0, from), to)
  // the droop of the inductor counts where it shows; the tilt that noise alone gives would only be extended
  const tilt = Math.abs(sloping.rise) * (window.time[to - 1]! - window.time[Math.max(0, from)]!)
  const byNoise = sloping.residual * Math.sqrt(12 / Math.max(1, to - from))
  return tilt > 3 * byNoise ? sloping : fitLevel(window.time, window.current, Math.max(0, from), to)
}

function cornerGuess(
  window: EventWindow,
  marks: WindowMarks,
  conditions: FitConditions,
  line: FittedLine,
  levels: Levels,
  previous: FittedRamp | null,
  noise: number,
) {
  const firstTail = Math.max(window.interval, ((marks.quarter - marks.half) * window.interval) / Math.LN2)
  const tailTime = previous?.fitted.curve.tailTime ?? firstTail
  const instrument = conditions.instrument ?? 0.03 * tailTime
  return {
    corner: previous?.fitted.curve.corner ?? lineReaches(line, levels.base - levels.reverse),
    tailTime,
    rounding: Math.max(instrument, 0.2 * window.interval),
    roundingDoubt: 1,
    base: previous?.fitted.base ?? levels.base,
    baseDoubt: 0.03 * (levels.forward + levels.reverse),
    noise: Math.max(noise, 1e-6 * levels.forward),
  }
}

/** Samples that corner and tail need to be fitted at all. */
const fewestSamples = 8

/** The tail is followed over twelve of its times. */
function tailEnd(window: EventWindow, from: number, corner: number, tailTime: number): number {
  return Math.max(from + fewestSamples, firstAfter(window, corner + 12 * tailTime))
}

/** First sample after a time; the number of samples when there is none. */
export function firstAfter(window: EventWindow, time: number): number {
  const k = Math.ceil((time - window.time[0]!) / window.interval)
  return Math.min(window.time.length, Math.max(0, k))
}
