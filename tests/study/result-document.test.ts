import { readFileSync } from 'node:fs'
import { Ajv2020 } from 'ajv/dist/2020.js'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { RankResult } from '../../src/domain/result.ts'
import type { Stage } from '../../src/domain/stage.ts'
import { StudyRefusal } from '../../src/domain/study-refusal.ts'
import { rank } from '../../src/study/rank.ts'
import { swap } from '../../src/study/swap.ts'
import { trend } from '../../src/study/trend.ts'
import { carbide, mainsStage, numbersIn, silicon, stage } from '../stage/samples.ts'
import { anyRecord, anyStage } from './random-studies.ts'
import { settings } from './settings.ts'

const validate = new Ajv2020({ strict: false }).compile(JSON.parse(readFileSync('schemas/result.schema.json', 'utf8')))

/** What is written to a file, read back. */
function checked(result: unknown): void {
  const bad = numbersIn(result).filter(([, value]) => !Number.isFinite(value))
  expect(bad, 'every number is finite').toEqual([])
  const valid = validate(JSON.parse(JSON.stringify(result)))
  expect(validate.errors ?? [], 'schemas/result.schema.json').toEqual([])
  expect(valid).toBe(true)
}

function rankedOrRefused(at: Stage, records: readonly RectifierRecord[]): RankResult | null {
  try {
    return rank(at, records, settings(25))
  } catch (refusal) {
    if (refusal instanceof StudyRefusal) return null
    throw refusal
  }
}

describe('any stage with any parts gives a whole document or a refusal', () => {
  it('without NaN or infinity, valid by its schema, by the laws of the ledger', () => {
    const seen = { ranked: 0, refused: 0 }
    fc.assert(
      fc.property(anyStage, anyRecord('a'), anyRecord('b'), (at, a, b) => {
        const result = rankedOrRefused(at, [a, b])
        if (result === null) {
          seen.refused++
          return
        }
        seen.ranked++
        checked(result)
        lawful(result)
      }),
      { seed: 11, numRuns: 60 },
    )
    expect(seen.ranked, 'most of the stages deliver').toBeGreaterThan(30)
  })
})

/** Laws of INTERFACE's rules that hold for every document. */
function lawful({ candidates, stage: { output_w } }: RankResult): void {
  const accepted = candidates.filter((each) => each.accepted)
  const rejected = candidates.filter((each) => !each.accepted)
  expect(candidates, 'accepted first').toEqual([...accepted, ...rejected])
  expect(
    accepted.map(({ rank: place }) => place),
    'ranks count up',
  ).toEqual(accepted.map((_, k) => k + 1))
  const losses = accepted.map(({ stage_loss_w }) => stage_loss_w!)
  expect(losses, 'ranked by stage loss').toEqual(losses.toSorted((x, y) => x - y))
  expect(
    rejected.map(({ id }) => id),
    'rejected by id',
  ).toEqual(rejected.map(({ id }) => id).toSorted())
  for (const each of rejected) {
    expect([each.rank, each.odds_best, each.reasons.length > 0], 'rejected: no rank, odds 0, a reason').toEqual([
      null,
      0,
      true,
    ])
  }
  for (const each of candidates) {
    const rows = numbersIn({ ...each.losses_w, total: null })
    for (const [name, value] of rows) expect(value, `row ${name} is not negative`).toBeGreaterThanOrEqual(0)
    if (each.thermal === 'none') {
      const told = numbersIn({
        ...each,
        reasons: [],
        snubber_w: null,
        fixed_w: null,
        price: null,
        junction_limit_c: null,
      })
      expect(
        told.filter(([name]) => !name.startsWith('.odds')),
        'nothing that depends on a temperature that does not exist',
      ).toEqual([])
      continue
    }
    const sum = rows.reduce((all, [, value]) => all + value, 0)
    expect(Math.abs(each.losses_w.total! - sum), 'total = sum of its six rows').toBeLessThanOrEqual(4e-16 * sum)
    const { conduction_w, turn_on_base_w, turn_off_w, stored_w } = each.switch
    const whole =
      sum + conduction_w! + turn_on_base_w! + turn_off_w! + stored_w! + each.inductor_w! + each.snubber_w + each.fixed_w
    expect(Math.abs(each.stage_loss_w! / whole - 1), 'stage loss = sum of everything').toBeLessThan(1e-14)
    expect(each.efficiency, 'efficiency = Pout/(Pout + all)').toBeCloseTo(output_w / (output_w + whole), 12)
    expect(each.interval_w === null, 'a part with a temperature keeps its interval').toBe(each.thermal_lost_share === 1)
    expect(each.thermal, 'outcome against the limit').toBe(
      each.junction_c! > each.junction_limit_c ? 'over-limit' : 'settled',
    )
  }
}

