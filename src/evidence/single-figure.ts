import type { RecoveryPoint } from './invert-pair.ts'
import { type FigureName, type LogFigure, logFigure, type RampReading, steadyEvent } from './recovery-figures.ts'

/** What the class expects at a row's condition. */
export interface ExpectedPoint extends RecoveryPoint {
  readonly lifetimeVariance: number
  readonly ratioVariance: number
}

/** One figure of a row, linearised. */
export interface LinearisedFigure {
  readonly point: RecoveryPoint
  readonly figure: LogFigure
}

/** d ln figure/d u below which solving for u would invent a lifetime far from any part: a peak near its ceiling I e^y. */
const leastSensitivity = 0.6
/** ln of the figure by which the nearest point may miss it: far below any reading error. */
const metWithin = 1e-3

/**
 * The point at which a single figure is linearised: u solved at the y that the class gives. Where the figure does not
 * determine u (softness, which is about y, and a peak near its ceiling), the point nearest to the class's centre, in
 * standard deviations, that gives the figure. Null where no part that the class allows for shows such a figure.
 */
export function linearisedFigure(
  reading: RampReading,
  name: FigureName,
  value: number,
  expected: ExpectedPoint,
): LinearisedFigure | null {
  const target = Math.log(value)
  const solved = name === 'softness' ? null : lifetimeGiving(reading, name, target, expected)
  if (solved !== null && solved.figure.byLifetime >= leastSensitivity) return solved
  const nearest = nearestPoint(reading, name, target, expected)
  return Math.abs(target - nearest.figure.value) < metWithin ? nearest : null
}

/** u at a fixed y that gives ln figure = target, by Newton's steps kept inside a bracket; null where none does. */
export function lifetimeGiving(
  reading: RampReading,
  name: FigureName,
  target: number,
  at: RecoveryPoint,
): LinearisedFigure | null {
  let low = shortest
  let high = longest
  let lifetime = Math.min(Math.max(at.lifetime, low), high)
  for (let iteration = 0; iteration < 80; iteration++) {
    const figure = figureAt(reading, name, lifetime, at.ratio)
    const missing = target - figure.value
    if (missing > 0) low = lifetime
    else high = lifetime
    const step = missing / figure.byLifetime
    if (Math.abs(step) < 1e-13 * (1 + Math.abs(lifetime))) return { point: { lifetime, ratio: at.ratio }, figure }
    const next = lifetime + step
    lifetime = next > low && next < high ? next : 0.5 * (low + high)
    if (high - low < 1e-13) break
  }
  if (low <= shortest + 1e-9 || high >= longest - 1e-9) return null
  return { point: { lifetime, ratio: at.ratio }, figure: figureAt(reading, name, lifetime, at.ratio) }
}

/** Bounds of u: 0.1 fs to 50 s, far outside any part. */
const shortest = Math.log(1e-16)
const longest = Math.log(50)

function nearestPoint(
  reading: RampReading,
  name: FigureName,
  target: number,
  expected: ExpectedPoint,
): LinearisedFigure {
  let point: RecoveryPoint = expected
  let figure = figureAt(reading, name, point.lifetime, point.ratio)
  for (let iteration = 0; iteration < 60; iteration++) {
    const alongLifetime = expected.lifetimeVariance * figure.byLifetime
    const alongRatio = expected.ratioVariance * figure.byRatio
    const away =
      target -
      figure.value +
      figure.byLifetime * (point.lifetime - expected.lifetime) +
      figure.byRatio * (point.ratio - expected.ratio)
    const multiplier = away / (figure.byLifetime * alongLifetime + figure.byRatio * alongRatio)
    const lifetime = expected.lifetime + multiplier * alongLifetime
    const ratio = expected.ratio + multiplier * alongRatio
    const change = Math.abs(lifetime - point.lifetime) + Math.abs(ratio - point.ratio)
    // half steps settle where full ones would swing from side to side of a bend
    const part = iteration < 3 ? 1 : 0.5
    point = {
      lifetime: clamp(point.lifetime + part * (lifetime - point.lifetime), expected.lifetime, 6),
      ratio: clamp(point.ratio + part * (ratio - point.ratio), expected.ratio, 8),
    }
    figure = figureAt(reading, name, point.lifetime, point.ratio)
    if (change < 1e-12) break
  }
  return { point, figure }
}

function clamp(value: number, centre: number, reach: number): number {
  return Math.min(Math.max(value, centre - reach), centre + reach)
}

function figureAt(reading: RampReading, name: FigureName, lifetime: number, ratio: number): LogFigure {
  return logFigure(steadyEvent(reading, lifetime, ratio), reading, name)
}
