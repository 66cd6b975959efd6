import { existsSync } from 'node:fs'
import { type BuildOptions, build } from 'esbuild'
import { packagesOf } from './licences.ts'

const shared: BuildOptions = {
  bundle: true,
  metafile: true,
  minifyWhitespace: true,
  minifySyntax: true,
  legalComments: 'none',
  logLevel: 'warning',
}

/**
 * Node programs share their pieces: what a command imports dynamically becomes a file of its own that `--help` never reads.
 * The banner gives bundled CommonJS packages the `require` that ESM lacks.
 */
const node: BuildOptions = {
  ...shared,
  format: 'esm',
  platform: 'node',
  target: 'node20',
  splitting: true,
  outdir: 'dist',
  chunkNames: 'piece-[hash]',
  banner: { js: "import{createRequire as requireMaker}from'node:module';const require=requireMaker(import.meta.url);" },
}

/** The review document carries this text inside itself. */
const browser: BuildOptions = {
  ...shared,
  format: 'iife',
  platform: 'browser',
  target: 'es2022',
  minify: true,
  entryPoints: ['src/browser.ts'],
  outfile: 'dist/browser.js',
}

/** Builds the command, the library, the worker and the browser engine; returns the packages they contain. */
export async function buildBundles(): Promise<readonly string[]> {
  const programs = ['src/cli.ts', 'src/index.ts', 'src/worker.ts'].filter((file) => existsSync(file))
  const options = [{ ...node, entryPoints: programs }, ...(existsSync('src/browser.ts') ? [browser] : [])]
  const results = await Promise.all(options.map((option) => build(option)))
  return results.flatMap(({ metafile }) => (metafile ? packagesOf(metafile) : []))
}
