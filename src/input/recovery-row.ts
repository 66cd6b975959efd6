import type { ForwardLine, RampRow, RecoveryRow, RecoveryTimeDefinition, StepRow } from '../domain/rectifier.ts'
import { addProblem, addWarning, has, plainNumber, quantity, required, type Section, text } from './section.ts'

type RowBasics = Pick<ForwardLine, 'grade' | 'spread' | 'source' | 'place' | 'junction'>

/** One reading of reverse recovery, by its fixture. */
export function recoveryRow(row: Section, basics: RowBasics): RecoveryRow {
  return text(row, 'fixture') === 'step' ? stepRow(row, basics) : rampRow(row, basics)
}

function rampRow(row: Section, basics: RowBasics): RampRow {
  return {
    fixture: 'ramp',
    current: quantity(row, 'current', 'current', 'positive'),
    slope: quantity(row, 'slope', 'slope', 'positive'),
    voltage: reverseVoltage(row),
    recoveryTime: quantity(row, 'trr', 'time', 'positive'),
    recoveryTimeBy: definitionOf(row),
    charge: quantity(row, 'qrr', 'charge', 'positive'),
    peakReverseCurrent: quantity(row, 'irrm', 'current', 'positive'),
    softness: softnessOf(row),
    softnessBy: text(row, 'softness_by') === 'slopes' ? 'slopes' : 'times',
    ...basics,
  }
}

/** A reading against 0 V says nothing about the voltage of the reading; it counts as not stated. */
function reverseVoltage(row: Section): number | null {
  const voltage = quantity(row, 'voltage', 'voltage', 'not-negative')
  if (voltage !== 0) return voltage
  const complaint = { code: 'value-unused', path: [...row.path, 'voltage'], found: text(row, 'voltage') ?? '' } as const
  addWarning(row.reader, { ...complaint, expected: 'the row counts as one without a voltage', hint: '' })
  return null
}

function definitionOf(row: Section): RecoveryTimeDefinition {
  const kind = text(row, 'trr_by') ?? 'unknown'
  if (kind !== 'level') return { kind } as RecoveryTimeDefinition
  return { kind, until: required(row, 'until', 'current', 'positive') }
}

function softnessOf(row: Section): number | null {
  return plainNumber(row, 'softness')
}

function stepRow(row: Section, basics: RowBasics): StepRow {
  const reverse = required(row, 'reverse', 'current', 'positive')
  const until = quantity(row, 'until', 'current', 'positive')
  if (until !== null && until >= reverse) {
    const complaint = {
      code: 'values-contradict',
      path: [...row.path, 'until'],
      found: text(row, 'until') ?? '',
    } as const
    const hint = 'the current of the fixture, which trr waits to fall, is "reverse"'
    addProblem(row.reader, { ...complaint, expected: `it must be below reverse, ${text(row, 'reverse')}`, hint })
  }
  const recoveryTime = quantity(row, 'trr', 'time', 'positive')
  const storageTime = quantity(row, 'storage', 'time', 'not-negative')
  checkOrder(row, recoveryTime, storageTime)
  return {
    fixture: 'step',
    current: required(row, 'current', 'current', 'positive'),
    reverse,
    until,
    recoveryTime,
    storageTime,
    ...basics,
  }
}

function checkOrder(row: Section, recoveryTime: number | null, storageTime: number | null): void {
  if (!has(row, 'storage') || recoveryTime === null || storageTime === null || storageTime < recoveryTime) return
  const found = text(row, 'storage') ?? ''
  const expected = `the storage time is a part of trr, ${text(row, 'trr')}`
  addProblem(row.reader, { code: 'values-contradict', path: [...row.path, 'storage'], found, expected, hint: '' })
}
