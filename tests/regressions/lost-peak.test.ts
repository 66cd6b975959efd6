import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { expect, it } from 'vitest'
import { runReduce } from '../../src/commands/reduce.ts'
import { messageOf, recordingSession } from '../commands/session-double.ts'

it('a peak that the fit puts behind the end of the record is none: half of the samples of three sweeps were lost', async () => {
  const folder = mkdtempSync(join(tmpdir(), 'ebbwatt-test-'))
  writeFileSync(join(folder, 'stacked.csv'), readFileSync('tests/regressions/lost-peak.csv'))
  writeFileSync(join(folder, 'stacked.yaml'), readFileSync('catalogs-demo/captures/stacked.yaml'))
  const failure = await runReduce(join(folder, 'stacked.yaml'), { json: true }, recordingSession()).catch(
    (error) => error,
  )
  expect(
    messageOf(() => {
      throw failure
    }),
  ).toContain('no fall from forward to reverse current can be fitted')
  rmSync(folder, { recursive: true })
})
