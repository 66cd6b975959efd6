import { validateCapture } from '#validators'
import type { CaptureColumn, CaptureSettings } from '../domain/capture.ts'
import type { RecoveryTimeDefinition } from '../domain/rectifier.ts'
import type { Reading } from '../problems/problem.ts'
import { boundProblems } from './bound-problems.ts'
import { tableInstead, wrongKind } from './file-kind.ts'
import {
  addProblem,
  group,
  has,
  plainNumber,
  quantity,
  quantityOr,
  required,
  rootSection,
  type Section,
  startReader,
  text,
} from './section.ts'
import { checkShape } from './shape.ts'
import { parseQuantity } from './units/parse-quantity.ts'
import { type QuantityKindName, quantityKinds } from './units/quantity-kinds.ts'
import { readYaml } from './yaml/read-yaml.ts'

/** Reads a file with capture settings: SI, defaults filled in and listed in `assumed`; all problems at once. */
export function readCapture(sourceText: string, file: string): Reading<CaptureSettings> {
  const table = tableInstead(file, 'capture')
  if (table !== null) return { value: null, problems: table, warnings: [] }
  const { yaml, problems } = readYaml(sourceText, file, 'capture settings')
  if (yaml === null) return { value: null, problems: boundProblems(problems), warnings: [] }
  const wrong = wrongKind(yaml.data, file, 'capture')
  if (wrong !== null) return { value: null, problems: wrong, warnings: [] }
  const reader = startReader(yaml)
  const shape = checkShape(yaml, validateCapture)
  const settings = settingsFrom(rootSection(reader))
  const all = [...problems, ...shape, ...reader.problems]
  const warnings = boundProblems(reader.warnings)
  return all.length > 0
    ? { value: null, problems: boundProblems(all), warnings }
    : { value: settings, problems: [], warnings }
}

function settingsFrom(root: Section): CaptureSettings {
  const { reader } = root
  const fixture = text(root, 'capture') === 'step' ? 'step' : 'ramp'
  const columns = group(root, 'columns')
  const device = group(root, 'device')
  const segment = text(root, 'segment') === 'average' ? 'average' : (plainNumber(root, 'segment') ?? 1)
  return {
    fixture,
    file: text(root, 'file') ?? '',
    ...timeFrom(root, columns),
    current: currentFrom(group(columns, 'current')),
    voltage: has(columns, 'voltage') ? channelFrom(group(columns, 'voltage'), 'voltage') : null,
    decimal: (text(root, 'decimal') ?? 'auto') as CaptureSettings['decimal'],
    segment,
    recoveryTimeBy: definitionFrom(root, fixture),
    chargeUntil: chargeEnd(root),
    bandwidth: quantity(root, 'bandwidth', 'frequency', 'positive'),
    currentDelay: quantityOr(root, 'current_delay', 'time', 'any', '0 ns'),
    reference: text(root, 'reference'),
    device: { id: text(device, 'id'), junction: quantity(device, 'junction', 'temperature', 'any') },
    assumed: reader.assumed,
  }
}

function timeFrom(root: Section, columns: Section): Pick<CaptureSettings, 'time' | 'interval'> {
  const both = has(columns, 'time') && has(root, 'interval')
  const none = !has(columns, 'time') && !has(root, 'interval')
  if (both) {
    const complaint = { code: 'key-not-here', path: ['interval'], found: text(root, 'interval') ?? '' } as const
    addProblem(root.reader, { ...complaint, expected: 'the file has a time column; keep one of them', hint: '' }, 'key')
  }
  if (none && has(root, 'columns')) {
    const expected = 'a time column, or interval beside columns where the file has none'
    addProblem(root.reader, { code: 'key-missing', path: ['columns', 'time'], found: '', expected, hint: '' }, 'key')
  }
  return {
    time: has(columns, 'time') ? channelFrom(group(columns, 'time'), 'time') : null,
    interval: quantity(root, 'interval', 'time', 'positive'),
  }
}

