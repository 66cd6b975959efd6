import { validateRectifier } from '#validators'
import type { RectifierRecord } from '../domain/rectifier.ts'
import type { Problem, Reading } from '../problems/problem.ts'
import { shown } from '../problems/shown.ts'
import { boundProblems } from './bound-problems.ts'
import type { CatalogueMapping } from './read-mapping.ts'
import { recordFrom } from './record.ts'
import { rootSection, startReader } from './section.ts'
import { checkShape } from './shape.ts'
import { type ColumnIndex, findColumns } from './table/columns.ts'
import { fillTemplate } from './table/fill-template.ts'
import { type Delimiter, findDelimiter, readTable } from './table/read-table.ts'
import { type RowPlacer, rowPlacer } from './table/row-place.ts'
import { checkText } from './yaml/check-text.ts'
import type { YamlFile } from './yaml/read-yaml.ts'

/** The usable parts of a table. */
export interface Catalogue {
  readonly records: readonly RectifierRecord[]
  /** Rows with a part, usable or not. */
  readonly rows: number
  /** Rows left out; what is wrong with each stands in the warnings. */
  readonly badRows: number
}

/**
 * Reads a CSV table of parts through its mapping. A row with a bad cell is left out and each bad cell told as a
 * warning (line is the row, column the column of the table); only a table that cannot be read at all is refused.
 */
export function readCatalogue(sourceText: string, file: string, mapping: CatalogueMapping): Reading<Catalogue> {
  const notText = checkText(sourceText, file)
  if (notText !== null) return { value: null, problems: [notText], warnings: [] }
  const table = startTable(file, mapping)
  const delimiter = delimiters[mapping.delimiter] ?? findDelimiter(sourceText, mapping.headerRow)
  const fault = readTable(sourceText, delimiter, (cells, row) => takeRow(table, cells, row))
  if (fault !== null) table.problems.push({ ...blank(file, fault.row), code: 'table-malformed', ...fault, hint: '' })
  if (fault === null && table.columns === null) {
    const expected = `a header in row ${mapping.headerRow} and rows with parts`
    table.problems.push({ ...blank(file, 1), code: 'file-empty', expected })
  }
  const warnings = boundProblems(table.warnings)
  if (table.problems.length > 0) return { value: null, problems: boundProblems(table.problems), warnings }
  return {
    value: { records: table.records, rows: table.rows, badRows: table.rows - table.records.length },
    problems: [],
    warnings,
  }
}

const delimiters: Readonly<Record<string, Delimiter | undefined>> = { comma: ',', semicolon: ';', tab: '\t' }

interface Table {
  readonly file: string
  readonly mapping: CatalogueMapping
  readonly records: RectifierRecord[]
  readonly problems: Problem[]
  readonly warnings: Problem[]
  /** Row of each id. */
  readonly ids: Map<string, number>
  columns: { readonly index: ColumnIndex; readonly placer: RowPlacer } | null
  rows: number
}

function startTable(file: string, mapping: CatalogueMapping): Table {
  return { file, mapping, records: [], problems: [], warnings: [], ids: new Map(), columns: null, rows: 0 }
}

function blank(file: string, row: number): Problem {
  return { code: 'table-malformed', file, line: row, column: 1, path: '', found: '', expected: '', hint: '' }
}

function takeRow(table: Table, cells: readonly string[], row: number): void {
  if (row < table.mapping.headerRow || table.problems.length > 0) return
  if (table.columns === null) {
    const { index, problems } = findColumns(table.mapping, cells)
    table.columns = { index, placer: rowPlacer(table.mapping, index) }
    table.problems.push(...problems)
    return
  }
  table.rows += 1
  const { record, problems } = recordOf(table, table.columns, cells, row)
  if (problems.length === 0) table.records.push(record)
  else if (table.warnings.length < mostWarnings) table.warnings.push(...problems)
}

/** More are counted, not kept. */
const mostWarnings = 10_000

function recordOf(
  table: Table,
  { index, placer }: NonNullable<Table['columns']>,
  cells: readonly string[],
  row: number,
) {
  const { mapping, file } = table
  const { data, kept } = fillTemplate(mapping, index, cells)
  const yaml: YamlFile = { file, data, place: placer(row, kept) }
  const reader = startReader(yaml)
  const record = recordFrom(rootSection(reader))
  const problems = [...checkShape(yaml, validateRectifier), ...reader.problems]
  const before = table.ids.get(record.id)
  if (before !== undefined) problems.push(repeated(file, row, record.id, before))
  else if (problems.length === 0) table.ids.set(record.id, row)
  return { record, problems }
}

function repeated(file: string, row: number, id: string, before: number): Problem {
  const expected = `${file}:${before}`
  return {
    ...blank(file, row),
    code: 'id-duplicate',
    path: 'id',
    found: shown(id),
    expected,
    hint: 'the first one is used',
  }
}
