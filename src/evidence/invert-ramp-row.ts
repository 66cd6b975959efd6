import type { Caveat } from '../domain/caveat.ts'
import { referenceSlope, referenceTemperature } from '../domain/constants.ts'
import type { RampRow } from '../domain/rectifier.ts'
import { type Observation, predictedCovariance, predictedMean } from './bayesian-update.ts'
import { type ChosenFigures, chooseFigures } from './choose-figures.ts'
import { type RecoveryCondition, recoveryDesigns } from './design-rows.ts'
import { type FigureErrors, fitFigures } from './fit-figures.ts'
import { maximumShift, rowErrors } from './grades.ts'
import type { RampFigures, RecoveryPoint } from './invert-pair.ts'
import type { FigureName, RampReading } from './recovery-figures.ts'
import type { RowContext, RowReading, UnusableRow } from './row-reading.ts'
import { type ExpectedPoint, linearisedFigure } from './single-figure.ts'
import { chargeIsComputed, disagreement } from './third-figure.ts'

/** sd of ln of a current or slope that the row does not state. */
const assumedConditionError = 0.5
/** More error on trr whose definition is not stated, and the error of a softness read from such a trr. */
const unknownDefinitionError = 0.15
const unknownSoftnessError = 0.25
/** y moves with the reverse voltage: per ln of the ratio, and for a row that states none. */
const voltageError = 0.1
const unknownVoltageError = 0.2
/** A softness of 0 would be a tail of no length. */
const leastSoftness = 0.02
/** More than this between a third figure and the other two is told. */
const inconsistentBeyond = 0.15

/** One ramp row as evidence on (u, y); null when it states no figure, unusable when nothing near its class shows its only one. */
export function invertRampRow(row: RampRow, context: RowContext): RowReading | UnusableRow | null {
  const reading: RampReading = {
    current: row.current ?? context.ratedCurrent,
    slope: row.slope ?? referenceSlope,
    recoveryTimeBy: row.recoveryTimeBy,
    softnessBy: row.softnessBy,
  }
  const figures = figuresOf(row)
  const stated = figureNames.filter((name) => figures[name] !== null)
  if (stated.length === 0) return null
  const condition = conditionOf(row, reading, context)
  const designs = recoveryDesigns(condition)
  const expected = expectedPoint(context, designs)
  const computed = chargeIsComputed(figures)
  const given = computed ? stated.filter((name) => name !== 'charge') : stated
  const chosen = chooseFigures(reading, figures, given, expected)
  const difference = disagreement(reading, figures, chosen.names)
  const view = {
    row,
    reading,
    figures,
    errors: errorsOf(row),
    designs,
    context,
    inconsistent: difference > inconsistentBeyond,
  }
  const single = chosen.names.length === 1 ? chosen.names[0]! : null
  const observed = single === null ? observeTwo(view, chosen) : observeOne(view, single, expected)
  if (observed === null)
    return { unusable: { code: 'row-impossible', candidate: context.id, data: { row: row.place.name } } }
  return {
    row,
    condition,
    ...observed,
    tellsRatio: single === null || single === 'softness',
    single: single && { reading, name: single, value: figures[single]! },
    caveats: caveatsOf(row, context.id, chosen, computed, difference),
  }
}

const figureNames: readonly FigureName[] = ['recoveryTime', 'charge', 'peakReverseCurrent', 'softness']

interface RampView {
  readonly row: RampRow
  readonly reading: RampReading
  readonly figures: RampFigures
  readonly errors: FigureErrors
  readonly designs: readonly [Float64Array, Float64Array]
  readonly context: RowContext
  readonly inconsistent: boolean
}

interface Observed {
  readonly observation: Observation
  readonly point: RecoveryPoint
}

function observeTwo(view: RampView, chosen: ChosenFigures): Observed {
  const { reading, figures, errors, designs, row } = view
  let fitted = fitFigures({ reading, figures, names: chosen.names, errors, start: chosen.starts[0]! })
  for (const start of chosen.starts.slice(1)) {
    const other = fitFigures({ reading, figures, names: chosen.names, errors, start })
    if (other.misfit < fitted.misfit) fitted = other
  }
  // figures that contradict each other are worth less by as much as they miss
  const doubt = view.inconsistent ? Math.max(1, fitted.misfit / (chosen.names.length - 2)) : 1
  const [uu, uy, yu, yy] = fitted.covariance
  return {
    point: fitted.point,
    observation: {
      designs,
      values: [fitted.point.lifetime - shiftOf(row), fitted.point.ratio],
      noise: [uu * doubt, uy * doubt, yu * doubt, yy * doubt + voltageVariance(view)],
    },
  }
}

