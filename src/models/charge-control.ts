import type { RecoveryTimeDefinition } from '../domain/rectifier.ts'
import { meaningless } from './meaningless.ts'
import { exponentialExcess, scaledTimeToPeak } from './ramp-root.ts'

/** Inputs of {@link chargeAtTurnOff}. */
export interface ChargeAtTurnOffInput {
  /** Ipk, forward current at the start of the conduction interval. [A] */
  readonly peakCurrent: number
  /** I, forward current at its end, where the switch turns on. [A] */
  readonly current: number
  /** t_on, length of the conduction interval. [s] */
  readonly conductionTime: number
  /** tau, carrier lifetime. [s] */
  readonly lifetime: number
}

/**
 * Charge stored in the rectifier at turn-off, built from zero while the current runs linearly from Ipk to I.
 *
 * Equation: q0 = tau [(I + m tau) − (Ipk + m tau) exp(−t_on/tau)], m = (Ipk − I)/t_on; written as a positive mean of Ipk and I.
 *
 * Valid for: any t_on/tau, to rounding; t_on → ∞ gives the steady tau I.
 * Deviations: the junction is empty at the start of the interval.
 *
 * @returns Stored charge q0. [C]
 * @throws RangeError when lifetime is not positive.
 * @see P. O. Lauritzen & C. L. Ma, IEEE Trans. Power Electronics 6(2), 1991, 188-191; solution own, checked against an ODE.
 * @example chargeAtTurnOff({ peakCurrent: 16, current: 8, conductionTime: 4e-6, lifetime: 60e-9 }) // 4.87200e-7
 */
export function chargeAtTurnOff(input: ChargeAtTurnOffInput): number {
  if (!(input.lifetime > 0)) throw meaningless('chargeAtTurnOff', 'lifetime', input.lifetime)
  const z = input.conductionTime / input.lifetime
  if (!(z > 0)) return 0
  const excess = exponentialExcess(z)
  const late = excess / z
  // over very many lifetimes z − excess would be the difference of two equal numbers
  const grown = z > longPast ? 1 : z - excess
  return input.lifetime * (input.current * late + input.peakCurrent * Math.max(0, grown - late))
}

/** exp(−z) is nothing beside 1 beyond this. */
const longPast = 40

/** Inputs of {@link timeToPeak} and {@link rampRecovery}. */
export interface RampInput {
  /** I, current at the start of the ramp; negative where reverse current already flows. [A] */
  readonly current: number
  /** a, |di/dt| of the ramp. [A/s] */
  readonly slope: number
  /** tau, carrier lifetime. [s] */
  readonly lifetime: number
  /** tau_rr, time constant of the recovery tail; 1/tau_rr = 1/tau + 1/TM. [s] */
  readonly tailTime: number
  /** q0, charge stored at the start of the ramp; tau I in steady state. [C] */
  readonly storedCharge: number
}

/**
 * Time from the current's zero crossing to the peak reverse current, where the junction has emptied.
 *
 * Equation: ta = (tau − tau_rr)(1 − exp(−T1/tau)(1 + (tau I − q0)/(a tau²))), T1 = I/a + ta: one root, to about 1e-13 of itself.
 *
 * Valid for: 0 ≤ tau_rr ≤ tau, q0 ≥ 0, any I; I = 0 and I < 0 included.
 * Deviations: ramp solution recalled from memory, verified against an ODE; breakdown, snap-off and the voltage are not in it.
 *
 * @returns ta. [s]
 * @throws RangeError when slope or lifetime is not positive, storedCharge is negative or tailTime is outside 0 to lifetime.
 * @see P. O. Lauritzen & C. L. Ma, IEEE Trans. Power Electronics 6(2), 1991, 188-191.
 * @example timeToPeak({ current: 8, slope: 200e6, lifetime: 60e-9, tailTime: 20e-9, storedCharge: 480e-9 }) // 2.68787e-8
 */
