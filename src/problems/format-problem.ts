import type { Problem } from './problem.ts'
import { problemSentence } from './words.ts'

/**
 * A problem as a person reads it: `file:line:column  code  path: sentence`, then the source line with a caret
 * under what was found, when the text is at hand.
 */
export function formatProblem(problem: Problem, sourceText: string | null = null): string {
  return formatted(problem, problem.code, sourceText)
}

/** The same for what is said and does not stand in the way. */
export function formatWarning(warning: Problem, sourceText: string | null = null): string {
  return formatted(warning, `warning  ${warning.code}`, sourceText)
}

function formatted(problem: Problem, code: string, sourceText: string | null): string {
  const head = `${place(problem)}  ${code}  ${problem.path === '' ? '' : `${problem.path}: `}${problemSentence(problem)}`
  const line = sourceText === null || isTable.test(problem.file) ? undefined : sourceLine(sourceText, problem.line)
  return line === undefined || line.trim() === '' ? head : `${head}\n${pointed(line, problem)}`
}

/** Would steer a terminal, turn the direction of writing or break the line. */
const unprintable = /[\p{Cc}\p{Cf}\p{Cs}\p{Zl}\p{Zp}]/gu

/** In a table the column of a problem counts columns, not characters: there is nothing for a caret to point at. */
const isTable = /\.csv$/i

function place({ file, line, column }: Problem): string {
  const name = file.replace(unprintable, ' ')
  return line === 0 ? name : `${name}:${line}:${column}`
}

function sourceLine(text: string, line: number): string | undefined {
  let start = 0
  for (let skipped = 1; skipped < line; skipped++) {
    start = text.indexOf('\n', start) + 1
    if (start === 0) return undefined
  }
  if (line < 1) return undefined
  const end = text.indexOf('\n', start)
  return text.slice(start, end === -1 ? undefined : end).replace(/\r$/, '')
}

const widest = 120

/** The line and the caret line; a long line is cut to a window around the column. */
function pointed(line: string, { column, found }: Problem): string {
  const start = Math.max(0, column - 1)
  const from = start > widest - 30 ? start - 30 : 0
  const shown = line.slice(from, from + widest).replace(unprintable, ' ')
  const rest = line.slice(start)
  const bare = found.replace(/^"(.*)"$/, '$1')
  const length = [`"${bare}"`, `'${bare}'`, bare].find((text) => bare !== '' && rest.startsWith(text))?.length ?? 1
  const room = Math.max(1, shown.length - (start - from))
  return `    ${shown}\n    ${' '.repeat(Math.min(start - from, shown.length))}${'^'.repeat(Math.min(length, room))}`
}
