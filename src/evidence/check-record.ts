import type { CalibratedRectifier } from '../domain/calibrated-rectifier.ts'
import type { Caveat, CaveatCode } from '../domain/caveat.ts'
import type { Grade, RectifierRecord } from '../domain/rectifier.ts'
import { checkPlausibility } from './check-plausibility.ts'
import { compareRows } from './compare-rows.ts'
import { findContradiction } from './find-contradiction.ts'
import { findFalling } from './find-falling.ts'
import { forwardObservations } from './forward-evidence.ts'
import { maximumShift } from './grades.ts'
import { leakageObservations } from './leakage-evidence.ts'
import { priorGaussians } from './prior-gaussians.ts'
import type { RowReading } from './row-reading.ts'

/** A record held against itself and against its class: what a careful reader of the data sheet would ask about. */
export function checkRecord({
  record,
  read,
  rectifier,
  readings,
}: {
  readonly record: RectifierRecord
  /** The record with the rows alone that were read. */
  readonly read: RectifierRecord
  readonly rectifier: CalibratedRectifier
  readonly readings: readonly RowReading[]
}): Caveat[] {
  return [
    ...compareRows(record),
    ...contradictions(record, readings),
    ...checkPlausibility(record, rectifier, readings),
    ...findFalling(rectifier),
    ...checkGrades(read),
    ...missing(rectifier),
  ]
}

function contradictions(record: RectifierRecord, readings: readonly RowReading[]): Caveat[] {
  const prior = priorGaussians(record.class)
  const recovery = readings.map(({ row, observation }) => ({ name: row.place.name, observation }))
  return [
    ...(prior.recovery ? findContradiction(record.id, prior.recovery, recovery) : []),
    ...(record.forward.length > 1 ? findContradiction(record.id, prior.forward, forwardObservations(record)) : []),
    ...(prior.leakage && record.leakage.length > 1
      ? findContradiction(record.id, prior.leakage, leakageObservations(record))
      : []),
  ]
}

/** Typical figures only, or guaranteed ones only, in the rows that carry the part's main loss. */
function checkGrades(record: RectifierRecord): Caveat[] {
  const stores = priorGaussians(record.class).recovery !== null
  const rows = stores
    ? record.recovery
    : [...record.forward, ...(record.forwardLine ? [record.forwardLine] : []), ...record.leakage]
  const has = (grade: Grade) => rows.some((row) => row.grade === grade)
  if (has('maximum') && rows.every((row) => row.grade === 'maximum')) {
    return [
      { code: 'maximum-only', candidate: record.id, data: stores ? { factor: Math.exp(-maximumShift.lifetime) } : {} },
    ]
  }
  if (has('typical') && !has('maximum') && !has('measured'))
    return [{ code: 'typical-only', candidate: record.id, data: {} }]
  return []
}

/** What the record does not say. */
function missing(rectifier: CalibratedRectifier): Caveat[] {
  const codes: CaveatCode[] = []
  if (rectifier.recovery?.origin === 'class-guess') codes.push('recovery-guess')
  else if (rectifier.recovery !== null && !rectifier.softnessKnown) codes.push('softness-unknown')
  if (rectifier.forward.origin === 'class-guess') codes.push('forward-guess')
  if (rectifier.leakage?.origin === 'class-guess') codes.push('leakage-assumed')
  if (!rectifier.storesCharge && rectifier.capacitance === null) codes.push('capacitance-missing')
  return codes.map((code) => ({ code, candidate: rectifier.id, data: {} }))
}
