import { extname, resolve } from 'node:path'
import type { RectifierRecord } from '../domain/rectifier.ts'
import { readCatalogue } from '../input/read-catalogue.ts'
import { type CatalogueMapping, readMapping } from '../input/read-mapping.ts'
import { readRecords } from '../input/read-records.ts'
import { type Desk, readAt } from './desk.ts'
import { onCommandLine } from './failure.ts'
import type { Session } from './session.ts'

export interface RecordOptions {
  readonly mapping?: string
  readonly strict?: boolean
  readonly quiet?: boolean
}

/** All records of YAML files and, through the mapping, of CSV tables; each file once, however it was spelt. */
export function readAllRecords(
  desk: Desk,
  paths: readonly string[],
  options: RecordOptions,
  session: Session,
): readonly RectifierRecord[] {
  const files = [...new Map(paths.map((path) => [resolve(path), path])).values()].toSorted()
  const tables = files.filter(isTable)
  const mapping = readMappingFor(desk, tables, options)
  const fromTables = mapping === null ? [] : readTables(desk, tables, mapping, options, session)
  return [
    ...files.filter((path) => !isTable(path)).flatMap((path) => readAt(desk, path, readRecords) ?? []),
    ...fromTables,
  ]
}

function isTable(path: string): boolean {
  return extname(path).toLowerCase() === '.csv'
}

function readMappingFor(desk: Desk, tables: readonly string[], { mapping }: RecordOptions): CatalogueMapping | null {
  if (mapping !== undefined) {
    if (tables.length === 0) desk.warnings.push(unusedMapping(mapping))
    return readAt(desk, mapping, readMapping)
  }
  for (const found of tables) {
    const expected = '--mapping FILE, which says what its columns are'
    desk.problems.push({
      ...onCommandLine('--mapping'),
      code: 'option-unusable',
      found: `${found} is a table of parts`,
      expected,
    })
  }
  return null
}

function unusedMapping(found: string) {
  return {
    ...onCommandLine('--mapping'),
    code: 'value-unused',
    found,
    expected: 'no .csv file is among the records',
  } as const
}

/** Bad rows are left out and told cell by cell; with `--strict` they are problems. */
function readTables(
  desk: Desk,
  tables: readonly string[],
  mapping: CatalogueMapping,
  { strict, quiet }: RecordOptions,
  session: Session,
): readonly RectifierRecord[] {
  return tables.flatMap((path) => {
    session.progress(`reading ${path} ...`)
    const catalogue = readAt(desk, path, (text, file) => {
      const reading = readCatalogue(text, file, mapping)
      const refused = strict === true && (reading.value?.badRows ?? 0) > 0
      return refused ? { value: null, problems: reading.warnings, warnings: [] } : reading
    })
    session.progress('')
    if (catalogue === null) return []
    const { rows, badRows, records } = catalogue
    desk.tables.push({ path, rows, used: records.length, leftOut: badRows })
    if (quiet !== true) session.tell(`${path}: ${rows} rows, ${records.length} used, ${badRows} left out\n`)
    return records
  })
}
