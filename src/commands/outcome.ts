import { formatProblem } from '../problems/format-problem.ts'
import type { Problem } from '../problems/problem.ts'
import { problemSentence } from '../problems/words.ts'
import { renderJson } from '../report/render-json.ts'
import { CommandFailure, failureDocument, onCommandLine } from './failure.ts'
import { writingFailure } from './replace-file.ts'
import type { Session } from './session.ts'

/** Exit code 2 and 1 are told here, and nowhere else: the person's to mend, and ours. */
export async function outcomeOf(
  session: Session,
  argv: readonly string[],
  work: (argv: readonly string[]) => Promise<number>,
): Promise<number> {
  try {
    return await work(argv)
  } catch (error) {
    session.progress('')
    const told = error instanceof CommandFailure ? tellFailure(error) : tellFault(error)
    session.tell(`${told.text}\n`)
    if (asksForJson(argv)) session.print(renderJson(told.document))
    return told.exitCode
  }
}

/** A reader that has seen enough (`| head -1`) is no fault, null; what else keeps a stream from being written is told. */
export function outcomeOfStream(error: NodeJS.ErrnoException, session: Session): 2 | null {
  if (error.code === 'EPIPE') return null
  const told = writingFailure('standard output', error)
  if (told instanceof Error) session.tell(`${told.message}\n`)
  return 2
}

interface Told {
  readonly exitCode: 1 | 2
  readonly text: string
  readonly document: object
}

function tellFailure(error: CommandFailure): Told {
  const [only] = error.problems
  const count = error.problems.reduce((sum, problem) => sum + countOf(problem), 0)
  const summary = count === 1 && only !== undefined ? sentenceOf(only) : `${count} problems stand in the way`
  const code = count === 1 && only !== undefined ? only.code : 'input-unusable'
  return { exitCode: 2, text: error.message, document: failureDocument(code, summary, error.problems) }
}

/** Where very many were found, the last one says how many more there are. */
function countOf({ code, found }: Problem): number {
  return code === 'more-problems' ? Number(found) : 1
}

/** The document names the command line and the code beside it already. */
function sentenceOf(problem: Problem): string {
  if (problem.file !== onCommandLine('').file) return formatProblem(problem)
  return `${problem.path === '' ? '' : `${problem.path}: `}${problemSentence(problem)}`
}

function tellFault(error: unknown): Told {
  const stack = error instanceof Error ? (error.stack ?? error.message) : String(error)
  const text = `internal error: this is a defect of ebbwatt, not of your input\n${stack}`
  return { exitCode: 1, text, document: failureDocument('internal-fault', firstLine(stack), []) }
}

function firstLine(text: string): string {
  return text.split('\n', 1)[0]!
}

/** The command line may be too broken to be parsed, so the wish for JSON is read from its words. */
function asksForJson(argv: readonly string[]): boolean {
  const end = argv.indexOf('--')
  return argv.slice(0, end === -1 ? argv.length : end).includes('--json')
}
