/** Why a part that has an operating point is rejected. */
type RejectionCode =
  | 'voltage-margin'
  | 'average-current'
  | 'junction-over-limit'
  | 'runaway-at-maximum-leakage'
  | 'recovery-too-slow'

/** One reason with the figure that broke the rule, SI; null where there is no figure. */
export interface Rejection {
  readonly code: RejectionCode
  readonly value: number | null
  readonly limit: number | null
}

/** Inputs of {@link judgeCandidate}: each the worst over all inputs looked at. */
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
  /** [K] */
  readonly junction: number
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
 * Peak reverse voltage ≤ use × rating; mean current ≤ rating × parts; junction ≤ limit; stable at maximum leakage too; the recovery ends within its interval.
 *
 * @throws Never.
 */
export function judgeCandidate(input: AcceptanceInput): Rejection[] {
  const { recovery } = input
  return [
    ...above('voltage-margin', input.peakReverseVoltage, input.voltageUse * input.reverseVoltage),
    ...above('average-current', input.meanCurrent, input.averageCurrent * input.parts),
    ...above('junction-over-limit', input.junction, input.junctionLimit),
    ...(input.settledAtMaximumLeakage === false
      ? [{ code: 'runaway-at-maximum-leakage', value: null, limit: null } as const]
      : []),
    ...(recovery ? above('recovery-too-slow', recovery.value, recovery.limit) : []),
  ]
}

function above(code: RejectionCode, value: number, limit: number): Rejection[] {
  return value <= limit * (1 + rounding) ? [] : [{ code, value, limit }]
}
