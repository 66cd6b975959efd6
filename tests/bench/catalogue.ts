/**
 * What whole catalogues and whole years cost on this machine, from the built command and piece by piece.
 * npm run bench:catalogue [-- --json]
 */
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { pathToFileURL } from 'node:url'
import { parse } from 'yaml'
import { doSteps } from '../../src/commands/do-steps.ts'
import type { Stage } from '../../src/domain/stage.ts'
import { readProfile } from '../../src/input/read-profile.ts'
import { readRecords } from '../../src/input/read-records.ts'
import { assessCandidate } from '../../src/study/assess-candidate.ts'
import { prepareCandidate } from '../../src/study/candidate.ts'
import { judge } from '../../src/study/judge-candidate.ts'
import { rankSteps } from '../../src/study/rank.ts'
import { screenPart } from '../../src/study/screen-part.ts'
import { inventedCatalogue } from '../catalogue/invented-catalogue.ts'
import { inventedProfile } from '../catalogue/invented-profile.ts'
import { inventedParts, openStage } from '../catalogue/parts.ts'
import { recordingSession } from '../commands/session-double.ts'
import { runMeasured } from './run-measured.ts'

const catalogueRows = 50_000
const yamlRecords = 5000
const quarterHours = 35_040
const profileParts = 20

const folder = mkdtempSync(join(tmpdir(), 'ebbwatt-bench-'))
const session = { ...recordingSession(), root: pathToFileURL(`${process.cwd()}/`) }
const settings = { seed: 1, draws: 1000, version: 'bench', inputs: [] }
const swings = {
  'pump-boost': { ambient: [12, 42], input: [44, 52] },
  'cold-store-mains': { ambient: [12, 42], input: [215, 240] },
} as const
type StageName = keyof typeof swings

const catalogue = measureCatalogue()
const figures = {
  node: process.version,
  catalogue_rows: catalogueRows,
  catalogue_seconds: catalogue.seconds,
  catalogue_processor_seconds: catalogue.processorSeconds,
  catalogue_megabytes: catalogue.megabytes,
  yaml_records: yamlRecords,
  yaml_to_parsing: measureYaml(),
  draws_of_50_mains_parts_seconds: await measureThreads(drawingMains()),
  year_of_20_dc_parts_seconds: await measureThreads(followingYear('pump-boost')),
  year_of_20_mains_parts_seconds: await measureThreads(followingYear('cold-store-mains')),
  microseconds_per_part: measurePieces(),
}
rmSync(folder, { recursive: true })
process.stdout.write(process.argv.includes('--json') ? `${JSON.stringify(figures, null, 2)}\n` : table())

function measureCatalogue() {
  const parts = join(folder, 'parts.csv')
  writeFileSync(parts, inventedCatalogue(catalogueRows, 7))
  const mapping = 'catalogs-demo/catalogue/mapping.yaml'
  return runMeasured([
    'rank',
    'catalogs-demo/catalogue/pump.yaml',
    '--records',
    parts,
    '--mapping',
    mapping,
    '--json',
    '--quiet',
  ])
}

