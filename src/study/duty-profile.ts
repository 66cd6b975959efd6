import type { RectifierRecord } from '../domain/rectifier.ts'
import type { DutyPoint, Stage } from '../domain/stage.ts'
import { placeConditions } from '../stage/evaluate.ts'
import { settle } from '../stage/thermal-balance.ts'
import { type Candidate, prepareCandidate } from './candidate.ts'
import { stageLossOf } from './nominal-point.ts'

/** A stage at no load still switches; its losses are those at this share of full load. */
const leastLoad = 1e-6

/** Losses of one candidate over the stage's loads. */
export interface ProfileResult {
  /** Mean stage loss weighted by hours; null where a load has no stable temperature. [W] */
  readonly weightedLoss: number | null
  /** Sum over the stated hours. [kWh] */
  readonly energy: number | null
  /** Stage loss at each load, null without a stable temperature. [W] */
  readonly losses: readonly (number | null)[]
}

/** Solves a candidate at every load of a profile, each with its own temperature. */
export function runProfile(
  candidate: Candidate,
  profile: readonly DutyPoint[],
  records: readonly RectifierRecord[],
): ProfileResult {
  const byInput = new Map<number, Candidate>()
  const losses = profile.map((load) => lossAt(candidateAtInput(candidate, load.input, byInput, records), load))
  let hours = 0
  let wattHours: number | null = 0
  profile.forEach((load, index) => {
    const loss = losses[index]!
    hours += load.hours
    wattHours = wattHours === null || loss === null ? null : wattHours + load.hours * loss
  })
  return {
    weightedLoss: wattHours === null || hours === 0 ? null : wattHours / hours,
    energy: wattHours === null ? null : wattHours / 1000,
    losses,
  }
}

/** The same part at another input: its calibration belongs to the voltage it blocks, so it is prepared anew once. */
function candidateAtInput(
  candidate: Candidate,
  input: number | null,
  known: Map<number, Candidate>,
  records: readonly RectifierRecord[],
): Candidate {
  const { stage } = candidate
  if (input === null || input === stage.input.voltage) return candidate
  let found = known.get(input)
  if (found === undefined) {
    found = prepareCandidate({ ...stage, input: { ...stage.input, voltage: input } }, candidate.record, records)
    known.set(input, found)
  }
  return found
}

function lossAt(candidate: Candidate, load: DutyPoint): number | null {
  const { kernel, stage } = candidate
  const reference = kernel.thermal.reference
  kernel.outputCurrent = stage.output.current * Math.max(load.load, leastLoad)
  if (load.ambient !== null) kernel.thermal.reference = load.ambient
  placeConditions(kernel)
  const loss = settle(kernel) ? stageLossOf(candidate, kernel.rows) : null
  kernel.outputCurrent = stage.output.current
  kernel.thermal.reference = reference
  placeConditions(kernel)
  return loss
}

/** Stage with its output current changed; everything else as it is. */
export function stageAtLoad(stage: Stage, load: number): Stage {
  return { ...stage, output: { ...stage.output, current: stage.output.current * Math.max(load, leastLoad) } }
}
