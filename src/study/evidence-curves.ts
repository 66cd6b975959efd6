import { celsiusZero } from '../domain/constants.ts'
import type { RampRow } from '../domain/rectifier.ts'
import type { EventResult } from '../domain/result.ts'
import type { EvidenceCurve } from '../domain/review.ts'
import { conditionOfRow, factorOutside } from '../evidence/operating-condition.ts'
import { steadyFiguresAt } from '../evidence/steady-figures.ts'
import type { Candidate } from './candidate.ts'

const points = 25
/** Drawn beyond the outermost of rows and operating point. */
const overhang = 1.6
/** As in the provenance: further outside the rows' slopes a figure is extrapolated. */
const extrapolatedBeyond = 1.5

/**
 * What the fit of a record says the charge is along the slope, at the current and temperature of the stage, from the
 * steady state as rows are read; null without stored charge or an event.
 */
export function evidenceCurve({ record, rectifier }: Candidate, event: EventResult | null): EvidenceCurve | null {
  if (event === null || event.current_a === 0 || !(event.slope_a_per_s > 0)) return null
  const rows = record.recovery.filter((row): row is RampRow => row.fixture === 'ramp' && row.charge !== null)
  const places = rows.map((row) => ({ row, ...conditionOfRow(row, record) }))
  const spans = record.recovery.map((row) => conditionOfRow(row, record).slope)
  const slopes = [event.slope_a_per_s, ...spans]
  const [low, high] = [Math.min(...slopes) / overhang, Math.max(...slopes) * overhang]
  const junction = event.junction_c + celsiusZero
  const curve = Array.from({ length: points }, (_, k) => {
    const slope = low * (high / low) ** (k / (points - 1))
    const figures = steadyFiguresAt(rectifier, { current: event.current_a, slope, junction })
    const extrapolated = spans.length === 0 || factorOutside(slope, spans) > extrapolatedBeyond
    return figures === null ? null : { slope_a_per_s: slope, qrr_c: figures.charge, extrapolated }
  })
  const known = curve.filter((point) => point !== null)
  if (known.length === 0) return null
  return {
    id: record.id,
    current_a: event.current_a,
    junction_c: event.junction_c,
    slope_a_per_s: event.slope_a_per_s,
    points: known,
    given: places.map(({ row, current, slope, junction: at }) => ({
      row: row.place.name,
      slope_a_per_s: slope,
      current_a: current,
      junction_c: at - celsiusZero,
      qrr_c: row.charge!,
    })),
  }
}
