import { type Problem, sortProblems } from '../problems/problem.ts'

const most = 200

/** Sorted by place; of very many the first are told, and how many more there are. */
export function boundProblems(problems: readonly Problem[]): readonly Problem[] {
  const sorted = sortProblems(problems)
  const last = sorted[most - 1]
  if (sorted.length <= most || last === undefined) return sorted
  const more: Problem = {
    ...last,
    code: 'more-problems',
    path: '',
    found: String(sorted.length - most),
    expected: '',
    hint: '',
  }
  return [...sorted.slice(0, most), more]
}
