import { compareIds, orderCandidates } from '../decision/order-candidates.ts'
import type { Caveat } from '../domain/caveat.ts'
import type { RectifierRecord } from '../domain/rectifier.ts'
import type { CandidateResult, RankResult, StageResult, Verdict, Warning } from '../domain/result.ts'
import type { Stage } from '../domain/stage.ts'
import type { StudySettings } from '../domain/study.ts'
import { StudyRefusal } from '../domain/study-refusal.ts'
import { blockingVoltageOf } from '../stage/create-kernel.ts'
import { type Assessment, assessCandidate } from './assess-candidate.ts'
import { prepareCandidate } from './candidate.ts'
import { stageCautions } from './cautions.ts'
import { drawListed } from './draw-listed.ts'
import type { ProfileResult } from './duty-profile.ts'
import { listParts, usualListing } from './list-parts.ts'
import { deliversCold } from './nominal-point.ts'
import { notCovered } from './not-covered.ts'
import { orderCaveats } from './order-caveats.ts'
import { askFor, doAllSteps, type PartSteps, type PartWork } from './part-work.ts'
import { candidateCaveats, sortCaveats, stageCaveats } from './point-caveats.ts'
import { verdictOf, withDraws } from './uncertainty.ts'

/** Named in every result: which event the energies belong to. */
const lossModel = 'charge control; voltage moves after the peak'

/**
 * The main job: every candidate's losses, temperature, efficiency and margins at the stage's operating point, judged,
 * ranked by what the choice costs the stage, with the doubt of the order.
 *
 * @param records All records at hand; `stage.candidates` (or all) are ranked, the others serve a measured turn-on.
 * @throws StudyRefusal When there is no candidate, or the stage cannot deliver its power.
 */
export function rank(stage: Stage, records: readonly RectifierRecord[], settings: StudySettings): RankResult {
  return doAllSteps(rankSteps(stage, records, settings))
}

/** {@link rank} step by step: who goes through the steps decides where the work on the parts is done. */
export function* rankSteps(
  stage: Stage,
  records: readonly RectifierRecord[],
  settings: StudySettings,
): PartSteps<RankResult> {
  const { seed, draws, top = usualListing } = settings
  const testRectifiers = records.filter(({ id }) => id === stage.switch.turnOn?.rectifier)
  const competing = { stage, parts: chooseCandidates(stage, records), testRectifiers, seed, draws }
  const listing = yield* listParts(competing, top)
  const { parts } = listing
  const work = { ...competing, parts }
  const assessments = assessAll(stage, parts, testRectifiers)
  const profiles = yield* profileAll(work, assessments)
  const listed = draws > 0 ? yield* drawListed(work, assessments, listing) : null
  const verdict = listed === null ? nominalVerdict(assessments) : verdictOf(stage, assessments, listed.drawn)
  const results = assessments.map(({ result }) => ({
    ...(listed === null ? result : withDraws(result, listed.drawn)),
    ...profileFields(profiles.get(result.id)),
  }))
  const candidates = placeRanks(results)
  return {
    ...documentHead(settings),
    stage: stageResult(stage, assessments, candidates),
    candidates,
    not_listed: listing.notListed,
    verdict,
    warnings: warningsOf([
      ...assessments.flatMap(candidateCaveats),
      ...stageCaveats(assessments),
      ...incumbentCaveats(stage, competing.parts, records),
      ...orderCaveats(stage, candidates, profiles),
      ...(listed?.caveats ?? []),
      ...tableCaveats(settings),
    ]),
    cautions: stageCautions(
      stage,
      parts,
      assessments.map((each) => each.peakReverseVoltage),
    ),
    not_covered: notCovered(stage),
  }
}

/** Records that compete, by id so that their order in files does not matter. */
export function chooseCandidates(stage: Stage, records: readonly RectifierRecord[]): readonly RectifierRecord[] {
  const wanted = stage.candidates
  const chosen = wanted === null ? records : records.filter(({ id }) => wanted.includes(id))
  if (chosen.length === 0) throw new StudyRefusal('no-candidate', {})
  return chosen.toSorted((a, b) => compareIds(a.id, b.id))
}

