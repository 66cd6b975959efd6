import type { SentenceData } from '../domain/result.ts'
import { type RefusalCode, StudyRefusal } from '../domain/study-refusal.ts'
import type { ProblemCode } from '../problems/problem.ts'
import { quantity } from '../report/format.ts'
import { failure } from './failure.ts'
import { breathe, type Session } from './session.ts'

/** The option of the command line that a refusal is about, and what was typed there. */
export interface AskedBy {
  readonly path: string
  readonly found?: string
}

/** Runs a study; what it refuses becomes a problem of the stage file, or of the option that asked for it. */
export async function studyStage<R>(
  stagePath: string,
  session: Session,
  study: () => R | Promise<R>,
  askedBy: (refusal: StudyRefusal) => AskedBy | null = () => null,
): Promise<R> {
  session.progress('studying the stage ...')
  await breathe()
  try {
    return await study()
  } catch (error) {
    throw error instanceof StudyRefusal ? refusalFailure(stagePath, error, askedBy(error)) : error
  } finally {
    session.progress('')
    await breathe()
  }
}

const problemOfRefusal: Readonly<Record<RefusalCode, ProblemCode>> = {
  'cannot-deliver': 'cannot-deliver',
  'no-candidate': 'no-candidate',
  'part-unknown': 'id-unknown',
  'quantity-not-applicable': 'quantity-not-applicable',
  'range-reversed': 'range-reversed',
  'range-outside': 'range-outside',
}

/** What to do next, where the refusal itself does not say. */
const nextStep: Readonly<Partial<Record<RefusalCode, string>>> = {
  'cannot-deliver': 'check the output, the resistances and the input',
  'no-candidate': 'name records in the stage file or with --records',
}

function refusalFailure(stagePath: string, { code, data }: StudyRefusal, asked: AskedBy | null) {
  const { path = '', found = powerOf(data), expected = '', hint = nextStep[code] ?? '' } = data
  const texts = { path: String(path), found: String(found), expected: String(expected), hint: String(hint) }
  if (asked !== null) return failure({ code: problemOfRefusal[code], ...texts, ...asked })
  return failure({ code: problemOfRefusal[code], file: stagePath, ...texts })
}

/** "60 kW from 48 V", where the study tells these figures. */
function powerOf({ power, voltage }: SentenceData): string {
  if (typeof power !== 'number' || typeof voltage !== 'number') return ''
  return `${quantity(power, 'W')} from ${quantity(voltage, 'V')}`
}
