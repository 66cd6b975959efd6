import type { Stage } from '../domain/stage.ts'
import { blockingVoltageOf } from '../stage/create-kernel.ts'
import { placeConditions } from '../stage/evaluate.ts'
import { type Candidate, preparedAt } from './candidate.ts'

/** The stage's own inputs: the dc one; of mains the lowest, the nominal and the highest. [V] */
export function ownInputsOf({ input }: Stage): readonly number[] {
  if (input.kind !== 'mains') return [input.voltage]
  return [1 - input.tolerance, 1, 1 + input.tolerance].map((factor) => input.voltage * factor)
}

/** Every input that a part has to bear: the stage's own, and a higher one where the duty profile has it. [V] */
export function inputsOf(stage: Stage): readonly number[] {
  const own = ownInputsOf(stage)
  const before = Math.max(...own)
  const highest = (stage.dutyProfile ?? []).reduce((most, { input }) => Math.max(most, input ?? 0), before)
  return highest > before ? [...own, highest] : own
}

/** Highest voltage that the rectifier blocks at any of them. [V] */
export function highestBlockingVoltage(stage: Stage): number {
  return Math.max(...inputsOf(stage).map((voltage) => blockingVoltageOf(stage, voltage)))
}

/** True where the rectifier blocks the output at any input: its calibration and capacitance then stay as they are. */
export function blocksOutput({ kind }: Stage): boolean {
  return kind === 'boost' || kind === 'mains-boost'
}

/** Runs `action` on the part at another input: moved there and back, or prepared for the voltage it blocks there. */
export function atInput<T>(candidate: Candidate, inputVoltage: number, action: (at: Candidate) => T): T {
  const { kernel, stage } = candidate
  if (!blocksOutput(stage))
    return action(inputVoltage === stage.input.voltage ? candidate : preparedAt(candidate, inputVoltage))
  const before = kernel.inputVoltage
  kernel.inputVoltage = inputVoltage
  placeConditions(kernel)
  const result = action(candidate)
  kernel.inputVoltage = before
  placeConditions(kernel)
  return result
}

/** The lowest of a figure over every input that the part has to bear; null where it is not finite. */
export function lowestOverInputs(candidate: Candidate, figure: (at: Candidate) => number): number | null {
  const lowest = Math.min(...inputsOf(candidate.stage).map((voltage) => atInput(candidate, voltage, figure)))
  return Number.isFinite(lowest) ? lowest : null
}
