import { judgeCandidate, type Rejection } from '../decision/accept.ts'
import { celsiusZero } from '../domain/constants.ts'
import type { CandidateResult, Reason } from '../domain/result.ts'
import { type Kernel, row } from '../stage/kernel.ts'
import { type PointEvent, peakReverseVoltage } from '../stage/settled-point.ts'
import { settle } from '../stage/thermal-balance.ts'
import { hasThermalPath, junctionLimitOf } from '../stage/thermal-network.ts'
import type { Candidate } from './candidate.ts'
import { atInput, atMaximumLeakage, type NominalPoint, solvePoint, stageLossOf, totalLossOf } from './nominal-point.ts'

/** A candidate solved at the nominal parameters, and whether it may be used. */
export interface Judgement {
  /** Null without a stable temperature at one of the inputs, or without a thermal path. */
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
  const mains = mainsPoints(candidate, point)
  if (point === null || mains?.some(({ thermal }) => thermal === 'none')) return unsettled('no-stable-temperature')
  const peak = highestPeakReverseVoltage(candidate, point)
  const rejections = judgeCandidate({
    peakReverseVoltage: peak,
    reverseVoltage: record.ratings.reverseVoltage,
    voltageUse: stage.limits.voltageUse,
    meanCurrent: point.rows[row.meanRectifierCurrent]!,
    averageCurrent: record.ratings.averageCurrent,
    parts: kernel.parts,
    junction: Math.max(point.junction, ...(mains ?? []).map(({ junction_c }) => junction_c! + celsiusZero)),
    junctionLimit: junctionLimitOf(stage, record),
    thermal: 'settled',
    settledAtMaximumLeakage: settlesAtMaximumLeakage(candidate),
    recovery: recoveryFit(kernel, point),
  })
  return { point, mains, peakReverseVoltage: peak, reasons: rejections.map(reasonOf) }
}

function unsettled(code: 'thermal-path-missing' | 'no-stable-temperature'): Judgement {
  return { point: null, mains: null, peakReverseVoltage: null, reasons: [{ code, text: '', value: null, limit: null }] }
}

/** A rejection as the document states it: temperatures in degrees Celsius. */
function reasonOf({ code, value, limit }: Rejection): Reason {
  const offset = code === 'junction-over-limit' ? celsiusZero : 0
  const edge = (figure: number | null): number | null => (figure === null ? null : figure - offset)
  return { code, text: '', value: edge(value), limit: edge(limit) }
}

function mainsPoints(candidate: Candidate, nominal: NominalPoint | null): CandidateResult['at_mains'] {
  const { input } = candidate.stage
  if (input.kind !== 'mains') return null
  return [1 - input.tolerance, 1, 1 + input.tolerance].map((factor) => {
    const voltage = input.voltage * factor
    const point = factor === 1 ? nominal : atInput(candidate, voltage, () => solvePoint(candidate))
    return {
      mains_v: voltage,
      total_w: point === null ? null : totalLossOf(point.rows),
      stage_loss_w: point === null ? null : stageLossOf(candidate, point.rows),
      junction_c: point === null ? null : point.junction - celsiusZero,
      thermal: point === null ? 'none' : point.outcome,
    }
  })
}

function settlesAtMaximumLeakage(candidate: Candidate): boolean {
  const { input } = candidate.stage
  const settles = (): boolean => atMaximumLeakage(candidate, () => settle(candidate.kernel))
  if (input.kind !== 'mains') return settles()
  // Low mains has the highest currents, high mains the longest blocking: all three are judged.
  return [1 - input.tolerance, 1, 1 + input.tolerance].every((factor) =>
    atInput(candidate, input.voltage * factor, settles),
  )
}

function highestPeakReverseVoltage(candidate: Candidate, point: NominalPoint): number {
  const { kernel, stage, rectifier } = candidate
  const peakHere = (event: PointEvent): number => peakReverseVoltage(kernel, event, rectifier.capacitance)
  const nominal = peakHere(point.event)
  if (stage.input.kind !== 'mains') return nominal
  const high = atInput(candidate, stage.input.voltage * (1 + stage.input.tolerance), () => solvePoint(candidate))
  return high === null ? nominal : Math.max(nominal, peakHere(high.event))
}

function recoveryFit(kernel: Kernel, point: NominalPoint): { readonly value: number; readonly limit: number } | null {
  const { hot } = point.event
  if (hot.outcome !== 'hard') return null
  return {
    value: hot.current / hot.slope + hot.timeToPeak + 3 * hot.tailTime,
    limit: point.event.instant.duty / kernel.frequency,
  }
}
