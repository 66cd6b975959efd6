import type { CatalogueMapping } from '../read-mapping.ts'
import type { ColumnIndex } from './columns.ts'
import { type ColumnCell, isColumn, numberKeys } from './template.ts'

/** A record as data, and for each of its lists which rows of the template are left in it. */
export interface FilledRow {
  readonly data: Readonly<Record<string, unknown>>
  readonly kept: ReadonlyMap<string, readonly number[]>
}

/** Cells of one row put into a mapping's record. */
interface Filling {
  readonly mapping: CatalogueMapping
  readonly index: ColumnIndex
  readonly cells: readonly string[]
  readonly kept: Map<string, readonly number[]>
}

/**
 * The record of one row of the table. An empty cell leaves its key out; a reading or group that says nothing
 * without it is left out as a whole, so that a part without a figure for trr has no recovery row.
 */
export function fillTemplate(mapping: CatalogueMapping, index: ColumnIndex, cells: readonly string[]): FilledRow {
  const filling: Filling = { mapping, index, cells, kept: new Map() }
  return { data: fillGroup(filling, mapping.record, '') ?? {}, kept: filling.kept }
}

type Group = Readonly<Record<string, unknown>>

function fillGroup(filling: Filling, template: Group, name: string): Group | undefined {
  const filled: Record<string, unknown> = {}
  for (const [key, value] of Object.entries(template)) {
    const inside = fillValue(filling, value, key)
    if (inside !== undefined) filled[key] = inside
  }
  return isComplete(filled, name) ? filled : undefined
}

function fillValue(filling: Filling, value: unknown, key: string): unknown {
  if (isColumn(value)) return fillCell(filling, value, key)
  if (Array.isArray(value)) return fillList(filling, value, key)
  return typeof value === 'object' && value !== null ? fillGroup(filling, value as Group, key) : value
}

function fillList(filling: Filling, list: readonly unknown[], key: string): unknown {
  const filled = list.map((item) => fillValue(filling, item, key))
  const kept = filled.flatMap((item, position) => (item === undefined ? [] : [position]))
  if (kept.length === 0) return undefined
  filling.kept.set(key, kept)
  return kept.map((position) => filled[position])
}

/** What a reading or group needs to say anything: at least one key of each line. Other groups stay as they are. */
const needed: Readonly<Record<string, readonly (readonly string[])[]>> = {
  forward: [['current'], ['drop']],
  forward_line: [['threshold'], ['resistance']],
  ramp: [['trr', 'qrr', 'irrm', 'softness']],
  step: [['current'], ['reverse'], ['trr', 'storage']],
  leakage: [['voltage'], ['current']],
  points: [['voltage'], ['capacitance']],
  thermal: [['junction_to_case', 'case_to_sink', 'junction_to_ambient']],
  capacitance: [['zero_bias', 'points', 'charge']],
  forward_recovery: [['peak'], ['time'], ['slope']],
  dead_time: [['before'], ['after']],
  channel: [['on_resistance'], ['per_kelvin']],
}

function isComplete(group: Group, name: string): boolean {
  const lines = needed[name === 'recovery' ? String(group.fixture) : name] ?? []
  return lines.every((alternatives) => alternatives.some((key) => group[key] !== undefined))
}

const bareNumber = /^[-+\u2212]?[\d.,]+(?:[eE][-+\u2212]?\d+)?$/

function fillCell({ mapping, index, cells }: Filling, cell: ColumnCell, key: string): unknown {
  const text = (cells[index.get(cell) ?? -1] ?? '').trim()
  if (text === '' || mapping.empty.has(text.toLowerCase())) return undefined
  if (cell.words !== undefined) return Object.hasOwn(cell.words, text) ? cell.words[text] : text
  if (cell.unit === undefined && !numberKeys.has(key)) return text
  const number = mapping.decimal === 'comma' ? withPoint(text) : text
  if (numberKeys.has(key)) return bareNumber.test(number) && Number.isFinite(Number(number)) ? Number(number) : number
  // A cell may bear its own unit, which then counts.
  return bareNumber.test(number) ? `${number} ${cell.unit}` : number
}

/** "1,5" where the mapping says that commas are decimal; "1.200,5" stays as it is and is refused. */
function withPoint(text: string): string {
  return text.includes('.') ? text : text.replace(',', '.')
}