const hopeless = carbide({ id: 'hopeless', thermal: { kind: 'case', junctionToCase: 500, caseToSink: 0 } })
const parts = [
  silicon(),
  carbide(),
  hopeless,
  silicon({ id: 'small', ratings: { reverseVoltage: 450, averageCurrent: 1, junction: 400 } }),
]

describe('the other documents', () => {
  it.each([
    ['dc', stage()],
    ['mains', mainsStage()],
  ])('%s: rank, trend over everything and swap are whole and valid', (_, at) => {
    checked(rank(at, parts, settings(30)))
    checked(swap(at, parts, { from: 'silicon', to: 'hopeless' }, settings(30)))
    checked(swap(at, parts, { from: 'small', to: 'carbide' }, settings(30)))
    const ranges = { frequency: [20e3, 2e5], load: [0.05, 1], slope: [50e6, 2e9], ambient: [280, 380] } as const
    for (const [over, [from, to]] of Object.entries(ranges)) {
      const request = { over: over as keyof typeof ranges, from, to, steps: 4, logarithmic: false }
      checked(trend(at, parts, request, settings(10)))
    }
  })
})

/** The keys of INTERFACE that every candidate has, whatever became of it. */
const candidateKeys =
  'id rank accepted reasons class evidence point event event_maximum losses_w interval_w odds_best odds_error ' +
  'thermal_lost_share junction_c junction_high_c thermal ambient_margin_k voltage_margin efficiency stage_loss_w switch ' +
  'inductor_w snubber_w at_mains line weighted_w energy_kwh_per_year provenance'
const innerKeys: Readonly<Record<string, string>> = {
  point: 'duty mean_a ripple_a valley_a peak_a mode',
  event:
    'current_a slope_a_per_s blocking_v junction_c tau_s tau_rr_s stored_c peak_reverse_a ta_s trr_s qrr_c softness ' +
    'rectifier_j switch_added_j base_j peak_reverse_v none',
  losses_w: 'conduction recovery_rectifier recovery_switch capacitive leakage forward_recovery total',
  interval_w: 'low high level',
  switch: 'conduction_w turn_on_base_w turn_off_w stored_w junction_c',
}

it.each([
  ['dc', stage()],
  ['mains', mainsStage()],
])('%s: every key of the interface is present in every candidate, the rejected ones included', (_, at) => {
  const result = rank(at, parts, settings(20))
  expect(result.candidates.map(({ accepted, thermal }) => [accepted, thermal])).toContainEqual([false, 'none'])
  for (const candidate of result.candidates) {
    const held = candidate as unknown as Record<string, Record<string, unknown> | null>
    expect(Object.keys(held), candidate.id).toEqual(expect.arrayContaining(candidateKeys.split(' ')))
    for (const [key, keys] of Object.entries(innerKeys)) {
      if (held[key] !== null)
        expect(Object.keys(held[key]!), `${candidate.id}: ${key}`).toEqual(expect.arrayContaining(keys.split(' ')))
    }
    expect(Object.keys(candidate.losses_w), 'no further loss rows').toEqual(innerKeys.losses_w!.split(' '))
  }
  const top = 'format tool seed draws inputs stage candidates verdict warnings cautions not_covered'
  expect(Object.keys(result)).toEqual(expect.arrayContaining(top.split(' ')))
  const verdict = 'best decided tied gap_w gap_low_w gap_high_w text sensitivity measure_next'
  expect(Object.keys(result.verdict)).toEqual(expect.arrayContaining(verdict.split(' ')))
})
