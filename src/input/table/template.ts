import type { Path } from '../yaml/path.ts'

/** A record whose leaves may be columns of a table, as the mapping file holds it. */
export type Template = Readonly<Record<string, unknown>>

/** A column of a table in place of a value. */
export interface ColumnCell {
  /** 1-based position, or the name in the header row. */
  readonly column: number | string
  readonly unit?: string
  readonly words?: Readonly<Record<string, string>>
}

/** A place in the record that a column fills. */
export interface Leaf {
  readonly path: Path
  readonly cell: ColumnCell
}

export function isColumn(value: unknown): value is ColumnCell {
  return typeof value === 'object' && value !== null && Object.hasOwn(value, 'column')
}

/** Every column that a template names. */
export function leavesOf(value: unknown, path: Path = []): readonly Leaf[] {
  if (isColumn(value)) return [{ path, cell: value }]
  if (typeof value !== 'object' || value === null) return []
  if (Array.isArray(value)) return value.flatMap((item, index) => leavesOf(item, [...path, index]))
  return Object.entries(value).flatMap(([key, child]) => leavesOf(child, [...path, key]))
}

/** Keys whose values are plain numbers. */
export const numberKeys: ReadonlySet<string> = new Set(['price', 'grading', 'softness'])

/** The template with a value in place of each column: 1 of its unit, a plain number, or the first of its words. */
export function sampleOf(value: unknown, key = ''): unknown {
  if (isColumn(value)) return sampleCell(value, key)
  if (typeof value !== 'object' || value === null) return value
  if (Array.isArray(value)) return value.map((item) => sampleOf(item))
  return Object.fromEntries(Object.entries(value).map(([name, child]) => [name, sampleOf(child, name)]))
}

function sampleCell({ unit, words }: ColumnCell, key: string): unknown {
  if (numberKeys.has(key)) return 0.5
  return unit === undefined ? (Object.values(words ?? {})[0] ?? 'x') : `1 ${unit}`
}
