import type { EventWindow } from './event-window.ts'
import { type FittedCorner, fitCorner } from './fit-corner.ts'
import { type FittedLine, fitLevel, fitLine, lineReaches } from './fit-line.ts'
import { type FitConditions, firstAfter, type WindowMarks, withoutInstrument } from './fit-ramp.ts'
import type { RecoveryCurve } from './recovery-curve.ts'

/** A resistor-limited reversal taken apart. */
export interface FittedStep {
  readonly forward: FittedLine
  /** Reverse plateau; null where the current turns back at once. */
  readonly plateau: FittedLine | null
  readonly fitted: FittedCorner
  /** The curve with the stated bandwidth taken out. */
  readonly curve: RecoveryCurve
  /** [A] */
  readonly current: number
  /** Reverse plateau, or the height the tail starts from. [A] */
  readonly reverse: number
  /** [s] */
  readonly crossing: number
  /** 10 to 90 % of the fall from forward to reverse current. [s] */
  readonly edgeTime: number
  /** Where the reverse plateau begins. [s] */
  readonly edgeEnd: number
}

/** A plateau lasts at least these shares of the edge before it and of the tail after it; a shorter one is rounding. */
const leastPlateau = { edges: 0.7, tails: 0.12 }

/** Plateaus, zero crossing, corner and tail; three rounds settle the levels, one from a fit nearby. `resolution` is the shortest time told apart. */
export function fitStep(
  window: EventWindow,
  marks: WindowMarks,
  conditions: FitConditions,
  resolution: number,
  near: FittedStep | null = null,
): FittedStep {
  let levels = { base: near?.fitted.base ?? marks.base, reverse: near?.reverse ?? marks.base - marks.lowest }
  let result = near
  for (let round = near === null ? 0 : 2; round < 3; round++) {
    result = oneRound(window, marks, conditions, resolution, levels, result)
    levels = { base: result.fitted.base, reverse: result.reverse }
  }
  return result!
}

interface Levels {
  readonly base: number
  readonly reverse: number
}

function oneRound(
  window: EventWindow,
  marks: WindowMarks,
  conditions: FitConditions,
  resolution: number,
  levels: Levels,
  previous: FittedStep | null,
): FittedStep {
  const forward = forwardLevel(window, marks)
  const current = forward.value - levels.base
  const edge = edgeLine(window, marks, levels, current)
  const span = current + levels.reverse
  const early = lastBefore(window, marks, levels.base + current - 0.1 * span)
  const late = firstBelow(window, marks, levels.base - levels.reverse + 0.1 * span)
  const edgeTime = Math.max(0, late - early)
  const edgeEnd = late + 0.3 * edgeTime
  const firstTail = Math.max(window.interval, ((marks.quarter - marks.half) * window.interval) / Math.LN2)
  const tailTime = previous?.fitted.curve.tailTime ?? firstTail
  const corner = previous?.fitted.curve.corner ?? window.time[marks.half]! - Math.LN2 * tailTime
  const long =
    corner - edgeEnd > Math.max(leastPlateau.edges * Math.max(resolution, edgeTime), leastPlateau.tails * tailTime)
  const plateau = long ? reverseLevel(window, edgeEnd, corner) : null
  const line = plateau ?? edge
  const guess = {
    corner: Math.max(corner, edgeEnd - 0.5 * edgeTime),
    tailTime,
    rounding: Math.max(conditions.instrument ?? 0.03 * tailTime, 0.2 * window.interval),
    roundingDoubt: 1,
    base: levels.base,
    baseDoubt: 0.03 * span,
    noise: Math.max(forward.residual, 1e-6 * span),
  }
  const from = plateau === null ? firstAfter(window, edgeEnd) : firstAfter(window, edgeEnd + 0.3 * (corner - edgeEnd))
  const to = Math.max(from + 6, firstAfter(window, guess.corner + 12 * tailTime))
  const fitted = fitCorner(window, line, from, Math.min(window.time.length, to), guess)
  const curve = withoutInstrument(fitted.curve, conditions.instrument)
  return {
    forward,
    plateau,
    fitted,
    curve,
    current: forward.value - fitted.base,
    reverse: plateau === null ? fitted.base - marks.lowest : fitted.base - plateau.value,
    crossing: lineReaches(edge, fitted.base) - (conditions.instrument ?? 0),
    edgeTime,
    edgeEnd,
  }
}

/** Forward plateau: the later part of it, short of the edge. */
function forwardLevel(window: EventWindow, marks: WindowMarks): FittedLine {
  const fall = marks.crossing - marks.edge
  const to = Math.max(1, marks.edge - 3 * fall - 1)
  const from = to > 20 ? Math.floor(0.3 * to) : 0
  return fitLevel(window.time, window.current, from, to)
}

/** Middle of the reverse plateau: ringing of the edge and rounding of the corner stay out. */
function reverseLevel(window: EventWindow, edgeEnd: number, corner: number): FittedLine {
  const from = firstAfter(window, edgeEnd + 0.2 * (corner - edgeEnd))
  const to = firstAfter(window, edgeEnd + 0.8 * (corner - edgeEnd))
  return fitLevel(window.time, window.current, from, Math.max(from + 1, to))
}

/** The edge around zero: from half the forward to half the reverse current, two samples at least. */
function edgeLine(window: EventWindow, marks: WindowMarks, levels: Levels, current: number): FittedLine {
  let to = marks.crossing
  while (to > 1 && window.current[to - 1]! < levels.base) to -= 1
  while (to < window.current.length - 1 && window.current[to]! > levels.base) to += 1
  let from = to - 1
  while (from > 0 && window.current[from - 1]! < levels.base + 0.5 * current) from -= 1
  while (
    to + 1 < window.current.length &&
    window.current[to + 1]! > levels.base - 0.5 * levels.reverse &&
    window.current[to + 1]! < window.current[to]!
  )
    to += 1
  return fitLine(window.time, window.current, Math.max(0, from), to + 1)
}

/** Time of the last sample above a level before the crossing. */
function lastBefore(window: EventWindow, marks: WindowMarks, level: number): number {
  let k = Math.min(window.time.length - 1, marks.crossing)
  while (k > 0 && window.current[k]! < level) k -= 1
  return window.time[k]!
}

/** Time of the first sample below a level after the edge. */
function firstBelow(window: EventWindow, marks: WindowMarks, level: number): number {
  let k = marks.edge
  while (k < marks.half && window.current[k]! > level) k += 1
  return window.time[k]!
}