function measureYaml(): number {
  const records = ['alder-200v-16a', 'birch-200v-20a-soft', 'elm-150v-20a', 'hazel-200v-16a'].map((name) =>
    readFileSync(`catalogs-demo/rectifiers/${name}.yaml`, 'utf8').replace(/^ *#.*\n/gm, ''),
  )
  const item = (index: number): string => records[index % records.length]!.replace(/^id:.*/m, `id: part-${index}`)
  const indented = (text: string): string => `- ${text.trimEnd().replaceAll('\n', '\n  ')}`
  const text = Array.from({ length: yamlRecords }, (_, index) => indented(item(index))).join('\n')
  const seconds = (work: () => unknown): number => timed(work).seconds
  const ratios = [0, 1, 2].map(() => {
    const plain = seconds(() => parse(text))
    return seconds(() => readRecords(text, 'all.yaml')) / plain
  })
  return ratios.toSorted((a, b) => a - b)[1]!
}

/** By the clock, and of processors: where other programs keep the machine busy only the second tells what threads cost. */
async function measureThreads(work: (threads: number) => Promise<unknown>) {
  const seconds: number[] = []
  const processor: number[] = []
  for (const threads of [1, 2]) {
    const [begun, before] = [performance.now(), process.cpuUsage()]
    await work(threads)
    const { user, system } = process.cpuUsage(before)
    seconds.push((performance.now() - begun) / 1000)
    processor.push((user + system) / 1e6)
  }
  return {
    one_thread: seconds[0]!,
    two_threads: seconds[1]!,
    processor_one: processor[0]!,
    processor_two: processor[1]!,
  }
}

function drawingMains() {
  const stage = openStage('cold-store-mains')
  const parts = accepted(stage, 50)
  return (threads: number) => doSteps(rankSteps(stage, parts, settings), session, threads)
}

function followingYear(name: StageName) {
  const stage = openStage(name)
  const parts = accepted(stage, profileParts)
  const dutyProfile = readProfile(inventedProfile(quarterHours, 0.25, 4, swings[name]), 'year.csv', stage).value
  const loaded = { ...stage, dutyProfile }
  return (threads: number) => doSteps(rankSteps(loaded, parts, { ...settings, draws: 0 }), session, threads)
}

function accepted(stage: Stage, count: number) {
  const good = inventedParts(600, 2).filter((part) => judge(prepareCandidate(stage, part, [])).reasons.length === 0)
  if (good.length < count) throw new Error(`only ${good.length} parts suit the stage`)
  return good.slice(0, count)
}

/** Processor time of `work`: what else the machine does hardly enters it. */
function timed<T>(work: () => T): { readonly seconds: number; readonly value: T } {
  const before = process.cpuUsage()
  const value = work()
  const { user, system } = process.cpuUsage(before)
  return { seconds: (user + system) / 1e6, value }
}

/** Costs per part of a dc ranking, for sums over more parts than anyone has here. [µs] */
function measurePieces() {
  const stage = openStage('pump-boost')
  const count = 4000
  const reading = timed(() => inventedParts(count, 9))
  const parts = reading.value
  const each = (work: (part: (typeof parts)[number]) => unknown): number =>
    (timed(() => parts.map(work)).seconds / parts.length) * 1e6
  return {
    reading: (reading.seconds / count) * 1e6,
    first_look: each((part) => screenPart(stage, part, [])),
    judging: each((part) => judge(prepareCandidate(stage, part, []))),
    describing: each((part) => assessCandidate(prepareCandidate(stage, part, []))),
    sending_to_a_thread: each((part) => structuredClone(part)),
  }
}

function table(): string {
  const seconds = (value: number): string => `${value.toFixed(2)} s`
  const both = (figure: Awaited<ReturnType<typeof measureThreads>>): string =>
    `${seconds(figure.one_thread)} with one thread (${seconds(figure.processor_one)} of processors), ` +
    `${seconds(figure.two_threads)} with two (${seconds(figure.processor_two)})`
  const rows: readonly (readonly [string, string])[] = [
    [
      `${catalogueRows} parts of a table, best 50 with doubt`,
      `${seconds(figures.catalogue_seconds)} (${seconds(figures.catalogue_processor_seconds)} of processors), ` +
        `${figures.catalogue_megabytes.toFixed(0)} MB`,
    ],
    [`${yamlRecords} YAML records`, `${figures.yaml_to_parsing.toFixed(2)} times parsing them`],
    ['50 mains parts, 1000 draws each', both(figures.draws_of_50_mains_parts_seconds)],
    [`a year of quarter-hours, ${profileParts} dc parts`, both(figures.year_of_20_dc_parts_seconds)],
    [`a year of quarter-hours, ${profileParts} mains parts`, both(figures.year_of_20_mains_parts_seconds)],
    ...Object.entries(figures.microseconds_per_part).map(
      ([name, value]) => [`a part: ${name.replaceAll('_', ' ')}`, `${value.toFixed(0)} µs`] as const,
    ),
  ]
  const width = Math.max(...rows.map(([name]) => name.length))
  return `${rows.map(([name, value]) => `${name.padEnd(width)}  ${value}`).join('\n')}\n`
}
