import { describe, expect, it } from 'vitest'
import type { Stage } from '../../src/domain/stage.ts'
import { rank } from '../../src/study/rank.ts'
import { leakageRow, rampRow } from '../evidence/records.ts'
import { carbide, kelvin, mainsStage, silicon, stage } from '../stage/samples.ts'
import { alone, ranked, reasonCodes, settings, warningCodes } from './settings.ts'

const rated = (reverseVoltage: number, averageCurrent = 8) => ({
  ratings: { reverseVoltage, averageCurrent, junction: kelvin(175) },
})

describe('each acceptance rule, on both sides of its edge', () => {
  it('peak reverse voltage against voltage_use times the rating', () => {
    const calm = stage({ loopInductance: 0 })
    expect(alone(calm, carbide(rated(500))).accepted, '400 V is 80 % of 500 V').toBe(true)
    const small = alone(calm, carbide(rated(499)))
    expect(reasonCodes(small)).toEqual(['voltage-margin'])
    expect(small.reasons[0]).toMatchObject({ value: 400, limit: 0.8 * 499 })
    expect(small.voltage_margin, 'margin is 1 − peak/rating').toBeCloseTo(1 - 400 / 499, 12)
    expect(small.stage_loss_w, 'a rejected part keeps its numbers').toBeGreaterThan(0)
  })

  it('overshoot counts, of the stored charge as of the ringing, and its absence is said', () => {
    const loop = stage({ loopInductance: 20e-9 })
    const bare = alone(loop, silicon({ capacitance: null }))
    const { peak_reverse_a, tau_rr_s, peak_reverse_v } = bare.event!
    expect(peak_reverse_v, 'V + L I_RM/tau_rr').toBeCloseTo(400 + (20e-9 * peak_reverse_a) / tau_rr_s!, 9)
    const ringing = stage({ loopInductance: 20e-9, switch: { voltageFall: 15e-9 } })
    expect(alone(ringing, carbide()).event!.peak_reverse_v, 'PHYSICS 2: about 546 V').toBeCloseTo(546, 0)
    const none = stage({ loopInductance: null })
    expect(alone(none, silicon()).event!.peak_reverse_v).toBe(400)
    expect(warningCodes(ranked(none, silicon()), 'silicon')).toContain('overshoot-not-included')
    expect(warningCodes(ranked(loop, silicon()), 'silicon')).not.toContain('overshoot-not-included')
  })

  it('mean rectifier current against the ratings of all parts', () => {
    expect(alone(stage(), silicon(rated(650, 2.51))).accepted).toBe(true)
    const overloaded = alone(stage(), silicon(rated(650, 2.49)))
    expect(reasonCodes(overloaded)).toContain('average-current')
    expect(overloaded.reasons.find(({ code }) => code === 'average-current')!.value, 'the output current').toBeCloseTo(
      2.5,
      9,
    )
    const two = stage({ parallel: { parts: 2, imbalance: 0 } })
    expect(reasonCodes(alone(two, silicon(rated(650, 1.26))))).not.toContain('average-current')
  })

  it('junction against the lower of rating and limit', () => {
    const { junction_c } = alone(stage(), silicon())
    const limited = (kelvins: number) => alone(stage({ limits: { junction: kelvins, voltageUse: 0.8 } }), silicon())
    const above = limited(kelvin(junction_c! - 0.1))
    expect(reasonCodes(above)).toEqual(['junction-over-limit'])
    expect(above).toMatchObject({ thermal: 'over-limit', accepted: false, rank: null })
    expect(above.reasons[0]!.value, 'in degrees Celsius').toBeCloseTo(junction_c!, 6)
    expect(above.ambient_margin_k, 'the surroundings would have to be colder').toBeLessThan(0)
    expect(limited(kelvin(junction_c! + 0.1))).toMatchObject({ thermal: 'settled', accepted: true })
  })

  it('running away at maximum leakage alone rejects, with the numbers kept', () => {
    const hot = stage({ cooling: { kind: 'sink', ambientTemperature: kelvin(85), sinkToAmbient: 1, shared: false } })
    const leaky = (milliamps: number) =>
      carbide({
        class: 'schottky',
        ratings: { reverseVoltage: 650, averageCurrent: 8, junction: kelvin(150) },
        leakage: [leakageRow({ voltage: 600, current: milliamps * 1e-3, junction: kelvin(125) })],
      })
    const part = [5, 8, 13, 21, 34, 55, 89, 144, 233, 377].map((each) => alone(hot, leaky(each)))
    const only = part.filter((each) => reasonCodes(each).join() === 'runaway-at-maximum-leakage')
    expect(only.length, 'between accepted and lost lies runaway at maximum leakage').toBeGreaterThan(0)
    expect(only[0]).toMatchObject({ thermal: 'settled', accepted: false })
    expect(only[0]!.junction_c).not.toBeNull()
    const { value, limit } = only[0]!.reasons[0]!
    expect(value, 'the surroundings, in degrees Celsius').toBeCloseTo(85, 9)
    expect(limit, 'the edge lies below them').toBeLessThan(85)
    const cooler = {
      ...hot,
      cooling: { ...hot.cooling, ambientTemperature: kelvin(limit! - 0.01) } as Stage['cooling'],
    }
    const accepted = part.indexOf(only[0]!)
    expect(alone(cooler, leaky([5, 8, 13, 21, 34, 55, 89, 144, 233, 377][accepted]!)).accepted).toBe(true)
    const lost = part.at(-1)!
    expect(lost).toMatchObject({ thermal: 'none', junction_c: null, stage_loss_w: null, ambient_margin_k: null })
    expect(reasonCodes(lost)).toEqual(['no-stable-temperature'])
  })

  it('recovery that does not fit its on-time rejects, and its loss is kept as a lower bound', () => {
    const slow = silicon({ id: 'slow', class: 'fast', recovery: [rampRow({ recoveryTime: 600e-9, charge: 2.5e-6 })] })
    const found = alone(
      stage({
        cooling: { kind: 'case', caseTemperature: kelvin(25) },
        input: { voltage: 40 },
        output: { voltage: 48, current: 1 },
        frequency: 300e3,
        inductor: { inductance: 100e-6 },
      }),
      slow,
    )
    const fit = found.reasons.find(({ code }) => code === 'recovery-too-slow')!
    const { current_a, slope_a_per_s, ta_s, tau_rr_s } = found.event!
    expect(fit.value, 'T1 + 3 tau_rr').toBeCloseTo(current_a / slope_a_per_s + ta_s + 3 * tau_rr_s!, 15)
    expect(fit.limit, 'the on-time').toBeCloseTo(found.point!.duty / 300e3, 15)
    expect(found.losses_w.total).toBeGreaterThan(0)
  })

  it('no thermal path rejects', () => {
    const bare = stage({ cooling: { kind: 'ambient', ambientTemperature: kelvin(25) } })
    expect(reasonCodes(alone(bare, silicon()))).toEqual(['thermal-path-missing'])
  })
})

