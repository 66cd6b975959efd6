import { mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { dirname, join } from 'node:path'
import { pathToFileURL } from 'node:url'
import { runCheck } from '../../src/commands/check.ts'
import { outcomeOf } from '../../src/commands/outcome.ts'
import { runRank } from '../../src/commands/rank.ts'
import { runReduce } from '../../src/commands/reduce.ts'
import { runReview } from '../../src/commands/review.ts'
import type { Session } from '../../src/commands/session.ts'
import { runSwap } from '../../src/commands/swap.ts'
import { runTrend } from '../../src/commands/trend.ts'
import type { FuzzCase, FuzzOutcome } from './fuzz-case.ts'
import { wordsOf } from './fuzz-case.ts'

/** Where a case lays out its files. */
export interface RunPlace {
  readonly folder: string
}

/** A folder for one case, in memory where the system offers that. */
export function makePlace(): RunPlace {
  return { folder: mkdtempSync(join(process.env.EBBWATT_FUZZ_FOLDER ?? tmpdir(), 'ebbwatt-fuzz-')) }
}

export function removePlace({ folder }: RunPlace): void {
  rmSync(folder, { recursive: true, force: true })
}

export function layOut({ files }: FuzzCase, { folder }: RunPlace): void {
  for (const [name, content] of Object.entries(files)) {
    mkdirSync(dirname(join(folder, name)), { recursive: true })
    writeFileSync(join(folder, name), content)
  }
}

/** Files at the top of the folder that the case did not bring. */
export function writtenFiles({ files }: FuzzCase, { folder }: RunPlace): Readonly<Record<string, string>> {
  const own = new Set(Object.keys(files).map((name) => name.split('/')[0]!))
  const names = readdirSync(folder).filter((name) => !own.has(name))
  return Object.fromEntries(names.map((name) => [name, readFileSync(join(folder, name), 'utf8')]))
}

/** Runs a command in this process: the same functions as the built command, without the start of a process. */
export async function runInside(fuzzCase: FuzzCase, place: RunPlace): Promise<FuzzOutcome> {
  layOut(fuzzCase, place)
  const streams = { out: '', err: '' }
  const session: Session = {
    root: pathToFileURL(`${process.cwd()}/`),
    version: '0.0.0',
    print: (text) => {
      streams.out += text
    },
    tell: (text) => {
      streams.err += text
    },
    width: 120,
    colour: false,
    progress: () => {},
  }
  const before = process.cpuUsage()
  const { code, notFinite } = await watchingNumbers(() =>
    outcomeOf(session, wordsOf(fuzzCase), () => dispatch(fuzzCase, place, session)),
  )
  return {
    code,
    ...streams,
    seconds: processorSeconds(process.cpuUsage(before)),
    memory: null,
    written: writtenFiles(fuzzCase, place),
    notFinite,
  }
}

/** What a case took of the processors: what else they do says nothing of the case. [s] */
export function processorSeconds({ user, system }: NodeJS.CpuUsage): number {
  return (user + system) / 1e6
}

type Options = Parameters<typeof runRank>[1] & Parameters<typeof runTrend>[1] & Parameters<typeof runSwap>[1]

async function dispatch({ command, operands, options }: FuzzCase, { folder }: RunPlace, session: Session) {
  const inFolder = (name: string) => join(folder, name)
  const paths = operands.map(inFolder)
  const fileOptions = ['mapping', 'into', 'output'].filter((key) => typeof options[key] === 'string')
  const moved = Object.fromEntries(fileOptions.map((key) => [key, inFolder(String(options[key]))]))
  const all = { ...options, ...moved } as unknown as Options
  const [path = ''] = paths
  switch (command) {
    case 'rank':
      return runRank(path, all, session)
    case 'trend':
      return runTrend(path, all, session)
    case 'swap':
      return runSwap(path, all, session)
    case 'reduce':
      return runReduce(path, all, session)
    case 'check':
      return runCheck(paths, all, session)
    case 'review':
      return runReview(path, all, session)
  }
}

/** JSON turns NaN and infinities into null without a word; here they are caught on their way. */
async function watchingNumbers(work: () => Promise<number>): Promise<{ code: number; notFinite: readonly string[] }> {
  const notFinite: string[] = []
  const { stringify } = JSON
  JSON.stringify = (value: unknown, replacer?: unknown, space?: string | number) => {
    collectNotFinite(value, '', notFinite)
    return stringify(value, replacer as null, space)
  }
  try {
    return { code: await work(), notFinite }
  } finally {
    JSON.stringify = stringify
  }
}

function collectNotFinite(value: unknown, path: string, found: string[]): void {
  if (typeof value === 'number') {
    if (!Number.isFinite(value)) found.push(`${path} = ${value}`)
  } else if (typeof value === 'object' && value !== null) {
    for (const [key, inner] of Object.entries(value)) collectNotFinite(inner, `${path}.${key}`, found)
  }
}
