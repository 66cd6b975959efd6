import type { CatalogueMapping } from '../read-mapping.ts'
import type { Path } from '../yaml/path.ts'
import type { Place } from '../yaml/read-yaml.ts'
import type { ColumnIndex } from './columns.ts'
import { isColumn, leavesOf } from './template.ts'

/** Gives the places of one row: which rows of the template's lists are left in it is known by `kept`. */
export type RowPlacer = (row: number, kept: ReadonlyMap<string, readonly number[]>) => (path: Path) => Place

/**
 * Places in a table: the line is the row, the column the column of the table that fills the value, or the first
 * one that fills anything inside it. What a part of the mapping fills is looked up once for all rows.
 */
export function rowPlacer({ record }: CatalogueMapping, index: ColumnIndex): RowPlacer {
  const columns = new Map<unknown, number>()
  const columnOf = (template: unknown): number => {
    const known = columns.get(template)
    if (known !== undefined) return known
    const cell = isColumn(template) ? template : leavesOf(template)[0]?.cell
    const column = cell === undefined ? 1 : (index.get(cell) ?? 0) + 1
    columns.set(template, column)
    return column
  }
  return (row, kept) => (path) => ({ line: row, column: columnOf(partAt(record, kept, path)) })
}

/** The part of the template at a path of the filled record, or the last part on the way there. */
function partAt(record: unknown, kept: ReadonlyMap<string, readonly number[]>, path: Path): unknown {
  let template = record
  let list = ''
  for (const step of path) {
    const inTemplate = typeof step === 'number' ? (kept.get(list)?.[step] ?? step) : step
    const inside = (template as Readonly<Record<string | number, unknown>> | undefined)?.[inTemplate]
    if (inside === undefined) break
    template = inside
    if (typeof step === 'string') list = step
  }
  return template
}
