import { formatProblem, formatWarning } from '../problems/format-problem.ts'
import { type Problem, type ProblemCode, sortProblems } from '../problems/problem.ts'

/** Texts of files already read, by path, so that a message can show the line it speaks of. */
export type SourceTexts = ReadonlyMap<string, string>

/** The run cannot go on and the person can mend it: exit code 2. */
export class CommandFailure extends Error {
  readonly problems: readonly Problem[]
  constructor(problems: readonly Problem[], sources: SourceTexts = new Map(), warnings: readonly Problem[] = []) {
    const isWarning = new Set(warnings)
    const told = sortProblems([...problems, ...warnings]).map((problem) => {
      const source = sources.get(problem.file) ?? null
      return isWarning.has(problem) ? formatWarning(problem, source) : formatProblem(problem, source)
    })
    super(told.join('\n'))
    this.problems = sortProblems(problems)
  }
}

/** A failure with one problem; what is not said stays empty. */
export function failure(problem: Partial<Problem> & { readonly code: ProblemCode }): CommandFailure {
  return new CommandFailure([{ ...onCommandLine(''), ...problem }])
}

/** A problem's place where it stands in no file. */
export function onCommandLine(option: string): Omit<Problem, 'code'> {
  return { file: 'command line', line: 0, column: 0, path: option, found: '', expected: '', hint: '' }
}

/** The document that stands on stdout when `--json` was asked for and there is no result. */
export function failureDocument(code: string, text: string, problems: readonly Problem[]): object {
  return { error: { code, text, problems } }
}
