import { validateMapping, validateRectifier } from '#validators'
import type { Problem, Reading } from '../problems/problem.ts'
import { boundProblems, joinProblems } from './bound-problems.ts'
import { tableInstead, wrongKind } from './file-kind.ts'
import { recordFrom } from './record.ts'
import { plainNumber, rootSection, startReader, text, texts } from './section.ts'
import { checkShape } from './shape.ts'
import { type Leaf, leavesOf, sampleOf, type Template } from './table/template.ts'
import { pathText } from './yaml/path.ts'
import { type Place, readYaml, type YamlFile } from './yaml/read-yaml.ts'

/** Which column of a table is which property: a record in which values may be columns. */
export interface CatalogueMapping {
  readonly title: string
  /** Counted from 1. */
  readonly headerRow: number
  readonly delimiter: 'auto' | 'comma' | 'semicolon' | 'tab'
  readonly decimal: 'point' | 'comma'
  /** What a cell without a value holds, in lower case. */
  readonly empty: ReadonlySet<string>
  readonly record: Template
  /** Where the mapping names a column that the table may not have. */
  readonly placeOf: (leaf: Leaf) => Place & { readonly file: string }
}

/**
 * Reads a mapping file. Its record is checked as a record file is, with a plausible value in place of every column,
 * so that a wrong unit or a missing key is told here and once, not for every row of the table.
 */
export function readMapping(sourceText: string, file: string): Reading<CatalogueMapping> {
  const table = tableInstead(file, 'mapping')
  if (table !== null) return { value: null, problems: table, warnings: [] }
  const { yaml, problems } = readYaml(sourceText, file, 'a mapping of columns')
  if (yaml === null) return { value: null, problems: boundProblems(problems), warnings: [] }
  const wrong = wrongKind(yaml.data, file, 'mapping')
  if (wrong !== null) return { value: null, problems: wrong, warnings: [] }
  const shape = checkShape(yaml, validateMapping)
  const values = shape.length === 0 ? checkRecord(yaml) : []
  const all = joinProblems(problems, shape, values)
  if (all.length > 0) return { value: null, problems: boundProblems(all), warnings: [] }
  return { value: mappingFrom(yaml), problems: [], warnings: [] }
}

function mappingFrom(yaml: YamlFile): CatalogueMapping {
  const root = rootSection(startReader(yaml))
  const empty = Array.isArray(root.data.empty) ? texts(root, 'empty').map(({ text }) => text) : ['-']
  return {
    title: text(root, 'catalogue') ?? '',
    headerRow: plainNumber(root, 'header_row') ?? 1,
    delimiter: (text(root, 'delimiter') ?? 'auto') as CatalogueMapping['delimiter'],
    decimal: text(root, 'decimal') === 'comma' ? 'comma' : 'point',
    empty: new Set(empty.map((word) => word.trim().toLowerCase())),
    record: root.data.record as Template,
    placeOf: ({ path }) => ({ file: yaml.file, ...yaml.place(['record', ...path, 'column'], 'value') }),
  }
}

/**
 * The sample is made up: what its figures say about each other is not told, nor that they are unusual, nor anything
 * about a cell whose content only the table shows.
 */
function checkRecord(yaml: YamlFile): readonly Problem[] {
  const { record } = yaml.data as { readonly record: Template }
  const place: YamlFile['place'] = (path, of) => yaml.place(['record', ...path], of)
  const sample: YamlFile = { file: yaml.file, data: sampleOf(record), place }
  const reader = startReader(sample)
  recordFrom(rootSection(reader))
  const open = leavesOf(record).filter(({ cell }) => cell.unit === undefined && cell.words === undefined)
  const unknown = new Set(open.map(({ path }) => pathText(path)))
  return [...checkShape(sample, validateRectifier), ...reader.problems]
    .filter(({ code, path }) => code !== 'values-contradict' && !unknown.has(path))
    .map((problem) => ({ ...problem, path: problem.path === '' ? 'record' : `record.${problem.path}` }))
}