describe('mains: every rule at minimum, nominal and maximum', () => {
  it('at_mains holds what solving the stage there gives', () => {
    const found = alone(mainsStage(), silicon())
    expect(found.at_mains!.map(({ mains_v }) => mains_v)).toEqual([230 * 0.9, 230, 230 * 1.1])
    found.at_mains!.forEach(({ mains_v, total_w, stage_loss_w, junction_c, thermal }) => {
      const there = alone(mainsStage({ input: { voltage: mains_v } }), silicon())
      expect(total_w, `total at ${mains_v} V`).toBeCloseTo(there.losses_w.total!, 5)
      expect(stage_loss_w, `stage loss at ${mains_v} V`).toBeCloseTo(there.stage_loss_w!, 5)
      expect(junction_c, `junction at ${mains_v} V`).toBeCloseTo(there.junction_c!, 4)
      expect(thermal).toBe(there.thermal)
    })
  })

  it('the junction at low mains rejects although the nominal one does not', () => {
    const low = alone(mainsStage({ input: { voltage: 207 } }), silicon()).junction_c!
    const nominal = alone(mainsStage(), silicon()).junction_c!
    const limit = kelvin((low + nominal) / 2)
    const found = alone(mainsStage({ limits: { junction: limit, voltageUse: 0.8 } }), silicon())
    expect(found).toMatchObject({ accepted: false, thermal: 'settled' })
    expect(found.reasons[0]!.code).toBe('junction-over-limit')
    expect(found.reasons[0]!.value).toBeCloseTo(low, 4)
  })

  it('no temperature at low mains rejects; what exists at nominal mains is kept', () => {
    const at = (sinkToAmbient: number) =>
      alone(
        mainsStage({
          input: { tolerance: 0.25 },
          cooling: { kind: 'sink', ambientTemperature: kelvin(40), sinkToAmbient, shared: false },
        }),
        silicon(),
      )
    const found = Array.from({ length: 60 }, (_, k) => at(4 + k)).find(
      ({ reasons, thermal }) => thermal !== 'none' && reasons.some(({ code }) => code === 'no-stable-temperature'),
    )
    expect(found, 'a sink between both').toBeDefined()
    expect(found!.accepted).toBe(false)
    expect(found!.at_mains![0]).toMatchObject({ thermal: 'none', total_w: null, junction_c: null })
    expect(found!.reasons.find(({ code }) => code === 'no-stable-temperature')!.value).toBeCloseTo(172.5, 9)
    expect(found!.junction_c).not.toBeNull()
  })

  it('the reverse voltage counts where the recovered current is largest: at low mains', () => {
    const at = mainsStage({ loopInductance: 60e-9 })
    const bare = silicon({ capacitance: null })
    const peak = (mains: number): number =>
      alone(mainsStage({ loopInductance: 60e-9, input: { voltage: mains, tolerance: 0 } }), bare).event!.peak_reverse_v
    expect(peak(207)).toBeGreaterThan(peak(253))
    expect(alone(at, bare).event!.peak_reverse_v).toBeCloseTo(peak(207), 3)
  })

  it('the event is that of the crest, and the mode too', () => {
    const { point, event, line } = alone(mainsStage(), silicon())
    expect(point!.mode).toBe('continuous')
    expect(event!.current_a).toBeCloseTo(point!.valley_a, 9)
    expect(line!.continuous_share).toBeGreaterThan(0.5)
    expect(line!.continuous_share).toBeLessThanOrEqual(1)
  })
})

