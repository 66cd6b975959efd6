import { solveOde, solveToEvent } from './solve-ode.ts'

/** A ramp event in numbers without dimension: tau = 1, slope = 1. */
export interface RampCase {
  /** I. */
  readonly current: number
  /** q0. */
  readonly charge: number
  /** tau_rr. */
  readonly tail: number
}

export interface RampSolution {
  /** From the zero crossing of the current. */
  readonly timeToPeak: number
  readonly peak: number
  /** Reverse charge from the zero crossing, or from the start where the current is negative at once. */
  readonly reverseCharge: number
}

/** dq/dt = i − q/tau while the junction is full, i = −q/TM and the same after it has emptied: solved, not evaluated. */
export function rampByOde({ current, charge, tail }: RampCase): RampSolution {
  const transit = tail / (1 - tail)
  const imposed = (t: number) => current - t
  // second component: reverse charge
  const f = (t: number, [q]: number[]) => [imposed(t) - q!, Math.max(0, -imposed(t))]
  const crossing = Math.max(0, current)
  const beforeCrossing = solveOde(f, 0, [charge, 0], crossing)
  const most = { x: crossing, y: beforeCrossing, xMost: crossing + Math.max(2, 2 * charge) }
  const { x, y } = solveToEvent(f, most, (t, [q]) => q! + transit * imposed(t))
  const decay = (_t: number, [q]: number[]) => [-q! / transit - q!, q! / transit]
  const end = solveOde(decay, 0, [y[0]!, y[1]!], 40 * tail)
  return { timeToPeak: x - current, peak: -imposed(x), reverseCharge: end[1]! }
}

/** Charge after a current that runs linearly from `peak` to `current` in `time`, from an empty junction. */
export function chargeByOde(peak: number, current: number, time: number): number {
  const f = (t: number, [q]: number[]) => [peak + ((current - peak) * t) / time - q!]
  return solveOde(f, 0, [0], time)[0]!
}

/** Soft recovery at slope m for an idle time: charge left and current that flows then. */
export function softByOde(slope: number, tail: number, charge: number, idle: number) {
  const transit = tail / (1 - tail)
  const ramp = (t: number, [q]: number[]) => [-slope * t - q!]
  const full = solveOde(ramp, 0, [charge], idle)[0]!
  if (full - transit * slope * idle >= 0) return { charge: full, current: -slope * idle, empty: false }
  const start = { x: 0, y: [charge], xMost: idle }
  const { x, y } = solveToEvent(ramp, start, (t, [q]) => q! - transit * slope * t)
  const left = solveOde((_t, [q]) => [-q! / tail], x, y, idle)[0]!
  return { charge: left, current: -left / transit, empty: true }
}

/** Energy of one turn-on by integration of v i, V = 1: heat in the rectifier and in the switch. */
export function energiesByOde({ current, charge, tail }: RampCase, fall: number) {
  const transit = tail / (1 - tail)
  const { timeToPeak } = rampByOde({ current, charge, tail })
  const peakTime = current + timeToPeak
  // until the peak the switch carries t at full voltage
  const rise = solveOde((t) => [t], 0, [0], peakTime)[0]!
  const tailCurrent = (q: number) => q / transit
  const moving = (t: number, [q]: number[]) => {
    const i = tailCurrent(q!)
    const blocked = fall > 0 ? Math.min(1, t / fall) : 1
    return [-q! / tail, blocked * i, (1 - blocked) * (current + i)]
  }
  const middle = solveOde(moving, 0, [transit * timeToPeak, 0, rise], fall)
  const end = solveOde(moving, fall, middle, fall + 40 * tail)
  return { rectifier: end[1]!, switch: end[2]! }
}
