import fc from 'fast-check'
import { type FuzzCase, type FuzzOutcome, type Run, wordsOf } from './fuzz-case.ts'
import { complaintsOf } from './judge.ts'
import { anyCase } from './random-cases.ts'
import { makePlace, removePlace } from './run-inside.ts'
import { watchCase } from './watchdog.ts'

/** What a campaign found. */
export interface Finding {
  readonly seed: number
  readonly fuzzCase: FuzzCase
  readonly complaints: readonly string[]
}

export interface Tally {
  cases: number
  readonly byKind: Map<string, number>
  readonly byCode: Map<string, number>
  slowest: number
  readonly findings: Finding[]
}

export interface CampaignOptions {
  readonly seed: number
  readonly cases: number
  /** Milliseconds since the epoch of `performance.now`; no batch begins after it. */
  readonly until: number
  readonly run: Run
  readonly progress: (tally: Tally) => void
}

export function emptyTally(): Tally {
  return { cases: 0, byKind: new Map(), byCode: new Map(), slowest: 0, findings: [] }
}

const batchSize = 50

/** Batch after batch, each with a seed of its own that reproduces it alone; a batch ends at its first finding, shrunk. */
export async function runCampaign(tally: Tally, options: CampaignOptions): Promise<void> {
  const goal = tally.cases + options.cases
  for (let batch = 0; tally.cases < goal && performance.now() < options.until; batch++) {
    await runBatch(tally, options.seed + batch, Math.min(batchSize, goal - tally.cases), options.run)
    options.progress(tally)
  }
}

async function runBatch(tally: Tally, seed: number, size: number, run: Run): Promise<void> {
  let counting = true
  const property = fc.asyncProperty(anyCase, async (fuzzCase) => {
    const outcome = await outcomeOfCase(fuzzCase, run)
    if (counting) count(tally, fuzzCase, outcome)
    const complaints = complaintsOf(fuzzCase, outcome)
    if (complaints.length === 0) return
    counting = false
    throw new Error(complaints.join('\n'))
  })
  const details = await fc.check(property, { seed, numRuns: size })
  const [fuzzCase] = details.counterexample ?? []
  if (fuzzCase === undefined) return
  const complaints = complaintsOf(fuzzCase, await outcomeOfCase(fuzzCase, run))
  tally.findings.push({ seed, fuzzCase, complaints })
}

async function outcomeOfCase(fuzzCase: FuzzCase, run: Run): Promise<FuzzOutcome> {
  const place = makePlace()
  watchCase(place.folder, wordsOf(fuzzCase).join(' '))
  try {
    return await run(fuzzCase, place)
  } finally {
    watchCase('', '')
    removePlace(place)
  }
}

function count(tally: Tally, { kind }: FuzzCase, { code, seconds }: FuzzOutcome): void {
  tally.cases++
  tally.slowest = Math.max(tally.slowest, seconds)
  raise(tally.byKind, kind)
  raise(tally.byCode, `${kind.split(' ')[0]} ${code}`)
}

function raise(counts: Map<string, number>, key: string): void {
  counts.set(key, (counts.get(key) ?? 0) + 1)
}
