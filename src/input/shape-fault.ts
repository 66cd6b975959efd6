import type { ProblemCode } from '../problems/problem.ts'
import type { Path } from './yaml/path.ts'

/** One problem before its place is known. */
export interface ShapeFault {
  readonly code: ProblemCode
  readonly path: Path
  /** Where to point: a path in the file, at its key or its value. */
  readonly at: Path
  readonly of: 'key' | 'value'
  readonly found: string
  readonly expected: string
  readonly hint: string
}
