import type { RectifierRecord } from '../domain/rectifier.ts'
import type { Stage } from '../domain/stage.ts'
import type { TrendQuantity } from '../domain/study.ts'
import { findRoot } from '../numerics/find-root.ts'
import { type Candidate, prepareCandidate } from './candidate.ts'
import { type Judgement, judge } from './judge-candidate.ts'
import { stageLossOf } from './nominal-point.ts'
import { stageAt } from './stage-variation.ts'

/** One candidate somewhere along the axis. */
export interface TrendSpot {
  readonly candidate: Candidate
  readonly judgement: Judgement
  /** Null without a stable temperature. [W] */
  readonly stageLoss: number | null
}

/** Solves any candidate anywhere along one axis; the temperature is settled anew each time. */
export interface TrendSolver {
  readonly spotAt: (record: RectifierRecord, value: number) => TrendSpot
  /** The stage as it is stated, wherever that lies. */
  readonly spotHere: (record: RectifierRecord) => TrendSpot
  /** Position where a function of the spot changes sign between two values, to 1e-6 of the axis. */
  readonly crossing: (f: (value: number) => number, low: number, high: number) => number | null
  /** Last position from `low` on at which `holds` is still true, when it is false at `high`. */
  readonly edge: (holds: (value: number) => boolean, low: number, high: number) => number
}

/** Positions are solved to this share of the axis's span. */
const axisTolerance = 1e-7

export function trendSolver(
  stage: Stage,
  records: readonly RectifierRecord[],
  over: TrendQuantity,
  span: number,
): TrendSolver {
  const solve = (varied: Stage, record: RectifierRecord): TrendSpot => {
    const candidate = prepareCandidate(varied, record, records)
    const judgement = judge(candidate)
    const { point } = judgement
    return { candidate, judgement, stageLoss: point === null ? null : stageLossOf(candidate, point.rows) }
  }
  return {
    spotAt: (record, value) => solve(stageAt(stage, over, value), record),
    spotHere: (record) => solve(stage, record),
    crossing: (f, low, high) =>
      findRoot({ f, low, high, tolerance: axisTolerance * span, maxIterations: 200 })?.root ?? null,
    edge: (holds, low, high) => {
      let inside = low
      let outside = high
      while (Math.abs(outside - inside) > axisTolerance * span) {
        const middle = (inside + outside) / 2
        if (middle === inside || middle === outside) break
        if (holds(middle)) inside = middle
        else outside = middle
      }
      return inside
    },
  }
}
