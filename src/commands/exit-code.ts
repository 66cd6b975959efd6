import type { CandidateResult, Warning } from '../domain/result.ts'

/** 3 when nothing is acceptable; with `--strict` 4 when a warning or a class guess touches what is accepted; else 0. */
export function exitCodeOf(
  candidates: readonly Pick<CandidateResult, 'id' | 'accepted' | 'provenance'>[],
  warnings: readonly Pick<Warning, 'candidate'>[],
  strict: boolean,
): 0 | 3 | 4 {
  const accepted = candidates.filter((candidate) => candidate.accepted)
  if (accepted.length === 0) return 3
  if (!strict) return 0
  const warned = new Set(warnings.map(({ candidate }) => candidate))
  const doubtful = accepted.some(
    ({ id, provenance }) => warned.has(id) || provenance.some(({ how }) => how === 'class-guess'),
  )
  return doubtful ? 4 : 0
}
