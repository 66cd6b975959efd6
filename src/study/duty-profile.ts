import type { DutyPoint, Stage } from '../domain/stage.ts'
import { placeConditions } from '../stage/evaluate.ts'
import { settle } from '../stage/thermal-balance.ts'
import { type Candidate, preparedAt } from './candidate.ts'
import { stageLossOf } from './nominal-point.ts'
import { blocksOutput } from './stage-inputs.ts'

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

/** Solves a candidate at every load of a profile, each with its own temperature; equal ones once. */
export function runProfile(candidate: Candidate, profile: readonly DutyPoint[]): ProfileResult {
  const losses = lossesOver(candidate, profile)
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

function lossesOver(candidate: Candidate, profile: readonly DutyPoint[]): readonly (number | null)[] {
  const losses = new Array<number | null>(profile.length).fill(null)
  for (const [input, places] of placesByInput(candidate.stage, profile)) {
    // One store at a time: a year may have hundreds of inputs.
    const at = candidateAtInput(candidate, input)
    const known = new Map<string, number | null>()
    for (const place of places) {
      const load = profile[place]!
      const key = `${load.load} ${load.ambient}`
      let loss = known.get(key)
      if (loss === undefined) {
        loss = lossAt(at, load)
        known.set(key, loss)
      }
      losses[place] = loss
    }
    restore(at)
  }
  return losses
}

/** Positions in the profile of each input, as it is in the stage where the profile does not say. */
function placesByInput(stage: Stage, profile: readonly DutyPoint[]): ReadonlyMap<number, readonly number[]> {
  const places = new Map<number, number[]>()
  profile.forEach(({ input }, index) => {
    const voltage = input ?? stage.input.voltage
    const known = places.get(voltage)
    if (known === undefined) places.set(voltage, [index])
    else known.push(index)
  })
  return places
}

/**
 * The same part at another input. Its calibration belongs to the voltage it blocks: where that is the output's, the part
 * is moved there; elsewhere it is prepared anew.
 */
function candidateAtInput(candidate: Candidate, input: number): Candidate {
  const { stage, kernel } = candidate
  if (input === stage.input.voltage) return candidate
  if (!blocksOutput(stage)) return preparedAt(candidate, input)
  kernel.inputVoltage = input
  return candidate
}

function lossAt(candidate: Candidate, load: DutyPoint): number | null {
  const { kernel, stage } = candidate
  kernel.outputCurrent = stage.output.current * Math.max(load.load, leastLoad)
  kernel.thermal.reference = load.ambient ?? stageReference(stage)
  placeConditions(kernel)
  return settle(kernel) ? stageLossOf(candidate, kernel.rows) : null
}

/** Temperature of the surroundings, or of a case that is held. [K] */
function stageReference({ cooling }: Stage): number {
  return cooling.kind === 'case' ? cooling.caseTemperature : cooling.ambientTemperature
}

/** Puts the store back to the stage's own conditions. */
function restore({ kernel, stage }: Candidate): void {
  kernel.inputVoltage = stage.input.voltage
  kernel.outputCurrent = stage.output.current
  kernel.thermal.reference = stageReference(stage)
  placeConditions(kernel)
}

/** Stage with its output current changed; everything else as it is. */
export function stageAtLoad(stage: Stage, load: number): Stage {
  return { ...stage, output: { ...stage.output, current: stage.output.current * Math.max(load, leastLoad) } }
}
