import type {
  CapacitanceData,
  ForwardLine,
  Grade,
  RectifierClass,
  RectifierRecord,
  RectifierThermal,
  RowPlace,
} from '../domain/rectifier.ts'
import { checkRecord } from './check-record.ts'
import { recoveryRow } from './recovery-row.ts'
import { addWarning, group, has, plainNumber, quantity, required, rows, type Section, text } from './section.ts'

/** One record in SI, nothing filled in. Only to be used when the reader has no problems. */
export function recordFrom(section: Section): RectifierRecord {
  const record: RectifierRecord = {
    id: text(section, 'id') ?? '',
    class: text(section, 'class') as RectifierClass,
    title: text(section, 'title'),
    origin: text(section, 'origin'),
    place: placeOf(section, 'record'),
    ratings: ratingsFrom(group(section, 'ratings')),
    thermal: has(section, 'thermal') ? thermalFrom(group(section, 'thermal')) : null,
    price: plainNumber(section, 'price'),
    forward: rows(section, 'forward').map((row, index) => ({
      current: required(row, 'current', 'current', 'positive'),
      drop: required(row, 'drop', 'voltage', 'not-negative'),
      ...rowBasics(row, `forward row ${index + 1}`),
    })),
    forwardLine: has(section, 'forward_line') ? forwardLineFrom(group(section, 'forward_line')) : null,
    recovery: rows(section, 'recovery').map((row, index) =>
      recoveryRow(row, rowBasics(row, `recovery row ${index + 1}`)),
    ),
    leakage: rows(section, 'leakage').flatMap(leakageRow),
    capacitance: has(section, 'capacitance') ? capacitanceFrom(group(section, 'capacitance')) : null,
    ...extrasFrom(section),
  }
  checkRecord(section, record)
  return record
}

type RowBasics = Pick<ForwardLine, 'grade' | 'spread' | 'source' | 'place' | 'junction'>

function rowBasics(row: Section, name: string): RowBasics {
  return {
    grade: (text(row, 'grade') ?? 'typical') as Grade,
    spread: quantity(row, 'spread', 'share', 'not-negative'),
    source: text(row, 'source'),
    place: placeOf(row, name),
    junction: quantity(row, 'junction', 'temperature', 'any'),
  }
}

function placeOf({ reader, path }: Section, name: string): RowPlace {
  return { name, file: reader.yaml.file, ...reader.yaml.place(path, 'value') }
}

function ratingsFrom(ratings: Section): RectifierRecord['ratings'] {
  return {
    reverseVoltage: required(ratings, 'reverse_voltage', 'voltage', 'positive'),
    averageCurrent: required(ratings, 'average_current', 'current', 'positive'),
    junction: required(ratings, 'junction', 'temperature', 'any'),
  }
}

function thermalFrom(thermal: Section): RectifierThermal {
  const junctionToAmbient = quantity(thermal, 'junction_to_ambient', 'thermal_resistance', 'positive')
  if (junctionToAmbient !== null) return { kind: 'ambient', junctionToAmbient, mounting: text(thermal, 'mounting') }
  return {
    kind: 'case',
    junctionToCase: quantity(thermal, 'junction_to_case', 'thermal_resistance', 'positive'),
    caseToSink: quantity(thermal, 'case_to_sink', 'thermal_resistance', 'positive'),
  }
}

function forwardLineFrom(line: Section): ForwardLine {
  return {
    threshold: required(line, 'threshold', 'voltage', 'not-negative'),
    resistance: required(line, 'resistance', 'resistance', 'not-negative'),
    thresholdPerKelvin: quantity(line, 'threshold_per_kelvin', 'voltage_per_kelvin', 'any'),
    resistancePerKelvin: quantity(line, 'resistance_per_kelvin', 'resistance_per_kelvin', 'any'),
    ...rowBasics(line, 'forward line'),
  }
}

function leakageRow(row: Section, index: number): RectifierRecord['leakage'] {
  const voltage = required(row, 'voltage', 'voltage', 'not-negative')
  const current = required(row, 'current', 'current', 'positive')
  const basics = rowBasics(row, `leakage row ${index + 1}`)
  if (voltage === 0) return unused(row, 'voltage', 'at 0 V there is no leakage') ?? []
  return [{ voltage, current, ...basics }]
}

function capacitanceFrom(capacitance: Section): CapacitanceData | null {
  if (has(capacitance, 'points')) return pointsFrom(capacitance)
  if (has(capacitance, 'charge')) {
    const charge = required(capacitance, 'charge', 'charge', 'not-negative')
    const voltage = required(capacitance, 'voltage', 'voltage', 'not-negative')
    return voltage === 0
      ? unused(capacitance, 'voltage', 'a charge at 0 V tells nothing')
      : { kind: 'charge', charge, voltage }
  }
  const zeroBias = required(capacitance, 'zero_bias', 'capacitance', 'not-negative')
  const builtIn = required(capacitance, 'built_in', 'voltage', 'not-negative')
  const grading = plainNumber(capacitance, 'grading') ?? Number.NaN
  return builtIn === 0
    ? unused(capacitance, 'built_in', 'the law has no meaning at 0 V')
    : { kind: 'law', zeroBias, builtIn, grading }
}

function pointsFrom(capacitance: Section): CapacitanceData | null {
  const points = rows(capacitance, 'points').flatMap((point) => {
    const voltage = required(point, 'voltage', 'voltage', 'not-negative')
    const value = required(point, 'capacitance', 'capacitance', 'not-negative')
    return value === 0 ? (unused(point, 'capacitance', 'no junction has 0 F') ?? []) : [{ voltage, capacitance: value }]
  })
  return points.length === 0 ? null : { kind: 'points', points }
}

/** Says that a zero, which is allowed, carries no information here; the datum is left out. */
function unused(section: Section, key: string, why: string): null {
  const found = text(section, key) ?? ''
  addWarning(section.reader, { code: 'value-unused', path: [...section.path, key], found, expected: why, hint: '' })
  return null
}

function extrasFrom(section: Section): Pick<RectifierRecord, 'forwardRecovery' | 'deadTime' | 'channel'> {
  const [recovery, dead, channel] = [
    group(section, 'forward_recovery'),
    group(section, 'dead_time'),
    group(section, 'channel'),
  ]
  return {
    forwardRecovery: has(section, 'forward_recovery')
      ? {
          peak: required(recovery, 'peak', 'voltage', 'not-negative'),
          time: required(recovery, 'time', 'time', 'not-negative'),
          slope: required(recovery, 'slope', 'slope', 'positive'),
        }
      : null,
    deadTime: isUsed(section, 'dead_time')
      ? {
          before: required(dead, 'before', 'time', 'not-negative'),
          after: required(dead, 'after', 'time', 'not-negative'),
        }
      : null,
    channel: isUsed(section, 'channel')
      ? {
          onResistance: required(channel, 'on_resistance', 'resistance', 'not-negative'),
          perKelvin: required(channel, 'per_kelvin', 'per_kelvin', 'any'),
        }
      : null,
  }
}

/** Dead time and channel belong to a body diode; elsewhere they are said to be left out. */
function isUsed(section: Section, key: 'dead_time' | 'channel'): boolean {
  if (!has(section, key)) return false
  const rectifierClass = text(section, 'class')
  if (rectifierClass === 'body-diode') return true
  const complaint = { code: 'value-unused', path: [...section.path, key], found: key, hint: '' } as const
  addWarning(section.reader, { ...complaint, expected: `only class body-diode has it, not ${rectifierClass}` }, 'key')
  return false
}
