import type { Caveat } from '../domain/caveat.ts'
import { referenceSlope, referenceTemperature } from '../domain/constants.ts'
import type { StepRow } from '../domain/rectifier.ts'
import { lifetimeFromStep, simplestLifetime, stepRecoveryTime, stepStorageTime } from '../models/step-fixture.ts'
import { predictedMean } from './bayesian-update.ts'
import { recoveryDesigns } from './design-rows.ts'
import { figureText } from './figure-text.ts'
import { maximumShift, rowErrors } from './grades.ts'
import type { RecoveryPoint } from './invert-pair.ts'
import type { RowContext, RowReading, UnusableRow } from './row-reading.ts'

/**
 * Published forms put the lifetime of one storage time 3 to 4.5 times apart; the lumped one is at the low end. ln tau is
 * centred here, with this much more error; storage and recovery time together tell y, with its own.
 */
const lifetimeCentre = Math.log(1.7)
const lifetimeError = 0.6
const ratioError = 0.4
/** A step row states no reverse voltage after recovery. */
const unknownVoltageError = 0.2

/** One step row as evidence on (u, y) at ln(a/a0) = 0; unusable when no lifetime can be read from it. */
export function invertStepRow(row: StepRow, context: RowContext): RowReading | UnusableRow {
  const condition = {
    ratedCurrent: context.ratedCurrent,
    current: row.current,
    slope: referenceSlope,
    junction: row.junction ?? referenceTemperature,
  }
  const designs = recoveryDesigns(condition)
  const reading = rowErrors(row, 'recovery').reading
  const shift = row.grade === 'maximum' ? maximumShift.lifetime : 0
  const both = pointFromBoth(row)
  if (both !== null) {
    return {
      row,
      condition,
      point: both,
      tellsRatio: true,
      single: null,
      observation: { designs, values: [both.lifetime - shift, both.ratio], noise: noiseOfBoth(row, both, reading) },
      caveats: [],
    }
  }
  const ratio = predictedMean(context.prior, designs[1])
  const lifetime = stepLifetimeAt(row, ratio)
  const impossible = problemOf(row, context.id)
  if (lifetime === null) return { unusable: impossible }
  return {
    row,
    condition,
    point: { lifetime, ratio },
    tellsRatio: false,
    single: null,
    observation: {
      designs: [designs[0]],
      values: [lifetime - shift],
      noise: [reading * reading + lifetimeError * lifetimeError],
    },
    caveats: row.storageTime !== null && row.storageTime > 0 && row.recoveryTime !== null ? [impossible] : [],
  }
}

/** u and y from storage and recovery time together; null where one is missing or they do not fit each other. */
function pointFromBoth(row: StepRow): RecoveryPoint | null {
  const { storageTime, recoveryTime, until } = row
  if (storageTime === null || recoveryTime === null || until === null) return null
  const found = lifetimeFromStep({
    storageTime,
    recoveryTime,
    until,
    forwardCurrent: row.current,
    reverseCurrent: row.reverse,
  })
  if (found === null || !(found.lifetime > found.tailTime * (1 + 1e-9))) return null
  return {
    lifetime: Math.log(found.lifetime) + lifetimeCentre,
    ratio: Math.log(found.lifetime / found.tailTime - 1),
  }
}

/**
 * Covariance of (u, y) from independent errors of both times: with q = tau_rr/tau and A = ln((1 + IF/IR)(1 − q)),
 * ln ts = u + ln A and ln(trr − ts) = u + ln q + ln ln(IR/Ix).
 */
function noiseOfBoth(row: StepRow, point: RecoveryPoint, reading: number): number[] {
  const share = 1 / (1 + Math.exp(point.ratio))
  const plateau = share / Math.log((1 + row.current / row.reverse) * (1 - share))
  const trr = row.recoveryTime!
  const tail = trr - row.storageTime!
  const sum = plateau + 1 - share
  const ratioByTrr = -trr / tail / sum
  const ratioByStorage = trr / tail / sum
  const lifetimeByTrr = -plateau * ratioByTrr
  const lifetimeByStorage = 1 - plateau * ratioByStorage
  const variance = reading * reading
  const cross = variance * (ratioByTrr * lifetimeByTrr + ratioByStorage * lifetimeByStorage)
  return [
    variance * (lifetimeByTrr ** 2 + lifetimeByStorage ** 2) + lifetimeError ** 2,
    cross,
    cross,
    variance * (ratioByTrr ** 2 + ratioByStorage ** 2) + ratioError ** 2 + unknownVoltageError ** 2,
  ]
}

/** u from one time at a stated y: every time of the fixture is proportional to the lifetime. */
export function stepLifetimeAt(row: StepRow, ratio: number): number | null {
  const unit = {
    lifetime: 1,
    tailTime: 1 / (1 + Math.exp(ratio)),
    forwardCurrent: row.current,
    reverseCurrent: row.reverse,
  }
  if (!(row.reverse > 0)) return null
  if (row.recoveryTime !== null && row.until !== null && row.until > 0 && row.until < row.reverse) {
    const factor = stepRecoveryTime({ ...unit, until: row.until })
    if (factor > 0) return Math.log(row.recoveryTime / factor) + lifetimeCentre
  }
  if (row.storageTime === null || !(row.storageTime > 0)) return null
  const factor = stepStorageTime(unit)
  const lifetime =
    factor > 0
      ? row.storageTime / factor
      : simplestLifetime({ storageTime: row.storageTime, forwardCurrent: row.current, reverseCurrent: row.reverse })
  return Math.log(lifetime) + lifetimeCentre
}

function problemOf(row: StepRow, candidate: string): Caveat {
  const data: Record<string, string> = { row: row.place.name }
  if (row.storageTime !== null && row.recoveryTime !== null) {
    data.found = figureText('storage', row.storageTime, 's')
    data.bound = figureText('trr', row.recoveryTime, 's')
  } else if (row.until !== null) {
    data.found = figureText('the level', row.until, 'A')
    data.bound = figureText('the reverse current', row.reverse, 'A')
  }
  return { code: 'row-impossible', candidate, data }
}
