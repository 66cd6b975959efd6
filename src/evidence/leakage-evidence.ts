import type { CalibratedRectifier, Gaussian } from '../domain/calibrated-rectifier.ts'
import type { Caveat } from '../domain/caveat.ts'
import { referenceTemperature } from '../domain/constants.ts'
import type { LeakageRow, RectifierRecord } from '../domain/rectifier.ts'
import { conditioned, type Observation, predictedMean } from './bayesian-update.ts'
import { leakageDesign } from './design-rows.ts'
import type { NamedObservation } from './find-contradiction.ts'
import { maximumShift, rowErrors, unitSpread } from './grades.ts'
import { priorGaussians } from './prior-gaussians.ts'

/** Everything the record says about leakage. */
export interface LeakageEvidence {
  readonly leakage: CalibratedRectifier['leakage']
  /** The rows that were read. */
  readonly rows: readonly LeakageRow[]
  readonly caveats: readonly Caveat[]
}

/** Class prior of ln I_R updated by the record's leakage rows; null for classes in which leakage is not used. */
export function leakageEvidence(record: RectifierRecord): LeakageEvidence {
  const prior = priorGaussians(record.class).leakage
  if (prior === null) return { leakage: null, rows: [], caveats: [] }
  const ratedVoltage = record.ratings.reverseVoltage
  const usable = usableRows(record)
  const posterior = conditioned(
    prior,
    usable.map((row) => observe(row, ratedVoltage)),
  )
  const spread = unitSpread(usable, 'leakage')
  return {
    leakage: {
      posterior,
      unitSpread: spread,
      origin: usable.length > 0 ? 'given' : 'class-guess',
      maximumShift: usable.length > 0 ? maximumLeakageShift(usable, posterior, ratedVoltage, spread) : 0,
    },
    rows: usable,
    caveats: caveatsOf(record, usable),
  }
}

/** The leakage rows as evidence, by name. */
export function leakageObservations(record: RectifierRecord): NamedObservation[] {
  return usableRows(record).map((row) => ({
    name: row.place.name,
    observation: observe(row, record.ratings.reverseVoltage),
  }))
}

function usableRows(record: RectifierRecord): LeakageRow[] {
  return record.leakage.filter((row) => row.current > 0 && row.voltage > 0)
}

function observe(row: LeakageRow, ratedVoltage: number): Observation {
  const error = rowErrors(row, 'leakage').reading
  const shift = row.grade === 'maximum' ? maximumShift.leakage : 0
  return { designs: [designOf(row, ratedVoltage)], values: [Math.log(row.current) - shift], noise: [error * error] }
}

function designOf(row: LeakageRow, ratedVoltage: number): Float64Array {
  return leakageDesign({ ratedVoltage, voltage: row.voltage, junction: row.junction ?? referenceTemperature })
}

/**
 * From ln I_R of the centre to the maximum: the highest maximum row, moved with the posterior's slopes; without one, two
 * spreads between units. Never below the centre: runaway is judged by it.
 */
function maximumLeakageShift(
  rows: readonly LeakageRow[],
  posterior: Gaussian,
  ratedVoltage: number,
  spread: number,
): number {
  const maxima = rows.filter((row) => row.grade === 'maximum')
  if (maxima.length === 0) return 2 * spread
  return maxima.reduce(
    (highest, row) => Math.max(highest, Math.log(row.current) - predictedMean(posterior, designOf(row, ratedVoltage))),
    0,
  )
}

function caveatsOf(record: RectifierRecord, usable: readonly LeakageRow[]): Caveat[] {
  const candidate = record.id
  const caveats: Caveat[] = []
  for (const row of record.leakage) {
    const data = { row: row.place.name }
    if (!usable.includes(row))
      caveats.push({
        code: 'row-impossible',
        candidate,
        data: { ...data, found: `I_R ${row.current} A at ${row.voltage} V`, bound: '0' },
      })
    else if (row.junction === null) caveats.push({ code: 'row-junction-assumed', candidate, data })
  }
  return caveats
}
