import { quantile } from '../numerics/quantile.ts'
import { type CandidateDraws, isSettled } from './candidate-draws.ts'
import { lostShare } from './odds.ts'

/** Share of draws between `low` and `high` of every interval. */
export const intervalLevel = 0.9
/** The ends of the interval as quantiles. */
const intervalEnds = { low: (1 - intervalLevel) / 2, high: (1 + intervalLevel) / 2 } as const

/** What the draws of one candidate say about it. */
export interface DrawSummary {
  /** 5th and 95th percentile of the total over the draws not lost; null where all are. [W] */
  readonly total: { readonly low: number; readonly high: number } | null
  /** 95th percentile of the junction temperature over the draws not lost. [K] */
  readonly junctionHigh: number | null
  readonly lostShare: number
}

/**
 * Interval of a candidate's total and its high junction temperature. Lost draws have no number and are left out;
 * their share stands beside the interval, which is therefore always finite.
 *
 * @throws Never.
 */
export function summariseDraws(candidate: Pick<CandidateDraws, 'stageLoss' | 'total' | 'junction'>): DrawSummary {
  const settled = (_: number, draw: number): boolean => isSettled(candidate.stageLoss[draw]!)
  const total = candidate.total.filter(settled)
  return {
    total: drawInterval(total),
    junctionHigh: total.length > 0 ? quantile(candidate.junction.filter(settled), intervalEnds.high) : null,
    lostShare: lostShare(candidate.stageLoss),
  }
}

/** 5th and 95th percentile of finite values; null without any. */
export function drawInterval(values: Float64Array): { low: number; high: number } | null {
  if (values.length === 0) return null
  return { low: quantile(values, intervalEnds.low), high: quantile(values, intervalEnds.high) }
}
