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

/**
 * What the language, the shape and the values of one file have wrong. Where the language is at fault already,
 * the shape of what stands there is not told again.
 */
export function joinProblems(
  language: readonly Problem[],
  shape: readonly Problem[],
  values: readonly Problem[],
): readonly Problem[] {
  const told = new Set(language.map(placeOf))
  return [...language, ...shape.filter((problem) => !told.has(placeOf(problem))), ...values]
}

function placeOf({ line, column }: Problem): string {
  return `${line}:${column}`
}
