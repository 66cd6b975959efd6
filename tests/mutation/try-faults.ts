/**
 * The program of a process that tries the faults whose ids its parent sends: `node try-faults.js BUNDLE [anew]`. Each
 * fault is woken in turn, and the tests that pass its place are run, quickest first, until one fails.
 */
import type { CollectedTest, shelf } from './collect-tests.ts'

/** What the faults in the sources look at; the names are Stryker's. */
interface Switchboard {
  activeMutant?: string
  currentTestId?: string
  hitCount?: number
  hitLimit?: number
  mutantCoverage?: {
    readonly static: Record<string, number>
    readonly perTest: Record<string, Record<string, number>>
  }
}

/** How a fault ended. A fault in what runs once while files load cannot be woken later, and none is tried. */
export type End = 'noticed' | 'spoilt' | 'endless' | 'missed' | 'unreached' | 'untried'

export interface Report {
  readonly id: string
  readonly end: End | 'begun'
}

// Sources that were loaded before may have put it there.
const shared = globalThis as { __stryker__?: Switchboard }
shared.__stryker__ ??= {}
const board = shared.__stryker__

const [, , bundle = '', anew] = process.argv
let tests: readonly CollectedTest[] = []
let loads = 0

/** Loads sources and tests again, as if nothing had been asked of them before. */
async function load(): Promise<void> {
  await import(`${bundle}?${loads++}`)
  tests = (globalThis as typeof shelf).collectedTests ?? []
}

interface Reach {
  readonly passing: number[]
  hits: number
}

/** A fault that is passed so many times as often as its place is without it counts as one that never ends. */
const endlessAfter = 20

const seconds: number[] = []
await load()
const reaches = await reachOfTests()
// Later more is counted there: places that are passed only while a fault elsewhere is awake.
const passedInLoading = new Set(Object.keys(board.mutantCoverage?.static ?? {}))
process.once('message', async (ids: readonly string[]) => {
  await tryFaults(ids)
  process.disconnect()
})

/** Runs every test once without a fault; none may fail. */
async function reachOfTests(): Promise<ReadonlyMap<string, Reach>> {
  for (const [index, { name, run }] of tests.entries()) {
    board.currentTestId = String(index)
    const begun = performance.now()
    try {
      await run()
    } catch (error) {
      throw new Error(`without any fault this fails: ${name}`, { cause: error })
    }
    seconds[index] = performance.now() - begun
  }
  delete board.currentTestId
  const found = new Map<string, Reach>()
  for (const [test, places] of Object.entries(board.mutantCoverage?.perTest ?? {})) {
    for (const [id, hits] of Object.entries(places)) {
      const reach = found.get(id) ?? { passing: [], hits: 0 }
      reach.passing.push(Number(test))
      reach.hits += hits
      found.set(id, reach)
    }
  }
  return found
}

async function tryFaults(wanted: readonly string[]): Promise<void> {
  for (const id of wanted) {
    const reach = reaches.get(id)
    if (anew !== undefined) await load()
    tell({ id, end: reach ? await endOf(id, reach) : passedInLoading.has(id) ? 'untried' : 'unreached' })
  }
}

async function endOf(id: string, { passing, hits }: Reach): Promise<End> {
  for (const index of passing.toSorted((one, other) => seconds[one]! - seconds[other]!)) {
    // The parent's patience is for one test.
    tell({ id, end: 'begun' })
    board.activeMutant = id
    board.hitCount = 0
    board.hitLimit = endlessAfter * hits
    const failure = await failureOf(index)
    delete board.activeMutant
    if (failure === null) continue
    // A fault may spoil what a file remembers between tests; then this process is of no more use.
    if (anew === undefined && (await failureOf(index)) !== null) return 'spoilt'
    return failure.includes('Hit count limit') ? 'endless' : 'noticed'
  }
  return 'missed'
}

async function failureOf(index: number): Promise<string | null> {
  try {
    await tests[index]!.run()
    return null
  } catch (error) {
    return String(error)
  }
}

function tell(report: Report): void {
  process.send!(report)
}
