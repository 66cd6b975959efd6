import type { CalibratedRectifier, Gaussian } from '../domain/calibrated-rectifier.ts'
import type { Caveat } from '../domain/caveat.ts'
import { referenceTemperature } from '../domain/constants.ts'
import type { ForwardLine, ForwardRow, RectifierRecord } from '../domain/rectifier.ts'
import { conditioned, type Observation } from './bayesian-update.ts'
import { classPriors, resistivePerKelvin } from './class-priors.ts'
import { forwardDesign } from './design-rows.ts'
import { figureText } from './figure-text.ts'
import type { NamedObservation } from './find-contradiction.ts'
import { maximumShift, rowErrors, unitSpread } from './grades.ts'
import { fromDirections, priorGaussians } from './prior-gaussians.ts'

/** Everything the record says about forward voltage. */
export interface ForwardEvidence {
  readonly forward: CalibratedRectifier['forward']
  /** The rows that were read: none beside a line. */
  readonly rows: readonly ForwardRow[]
  readonly caveats: readonly Caveat[]
}

/** Class prior of V_F updated by the record's forward rows, or the record's own line. */
export function forwardEvidence(record: RectifierRecord): ForwardEvidence {
  const line = record.forwardLine
  if (line !== null) return { forward: fromLine(record, line), rows: [], caveats: assumedJunction(record.id, line) }
  const usable = usableRows(record)
  const posterior = conditioned(
    priorGaussians(record.class).forward,
    usable.map((row) => observe(row, record.ratings.averageCurrent)),
  )
  return {
    forward: {
      posterior,
      unitSpread: unitSpread(usable, 'forward'),
      line: false,
      origin: usable.length > 0 ? 'given' : 'class-guess',
    },
    rows: usable,
    caveats: record.forward.flatMap((row) =>
      row.drop > 0 ? assumedJunction(record.id, row) : unusable(record.id, row),
    ),
  }
}

/** The forward rows as evidence, by name. */
export function forwardObservations(record: RectifierRecord): NamedObservation[] {
  return usableRows(record).map((row) => ({
    name: row.place.name,
    observation: observe(row, record.ratings.averageCurrent),
  }))
}

function usableRows(record: RectifierRecord): ForwardRow[] {
  return record.forward.filter((row) => row.drop > 0)
}

function observe(row: ForwardRow, ratedCurrent: number): Observation {
  const value = row.grade === 'maximum' ? row.drop / maximumShift.forward : row.drop
  const error = rowErrors(row, 'forward').reading * value
  const junction = row.junction ?? referenceTemperature
  return {
    designs: [forwardDesign({ ratedCurrent, current: row.current, junction, line: false })],
    values: [value],
    noise: [error * error],
  }
}

/**
 * The line itself is the centre. Its reading error is one common factor on the whole line; coefficients with temperature
 * that it does not state come from the class, with the class's doubt: resistance k r (k per kelvin of the resistance at
 * T0), threshold such that V_F at I0 moves as the class's does.
 */
function fromLine(record: RectifierRecord, line: ForwardLine): CalibratedRectifier['forward'] {
  const errors = rowErrors(line, 'forward')
  const scale = line.grade === 'maximum' ? 1 / maximumShift.forward : 1
  const rated = record.ratings.averageCurrent
  const pivot = (line.junction ?? referenceTemperature) - referenceTemperature
  const [growth, growthDeviation] = resistivePerKelvin
  const [perKelvin, perKelvinDeviation] = classPriors[record.class].forward.perKelvin
  const atReference = line.resistance / (1 + growth * pivot)
  const resistanceSlope = line.resistancePerKelvin ?? growth * atReference
  const thresholdSlope = line.thresholdPerKelvin ?? perKelvin - resistanceSlope * rated
  const place = (threshold: number, resistance: number) => [
    -pivot * threshold,
    0,
    -pivot * resistance * rated,
    threshold,
    0,
    resistance * rated,
  ]
  const moved = place(thresholdSlope, resistanceSlope)
  const mean = [line.threshold + moved[0]!, 0, line.resistance * rated + moved[2]!, moved[3]!, 0, moved[5]!].map(
    (c) => c * scale,
  )
  const directions = [mean.map((c) => c * errors.reading)]
  if (line.thresholdPerKelvin === null) directions.push(place(perKelvinDeviation, 0))
  if (line.resistancePerKelvin === null) {
    const resistance = growthDeviation * atReference
    directions.push(place(line.thresholdPerKelvin === null ? -resistance * rated : 0, resistance))
  }
  const posterior: Gaussian = { mean: Float64Array.from(mean), covariance: fromDirections(directions) }
  return { posterior, unitSpread: errors.unit, line: true, origin: 'given' }
}

function assumedJunction(candidate: string, row: ForwardRow | ForwardLine): Caveat[] {
  return row.junction === null ? [{ code: 'row-junction-assumed', candidate, data: { row: row.place.name } }] : []
}

function unusable(candidate: string, row: ForwardRow): Caveat[] {
  return [
    {
      code: 'row-impossible',
      candidate,
      data: {
        row: row.place.name,
        found: `V_F ${row.drop} V`,
        bound: `0 V at ${figureText('current', row.current, 'A')}`,
      },
    },
  ]
}
