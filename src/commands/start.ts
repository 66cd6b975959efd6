import { closeSync, existsSync, lstatSync, mkdirSync, openSync, rmSync, writeFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { renderJson } from '../report/render-json.ts'
import { CommandFailure, failure } from './failure.ts'
import { writingFailure } from './replace-file.ts'
import type { Session } from './session.ts'
import { starterRecords, starterStage } from './starter-texts.ts'

interface StartOptions {
  readonly json?: boolean
  readonly quiet?: boolean
}

/** `ebbwatt start [DIR]`: the smallest pair of files that ranks, with every further key explained. */
export async function runStart(folder: string, options: StartOptions, session: Session): Promise<number> {
  const stage = join(folder, 'stage.yaml')
  const record = join(folder, 'rectifiers', 'first-parts.yaml')
  refuseTaken([stage, record])
  writeNew(stage, starterStage)
  writeNew(record, starterRecords)
  if (options.json === true) session.print(renderJson({ written: [stage, record] }))
  else if (options.quiet !== true) session.print(`${stage}\n${record}\n\nNext: ebbwatt rank ${stage}\n`)
  return 0
}

/** Both files are looked at before either is written. */
function refuseTaken(paths: readonly string[]): void {
  const taken = paths.filter((path) => lstatSync(path, { throwIfNoEntry: false }) !== undefined)
  if (taken.length > 0) throw new CommandFailure(taken.flatMap((path) => overwriting(path).problems))
}

function writeNew(path: string, text: string): void {
  let handle: number
  try {
    makeFolder(dirname(path))
    handle = openSync(path, 'wx')
  } catch (error) {
    throw (error as NodeJS.ErrnoException).code === 'EEXIST' ? overwriting(path) : writingFailure(path, error)
  }
  try {
    writeFileSync(handle, text)
  } catch (error) {
    rmSync(path, { force: true })
    throw writingFailure(path, error)
  } finally {
    closeSync(handle)
  }
}

/** Folder by folder: node's own way down says ENOENT of a read-only disk, and never ends in /proc. */
function makeFolder(path: string): void {
  if (existsSync(path)) return
  makeFolder(dirname(path))
  mkdirSync(path)
}

function overwriting(path: string): CommandFailure {
  return failure({ code: 'file-exists', file: path, hint: 'name another folder: ebbwatt start FOLDER' })
}
