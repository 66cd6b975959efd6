import {
  closeSync,
  fsyncSync,
  lstatSync,
  openSync,
  renameSync,
  rmSync,
  type Stats,
  statSync,
  writeFileSync,
} from 'node:fs'
import { dirname, join } from 'node:path'
import { failure } from './failure.ts'

/**
 * Refuses a target that must not be replaced: a link, a folder, a device, a file this run has read.
 * Called before the work, so that nobody waits for a result that cannot be kept, and again before writing.
 */
export function checkTarget(path: string, inputs: readonly string[]): void {
  const folder = dirname(path)
  if (statusOf(folder, statSync)?.isDirectory() !== true) {
    throw unwritable(path, `the folder ${folder} does not exist`, 'create it first')
  }
  const status = statusOf(path, lstatSync)
  if (status === null) return
  if (status.isSymbolicLink()) throw unwritable(path, 'it is a symbolic link', 'name the file it leads to')
  if (status.isDirectory()) throw unwritable(path, 'it is a folder', 'name a file in it')
  if (!status.isFile()) throw unwritable(path, 'it is a pipe, socket or device', 'leave -o out and let the shell write')
  if (inputs.some((input) => sameFile(statusOf(input, statSync), status))) {
    throw failure({ file: path, code: 'file-is-input', hint: 'name another file' })
  }
}

/**
 * Puts a text in place of a file in one step: whoever looks sees the old file or the new one, never half of it,
 * whatever ends this process in between.
 */
export function replaceFile(path: string, text: string, inputs: readonly string[]): void {
  checkTarget(path, inputs)
  const mode = statusOf(path, statSync)?.mode ?? 0o666
  // Same folder, because a rename is one step only within a file system.
  const temporary = join(dirname(path), `.ebbwatt-${process.pid}.tmp`)
  try {
    // What lies there is left over from a process that was killed, or a link that must not be followed.
    rmSync(temporary, { force: true })
    writeDurably(temporary, text, mode)
    renameSync(temporary, path)
    syncFolder(dirname(path))
  } catch (error) {
    rmSync(temporary, { force: true })
    throw writingFailure(path, error)
  }
}

function writeDurably(path: string, text: string, mode: number): void {
  const handle = openSync(path, 'wx', mode)
  try {
    writeFileSync(handle, text)
    fsyncSync(handle)
  } finally {
    closeSync(handle)
  }
}

/** The new name itself must reach the disk, too; a file system that cannot sync a folder keeps its own order. */
function syncFolder(folder: string): void {
  const handle = openSync(folder, 'r')
  try {
    fsyncSync(handle)
  } catch {
    // Not every file system offers it.
  } finally {
    closeSync(handle)
  }
}

function statusOf(path: string, read: (path: string) => Stats): Stats | null {
  try {
    return read(path)
  } catch {
    return null
  }
}

function sameFile(one: Stats | null, other: Stats): boolean {
  return one !== null && one.dev === other.dev && one.ino === other.ino
}

function unwritable(path: string, found: string, hint: string) {
  return failure({ file: path, code: 'file-unwritable', found, hint })
}

const reasons: Readonly<Record<string, string>> = {
  ENOSPC: 'no space is left on the disk',
  EDQUOT: 'the disk quota is used up',
  EACCES: 'writing in this folder is not permitted',
  EPERM: 'writing in this folder is not permitted',
  EROFS: 'the file system is read-only',
}

/** Turns what the system says about writing into a problem; what is no system error passes as it is. */
export function writingFailure(path: string, error: unknown): unknown {
  if (!(error instanceof Error) || !('code' in error)) return error
  const found = reasons[String(error.code)] ?? error.message
  return unwritable(path, found, '')
}
