import Papa from 'papaparse'
import type { CaptureReading, CaptureSettings, Waveform } from '../domain/capture.ts'
import type { Problem, Reading } from '../problems/problem.ts'
import { shown } from '../problems/shown.ts'
import { type CaptureLayout, captureLayout, clean, joinCells, readNumber, type TableFault } from './capture-layout.ts'
import { type SampleStore, sampleStore } from './capture-samples.ts'
import { waveformFrom } from './capture-segments.ts'

/** A capture file as a waveform, and how it was read. */
export interface CaptureTable {
  readonly waveform: Waveform
  readonly reading: CaptureReading
}

/** A file that comes in pieces: memory holds its samples and one piece of text. */
export interface CaptureTableReader {
  readonly push: (text: string) => void
  readonly samples: () => number
  /** More text is of no use: a problem was found. */
  readonly failed: () => boolean
  readonly end: () => Reading<CaptureTable>
}

/** Text gathered before the layout is decided, in characters; header blocks are shorter. */
const headLength = 65_536

/** Reads the CSV file of an oscilloscope piece by piece. */
export function captureTable(settings: CaptureSettings, file: string): CaptureTableReader {
  let head: string | null = ''
  let rest = ''
  let state: RowState | null = null
  let fault: TableFault | null = null
  const decide = (text: string, whole: boolean) => {
    const lines = text.split(/\r\n|\n|\r/)
    const layout = captureLayout(lines.slice(0, whole ? 2000 : Math.min(2000, lines.length - 1)), settings)
    if ('code' in layout) fault = layout
    else state = startRows(layout)
  }
  const take = (text: string, whole: boolean) => {
    rest += text
    const cut = whole ? rest.length : lastBreak(rest)
    if (cut > 0) fault = readRows(state!, rest.slice(0, cut)) ?? fault
    rest = rest.slice(cut)
  }
  const push = (text: string) => {
    if (fault !== null) return
    if (head === null) return take(text, false)
    head += text
    if (head.length < headLength) return
    decide(head, false)
    if (fault === null) take(head, false)
    head = null
  }
  return {
    push,
    samples: () => state?.store.count() ?? 0,
    failed: () => fault !== null,
    end: () => {
      if (head !== null && fault === null) decide(head, true)
      if (fault === null) take(head ?? '', true)
      if (fault !== null) return refused([fault], file)
      const done = waveformFrom(state!.store, state!.breaks, state!.layout, settings)
      return 'code' in done ? refused([done], file) : { value: done, problems: [], warnings: [] }
    },
  }
}

function refused(faults: readonly TableFault[], file: string): Reading<CaptureTable> {
  const problems = faults.map((fault): Problem => ({ ...fault, file, column: fault.line > 0 ? 1 : 0 }))
  return { value: null, problems, warnings: [] }
}

/** End of the last complete line; a piece may end between \r and \n. */
function lastBreak(text: string): number {
  const newline = text.lastIndexOf('\n')
  if (newline >= 0) return newline + 1
  const bare = text.lastIndexOf('\r', text.length - 2)
  return bare + 1
}

interface RowState {
  readonly layout: CaptureLayout
  readonly store: SampleStore
  /** Sample numbers at which a further segment begins. */
  readonly breaks: number[]
  line: number
  /** A row that is no sample stands since the last sample. */
  interrupted: boolean
  lastTime: number
}

function startRows(layout: CaptureLayout): RowState {
  const store = sampleStore({ time: layout.columns.time !== null, voltage: layout.columns.voltage !== null })
  return { layout, store, breaks: [], line: 0, interrupted: false, lastTime: Number.NEGATIVE_INFINITY }
}

function readRows(state: RowState, text: string): TableFault | null {
  const { delimiter, joined } = state.layout
  const { data } = Papa.parse<string[]>(text, { delimiter })
  // a text that ends with a line break has an empty last row that is no row
  const ended = text.endsWith('\n') || text.endsWith('\r')
  const count =
    ended && data.length > 0 && data[data.length - 1]!.length === 1 && data[data.length - 1]![0] === ''
      ? data.length - 1
      : data.length
  for (let k = 0; k < count; k++) {
    state.line += 1
    if (state.line <= state.layout.headerRows) continue
    const fault = readRow(state, joined ? joinCells(data[k]!, true) : data[k]!)
    if (fault !== null) return fault
  }
  return null
}

function readRow(state: RowState, cells: readonly string[]): TableFault | null {
  const { columns, decimal } = state.layout
  const current = quickNumber(cells[columns.current], decimal)
  const time = columns.time === null ? 0 : quickNumber(cells[columns.time], decimal)
  const voltage = columns.voltage === null ? 0 : quickNumber(cells[columns.voltage], decimal)
  if (Number.isNaN(current) || Number.isNaN(time) || Number.isNaN(voltage)) {
    const broken = brokenCell(state, cells)
    state.interrupted = true
    return broken
  }
  const { store } = state
  const restarted = columns.time !== null && time < state.lastTime
  if (store.count() > 0 && (restarted || (state.interrupted && columns.time === null))) state.breaks.push(store.count())
  state.interrupted = false
  state.lastTime = time
  store.add(time, current, voltage)
  return null
}

/** Number of a plain cell without looking at each character; NaN for everything that needs a closer look or is none. */
function quickNumber(cell: string | undefined, decimal: 'point' | 'comma'): number {
  if (cell === undefined || cell === '') return Number.NaN
  if (decimal === 'point') {
    const first = cell.charCodeAt(0)
    const second = cell.charCodeAt(1)
    const value = Number(cell)
    // digits, sign, point or space first; 0x, 0b and 0o have a letter second
    if (
      value - value === 0 &&
      first < 58 &&
      (second < 65 || Number.isNaN(second) || second === 69 || second === 101) &&
      cell.trim() !== ''
    )
      return value
  }
  return readNumber(cell, decimal) ?? Number.NaN
}

/**
 * A row without a number in some wanted column: a line of text between segments is passed over, a sample with a hole
 * in it is refused, since dropping it would shift all that follow.
 */
function brokenCell(state: RowState, cells: readonly string[]): TableFault | null {
  const { columns, decimal } = state.layout
  const wanted = Object.values(columns).filter((position) => position !== null) as readonly number[]
  const read = wanted.map((position) => readNumber(cells[position] ?? '', decimal))
  if (read.every((value) => value === null))
    return cells.some((cell) => /\d/.test(cell)) && !cells.some((cell) => /[a-z]{2}/i.test(cell))
      ? cellFault(state, cells, wanted[0]!)
      : null
  const position = wanted[read.indexOf(null)]!
  const cell = clean(cells[position] ?? '')
  const words = /[a-z]{2,}/i.test(cell) && !/^[+-]?(nan|inf|infinity)$/i.test(cell)
  return words ? null : cellFault(state, cells, position)
}

function cellFault(state: RowState, cells: readonly string[], position: number): TableFault {
  const cell = shown(cells[position] ?? '')
  const sign = state.layout.decimal === 'comma' ? 'comma' : 'point'
  const expected = `column ${position + 1} holds numbers with a decimal ${sign}`
  return { code: 'table-cell', found: cell, expected, hint: '', line: state.line, path: '' }
}
