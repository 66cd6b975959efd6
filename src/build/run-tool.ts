/** Runs a TypeScript program of tests/ (validate, bench, fuzz) from the sources: `run-tool FILE [ARGUMENTS]`. */
import { spawnSync } from 'node:child_process'
import { existsSync } from 'node:fs'
import { basename } from 'node:path'
import { build } from 'esbuild'

const [file, ...rest] = process.argv.slice(2)
if (file === undefined || !existsSync(file)) throw new Error(`no such program: ${file}`)
const outfile = `dist/build/tools/${basename(file, '.ts')}.js`
await build({
  entryPoints: [file],
  outfile,
  bundle: true,
  packages: 'external',
  platform: 'node',
  target: 'node20',
  format: 'esm',
  sourcemap: 'inline',
  logLevel: 'warning',
})
const { status } = spawnSync(process.execPath, ['--enable-source-maps', outfile, ...rest], { stdio: 'inherit' })
process.exitCode = status ?? 1
