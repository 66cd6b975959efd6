import { readFileSync } from 'node:fs'
import { build } from 'esbuild'
import { expect, it } from 'vitest'

/** Files and packages that a run of `dist/cli.js` reads before it knows which command is wanted. */
async function loadedAtStart(): Promise<readonly string[]> {
  const { metafile } = await build({
    entryPoints: ['src/cli.ts'],
    outdir: 'never-written',
    bundle: true,
    splitting: true,
    write: false,
    metafile: true,
    platform: 'node',
    format: 'esm',
  })
  const reached = new Set(['never-written/cli.js'])
  for (const file of reached) {
    const { imports } = metafile.outputs[file]!
    for (const { path, kind } of imports) if (kind === 'import-statement' && path in metafile.outputs) reached.add(path)
  }
  return [...reached].flatMap((file) => Object.keys(metafile.outputs[file]!.inputs))
}

it('needs nothing heavy to answer --help: no units, YAML, schemas, tables or charts', async () => {
  const loaded = await loadedAtStart()
  expect(loaded.some((file) => file.includes('node_modules/commander/'))).toBe(true)
  expect(
    loaded.filter((file) => /node_modules\/(mathjs|yaml|ajv|cli-table3|d3-|papaparse|pure-rand)|generated/.test(file)),
  ).toEqual([])
})

it('ships in minified form', () => {
  const lines = readFileSync('dist/cli.js', 'utf8').split('\n').length
  expect(lines).toBeLessThan(200)
})
