import { existsSync, readFileSync } from 'node:fs'
import { parse } from 'yaml'

export interface Score {
  readonly folder: string
  readonly noticed: number
  readonly missed: number
  /** Missed faults that no entry of `survivors/FOLDER.yaml` gives a reason for, as that file would write them. */
  readonly unexplained: readonly string[]
}

/** One reason for faults that no test notices, in `survivors/FOLDER.yaml`. */
interface Explanation {
  readonly file: string
  readonly reason: string
  readonly faults: readonly string[]
}

interface Place {
  readonly line: number
  readonly column: number
}

interface Mutant {
  readonly status: string
  readonly replacement?: string
  readonly location: { readonly start: Place; readonly end: Place }
}

type Files = Record<string, { readonly source: string; readonly mutants: readonly Mutant[] }>

/** Of the report, only how each fault ended; faults that do not run are no faults. */
export function scoreOf(folder: string): Score {
  const { files } = JSON.parse(readFileSync(`coverage/mutation-${folder}.json`, 'utf8')) as { files: Files }
  const all = Object.entries(files).flatMap(([file, { source, mutants }]) =>
    mutants.map((mutant) => ({ status: mutant.status, text: `${file}: ${faultText(source, mutant)}` })),
  )
  const ended = (...wanted: readonly string[]) => all.filter(({ status }) => wanted.includes(status))
  const missed = ended('Survived', 'NoCoverage')
  const known = explained(folder)
  return {
    folder,
    noticed: ended('Killed', 'Timeout').length,
    missed: missed.length,
    unexplained: missed.map(({ text }) => text).filter((text) => !known.has(text)),
  }
}

/** "what stands there -> what the fault puts in its place", each on one line. */
function faultText(source: string, { location: { start, end }, replacement = '' }: Mutant): string {
  const lines = source.split('\n').slice(start.line - 1, end.line)
  const last = lines.length - 1
  lines[last] = lines[last]!.slice(0, end.column - 1)
  lines[0] = lines[0]!.slice(start.column - 1)
  return `${oneLine(lines.join(' '))} -> ${oneLine(replacement)}`
}

function oneLine(text: string): string {
  return text.replace(/\s+/g, ' ').trim()
}

function explained(folder: string): ReadonlySet<string> {
  const path = `tests/mutation/survivors/${folder}.yaml`
  const entries: readonly Explanation[] = existsSync(path) ? parse(readFileSync(path, 'utf8')) : []
  return new Set(entries.flatMap(({ file, faults }) => faults.map((fault) => `${file}: ${fault}`)))
}
