import type { EventWindow } from './event-window.ts'
import type { FittedRamp } from './fit-ramp.ts'

/**
 * Time from the corner of the current to the onset of the reverse voltage. [s]
 * The junction empties at the current's peak, and only then does the voltage move (charge control). The onset is the
 * line through 5 and 25 % of the final voltage, extended to the voltage of conduction. Null without a voltage that rises.
 */
export function voltageOnsetAfterPeak(
  window: EventWindow,
  ramp: FittedRamp,
  conducting: number,
  blocking: number,
): number | null {
  const volts = window.voltage
  if (volts === null || !(blocking - conducting > 5 * Math.max(1, Math.abs(conducting)))) return null
  const early = reaches(window, volts, conducting + 0.05 * (blocking - conducting))
  const late = reaches(window, volts, conducting + 0.25 * (blocking - conducting))
  if (early === null || late === null) return null
  const onset = early - (late - early) / 4
  return onset - (ramp.fitted.curve.corner + ramp.fitted.curve.rounding)
}

/** Last crossing upwards before the voltage has reached half: noise on the flat part cannot fool it. */
function reaches(window: EventWindow, volts: Float64Array, level: number): number | null {
  let k = volts.length - 1
  let top = 0
  for (let j = 0; j < volts.length; j++) if (volts[j]! > volts[top]!) top = j
  k = top
  while (k > 0 && volts[k - 1]! > level) k -= 1
  if (k === 0) return null
  const below = volts[k - 1]!
  const above = volts[k]!
  return window.time[k]! - (window.interval * (above - level)) / Math.max(above - below, 1e-300)
}
