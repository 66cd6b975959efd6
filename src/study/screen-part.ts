import { judgeCandidate } from '../decision/accept.ts'
import type { RectifierRecord } from '../domain/rectifier.ts'
import type { Reason } from '../domain/result.ts'
import type { Stage } from '../domain/stage.ts'
import { row } from '../stage/kernel.ts'
import { settle } from '../stage/thermal-balance.ts'
import { hasThermalPath, junctionLimitOf } from '../stage/thermal-network.ts'
import { prepareCandidate } from './candidate.ts'
import { causeOfLoss } from './judge-candidate.ts'
import { stageLossOf } from './nominal-point.ts'
import { highestBlockingVoltage } from './stage-inputs.ts'

/** What a first look tells of a part. */
export interface Screened {
  /** Nominal stage loss, exact; null where the part is rejected. [W] */
  readonly stageLoss: number | null
  /** A rule that it breaks for sure; null: it may be acceptable. */
  readonly rejected: Reason['code'] | null
}

/**
 * A first look at a part, a small share of the cost of judging it: its stage loss, and whether a bound already rejects
 * it. The bounds are those of the rules themselves: no peak reverse voltage lies below the blocking voltage, and current
 * and junction at nominal input lie at or below their worst over the inputs. What passes is still to be judged.
 */
export function screenPart(
  stage: Stage,
  record: RectifierRecord,
  testRectifiers: readonly RectifierRecord[],
): Screened {
  const least = { ...lenient, peakReverseVoltage: highestBlockingVoltage(stage) }
  const rules = { ...least, reverseVoltage: record.ratings.reverseVoltage, voltageUse: stage.limits.voltageUse }
  const byVoltage = judgeCandidate(rules)[0]
  if (byVoltage !== undefined) return { stageLoss: null, rejected: byVoltage.code }
  if (!hasThermalPath(stage, record)) return { stageLoss: null, rejected: 'thermal-path-missing' }
  const candidate = prepareCandidate(stage, record, testRectifiers)
  const { kernel } = candidate
  if (!settle(kernel)) return { stageLoss: null, rejected: causeOfLoss(candidate) }
  const broken = judgeCandidate({
    ...lenient,
    meanCurrent: kernel.rows[row.meanRectifierCurrent]!,
    averageCurrent: record.ratings.averageCurrent,
    parts: kernel.parts,
    junction: kernel.temperatures[0]!,
    junctionLimit: junctionLimitOf(stage, record),
  })[0]
  if (broken !== undefined) return { stageLoss: null, rejected: broken.code }
  return { stageLoss: stageLossOf(candidate, kernel.rows), rejected: null }
}

/** Passes every rule: what is not looked at. */
const lenient = {
  peakReverseVoltage: 0,
  reverseVoltage: 1,
  voltageUse: 1,
  meanCurrent: 0,
  averageCurrent: 1,
  parts: 1,
  junction: 0,
  junctionLimit: 1,
  settledAtMaximumLeakage: null,
  recovery: null,
} as const