export function timeToPeak(input: RampInput): number {
  const { slope, lifetime, tailTime, storedCharge } = input
  if (!(slope > 0)) throw meaningless('timeToPeak', 'slope', slope)
  if (!(lifetime > 0)) throw meaningless('timeToPeak', 'lifetime', lifetime)
  if (!(tailTime >= 0 && tailTime <= lifetime)) throw meaningless('timeToPeak', 'tailTime', tailTime)
  if (!(storedCharge >= 0)) throw meaningless('timeToPeak', 'storedCharge', storedCharge)
  const unit = slope * lifetime
  return lifetime * scaledTimeToPeak(input.current / unit, storedCharge / (unit * lifetime), tailTime / lifetime)
}

/** Inputs of {@link recoveredCharge}. */
export interface RecoveredChargeInput {
  /** I_RM. [A] */
  readonly peakReverseCurrent: number
  /** ta. [s] */
  readonly timeToPeak: number
  /** tau_rr. [s] */
  readonly tailTime: number
}

/**
 * Recovered charge from the zero crossing to the end of the exponential tail.
 *
 * Equation: Qrr = I_RM (ta/2 + tau_rr). The junction's capacitive charge is not in it.
 *
 * Valid for: any event that starts with current I ≥ 0. Deviations: none.
 *
 * @returns Qrr. [C]
 * @throws Never.
 * @see P. O. Lauritzen & C. L. Ma, 1991, as above.
 * @example recoveredCharge({ peakReverseCurrent: 5.37575, timeToPeak: 26.8787e-9, tailTime: 20e-9 }) // 1.79762e-7
 */
export function recoveredCharge(input: RecoveredChargeInput): number {
  return input.peakReverseCurrent * (0.5 * input.timeToPeak + input.tailTime)
}

/**
 * The whole ramp event: time to the peak, peak reverse current and charge, with the tail time it was given.
 *
 * Equation: ta of {@link timeToPeak}, I_RM = a ta, Qrr of {@link recoveredCharge}. Valid for: I ≥ 0. Deviations: none.
 *
 * @returns ta [s], I_RM [A], tau_rr [s], Qrr [C].
 * @throws RangeError as timeToPeak does.
 * @see P. O. Lauritzen & C. L. Ma, 1991, as above.
 * @example rampRecovery({ current: 1, slope: 50e6, lifetime: 150e-9, tailTime: 30e-9, storedCharge: 150e-9 }).charge // 9.67016e-8
 */
export function rampRecovery(input: RampInput): RecoveredChargeInput & { readonly charge: number } {
  const time = timeToPeak(input)
  const event = { peakReverseCurrent: input.slope * time, timeToPeak: time, tailTime: input.tailTime }
  return { ...event, charge: recoveredCharge(event) }
}

/** k of the line through 0.9 and 0.25 I_RM: reach of 0.25 plus the line's rest to zero. */
const line90To25 = Math.log(4) + (Math.log(3.6) * 0.25) / 0.65
/** k of the line through 0.75 and 0.5 I_RM. */
const line75To50 = Math.LN2 + 2 * Math.log(1.5)

/**
 * k, the number of tail times after the peak at which the recovery time ends: trr = ta + k tau_rr.
 *
 * Equation: on exp(−t/tau_rr) the line through two levels meets zero at k; a level L gives ln(1/L), an absolute one ln(I_RM/I_x).
 *
 * Valid for: the model's exponential tail; `unknown` is read as line-90-25; a level above I_RM gives 0. Deviations: none.
 *
 * @returns k. [1]
 * @throws Never.
 * @see IEC 60747-2 (definitions by line and by level); the values follow from the exponential.
 * @example recoveryTimeFactor({ definition: { kind: 'line-90-25' }, peakReverseCurrent: 5 }) // 1.87896
 */
export function recoveryTimeFactor(input: {
  readonly definition: RecoveryTimeDefinition
  /** I_RM, used by an absolute level only. [A] */
  readonly peakReverseCurrent: number
}): number {
  const { definition, peakReverseCurrent } = input
  if (definition.kind === 'level') return Math.max(0, Math.log(peakReverseCurrent / definition.until))
  if (definition.kind === 'line-75-50') return line75To50
  if (definition.kind === 'level-25') return Math.log(4)
  return definition.kind === 'level-10' ? Math.LN10 : line90To25
}
