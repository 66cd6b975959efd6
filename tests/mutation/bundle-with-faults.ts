import { readFileSync } from 'node:fs'
import { relative, resolve } from 'node:path'
import { pathToFileURL } from 'node:url'
import { commonTokens } from '@stryker-mutator/api/plugin'
import { createInstrumenter } from '@stryker-mutator/instrumenter'
import { type BuildOptions, build, type Plugin } from 'esbuild'
import { createInjector } from 'typed-inject'
import { type Campaign, sourcesOf, testsOf } from './campaigns.ts'

interface Place {
  readonly line: number
  readonly column: number
}

/** A deliberate fault: what stands in a file between two places (counted from 0) gives way to something else. */
export interface Fault {
  readonly id: string
  readonly file: string
  readonly replacement: string
  readonly start: Place
  readonly end: Place
}

const shared = {
  bundle: true,
  packages: 'external',
  platform: 'node',
  target: 'node20',
  format: 'esm',
  logLevel: 'warning',
} as const satisfies BuildOptions

/** Writes the sources with all faults in them, each asleep, and their tests as one file; returns the faults. */
export async function bundleWithFaults(campaign: Campaign, outfile: string): Promise<readonly Fault[]> {
  const { texts, faults } = await withFaults(sourcesOf(campaign))
  const imports = testsOf(campaign).map((path) => `import './${path}'\n`)
  await build({
    ...shared,
    stdin: { contents: imports.join(''), resolveDir: '.', loader: 'ts' },
    outfile,
    // package.json says that our files do nothing when imported; tests do.
    ignoreAnnotations: true,
    plugins: [fromTexts(texts)],
  })
  return faults
}

/** Writes the program that tries faults. */
export async function bundleProgram(outfile: string): Promise<void> {
  await build({ ...shared, entryPoints: ['tests/mutation/try-faults.ts'], outfile })
}

async function withFaults(paths: readonly string[]) {
  const files = paths.map((name) => ({ name: resolve(name), mutate: true, content: readFileSync(name, 'utf8') }))
  const options = { ignorers: [], plugins: null, excludedMutations: [] }
  const { files: written, mutants } = await instrumenter().instrument(files, options)
  const faults = mutants.map(({ id, fileName, replacement, location: { start, end } }) => ({
    id,
    file: relative('.', fileName),
    replacement,
    start,
    end,
  }))
  return { texts: new Map(written.map(({ name, content }) => [name, content])), faults }
}

function instrumenter() {
  const silent = new Proxy({}, { get: (_, name) => () => String(name).startsWith('is') && false })
  const injector = createInjector()
    .provideValue(commonTokens.logger, silent as never)
    .provideValue(commonTokens.getLogger, (() => silent) as never)
  return injector.injectFunction(createInstrumenter)
}

/** Gives esbuild the sources with faults, the stand-in for vitest, and each file its own address. */
function fromTexts(texts: ReadonlyMap<string, string>): Plugin {
  const standIn = resolve('tests/mutation/collect-tests.ts')
  return {
    name: 'faults',
    setup({ onResolve, onLoad }) {
      onResolve({ filter: /^vitest$/ }, ({ importer }) => (importer === standIn ? undefined : { path: standIn }))
      onLoad({ filter: /\.ts$/ }, ({ path }) => {
        const text = texts.get(path) ?? readFileSync(path, 'utf8')
        return {
          contents: text.replaceAll('import.meta.url', JSON.stringify(pathToFileURL(path).href)),
          loader: 'ts',
        }
      })
    },
  }
}
