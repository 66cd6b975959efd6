import type { ProblemCode } from '../../problems/problem.ts'

/** A place where the text breaks a rule, by its offset. */
export interface YamlFault {
  readonly code: ProblemCode
  readonly offset: number
  readonly path: string
  readonly found: string
  readonly expected: string
  readonly hint: string
}

/** A part of YAML that is not taken here. */
export function forbidden(offset: number, found: string, hint: string, path = ''): YamlFault {
  return { code: 'yaml-forbidden', offset, path, found, expected: '', hint }
}
