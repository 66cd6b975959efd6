import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { pathToFileURL } from 'node:url'
import { compiledFile, programScript, runProgram } from '../load-program.ts'

/**
 * Keeps what V8 compiles when the program ranks and reviews a demonstration stage, so that the next process need not.
 * V8 compiles a function when it is first called: the work is done for that, and its results are thrown away.
 */
export async function precompile(): Promise<void> {
  const root = pathToFileURL(`${process.cwd()}/`)
  const script = programScript(root)
  const program = runProgram(root, script)
  const session = { root, version: '0', print() {}, tell() {}, progress() {}, width: 120, colour: true }
  const folder = mkdtempSync(join(tmpdir(), 'ebbwatt-build-'))
  const options = { seed: 1, draws: 20 }
  for (const stage of ['catalogs-demo/stages/pump-boost.yaml', 'catalogs-demo/stages/cold-store-mains.yaml']) {
    await program.runRank(stage, options, session)
    await program.runReview(stage, { ...options, output: join(folder, 'review.html') }, session)
  }
  rmSync(folder, { recursive: true })
  writeFileSync(compiledFile, script.createCachedData())
}
