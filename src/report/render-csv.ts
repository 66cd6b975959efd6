import type { AnyResult } from '../domain/study.ts'
import { distinctColumns, plainTitle } from './table-view.ts'
import { viewOf } from './view.ts'
import type { Cell, Column } from './view-types.ts'

/** Comma separated values: units in the header, plain numbers, empty where there is none, cautions' codes last. */
export function renderCsv(result: AnyResult): string {
  const { columns, rows } = distinctColumns(viewOf(result).data)
  const lines = [columns.map(header), ...rows.map((row) => row.map(cell))]
  return `${lines.map((line) => line.join(',')).join('\n')}\n`
}

function header({ title, unit }: Column): string {
  const name = title === '#' ? 'rank' : plainTitle(title)
  return quoted(unit === null ? name : `${name} (${unit})`)
}

function cell({ value }: Cell): string {
  if (value === null) return ''
  return typeof value === 'number' ? String(value) : quoted(guarded(value))
}

/** A text that a spreadsheet would take for a formula gets an apostrophe in front. */
function guarded(text: string): string {
  return /^\s*[=+\-@]/.test(text) ? `'${text}` : text
}

function quoted(text: string): string {
  return /[",\n\r]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text
}
