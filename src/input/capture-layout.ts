import Papa from 'papaparse'
import type { CaptureColumn, CaptureSettings } from '../domain/capture.ts'
import type { Problem } from '../problems/problem.ts'
import { shown } from '../problems/shown.ts'

/** How the cells of a capture file are to be read, decided once for the whole file. */
export interface CaptureLayout {
  readonly delimiter: '\t' | ';' | ','
  readonly decimal: 'point' | 'comma'
  /** Delimiter and decimal sign are both a comma: two neighbouring cells make one number. */
  readonly joined: boolean
  readonly headerRows: number
  /** Positions counted from 0. */
  readonly columns: { readonly time: number | null; readonly current: number; readonly voltage: number | null }
  readonly headers: { readonly time: string; readonly current: string; readonly voltage: string }
}

/** A fault of a table in words; the caller adds the place. */
export interface TableFault extends Pick<Problem, 'code' | 'found' | 'expected' | 'hint'> {
  readonly line: number
  readonly path: string
}

/** Decides delimiter, decimal sign, header and columns from the first lines of a file. */
export function captureLayout(lines: readonly string[], settings: CaptureSettings): CaptureLayout | TableFault {
  const filled = lines.filter((line) => line.trim() !== '')
  const tail = filled.slice(-Math.max(3, Math.ceil(filled.length / 3)))
  const delimiter = tail.some((line) => line.includes('\t'))
    ? '\t'
    : tail.some((line) => line.includes(';'))
      ? ';'
      : ','
  const decimal = decimalOf(
    tail.map((line) => cellsOf(line, delimiter)),
    filled,
    delimiter,
    settings,
  )
  if ('code' in decimal) return decimal
  const rows = lines.map((line) => joinCells(cellsOf(line, delimiter), decimal.joined))
  return columnsOf(rows, { delimiter, ...decimal }, settings)
}

function cellsOf(line: string, delimiter: string): readonly string[] {
  return Papa.parse<string[]>(line, { delimiter }).data[0] ?? ['']
}

/** "0,12,1,5" with decimal commas is 0.12 and 1.5. An odd cell is left alone, so that the row is refused later. */
export function joinCells(cells: readonly string[], joined: boolean): readonly string[] {
  if (!joined || cells.length < 2 || !cells.some((cell) => /\d/.test(cell))) return cells
  if (!cells.every(isHalf)) return cells
  return Array.from({ length: Math.ceil(cells.length / 2) }, (_, k) =>
    2 * k + 1 < cells.length ? `${clean(cells[2 * k]!)},${clean(cells[2 * k + 1]!)}` : cells[2 * k]!,
  )
}

const wholePart = /^[+-]?\d+$/
const fraction = /^\d+(?:[eE][+-]?\d+)?$/
const withPoint = /^[+-]?(?:\d+\.\d*|\.\d+)(?:[eE][+-]?\d+)?$/
const withComma = /^[+-]?(?:\d+,\d*|,\d+)(?:[eE][+-]?\d+)?$/

