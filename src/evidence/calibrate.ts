import type { CalibratedRectifier } from '../domain/calibrated-rectifier.ts'
import type { Caveat } from '../domain/caveat.ts'
import { type RectifierRecord, storesCharge } from '../domain/rectifier.ts'
import { capacitanceEvidence } from './capacitance-evidence.ts'
import { checkRecord } from './check-record.ts'
import { forwardEvidence } from './forward-evidence.ts'
import { leakageEvidence } from './leakage-evidence.ts'
import { recoveryEvidence } from './recovery-evidence.ts'

/** Inputs of {@link calibrate}. */
export interface CalibrateInput {
  readonly record: RectifierRecord
  /** Voltage that the part blocks where it is to be used: softness read at another one is worth less. [V] */
  readonly blockingVoltage: number
}

/** A record made usable, and what a reviewer must know about it. */
export interface Calibration {
  readonly rectifier: CalibratedRectifier
  /** The record with those of its rows alone that tell something: what its evidence is worth goes by them. */
  readonly read: RectifierRecord
  readonly caveats: readonly Caveat[]
}

/**
 * Class prior and a record's rows to a rectifier with its doubt: Bayesian linear regression in closed form, one kernel for
 * recovery, forward voltage and leakage (PHYSICS section 3). Deterministic; the rows' order changes rounding only.
 *
 * @throws Never, for a record that passed the input checks.
 */
export function calibrate({ record, blockingVoltage }: CalibrateInput): Calibration {
  const recovery = recoveryEvidence(record, blockingVoltage)
  const forward = forwardEvidence(record)
  const leakage = leakageEvidence(record)
  const rectifier: CalibratedRectifier = {
    id: record.id,
    class: record.class,
    storesCharge: storesCharge(record.class),
    ratedCurrent: record.ratings.averageCurrent,
    ratedVoltage: record.ratings.reverseVoltage,
    recovery: recovery.recovery,
    forward: forward.forward,
    leakage: leakage.leakage,
    capacitance: capacitanceEvidence(record),
    maximumRecoveryShift: recovery.maximumRecoveryShift,
    softnessKnown: recovery.softnessKnown,
  }
  const reading = [...recovery.caveats, ...forward.caveats, ...leakage.caveats]
  const read: RectifierRecord = {
    ...record,
    recovery: recovery.readings.map(({ row }) => row),
    forward: forward.rows,
    leakage: leakage.rows,
  }
  return {
    rectifier,
    read,
    caveats: [...reading, ...checkRecord({ record, read, rectifier, readings: recovery.readings })],
  }
}
