import type { Caveat } from '../domain/caveat.ts'
import { referenceTemperature } from '../domain/constants.ts'
import type { Grade, LeakageRow, RampRow, RectifierRecord, RowPlace } from '../domain/rectifier.ts'
import { figureText } from './figure-text.ts'

/** Conditions count as the same within these. */
const sameCurrent = 1.3
const sameVoltage = 1.1
const sameKelvin = 10
/** Hot and cold are told apart beyond this. */
const apartKelvin = 20

/** Rows of one record against each other: hot against cold, maximum against typical. */
export function compareRows(record: RectifierRecord): Caveat[] {
  const ramps = record.recovery.filter((row): row is RampRow => row.fixture === 'ramp')
  return [
    ...firstOf(ramps, (one, other) => hotBelowCold(record.id, one, other)),
    ...firstOf(record.leakage, (one, other) => hotLeakageBelowCold(record.id, one, other)),
    ...firstOf(ramps, (one, other) => maximumRecovery(record.id, one, other)),
    ...firstOf(record.leakage, (one, other) =>
      alike(one.voltage, other.voltage, sameVoltage)
        ? maximumBelow(record.id, one, other, 'leakage', [one.current, other.current], (value) => `${value} A`)
        : null,
    ),
    ...firstOf(record.forward, (one, other) =>
      alike(one.current, other.current, sameVoltage)
        ? maximumBelow(record.id, one, other, 'forward voltage', [one.drop, other.drop], (value) => `${value} V`)
        : null,
    ),
  ]
}

/** Same current, slope and grade, yet less charge (else time, else peak) at the higher temperature. */
function hotBelowCold(candidate: string, one: RampRow, other: RampRow): Caveat | null {
  if (one.grade !== other.grade || !sameRamp(one, other)) return null
  const order = byTemperature(one, other)
  if (order === null) return null
  const [cold, hot] = order
  const heat = { hotAt: hot.junction!, coldAt: cold.junction! }
  if (hot.charge !== null && cold.charge !== null) {
    if (hot.charge >= cold.charge) return null
    return { code: 'hot-below-cold', candidate, data: { hot: hot.charge, cold: cold.charge, ...heat } }
  }
  const falls = (['recoveryTime', 'peakReverseCurrent'] as const).some((name) => below(hot[name], cold[name]))
  return falls ? { code: 'hot-below-cold', candidate, data: heat } : null
}

function hotLeakageBelowCold(candidate: string, one: LeakageRow, other: LeakageRow): Caveat | null {
  if (one.grade !== other.grade) return null
  const order = byTemperature(one, other)
  if (order === null) return null
  const [cold, hot] = order
  if (hot.voltage < cold.voltage || hot.current > cold.current) return null
  return { code: 'rows-contradict', candidate, data: { row: hot.place.name, other: cold.place.name } }
}

/** Cold row first; null when the two are not clearly apart or one does not state its temperature. */
function byTemperature<R extends { readonly junction: number | null }>(one: R, other: R): [R, R] | null {
  if (one.junction === null || other.junction === null) return null
  if (Math.abs(one.junction - other.junction) < apartKelvin) return null
  return one.junction < other.junction ? [one, other] : [other, one]
}

const comparedFigures = [
  ['charge', 'Qrr', 'C'],
  ['recoveryTime', 'trr', 's'],
  ['peakReverseCurrent', 'I_RM', 'A'],
] as const

function maximumRecovery(candidate: string, one: RampRow, other: RampRow): Caveat | null {
  if (!sameRamp(one, other)) return null
  for (const [name, symbol, unit] of comparedFigures) {
    if (name === 'recoveryTime' && one.recoveryTimeBy.kind !== other.recoveryTimeBy.kind) continue
    if (one[name] === null || other[name] === null) continue
    const text = (value: number) => figureText(symbol, value, unit)
    const found = maximumBelow(candidate, one, other, 'recovery', [one[name], other[name]], text)
    if (found) return found
  }
  return null
}

interface GradedRow {
  readonly grade: Grade
  readonly junction: number | null
  readonly place: RowPlace
}

/** A maximum row below a typical or measured one read at the same temperature. */
function maximumBelow(
  candidate: string,
  one: GradedRow,
  other: GradedRow,
  property: string,
  [first, second]: readonly [number, number],
  text: (value: number) => string,
): Caveat | null {
  if ((one.grade === 'maximum') === (other.grade === 'maximum')) return null
  if (one.grade === 'estimated' || other.grade === 'estimated') return null
  if (Math.abs((one.junction ?? referenceTemperature) - (other.junction ?? referenceTemperature)) > sameKelvin)
    return null
  const [maximum, typical] = one.grade === 'maximum' ? [first, second] : [second, first]
  if (maximum >= typical) return null
  return {
    code: 'maximum-below-typical',
    candidate,
    data: { property, maximum: text(maximum), typical: text(typical) },
  }
}

function sameRamp(one: RampRow, other: RampRow): boolean {
  return alike(one.current, other.current, sameCurrent) && alike(one.slope, other.slope, sameCurrent)
}

function alike(one: number | null, other: number | null, factor: number): boolean {
  if (one === null || other === null) return one === other
  return Math.max(one, other) <= factor * Math.min(one, other)
}

function below(one: number | null, other: number | null): boolean {
  return one !== null && other !== null && one < other
}

/** One caveat of a kind is enough to send the reader back to the record. */
function firstOf<R>(rows: readonly R[], check: (one: R, other: R) => Caveat | null): Caveat[] {
  for (const [index, one] of rows.entries()) {
    // A list of all pairs would not fit into memory for a record of thousands of rows.
    for (let next = index + 1; next < rows.length; next++) {
      const found = check(one, rows[next]!)
      if (found) return [found]
    }
  }
  return []
}
