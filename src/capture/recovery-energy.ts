import type { EventWindow } from './event-window.ts'
import type { FittedRamp } from './fit-ramp.ts'
import { fallsTo, peakTime, reverseCurrentAt } from './recovery-curve.ts'

/** Reverse voltage after the event and the energy from the peak on. */
export interface RecoveryEnergy {
  /** [V] */
  readonly voltage: number
  /** [J] */
  readonly energy: number
  /** Reading of the voltage channel while the rectifier conducts. [V] */
  readonly conducting: number
}

/** Share of the peak below which the fitted tail stands in for the samples. */
const quietShare = 0.03

/**
 * Energy = integral of reverse voltage × reverse current from the peak to the quiet end, the tail below 3 % of the peak
 * as its fitted exponential. While it conducts, a rectifier's reverse voltage is a drop below zero of at most 2 V: a
 * reading outside that is an offset of the channel and is moved to the nearer end.
 */
export function recoveryEnergy(window: EventWindow, ramp: FittedRamp): RecoveryEnergy | null {
  const volts = window.voltage
  if (volts === null) return null
  const { curve, base } = ramp.fitted
  const conducting = mean(
    volts,
    window.time,
    Number.NEGATIVE_INFINITY,
    ramp.crossing - 0.2 * (ramp.crossing - ramp.onset),
  )
  const shift = conducting - Math.min(0, Math.max(-2, conducting))
  const top = peakTime(curve)
  const reverse = (t: number) => reverseCurrentAt(curve, t)
  const quiet = Math.min(
    window.time[window.time.length - 1]!,
    fallsTo(reverse, top, curve.tailTime, quietShare * reverse(top)),
  )
  const voltage = mean(volts, window.time, quiet, quiet + 6 * curve.tailTime) - shift
  let sum = 0
  for (let k = 0; k < volts.length; k++) {
    if (window.time[k]! >= top && window.time[k]! < quiet) sum += (volts[k]! - shift) * (base - window.current[k]!)
  }
  return { voltage, energy: sum * window.interval + voltage * reverse(quiet) * curve.tailTime, conducting }
}

function mean(values: Float64Array, time: Float64Array, from: number, to: number): number {
  let sum = 0
  let count = 0
  for (let k = 0; k < values.length; k++) {
    if (time[k]! < from || time[k]! > to) continue
    sum += values[k]!
    count += 1
  }
  return count > 0 ? sum / count : (values[values.length - 1] ?? 0)
}
