import type { CalibratedRectifier } from '../domain/calibrated-rectifier.ts'
import type { Caveat } from '../domain/caveat.ts'
import type { RectifierRecord } from '../domain/rectifier.ts'
import { conditioned } from './bayesian-update.ts'
import { unitSpread } from './grades.ts'
import { maximumRecoveryShift } from './maximum-recovery-shift.ts'
import { priorGaussians } from './prior-gaussians.ts'
import { readRecoveryRows } from './read-recovery-rows.ts'
import type { RowReading } from './row-reading.ts'

/** Everything the record says about recovery. */
export interface RecoveryEvidence {
  readonly recovery: CalibratedRectifier['recovery']
  readonly maximumRecoveryShift: CalibratedRectifier['maximumRecoveryShift']
  readonly softnessKnown: boolean
  readonly readings: readonly RowReading[]
  readonly caveats: readonly Caveat[]
}

const none: RecoveryEvidence = {
  recovery: null,
  maximumRecoveryShift: null,
  softnessKnown: false,
  readings: [],
  caveats: [],
}

/** Class prior of (u, y) updated by the record's recovery rows, for use at a blocking voltage. */
export function recoveryEvidence(record: RectifierRecord, blockingVoltage: number): RecoveryEvidence {
  const prior = priorGaussians(record.class).recovery
  if (prior === null) return none
  const ratedCurrent = record.ratings.averageCurrent
  const { readings, caveats } = readRecoveryRows(record.recovery, {
    id: record.id,
    ratedCurrent,
    blockingVoltage,
    prior,
  })
  const posterior = conditioned(
    prior,
    readings.map((reading) => reading.observation),
  )
  return {
    recovery: {
      posterior,
      unitSpread: unitSpread(
        readings.map((reading) => reading.row),
        'recovery',
      ),
      origin: readings.length > 0 ? 'given' : 'class-guess',
    },
    maximumRecoveryShift: maximumRecoveryShift(readings, posterior, ratedCurrent),
    softnessKnown: readings.some((reading) => reading.tellsRatio),
    readings,
    caveats,
  }
}
