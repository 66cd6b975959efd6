import { celsiusZero } from '../domain/constants.ts'
import type { RampRow, RectifierRecord } from '../domain/rectifier.ts'
import type { RowComparison } from '../domain/review.ts'
import { conditionOfRow } from '../evidence/operating-condition.ts'
import { steadyFiguresAt } from '../evidence/steady-figures.ts'
import type { Candidate } from './candidate.ts'

/** Every recovery figure of a record beside what the fit makes of it under the row's own condition. */
export function rowComparisons({ record, rectifier }: Candidate): RowComparison[] {
  return record.recovery.flatMap((row) => (row.fixture === 'ramp' ? figuresOfRow(row, record, rectifier) : []))
}

function figuresOfRow(row: RampRow, record: RectifierRecord, rectifier: Candidate['rectifier']): RowComparison[] {
  const condition = conditionOfRow(row, record)
  const model = steadyFiguresAt(rectifier, condition)
  if (model === null) return []
  const figures = [
    ['qrr_c', row.charge, model.charge],
    ['peak_reverse_a', row.peakReverseCurrent, model.peakReverseCurrent],
    // Other definitions of trr mean another time; only the line through 90 % and 25 % can stand beside ours.
    ['trr_s', row.recoveryTimeBy.kind === 'line-90-25' ? row.recoveryTime : null, model.recoveryTime],
  ] as const
  return figures.flatMap(([figure, given, computed]) =>
    given === null
      ? []
      : [
          {
            id: record.id,
            row: row.place.name,
            figure,
            current_a: condition.current,
            slope_a_per_s: condition.slope,
            junction_c: condition.junction - celsiusZero,
            given,
            model: computed,
            grade: row.grade,
          },
        ],
  )
}
