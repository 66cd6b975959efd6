import { adviseMeasurement, type MeasurementEffect, type MeasurementOption } from '../decision/measure-next.ts'
import { countOdds, type Odds } from '../decision/odds.ts'
import { type GapInput, regressGap } from '../decision/regress-gap.ts'
import { shareVariance } from '../decision/sensitivity.ts'
import { intervalLevel, summariseDraws } from '../decision/summarise-draws.ts'
import { type Decision, decide } from '../decision/verdict.ts'
import { celsiusZero } from '../domain/constants.ts'
import type { CandidateResult, MeasureNext, Verdict } from '../domain/result.ts'
import type { Stage } from '../domain/stage.ts'
import type { Assessment } from './assess-candidate.ts'
import { drawCandidate, drawStage, type PartDraws, type StageDraws } from './draw-candidate.ts'
import { measurementEffect } from './measurement-effect.ts'
import { conditionOf } from './point-condition.ts'

/** Draws of all candidates that have a temperature, in the order of the assessments. */
export interface DrawnStage {
  readonly shared: StageDraws
  readonly parts: readonly PartDraws[]
  /** In the order of the parts. */
  readonly odds: readonly Odds[]
}

/** Solves every candidate in the same draws of the stage. */
export function drawAll(stage: Stage, assessments: readonly Assessment[], seed: number, draws: number): DrawnStage {
  const shared = drawStage(stage, seed, draws)
  const parts: PartDraws[] = []
  for (const { candidate, point, result } of assessments) {
    if (point !== null) parts.push(drawCandidate(candidate, point, result.accepted, shared, seed))
  }
  return { shared, parts, odds: countOdds(parts) }
}

/** A candidate's result with what the draws say of it. */
export function withDraws(result: CandidateResult, drawn: DrawnStage): CandidateResult {
  const own = drawn.parts.find(({ id }) => id === result.id)
  if (own === undefined) return { ...result, odds_best: 0, odds_error: 0 }
  const summary = summariseDraws(own)
  const odds = drawn.odds.find(({ id }) => id === result.id)!
  return {
    ...result,
    interval_w: summary.total === null ? null : { ...summary.total, level: intervalLevel },
    odds_best: odds.best,
    odds_error: odds.error,
    thermal_lost_share: summary.lostShare,
    junction_high_c: summary.junctionHigh === null ? null : summary.junctionHigh - celsiusZero,
  }
}

/** Who is best, how sure that is, what carries the doubt and what would settle it. */
export function verdictOf(stage: Stage, assessments: readonly Assessment[], drawn: DrawnStage): Verdict {
  const decision = decide(drawn.parts)
  const explained = explainGap(stage, assessments, drawn, decision)
  return {
    best: decision.best,
    decided: decision.decided,
    tied: decision.tied.filter((id) => assessments.some(({ result }) => result.id === id)),
    runner_up: decision.runnerUp,
    gap_w: decision.gap,
    gap_low_w: decision.gapInterval?.low ?? null,
    gap_high_w: decision.gapInterval?.high ?? null,
    text: '',
    sensitivity: explained.sensitivity,
    measure_next: explained.measureNext,
  }
}

interface Explanation {
  readonly sensitivity: Verdict['sensitivity']
  readonly measureNext: MeasureNext[]
}

function explainGap(
  stage: Stage,
  assessments: readonly Assessment[],
  drawn: DrawnStage,
  decision: Decision,
): Explanation {
  const { best, runnerUp, gapDraws } = decision
  if (best === null || runnerUp === null || gapDraws === null) return { sensitivity: [], measureNext: [] }
  const pair = [best, runnerUp].map((id) => assessments.find(({ result }) => result.id === id)!)
  const inputs = [...sharedInputs(stage, drawn.shared), ...pair.flatMap((each) => partInputs(each, drawn))]
  const regression = regressGap(gapDraws, inputs)
  if (regression === null) return { sensitivity: [], measureNext: [] }
  const options = pair.flatMap(measurementOptions)
  const effectOf = (option: MeasurementOption): MeasurementEffect => {
    const { candidate, point } = pair.find(({ result }) => result.id === option.advice.id)!
    return measurementEffect({
      rectifier: candidate.rectifier,
      property: option.advice.property,
      condition: conditionOf(candidate, point!),
    })
  }
  return {
    sensitivity: shareVariance(regression),
    measureNext: adviseMeasurement(regression, options, effectOf),
  }
}

function sharedInputs(stage: Stage, shared: StageDraws): GapInput[] {
  const inputs: GapInput[] = [
    { name: 'slope', columns: [shared.slope] },
    { name: 'voltage_fall', columns: [shared.voltageFall] },
    { name: 'thermal', columns: [shared.thermal] },
  ]
  if (stage.switch.turnOn?.includesRectifier === 'unknown') inputs.push({ name: 'turn_on', columns: [shared.turnOn] })
  return inputs
}

function partInputs({ candidate, result }: Assessment, drawn: DrawnStage): GapInput[] {
  const own = drawn.parts.find(({ id }) => id === result.id)!
  const { rectifier } = candidate
  const inputs: GapInput[] = []
  if (rectifier.recovery !== null)
    inputs.push({ name: `recovery of ${result.id}`, columns: [own.lifetimeLog, own.ratioLog] })
  inputs.push({ name: `forward of ${result.id}`, columns: [own.forward] })
  if (rectifier.leakage !== null) inputs.push({ name: `leakage of ${result.id}`, columns: [own.leakageLog] })
  return inputs
}

function measurementOptions({ candidate, point, result }: Assessment): MeasurementOption[] {
  const { rectifier } = candidate
  const condition = conditionOf(candidate, point!)
  const junction_c = condition.junction - celsiusZero
  const options: MeasurementOption[] = []
  const add = (property: MeasureNext['property'], current_a: number, slope_a_per_s: number | null): void => {
    options.push({
      input: `${property} of ${result.id}`,
      advice: { id: result.id, property, current_a, slope_a_per_s, junction_c },
    })
  }
  if (rectifier.recovery !== null && condition.current > 0) add('recovery', condition.current, condition.slope)
  add('forward', condition.meanCurrent, null)
  if (rectifier.leakage !== null) add('leakage', 0, null)
  return options
}
