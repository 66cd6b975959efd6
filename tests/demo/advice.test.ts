import { readdirSync, readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { MeasureNext, RankResult } from '../../src/domain/result.ts'
import type { Stage } from '../../src/domain/stage.ts'
import { readRecords } from '../../src/input/read-records.ts'
import { readStage } from '../../src/input/read-stage.ts'
import { rank } from '../../src/study/rank.ts'

const folder = new URL('../../catalogs-demo/', import.meta.url)

function stageNamed(name: string): Stage {
  const url = new URL(`stages/${name}.yaml`, folder)
  return readStage(readFileSync(url, 'utf8'), url.pathname).value!.stage
}

const records = readdirSync(new URL('rectifiers/', folder)).flatMap((name) => {
  const url = new URL(`rectifiers/${name}`, folder)
  return [...readRecords(readFileSync(url, 'utf8'), url.pathname).value!]
})

function ranked(stage: Stage, parts: readonly RectifierRecord[]): RankResult {
  return rank(stage, parts, { seed: 1, draws: 1000, version: 'test', inputs: [] })
}

/** The forward reading that the advice asks for, with the value that is expected of it. */
function followed(result: RankResult, advice: MeasureNext): RectifierRecord[] {
  const drop = result.candidates.find(({ id }) => id === advice.id)!.forward_v!
  const row = {
    current: advice.current_a,
    drop,
    junction: advice.junction_c + 273.15,
    grade: 'measured' as const,
    spread: null,
    source: 'bench',
    place: { name: 'forward row of the bench', file: 'bench.yaml', line: 1, column: 1 },
  }
  return records.map((record) => (record.id === advice.id ? { ...record, forward: [...record.forward, row] } : record))
}

describe('the advice of the demonstration', () => {
  it('calls the pump stage decided and the cold store at 150 kHz not', () => {
    expect(ranked(stageNamed('pump-boost'), records).verdict.decided).toBe(true)
    expect(ranked(stageNamed('cold-store-150khz'), records).verdict.decided).toBe(false)
  })

  it('settles the cold store when the one measurement it names is made', () => {
    const stage = stageNamed('cold-store-150khz')
    const before = ranked(stage, records)
    const advice = before.verdict.measure_next![0]!
    expect(advice.property).toBe('forward')
    const after = ranked(stage, followed(before, advice))
    const width = ({ verdict }: RankResult): number => verdict.gap_high_w! - verdict.gap_low_w!
    // The share of variance it promises, as a width, within the error of 1000 draws of skewed gaps.
    expect(width(after) / width(before)).toBeCloseTo(Math.sqrt(1 - advice.share), 1)
    expect(after.verdict.decided).toBe(true)
  })
})
