import { readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { ebbwatt } from '../end-to-end/run-command.ts'
import { smallStage } from '../end-to-end/small-stage.ts'
import { benchFolder, ended, pause, readRecord, start } from './bench-folder.ts'

/** How long the work takes here undisturbed, so that kills fall before, into and after its writing. */
async function duration(args: readonly string[], cwd: string): Promise<number> {
  const begin = performance.now()
  await ended(start(args, cwd))
  return performance.now() - begin
}

const shares = [0.6, 0.85, 0.93, 0.99]
/** Many processes one after the other, on a machine that may be busy. */
const patience = 120_000

describe('a process killed at any moment', () => {
  it(
    'leaves the record whole: as it was, or with its row',
    async () => {
      const { folder } = benchFolder(1)
      const before = readRecord(folder)
      const args = ['reduce', 'capture-1.yaml', '--into', 'records.yaml', '--quiet']
      const whole = await duration(args, folder)
      const after = readRecord(folder)
      expect(after).not.toBe(before)
      for (const share of shares) {
        writeFileSync(join(folder, 'records.yaml'), before)
        const child = start(args, folder)
        // Listened to from the start: a process that ends before the kill tells nobody a second time.
        const end = ended(child)
        await pause(share * whole)
        child.kill('SIGKILL')
        await end
        expect([before, after]).toContain(readRecord(folder))
        rmSync(join(folder, 'records.yaml.lock'), { force: true })
      }
      writeFileSync(join(folder, 'records.yaml'), before)
      expect(ebbwatt(args, { cwd: folder }).code).toBe(0)
      expect(readRecord(folder)).toBe(after)
    },
    patience,
  )

  it.each([
    ['review', 'out.html'],
    ['review', 'out.md'],
  ])(
    'leaves what stood there or all of the new: %s -o %s',
    async (command, target) => {
      const cwd = smallStage()
      const args = [command, 'stage.yaml', '-o', target]
      const whole = await duration(args, cwd)
      const after = readFileSync(join(cwd, target), 'utf8')
      for (const share of shares) {
        writeFileSync(join(cwd, target), 'before')
        const child = start(args, cwd)
        const end = ended(child)
        await pause(share * whole)
        child.kill('SIGKILL')
        await end
        expect(['before', after]).toContain(readFileSync(join(cwd, target), 'utf8'))
      }
    },
    patience,
  )

  it(
    'ends with 130 on Ctrl-C and leaves nothing behind, while it reduces as well',
    async () => {
      const { folder } = benchFolder(1)
      const names = readdirSync(folder)
      const before = readRecord(folder)
      const args = ['reduce', 'capture-1.yaml', '--into', 'records.yaml']
      const whole = await duration(args, folder)
      const after = readRecord(folder)
      for (const share of [0.6, 0.9]) {
        writeFileSync(join(folder, 'records.yaml'), before)
        const child = start(args, folder)
        const end = ended(child)
        await pause(share * whole)
        child.kill('SIGINT')
        const { code, err } = await end
        // Too early, there is no program yet that could say 130; too late, it is done.
        expect([130, 0, null]).toContain(code)
        expect(err).not.toMatch(/^\s+at /m)
        // Between the writing and the end there is a moment in which the row stands already.
        expect(code === 0 ? [after] : [before, after]).toContain(readRecord(folder))
        expect(readdirSync(folder)).toEqual(names)
      }
    },
    patience,
  )
})
