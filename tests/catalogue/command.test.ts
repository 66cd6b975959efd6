import { spawn } from 'node:child_process'
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, describe, expect, it } from 'vitest'
import type { RankResult } from '../../src/domain/result.ts'
import { ebbwatt } from '../end-to-end/run-command.ts'
import { inventedCatalogue } from './invented-catalogue.ts'
import { inventedProfile } from './invented-profile.ts'

const folder = mkdtempSync(join(tmpdir(), 'ebbwatt-catalogue-'))
afterAll(() => rmSync(folder, { recursive: true }))

const stage = 'catalogs-demo/catalogue/pump.yaml'
const mapping = 'catalogs-demo/catalogue/mapping.yaml'
const table = 'catalogs-demo/catalogue/parts.csv'
const rank = (...options: readonly string[]) =>
  ebbwatt(['rank', stage, '--records', table, '--mapping', mapping, '--draws', '50', ...options])

describe('the demonstration table', () => {
  it('is what its generator writes', () => {
    expect(readFileSync(table, 'utf8')).toBe(inventedCatalogue(60, 7, 25))
    const swing = { ambient: [12, 42], input: [44, 52] } as const
    expect(readFileSync('catalogs-demo/profiles/pump-week.csv', 'utf8')).toBe(inventedProfile(672, 13, 4, swing))
  })

  it('is ranked from its good rows; the bad cells are told with row and column, the counts everywhere', () => {
    const { code, out, err } = rank('--json')
    expect(code).toBe(0)
    expect(err).toContain(`${table}: 60 rows, 58 used, 2 left out\n`)
    expect(err).toContain(`${table}:26:6  `)
    expect(err).toContain(`${table}:51:9  `)
    const { warnings } = JSON.parse(out) as RankResult
    const left = warnings.find(({ code }) => code === 'table-rows-left-out')
    expect(left?.data).toMatchObject({ table: 'parts.csv', rows: 60, used: 58, leftOut: 2 })
    expect(left?.text).toContain('2 of 60 rows of parts.csv')
  })

  it('is refused with --strict, each bad cell being a problem', () => {
    const { code, out, err } = rank('--strict', '--json')
    expect(code).toBe(2)
    const { error } = JSON.parse(out)
    expect(error.problems.map(({ line, column, code }: Record<string, unknown>) => [line, column, code])).toEqual([
      [26, 6, 'number-decimal-comma'],
      [51, 9, 'number-malformed'],
    ])
    expect(err).toContain('on request')
  })
})

describe('--top', () => {
  it('lists so many in every form and counts the others', () => {
    const { out } = rank('--top', '5', '--quiet')
    expect(out).toMatch(/Not listed: 53 parts\n- \d+ cost more than the last one listed/)
    expect(out).toMatch(/- \d+ rejected: too little voltage margin\./)
    const csv = rank('--top', '5', '--quiet', '--csv').out.trimEnd().split('\n')
    expect(csv).toHaveLength(6)
    const { candidates, not_listed } = JSON.parse(rank('--top', '5', '--quiet', '--json').out) as RankResult
    expect(candidates.map(({ rank }) => rank)).toEqual([1, 2, 3, 4, 5])
    expect(not_listed!.costlier + not_listed!.rejected.reduce((sum, { count }) => sum + count, 0)).toBe(53)
  })

  it('refuses a list too short for a best part and a runner-up', () => {
    expect(rank('--top', '1').code).toBe(2)
  })
})

it('Ctrl-C while threads work ends at once and leaves no half-written file', async () => {
  const parts = join(folder, 'many.csv')
  const results = mkdtempSync(join(folder, 'results-'))
  writeFileSync(parts, inventedCatalogue(400, 3))
  const more = ['--records', parts, '--mapping', mapping, '--draws', '1000000', '-o', join(results, 'out.json')]
  const child = spawn(process.execPath, ['dist/cli.cjs', 'rank', stage, ...more], {
    stdio: ['ignore', 'ignore', 'pipe'],
  })
  // The note about the table comes when all is read, right before the study; a moment later threads are at work.
  await new Promise((resolve) => child.stderr.once('data', resolve))
  await new Promise((resolve) => setTimeout(resolve, 2000))
  const ended = new Promise<number | null>((resolve) => child.once('exit', resolve))
  child.kill('SIGINT')
  expect(await ended).toBe(130)
  expect(readdirSync(results)).toEqual([])
})
