import type { RecoveryRow } from '../../src/domain/rectifier.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { recoveryAt } from '../../src/evidence/recovery-at.ts'
import { kelvin, record } from './records.ts'

/** An ultrafast 8 A part with these recovery rows, used at 400 V, and what tests ask of it. */
export function calibrated(...recovery: readonly RecoveryRow[]) {
  const { rectifier, caveats } = calibrate({ record: record({ recovery }), blockingVoltage: 400 })
  return {
    rectifier,
    codes: caveats.map((caveat) => caveat.code),
    dataOf: (code: string) => caveats.find((caveat) => caveat.code === code)?.data,
    at: (current: number, slope: number, celsius: number) =>
      recoveryAt({ rectifier, current, slope, junction: kelvin(celsius) })!,
  }
}
