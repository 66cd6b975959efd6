import { describe, expect, it } from 'vitest'
import type { DutyPoint, Stage } from '../../src/domain/stage.ts'
import { StudyRefusal } from '../../src/domain/study-refusal.ts'
import { rank } from '../../src/study/rank.ts'
import { swap } from '../../src/study/swap.ts'
import { leakageRow } from '../evidence/records.ts'
import { capacitive } from '../stage/by-hand.ts'
import { carbide, kelvin, mainsStage, numbersIn, silicon, stage } from '../stage/samples.ts'
import { linearPart, linearStage } from './linear-parts.ts'
import { alone, ranked, settings, warningCodes } from './settings.ts'

const year: readonly DutyPoint[] = [
  { load: 1, hours: 1200, ambient: null, input: null },
  { load: 0.5, hours: 3000, ambient: kelvin(25), input: null },
  { load: 0.1, hours: 2000, ambient: null, input: null },
]
const pair = [silicon({ price: 0.5 }), carbide({ price: 2 })]
const fromTo = { from: 'silicon', to: 'carbide' } as const

/** What a load of the profile asks for, as a stage of its own. */
function loaded(at: Stage, { load, ambient, input }: DutyPoint): Stage {
  const cooling = ambient === null ? at.cooling : ({ ...at.cooling, ambientTemperature: ambient } as Stage['cooling'])
  const output = { ...at.output, current: at.output.current * load }
  return { ...at, cooling, output, input: input === null ? at.input : { ...at.input, voltage: input } }
}

describe('the duty profile', () => {
  it.each([
    ['dc', stage({ dutyProfile: [...year, { load: 0.7, hours: 400, ambient: null, input: 280 }] })],
    ['mains', mainsStage({ dutyProfile: [...year, { load: 0.7, hours: 400, ambient: null, input: 210 }] })],
  ])('%s: energy and weighted loss are the sum by hand', (_, at) => {
    const profile = at.dutyProfile!
    const hours = profile.reduce((sum, each) => sum + each.hours, 0)
    const wattHours = profile.reduce(
      (sum, each) => sum + each.hours * alone(loaded(at, each), silicon()).stage_loss_w!,
      0,
    )
    const found = alone(at, silicon())
    expect(found.energy_kwh_per_year! / (wattHours / 1000)).toBeCloseTo(1, 6)
    expect(found.weighted_w! / (wattHours / hours)).toBeCloseTo(1, 6)
  })

  it('is null without one', () => {
    expect(alone(stage(), silicon())).toMatchObject({ energy_kwh_per_year: null, weighted_w: null })
  })

  it('a load without a stable temperature leaves no sum, and that is said', () => {
    const at = stage({
      dutyProfile: [
        { load: 1, hours: 100, ambient: null, input: null },
        { load: 1, hours: 100, ambient: kelvin(600), input: null },
      ],
    })
    const result = ranked(at, silicon())
    expect(result.candidates[0]).toMatchObject({ energy_kwh_per_year: null, weighted_w: null })
    expect(warningCodes(result, 'silicon')).toContain('profile-unsettled')
  })

  it('another best part at another load is said', () => {
    const parts = [linearPart('low', 0.9, 1600e-12), linearPart('high', 1.2, 100e-12)]
    const at = { ...linearStage, frequency: 30e3, dutyProfile: year }
    const result = ranked(at, ...parts)
    const best = (load: DutyPoint) => ranked({ ...loaded(at, load), dutyProfile: null }, ...parts).candidates[0]!.id
    expect(best(year[0]!)).not.toBe(best(year[2]!))
    expect(warningCodes(result)).toContain('order-differs-at-load')
  })
})