/** Prepares and solves all candidates. */
export function assessAll(
  stage: Stage,
  parts: readonly RectifierRecord[],
  records: readonly RectifierRecord[],
): Assessment[] {
  const candidates = parts.map((record) => prepareCandidate(stage, record, records))
  if (!candidates.some(({ kernel }) => deliversCold(kernel))) {
    throw new StudyRefusal('cannot-deliver', {
      power: stage.output.voltage * stage.output.current,
      voltage: stage.input.voltage,
    })
  }
  return candidates.map(assessCandidate)
}

export function documentHead({
  seed,
  draws,
  version,
  inputs,
}: StudySettings): Pick<RankResult, 'format' | 'tool' | 'seed' | 'draws' | 'inputs'> {
  return { format: 1, tool: { name: 'ebbwatt', version }, seed, draws, inputs }
}

export function stageResult(
  stage: Stage,
  assessments: readonly Assessment[],
  candidates: readonly CandidateResult[],
): StageResult {
  const leader = candidates.find(({ point }) => point !== null)
  const assessment = assessments.find(({ result }) => result.id === leader?.id)
  const given = stage.switch.slope.kind === 'given' ? stage.switch.slope.slope : 0
  return {
    kind: stage.kind,
    title: stage.title ?? '',
    frequency_hz: stage.frequency,
    input_v: stage.input.voltage,
    output_v: stage.output.voltage,
    output_w: stage.output.voltage * stage.output.current,
    blocking_v: blockingVoltageOf(stage),
    mode: leader?.point?.mode ?? null,
    slope_a_per_s: assessment?.point?.event.slope ?? given,
    loss_model: lossModel,
    assumed: stage.assumed,
  }
}

export function warningsOf(caveats: readonly Caveat[]): Warning[] {
  return sortCaveats(caveats).map(({ code, candidate, data }) => ({ code, candidate, text: '', data }))
}

function incumbentCaveats(
  stage: Stage,
  parts: readonly RectifierRecord[],
  records: readonly RectifierRecord[],
): Caveat[] {
  const { incumbent } = stage
  if (incumbent === null || parts.some(({ id }) => id === incumbent)) return []
  const known = records.some(({ id }) => id === incumbent)
  return [{ code: 'incumbent-missing', candidate: '', data: known ? { excluded: incumbent } : { incumbent } }]
}

/** Tables from which rows are missing. */
function tableCaveats({ tables = [] }: StudySettings): Caveat[] {
  return tables
    .filter(({ leftOut }) => leftOut > 0)
    .map(({ path, ...counts }) => ({ code: 'table-rows-left-out', candidate: '', data: { table: path, ...counts } }))
}

/** Accepted by stage loss with their ranks, then rejected by id. */
export function placeRanks(results: readonly CandidateResult[]): CandidateResult[] {
  const ordered = orderCandidates(
    results.map((result) => ({
      id: result.id,
      accepted: result.accepted,
      nominalStageLoss: result.stage_loss_w,
      result,
    })),
  )
  return ordered.map(({ result, accepted }, index) => ({ ...result, rank: accepted ? index + 1 : null }))
}

function nominalVerdict(assessments: readonly Assessment[]): Verdict {
  const ranked = placeRanks(assessments.map(({ result }) => result)).filter(({ accepted }) => accepted)
  const [best, next] = ranked
  return {
    best: best?.id ?? null,
    decided: null,
    tied: [],
    runner_up: next?.id ?? null,
    gap_w: best !== undefined && next !== undefined ? next.stage_loss_w! - best.stage_loss_w! : null,
    gap_low_w: null,
    gap_high_w: null,
    text: '',
    sensitivity: null,
    measure_next: null,
  }
}

function* profileAll(
  work: Omit<PartWork, 'kind'>,
  assessments: readonly Assessment[],
): PartSteps<ReadonlyMap<string, ProfileResult>> {
  if (work.stage.dutyProfile === null) return new Map()
  const settled = assessments.filter(({ point }) => point !== null)
  const parts = settled.map(({ candidate }) => candidate.record)
  const profiles = yield* askFor({ ...work, kind: 'profile', parts })
  return new Map(profiles.map((profile, index) => [parts[index]!.id, profile]))
}

function profileFields(
  profile: ProfileResult | undefined,
): Pick<CandidateResult, 'weighted_w' | 'energy_kwh_per_year'> {
  return { weighted_w: profile?.weightedLoss ?? null, energy_kwh_per_year: profile?.energy ?? null }
}
