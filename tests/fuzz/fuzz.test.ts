import { describe, expect, it } from 'vitest'
import { emptyTally, runCampaign, type Tally } from './campaign.ts'
import type { Run } from './fuzz-case.ts'
import { runChild } from './run-child.ts'
import { runInside } from './run-inside.ts'

async function campaign(seed: number, cases: number, run: Run): Promise<Tally> {
  const tally = emptyTally()
  await runCampaign(tally, { seed, cases, until: Number.POSITIVE_INFINITY, run, progress: () => {} })
  return tally
}

function told({ findings }: Tally): readonly string[] {
  return findings.map(({ seed, complaints }) => `batch seed ${seed}: ${complaints.join('; ')}`)
}

/** Not a speed test: a busy machine may take its time. */
const patience = 240_000

describe('hostile and ordinary inputs', () => {
  it(
    '1980 of them end well inside the process',
    async () => {
      const tally = await campaign(20_000, 1980, runInside)
      expect(told(tally)).toEqual([])
      expect(tally.cases).toBe(1980)
      // Generators whose cases are all refused would test nothing but the refusal.
      for (const kind of ['random', 'mutated']) {
        // Solved to the end: a ranking (0), or one in which no part is acceptable (3).
        const solved = (tally.byCode.get(`${kind} 0`) ?? 0) + (tally.byCode.get(`${kind} 3`) ?? 0)
        expect(solved, `${kind} cases that are solved`).toBeGreaterThan(50)
      }
    },
    patience,
  )

  it(
    '20 of them end well as processes',
    async () => {
      const tally = await campaign(20_100, 20, runChild)
      expect(told(tally)).toEqual([])
    },
    patience,
  )
})
