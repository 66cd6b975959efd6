import { referenceSlope, referenceTemperature } from '../domain/constants.ts'
import type { RecoveryRow, RectifierRecord } from '../domain/rectifier.ts'

/** Where a part is used: what its rows have to be brought to. */
export interface OperatingCondition {
  /** Current when the switch turns on. [A] */
  readonly current: number
  /** |di/dt|. [A/s] */
  readonly slope: number
  /** [K] */
  readonly junction: number
}

/** Where a recovery row was read, with what it does not state filled in as the fit does. */
export function conditionOfRow(row: RecoveryRow, record: RectifierRecord): OperatingCondition {
  const junction = row.junction ?? referenceTemperature
  if (row.fixture === 'step') return { current: row.current, slope: referenceSlope, junction }
  return { current: row.current ?? record.ratings.averageCurrent, slope: row.slope ?? referenceSlope, junction }
}

/** By what factor a value lies outside a set of values; 1 inside. */
export function factorOutside(value: number, values: readonly number[]): number {
  return Math.max(Math.min(...values) / value, value / Math.max(...values), 1)
}

/** By how much a value lies outside a set of values; 0 inside. */
export function distanceOutside(value: number, values: readonly number[]): number {
  return Math.max(Math.min(...values) - value, value - Math.max(...values), 0)
}
