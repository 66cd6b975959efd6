import { rampRecovery } from '../../src/models/charge-control.ts'

export interface Condition {
  readonly current: number
  readonly slope: number
  readonly junction: number
}

/** What a data sheet would print of one recovery; trr by the line through 90 % and 25 %. */
export interface Figures {
  readonly charge: number
  readonly peakReverseCurrent: number
  readonly recoveryTime: number
}

/** k of the line through 0.9 and 0.25 I_RM: ln 4 + 0.25 ln 3.6/0.65 (PHYSICS section 1 prints 1.87896). */
const lineFactor = Math.log(4) + (0.25 * Math.log(3.6)) / 0.65

/** The lumped-charge event from the steady state at u = ln tau and y = ln(tau/tau_rr − 1). */
export function lumpedFigures({ current, slope }: Condition, u: number, y: number): Figures {
  const lifetime = Math.exp(u)
  const tailTime = lifetime / (1 + Math.exp(y))
  const event = rampRecovery({ current, slope, lifetime, tailTime, storedCharge: lifetime * current })
  return {
    charge: event.charge,
    peakReverseCurrent: event.peakReverseCurrent,
    recoveryTime: event.timeToPeak + lineFactor * tailTime,
  }
}

/** Energy that one event costs the stage, V (Qrr + I ta), in units of V. */
export function eventCharge({ current, slope }: Condition, figures: Figures): number {
  return figures.charge + (current * figures.peakReverseCurrent) / slope
}
