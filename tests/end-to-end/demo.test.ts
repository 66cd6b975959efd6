import { readdirSync, readFileSync } from 'node:fs'
import { Ajv2020 } from 'ajv/dist/2020.js'
import { describe, expect, it } from 'vitest'
import type { CandidateResult, RankResult } from '../../src/domain/result.ts'
import { ebbwatt } from './run-command.ts'

const stages = readdirSync('catalogs-demo/stages')
  .filter((file) => file.endsWith('.yaml'))
  .map((file) => `catalogs-demo/stages/${file}`)

const isResult = new Ajv2020({ strict: false }).compile(JSON.parse(readFileSync('schemas/result.schema.json', 'utf8')))

function rankOf(stage: string): RankResult {
  const { code, out, err } = ebbwatt(['rank', stage, '--json', '--quiet'])
  expect([0, 3], err).toContain(code)
  return JSON.parse(out)
}

function lossRows({ losses_w: { total: _, ...rows } }: CandidateResult): readonly number[] {
  return Object.values(rows).map((value) => value ?? Number.NaN)
}

function sum(values: readonly number[]): number {
  return values.reduce((total, value) => total + value, 0)
}

describe('every demonstration file', () => {
  it('passes the check', () => {
    const captures = readdirSync('catalogs-demo/captures').filter((file) => file.endsWith('.yaml'))
    const files = [...stages, ...captures.map((file) => `catalogs-demo/captures/${file}`), 'catalogs-demo/rectifiers']
    expect(ebbwatt(['check', ...files])).toMatchObject({ code: 0, err: '' })
  })

  it.each(readdirSync('catalogs-demo/captures').filter((file) => file.endsWith('.yaml')))(
    'capture %s is reduced',
    (file) => {
      const { code, out } = ebbwatt(['reduce', `catalogs-demo/captures/${file}`, '--json', '--quiet'])
      expect(code).toBe(0)
      expect(JSON.parse(out)).toMatchObject({ fixture: expect.stringMatching(/^(ramp|step)$/) })
    },
  )
})

describe.each(stages)('the ranking of %s', (stage) => {
  const result = rankOf(stage)
  const ranked = result.candidates.filter(({ accepted }) => accepted)
  const withTemperature = result.candidates.filter(({ thermal }) => thermal !== 'none')

  it('keeps to the schema of results', () => {
    expect(isResult(result), JSON.stringify(isResult.errors?.slice(0, 3))).toBe(true)
  })

  it('counts every loss once: the total is the sum of its rows, none negative', () => {
    for (const candidate of withTemperature) {
      const rows = lossRows(candidate)
      expect(Math.min(...rows), candidate.id).toBeGreaterThanOrEqual(0)
      expect(sum(rows) / candidate.losses_w.total!, candidate.id).toBeCloseTo(1, 12)
    }
  })

  it('counts the loss of the stage once', () => {
    for (const { losses_w, switch: own, inductor_w, snubber_w, fixed_w, stage_loss_w, efficiency } of withTemperature) {
      const parts = [
        losses_w.total,
        own.conduction_w,
        own.turn_on_base_w,
        own.turn_off_w,
        own.stored_w,
        inductor_w,
        snubber_w,
        fixed_w,
      ]
      expect(sum(parts.map((value) => value ?? Number.NaN)) / stage_loss_w!).toBeCloseTo(1, 12)
      expect(efficiency).toBeCloseTo(result.stage.output_w / (result.stage.output_w + stage_loss_w!), 12)
    }
  })

  it('ranks accepted parts by the loss of the stage, and no rejected part', () => {
    expect(ranked.map(({ rank }) => rank)).toEqual(ranked.map((_, index) => index + 1))
    const losses = ranked.map(({ stage_loss_w }) => stage_loss_w!)
    expect(losses).toEqual(losses.toSorted((a, b) => a - b))
    for (const { rank, reasons, odds_best } of result.candidates.filter(({ accepted }) => !accepted)) {
      expect({ rank, odds_best }).toEqual({ rank: null, odds_best: 0 })
      expect(reasons.length).toBeGreaterThan(0)
    }
  })

  it('states no number that depends on a temperature where there is none', () => {
    for (const candidate of result.candidates.filter(({ thermal }) => thermal === 'none')) {
      const numbers = [
        candidate.junction_c,
        candidate.losses_w.total,
        candidate.stage_loss_w,
        candidate.efficiency,
        candidate.interval_w,
      ]
      expect(numbers, candidate.id).toEqual([null, null, null, null, null])
    }
  })

  it('tells the origin of every figure of an event', () => {
    for (const { id, event, provenance } of withTemperature.filter(({ class: kind }) => !kind.includes('schottky'))) {
      const figures = provenance.map(({ figure }) => figure)
      if (event !== null && event.none === null) expect(figures, id).toContain('event.qrr_c')
    }
  })

  it('carries cautions where it can kill, each with its words', () => {
    const dangerous = result.stage.output_v > 42.4 || result.stage.kind === 'mains-boost'
    if (dangerous) expect(result.cautions.length).toBeGreaterThan(0)
    for (const { code, text } of [...result.cautions, ...result.warnings]) expect(text.length, code).toBeGreaterThan(20)
  })
})
