import { isUtf8 } from 'node:buffer'
import { createHash } from 'node:crypto'
import { closeSync, constants, fstatSync, openSync, readdirSync, readFileSync } from 'node:fs'
import { basename, dirname } from 'node:path'
import { didYouMean } from '../problems/nearest.ts'
import { CommandFailure, failure } from './failure.ts'

const largestFile = 64 * 1024 * 1024

/** Reads a regular file of at most 64 MB. Never waits: pipes and devices are refused before a byte is read. */
function readBytes(path: string): Buffer {
  try {
    // Non-blocking, or opening a named pipe that nobody writes to would wait for ever.
    const handle = openSync(path, constants.O_RDONLY | constants.O_NONBLOCK)
    try {
      refuseUnsuitable(path, handle)
      return readFileSync(handle)
    } finally {
      closeSync(handle)
    }
  } catch (error) {
    throw readingFailure(path, error)
  }
}

function refuseUnsuitable(path: string, handle: number): void {
  const status = fstatSync(handle)
  if (status.isDirectory()) throw failure({ file: path, code: 'file-unreadable', found: 'it is a folder' })
  if (!status.isFile()) {
    throw failure({ file: path, code: 'file-unreadable', found: special, hint: 'only regular files are read' })
  }
  if (status.size > largestFile) {
    const megabytes = (status.size / 1024 / 1024).toFixed(0)
    throw failure({ file: path, code: 'file-too-large', found: `${megabytes} MB`, expected: '64 MB', hint: 'split it' })
  }
}

/** The text of a file; UTF-8 is required, a byte order mark is dropped. */
export function readText(path: string): { readonly text: string; readonly sha256: string } {
  const bytes = readBytes(path)
  if (!isUtf8(bytes)) {
    const [line, column] = placeOfBrokenByte(bytes)
    throw failure({
      file: path,
      line,
      column,
      code: 'file-not-text',
      found: 'the bytes from here on are in another encoding',
      hint: 'save it as UTF-8',
    })
  }
  const text = bytes.toString('utf8')
  return { text: text.startsWith('\uFEFF') ? text.slice(1) : text, sha256: sha256(bytes) }
}

/** Fingerprint of a file's bytes, in hexadecimal. */
function sha256(bytes: Buffer): string {
  return createHash('sha256').update(bytes).digest('hex')
}

function placeOfBrokenByte(bytes: Buffer): readonly [number, number] {
  // Decoding puts U+FFFD where bytes make no sense; a file may hold a real one only when it is valid there.
  const before = bytes.toString('utf8').split('\uFFFD', 1)[0] ?? ''
  const lines = before.split('\n')
  return [lines.length, (lines.at(-1) ?? '').length + 1]
}

const special = 'it is a pipe, socket or device'

const reasons: Readonly<Record<string, string>> = {
  EACCES: 'permission is missing',
  EPERM: 'permission is missing',
  ELOOP: 'its symbolic links lead in a circle',
  ENAMETOOLONG: 'its path is longer than the system allows',
  ENOTDIR: 'a part of its path is a file, not a folder',
  ENXIO: special,
  ERR_INVALID_ARG_VALUE: 'its path holds a NUL character',
}

/** Turns what the system says about a path into a problem; what is no system error passes as it is. */
export function readingFailure(path: string, error: unknown, hint = ''): unknown {
  if (error instanceof CommandFailure || !(error instanceof Error) || !('code' in error)) return error
  if (error.code === 'ENOENT') return missing(path, hint)
  return failure({ file: path, code: 'file-unreadable', found: reasons[String(error.code)] ?? error.message, hint })
}

function missing(path: string, hint: string): CommandFailure {
  const near = didYouMean(basename(path), neighbours(dirname(path)))
  const hints = [hint, near].filter((part) => part !== '').join('; ')
  return failure({ file: path, code: 'file-missing', expected: 'an existing file or folder', hint: hints })
}

/** What stands in the folder, as far as it can be told. */
function neighbours(folder: string): readonly string[] {
  try {
    return readdirSync(folder).slice(0, 1000)
  } catch {
    return []
  }
}
