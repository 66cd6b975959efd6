import type { LossesResult } from '../domain/result.ts'
import { row } from '../stage/kernel.ts'
import { totalLossOf } from './nominal-point.ts'

/** The rectifier's six rows and their sum; all null without a stable temperature. */
export function lossesResult(rows: Float64Array | null): LossesResult {
  const at = (index: number): number | null => rows?.[index] ?? null
  return {
    conduction: at(row.conduction),
    recovery_rectifier: at(row.recoveryRectifier),
    recovery_switch: at(row.recoverySwitch),
    capacitive: at(row.capacitive),
    leakage: at(row.leakage),
    forward_recovery: at(row.forwardRecovery),
    total: rows === null ? null : totalLossOf(rows),
  }
}
