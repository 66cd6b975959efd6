import type { TableCount } from '../domain/study.ts'
import { formatWarning } from '../problems/format-problem.ts'
import { type Problem, type Reading, sortProblems } from '../problems/problem.ts'
import { CommandFailure } from './failure.ts'
import { readText } from './read-file.ts'
import type { Session } from './session.ts'

/** The files on the desk: their texts and fingerprints, and everything found wrong in any of them. */
export interface Desk {
  readonly texts: Map<string, string>
  readonly fingerprints: Map<string, string>
  readonly problems: Problem[]
  readonly warnings: Problem[]
  readonly tables: TableCount[]
}

export function openDesk(): Desk {
  return { texts: new Map(), fingerprints: new Map(), problems: [], warnings: [], tables: [] }
}

/** Reads one file with its reader; null where that did not succeed, the reasons being on the desk. */
export function readAt<T>(desk: Desk, path: string, reader: (text: string, path: string) => Reading<T>): T | null {
  return collecting(desk, () => {
    const { text, sha256 } = readText(path)
    desk.texts.set(path, text)
    desk.fingerprints.set(path, sha256)
    const { value, problems, warnings } = reader(text, path)
    desk.problems.push(...problems)
    desk.warnings.push(...warnings)
    return value
  })
}

/** Puts a failure on the desk instead of ending there, so that what comes after it is looked at, too. */
export function collecting<T>(desk: Desk, work: () => T): T | null {
  try {
    return work()
  } catch (error) {
    if (!(error instanceof CommandFailure)) throw error
    desk.problems.push(...error.problems)
    return null
  }
}

/** Tells the warnings on stderr, then ends the run where there is a problem. */
export function settleDesk(desk: Desk, quiet: boolean, session: Session): void {
  const warnings = quiet ? [] : desk.warnings
  // With a problem they stand in one list with it, in the order of the lines.
  if (desk.problems.length > 0) throw new CommandFailure(desk.problems, desk.texts, warnings)
  for (const text of warningTexts(desk, warnings)) session.tell(`${text}\n`)
}

function warningTexts({ texts }: Desk, warnings: readonly Problem[]): readonly string[] {
  return sortProblems(warnings).map((warning) => formatWarning(warning, texts.get(warning.file) ?? null))
}
