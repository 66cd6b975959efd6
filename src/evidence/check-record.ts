import type { CalibratedRectifier } from '../domain/calibrated-rectifier.ts'
import type { Caveat, CaveatCode } from '../domain/caveat.ts'
import type { RectifierRecord } from '../domain/rectifier.ts'
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
    ...findContradiction(record.id, prior.forward, forwardObservations(record)),
    ...(prior.leakage ? findContradiction(record.id, prior.leakage, leakageObservations(record)) : []),
  ]
}

/** Typical figures only in what carries the part's main loss; guaranteed ones only in any property that is read. */
function checkGrades(read: RectifierRecord): Caveat[] {
  const prior = priorGaussians(read.class)
  const forward = { property: 'forward voltage', rows: read.forwardLine ? [read.forwardLine] : read.forward }
  const properties = [
    ...(prior.recovery
      ? [{ property: 'recovery', rows: read.recovery, factor: Math.exp(-maximumShift.lifetime), main: true }]
      : []),
    { ...forward, factor: 1 / maximumShift.forward, main: prior.recovery === null },
    ...(prior.leakage
      ? [
          {
            property: 'leakage',
            rows: read.leakage,
            factor: Math.exp(-maximumShift.leakage),
            main: prior.recovery === null,
          },
        ]
      : []),
  ]
  const stated = properties.filter(({ rows }) => rows.length > 0)
  const maximal = stated.filter(({ rows }) => rows.every(({ grade }) => grade === 'maximum'))
  const typical = stated.filter(
    ({ rows, main }) =>
      main &&
      rows.some(({ grade }) => grade === 'typical') &&
      !rows.some(({ grade }) => grade === 'maximum' || grade === 'measured'),
  )
  const list = (found: typeof properties) => found.map(({ property }) => property).join(' and of ')
  const caveats: Caveat[] = []
  if (maximal.length > 0) {
    const factors = maximal.map(({ factor }) => factor.toFixed(2)).join(' and ')
    caveats.push({ code: 'maximum-only', candidate: read.id, data: { property: list(maximal), factors } })
  }
  if (typical.length > 0) caveats.push({ code: 'typical-only', candidate: read.id, data: { property: list(typical) } })
  return caveats
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