/** A channel that reads its quantity directly. */
function channelFrom(channel: Section, kind: 'time' | 'voltage' | 'current'): CaptureColumn {
  const unit = text(channel, 'unit') ?? ''
  const sign = channel.data.invert === true ? -1 : 1
  if (has(channel, 'across')) {
    const complaint = { code: 'key-not-here', path: [...channel.path, 'across'], found: 'across' } as const
    const expected = kind === 'current' ? `"${unit}" is a current already` : 'only a current is read across a shunt'
    addProblem(channel.reader, { ...complaint, expected, hint: '' }, 'key')
  }
  return { column: columnOf(channel), factor: sign * unitFactor(channel, kind), unit, shunt: null }
}

/** A probe reads amperes, a shunt volts across its resistance. */
function currentFrom(channel: Section): CaptureColumn {
  const unit = text(channel, 'unit') ?? ''
  const isVoltage = typeof parseQuantity(`1 ${unit}`, { kind: 'voltage', sign: 'positive' }) === 'number'
  if (!isVoltage) return channelFrom(channel, 'current')
  const shunt = quantity(channel, 'across', 'resistance', 'positive')
  if (!has(channel, 'across')) {
    const expected = 'the resistance of the shunt, such as "50 mohm"'
    const complaint = { code: 'key-missing', path: [...channel.path, 'across'], found: '', expected } as const
    addProblem(channel.reader, { ...complaint, hint: `"${unit}" is a voltage` }, 'key')
  }
  const sign = channel.data.invert === true ? -1 : 1
  const factor = (sign * unitFactor(channel, 'voltage')) / (shunt ?? 1)
  return { column: columnOf(channel), factor, unit: `${unit} across ${text(channel, 'across') ?? ''}`, shunt }
}

function columnOf(channel: Section): number | string {
  return plainNumber(channel, 'column') ?? text(channel, 'column') ?? 1
}

/** What one unit of the channel is in SI. */
function unitFactor(channel: Section, kind: QuantityKindName): number {
  const unit = text(channel, 'unit')
  if (unit === null) return 1
  const parsed = parseQuantity(`1 ${unit}`, { kind, sign: 'positive' })
  if (typeof parsed === 'number') return parsed
  const expected = `the unit of ${quantityKinds[kind].name} such as "${quantityKinds[kind].units[0]}"`
  addProblem(channel.reader, {
    code: 'unit-dimension',
    path: [...channel.path, 'unit'],
    found: unit,
    expected,
    hint: parsed.code === 'unit-unknown' ? 'it is no unit here' : parsed.hint || 'it is not the unit alone',
  })
  return 1
}

function definitionFrom(root: Section, fixture: 'ramp' | 'step'): RecoveryTimeDefinition {
  const { reader } = root
  const kind = text(root, 'trr_by') ?? (fixture === 'ramp' ? 'line-90-25' : 'level-25')
  const path = ['trr_by']
  if (fixture === 'step' && kind.startsWith('line')) {
    const expected = 'the end of a step is a level of its plateau: level-25, level-10 or level with until'
    addProblem(reader, { code: 'values-contradict', path, found: kind, expected, hint: '' })
  }
  if (kind === 'level' && !has(root, 'until')) {
    const expected = 'the reverse current at which the recovery time ends'
    addProblem(
      reader,
      { code: 'key-missing', path: ['until'], found: '', expected, hint: 'trr_by: level needs it' },
      'key',
    )
  }
  if (kind !== 'level' && has(root, 'until')) {
    const expected = 'only trr_by: level reads it'
    addProblem(reader, { code: 'key-not-here', path: ['until'], found: 'until', expected, hint: '' }, 'key')
  }
  if (!has(root, 'trr_by')) reader.assumed.push({ path: 'trr_by', value: kind })
  if (kind === 'level') return { kind, until: required(root, 'until', 'current', 'positive') }
  return { kind } as RecoveryTimeDefinition
}

/** The end lies on the tail: from the whole tail to half of the peak. */
function chargeEnd(root: Section): number {
  const end = quantityOr(root, 'charge_until', 'share', 'not-negative', '2 %')
  if (end > 0.5) {
    const found = text(root, 'charge_until') ?? ''
    const expected = 'at most 50 % of the peak reverse current'
    addProblem(root.reader, { code: 'number-out-of-range', path: ['charge_until'], found, expected, hint: '' })
  }
  return end
}
