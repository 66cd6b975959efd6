import { currentFloor, referenceSlope, referenceTemperature } from '../domain/constants.ts'

/** Where a recovery takes place. */
export interface RecoveryCondition {
  /** I0. [A] */
  readonly ratedCurrent: number
  /** [A] */
  readonly current: number
  /** |di/dt|. [A/s] */
  readonly slope: number
  /** [K] */
  readonly junction: number
}

/** Designs of u = ln tau and y = ln(tau/tau_rr − 1) over the eight recovery coefficients. */
export function recoveryDesigns(condition: RecoveryCondition): readonly [lifetime: Float64Array, ratio: Float64Array] {
  const lnCurrent = Math.log(Math.max(condition.current / condition.ratedCurrent, currentFloor))
  const lnSlope = Math.log(condition.slope / referenceSlope)
  const lnHeat = Math.log(condition.junction / referenceTemperature)
  const lifetime = new Float64Array(8)
  const ratio = new Float64Array(8)
  lifetime[0] = ratio[4] = 1
  lifetime[1] = ratio[5] = lnCurrent
  lifetime[2] = ratio[6] = lnSlope
  lifetime[3] = ratio[7] = lnHeat
  return [lifetime, ratio]
}

/** Design of V_F over the six forward coefficients; below the current floor V_F is proportional to the current. */
export function forwardDesign(condition: {
  readonly ratedCurrent: number
  readonly current: number
  readonly junction: number
  readonly line: boolean
}): Float64Array {
  const { line, junction } = condition
  const stated = condition.current / condition.ratedCurrent
  const x = line ? stated : Math.max(stated, currentFloor)
  const part = stated < x ? stated / x : 1
  const logarithm = line ? 0 : part * Math.log(x)
  const rise = junction - referenceTemperature
  return Float64Array.of(part, logarithm, part * x, rise * part, rise * logarithm, rise * part * x)
}

/** Design of ln I_R over the three leakage coefficients. */
export function leakageDesign(condition: {
  readonly ratedVoltage: number
  readonly voltage: number
  readonly junction: number
}): Float64Array {
  return Float64Array.of(
    1,
    1 / referenceTemperature - 1 / condition.junction,
    Math.log(condition.voltage / condition.ratedVoltage),
  )
}
