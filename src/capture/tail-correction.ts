import type { EventWindow } from './event-window.ts'
import type { FittedCorner } from './fit-corner.ts'
import { reverseCurrentAt } from './recovery-curve.ts'

/** How far the samples lie from the fitted tail, smoothed: knots over time, added reverse current at each. */
export interface TailCorrection {
  readonly time: Float64Array
  readonly reverse: Float64Array
  /** The tail is not the fitted exponential beyond what noise explains. */
  readonly significant: boolean
  /** Largest knot. [A] */
  readonly largest: number
}

const knots = 14

/** Means of the residuals in equal stretches from the corner to five tail times. */
export function tailCorrection(window: EventWindow, fitted: FittedCorner): TailCorrection {
  const { corner, tailTime, rounding, amplitude } = fitted.curve
  const begin = corner + 2 * rounding
  const length = (5 * tailTime) / knots
  const sums = new Float64Array(knots)
  const counts = new Float64Array(knots)
  for (let k = fitted.from; k < fitted.to; k++) {
    const group = Math.floor((window.time[k]! - begin) / length)
    if (group < 0 || group >= knots) continue
    sums[group] = sums[group]! + fitted.base - window.current[k]! - reverseCurrentAt(fitted.curve, window.time[k]!)
    counts[group] = counts[group]! + 1
  }
  let significant = false
  let largest = 0
  for (let g = 0; g < knots; g++) {
    const count = counts[g]!
    sums[g] = count > 0 ? sums[g]! / count : 0
    largest = Math.max(largest, Math.abs(sums[g]!))
    if (count > 2 && Math.abs(sums[g]!) > Math.max((4 * fitted.noise) / Math.sqrt(count), 0.02 * amplitude))
      significant = true
  }
  return {
    time: Float64Array.from({ length: knots }, (_, g) => begin + (g + 0.5) * length),
    reverse: sums,
    significant,
    largest,
  }
}

/** Added reverse current at a time, straight between the knots and fading to nothing outside them. */
export function correctionAt(correction: TailCorrection, time: number): number {
  const { time: at, reverse } = correction
  const spacing = at[1]! - at[0]!
  const x = (time - at[0]!) / spacing
  const left = Math.floor(x)
  const value = (k: number) => (k < 0 || k >= at.length ? 0 : reverse[k]!)
  return value(left) * (1 - (x - left)) + value(left + 1) * (x - left)
}