describe('rejected parts', () => {
  it('never rank, have odds 0, keep interval and high junction, and never take a draw from the accepted', () => {
    const cheap = carbide({ id: 'cheap', ...rated(450) })
    const { candidates, verdict } = rank(stage(), [cheap, silicon()], settings(60))
    const [first, second] = candidates
    expect([first!.id, first!.rank, first!.odds_best]).toEqual(['silicon', 1, 1])
    expect(second).toMatchObject({ id: 'cheap', rank: null, odds_best: 0, odds_error: 0 })
    expect(second!.stage_loss_w).toBeLessThan(first!.stage_loss_w!)
    expect(second!.interval_w).not.toBeNull()
    expect(second!.junction_high_c).not.toBeNull()
    expect(verdict.best).toBe('silicon')
  })

  it('are listed by id after the accepted', () => {
    const ids = ['d', 'b', 'c'].map((id) => carbide({ id, ...rated(450) }))
    expect(ranked(stage(), ...ids, silicon()).candidates.map(({ id }) => id)).toEqual(['silicon', 'b', 'c', 'd'])
  })
})

it('equal losses rank by id', () => {
  expect(ranked(stage(), silicon({ id: 'b' }), silicon({ id: 'a' })).candidates.map(({ id }) => id)).toEqual(['a', 'b'])
})
