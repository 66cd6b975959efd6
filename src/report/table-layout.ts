import { distinctColumns, pickColumns } from './table-view.ts'
import { textWidth } from './text-width.ts'
import type { Column, Table } from './view-types.ts'

/** A table that fits, with the width of each column. */
export interface Piece {
  readonly heading: string
  readonly table: Table
  readonly widths: readonly number[]
}

/** Spaces between two columns. */
export const gutter = 2
const narrowestText = 10

/**
 * Cuts a table so that nothing is cut off: as many groups of columns side by side as fit, each piece led by the key
 * columns; a group that is too wide by itself is divided further.
 */
export function layTable(table: Table, width: number): Piece[] {
  const groups = [...new Set(table.columns.filter(({ key }) => !key).map(({ group }) => group))]
  const pieces: Piece[] = []
  let taken: string[] = []
  const piece = (names: readonly string[]) => distinctColumns(pickGroups(table, names))
  const close = () => {
    if (taken.length > 0) pieces.push(...divide(piece(taken), width, taken.join('; ')))
    taken = []
  }
  for (const group of groups) {
    if (taken.length > 0 && fittingWidths(piece([...taken, group]), width, null) === null) close()
    taken.push(group)
  }
  close()
  return pieces
}

function pickGroups(table: Table, names: readonly string[]): Table {
  return pickColumns(table, (index) => table.columns[index]!.key || names.includes(table.columns[index]!.group))
}

function divide(table: Table, width: number, heading: string): Piece[] {
  const pieces: Piece[] = []
  let taken: number[] = []
  const piece = (indices: readonly number[]) =>
    pickColumns(table, (index) => table.columns[index]!.key || indices.includes(index))
  table.columns.forEach(({ key }, index) => {
    if (key) return
    if (taken.length > 0 && fittingWidths(piece([...taken, index]), width, narrowestText) === null) {
      pieces.push(squeezed(piece(taken), width, heading))
      taken = []
    }
    taken.push(index)
  })
  return [...pieces, squeezed(piece(taken), width, heading)]
}

/** A single column that does not fit even so: its cells wrap. */
function squeezed(table: Table, width: number, heading: string): Piece {
  const fitted = fittingWidths(table, width, narrowestText)
  if (fitted !== null) return { heading, table, widths: fitted }
  const widths = naturalWidths(table, true)
  while (total(widths) > width) {
    const widest = widths.indexOf(Math.max(...widths))
    if (widths[widest]! <= 1) break
    widths[widest]! -= 1
  }
  return { heading, table, widths }
}

/**
 * Widths that fit: header words are broken only as far as needed, then text columns narrowed to `narrowest` (null: not
 * at all); null where they do not fit.
 */
function fittingWidths(table: Table, width: number, narrowest: number | null): number[] | null {
  const widths = naturalWidths(table, false)
  const broken = naturalWidths(table, true)
  while (total(widths) > width) {
    const savings = widths.map((size, index) => size - broken[index]!)
    const best = savings.indexOf(Math.max(...savings))
    if (savings[best] === 0) return narrowest === null ? null : narrowed(table, widths, width, narrowest)
    widths[best] = broken[best]!
  }
  return widths
}

/** Takes from the widest text column, one character at a time, until the table fits. */
function narrowed(table: Table, widths: number[], width: number, narrowest: number): number[] | null {
  const least = table.columns.map((column, index) =>
    column.numeric ? widths[index]! : Math.max(narrowest, headerWidth(column, true)),
  )
  while (total(widths) > width) {
    const spare = widths.map((size, index) => (size > least[index]! ? size : 0))
    const widest = spare.indexOf(Math.max(...spare))
    if (spare[widest] === 0) return null
    widths[widest]! -= 1
  }
  return widths
}

function naturalWidths(table: Table, broken: boolean): number[] {
  return table.columns.map((column, index) =>
    Math.max(headerWidth(column, broken), ...table.rows.map((row) => textWidth(row[index]!.text))),
  )
}

function headerWidth(column: Column, broken: boolean): number {
  return Math.max(...headerLines(column, broken ? 0 : Number.POSITIVE_INFINITY).map(textWidth))
}

/** Title over unit, the title broken at spaces and at its soft hyphens where the width asks for it. */
export function headerLines({ title, unit }: Column, width: number): string[] {
  const lines = title.split(' ').flatMap((word) => {
    const whole = word.replaceAll('\u00AD', '')
    if (textWidth(whole) <= width) return [whole]
    const parts = word.split('\u00AD')
    return parts.map((part, index) => (index < parts.length - 1 && !part.endsWith('-') ? `${part}-` : part))
  })
  const shown = lines.map((line) => line.replaceAll('\u00A0', ' '))
  return unit === null ? shown : [...shown, unit]
}

function total(widths: readonly number[]): number {
  return widths.reduce((sum, width) => sum + width, gutter * (widths.length - 1))
}
