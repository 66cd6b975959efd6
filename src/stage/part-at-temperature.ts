import { referenceTemperature } from '../domain/constants.ts'
import type { Kernel, PartState } from './kernel.ts'

/** Searches may step below absolute zero where the surroundings are near it. [K] */
const coldest = 1

/**
 * Moves a part's properties to a junction temperature, in place.
 * u and y take ln(T/T0), V_F is linear in T, ln I_R in 1/T (CalibratedRectifier names the bases).
 */
export function moveToTemperature(kernel: Kernel, state: PartState, junction: number): void {
  const c = kernel.coefficients
  const absolute = Math.max(junction, coldest)
  const part = kernel.part
  const rise = junction - referenceTemperature
  state.constant = c[8]! + rise * c[11]!
  state.logarithmic = c[9]! + rise * c[12]!
  state.linear = c[10]! + rise * c[13]!
  if (part.storesCharge) {
    const logTemperature = Math.log(absolute / referenceTemperature)
    state.lifetimeLog = c[0]! + c[3]! * logTemperature
    state.ratioLog = c[4]! + c[7]! * logTemperature
  }
  if (part.leaks) {
    state.leakageLog = c[14]! + c[15]! * (1 / referenceTemperature - 1 / absolute)
    state.leakage = leakageOf(state.leakageLog + c[16]! * kernel.blockingLog)
  }
  if (part.synchronous) {
    state.channelResistance = Math.max(
      part.channelResistance25 * (1 + part.channelPerKelvin * rise),
      0.1 * part.channelResistance25,
    )
  }
}

/** Reverse current at a voltage. [A] */
export function leakageAt(kernel: Kernel, state: PartState, voltage: number): number {
  if (voltage <= 0) return 0
  return leakageOf(state.leakageLog + kernel.coefficients[16]! * Math.log(voltage / kernel.part.ratedVoltage))
}

/** A reverse current beyond 1 kA only says "runs away"; the bound keeps sums finite. */
function leakageOf(logarithm: number): number {
  return Math.exp(Math.min(logarithm, 7))
}
