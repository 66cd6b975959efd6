import { decidedOdds } from '../decision/verdict.ts'
import { celsiusZero } from '../domain/constants.ts'
import type { RectifierRecord } from '../domain/rectifier.ts'
import type { CandidateResult, LossesResult } from '../domain/result.ts'
import type { Stage } from '../domain/stage.ts'
import type { StudySettings, SwapResult } from '../domain/study.ts'
import { StudyRefusal } from '../domain/study-refusal.ts'
import { quantile } from '../numerics/quantile.ts'
import { type Assessment, assessCandidate } from './assess-candidate.ts'
import { prepareCandidate } from './candidate.ts'
import { caution, stageCautions } from './cautions.ts'
import { runProfile } from './duty-profile.ts'
import { deliversCold } from './nominal-point.ts'
import { notCovered } from './not-covered.ts'
import { candidateCaveats, stageCaveats } from './point-caveats.ts'
import { documentHead, placeRanks, stageResult, warningsOf } from './rank.ts'
import { runawaySurroundings } from './runaway-surroundings.ts'
import { breakEvenFrequency } from './swap-break-even.ts'
import { swapGrounds } from './swap-grounds.ts'
import { swapLoads } from './swap-loads.ts'
import { type DrawnStage, drawAll, withDraws } from './uncertainty.ts'

/** Part in use and the part that would replace it. */
export interface SwapRequest {
  readonly from: string
  readonly to: string
}

/**
 * Is replacing one rectifier by another justified: row by row, paired draw by draw, over frequency and over the year.
 * The same part twice gives exactly zero everywhere.
 *
 * @throws StudyRefusal For a part that is not in the records, or a stage that cannot deliver its power.
 */
export function swap(
  stage: Stage,
  records: readonly RectifierRecord[],
  request: SwapRequest,
  settings: StudySettings,
): SwapResult {
  const [from, to] = [request.from, request.to].map((id) => assess(stage, records, id)) as [Assessment, Assessment]
  const pair = from.result.id === to.result.id ? [from] : [from, to]
  const drawn = settings.draws > 0 ? drawAll(stage, pair, settings.seed, settings.draws) : null
  const results = placeRanks(pair.map(({ result }) => (drawn === null ? result : withDraws(result, drawn))))
  const resultOf = (id: string): CandidateResult =>
    withYear(stage, id === from.result.id ? from : to, results.find((each) => each.id === id)!)
  const fromResult = resultOf(from.result.id)
  const toResult = resultOf(to.result.id)
  const saves = savingOf(fromResult, toResult, drawn)
  const loads = swapLoads(stage, from.candidate, to.candidate)
  const partial = {
    stage: stageResult(stage, pair, results),
    from: fromResult,
    to: toResult,
    difference_w: differenceOf(fromResult, toResult),
    saves_w: saves.interval,
    odds_better: saves.odds,
    break_even_hz: breakEvenFrequency(stage, from.candidate.record, to.candidate.record, records),
    energy_kwh_per_year: minus(fromResult.energy_kwh_per_year, toResult.energy_kwh_per_year),
    junction_change_k: minus(toResult.junction_c, fromResult.junction_c),
    switch_junction_change_k: minus(toResult.switch.junction_c, fromResult.switch.junction_c),
    price_difference: minus(toResult.price, fromResult.price),
    runaway_ambient_c: runawayCelsius(to),
    loads,
    verdict: verdictOfSwap(fromResult, toResult, saves.odds),
  }
  return {
    ...documentHead(settings),
    ...partial,
    verdict_text: '',
    because: swapGrounds(partial),
    warnings: warningsOf([...pair.flatMap(candidateCaveats), ...stageCaveats(pair)]),
    cautions: [
      ...stageCautions(
        stage,
        pair.map(({ candidate }) => candidate.record),
        pair.map((each) => each.peakReverseVoltage),
      ),
      ...swapCautions(from, to),
    ],
    not_covered: notCovered(stage),
  }
}

