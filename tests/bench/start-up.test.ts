import { readFileSync } from 'node:fs'
import { pathToFileURL } from 'node:url'
import { build } from 'esbuild'
import { expect, it } from 'vitest'
import { compiledFile, loadProgram, programScript, runProgram } from '../../src/load-program.ts'

/** Files and packages that a run of `dist/cli.cjs` reads before it knows which command is wanted. */
async function loadedAtStart(): Promise<readonly string[]> {
  const { metafile } = await build({
    entryPoints: ['src/cli.ts'],
    bundle: true,
    write: false,
    metafile: true,
    platform: 'node',
    format: 'esm',
  })
  return Object.keys(metafile.inputs)
}

it('needs nothing but the parser of arguments to answer --help', async () => {
  const loaded = await loadedAtStart()
  expect(loaded.some((file) => file.includes('node_modules/commander/'))).toBe(true)
  expect(loaded.filter((file) => /node_modules\/(?!commander\/)|generated/.test(file))).toEqual([])
})

it('finds the program compiled, and runs the same without', () => {
  const root = pathToFileURL(`${process.cwd()}/`)
  const compiled = readFileSync(new URL(compiledFile, root))
  expect(programScript(root, compiled).cachedDataRejected).toBe(false)
  const broken = programScript(root, compiled.subarray(0, compiled.length / 2))
  expect(broken.cachedDataRejected).toBe(true)
  expect(Object.keys(runProgram(root, broken))).toEqual(Object.keys(loadProgram(root)))
})

it('ships in minified form', () => {
  const lines = readFileSync('dist/cli.cjs', 'utf8').split('\n').length
  expect(lines).toBeLessThan(200)
})
