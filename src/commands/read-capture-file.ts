import { createHash } from 'node:crypto'
import { closeSync, constants, fstatSync, openSync, readSync } from 'node:fs'
import { TextDecoder } from 'node:util'
import type { CaptureSettings } from '../domain/capture.ts'
import { type CaptureTable, captureTable } from '../input/capture-table.ts'
import { CommandFailure, failure } from './failure.ts'
import { readingFailure } from './read-file.ts'
import { breathe, type Session } from './session.ts'

/** A capture as read, with the fingerprint of its file. */
export interface CaptureFile extends CaptureTable {
  readonly sha256: string
}

const pieceLength = 1 << 20

/** Reads an oscilloscope's file piece by piece, so that ten million samples fit into memory; progress on a terminal. */
export async function readCaptureFile(path: string, settings: CaptureSettings, session: Session): Promise<CaptureFile> {
  let handle: number
  try {
    // non-blocking, or opening a named pipe that nobody writes to would wait for ever
    handle = openSync(path, constants.O_RDONLY | constants.O_NONBLOCK)
  } catch (error) {
    throw readingFailure(path, error)
  }
  try {
    const status = fstatSync(handle)
    if (!status.isFile()) throw failure({ file: path, code: 'file-unreadable', found: 'it is no regular file' })
    if (status.size === 0) throw failure({ file: path, code: 'file-empty', expected: 'the samples of an oscilloscope' })
    return await readPieces(path, handle, status.size, settings, session)
  } catch (error) {
    throw readingFailure(path, error)
  } finally {
    session.progress('')
    closeSync(handle)
  }
}

async function readPieces(
  path: string,
  handle: number,
  size: number,
  settings: CaptureSettings,
  session: Session,
): Promise<CaptureFile> {
  const table = captureTable(settings, path)
  const hash = createHash('sha256')
  const piece = Buffer.alloc(pieceLength)
  let decoder: TextDecoder | null = null
  let done = 0
  for (let pieces = 0; ; pieces++) {
    const count = readSync(handle, piece, 0, pieceLength, null)
    if (count === 0) break
    const bytes = piece.subarray(0, count)
    decoder ??= new TextDecoder(encodingOf(bytes))
    hash.update(bytes)
    if (!table.failed()) table.push(decoder.decode(bytes, { stream: true }))
    done += count
    if (pieces % 8 === 7) {
      session.progress(`reading ${path}: ${Math.round((100 * done) / size)} %, ${table.samples()} samples`)
      await breathe()
    }
  }
  table.push(decoder?.decode() ?? '')
  const { value, problems } = table.end()
  if (value === null) throw new CommandFailure(problems)
  return { ...value, sha256: hash.digest('hex') }
}

/** Some oscilloscopes write UTF-16; what is not UTF-8 otherwise only spoils letters of the header, never a digit. */
function encodingOf(bytes: Buffer): string {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return 'utf-16le'
  return bytes[0] === 0xfe && bytes[1] === 0xff ? 'utf-16be' : 'utf-8'
}
