/** Inputs of {@link tailShare}. */
export interface TailShareInput {
  /** t_fv, time in which the switch's voltage falls linearly after the current peak. [s] */
  readonly voltageFall: number
  /** tau_rr, time constant of the recovery tail. [s] */
  readonly tailTime: number
}

/**
 * Share of the recovery tail's energy that heats the rectifier; the switch takes the rest.
 *
 * Equation: g = (1 − exp(−x))/x, x = t_fv/tau_rr. Assumes a voltage that moves linearly over t_fv from the peak on.
 *
 * Valid for: any t_fv ≥ 0, g = 1 at t_fv = 0. Deviations: none.
 *
 * @returns g. [1]
 * @throws Never.
 * @see Own integration of v i over the exponential tail; checked against quadrature.
 * @example tailShare({ voltageFall: 15e-9, tailTime: 20e-9 }) // 0.703511
 */
export function tailShare(input: TailShareInput): number {
  if (!(input.voltageFall > 0)) return 1
  const x = input.voltageFall / input.tailTime
  return -Math.expm1(-x) / x
}

/** Inputs of {@link baseEnergy}. */
export interface BaseEnergyInput {
  /** V, blocking voltage. [V] */
  readonly voltage: number
  /** I, current at turn-on. [A] */
  readonly current: number
  /** a, |di/dt| of the turn-on. [A/s] */
  readonly slope: number
  /** t_fv. [s] */
  readonly voltageFall: number
}

/**
 * Turn-on energy of the switch with an ideal rectifier: linear current rise at full voltage, then linear voltage fall.
 *
 * Equation: E_base = V I (I/a)/2 + V I t_fv/2.
 *
 * Valid for: I ≥ 0, a > 0. Deviations: the switch's own output charge is not in it.
 *
 * @returns E_base, heats the switch. [J]
 * @throws Never.
 * @see Area of linear overlap: P. Haaf & J. Harper, power seminar on switching losses, Fig. II-1.
 * @example baseEnergy({ voltage: 400, current: 8, slope: 200e6, voltageFall: 15e-9 }) // 8.80000e-5
 */
export function baseEnergy(input: BaseEnergyInput): number {
  return 0.5 * input.voltage * input.current * (input.current / input.slope + input.voltageFall)
}

/** Inputs of {@link rectifierEnergy}. */
export interface RectifierEnergyInput {
  /** V, blocking voltage. [V] */
  readonly voltage: number
  /** I_RM. [A] */
  readonly peakReverseCurrent: number
  /** tau_rr. [s] */
  readonly tailTime: number
  /** g, from {@link tailShare}. [1] */
  readonly tailShare: number
}

/**
 * Energy of one recovery that heats the rectifier.
 *
 * Equation: E_rectifier = V I_RM tau_rr g. Together with the switch's share it is V (Qrr + I ta), whatever t_fv.
 *
 * Valid for: an exponential tail. Deviations: loop inductance and ringing are not in it.
 *
 * @returns E_rectifier. [J]
 * @throws Never.
 * @see Own integration of v i over the event; checked against quadrature.
 * @example rectifierEnergy({ voltage: 400, peakReverseCurrent: 5.37575, tailTime: 20e-9, tailShare: 0.703511 }) // 3.02552e-5
 */
export function rectifierEnergy(input: RectifierEnergyInput): number {
  return input.voltage * input.peakReverseCurrent * input.tailTime * input.tailShare
}

/** Inputs of {@link switchAddedEnergy}. */
export interface SwitchAddedEnergyInput extends RectifierEnergyInput {
  /** I, current at turn-on. [A] */
  readonly current: number
  /** ta. [s] */
  readonly timeToPeak: number
}

/**
 * Energy of one recovery that heats the switch, on top of {@link baseEnergy}.
 *
 * Equation: E_switch_added = V (I ta + I_RM ta/2 + I_RM tau_rr (1 − g)).
 *
 * Valid for: an event that starts with current I ≥ 0. Deviations: loop inductance and ringing are not in it.
 *
 * @returns E_switch_added. [J]
 * @throws Never.
 * @see Own integration of v i over the event; checked against quadrature.
 * @example switchAddedEnergy({ voltage: 400, current: 8, timeToPeak: 26.8787e-9, peakReverseCurrent: 5.37575, tailTime: 20e-9, tailShare: 0.703511 }) // 1.27661e-4
 */
export function switchAddedEnergy(input: SwitchAddedEnergyInput): number {
  const { voltage, current, timeToPeak, peakReverseCurrent, tailTime, tailShare } = input
  return voltage * (timeToPeak * (current + 0.5 * peakReverseCurrent) + peakReverseCurrent * tailTime * (1 - tailShare))
}
