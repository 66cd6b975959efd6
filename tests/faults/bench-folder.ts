import { type ChildProcess, spawn } from 'node:child_process'
import { copyFileSync, readFileSync, writeFileSync } from 'node:fs'
import { join, resolve } from 'node:path'
import { scratchFolder } from '../commands/scratch.ts'

/** A folder with the bench's record and some captures of one unit, each different in its header and so in its fingerprint. */
export function benchFolder(captures: number): { readonly folder: string; readonly names: readonly string[] } {
  const folder = scratchFolder()
  copyFileSync('catalogs-demo/bench/records.yaml', join(folder, 'records.yaml'))
  const settings = readFileSync('catalogs-demo/captures/clean.yaml', 'utf8')
  const samples = readFileSync('catalogs-demo/captures/clean.csv', 'utf8')
  const names = Array.from({ length: captures }, (_, index) => `capture-${index + 1}`)
  for (const [index, name] of names.entries()) {
    writeFileSync(join(folder, `${name}.csv`), samples.replace('record 1', `record ${index + 1}`))
    writeFileSync(join(folder, `${name}.yaml`), settings.replace('clean.csv', `${name}.csv`))
  }
  return { folder, names }
}

export function readRecord(folder: string): string {
  return readFileSync(join(folder, 'records.yaml'), 'utf8')
}

const program = resolve('dist/cli.cjs')

/** Starts the built command without waiting for it. */
export function start(args: readonly string[], cwd: string): ChildProcess {
  return spawn(process.execPath, [program, ...args], { cwd })
}

export interface Ended {
  readonly code: number | null
  readonly err: string
}

export function ended(child: ChildProcess): Promise<Ended> {
  let err = ''
  child.stderr?.on('data', (piece) => {
    err += piece
  })
  return new Promise((done) => child.on('close', (code) => done({ code, err })))
}

export function pause(milliseconds: number): Promise<void> {
  return new Promise((done) => setTimeout(done, milliseconds))
}
