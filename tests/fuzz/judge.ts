import type { Problem } from '../../src/problems/problem.ts'
import type { FuzzCase, FuzzOutcome } from './fuzz-case.ts'
import { brokenLaws } from './laws.ts'

const mostSeconds = 10
const mostMemory = 1024 ** 3

/** Everything that must not be, whatever the input was; empty when all is well. */
export function complaintsOf(fuzzCase: FuzzCase, outcome: FuzzOutcome): readonly string[] {
  const { code, out, err, seconds, memory, written, notFinite } = outcome
  const said = [out, err, ...Object.values(written)].join('\n').replace(engine, '')
  const complaints: string[] = []
  const complain = (told: string, when: boolean) => {
    if (when) complaints.push(told)
  }
  complain(`exit code ${code}: ${firstLines(err)}`, code === null || ![0, 2, 3, 4].includes(code))
  complain(`a stack trace: ${firstLines(said)}`, /^\s+at .+:\d+:\d+\)?$|internal error:/m.test(said))
  complain(`${seconds.toFixed(1)} s`, seconds > mostSeconds)
  complain(`${((memory ?? 0) / 1024 ** 2).toFixed(0)} MB`, memory !== null && memory > mostMemory)
  complain(`not finite: ${notFinite.slice(0, 3).join(', ')}`, notFinite.length > 0)
  complain(`prints ${wordOfNoNumber.exec(said)?.[0]}`, wordOfNoNumber.test(said) && !brings(fuzzCase, /NaN|Infinity/))
  complain(
    'prints undefined or an object',
    /\bundefined\b|\[object /.test(said) && !brings(fuzzCase, /undefined|\[object/),
  )
  complain(
    `steers the terminal: ${JSON.stringify(around(out + err, steering))}`,
    steering.test(out) || steering.test(err),
  )
  complain(
    `leaves ${Object.keys(written).join(' ')}`,
    Object.keys(written).some((name) => name !== fuzzCase.options.output),
  )
  complain('says nothing', code === 2 && err === '')
  return [...complaints, ...complaintsOfDocument(fuzzCase, outcome)]
}

/** The review document carries its own engine, whose text says NaN. */
const engine = /<script[^>]*>[\s\S]*?<\/script>/g
const wordOfNoNumber = /\bNaN\b|\bInfinity\b/
// biome-ignore lint/suspicious/noControlCharactersInRegex: these are what is looked for
const steering = /[\u0000-\u0008\u000B-\u001F\u007F-\u009F\u061C\u200E\u200F\u2028-\u202E\u2066-\u2069]/

/** What a file brings is quoted back, split from what stands before it: "1NaN" is told as the unit "NaN". */
function brings({ files }: FuzzCase, pattern: RegExp): boolean {
  return Object.values(files).some((content) =>
    pattern.test(typeof content === 'string' ? content : Buffer.from(content).toString()),
  )
}

function around(text: string, pattern: RegExp): string {
  const place = text.search(pattern)
  return text.slice(Math.max(0, place - 60), place + 30)
}

function firstLines(text: string): string {
  return text.split('\n').slice(0, 4).join(' / ').slice(0, 400)
}

function complaintsOfDocument({ options, command }: FuzzCase, { code, out }: FuzzOutcome): readonly string[] {
  if (options.json !== true || code === 1 || code === null) return []
  let document: unknown
  try {
    document = JSON.parse(out)
  } catch {
    return [`stdout is no JSON: ${firstLines(out)}`]
  }
  if (code === 2) return complaintsOfProblems((document as { error: { problems: readonly Problem[] } }).error.problems)
  return command === 'check' ? [] : brokenLaws(command, document)
}

/** A fault of a whole file or of the command line has no line; what a study refuses is told of the stage file. */
const codesWithoutLine =
  /^(file-|option-|id-|table-|cannot-deliver|no-candidate|quantity-not-applicable|range-|unit-|number-|value-unused|word-unknown)/

function complaintsOfProblems(problems: readonly Problem[]): readonly string[] {
  if (problems.length === 0) return ['exit code 2 without a problem']
  return problems.flatMap((problem) => {
    const told = JSON.stringify(problem)
    if (problem.file === '') return [`no file: ${told}`]
    if (problem.line === 0 && problem.file !== 'command line' && !codesWithoutLine.test(problem.code))
      return [`no place: ${told}`]
    if (!Number.isInteger(problem.line) || !Number.isInteger(problem.column)) return [`odd place: ${told}`]
    return []
  })
}
