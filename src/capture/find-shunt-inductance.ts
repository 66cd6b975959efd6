import type { EventWindow } from './event-window.ts'
import { lineAt } from './fit-line.ts'
import type { FittedRamp } from './fit-ramp.ts'

/**
 * Time constant L/R by which an inductive shunt makes the ramp jump at its start. [s]
 * A shunt with inductance reads i + (L/R) di/dt: the plateau lasts until the ramp begins, but the line through zero,
 * extended back, meets the plateau earlier. Samples above both lines at their corner show it; every honest rounding
 * (bandwidth, a slow switch) lies below them. Null where nothing stands out of the noise.
 */
export function inductiveJump(window: EventWindow, ramp: FittedRamp): number | null {
  const slope = -ramp.line.rise
  const { time, current } = window
  const near = 0.5 * (ramp.crossing - ramp.onset)
  let best = 0
  for (let k = 1; k + 1 < time.length && time[k]! < ramp.onset + near; k++) {
    if (time[k]! < ramp.onset) continue
    const above = (offset: number) => current[k + offset]! - lineAt(ramp.line, time[k + offset]!)
    best = Math.max(best, Math.min(above(-1), above(0), above(1)))
  }
  const noise = ramp.plateau.residual
  const jump = best / slope
  const span = ramp.current + ramp.curve.amplitude
  return best > Math.max(2.5 * noise, 0.01 * span) && jump > 1.2 * window.interval ? jump : null
}
