import type { DutyPoint, Stage } from '../domain/stage.ts'
import { didYouMean } from '../problems/nearest.ts'
import type { Problem, ProblemCode, Reading } from '../problems/problem.ts'
import { shown } from '../problems/shown.ts'
import { boundProblems } from './bound-problems.ts'
import { inputRefusal } from './check-stage.ts'
import { findDelimiter, readTable } from './table/read-table.ts'
import { parseQuantity } from './units/parse-quantity.ts'
import type { QuantityRule } from './units/quantity-kinds.ts'
import { checkText } from './yaml/check-text.ts'

type ColumnName = 'hours' | 'load' | 'ambient' | 'input'

const rules: Readonly<Record<ColumnName, QuantityRule>> = {
  hours: { kind: 'hours', sign: 'not-negative' },
  load: { kind: 'share', sign: 'not-negative' },
  ambient: { kind: 'temperature', sign: 'any' },
  input: { kind: 'voltage', sign: 'positive' },
}
const columnNames = Object.keys(rules) as readonly ColumnName[]

interface ProfileColumn {
  readonly name: ColumnName
  /** Position from 0. */
  readonly at: number
  /** From the header; "" where the cells bear their units. */
  readonly unit: string
}

/**
 * Reads a duty profile: a CSV table with columns hours and load and, where they change, ambient and input. A column
 * has its unit in the header, "load [%]", or in every cell. Each row must suit the stage. Any bad cell is refused:
 * a year with holes has no energy.
 */
export function readProfile(sourceText: string, file: string, stage: Stage): Reading<readonly DutyPoint[]> {
  const notText = checkText(sourceText, file)
  if (notText !== null) return { value: null, problems: [notText], warnings: [] }
  const problems: Problem[] = []
  const points: DutyPoint[] = []
  let columns: readonly ProfileColumn[] | null = null
  let headerIsGood = false
  const first = Math.max(1, sourceText.split('\n', 100).findIndex((line) => line.trim() !== '') + 1)
  const fault = readTable(sourceText, findDelimiter(sourceText, first), (cells, row) => {
    if (columns === null) {
      columns = readHeader(cells, file, row, problems)
      headerIsGood = problems.length === 0
    } else if (headerIsGood && problems.length < mostProblems)
      points.push(readPoint(columns, cells, { file, row, stage, problems }))
  })
  if (fault !== null) problems.push({ ...at(file, fault.row, 1), code: 'table-malformed', ...fault })
  if (problems.length === 0) problems.push(...checkWhole(points, file))
  const warnings = problems.length === 0 ? warningsOf(points, file) : []
  return problems.length > 0
    ? { value: null, problems: boundProblems(problems), warnings }
    : { value: points, problems, warnings }
}

/** Enough to see what is wrong; the rest of the file is then skipped. */
const mostProblems = 1000

function at(file: string, line: number, column: number): Omit<Problem, 'code'> {
  return { file, line, column, path: '', found: '', expected: '', hint: '' }
}

/** "load", "load [%]", "load (%)", "load %": a name, and a unit where there is one. */
const headerCell = /^([a-z]+)[\s_]*[[(]?\s*([^\])]*?)\s*[\])]?$/i

function readHeader(
  cells: readonly string[],
  file: string,
  row: number,
  problems: Problem[],
): readonly ProfileColumn[] {
  const columns = cells.flatMap((cell, position): readonly ProfileColumn[] => {
    const [, name = '', unit = ''] = cell.length > 100 ? [] : (headerCell.exec(cell.trim()) ?? [])
    const known = columnNames.find((one) => one === name.toLowerCase())
    if (known !== undefined) return [{ name: known, at: position, unit }]
    const hint = didYouMean(name, columnNames)
    problems.push({
      ...at(file, row, position + 1),
      code: 'key-unknown',
      found: shown(cell),
      expected: columnNames.join(', '),
      hint,
    })
    return []
  })
  for (const name of ['hours', 'load'] as const) {
    if (columns.some((column) => column.name === name)) continue
    problems.push({
      ...at(file, row, 1),
      code: 'key-missing',
      path: name,
      expected: `a column "${name} [${name === 'load' ? '%' : 'h'}]"`,
    })
  }
  for (const { name, at: position } of columns) {
    if (columns.find((column) => column.name === name)?.at === position) continue
    problems.push({ ...at(file, row, position + 1), code: 'yaml-duplicate-key', found: name })
  }
  return columns
}

interface RowContext {
  readonly file: string
  readonly row: number
  readonly stage: Stage
  readonly problems: Problem[]
}

function readPoint(columns: readonly ProfileColumn[], cells: readonly string[], context: RowContext): DutyPoint {
  const value = (name: ColumnName): number | null => {
    const column = columns.find((one) => one.name === name)
    return column === undefined ? null : readCell(column, (cells[column.at] ?? '').trim(), context)
  }
  const [hours, load, ambient, input] = [value('hours'), value('load'), value('ambient'), value('input')]
  const refusal = input === null ? null : inputRefusal(context.stage, input)
  const place = columns.find(({ name }) => name === 'input')
  if (refusal !== null && place !== undefined) {
    tell(
      context,
      place,
      'values-contradict',
      cells[place.at] ?? '',
      `${refusal}, ${context.stage.output.voltage} V`,
      '',
    )
  }
  return { hours: hours ?? Number.NaN, load: load ?? Number.NaN, ambient, input }
}

const bareNumber = /^[-+\u2212]?[\d.,]+(?:[eE][-+\u2212]?\d+)?$/

/** An empty cell of ambient or input means as in the stage. */
function readCell(column: ProfileColumn, cell: string, context: RowContext): number | null {
  if (cell === '' && (column.name === 'ambient' || column.name === 'input')) return null
  const text = column.unit !== '' && bareNumber.test(cell) ? `${cell} ${column.unit}` : cell
  const parsed = parseQuantity(text, rules[column.name])
  if (typeof parsed === 'number') return parsed
  tell(context, column, parsed.code, text, parsed.expected, parsed.hint)
  return null
}

function tell(
  context: RowContext,
  column: ProfileColumn,
  code: ProblemCode,
  found: string,
  expected: string,
  hint: string,
): void {
  const place = at(context.file, context.row, column.at + 1)
  context.problems.push({ ...place, code, path: column.name, found: shown(found), expected, hint })
}

function checkWhole(points: readonly DutyPoint[], file: string): readonly Problem[] {
  if (points.length === 0)
    return [{ ...at(file, 1, 1), code: 'file-empty', expected: 'a header with hours and load, and rows below it' }]
  if (hoursOf(points) > 0) return []
  return [
    {
      ...at(file, 1, 1),
      code: 'values-contradict',
      path: 'hours',
      found: '0 h',
      expected: 'its hours add up to nothing',
    },
  ]
}

function warningsOf(points: readonly DutyPoint[], file: string): readonly Problem[] {
  const hours = hoursOf(points)
  if (hours <= 8784.001) return []
  const found = `${Number(hours.toPrecision(6))} h`
  return [{ ...at(file, 1, 1), code: 'value-implausible', path: 'hours', found, expected: 'a year has 8760 h' }]
}

function hoursOf(points: readonly DutyPoint[]): number {
  return points.reduce((sum, point) => sum + point.hours, 0)
}
