/**
 * `npm run fuzz -- [--cases N] [--minutes M] [--seed S]`: hostile and ordinary inputs through every command, inside
 * this process and, for a sample, as processes of their own. Without a seed a fresh one is taken and printed.
 */
import { existsSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { parseArgs } from 'node:util'
import { emptyTally, type Finding, runCampaign, type Tally } from './campaign.ts'
import { wordsOf } from './fuzz-case.ts'
import { runChild } from './run-child.ts'
import { layOut, runInside } from './run-inside.ts'
import { startWatch } from './watchdog.ts'

const { values } = parseArgs({
  options: {
    cases: { type: 'string' },
    minutes: { type: 'string' },
    seed: { type: 'string', default: String(Date.now() % 1_000_000_000) },
    children: { type: 'string' },
  },
})
const minutes = values.minutes === undefined ? Number.POSITIVE_INFINITY : Number(values.minutes)
const cases = Number(values.cases ?? (values.minutes === undefined ? 100_000 : 1e9))
const children = Number(values.children ?? Math.max(20, Math.min(500, cases / 200)))
const seed = Number(values.seed)
if (existsSync('/dev/shm')) process.env.EBBWATT_FUZZ_FOLDER ??= '/dev/shm'

const begin = performance.now()
const until = begin + minutes * 60_000
const tally = emptyTally()
let toldAt = 0
let toldFindings = 0
const progress = ({ cases: done, findings, slowest }: Tally) => {
  for (; toldFindings < findings.length; toldFindings++) console.log(toldFinding(findings[toldFindings]!, toldFindings))
  if (performance.now() - toldAt < 10_000) return
  toldAt = performance.now()
  const elapsed = ((toldAt - begin) / 1000).toFixed(0)
  console.log(`${done} cases, ${findings.length} findings, slowest ${slowest.toFixed(2)} s, ${elapsed} s`)
}
console.log(`seed ${seed}`)
startWatch()
await runCampaign(tally, { seed, cases: children, until, run: runChild, progress })
const asProcesses = tally.cases
await runCampaign(tally, { seed: seed + 1_000_000, cases: cases - asProcesses, until, run: runInside, progress })

console.log(`${tally.cases} cases (${asProcesses} as processes), ${tally.findings.length} findings`)
console.log(`slowest ${tally.slowest.toFixed(2)} s, at most ${megabytes()} MB, seed ${seed}`)
console.log(table(tally.byKind))
console.log(table(tally.byCode))
process.exitCode = tally.findings.length === 0 ? 0 : 1

function megabytes(): string {
  return (process.resourceUsage().maxRSS / 1024).toFixed(0)
}

function table(counts: ReadonlyMap<string, number>): string {
  return [...counts]
    .sort()
    .map(([key, count]) => `${key}: ${count}`)
    .join(', ')
}

/** What was wrong, and the smallest case that shows it, laid out in a folder of its own. */
function toldFinding({ seed: batchSeed, fuzzCase, complaints }: Finding, index: number): string {
  const folder = join(tmpdir(), `ebbwatt-finding-${seed}-${index + 1}`)
  rmSync(folder, { recursive: true, force: true })
  layOut(fuzzCase, { folder })
  const command = `cd ${folder} && ebbwatt ${wordsOf(fuzzCase).map(quoted).join(' ')}`
  return [`\nfinding ${index + 1} (${fuzzCase.kind}, batch seed ${batchSeed}): ${command}`, ...complaints].join('\n')
}

function quoted(word: string): string {
  return /^[\w./=-]+$/.test(word) ? word : `'${word}'`
}
