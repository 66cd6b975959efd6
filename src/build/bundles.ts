import { type BuildOptions, build } from 'esbuild'
import { programFile } from '../load-program.ts'
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
 * The command line's first steps, the library and its threads share their pieces. The banner gives bundled CommonJS packages the `require` that ESM lacks.
 */
const node: BuildOptions = {
  ...shared,
  format: 'esm',
  platform: 'node',
  target: 'node20',
  splitting: true,
  entryPoints: ['src/cli.ts', 'src/index.ts', 'src/worker.ts'],
  outdir: 'dist',
  chunkNames: 'piece-[hash]',
  banner: { js: "import{createRequire as requireMaker}from'node:module';const require=requireMaker(import.meta.url);" },
}

/** One function expression: load-program.ts compiles it, or finds it compiled, and calls it. */
const program: BuildOptions = {
  ...shared,
  format: 'cjs',
  platform: 'node',
  target: 'node20',
  entryPoints: ['src/program.ts'],
  outfile: programFile,
  banner: { js: '(function(require){const module={exports:{}};' },
  footer: { js: 'return module.exports})' },
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
  const results = await Promise.all([node, program, browser].map((option) => build(option)))
  return results.flatMap(({ metafile }) => (metafile ? packagesOf(metafile) : []))
}
