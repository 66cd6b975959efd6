import { celsiusZero } from '../domain/constants.ts'
import type { RectifierRecord } from '../domain/rectifier.ts'
import type { ThermalOutcome } from '../domain/result.ts'
import type { Stage } from '../domain/stage.ts'
import type { StudySettings, TrendCandidate, TrendRequest, TrendResult } from '../domain/study.ts'
import { StudyRefusal } from '../domain/study-refusal.ts'
import { row } from '../stage/kernel.ts'
import { conductionModeOf } from '../stage/settled-point.ts'
import { assessCandidate } from './assess-candidate.ts'
import { stageCautions } from './cautions.ts'
import { lossesResult } from './losses-result.ts'
import { notCovered } from './not-covered.ts'
import { candidateCaveats, stageCaveats } from './point-caveats.ts'
import { originsAt } from './point-condition.ts'
import { chooseCandidates, documentHead, placeRanks, stageResult, warningsOf } from './rank.ts'
import { documentValue, presentValue, stageAt, trendKeys } from './stage-variation.ts'
import { axisValues } from './trend-axis.ts'
import { findCrossings } from './trend-crossings.ts'
import { findLimits } from './trend-limits.ts'
import { studySlope } from './trend-slope.ts'
import { type TrendSpot, trendSolver } from './trend-solver.ts'

/**
 * Every candidate along one quantity of the stage: losses, temperature, efficiency and margins at each position,
 * crossings between parts, the edges of what each part bears, and over the slope its knee and its largest value.
 *
 * @throws StudyRefusal For a range that is reversed or outside what the stage can do, or without a candidate.
 */
export function trend(
  stage: Stage,
  records: readonly RectifierRecord[],
  request: TrendRequest,
  settings: StudySettings,
): TrendResult {
  const { over } = request
  const parts = chooseCandidates(stage, records)
  const axis = axisValues(request)
  const solver = trendSolver(stage, records, over, request.to - request.from)
  const spots = axis.map((value) => parts.map((record) => solver.spotAt(record, value)))
  if (spots.every((line) => line.every(({ judgement }) => judgement.point === null))) refuseEmpty(stage, spots)
  const at = presentValueWithin(stage, request)
  const present = parts.map((record) =>
    assessCandidate((at === null ? solver.spotHere(record) : solver.spotAt(record, at)).candidate),
  )
  return {
    ...documentHead(settings),
    over: trendKeys[over],
    stage: stageResult(stage, present, placeRanks(present.map(({ result }) => result))),
    points: axis.map((value, k) => ({
      at: documentValue(over, value),
      candidates: spots[k]!.map((spot) => trendCandidate(spot, over === 'load' && value === 0)),
    })),
    crossings: findCrossings({ stage, parts, request, settings, solver, axis, spots }),
    limits: findLimits({ over, parts, solver, axis, spots }),
    slope:
      over === 'slope'
        ? parts.map((record, column) =>
            studySlope({ stage, record, solver, axis, spots: spots.map((line) => line[column]!) }),
          )
        : null,
    warnings: warningsOf([...present.flatMap(candidateCaveats), ...stageCaveats(present)]),
    cautions: trendCautions(stage, request, parts, [
      ...present.map((each) => each.peakReverseVoltage),
      ...spots.flatMap((line) => line.map(({ judgement }) => judgement.peakReverseVoltage)),
    ]),
    not_covered: [...notCovered(stage), ...heldLosses(stage, request)],
  }
}

function trendCandidate(spot: TrendSpot, unloaded: boolean): TrendCandidate {
  const { candidate, judgement, stageLoss } = spot
  const { point, peakReverseVoltage: peak } = judgement
  const { stage, record } = candidate
  const output = stage.output.voltage * stage.output.current
  const thermal: ThermalOutcome = point === null ? 'none' : point.outcome
  const losses = lossesResult(point?.rows ?? null)
  return {
    id: record.id,
    total_w: losses.total,
    stage_loss_w: stageLoss,
    junction_c: point === null ? null : point.junction - celsiusZero,
    switch_junction_c: point === null ? null : point.switchJunction - celsiusZero,
    thermal,
    efficiency: stageLoss === null || unloaded ? null : output / (output + stageLoss),
    accepted: judgement.reasons.length === 0,
    mode: point === null ? null : conductionModeOf(point.instant),
    voltage_margin: peak === null ? null : 1 - peak / record.ratings.reverseVoltage,
    peak_reverse_v: peak,
    losses_w: losses,
    turn_on_base_w: point?.rows[row.turnOnBase] ?? null,
    extrapolated: point !== null && originsAt(candidate, point).caveats.some(({ code }) => code === 'extrapolated-far'),
  }
}

/** Where the stage stands, for warnings: on the axis, else at the nearer end; null where a gate drive sets the slope. */
function presentValueWithin(stage: Stage, { over, from, to }: TrendRequest): number | null {
  const present = presentValue(stage, over)
  return present === null ? null : Math.min(Math.max(present, from), to)
}

/** Over the input the highest value decides what is hazardous. */
function trendCautions(
  stage: Stage,
  { over, to }: TrendRequest,
  parts: readonly RectifierRecord[],
  peaks: readonly (number | null)[],
): TrendResult['cautions'] {
  const { dutyProfile } = stage
  return stageCautions(over === 'input' ? { ...stageAt(stage, over, to), dutyProfile } : stage, parts, peaks)
}

/** Losses given as watts do not move along the axis. */
function heldLosses(stage: Stage, { over }: TrendRequest): string[] {
  const held =
    stage.inductor.coreLoss > 0 &&
    (over === 'frequency' || over === 'inductance' || over === 'input' || over === 'load')
  return held ? ['core-loss-held'] : []
}

function refuseEmpty(stage: Stage, spots: readonly (readonly TrendSpot[])[]): void {
  const delivers = spots.some((line) => line.some(({ judgement }) => judgement.reasons[0]?.code !== 'cannot-deliver'))
  if (delivers) return
  throw new StudyRefusal('cannot-deliver', {
    power: stage.output.voltage * stage.output.current,
    voltage: stage.input.voltage,
  })
}
