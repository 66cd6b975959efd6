import type { RectifierRecord } from '../domain/rectifier.ts'
import { didYouMean } from '../problems/nearest.ts'
import type { Problem } from '../problems/problem.ts'
import { shown } from '../problems/shown.ts'
import { boundProblems } from './bound-problems.ts'
import type { StageDocument } from './read-stage.ts'

/**
 * What only all files together show: an id that two records bear, and an id in the stage that no record bears.
 * Without a stage (null) only the records are looked at.
 */
export function checkReferences(
  document: StageDocument | null,
  records: readonly RectifierRecord[],
): readonly Problem[] {
  return boundProblems([...duplicateIds(records), ...(document === null ? [] : unknownIds(document, records))])
}

function duplicateIds(records: readonly RectifierRecord[]): readonly Problem[] {
  const first = new Map<string, RectifierRecord>()
  return records.flatMap((record): readonly Problem[] => {
    const other = first.get(record.id)
    if (other === undefined) {
      first.set(record.id, record)
      return []
    }
    const { file, line, column } = record.place
    const expected = `${other.place.file}:${other.place.line}:${other.place.column}`
    const hint = 'give one of them another id'
    return [{ code: 'id-duplicate', file, line, column, path: 'id', found: shown(record.id), expected, hint }]
  })
}

function unknownIds({ file, named }: StageDocument, records: readonly RectifierRecord[]): readonly Problem[] {
  const ids = [...new Set(records.map(({ id }) => id))].sort()
  const known = new Set(ids)
  return named
    .filter(({ id }) => !known.has(id))
    .map(({ id, path, place }) => ({
      code: 'id-unknown',
      file,
      ...place,
      path,
      found: shown(id),
      expected: listedIds(ids),
      hint: didYouMean(id, ids),
    }))
}

/** The ids that are known, the first eight by name. */
export function listedIds(known: readonly string[]): string {
  const ids = [...new Set(known)].sort()
  const first = ids.slice(0, 8).map(shown).join(', ')
  if (ids.length === 0) return 'no record was read'
  return ids.length > 8 ? `known are ${first} and ${ids.length - 8} more` : `known are ${first}`
}
