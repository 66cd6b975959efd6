import type { EventWindow } from './event-window.ts'
import { fitLeastSquares } from './fit-least-squares.ts'
import { type FittedLine, lineAt } from './fit-line.ts'
import { type RecoveryCurve, reverseCurrentAt } from './recovery-curve.ts'

/** One standard deviation of ln tail time before the fit: only a fit lost in noise feels it. */
const tailDoubt = 1.5

/** What is known before the tail is fitted. */
export interface CornerGuess {
  /** [s] */
  readonly corner: number
  readonly tailTime: number
  readonly rounding: number
  /** One standard deviation of ln rounding. */
  readonly roundingDoubt: number
  /** Baseline. [A] */
  readonly base: number
  /** How far an oscilloscope's zero may be off, one standard deviation. [A] */
  readonly baseDoubt: number
  /** Of one sample. [A] */
  readonly noise: number
}

/** Fall, corner, tail and baseline of one event. */
export interface FittedCorner {
  readonly curve: RecoveryCurve
  readonly base: number
  /** Root mean square of what is left over the fitted samples. [A] */
  readonly noise: number
  readonly from: number
  readonly to: number
}

/**
 * Fits corner, tail time, rounding and baseline to the samples after `from`, with the fall (or plateau) held.
 * The baseline carries what an oscilloscope's zero is worth, so that a truncated tail cannot invent one.
 */
export function fitCorner(
  window: EventWindow,
  line: FittedLine,
  from: number,
  to: number,
  guess: CornerGuess,
): FittedCorner {
  const parameters = [guess.corner, Math.log(guess.tailTime), Math.log(guess.rounding), guess.base]
  const scale = Math.max(guess.tailTime, window.interval)
  let noise = Math.max(guess.noise, 1e-4 * Math.abs(lineAt(line, guess.corner) - guess.base))
  let best: Float64Array = Float64Array.from(parameters)
  for (let pass = 0; pass < 2; pass++) {
    best = fitLeastSquares({
      residuals: (p, out) => writeResiduals(window, line, from, to, guess, noise, p, out),
      count: to - from + 3,
      start: best,
      steps: Float64Array.of(1e-3 * scale, 1e-3, 1e-3, 1e-3 * guess.baseDoubt + 1e-9),
      iterations: 40,
    })
    noise = Math.max(1e-9, leftOver(window, line, from, to, best))
  }
  return { curve: curveOf(line, best), base: best[3]!, noise, from, to }
}

function curveOf(line: FittedLine, p: ArrayLike<number>): RecoveryCurve {
  const rounding = Math.exp(p[2]!)
  const slope = -line.rise
  return {
    corner: p[0]!,
    slope,
    amplitude: slope * rounding - (lineAt(line, p[0]!) - p[3]!),
    tailTime: Math.exp(p[1]!),
    rounding,
  }
}

function writeResiduals(
  window: EventWindow,
  line: FittedLine,
  from: number,
  to: number,
  guess: CornerGuess,
  noise: number,
  p: Float64Array,
  out: Float64Array,
): void {
  const curve = curveOf(line, p)
  const base = p[3]!
  for (let k = from; k < to; k++) {
    out[k - from] = (window.current[k]! - base + reverseCurrentAt(curve, window.time[k]!)) / noise
  }
  out[to - from] = (p[2]! - Math.log(guess.rounding)) / guess.roundingDoubt
  out[to - from + 1] = base / guess.baseDoubt
  out[to - from + 2] = (p[1]! - Math.log(guess.tailTime)) / tailDoubt
}

function leftOver(window: EventWindow, line: FittedLine, from: number, to: number, p: Float64Array): number {
  const curve = curveOf(line, p)
  let sum = 0
  for (let k = from; k < to; k++) {
    const r = window.current[k]! - p[3]! + reverseCurrentAt(curve, window.time[k]!)
    sum += r * r
  }
  return Math.sqrt(sum / Math.max(1, to - from - 4))
}
