import type { RecoveryTimeDefinition } from '../domain/rectifier.ts'

/** Inputs of {@link chargeAtTurnOff}. */
export interface ChargeAtTurnOffInput {
  /** Forward current at the start of the conduction interval. [A] */
  readonly peakCurrent: number
  /** Forward current at its end, where the switch turns on. [A] */
  readonly current: number
  /** Length of the conduction interval. [s] */
  readonly conductionTime: number
  /** Carrier lifetime. [s] */
  readonly lifetime: number
}

/**
 * Charge stored in the rectifier when the switch turns on, built from zero over one conduction interval.
 * @example chargeAtTurnOff({ peakCurrent: 16, current: 8, conductionTime: 4e-6, lifetime: 60e-9 }) // 4.87200e-7
 */
export function chargeAtTurnOff(input: ChargeAtTurnOffInput): number {
  const z = input.conductionTime / input.lifetime
  if (!(z > 0)) return 0
  const excess = exponentialExcess(z)
  const late = excess / z
  return input.lifetime * (input.current * late + input.peakCurrent * (z - excess - late))
}

/** Inputs of {@link timeToPeak}. */
export interface RampInput {
  /** Current at the start of the ramp; negative where reverse current already flows. [A] */
  readonly current: number
  /** |di/dt| of the ramp. [A/s] */
  readonly slope: number
  /** Carrier lifetime. [s] */
  readonly lifetime: number
  /** Time constant of the recovery tail, below the lifetime. [s] */
  readonly tailTime: number
  /** Charge stored at the start of the ramp. [C] */
  readonly storedCharge: number
}

/**
 * Time from the zero crossing of the current to the peak reverse current.
 * @example timeToPeak({ current: 8, slope: 200e6, lifetime: 60e-9, tailTime: 20e-9, storedCharge: 480e-9 }) // 2.68787e-8
 */
export function timeToPeak(input: RampInput): number {
  const lifetime = input.lifetime
  return (
    lifetime *
    scaledTimeToPeak(
      input.current / (input.slope * lifetime),
      input.storedCharge / (input.slope * lifetime * lifetime),
      input.tailTime / lifetime,
    )
  )
}

/**
 * The same root in numbers without dimension: all times over the lifetime, charge over slope × lifetime².
 */
export function scaledTimeToPeak(crossing: number, charge: number, tail: number): number {
  const weight = 1 + crossing - charge
  const share = 1 - tail
  let x = crossing < 0 ? -crossing : 0
  for (let iteration = 0; iteration < 60; iteration++) {
    const z = crossing + x
    const excess = z < 1 ? exponentialExcess(z) : z + Math.expm1(-z)
    const grown = z - excess
    const decay = 1 - grown
    const missing =
      z < 1
        ? share * (charge * decay + crossing * grown - excess) - tail * x
        : share * (grown - (crossing - charge) * decay) - x
    if (!(missing > 0)) return x
    const curvature = share * decay * weight
    const rise = 1 - curvature
    const step =
      curvature > 0 ? (2 * missing) / (rise + Math.sqrt(rise * rise + 2 * curvature * missing)) : missing / rise
    x += step
    if (step <= 1e-15 * x) return x
  }
  return x
}

/** Inputs of {@link recoveredCharge}. */
export interface RecoveredChargeInput {
  /** [A] */
  readonly peakReverseCurrent: number
  /** [s] */
  readonly timeToPeak: number
  /** [s] */
  readonly tailTime: number
}

/**
 * Recovered charge from the zero crossing to the end of the exponential tail.
 * @example recoveredCharge({ peakReverseCurrent: 5.37575, timeToPeak: 26.8787e-9, tailTime: 20e-9 }) // 1.79762e-7
 */
export function recoveredCharge(input: RecoveredChargeInput): number {
  return input.peakReverseCurrent * (0.5 * input.timeToPeak + input.tailTime)
}

/** Inputs of {@link recoveryTimeFactor}. */
export interface RecoveryTimeFactorInput {
  readonly definition: RecoveryTimeDefinition
  /** Used by an absolute level only. [A] */
  readonly peakReverseCurrent: number
}

/**
 * Number of tail times after the peak at which the recovery time ends, by its definition.
 * @example recoveryTimeFactor({ definition: { kind: 'line-90-25' }, peakReverseCurrent: 5 }) // 1.87896
 */
export function recoveryTimeFactor(input: RecoveryTimeFactorInput): number {
  const definition = input.definition
  switch (definition.kind) {
    case 'line-75-50':
      return 3 * Math.LN2 + Math.log(3 / 4) * 2
    case 'level-25':
      return Math.log(4)
    case 'level-10':
      return Math.LN10
    case 'level':
      return input.peakReverseCurrent > definition.until ? Math.log(input.peakReverseCurrent / definition.until) : 0
    default:
      return lineFactor
  }
}

const lineFactor = Math.log(4) + (Math.log(3.6) * 0.25) / 0.65

/** One ramp event as an object. */
export interface RampRecovery {
  readonly timeToPeak: number
  readonly peakReverseCurrent: number
  readonly charge: number
}

/** The ramp event as one object. */
export function rampRecovery(input: RampInput): RampRecovery {
  const time = timeToPeak(input)
  const peakReverseCurrent = input.slope * time
  return {
    timeToPeak: time,
    peakReverseCurrent,
    charge: recoveredCharge({ peakReverseCurrent, timeToPeak: time, tailTime: input.tailTime }),
  }
}

/** z − (1 − exp(−z)), to full precision at small z as well. */
function exponentialExcess(z: number): number {
  if (z > 0.05) return z + Math.expm1(-z)
  return (
    0.5 *
    z *
    z *
    (1 - (z / 3) * (1 - (z / 4) * (1 - (z / 5) * (1 - (z / 6) * (1 - (z / 7) * (1 - (z / 8) * (1 - z / 9)))))))
  )
}
