import type { ThermalOutcome } from '../domain/result.ts'

/** Why a part is rejected. */
type RejectionCode =
  | 'voltage-margin'
  | 'average-current'
  | 'thermal-path-missing'
  | 'no-stable-temperature'
  | 'junction-over-limit'
  | 'runaway-at-maximum-leakage'
  | 'recovery-too-slow'

/** One reason with the figure that broke the rule, SI; null where there is no figure. */
export interface Rejection {
  readonly code: RejectionCode
  readonly value: number | null
  readonly limit: number | null
}

/** Inputs of {@link judgeCandidate}: each the worst over all mains voltages looked at. */
export interface AcceptanceInput {
  /** Highest reverse voltage with overshoot. [V] */
  readonly peakReverseVoltage: number
  /** Rating. [V] */
  readonly reverseVoltage: number
  /** Share of the rating that may be used. [1] */
  readonly voltageUse: number
  /** Mean rectifier current over the period, or the half cycle of the mains. [A] */
  readonly meanCurrent: number
  /** Rating of one part. [A] */
  readonly averageCurrent: number
  readonly parts: number
  /** `path-missing`: the record and the stage do not give the heat path. */
  readonly thermal: ThermalOutcome | 'path-missing'
  /** Null where there is no stable temperature or no path. [K] */
  readonly junction: number | null
  /** The lower of rating and stage limit. [K] */
  readonly junctionLimit: number
  /** A stable temperature exists at maximum leakage; null where it does not apply (body diodes). */
  readonly settledAtMaximumLeakage: boolean | null
  /** Time the recovery takes and the interval it has; null without recovery. [s] */
  readonly recovery: { readonly value: number; readonly limit: number } | null
}

/** A figure equal to its limit passes, also when rounding puts it a hair above. */
const rounding = 1e-9

/**
 * The acceptance rules: every reason to reject, in a fixed order; empty means accepted.
 *
 * Peak reverse voltage ≤ use × rating; mean current ≤ rating × parts; a heat path; a stable temperature; junction ≤
 * limit; stable at maximum leakage too; the recovery ends within its interval.
 *
 * @throws Never.
 */
export function judgeCandidate(input: AcceptanceInput): Rejection[] {
  const { recovery } = input
  return [
    ...above('voltage-margin', input.peakReverseVoltage, input.voltageUse * input.reverseVoltage),
    ...above('average-current', input.meanCurrent, input.averageCurrent * input.parts),
    ...judgeHeat(input),
    ...(recovery ? above('recovery-too-slow', recovery.value, recovery.limit) : []),
  ]
}

function judgeHeat(input: AcceptanceInput): Rejection[] {
  const { thermal, junction, junctionLimit: limit } = input
  if (thermal === 'path-missing') return [{ code: 'thermal-path-missing', value: null, limit: null }]
  // Without a temperature at the expected leakage there is none at the maximum either: one reason says it.
  if (thermal === 'none' || junction === null) return [{ code: 'no-stable-temperature', value: null, limit }]
  const over: Rejection = { code: 'junction-over-limit', value: junction, limit }
  const reasons = thermal === 'over-limit' ? [over] : above(over.code, junction, limit)
  if (input.settledAtMaximumLeakage === false) {
    reasons.push({ code: 'runaway-at-maximum-leakage', value: null, limit: null })
  }
  return reasons
}

function above(code: RejectionCode, value: number, limit: number): Rejection[] {
  return value <= limit * (1 + rounding) ? [] : [{ code, value, limit }]
}
