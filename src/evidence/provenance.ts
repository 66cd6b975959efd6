import type { CalibratedRectifier } from '../domain/calibrated-rectifier.ts'
import type { Caveat } from '../domain/caveat.ts'
import { currentFloor, referenceTemperature } from '../domain/constants.ts'
import type { RectifierRecord } from '../domain/rectifier.ts'
import type { Provenance } from '../domain/result.ts'
import { conditionOfRow, distanceOutside, factorOutside, type OperatingCondition } from './operating-condition.ts'
import { forwardDropAt, leakageCurrentAt } from './recovery-at.ts'
import { type EventFigures, steadyFiguresAt } from './steady-figures.ts'

/** Beyond these outside the rows' span a figure is extrapolated, and far. */
const extrapolatedBeyond = { factor: 1.5, kelvin: 25 } as const
const farBeyond = { factor: 3, kelvin: 75 } as const
/** Within these of a row that states the figure, it is that row's own. */
const sameWithin = { factor: 1.02, kelvin: 2 } as const

/** Inputs of {@link provenanceAt}. */
export interface ProvenanceInput {
  /** With the rows alone that the calibration read. */
  readonly record: RectifierRecord
  readonly rectifier: CalibratedRectifier
  readonly condition: OperatingCondition
  /** Current at which the printed V_F holds. [A] */
  readonly forwardCurrent: number
  /** [V] */
  readonly blockingVoltage: number
  /** The event as it was solved, from the real conduction interval; null: from the steady state, nothing at no current. */
  readonly event: EventFigures | null
}

/** Where every printed figure of a part comes from and by what factor it was moved, with caveats where it was moved far. */
export function provenanceAt(input: ProvenanceInput): {
  readonly provenance: readonly Provenance[]
  readonly caveats: readonly Caveat[]
} {
  const parts = [recoveryOrigins(input), forwardOrigin(input), leakageOrigin(input), capacitiveOrigin(input)]
  return { provenance: parts.flatMap((part) => part.provenance), caveats: parts.flatMap((part) => part.caveats) }
}

interface Origins {
  readonly provenance: readonly Provenance[]
  readonly caveats: readonly Caveat[]
}

const nothing: Origins = { provenance: [], caveats: [] }

const eventFigures = [
  ['event.qrr_c', 'charge'],
  ['event.peak_reverse_a', 'peakReverseCurrent'],
  ['event.trr_s', 'recoveryTime'],
] as const

function recoveryOrigins({ record, rectifier, condition, event }: ProvenanceInput): Origins {
  if (rectifier.recovery === null) {
    return plain(
      eventFigures.map(([figure]) => ({ figure, how: 'given', from: 'class without stored charge', factor: null })),
    )
  }
  if (rectifier.recovery.origin === 'class-guess') return plain(eventFigures.map(([figure]) => guess(figure)))
  const at = { ...condition, current: Math.max(condition.current, currentFloor * rectifier.ratedCurrent) }
  const places = record.recovery.map((row) => ({ row, ...conditionOfRow(row, record) }))
  const nearest = places.reduce((best, place) => (separation(at, place) < separation(at, best) ? place : best))
  const from = nearest.row.place.name
  if (event === null && !(condition.current > 0)) {
    return plain(eventFigures.map(([figure]) => ({ figure, how: 'converted', from, factor: 0 })))
  }
  const span = spanOf(at, places)
  const figures = event ?? steadyFiguresAt(rectifier, condition)
  const fitted = steadyFiguresAt(rectifier, nearest)
  const same = near(at, nearest)
  const provenance = eventFigures.map(([figure, key]) => {
    const stated = statedFigure(nearest.row, key)
    const how = span.extrapolated ? 'extrapolated' : same && stated !== null ? 'given' : 'converted'
    return {
      figure,
      how,
      from,
      factor: ratio(figures?.[key], stated ?? fitted?.[key]),
    } as const
  })
  return { provenance, caveats: span.far ? [farCaveat(record, 'Recovery', from, span.factor)] : [] }
}

/** A figure as the row prints it, where it means the same as ours. */
function statedFigure(row: RectifierRecord['recovery'][number], key: keyof EventFigures): number | null {
  if (row.fixture === 'step') return null
  if (key === 'recoveryTime') {
    const { kind } = row.recoveryTimeBy
    return kind === 'line-90-25' || kind === 'unknown' ? row.recoveryTime : null
  }
  return row[key]
}

