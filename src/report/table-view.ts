import { absent, decimalsFor, fixed } from './format.ts'
import type { Cell, Column, Table } from './view-types.ts'

/** How one column gets its cells from a row of data. */
export interface ColumnSpec<Row> {
  readonly title: string
  readonly unit?: string
  readonly group: string
  readonly key?: boolean
  /** Value in the unit of the column. */
  readonly value: (row: Row) => number | string | null
  /** Replaces the number by words, e.g. "unknown". */
  readonly words?: (row: Row) => string | null
  /** Columns of one family share their decimals, so that they can be added by eye. */
  readonly family?: string
  readonly decimals?: number
  readonly text?: boolean
}

/** Cells of all rows, with the digits decided by column or family. */
export function tableOf<Row>(specs: readonly ColumnSpec<Row>[], rows: readonly Row[]): Table {
  const families = familyDecimals(specs, rows)
  const decimals = specs.map((spec) => {
    if (spec.decimals !== undefined) return spec.decimals
    return spec.family === undefined ? decimalsFor(numbers(spec, rows)) : families.get(spec.family)!
  })
  return {
    columns: specs.map(columnOf),
    rows: rows.map((row) => specs.map((spec, index) => cellOf(spec, row, decimals[index]!))),
  }
}

function columnOf<Row>(spec: ColumnSpec<Row>): Column {
  return {
    title: spec.title,
    unit: spec.unit ?? null,
    numeric: spec.text !== true,
    group: spec.group,
    key: spec.key ?? false,
  }
}

function cellOf<Row>(spec: ColumnSpec<Row>, row: Row, decimals: number): Cell {
  const value = spec.value(row)
  const spoken = spec.words?.(row) ?? null
  if (typeof value === 'string') return { text: spoken ?? value, value }
  const finite = value !== null && Number.isFinite(value) ? value : null
  return { text: spoken ?? (finite === null ? absent : fixed(finite, decimals)), value: finite }
}

function familyDecimals<Row>(specs: readonly ColumnSpec<Row>[], rows: readonly Row[]): Map<string, number> {
  const values = new Map<string, (number | null)[]>()
  for (const spec of specs) {
    if (spec.family === undefined) continue
    values.set(spec.family, [...(values.get(spec.family) ?? []), ...numbers(spec, rows)])
  }
  return new Map([...values].map(([family, all]) => [family, decimalsFor(all)]))
}

function numbers<Row>(spec: ColumnSpec<Row>, rows: readonly Row[]): (number | null)[] {
  return rows.map((row) => {
    const value = spec.value(row)
    return typeof value === 'number' ? value : null
  })
}

/** A column of text. */
export function textColumn<Row>(
  title: string,
  group: string,
  value: (row: Row) => string | null,
  key = false,
): ColumnSpec<Row> {
  return { title, group, key, value, words: (row) => value(row) ?? absent, text: true }
}

/** A column of numbers, scaled from SI to its unit. */
export function numberColumn<Row>(
  title: string,
  unit: string,
  group: string,
  value: (row: Row) => number | null,
  more: Partial<Pick<ColumnSpec<Row>, 'family' | 'decimals' | 'words' | 'key'>> & { readonly scale?: number } = {},
): ColumnSpec<Row> {
  const { scale = 1, ...rest } = more
  const scaled = (row: Row) => {
    const number = value(row)
    // twelve digits: a scale of 1e9 would otherwise leave its rounding error in the file
    return number === null ? null : Number((number * scale).toPrecision(12))
  }
  return { title, ...(unit === '' ? {} : { unit }), group, value: scaled, ...rest }
}

/** A column title without the signs that say where a narrow table may break it and where not. */
export function plainTitle(title: string): string {
  return title.replaceAll('\u00AD', '').replaceAll('\u00A0', ' ')
}

/** A table in which a column that stands in two groups (the total) stands once. */
export function distinctColumns(table: Table): Table {
  const first = (index: number) =>
    table.columns.findIndex(
      ({ title, unit }) => title === table.columns[index]!.title && unit === table.columns[index]!.unit,
    )
  return pickColumns(table, (index) => first(index) === index)
}

/** The same table cut into its groups, each led by the key columns. */
export function groupTables(table: Table): { readonly group: string; readonly table: Table }[] {
  const groups = [...new Set(table.columns.filter(({ key }) => !key).map(({ group }) => group))]
  return groups.map((group) => ({
    group,
    table: pickColumns(table, (index) => table.columns[index]!.key || table.columns[index]!.group === group),
  }))
}

export function pickColumns(table: Table, keep: (index: number) => boolean): Table {
  return {
    columns: table.columns.filter((_, index) => keep(index)),
    rows: table.rows.map((row) => row.filter((_, index) => keep(index))),
  }
}