/** A single figure is one scalar: ln figure, linear in u and y around the point where it was solved. */
function observeOne(view: RampView, name: FigureName, expected: ExpectedPoint): Observed | null {
  const { reading, figures, errors, designs, row } = view
  const linearised = linearisedFigure(reading, name, figures[name]!, expected)
  if (linearised === null) return null
  const { point, figure } = linearised
  const design = designs[0].map((entry, index) => figure.byLifetime * entry + figure.byRatio * designs[1][index]!)
  const value =
    Math.log(figures[name]!) -
    figure.value +
    figure.byLifetime * (point.lifetime - shiftOf(row)) +
    figure.byRatio * point.ratio
  const noise =
    errors.figures[name] ** 2 +
    (figure.byCurrent * errors.current) ** 2 +
    (figure.bySlope * errors.slope) ** 2 +
    figure.byRatio ** 2 * voltageVariance(view)
  return { point, observation: { designs: [design], values: [value], noise: [noise] } }
}

function figuresOf(row: RampRow): RampFigures {
  return {
    recoveryTime: row.recoveryTime,
    charge: row.charge,
    peakReverseCurrent: row.peakReverseCurrent,
    softness: row.softness === null ? null : Math.max(row.softness, leastSoftness),
  }
}

function conditionOf(row: RampRow, reading: RampReading, context: RowContext): RecoveryCondition {
  return {
    ratedCurrent: context.ratedCurrent,
    current: reading.current,
    slope: reading.slope,
    junction: row.junction ?? referenceTemperature,
  }
}

/** What the class prior gives at a condition. */
function expectedPoint(context: RowContext, [lifetime, ratio]: readonly [Float64Array, Float64Array]): ExpectedPoint {
  return {
    lifetime: predictedMean(context.prior, lifetime),
    ratio: predictedMean(context.prior, ratio),
    lifetimeVariance: predictedCovariance(context.prior, lifetime, lifetime),
    ratioVariance: predictedCovariance(context.prior, ratio, ratio),
  }
}

function errorsOf(row: RampRow): FigureErrors {
  const { reading } = rowErrors(row, 'recovery')
  const unknown = row.recoveryTimeBy.kind === 'unknown'
  return {
    figures: {
      recoveryTime: unknown ? Math.hypot(reading, unknownDefinitionError) : reading,
      charge: reading,
      peakReverseCurrent: reading,
      softness: unknown && row.softnessBy === 'times' ? Math.max(reading, unknownSoftnessError) : reading,
    },
    current: row.current === null ? assumedConditionError : 0,
    slope: row.slope === null ? assumedConditionError : 0,
  }
}

function shiftOf(row: RampRow): number {
  return row.grade === 'maximum' ? maximumShift.lifetime : 0
}

function voltageVariance({ row, context }: RampView): number {
  const error =
    row.voltage === null
      ? unknownVoltageError
      : voltageError * Math.abs(Math.log(context.blockingVoltage / row.voltage))
  return error * error
}

function caveatsOf(
  row: RampRow,
  candidate: string,
  chosen: ChosenFigures,
  computed: boolean,
  difference: number,
): Caveat[] {
  const place = { row: row.place.name }
  const caveats: Caveat[] = []
  if (chosen.impossible) caveats.push({ code: 'row-impossible', candidate, data: { ...place, ...chosen.impossible } })
  if (difference > inconsistentBeyond)
    caveats.push({ code: 'row-inconsistent', candidate, data: { ...place, difference } })
  if (computed) caveats.push({ code: 'charge-computed', candidate, data: place })
  if (row.current === null || row.slope === null) {
    const missing = row.current !== null ? 'slope' : row.slope !== null ? 'current' : 'current and slope'
    caveats.push({ code: 'row-condition-assumed', candidate, data: { ...place, condition: missing } })
  }
  if (
    row.recoveryTimeBy.kind === 'unknown' &&
    (row.recoveryTime !== null || (row.softness !== null && row.softnessBy === 'times'))
  ) {
    caveats.push({ code: 'trr-definition-unknown', candidate, data: place })
  }
  return caveats
}
