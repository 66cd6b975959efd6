import { didYouMean } from '../../problems/nearest.ts'
import type { Problem } from '../../problems/problem.ts'
import { shown } from '../../problems/shown.ts'
import type { CatalogueMapping } from '../read-mapping.ts'
import { pathText } from '../yaml/path.ts'
import { type ColumnCell, leavesOf } from './template.ts'

/** Position of each column that the mapping names, from 0. */
export type ColumnIndex = ReadonlyMap<ColumnCell, number>

/** Finds the columns of a mapping in the header row; a name must stand there once. */
export function findColumns(
  mapping: CatalogueMapping,
  header: readonly string[],
): { readonly index: ColumnIndex; readonly problems: readonly Problem[] } {
  const names = header.map((name) => name.trim())
  const index = new Map<ColumnCell, number>()
  const problems = leavesOf(mapping.record).flatMap((leaf): readonly Problem[] => {
    const { column } = leaf.cell
    const at = typeof column === 'number' ? column - 1 : names.indexOf(column.trim())
    const twice = typeof column === 'string' && at !== names.lastIndexOf(column.trim())
    if (at >= 0 && at < names.length && !twice) {
      index.set(leaf.cell, at)
      return []
    }
    const place = {
      ...mapping.placeOf(leaf),
      path: `record.${pathText(leaf.path)}.column`,
      found: shown(String(column)),
    }
    if (twice)
      return [{ ...place, code: 'values-contradict', expected: twiceWords, hint: `write a position such as ${at + 1}` }]
    const hint = didYouMean(String(column), names)
    return [{ ...place, code: 'table-column-unknown', expected: shown(names.join(', ')), hint }]
  })
  return { index, problems }
}

const twiceWords = 'two columns of the table have this name'
