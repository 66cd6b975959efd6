import type { Caveat } from '../domain/caveat.ts'
import { celsiusZero } from '../domain/constants.ts'
import type { CandidateResult, PointResult, Reason } from '../domain/result.ts'
import { gradeEvidence, guessWords } from '../evidence/grade-evidence.ts'
import { forwardDrop } from '../models/forward-drop.ts'
import type { Instant } from '../stage/kernel.ts'
import { row } from '../stage/kernel.ts'
import { conductionModeOf } from '../stage/settled-point.ts'
import { settle } from '../stage/thermal-balance.ts'
import { junctionLimitOf } from '../stage/thermal-network.ts'
import type { Candidate } from './candidate.ts'
import { eventResult, maximumEvent } from './event-result.ts'
import { type Judgement, judge, runawayReason } from './judge-candidate.ts'
import { lossesResult } from './losses-result.ts'
import { highestSurroundings, type NominalPoint, snubberLoss, stageLossOf } from './nominal-point.ts'
import { coldCondition, conditionOf, originsAt } from './point-condition.ts'
import { lowestOverInputs } from './stage-inputs.ts'

/** A candidate's nominal result with what later steps (draws, caveats) need of its solution. */
export interface Assessment extends Judgement {
  readonly candidate: Candidate
  readonly result: CandidateResult
  /** How far the figures were moved from the record's rows. */
  readonly caveats: readonly Caveat[]
}

/** Solves one candidate at the nominal parameters, judges it and describes it. */
export function assessCandidate(candidate: Candidate): Assessment {
  const judgement = judge(candidate)
  const { point } = judgement
  if (point === null)
    return { candidate, result: unsettledResult(candidate, judgement.reasons), ...judgement, caveats: [] }
  const origins = originsAt(candidate, point)
  const result = { ...settledResult(candidate, point, judgement), provenance: origins.provenance }
  return { candidate, result, ...judgement, caveats: origins.caveats }
}

function settledResult(
  candidate: Candidate,
  point: NominalPoint,
  judgement: Judgement,
): Omit<CandidateResult, 'provenance'> {
  const { mains } = judgement
  const reasons = judgement.reasons.map((reason) =>
    reason.code === 'runaway-at-maximum-leakage' ? runawayReason(candidate) : reason,
  )
  const peak = judgement.peakReverseVoltage!
  const { stage, record, kernel } = candidate
  const { rows } = point
  const stageLoss = stageLossOf(candidate, rows)
  const output = stage.output.voltage * stage.output.current
  const limit = junctionLimitOf(stage, record)
  const surroundings = lowestOverInputs(
    candidate,
    (at) => highestSurroundings(at.kernel, limit) ?? Number.NEGATIVE_INFINITY,
  )
  // The search above leaves the kernel elsewhere; later steps expect it at the nominal point.
  settle(kernel)
  return {
    ...identity(candidate),
    accepted: reasons.length === 0,
    reasons,
    evidence: gradeEvidence({
      record: candidate.read,
      rectifier: candidate.rectifier,
      condition: conditionOf(candidate, point),
    }),
    point: pointResult(point.instant),
    event: eventResult(candidate, point.event, point.event.hot, point.junction, peak),
    event_maximum: maximumEvent(candidate, point, peak),
    forward_v: forwardVoltage(candidate, point),
    losses_w: lossesResult(rows),
    junction_c: point.junction - celsiusZero,
    junction_limit_c: limit - celsiusZero,
    thermal: point.outcome,
    ambient_margin_k: surroundings === null ? null : surroundings - kernel.thermal.reference,
    voltage_margin: 1 - peak / record.ratings.reverseVoltage,
    efficiency: output / (output + stageLoss),
    stage_loss_w: stageLoss,
    switch: {
      conduction_w: rows[row.switchConduction]!,
      turn_on_base_w: rows[row.turnOnBase]!,
      turn_off_w: rows[row.turnOff]!,
      stored_w: rows[row.stored]!,
      junction_c: point.switchJunction - celsiusZero,
    },
    inductor_w: rows[row.inductor]!,
    snubber_w: snubberLoss(stage.snubberCapacitance, kernel),
    fixed_w: stage.fixedLosses,
    at_mains: mains,
    line: stage.kind === 'mains-boost' ? { continuous_share: point.continuousShare } : null,
  }
}

/** What every result holds before anything is solved. */
function identity(candidate: Candidate) {
  const { record } = candidate
  return {
    id: record.id,
    rank: null,
    class: record.class,
    title: record.title,
    price: record.price,
    evidence_because: guessWords(candidate.rectifier),
    interval_w: null,
    odds_best: null,
    odds_error: null,
    thermal_lost_share: null,
    junction_high_c: null,
    weighted_w: null,
    energy_kwh_per_year: null,
  }
}

/** Result of a part without a stable temperature: nothing that depends on temperature is stated. */
function unsettledResult(candidate: Candidate, reasons: Reason[]): CandidateResult {
  const { stage, record, kernel } = candidate
  return {
    ...identity(candidate),
    accepted: false,
    reasons,
    evidence: gradeEvidence({
      record: candidate.read,
      rectifier: candidate.rectifier,
      condition: coldCondition(candidate),
    }),
    point: null,
    event: null,
    event_maximum: null,
    forward_v: null,
    losses_w: lossesResult(null),
    junction_c: null,
    junction_limit_c: junctionLimitOf(stage, record) - celsiusZero,
    thermal: 'none',
    ambient_margin_k: null,
    voltage_margin: null,
    efficiency: null,
    stage_loss_w: null,
    switch: { conduction_w: null, turn_on_base_w: null, turn_off_w: null, stored_w: null, junction_c: null },
    inductor_w: null,
    snubber_w: snubberLoss(stage.snubberCapacitance, kernel),
    fixed_w: stage.fixedLosses,
    at_mains: null,
    line: null,
    provenance: [],
  }
}

function pointResult(instant: Instant): PointResult {
  return {
    duty: instant.duty,
    mean_a: instant.meanCurrent,
    ripple_a: instant.ripple,
    valley_a: instant.valley,
    peak_a: instant.peak,
    mode: conductionModeOf(instant),
  }
}

function forwardVoltage(candidate: Candidate, point: NominalPoint): number {
  const { kernel } = candidate
  return forwardDrop({
    constant: kernel.hot.constant,
    logarithmic: kernel.hot.logarithmic,
    linear: kernel.hot.linear,
    ratedCurrent: kernel.part.ratedCurrent,
    line: kernel.part.line,
    current: point.event.instant.meanCurrent * kernel.hotShare,
  })
}
