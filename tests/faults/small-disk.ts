import { spawnSync } from 'node:child_process'
import { onTestFinished, type TestContext } from 'vitest'
import { scratchFolder } from '../commands/scratch.ts'

/** A disk of some kilobytes in a folder; where nobody may mount one the test is skipped and says so. */
export function smallDisk(context: TestContext, kilobytes: number): string {
  const folder = scratchFolder()
  const mount = spawnSync('mount', ['-t', 'tmpfs', '-o', `size=${kilobytes}k`, 'tmpfs', folder])
  if (mount.status !== 0) context.skip('no right to mount a small disk here: run as root to test a full disk')
  onTestFinished(() => void spawnSync('umount', [folder]))
  return folder
}

/** From here on nothing can be written to it. */
export function makeReadOnly(folder: string): void {
  const { status } = spawnSync('mount', ['-o', 'remount,ro', folder])
  if (status !== 0) throw new Error('the disk could not be made read-only')
}
