import { judgeCandidate, type Rejection } from '../decision/accept.ts'
import { celsiusZero } from '../domain/constants.ts'
import type { CandidateResult, Reason } from '../domain/result.ts'
import { type Kernel, row } from '../stage/kernel.ts'
import { peakReverseVoltage } from '../stage/settled-point.ts'
import { settle } from '../stage/thermal-balance.ts'
import { hasThermalPath, junctionLimitOf } from '../stage/thermal-network.ts'
import type { Candidate } from './candidate.ts'
import {
  atMaximumLeakage,
  deliversCold,
  type NominalPoint,
  solvePoint,
  stageLossOf,
  totalLossOf,
} from './nominal-point.ts'
import { runawaySurroundings } from './runaway-surroundings.ts'
import { atInput, inputsOf, ownInputsOf } from './stage-inputs.ts'

/** A candidate solved at the nominal parameters, and whether it may be used. */
export interface Judgement {
  /** At the nominal input; null without a stable temperature there, or without a thermal path. */
  readonly point: NominalPoint | null
  readonly mains: CandidateResult['at_mains']
  /** Highest over the inputs; null without a temperature. [V] */
  readonly peakReverseVoltage: number | null
  readonly reasons: Reason[]
}

/** Solves one candidate and holds it against the acceptance rules. */
export function judge(candidate: Candidate): Judgement {
  const { stage, record, kernel } = candidate
  if (!hasThermalPath(stage, record)) return unsettled('thermal-path-missing')
  const point = solvePoint(candidate)
  if (point === null) return unsettled(causeOfLoss(candidate))
  const inputs = inputPoints(candidate, point)
  const settled = inputs.flatMap((each) => each.point ?? [])
  const lost = inputs.find((each) => each.point === null)
  const peak = Math.max(
    ...settled.map(({ event }) => peakReverseVoltage(kernel, event, candidate.rectifier.capacitance)),
  )
  const rejections = judgeCandidate({
    peakReverseVoltage: peak,
    reverseVoltage: record.ratings.reverseVoltage,
    voltageUse: stage.limits.voltageUse,
    meanCurrent: Math.max(...settled.map(({ rows }) => rows[row.meanRectifierCurrent]!)),
    averageCurrent: record.ratings.averageCurrent,
    parts: kernel.parts,
    junction: Math.max(...settled.map(({ junction }) => junction)),
    junctionLimit: junctionLimitOf(stage, record),
    settledAtMaximumLeakage: lost === undefined ? settlesAtMaximumLeakage(candidate) : null,
    recovery: tightestRecovery(kernel, settled),
  })
  const reasons = rejections.map(reasonOf)
  if (lost !== undefined) {
    reasons.push({ code: atInput(candidate, lost.voltage, causeOfLoss), text: '', value: lost.voltage, limit: null })
  }
  const own = inputs.slice(0, ownInputsOf(stage).length)
  const mains = stage.input.kind === 'mains' ? own.map((each) => mainsResult(candidate, each)) : null
  return { point, mains, peakReverseVoltage: peak, reasons }
}

/** Why there is no operating point: no power even with everything cold, or too much heat. */
export function causeOfLoss({ kernel }: Candidate): 'cannot-deliver' | 'no-stable-temperature' {
  return deliversCold(kernel) ? 'no-stable-temperature' : 'cannot-deliver'
}

function unsettled(code: 'thermal-path-missing' | ReturnType<typeof causeOfLoss>): Judgement {
  return { point: null, mains: null, peakReverseVoltage: null, reasons: [{ code, text: '', value: null, limit: null }] }
}

/** A rejection as the document states it: temperatures in degrees Celsius. */
function reasonOf({ code, value, limit }: Rejection): Reason {
  const offset = code === 'junction-over-limit' ? celsiusZero : 0
  const edge = (figure: number | null): number | null => (figure === null ? null : figure - offset)
  return { code, text: '', value: edge(value), limit: edge(limit) }
}

/**
 * The reason with how warm the surroundings are, and how warm they may be at maximum leakage. Finding that costs many
 * times what judging does, so it is left to whoever shows it.
 */
export function runawayReason(candidate: Candidate): Reason {
  const edge = runawaySurroundings(candidate)
  return {
    code: 'runaway-at-maximum-leakage',
    text: '',
    value: candidate.kernel.thermal.reference - celsiusZero,
    limit: edge === null ? null : edge - celsiusZero,
  }
}

interface InputPoint {
  readonly voltage: number
  readonly point: NominalPoint | null
}

/** The point at every input that the part has to bear. */
function inputPoints(candidate: Candidate, nominal: NominalPoint): InputPoint[] {
  const { stage } = candidate
  return inputsOf(stage).map((voltage) => ({
    voltage,
    point: voltage === stage.input.voltage ? nominal : atInput(candidate, voltage, solvePoint),
  }))
}

function mainsResult(
  candidate: Candidate,
  { voltage, point }: InputPoint,
): NonNullable<CandidateResult['at_mains']>[number] {
  return {
    mains_v: voltage,
    total_w: point === null ? null : totalLossOf(point.rows),
    stage_loss_w: point === null ? null : stageLossOf(candidate, point.rows),
    junction_c: point === null ? null : point.junction - celsiusZero,
    thermal: point === null ? 'none' : point.outcome,
  }
}

function settlesAtMaximumLeakage(candidate: Candidate): boolean {
  // Low mains has the highest currents, high mains the longest blocking: all are judged.
  return inputsOf(candidate.stage).every((voltage) =>
    atInput(candidate, voltage, (at) => atMaximumLeakage(at, () => settle(at.kernel))),
  )
}

/** The recovery that fills most of its on-time: high mains shortens the interval, low mains lengthens the recovery. */
function tightestRecovery(
  { frequency }: Kernel,
  points: readonly NominalPoint[],
): { readonly value: number; readonly limit: number } | null {
  const fits = points.flatMap(({ event: { hot, instant } }) =>
    hot.outcome === 'hard' || hot.outcome === 'residual'
      ? [{ value: hot.current / hot.slope + hot.timeToPeak + 3 * hot.tailTime, limit: instant.duty / frequency }]
      : [],
  )
  return fits.sort((a, b) => b.value / b.limit - a.value / a.limit)[0] ?? null
}
