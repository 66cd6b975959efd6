/** What can be wrong with something a person handed in. Closed set: words.ts words each code. */
export const problemCodes = [
  // the file as such
  'file-missing',
  'file-unreadable',
  'file-too-large',
  'file-empty',
  'file-not-text',
  'file-kind',
  'file-exists',
  'file-is-input',
  'file-unwritable',
  // its YAML
  'yaml-syntax',
  'yaml-duplicate-key',
  'yaml-forbidden',
  'yaml-too-deep',
  // its shape
  'key-unknown',
  'key-missing',
  'key-not-here',
  'word-unknown',
  'value-kind',
  'list-length',
  // a value with a unit
  'unit-missing',
  'unit-unknown',
  'unit-dimension',
  'number-malformed',
  'number-decimal-comma',
  'number-not-finite',
  'number-out-of-range',
  'number-zero',
  'number-negative',
  // values against each other
  'values-contradict',
  // across files
  'id-duplicate',
  'id-unknown',
  // tables (catalogue, profile, capture)
  'table-column-unknown',
  'table-cell',
  'table-malformed',
  // the command line
  'option-unusable',
  // what a study refuses
  'cannot-deliver',
  'no-candidate',
  'quantity-not-applicable',
  'range-reversed',
  'range-outside',
  // said, never refused
  'value-implausible',
  'value-unused',
  'more-problems',
] as const

export type ProblemCode = (typeof problemCodes)[number]

/**
 * One thing a person can put right: place, what stands there, what is wanted and the next step.
 * Line and column count from 1; 0 where the problem has no place inside a file.
 */
export interface Problem {
  readonly code: ProblemCode
  readonly file: string
  readonly line: number
  readonly column: number
  /** Keys joined by points, rows counted from 1: "recovery[2].slope". */
  readonly path: string
  readonly found: string
  readonly expected: string
  readonly hint: string
}

/** What a reader gives: a value when nothing is wrong, every problem otherwise, and warnings in both cases. */
export interface Reading<T> {
  readonly value: T | null
  readonly problems: readonly Problem[]
  readonly warnings: readonly Problem[]
}

/** In the order in which a person reads the file. */
export function sortProblems(problems: readonly Problem[]): readonly Problem[] {
  return [...problems].sort(
    (a, b) =>
      compare(a.file, b.file) ||
      a.line - b.line ||
      a.column - b.column ||
      compare(a.code, b.code) ||
      compare(a.path, b.path),
  )
}

function compare(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0
}
