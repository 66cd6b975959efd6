/**
 * Stands in for vitest while faults are tried: tests are kept in a list, to be run one by one, thousands of times, in one
 * process. Expectations are vitest's own.
 */
export { expect } from 'vitest'

export interface CollectedTest {
  readonly name: string
  readonly run: () => unknown
}

// Outside a run of vitest its expectations ask in vain which file they stand in.
Object.assign(globalThis, { __vitest_worker__: { filepath: '' } })

/** Shared with try-faults.ts, which is a program of its own. */
export const shelf = globalThis as { collectedTests?: CollectedTest[] }
shelf.collectedTests = []

const titles: string[] = []

type Body = (...args: never[]) => unknown

export function describe(title: string, body: () => void): void {
  titles.push(title)
  body()
  titles.pop()
}

export function it(title: string, body: Body): void {
  shelf.collectedTests?.push({ name: [...titles, title].join(' > '), run: body as () => unknown })
}

describe.each = forEach(describe as typeof it)
it.each = forEach(it)

/** A row of several values becomes several arguments, as in vitest. */
function forEach(declare: (title: string, body: Body) => void) {
  return (rows: readonly unknown[]) => (title: string, body: Body) => {
    for (const [index, row] of rows.entries()) {
      const args = (Array.isArray(row) ? row : [row]) as never[]
      declare(`${title} #${index + 1}`, () => body(...args))
    }
  }
}
