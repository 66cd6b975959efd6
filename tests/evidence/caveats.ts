import { expect } from 'vitest'
import { type Caveat, caveatCodes } from '../../src/domain/caveat.ts'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { record } from './records.ts'

/** What a record makes its reader ask about, used at 400 V; each of it something that the reports have words for. */
export function caveatsOf(fields: Partial<RectifierRecord>): readonly Caveat[] {
  const { caveats } = calibrate({ record: record(fields), blockingVoltage: 400 })
  for (const { code } of caveats) expect(caveatCodes).toContain(code)
  return caveats
}
