import type { RunPlace } from './run-inside.ts'

export type CommandName = 'rank' | 'trend' | 'swap' | 'reduce' | 'check' | 'review'

/** One hostile or ordinary situation: a folder's files and the command to run there. */
export interface FuzzCase {
  /** Which generator made it, for the tally. */
  readonly kind: string
  readonly files: Readonly<Record<string, Uint8Array | string>>
  readonly command: CommandName
  /** The file or files that the command is about. */
  readonly operands: readonly string[]
  /** As the command line parser would hand them on: camel-case keys. */
  readonly options: Readonly<Record<string, string | number | boolean | readonly string[]>>
}

/** The same case as words of a shell. */
export function wordsOf({ command, operands, options }: FuzzCase): readonly string[] {
  const words = Object.entries(options).flatMap(([key, value]) => {
    if (value === true) return [`--${key}`]
    if (value === false) return []
    return (Array.isArray(value) ? value : [value]).map((one) => `--${key}=${one}`)
  })
  return [command, ...words, '--', ...operands]
}

/** How a case ended, whichever way it was run. */
export interface FuzzOutcome {
  readonly code: number | null
  readonly out: string
  readonly err: string
  readonly seconds: number
  /** Null where it was not measured. [bytes] */
  readonly memory: number | null
  /** Files that were written, by name, as text. */
  readonly written: Readonly<Record<string, string>>
  /** Paths of numbers that were not finite when they were turned into JSON. */
  readonly notFinite: readonly string[]
}

export type Run = (fuzzCase: FuzzCase, place: RunPlace) => Promise<FuzzOutcome>