describe('a swap', () => {
  const at = stage({ dutyProfile: year })
  const result = swap(at, pair, fromTo, settings(200))

  it('states differences as to − from and savings as from − to', () => {
    const [from, to] = [alone(at, pair[0]!), alone(at, pair[1]!)]
    for (const key of [
      'conduction',
      'recovery_rectifier',
      'recovery_switch',
      'capacitive',
      'leakage',
      'total',
    ] as const)
      expect(result.difference_w[key], key).toBeCloseTo(to.losses_w[key]! - from.losses_w[key]!, 6)
    expect(result.difference_w.stage).toBeCloseTo(to.stage_loss_w! - from.stage_loss_w!, 6)
    expect(result.saves_w.median).toBeGreaterThan(0)
    expect(result.saves_w.low).toBeLessThan(result.saves_w.median!)
    expect(result.energy_kwh_per_year).toBeCloseTo(from.energy_kwh_per_year! - to.energy_kwh_per_year!, 6)
    expect(result.junction_change_k).toBeCloseTo(to.junction_c! - from.junction_c!, 5)
    expect(result.switch_junction_change_k).toBeCloseTo(to.switch.junction_c! - from.switch.junction_c!, 5)
    expect(result.switch_junction_change_k, 'the switch is what a swap relieves most').toBeLessThan(0)
    expect(result.price_difference).toBeCloseTo(1.5, 12)
  })

  it('is judged in the draws of the ranking itself', () => {
    const { candidates } = rank(stage({ dutyProfile: year, loopInductance: 0 }), pair, settings(200))
    const odds = swap(stage({ dutyProfile: year, loopInductance: 0 }), pair, fromTo, settings(200)).odds_better
    expect(odds).toBe(candidates.find(({ id }) => id === 'carbide')!.odds_best)
  })

  it('states efficiency and saving at every load', () => {
    expect(result.loads.map(({ load }) => load)).toEqual(year.map(({ load }) => load))
    result.loads.forEach(({ from_efficiency, to_efficiency, saves_w }, k) => {
      const [from, to] = pair.map((part) => alone({ ...loaded(at, year[k]!), dutyProfile: null }, part))
      expect(from_efficiency).toBeCloseTo(from!.efficiency!, 8)
      expect(to_efficiency).toBeCloseTo(to!.efficiency!, 8)
      expect(saves_w).toBeCloseTo(from!.stage_loss_w! - to!.stage_loss_w!, 5)
    })
  })

  it('breaks even at the analytic frequency of two linear losses', () => {
    const [low, high] = [linearPart('low', 0.9, 800e-12), linearPart('high', 1.2, 200e-12)]
    const perHertz = (drop: number, zeroBias: number): number => {
      const mean = (2.5 * (400 + drop)) / 200
      return capacitive(zeroBias, 1, 0.5, 400).cost + ((400 * mean) / 2) * (mean / 200e6 + 15e-9)
    }
    const analytic = (2.5 * 0.3) / (perHertz(0.9, 800e-12) - perHertz(1.2, 200e-12))
    const { break_even_hz } = swap(linearStage, [low, high], { from: 'low', to: 'high' }, settings(0))
    expect(break_even_hz! / analytic).toBeCloseTo(1, 5)
  })

  it.each([
    ['dc', stage({ dutyProfile: year })],
    ['mains', mainsStage({ dutyProfile: [...year, { load: 0.7, hours: 400, ambient: null, input: 210 }] })],
  ])('%s: of a part for itself gives exactly zero everywhere', (_, here) => {
    const same = swap(here, pair, { from: 'silicon', to: 'silicon' }, settings(40))
    const {
      difference_w,
      saves_w,
      energy_kwh_per_year,
      junction_change_k,
      switch_junction_change_k,
      price_difference,
    } = same
    const zeros = numbersIn({
      difference_w,
      saves_w,
      energy_kwh_per_year,
      junction_change_k,
      switch_junction_change_k,
      price_difference,
    })
    expect(
      zeros.filter(([, value]) => value !== 0),
      'exactly zero',
    ).toEqual([])
    expect(zeros).toHaveLength(8 + 3 + 4)
    expect(same.loads.filter(({ saves_w: saved }) => saved !== 0)).toEqual([])
    expect(same).toMatchObject({ odds_better: 0, break_even_hz: null, verdict: 'not-justified' })
    expect(same.because.map(({ code }) => code)).toEqual(['same-part'])
  })

  it('to a part that is rejected is not justified; away from one that has no temperature is', () => {
    const weak = carbide({ id: 'weak', ratings: { reverseVoltage: 450, averageCurrent: 8, junction: kelvin(175) } })
    expect(swap(stage(), [silicon(), weak], { from: 'silicon', to: 'weak' }, settings(40)).verdict).toBe(
      'not-justified',
    )
    const hopeless = silicon({ id: 'hopeless', thermal: { kind: 'case', junctionToCase: 500, caseToSink: 0 } })
    const away = swap(
      stage({ loopInductance: 0 }),
      [hopeless, carbide()],
      { from: 'hopeless', to: 'carbide' },
      settings(40),
    )
    expect(away).toMatchObject({ verdict: 'justified', saves_w: { median: null }, junction_change_k: null })
  })

  it('names the ambient at which the new part runs away at maximum leakage, and none where none does', () => {
    const leaky = carbide({
      id: 'leaky',
      class: 'schottky',
      leakage: [leakageRow({ voltage: 600, current: 30e-3, junction: kelvin(125) })],
    })
    const at = (to: string, celsius: number) =>
      swap(
        stage({
          loopInductance: 0,
          cooling: { kind: 'sink', ambientTemperature: kelvin(celsius), sinkToAmbient: 2, shared: false },
        }),
        [silicon(), carbide(), leaky],
        { from: 'silicon', to },
        settings(0),
      )
    const edge = at('leaky', 40).runaway_ambient_c!
    const runsAway = (celsius: number) => at('leaky', celsius).to.reasons.map(({ code }) => code)
    expect(runsAway(edge - 0.01)).not.toContain('runaway-at-maximum-leakage')
    expect(runsAway(edge + 0.01)).toContain('runaway-at-maximum-leakage')
    expect(at('carbide', 40).runaway_ambient_c, 'silicon carbide only gets hotter').toBeNull()
  })

  it('brings the cautions that belong to it', () => {
    const codes = (here: Stage, to = 'carbide') =>
      swap(
        here,
        [...pair, carbide({ id: 'barrier', class: 'schottky' })],
        { from: 'silicon', to },
        settings(0),
      ).cautions.map(({ code }) => code)
    expect(codes(mainsStage())).toEqual(
      expect.arrayContaining(['faster-edges', 'gate-drive-retune', 'surge-silicon-carbide', 'lethal-voltage']),
    )
    expect(codes(stage())).not.toContain('surge-silicon-carbide')
    expect(codes(stage(), 'barrier')).toContain('leakage-and-voltage-of-schottky')
    const back = swap(stage(), pair, { from: 'carbide', to: 'silicon' }, settings(0)).cautions.map(({ code }) => code)
    expect(back, 'more recovery makes no faster edges').not.toContain('faster-edges')
    expect(back).toContain('gate-drive-retune')
  })

  it('names a part that no record describes, with the known ones', () => {
    try {
      swap(stage(), pair, { from: 'silicon', to: 'nobody' }, settings(0))
      expect.unreachable('must be refused')
    } catch (refusal) {
      expect(refusal).toBeInstanceOf(StudyRefusal)
      expect((refusal as StudyRefusal).code).toBe('part-unknown')
      expect((refusal as StudyRefusal).data).toMatchObject({ found: 'nobody', expected: 'carbide, silicon' })
    }
  })
})
