import type { Caveat } from '../domain/caveat.ts'
import type { RecoveryRow } from '../domain/rectifier.ts'
import { invertRampRow } from './invert-ramp-row.ts'
import { invertStepRow } from './invert-step-row.ts'
import { isReadable } from './is-readable.ts'
import type { RowContext, RowReading } from './row-reading.ts'

/** All recovery rows as evidence; rows from which nothing can be read are told and left out. */
export function readRecoveryRows(
  rows: readonly RecoveryRow[],
  context: RowContext,
): { readonly readings: readonly RowReading[]; readonly caveats: readonly Caveat[] } {
  const readings: RowReading[] = []
  const caveats: Caveat[] = []
  for (const row of rows) {
    if (!isReadable(row, context.ratedCurrent)) {
      caveats.push({ code: 'row-impossible', candidate: context.id, data: { row: row.place.name } })
      continue
    }
    const read = row.fixture === 'ramp' ? invertRampRow(row, context) : invertStepRow(row, context)
    if (read === null) continue
    if ('unusable' in read) {
      caveats.push(read.unusable)
      continue
    }
    readings.push(read)
    caveats.push(...read.caveats)
    if (row.junction === null)
      caveats.push({ code: 'row-junction-assumed', candidate: context.id, data: { row: row.place.name } })
  }
  return { readings, caveats }
}
