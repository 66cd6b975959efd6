import type { CaptureTrace } from '../domain/capture.ts'
import { prefixFor, significant } from './format.ts'
import { textWidth } from './text-width.ts'

const rows = 15

/**
 * The event in characters: `·` samples, `*` samples on the fitted ramp and tail, `o` the fit where no sample lies on it,
 * `─` zero. No line is wider than `width`.
 */
export function capturePlot(trace: CaptureTrace, width: number): readonly string[] {
  const { time, current, fitted } = trace
  if (time.length < 2 || !(time[time.length - 1]! > time[0]!)) return []
  const columns = Math.max(16, Math.min(width - 10, 100))
  const [low, high] = extentOf(current, fitted)
  const [size, prefix] = prefixFor(Math.max(Math.abs(low), Math.abs(high)), 'A')
  const y = (value: number) => Math.min(rows - 1, Math.max(0, Math.round(((high - value) / (high - low)) * (rows - 1))))
  const cells = Array.from({ length: rows }, (_, row) => Array<string>(columns).fill(row === y(0) ? '─' : ' '))
  const from = time[0]!
  const span = time[time.length - 1]! - from
  const x = (at: number) => Math.min(columns - 1, Math.round(((at - from) / span) * (columns - 1)))
  for (let k = 0; k < time.length; k++) mark(cells, x(time[k]!), y(fitted[k]!), 'o')
  for (let k = 0; k < time.length; k++) mark(cells, x(time[k]!), y(current[k]!), '·')
  const label = (row: number) =>
    row === 0 ? significant(high / size) : row === rows - 1 ? significant(low / size) : row === y(0) ? '0' : ''
  const lines = cells.map((row, k) => `${label(k).padStart(7)} ${label(k) === '' ? '│' : '┤'}${row.join('')}`)
  return [
    `current (${prefix}A) against time from the zero crossing; · samples, o fit, * both`,
    ...lines,
    timeAxis(from, span, columns, x(0)),
  ]
}

function extentOf(...series: readonly Float64Array[]): [number, number] {
  let low = 0
  let high = 0
  for (const values of series) {
    for (const value of values) {
      low = Math.min(low, value)
      high = Math.max(high, value)
    }
  }
  return low === high ? [low - 1, high + 1] : [low, high]
}

function mark(cells: string[][], column: number, row: number, sign: string): void {
  const there = cells[row]![column]!
  cells[row]![column] = sign === '·' && (there === 'o' || there === '*') ? '*' : sign
}

/** Start, zero and end of the plot under it. */
function timeAxis(from: number, span: number, columns: number, zero: number): string {
  const [size, prefix] = prefixFor(span, 's')
  const line = Array<string>(columns).fill(' ')
  const write = (text: string, at: number) => {
    const begin = Math.max(0, Math.min(columns - textWidth(text), at))
    ;[...text].forEach((character, k) => {
      line[begin + k] = character
    })
  }
  const text = (value: number) => `${significant(value / size)} ${prefix}s`
  write(text(from), 0)
  write(text(from + span), columns)
  if (zero > 12) write('0', zero)
  return `${' '.repeat(9)}${line.join('')}`.trimEnd()
}
