import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { doSteps } from '../../src/commands/do-steps.ts'
import type { Stage } from '../../src/domain/stage.ts'
import { readProfile } from '../../src/input/read-profile.ts'
import { rank, rankSteps } from '../../src/study/rank.ts'
import { recordingSession } from '../commands/session-double.ts'
import { inventedParts, openStage, settings } from './parts.ts'

const session = recordingSession()

describe('the number of threads', () => {
  const parts = inventedParts(70, 2)
  const stage = openStage('pump-boost')
  const long = { ...settings, draws: 1000 }
  const here = JSON.stringify(rank(stage, parts, long))

  it.each([1, 2, 3])('%i: changes no byte of a long ranking', async (threads) => {
    expect(JSON.stringify(await doSteps(rankSteps(stage, parts, long), session, threads))).toBe(here)
  })

  it('changes no byte of the first look at thousands', async () => {
    const many = inventedParts(4200, 6)
    const short = { ...settings, draws: 0, top: 8 }
    const shared = await doSteps(rankSteps(stage, many, short), session, 2)
    expect(JSON.stringify(shared)).toBe(JSON.stringify(rank(stage, many, short)))
    expect(shared.not_listed!.count).toBe(many.length - 8)
  })

  it('changes no byte of a mains stage with a profile', async () => {
    const mains = openStage('cold-store-mains')
    const rows = Array.from({ length: 200 }, (_, k) => `0.5,${20 + (k % 81)},${20 + (k % 7)},${225 + (k % 5)}`)
    const table = `hours [h],load [%],ambient [degC],input [V]\n${rows.join('\n')}\n`
    const dutyProfile = readProfile(table, 'year.csv', mains).value
    const loaded: Stage = { ...mains, dutyProfile }
    const few = inventedParts(14, 2)
    const alone = rank(loaded, few, { ...settings, draws: 300 })
    const shared = await doSteps(rankSteps(loaded, few, { ...settings, draws: 300 }), session, 2)
    expect(JSON.stringify(shared)).toBe(JSON.stringify(alone))
    expect(alone.candidates[0]!.energy_kwh_per_year).toBeGreaterThan(0)
  })
})

it('a thread that cannot start is told, not waited for', async () => {
  const elsewhere = { ...session, root: new URL('file:///nowhere/') }
  const steps = rankSteps(openStage('pump-boost'), inventedParts(80, 2), { ...settings, draws: 1000 })
  await expect(doSteps(steps, elsewhere, 2)).rejects.toThrow()
})

it('the thread is built beside the command', () => {
  expect(readFileSync('dist/worker.js', 'utf8').length).toBeGreaterThan(100)
})
