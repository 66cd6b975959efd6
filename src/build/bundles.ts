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

const node: BuildOptions = { ...shared, platform: 'node', target: 'node20' }

/**
 * The library and its threads share their pieces. The banner gives bundled CommonJS packages the `require` that ESM lacks.
 */
const library: BuildOptions = {
  ...node,
  format: 'esm',
  splitting: true,
  entryPoints: ['src/index.ts', 'src/worker.ts'],
  outdir: 'dist',
  chunkNames: 'piece-[hash]',
  banner: { js: "import{createRequire as requireMaker}from'node:module';const require=requireMaker(import.meta.url);" },
}

/** CommonJS, because Node has nothing to load for it: a quarter of its own start. */
const commandLine: BuildOptions = {
  ...node,
  format: 'cjs',
  entryPoints: ['src/cli.ts'],
  outfile: 'dist/cli.cjs',
  define: { 'import.meta.url': 'urlOfThisFile' },
  banner: { js: "const urlOfThisFile=require('node:url').pathToFileURL(__filename).href;" },
}

/** One function expression: load-program.ts compiles it, or finds it compiled, and calls it. */
const program: BuildOptions = {
  ...node,
  format: 'cjs',
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
  const results = await Promise.all([library, commandLine, program, browser].map((option) => build(option)))
  return results.flatMap(({ metafile }) => (metafile ? packagesOf(metafile) : []))
}