/** Spaces of all kinds go, the minus sign U+2212 is a minus. */
export function clean(cell: string): string {
  return cell.replace(/[\s\u00A0\u202F"]/g, '').replace(/\u2212/g, '-')
}

type Decimal = { readonly decimal: 'point' | 'comma'; readonly joined: boolean }

function decimalOf(
  tail: readonly (readonly string[])[],
  lines: readonly string[],
  delimiter: string,
  settings: CaptureSettings,
): Decimal | TableFault {
  const cells = tail.flat().map(clean)
  const points = cells.find((cell) => withPoint.test(cell))
  const commas = cells.find((cell) => withComma.test(cell))
  const whole = delimiter === ',' && points === undefined && commas === undefined
  const pairs =
    whole &&
    tail.length > 0 &&
    tail[0]!.length / 2 >= furthestColumn(settings) &&
    tail.every((row) => row.length % 2 === 0 && row.length === tail[0]!.length && row.every(isHalf))
  if (settings.decimal === 'comma') return { decimal: 'comma', joined: pairs }
  if (settings.decimal === 'point') return { decimal: 'point', joined: false }
  if (points !== undefined && commas !== undefined) {
    const found = `"${points}" and "${commas}" stand in one file`
    return fault('table-malformed', found, 'one decimal sign', 'set decimal: point or decimal: comma')
  }
  if (commas !== undefined) return { decimal: 'comma', joined: false }
  if (!pairs) return { decimal: 'point', joined: false }
  return decidedByHeader(tail[0]!.length, lines) ?? ambiguous(lines.at(-1)!)
}

/** Whole numbers in even places, digits in odd ones: two cells could be one number. */
function isHalf(cell: string, k: number): boolean {
  return (k % 2 === 0 ? wholePart : fraction).test(clean(cell))
}

/** Highest position that the settings ask for, counted from 1. */
function furthestColumn({ time, current, voltage }: CaptureSettings): number {
  const positions = [time, current, voltage].map((column) => (typeof column?.column === 'number' ? column.column : 1))
  return Math.max(...positions)
}

/** As many names as cells: the commas part columns. Half as many: every other comma is a decimal sign. */
function decidedByHeader(cells: number, lines: readonly string[]): Decimal | null {
  const names = lines
    .map((line) => cellsOf(line, ','))
    .filter((row) => row.length > 1 && row.every((cell) => !/^[+-]?[\d.]/.test(clean(cell)) && clean(cell) !== ''))
  const count = names.at(-1)?.length
  if (count === cells) return { decimal: 'point', joined: false }
  return count === cells / 2 ? { decimal: 'comma', joined: true } : null
}

function ambiguous(line: string): TableFault {
  const cells = cellsOf(line, ',')
  const found = `"${shown(line)}" reads as ${cells.length} whole numbers or as ${cells.length / 2} with a decimal comma`
  return fault('table-malformed', found, 'one reading', 'set decimal: point or decimal: comma')
}

function columnsOf(
  rows: readonly (readonly string[])[],
  how: Pick<CaptureLayout, 'delimiter' | 'decimal' | 'joined'>,
  settings: CaptureSettings,
): CaptureLayout | TableFault {
  const { time, current, voltage } = settings
  const named = [time, current, voltage].filter(
    (column) => column !== null && typeof column.column === 'string',
  ) as readonly CaptureColumn[]
  const header = named.length === 0 ? null : headerWith(rows, named)
  if (header !== null && 'code' in header) return header
  const at = (column: CaptureColumn | null) =>
    column === null
      ? null
      : typeof column.column === 'number'
        ? column.column - 1
        : positionIn(rows[header!.row]!, column.column)
  const columns = { time: at(time), current: at(current)!, voltage: at(voltage) }
  const wanted = Object.values(columns).filter((position) => position !== null) as readonly number[]
  const numeric = (row: readonly string[] | undefined) =>
    row !== undefined && wanted.every((k) => readNumber(row[k] ?? '', how.decimal) !== null)
  const headerRows = rows.findIndex(
    (row, k) =>
      numeric(row) && (numeric(rows[k + 1]) || k + 1 === rows.length) && (numeric(rows[k + 2]) || k + 2 >= rows.length),
  )
  if (headerRows < 0) return noNumbers(rows, wanted)
  const above = (position: number | null) => (position === null ? '' : nameAbove(rows, headerRows, position))
  return {
    ...how,
    headerRows,
    columns,
    headers: { time: above(columns.time), current: above(columns.current), voltage: above(columns.voltage) },
  }
}

function headerWith(
  rows: readonly (readonly string[])[],
  named: readonly CaptureColumn[],
): { readonly row: number } | TableFault {
  for (let row = 0; row < rows.length; row++) {
    if (named.every(({ column }) => positionIn(rows[row]!, column as string) >= 0)) return { row }
  }
  const missing = named.find(({ column }) => !rows.some((row) => positionIn(row, column as string) >= 0)) ?? named[0]!
  const widest =
    rows.filter((row) => row.some((cell) => /[a-z]/i.test(cell))).sort((a, b) => b.length - a.length)[0] ?? []
  const known = widest.map((cell) => cell.trim()).filter((cell) => cell !== '')
  return fault(
    'table-column-unknown',
    shown(String(missing.column)),
    known.length > 0 ? shown(known.join(', ')) : 'without names',
    'or give its position, counted from 1',
  )
}

function positionIn(row: readonly string[], name: string): number {
  const wanted = name.trim().toLowerCase()
  return row.findIndex((cell) => cell.trim().toLowerCase() === wanted)
}

function nameAbove(rows: readonly (readonly string[])[], headerRows: number, position: number): string {
  for (let row = headerRows - 1; row >= Math.max(0, headerRows - 3); row--) {
    const cell = rows[row]![position]?.trim() ?? ''
    // a row of units stands under the names
    if (cell !== '' && !/^[([]?[munpµμk]?[sVA][)\]]?$/.test(cell)) return cell
  }
  return ''
}

function noNumbers(rows: readonly (readonly string[])[], wanted: readonly number[]): TableFault {
  const widest = Math.max(0, ...rows.map((row) => row.length))
  const outside = wanted.find((position) => position >= widest)
  if (outside !== undefined) return fault('table-column-unknown', String(outside + 1), `1 to ${widest}`, '')
  const found = `no row has numbers in column${wanted.length > 1 ? 's' : ''} ${wanted.map((k) => k + 1).join(' and ')}`
  return fault('table-malformed', found, 'rows of samples', 'check columns and decimal')
}

function fault(code: TableFault['code'], found: string, expected: string, hint: string): TableFault {
  return { code, found, expected, hint, line: 0, path: '' }
}

/** A cell as a number; null where it is none. Nothing is guessed: hexadecimal, infinity and an empty cell are none. */
export function readNumber(cell: string, decimal: 'point' | 'comma'): number | null {
  const plain = clean(cell)
  const pattern = decimal === 'comma' ? withComma : withPoint
  if (!pattern.test(plain) && !/^[+-]?\d+(?:[eE][+-]?\d+)?$/.test(plain)) return null
  const value = Number(decimal === 'comma' ? plain.replace(',', '.') : plain)
  return Number.isFinite(value) ? value : null
}
