import type { EventWindow } from './event-window.ts'
import type { FittedRamp } from './fit-ramp.ts'

/**
 * Time from the corner of the current to the onset of the reverse voltage. [s]
 * The junction empties at the current's peak, and only then does the voltage move (charge control). The onset is read from
 * the times of 5, 25 and 50 % of the final voltage: extended back along a line where the rise begins straight, along a
 * parabola where it begins gently, and between the two by how the three times are spaced. Null without a voltage that rises.
 */
export function voltageOnsetAfterPeak(
  window: EventWindow,
  ramp: FittedRamp,
  conducting: number,
  blocking: number,
): number | null {
  const volts = window.voltage
  if (volts === null || !(blocking - conducting > 5 * Math.max(1, Math.abs(conducting)))) return null
  const at = (share: number) => reaches(window, volts, conducting + share * (blocking - conducting))
  const early = at(0.05)
  const late = at(0.25)
  const middle = at(0.5)
  const ratio = (middle - late) / (late - early)
  const gentle = Math.min(1, Math.max(0, (spacing.straight - ratio) / (spacing.straight - spacing.gentle)))
  const back = backward.straight + gentle * (backward.gentle - backward.straight)
  const skew = early - back * (late - early) - (ramp.fitted.curve.corner + ramp.fitted.curve.rounding)
  return Number.isFinite(skew) ? skew : null
}

/** (t50 − t25)/(t25 − t5) of a line and of a parabola: 25/20 and (7.07 − 5)/(5 − 2.24). */
const spacing = { straight: 1.25, gentle: 0.75 }
/** (t5 − t0)/(t25 − t5) of a line and of a parabola: 5/20 and 2.24/(5 − 2.24). */
const backward = { straight: 0.25, gentle: 0.81 }

/** Last crossing upwards before the highest reading: noise on the flat part cannot fool it. NaN where it is never below. */
function reaches(window: EventWindow, volts: Float64Array, level: number): number {
  let k = volts.indexOf(volts.reduce((top, value) => Math.max(top, value)))
  while (volts[k - 1]! > level) k -= 1
  const below = volts[k - 1]!
  const above = volts[k]!
  return window.time[k]! - (window.interval * (above - level)) / (above - below)
}
