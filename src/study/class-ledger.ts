import type { RectifierClass, RectifierRecord } from '../domain/rectifier.ts'
import type { LedgerEntry } from '../domain/review.ts'
import type { Stage } from '../domain/stage.ts'
import { classPriors, type Spread } from '../evidence/class-priors.ts'
import { assumedCaseToSink, assumedJunctionToCase, assumedResistances } from '../stage/thermal-network.ts'

const priorSource = 'class prior: trade figures and judgement, from memory; rows of a record override it'

/** What each class is expected to show before a record is read, for the classes that compete. */
export function classLedger(records: readonly RectifierRecord[]): LedgerEntry[] {
  const classes = [...new Set(records.map((record) => record.class))].sort()
  return classes.flatMap(priorEntries)
}

function priorEntries(rectifierClass: RectifierClass): LedgerEntry[] {
  const { recovery, forward, leakage } = classPriors[rectifierClass]
  const figures: readonly (readonly [string, Spread | undefined, string, string])[] = [
    ['lifetime tau at rated current, 100 A/µs, 25 °C', recovery?.lifetime, 's', 'of its logarithm'],
    ['ln(tau/tau_rr − 1) there', recovery?.ratio, '1', ''],
    ['growth of ln tau with ln(T/T0)', recovery?.lifetimeHeat, '1', ''],
    ['growth of ln(tau/tau_rr − 1) with ln(T/T0)', recovery?.ratioHeat, '1', ''],
    ['V_F at rated current, 25 °C', forward.level, 'V', ''],
    ['V_F over ln(I/I0)', forward.logarithmic, 'V', ''],
    ['resistive share of V_F', forward.share, '1', ''],
    ['V_F over temperature', forward.perKelvin, 'V/K', ''],
    ['leakage at rated voltage, 25 °C', leakage?.current, 'A', 'of its logarithm'],
    ['activation energy of leakage (eV)', leakage?.activation, '1', ''],
    ['exponent of leakage over voltage', leakage?.exponent, '1', ''],
  ]
  return figures.flatMap(([path, spread, unit, of]) =>
    spread === undefined
      ? []
      : [entry(`class ${rectifierClass}`, path, spread[0], unit, `one deviation ${deviation(spread[1], of)}`)],
  )
}

function deviation(value: number, of: string): string {
  return of === '' ? String(value) : `${value} ${of}`
}

/** What a record leaves open, and what stands in for it. */
export function guessLedger(stage: Stage, record: RectifierRecord): LedgerEntry[] {
  const prior = classPriors[record.class]
  const left: readonly (readonly [boolean, string, string])[] = [
    [prior.recovery !== null && record.recovery.length === 0, 'recovery', 'from the class alone'],
    [record.forward.length === 0 && record.forwardLine === null, 'forward', 'from the class alone'],
    [prior.leakage !== null && record.leakage.length === 0, 'leakage', 'from the class alone'],
    [record.capacitance === null, 'capacitance', 'none stated: its row counts 0'],
  ]
  const guesses = left
    .filter(([open]) => open)
    .map(([, path, value]) => entry(record.id, path, value, '', `record says nothing; see class ${record.class}`))
  const resistances = assumedResistances(stage, record).map((name) =>
    entry(
      record.id,
      `thermal.${name}`,
      name === 'junction_to_case' ? assumedJunctionToCase : assumedCaseToSink,
      'K/W',
      'common practice, no source',
    ),
  )
  return [...guesses, ...resistances]
}

function entry(subject: string, path: string, value: number | string, unit: string, source: string): LedgerEntry {
  const origin = 'class'
  return { subject, path, value, unit, origin, grade: 'class guess', source: joined(subject, source), place: '' }
}

function joined(subject: string, source: string): string {
  return subject.startsWith('class ') ? `${priorSource}; ${source}` : source
}
