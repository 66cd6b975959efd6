import type { RecoveryRow } from '../domain/rectifier.ts'

type Range = readonly [low: number, high: number]

/** Far outside any part and any bench; within them no product of a few figures leaves the range of doubles. */
const currents: Range = [1e-9, 1e7]
const slopes: Range = [1e-3, 1e18]
const times: Range = [1e-16, 50]
const charges: Range = [1e-18, 1e3]
const temperatures: Range = [1, 1e4]
const largestSoftness = 1e6

/** Whether every figure and condition of a recovery row, the current assumed where none is stated, is one that the model can be solved for. */
export function isReadable(row: RecoveryRow, ratedCurrent: number): boolean {
  const { junction, current } = row
  if (!inside(current ?? ratedCurrent, currents) || !inside(junction, temperatures) || !inside(row.recoveryTime, times))
    return false
  if (row.fixture === 'step') return inside(row.reverse, currents) && inside(row.until, currents) && storageFits(row)
  const level = row.recoveryTimeBy.kind === 'level' ? row.recoveryTimeBy.until : null
  return (
    inside(row.slope, slopes) &&
    inside(level, currents) &&
    inside(row.charge, charges) &&
    inside(row.peakReverseCurrent, currents) &&
    (row.softness ?? 0) <= largestSoftness
  )
}

/** A storage time of zero is allowed, and says nothing. */
function storageFits({ storageTime }: RecoveryRow & { readonly fixture: 'step' }): boolean {
  return storageTime === 0 || inside(storageTime, times)
}

function inside(value: number | null, [low, high]: Range): boolean {
  return value === null || (value >= low && value <= high)
}