function assess(stage: Stage, records: readonly RectifierRecord[], id: string): Assessment {
  const record = records.find((each) => each.id === id)
  if (record === undefined) {
    throw new StudyRefusal('part-unknown', {
      found: id,
      expected: records
        .map((each) => each.id)
        .sort()
        .join(', '),
      hint: 'name a record of the stage',
    })
  }
  const candidate = prepareCandidate(stage, record, records)
  if (!deliversCold(candidate.kernel)) {
    throw new StudyRefusal('cannot-deliver', {
      power: stage.output.voltage * stage.output.current,
      voltage: stage.input.voltage,
    })
  }
  return assessCandidate(candidate)
}

function withYear(stage: Stage, { candidate, point }: Assessment, result: CandidateResult): CandidateResult {
  if (stage.dutyProfile === null || point === null) return result
  const profile = runProfile(candidate, stage.dutyProfile)
  return { ...result, weighted_w: profile.weightedLoss, energy_kwh_per_year: profile.energy }
}

function minus(a: number | null, b: number | null): number | null {
  return a === null || b === null ? null : a - b
}

function differenceOf(from: CandidateResult, to: CandidateResult): SwapResult['difference_w'] {
  const at = (key: keyof LossesResult): number | null => minus(to.losses_w[key], from.losses_w[key])
  return {
    conduction: at('conduction'),
    recovery_rectifier: at('recovery_rectifier'),
    recovery_switch: at('recovery_switch'),
    capacitive: at('capacitive'),
    leakage: at('leakage'),
    forward_recovery: at('forward_recovery'),
    total: at('total'),
    stage: minus(to.stage_loss_w, from.stage_loss_w),
  }
}

interface Saving {
  readonly interval: SwapResult['saves_w']
  readonly odds: number | null
}

/** Paired saving of stage loss. A draw in which only the old part has no temperature counts as better, and the reverse as worse. */
function savingOf(from: CandidateResult, to: CandidateResult, drawn: DrawnStage | null): Saving {
  const none = { interval: { median: null, low: null, high: null }, odds: null }
  const before = drawn?.parts.find(({ id }) => id === from.id)?.stageLoss
  const after = drawn?.parts.find(({ id }) => id === to.id)?.stageLoss
  if (before === undefined || after === undefined) return none
  const saved = before.map((loss, k) => loss - after[k]!)
  let better = 0
  for (let k = 0; k < saved.length; k++) if (before[k]! > after[k]!) better++
  const settled = saved.filter(Number.isFinite)
  if (settled.length === 0) return { ...none, odds: better / saved.length }
  return {
    interval: { median: quantile(settled, 0.5), low: quantile(settled, 0.05), high: quantile(settled, 0.95) },
    odds: better / saved.length,
  }
}

/**
 * A swap is justified when the new part may be used and saves with the odds that decide a ranking; and whatever it
 * costs, when the part in use may not be used at all.
 */
function verdictOfSwap(from: CandidateResult, to: CandidateResult, odds: number | null): string {
  if (!to.accepted || from.id === to.id) return 'not-justified'
  if (!from.accepted) return 'justified'
  if (odds === null) return (from.stage_loss_w ?? 0) > (to.stage_loss_w ?? 0) ? 'not-settled' : 'not-justified'
  if (odds >= decidedOdds) return 'justified'
  return odds <= 1 - decidedOdds ? 'not-justified' : 'not-settled'
}

function runawayCelsius({ candidate }: Assessment): number | null {
  const edge = runawaySurroundings(candidate)
  return edge === null ? null : edge - celsiusZero
}

/** Cautions that belong to the exchange itself. */
function swapCautions(from: Assessment, to: Assessment): SwapResult['cautions'] {
  if (from.result.id === to.result.id) return []
  const [before, after] = [from.result.event?.qrr_c, to.result.event?.qrr_c]
  const known = before !== undefined && after !== undefined
  return [
    ...(to.candidate.record.class === 'schottky' ? [caution('leakage-and-voltage-of-schottky', {})] : []),
    // Where a part has no temperature nobody knows which recovers less: the caution then stays.
    ...(known && after >= before ? [] : [caution('faster-edges', {})]),
    caution('gate-drive-retune', {}),
  ]
}
