import CliTable from 'cli-table3'
import type { AnyResult } from '../domain/study.ts'
import { terminalChart } from './charts/terminal-chart.ts'
import { gutter, headerLines, layTable, type Piece } from './table-layout.ts'
import { wrapText } from './text-width.ts'
import { viewOf } from './view.ts'
import type { Block, Column, Tone } from './view-types.ts'

export interface TerminalOptions {
  /** Columns of the terminal; no line is longer. */
  readonly width: number
  readonly colour: boolean
}

/** A worded result for the terminal: no line longer than the width, nothing cut off. */
export function renderTable(result: AnyResult, options: TerminalOptions): string {
  const { title, blocks } = viewOf(result)
  const width = Math.max(20, Math.floor(options.width))
  const paint = painter(options.colour)
  const chart = 'points' in result ? terminalChart(result, width, options.colour).trimEnd().split('\n') : []
  const lines = [
    ...wrapText(title, width).map((line) => paint(line, 'bold')),
    ...blocks.flatMap((block) => ['', ...blockLines(block, width, paint, chart)]),
  ]
  return `${lines.map((line) => line.trimEnd()).join('\n')}\n`
}

type Paint = (text: string, style: 'bold' | 'dim' | Tone) => string

/** Colour is never the only sign: every heading says in words what it is. */
function painter(colour: boolean): Paint {
  const codes = { bold: '1', dim: '2', plain: '1', warning: '1;33', caution: '1;31' }
  return (text, style) => (colour ? `\u001B[${codes[style]}m${text}\u001B[0m` : text)
}

function blockLines(block: Block, width: number, paint: Paint, chart: string[]): string[] {
  switch (block.kind) {
    case 'facts':
      return block.items.flatMap(({ label, text }) => hanging(`${label}: `, text, width))
    case 'chart':
      return chart
    case 'text':
      return [...heading(block.heading, 'plain', width, paint), ...wrapText(block.text, width)]
    case 'list':
      return [
        ...heading(block.heading, block.tone, width, paint),
        ...block.items.flatMap(({ lead, text }) => hanging('- ', lead === null ? text : `${lead}: ${text}`, width)),
      ]
    case 'table':
      return [
        ...heading(block.heading, 'plain', width, paint),
        ...layTable(block.table, width).flatMap((piece, index) =>
          pieceLines(piece, index === 0 ? block.heading : null, width, paint),
        ),
        ...(block.note === null ? [] : wrapText(block.note, width)),
      ]
  }
}

function heading(text: string | null, tone: Tone, width: number, paint: Paint): string[] {
  return text === null ? [] : wrapText(text, width).map((line) => paint(line, tone))
}

/** A label, then text whose further lines are indented a little. */
function hanging(label: string, text: string, width: number): string[] {
  const indent = 2
  const [first = '', ...rest] = wrapText(`${label}${text}`, width)
  if (rest.length === 0) return [first]
  const words = `${label}${text}`.slice(first.length).trimStart()
  return [first, ...wrapText(words, width - indent).map((line) => ' '.repeat(indent) + line)]
}

/** `above` is the heading that already stands over the piece, null under another piece. */
function pieceLines(piece: Piece, above: string | null, width: number, paint: Paint): string[] {
  const gap = above === null ? [''] : []
  const said = above !== null && piece.heading.startsWith(above)
  const title = said ? [] : [...gap, ...wrapText(piece.heading, width).map((line) => paint(line, 'dim'))]
  return [...title, ...tableText(piece).split('\n')]
}

function tableText({ table, widths }: Piece): string {
  const drawn = new CliTable({
    chars: frameless,
    style: { head: [], border: [], 'padding-left': 0, 'padding-right': 0, compact: true },
    colWidths: [...widths],
    colAligns: table.columns.map(alignment),
  })
  const headers = table.columns.map((column, index) => headerLines(column, widths[index]!))
  const tallest = Math.max(...headers.map((lines) => lines.length))
  // titles stand on the rule, whatever their height
  drawn.push(headers.map((lines) => [...Array<string>(tallest - lines.length).fill(''), ...lines].join('\n')))
  drawn.push(widths.map((width) => '─'.repeat(width)))
  for (const row of table.rows) drawn.push(row.map(({ text }, index) => wrapText(text, widths[index]!).join('\n')))
  return drawn.toString()
}

function alignment({ numeric }: Column): 'left' | 'right' {
  return numeric ? 'right' : 'left'
}

const frameless = Object.fromEntries(
  [
    ...['top', 'top-mid', 'top-left', 'top-right', 'bottom', 'bottom-mid', 'bottom-left', 'bottom-right'],
    ...['left', 'left-mid', 'mid', 'mid-mid', 'right', 'right-mid'],
  ].map((name) => [name, '']),
)
Object.assign(frameless, { middle: ' '.repeat(gutter) })
