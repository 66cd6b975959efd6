/** Inputs of {@link tailShare}. */
export interface TailShareInput {
  /** Time in which the switch's voltage falls after the current peak. [s] */
  readonly voltageFall: number
  /** Time constant of the recovery tail. [s] */
  readonly tailTime: number
}

/**
 * Share of the tail's energy that heats the rectifier.
 * @example tailShare({ voltageFall: 15e-9, tailTime: 20e-9 }) // 0.703511
 */
export function tailShare(input: TailShareInput): number {
  if (!(input.voltageFall > 0)) return 1
  const x = input.voltageFall / input.tailTime
  return -Math.expm1(-x) / x
}

/** Inputs of {@link baseEnergy}. */
export interface BaseEnergyInput {
  /** Blocking voltage. [V] */
  readonly voltage: number
  /** Current at turn-on. [A] */
  readonly current: number
  /** |di/dt| of the turn-on. [A/s] */
  readonly slope: number
  /** [s] */
  readonly voltageFall: number
}

/**
 * Turn-on energy of the switch with an ideal rectifier.
 * @example baseEnergy({ voltage: 400, current: 8, slope: 200e6, voltageFall: 15e-9 }) // 8.80000e-5
 */
export function baseEnergy(input: BaseEnergyInput): number {
  return 0.5 * input.voltage * input.current * (input.current / input.slope + input.voltageFall)
}

/** Inputs of {@link rectifierEnergy}. */
export interface RectifierEnergyInput {
  /** [V] */
  readonly voltage: number
  /** [A] */
  readonly peakReverseCurrent: number
  /** [s] */
  readonly tailTime: number
  /** From {@link tailShare}. [1] */
  readonly tailShare: number
}

/**
 * Energy of one recovery that heats the rectifier.
 * @example rectifierEnergy({ voltage: 400, peakReverseCurrent: 5.37575, tailTime: 20e-9, tailShare: 0.703511 }) // 3.02552e-5
 */
export function rectifierEnergy(input: RectifierEnergyInput): number {
  return input.voltage * input.peakReverseCurrent * input.tailTime * input.tailShare
}

/** Inputs of {@link switchAddedEnergy}. */
export interface SwitchAddedEnergyInput extends RectifierEnergyInput {
  /** Current at turn-on. [A] */
  readonly current: number
  /** [s] */
  readonly timeToPeak: number
}

/**
 * Energy of one recovery that heats the switch, on top of its own turn-on energy.
 * @example switchAddedEnergy({ voltage: 400, current: 8, timeToPeak: 26.8787e-9, peakReverseCurrent: 5.37575, tailTime: 20e-9, tailShare: 0.703511 }) // 1.27661e-4
 */
export function switchAddedEnergy(input: SwitchAddedEnergyInput): number {
  const { voltage, current, timeToPeak, peakReverseCurrent, tailTime, tailShare } = input
  return voltage * (timeToPeak * (current + 0.5 * peakReverseCurrent) + peakReverseCurrent * tailTime * (1 - tailShare))
}
