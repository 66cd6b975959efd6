import { closeSync, openSync, rmSync, statSync, writeSync } from 'node:fs'
import type { CaptureDocument } from '../domain/capture.ts'
import { storesCharge } from '../domain/rectifier.ts'
import { appendRecoveryRow, type RowTexts } from '../input/append-recovery-row.ts'
import { listedIds } from '../input/check-references.ts'
import { readRecords } from '../input/read-records.ts'
import { didYouMean } from '../problems/nearest.ts'
import { CommandFailure, failure } from './failure.ts'
import { readText } from './read-file.ts'
import { replaceFile, writingFailure } from './replace-file.ts'

/** Checks that a record can take a row, before the work of reducing begins. */
export function checkRecord(path: string, id: string | null): void {
  if (id === null)
    throw unusable('device.id is missing in the capture settings', 'the id of a record', 'add device: {id: ...}')
  const { text } = readText(path)
  const { value, problems } = readRecords(text, path)
  if (value === null) throw new CommandFailure(problems, new Map([[path, text]]))
  const ids = value.map((record) => record.id)
  const record = value.find((one) => one.id === id)
  if (record === undefined) throw unknownId(path, id, ids)
  if (!storesCharge(record.class))
    throw unusable(`${id} is of class ${record.class}, which stores no charge`, 'a record that takes recovery rows')
}

/**
 * Appends the row of a capture to a record: under a lock, on the text as it is then, and in one step.
 * Returns the line that was written, for the person.
 */
export function appendRow(path: string, document: CaptureDocument, source: string, sha256: string): string {
  if (document.recovery !== 'measured') {
    throw unusable('no recovery could be told from the fixture, so there is no row to append', '', 'leave --into out')
  }
  const mark = `sha256 ${sha256.slice(0, 12)}`
  const row = rowTexts(document, `${source} ${mark}`)
  return locked(path, () => {
    const { text } = readText(path)
    const id = document.device.id ?? ''
    const appended = appendRecoveryRow(text, id, row, mark)
    if (typeof appended !== 'string') {
      if (appended.refused === 'id-unknown') throw unknownId(path, id, appended.known)
      throw unusable(`this capture is in the record already, line ${appended.line}`, 'another capture')
    }
    const { problems } = readRecords(appended, path)
    if (problems.length > 0) throw new CommandFailure(problems, new Map([[path, appended]]))
    replaceFile(path, appended, [])
    return row.map(([key, value]) => `${key}: ${value}`).join(', ')
  })
}

function unknownId(path: string, id: string, known: readonly string[]) {
  const expected = listedIds(known)
  const hint = [didYouMean(id, known), expected].filter((part) => part !== '').join('; ')
  return failure({ code: 'id-unknown', file: path, found: id, expected, hint })
}

function unusable(found: string, expected: string, hint = '') {
  return failure({ code: 'option-unusable', path: '--into', found, expected, hint })
}

const stale = 60_000

/** One writer at a time: a lock file beside the record, made only where there is none. */
function locked<T>(path: string, work: () => T): T {
  const lock = `${path}.lock`
  const age = statSync(lock, { throwIfNoEntry: false })?.mtimeMs
  if (age !== undefined && Date.now() - age > stale) rmSync(lock, { force: true })
  let handle: number
  try {
    handle = openSync(lock, 'wx')
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'EEXIST') throw writingFailure(path, error)
    const hint = `try again; if no other ebbwatt runs, remove ${lock}`
    throw failure({ code: 'file-unwritable', file: path, found: 'another process is appending to it', hint })
  }
  try {
    noteOwner(handle, path)
    return work()
  } finally {
    closeSync(handle)
    rmSync(lock, { force: true })
  }
}

function noteOwner(handle: number, path: string): void {
  try {
    writeSync(handle, String(process.pid))
  } catch (error) {
    throw writingFailure(path, error)
  }
}

/** The row as a record states it. Softness is left out: it follows from trr and ta and would be counted twice. */
function rowTexts({ fixture, row, device, spread }: CaptureDocument, source: string): RowTexts {
  const keys = fixture === 'ramp' ? rampKeys : stepKeys
  const figures = keys.flatMap(([name, key, unit, size]) => {
    const value = row[key]
    return typeof value === 'number' ? [[name, figureText(value, unit, size)] as const] : []
  })
  const by = fixture === 'ramp' ? [['trr_by', String(row.trr_by)] as const] : []
  return [
    ['fixture', fixture],
    ...figures,
    ...by,
    ['junction', `${Number(device.junction_c.toPrecision(4))} degC`],
    ['grade', 'measured'],
    ['spread', `${Number((100 * spread.row!).toPrecision(3))} %`],
    ['source', source],
  ]
}

/** Four digits; currents of a fixture in milliamperes. */
function figureText(value: number, unit: string, size: number): string {
  const small = unit === 'A' && value < 0.1
  return `${Number((value / (small ? 1e-3 : size)).toPrecision(4))} ${small ? 'mA' : unit}`
}

const rampKeys = [
  ['current', 'current_a', 'A', 1],
  ['slope', 'slope_a_per_s', 'A/us', 1e6],
  ['voltage', 'voltage_v', 'V', 1],
  ['trr', 'trr_s', 'ns', 1e-9],
  ['qrr', 'qrr_c', 'nC', 1e-9],
  ['irrm', 'peak_reverse_a', 'A', 1],
] as const

const stepKeys = [
  ['current', 'current_a', 'A', 1],
  ['reverse', 'reverse_a', 'A', 1],
  ['until', 'until_a', 'A', 1],
  ['trr', 'trr_s', 'ns', 1e-9],
  ['storage', 'storage_s', 'ns', 1e-9],
] as const
