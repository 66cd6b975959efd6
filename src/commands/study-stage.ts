import { type RefusalCode, StudyRefusal } from '../domain/study-refusal.ts'
import type { ProblemCode } from '../problems/problem.ts'
import { failure } from './failure.ts'
import { breathe, type Session } from './session.ts'

/** Runs a study; what it refuses becomes a problem of the stage file. */
export async function studyStage<R>(stagePath: string, session: Session, study: () => R | Promise<R>): Promise<R> {
  session.progress('studying the stage ...')
  await breathe()
  try {
    return await study()
  } catch (error) {
    throw error instanceof StudyRefusal ? refusalFailure(stagePath, error) : error
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

/** A refusal's data may carry found, expected and hint; anything else it carries is told as "name value". */
function refusalFailure(stagePath: string, { code, data }: StudyRefusal) {
  const { found, expected, hint, path, ...rest } = data
  const others = Object.entries(rest).map(([name, value]) => `${name} ${value}`)
  return failure({
    code: problemOfRefusal[code],
    file: stagePath,
    path: String(path ?? ''),
    found: String(found ?? others.join(', ')),
    expected: String(expected ?? ''),
    hint: String(hint ?? ''),
  })
}
