import { extname } from 'node:path'
import { didYouMean } from '../problems/nearest.ts'
import { failure } from './failure.ts'

/** The forms of a study's result. */
export const resultForms = ['table', 'json', 'csv', 'markdown', 'html', 'svg'] as const
export type OutputFormat = (typeof resultForms)[number]

/** The options that say in which form a result goes where. */
export interface OutputOptions {
  readonly json?: boolean
  readonly csv?: boolean
  readonly markdown?: boolean
  readonly output?: string
}

export interface Delivery {
  readonly format: OutputFormat
  /** Null: stdout. */
  readonly target: string | null
  /** With --json stdout holds the document whatever else is written. */
  readonly jsonOnStdout: boolean
}

const formatOfExtension: Readonly<Record<string, OutputFormat>> = {
  '.html': 'html',
  '.md': 'markdown',
  '.csv': 'csv',
  '.json': 'json',
  '.svg': 'svg',
  '.txt': 'table',
}

/** Settles form and target; options that contradict each other are refused before anything is read. */
export function chooseDelivery(options: OutputOptions, offered: readonly OutputFormat[]): Delivery {
  const asked = (['json', 'csv', 'markdown'] as const).filter((format) => options[format] === true)
  if (asked.length > 1) {
    throw unusable(asked.map((name) => `--${name}`).join(' '), 'these ask for different forms', 'one of them')
  }
  const target = options.output ?? null
  const format = target === null ? (asked[0] ?? 'table') : formatOfTarget(target, asked[0])
  if (!offered.includes(format)) throw notOffered(format, target, offered)
  return { format, target, jsonOnStdout: options.json === true }
}

function formatOfTarget(target: string, asked: OutputFormat | undefined): OutputFormat {
  const format = formatOfExtension[extname(target).toLowerCase()]
  const known = Object.keys(formatOfExtension)
  if (format === undefined) {
    throw unusable(
      '-o',
      `the ending of "${target}" names no form`,
      `one of ${known.join(' ')}`,
      didYouMean(extname(target), known),
    )
  }
  if (asked !== undefined && asked !== format) {
    throw unusable('-o', `"${target}" and --${asked} ask for different forms`, 'one form', `leave --${asked} out`)
  }
  return format
}

function notOffered(format: OutputFormat, target: string | null, offered: readonly OutputFormat[]) {
  const extensions = Object.entries(formatOfExtension).filter(([, value]) => offered.includes(value))
  const wanted = `one of ${extensions.map(([extension]) => extension).join(' ')}`
  return unusable(target === null ? `--${format}` : '-o', `this command does not write ${format}`, wanted)
}

function unusable(path: string, found: string, expected: string, hint = '') {
  return failure({ code: 'option-unusable', path, found, expected, hint })
}
