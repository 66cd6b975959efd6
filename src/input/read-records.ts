import { validateRectifier } from '#validators'
import type { RectifierRecord } from '../domain/rectifier.ts'
import type { Reading } from '../problems/problem.ts'
import { boundProblems, joinProblems } from './bound-problems.ts'
import { tableInstead, wrongKind } from './file-kind.ts'
import { recordFrom } from './record.ts'
import { type Reader, type Section, startReader } from './section.ts'
import { checkShape } from './shape.ts'
import { readYaml } from './yaml/read-yaml.ts'

/**
 * Reads a file with one rectifier record or a list of them. Every problem of shape, unit and sense is told at
 * once with its place; the records come only when there is none.
 */
export function readRecords(text: string, file: string): Reading<readonly RectifierRecord[]> {
  const table = tableInstead(file, 'records')
  if (table !== null) return { value: null, problems: table, warnings: [] }
  const { yaml, problems } = readYaml(text, file, 'one rectifier record or a list of them')
  if (yaml === null) return { value: null, problems: boundProblems(problems), warnings: [] }
  const wrong = wrongKind(yaml.data, file, 'records')
  if (wrong !== null) return { value: null, problems: wrong, warnings: [] }
  const reader = startReader(yaml)
  const shape = checkShape(yaml, validateRectifier)
  const records = recordSections(reader).map(recordFrom)
  const all = joinProblems(problems, shape, reader.problems)
  const warnings = boundProblems(reader.warnings)
  return all.length > 0
    ? { value: null, problems: boundProblems(all), warnings }
    : { value: records, problems: [], warnings }
}

function recordSections(reader: Reader): readonly Section[] {
  const { data } = reader.yaml
  const list = Array.isArray(data) ? data : [data]
  return list.flatMap((item, index) => {
    if (typeof item !== 'object' || item === null || Array.isArray(item)) return []
    return [{ reader, data: item as Readonly<Record<string, unknown>>, path: Array.isArray(data) ? [index] : [] }]
  })
}
