/** Prints the error table of every outside check as Markdown; exit code 1 when a figure lies outside its tolerance. */
import type { Comparison } from './compare.ts'
import { rowsWithoutCase, sections } from './sections.ts'

function number(value: number): string {
  return value === 0 ? '0' : String(Number(value.toPrecision(6)))
}

function cells(row: Comparison): string {
  const unit = row.unit === '1' ? '' : ` ${row.unit}`
  const error = `${row.within ? '' : '**outside** '}${row.error.toExponential(1)}`
  return `| ${[
    row.id,
    row.quantity,
    `${row.printed}${unit}`,
    number(row.expected),
    number(row.computed),
    error,
    row.tolerance.toExponential(1),
    row.because,
    row.source,
  ]
    .map((cell) => cell.replaceAll('|', '\\|'))
    .join(' | ')} |`
}

const lines: string[] = ['# Outside checks', '']
let outside = 0
for (const { title, text, rows } of sections) {
  const all = rows()
  outside += all.filter(({ within }) => !within).length
  lines.push(`## ${title}`, '', text, '')
  lines.push('| id | quantity | printed | expected | computed | error | tolerance | why this tolerance | source |')
  lines.push('| --- | --- | --- | --- | --- | --- | --- | --- | --- |', ...all.map(cells), '')
}
lines.push('## Published rows without a case', '')
for (const [id, reason] of Object.entries(rowsWithoutCase)) lines.push(`- ${id}: ${reason}.`)
lines.push(
  '',
  outside === 0 ? 'Every figure lies within its tolerance.' : `${outside} figures lie outside their tolerance.`,
)
process.stdout.write(`${lines.join('\n')}\n`)
process.exitCode = outside === 0 ? 0 : 1
