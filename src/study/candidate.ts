import type { CalibratedRectifier } from '../domain/calibrated-rectifier.ts'
import type { Caveat } from '../domain/caveat.ts'
import type { RectifierRecord } from '../domain/rectifier.ts'
import type { Stage } from '../domain/stage.ts'
import { calibrate } from '../evidence/calibrate.ts'
import { statedSlopeAt } from '../stage/book-instant.ts'
import { blockingVoltageOf, createKernel } from '../stage/create-kernel.ts'
import type { Kernel } from '../stage/kernel.ts'
import { type TurnOnMeaning, type TurnOnReading, turnOnMeaning } from '../stage/measured-turn-on.ts'

/** One part in one stage, ready to be solved. */
export interface Candidate {
  readonly stage: Stage
  readonly record: RectifierRecord
  /** The record with the rows alone that the calibration read. */
  readonly read: RectifierRecord
  readonly rectifier: CalibratedRectifier
  readonly kernel: Kernel
  readonly turnOn: TurnOnMeaning | null
  readonly caveats: readonly Caveat[]
}

/** Calibrates a record for the stage's blocking voltage and allocates its working store. `records` holds the test rectifier of a measured turn-on. */
export function prepareCandidate(
  stage: Stage,
  record: RectifierRecord,
  records: readonly RectifierRecord[],
): Candidate {
  const prepared = withoutTurnOn(stage, record)
  return withTurnOn(prepared, turnOnOf(stage, records, prepared.kernel))
}

/** The same part calibrated for the voltage it blocks at another input. What a measured turn-on means stays. */
export function preparedAt({ stage, record, turnOn }: Candidate, inputVoltage: number): Candidate {
  const moved = { ...stage, input: { ...stage.input, voltage: inputVoltage } }
  return withTurnOn(withoutTurnOn(moved, record), turnOn)
}

function withoutTurnOn(stage: Stage, record: RectifierRecord): Omit<Candidate, 'turnOn'> {
  const { rectifier, read, caveats } = calibrate({ record, blockingVoltage: blockingVoltageOf(stage) })
  return { stage, record, read, rectifier, kernel: createKernel({ stage, record, rectifier }), caveats }
}

function withTurnOn(prepared: Omit<Candidate, 'turnOn'>, turnOn: TurnOnMeaning | null): Candidate {
  if (turnOn !== null) placeTurnOn(prepared.kernel, prepared.stage, turnOn.nominal)
  return { ...prepared, turnOn }
}

/** Puts one reading of the measured turn-on into a kernel. */
export function placeTurnOn(kernel: Kernel, stage: Stage, reading: TurnOnReading): void {
  const given = stage.switch.turnOn!
  kernel.turnOn.current = given.current
  kernel.turnOn.voltage = given.voltage
  kernel.turnOn.energy = reading.energy
  kernel.turnOn.addedShare = reading.addedShare
}

function turnOnOf(stage: Stage, records: readonly RectifierRecord[], kernel: Kernel): TurnOnMeaning | null {
  const given = stage.switch.turnOn
  if (given === null) return null
  // The loop limits the slope by the voltage of that measurement, not by the stage's.
  const allowed = stage.loopInductance ? given.voltage / stage.loopInductance : Number.POSITIVE_INFINITY
  const slope = Math.min(statedSlopeAt(kernel, given.current), allowed)
  // A gate drive that cannot reach the test current says nothing about what the test rectifier did there.
  const record = slope > 0 ? records.find(({ id }) => id === given.rectifier) : undefined
  const testRectifier = record === undefined ? null : calibrate({ record, blockingVoltage: given.voltage }).rectifier
  const meaning = turnOnMeaning({ given, testRectifier, slope, voltageFall: stage.switch.voltageFall })
  if (given.rectifier === null || record !== undefined) return meaning
  const missing: Caveat = { code: 'turn-on-rectifier-missing', candidate: '', data: { rectifier: given.rectifier } }
  return { ...meaning, caveats: [...meaning.caveats, missing] }
}
