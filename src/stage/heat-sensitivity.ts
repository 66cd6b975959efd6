import { referenceTemperature } from '../domain/constants.ts'
import { type Kernel, type RecoveryEvent, row } from './kernel.ts'

/** How the heat of rectifier and switch answers to their temperatures at the last evaluation, for one part. [W/K] */
export const sensitivity = {
  /** Heat of the rectifier per kelvin of its own junction. */
  rectifier: 0,
  /** Heat of the switch per kelvin of the rectifier's junction, and of its own. */
  switchByRectifier: 0,
  switchOwn: 0,
}

/** Logarithmic derivatives of one event's energies with respect to ln T. */
const event = { rectifier: 0, switchAdded: 0 }

/**
 * Estimates the derivatives of the heat rows from the ledger in the kernel, without another evaluation: exact for the
 * temperature coefficients of forward drop, leakage, on-resistance and of a hard recovery with its charge built up; what
 * moves with the currents is left out. Solvers use it for their first step and to tell a stable root by a wide margin;
 * it never reaches a result.
 */
export function placeSensitivity(kernel: Kernel): void {
  const { rows, temperatures, coefficients: c, part } = kernel
  const junction = temperatures[0]!
  eventSensitivity(kernel, kernel.hotEvent)
  const leakage = part.leaks ? (rows[row.leakage]! * c[15]!) / (junction * junction) : 0
  sensitivity.rectifier =
    conductionSensitivity(kernel) + leakage + (rows[row.recoveryRectifier]! * event.rectifier) / junction
  sensitivity.switchByRectifier = (rows[row.recoverySwitch]! * event.switchAdded) / junction
  const growth = 1 + kernel.onResistancePerKelvin * (temperatures[1]! - referenceTemperature)
  sensitivity.switchOwn = growth > 0.1 ? (rows[row.switchConduction]! * kernel.onResistancePerKelvin) / growth : 0
}

/** Mean current times the drift of the drop at a typical current of the conduction interval. [W/K] */
function conductionSensitivity({ coefficients: c, part, instant, hotShare, rows }: Kernel): number {
  const mean = rows[row.meanRectifierCurrent]!
  if (part.synchronous) return rows[row.conduction]! * part.channelPerKelvin
  const share = (0.5 * (Math.max(instant.valley, 0) + instant.peak) * hotShare) / part.ratedCurrent
  const logarithm = part.line ? 0 : Math.log(Math.max(share, 0.01))
  return mean * (c[11]! + c[12]! * logarithm + c[13]! * share)
}

/**
 * From x = (1 − ρ)(1 − exp(−z)) with q0 = tau I (timeToPeak): dx (1 − k) = −k s du + ρ x dy, k = 1 − ρ − x;
 * and from g = (1 − exp(−v))/v: d ln g/d ln tau_rr = 1 − 1/g + v.
 */
function eventSensitivity({ coefficients: c, voltageFall }: Kernel, hot: RecoveryEvent): void {
  event.rectifier = 0
  event.switchAdded = 0
  const { current, lifetime, tailTime, timeToPeak, peakReverseCurrent, tailShare, rectifierEnergy } = hot
  if (!(rectifierEnergy > 0 && timeToPeak > 0)) return
  const ratio = tailTime / lifetime
  const x = timeToPeak / lifetime
  const k = Math.max(1 - ratio - x, 0)
  const s = current / (hot.slope * lifetime)
  const peak = c[3]! + (ratio * c[7]! - (k * s * c[3]!) / x) / (1 - k)
  const tail = c[3]! - (1 - ratio) * c[7]!
  const share = 1 - 1 / tailShare + voltageFall / tailTime
  event.rectifier = peak + tail * (1 + share)
  const rising = (current + 0.5 * peakReverseCurrent) * timeToPeak
  const inTail = peakReverseCurrent * tailTime
  const grown =
    (current + peakReverseCurrent) * timeToPeak * peak +
    inTail * ((1 - tailShare) * (peak + tail) - tailShare * share * tail)
  event.switchAdded = grown / (rising + inTail * (1 - tailShare))
}