function forwardOrigin({ record, rectifier, condition, forwardCurrent }: ProvenanceInput): Origins {
  const figure = 'forward_v'
  const line = record.forwardLine
  if (line !== null) {
    const away = Math.abs(condition.junction - (line.junction ?? referenceTemperature))
    const complete = line.thresholdPerKelvin !== null && line.resistancePerKelvin !== null
    const how =
      away <= sameWithin.kelvin ? 'given' : complete || away <= extrapolatedBeyond.kelvin ? 'converted' : 'extrapolated'
    return plain([{ figure, how, from: line.place.name, factor: null }])
  }
  if (rectifier.forward.origin === 'class-guess') return plain([guess(figure)])
  const at = { current: forwardCurrent, slope: 1, junction: condition.junction }
  const places = record.forward.map((row) => ({
    row,
    current: row.current,
    slope: 1,
    junction: row.junction ?? referenceTemperature,
  }))
  const { drop } = forwardDropAt({ rectifier, current: forwardCurrent, junction: condition.junction })
  return fromRows(record, figure, 'Forward voltage', at, places, (row) => ratio(drop, row.drop))
}

function leakageOrigin({ record, rectifier, condition, blockingVoltage }: ProvenanceInput): Origins {
  const figure = 'losses_w.leakage'
  const leakage = leakageCurrentAt({ rectifier, voltage: blockingVoltage, junction: condition.junction })
  if (leakage === null) return nothing
  if (rectifier.leakage!.origin === 'class-guess') return plain([guess(figure)])
  const at = { current: blockingVoltage, slope: 1, junction: condition.junction }
  const places = record.leakage.map((row) => ({
    row,
    current: row.voltage,
    slope: 1,
    junction: row.junction ?? referenceTemperature,
  }))
  return fromRows(record, figure, 'Leakage', at, places, (row) => ratio(leakage.current, row.current))
}

function capacitiveOrigin({ record, rectifier }: ProvenanceInput): Origins {
  const figure = 'losses_w.capacitive'
  if (rectifier.capacitance === null) return rectifier.storesCharge ? nothing : plain([guess(figure)])
  const how = record.capacitance!.kind === 'law' ? 'given' : 'converted'
  return plain([{ figure, how, from: 'capacitance', factor: null }])
}

interface Named {
  readonly place: { readonly name: string }
}
type Placed<Row> = OperatingCondition & { readonly row: Row }

/** Origin of a figure with one reading per row; `current` stands for whatever the row is scaled over. */
function fromRows<Row extends Named>(
  record: RectifierRecord,
  figure: string,
  spoken: string,
  at: OperatingCondition,
  places: readonly Placed<Row>[],
  factorTo: (row: Row) => number | null,
): Origins {
  const nearest = places.reduce((best, place) => (separation(at, place) < separation(at, best) ? place : best))
  const span = spanOf(at, places)
  const how = span.extrapolated ? 'extrapolated' : near(at, nearest) ? 'given' : 'converted'
  const from = nearest.row.place.name
  return {
    provenance: [{ figure, how, from, factor: factorTo(nearest.row) }],
    caveats: span.far ? [farCaveat(record, spoken, from, span.factor)] : [],
  }
}

function spanOf(at: OperatingCondition, places: readonly OperatingCondition[]) {
  const factor = Math.max(
    factorOutside(
      at.current,
      places.map((place) => place.current),
    ),
    factorOutside(
      at.slope,
      places.map((place) => place.slope),
    ),
  )
  const kelvin = distanceOutside(
    at.junction,
    places.map((place) => place.junction),
  )
  return {
    factor,
    extrapolated: factor > extrapolatedBeyond.factor || kelvin > extrapolatedBeyond.kelvin,
    far: factor > farBeyond.factor || kelvin > farBeyond.kelvin,
  }
}

/** Distance between conditions in units of what counts as extrapolation. */
function separation(one: OperatingCondition, other: OperatingCondition): number {
  const unit = Math.log(extrapolatedBeyond.factor)
  return (
    Math.abs(Math.log(one.current / other.current)) / unit +
    Math.abs(Math.log(one.slope / other.slope)) / unit +
    Math.abs(one.junction - other.junction) / extrapolatedBeyond.kelvin
  )
}

function near(at: OperatingCondition, place: OperatingCondition): boolean {
  return (
    factorOutside(at.current, [place.current]) <= sameWithin.factor &&
    factorOutside(at.slope, [place.slope]) <= sameWithin.factor &&
    Math.abs(at.junction - place.junction) <= sameWithin.kelvin
  )
}

function farCaveat(record: RectifierRecord, figure: string, row: string, factor: number): Caveat {
  // far in temperature only: the sentence then says "far" without a factor
  const data = factor > farBeyond.factor ? { figure, row, factor } : { figure, row }
  return { code: 'extrapolated-far', candidate: record.id, data }
}

function plain(provenance: readonly Provenance[]): Origins {
  return { provenance, caveats: [] }
}

function guess(figure: string): Provenance {
  return { figure, how: 'class-guess', from: 'class', factor: null }
}

function ratio(value: number | null | undefined, reference: number | null | undefined): number | null {
  const quotient = (value ?? Number.NaN) / (reference ?? Number.NaN)
  return Number.isFinite(quotient) ? quotient : null
}
