import { readdirSync, readFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { build, transformSync } from 'esbuild'
import { describe, expect, it } from 'vitest'

/** File to what it imports: paths of ours from src/, package names, or "node:...". */
type ImportGraph = ReadonlyMap<string, readonly string[]>

/** What each folder (or file right under src/) may import beside itself; `node:` stands for all of Node's own modules. */
const allowed: Readonly<Record<string, readonly string[]>> = {
  units: [],
  numerics: ['pure-rand'],
  domain: ['units'],
  problems: ['units', 'domain'],
  models: ['numerics', 'domain'],
  evidence: ['numerics', 'domain', 'models'],
  stage: ['units', 'numerics', 'domain', 'models', 'evidence'],
  capture: ['numerics', 'domain', 'models'],
  decision: ['numerics', 'domain'],
  study: ['units', 'domain', 'numerics', 'models', 'evidence', 'stage', 'capture', 'decision'],
  report: ['units', 'domain', 'd3-scale', 'd3-shape', 'cli-table3'],
  input: ['units', 'domain', 'problems', 'yaml', '#validators', 'mathjs', 'papaparse'],
  commands: ['input', 'problems', 'domain', 'units', 'study', 'report', 'node:'],
  build: ['load-program.ts', 'esbuild', 'ajv', 'json-schema-to-typescript', 'node:'],
  'browser.ts': ['study', 'report', 'domain', 'units'],
  'worker.ts': ['study', 'domain', 'node:worker_threads'],
  'cli.ts': ['commands', 'load-program.ts', 'commander'],
  'load-program.ts': ['program.ts', 'node:'],
  'program.ts': ['commands'],
  'index.ts': ['input', 'study', 'report', 'domain'],
}

/** Folders that never touch the outside world. */
const pure = Object.keys(allowed).filter(
  (name) => !['commands', 'build', 'browser.ts', 'worker.ts', 'cli.ts', 'program.ts', 'load-program.ts'].includes(name),
)

/** Which packages may be used in one corner only. */
const corners: Readonly<Record<string, string>> = {
  mathjs: 'src/input/units/',
  'd3-scale': 'src/report/charts/',
  'd3-shape': 'src/report/charts/',
}

function homeOf(file: string): string {
  return file.split('/')[1]!
}

function wrongDirections(graph: ImportGraph): readonly string[] {
  return edgesOf(graph).flatMap(([file, target]) => {
    const home = homeOf(file)
    const to = target.startsWith('src/') ? homeOf(target) : target
    const rules = allowed[home] ?? []
    const permitted = to === home || rules.includes(to) || (to.startsWith('node:') && rules.includes('node:'))
    return permitted ? [] : [`${file} must not import ${target}`]
  })
}

function outsideTheirCorner(graph: ImportGraph): readonly string[] {
  return edgesOf(graph).flatMap(([file, target]) => {
    const corner = corners[target]
    return corner === undefined || file.startsWith(corner)
      ? []
      : [`${file} must not import ${target}, only ${corner} may`]
  })
}

/** Everything that ends up in a program when one of the folders does. */
function reachedFrom(graph: ImportGraph, folders: readonly string[]): ReadonlySet<string> {
  const reached = new Set([...graph.keys()].filter((file) => folders.includes(homeOf(file))))
  for (const file of reached) for (const target of graph.get(file) ?? []) reached.add(target)
  return reached
}

function edgesOf(graph: ImportGraph): readonly (readonly [string, string])[] {
  return [...graph].flatMap(([file, targets]) => targets.map((target) => [file, target] as const))
}

const sources = readdirSync('src', { recursive: true, encoding: 'utf8' })
  .filter((file) => file.endsWith('.ts'))
  .map((file) => join('src', file))
  .sort()

/** esbuild knows what is imported for its values; imports of types, which it drops, are read from the text. */
async function readGraph(): Promise<ImportGraph> {
  const { metafile } = await build({
    entryPoints: sources,
    outdir: 'never-written',
    bundle: true,
    write: false,
    metafile: true,
    packages: 'external',
    platform: 'node',
    format: 'esm',
    logLevel: 'silent',
  })
  return new Map(
    sources.map((file) => {
      const values = metafile.inputs[file]?.imports.map(({ path }) => path) ?? []
      return [file, [...new Set([...values, ...typeImports(file)].map(packageName))]]
    }),
  )
}

function typeImports(file: string): readonly string[] {
  const text = readFileSync(file, 'utf8')
  return [...text.matchAll(/^(?:import|export)\b[^'"]*?\bfrom '([^']+)'/gm)].map(([, path]) =>
    path!.startsWith('.') ? join(dirname(file), path!) : path!,
  )
}

function packageName(path: string): string {
  if (path.startsWith('dist/generated/')) return '#validators'
  if (path.startsWith('src/') || path.startsWith('node:') || path.startsWith('#')) return path
  return /^(?:@[^/]+\/)?[^/]+/.exec(path)![0]
}

/** The program without comments, so that a word in a comment is no finding. */
function codeOf(file: string): string {
  return transformSync(readFileSync(file, 'utf8'), { loader: 'ts', legalComments: 'none' }).code
}

const worldly =
  /\bprocess\s*[.[]|\bconsole\s*[.[]|\bMath\.random\b|\bnew Date\b|\bDate\.now\b|\bperformance\.now\b|\bsetTimeout\(|\bfetch\(|\bglobalThis\b/

describe('the direction of imports', async () => {
  const graph = await readGraph()

  it('follows the table, values and types alike', () => {
    expect(wrongDirections(graph)).toEqual([])
  })

  it('keeps the packages of the edge in their corner', () => {
    expect(outsideTheirCorner(graph)).toEqual([])
  })

  it('leaves studies and reports free of what a browser does not have', () => {
    const reached = [...reachedFrom(graph, ['study', 'report'])]
    expect(reached.filter((path) => /^(node:|yaml$|ajv$|mathjs$|commander$|papaparse$|#)/.test(path))).toEqual([])
  })

  it('knows every folder', () => {
    expect([...new Set(sources.map(homeOf))].filter((home) => allowed[home] === undefined)).toEqual([])
  })
})

describe('these checks themselves', () => {
  const bad: ImportGraph = new Map([
    ['src/models/ohmic.ts', ['src/stage/kernel.ts', 'node:fs']],
    ['src/study/rank.ts', ['src/stage/kernel.ts', 'src/models/ohmic.ts']],
    ['src/stage/kernel.ts', ['mathjs']],
    ['src/cli.ts', ['src/commands/rank.ts', 'commander']],
  ])

  it('find an import against the table', () => {
    expect(wrongDirections(bad)).toEqual([
      'src/models/ohmic.ts must not import src/stage/kernel.ts',
      'src/models/ohmic.ts must not import node:fs',
      'src/stage/kernel.ts must not import mathjs',
    ])
  })

  it('find a package outside its corner', () => {
    expect(outsideTheirCorner(bad)).toEqual(['src/stage/kernel.ts must not import mathjs, only src/input/units/ may'])
  })

  it('follow imports over several files', () => {
    expect([...reachedFrom(bad, ['study'])]).toContain('node:fs')
  })

  it('find a clock and a console, but not the words in a sentence', () => {
    expect(worldly.test('const now = new Date()')).toBe(true)
    expect(worldly.test('console.log(1)')).toBe(true)
    expect(worldly.test("'the process, at any date'")).toBe(false)
  })
})

describe('every source file', () => {
  it('is pure where it must be: no clock, chance, console or environment', () => {
    const offenders = sources.filter((file) => pure.includes(homeOf(file)) && worldly.test(codeOf(file)))
    expect(offenders).toEqual([])
  })

  it('stays within its length: 150 lines for a model, 250 for the rest', () => {
    const length = (file: string) => readFileSync(file, 'utf8').split('\n').length - 1
    const limit = (file: string) => (homeOf(file) === 'models' ? 150 : 250)
    expect(
      sources.filter((file) => length(file) > limit(file)).map((file) => `${file}: ${length(file)} lines`),
    ).toEqual([])
  })

  it('has a name that says something, and no default export', () => {
    expect(sources.filter((file) => /\/(utils?|helpers?|misc|common)\.ts$/.test(file))).toEqual([])
    expect(sources.filter((file) => /^export default/m.test(codeOf(file)))).toEqual([])
  })

  it('leaves ending the process to cli.ts', () => {
    expect(sources.filter((file) => /process\.exit\(/.test(codeOf(file)))).toEqual(['src/cli.ts'])
  })
})
