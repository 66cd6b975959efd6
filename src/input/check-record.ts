import type { RectifierRecord } from '../domain/rectifier.ts'
import { addWarning, group, rows, type Section, text } from './section.ts'

/** Readings outside the record's own ratings: possible on a bench, but mostly a slip. */
export function checkRecord(section: Section, record: RectifierRecord): void {
  const { reverseVoltage, junction } = record.ratings
  const hottest = junction + 1
  const named = [
    ...rows(section, 'forward').map((row, index) => ({ row, reading: record.forward[index]?.junction ?? null })),
    ...rows(section, 'recovery').map((row, index) => ({ row, reading: record.recovery[index]?.junction ?? null })),
  ]
  for (const { row, reading } of named) {
    if (reading !== null && reading > hottest)
      warn(row, 'junction', `the rating is ${text(group(section, 'ratings'), 'junction')}`)
  }
  for (const [index, row] of rows(section, 'recovery').entries()) {
    const reading = record.recovery[index]
    if (reading?.fixture === 'ramp' && (reading.voltage ?? 0) > 1.05 * reverseVoltage) {
      warn(row, 'voltage', `the rating is ${text(group(section, 'ratings'), 'reverse_voltage')}`)
    }
  }
}

function warn(row: Section, key: string, expected: string): void {
  const found = text(row, key) ?? ''
  addWarning(row.reader, { code: 'value-implausible', path: [...row.path, key], found, expected, hint: '' })
}
