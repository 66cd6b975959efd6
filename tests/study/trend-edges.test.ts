import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { Stage } from '../../src/domain/stage.ts'
import type { TrendRequest } from '../../src/domain/study.ts'
import { StudyRefusal } from '../../src/domain/study-refusal.ts'
import { limitWords } from '../../src/report/words/trend-words.ts'
import { trend } from '../../src/study/trend.ts'
import { forwardRow } from '../evidence/records.ts'
import { carbide, kelvin, mainsStage, silicon, stage } from '../stage/samples.ts'
import { linearPart } from './linear-parts.ts'
import { alone, reasonCodes, settings } from './settings.ts'

type Axis = Pick<TrendRequest, 'over' | 'from' | 'to'> & Partial<TrendRequest>

const along = (at: Stage, parts: readonly RectifierRecord[], axis: Axis) =>
  trend(at, parts, { steps: 2, logarithmic: false, ...axis }, settings(0))

describe('a crossing in a step of the axis in which a part becomes unusable', () => {
  const forward = [forwardRow({ current: 8, drop: 0.8 }), forwardRow({ current: 8, drop: 0.6, junction: kelvin(125) })]
  const slow = (junction = 175) =>
    silicon({ forward, ratings: { reverseVoltage: 600, averageCurrent: 8, junction: kelvin(junction) } })
  const flat = linearPart('flat', 4, 50e-12)
  const axis = { over: 'frequency', from: 10e3, to: 200e3 } as const
  const junctionAt = (frequency: number) => alone(stage({ frequency }), slow()).junction_c!
  const [crossing] = along(stage(), [slow(), flat], axis).crossings

  it('is found where both may still be used there', () => {
    const hottest = (junctionAt(crossing!.at) + junctionAt(axis.to)) / 2
    const limited = along(stage(), [slow(hottest), flat], axis)
    expect(limited.limits).toMatchObject([{ id: 'silicon', why: 'junction-over-limit' }])
    expect(limited.limits[0]!.at).toBeGreaterThan(crossing!.at)
    expect(limited.crossings).toMatchObject([{ from: 'silicon', to: 'flat', at: expect.closeTo(crossing!.at, 1) }])
  })

  it('is none where one may not: a rejected part crosses nobody', () => {
    const before = (junctionAt(crossing!.at) + junctionAt(axis.from)) / 2
    expect(along(stage(), [slow(before), flat], axis).crossings).toEqual([])
  })
})

describe('a stage that cannot deliver', () => {
  const weak = stage({
    loopInductance: 0,
    cooling: { kind: 'case', caseTemperature: kelvin(40) },
    switch: { onResistance: 20, onResistancePerKelvin: 0, thermal: null },
  })
  const result = along(weak, [silicon(), carbide()], { over: 'load', from: 0, to: 2, steps: 5 })

  it('says so by its own code and words, and names heat where heat takes the point first', () => {
    const [ofCarbide, ofSilicon] = ['carbide', 'silicon'].map((id) => result.limits.find((limit) => limit.id === id)!)
    expect(ofSilicon!.why).toBe('cannot-deliver')
    expect(ofCarbide!.why).toBe('no-stable-temperature')
    expect(limitWords(result, ofSilicon!)).toBe('cannot deliver the power')
    const loaded = (share: number) =>
      alone({ ...weak, output: { ...weak.output, current: 2.5 * ofSilicon!.at * share } }, silicon())
    expect(loaded(1 - 1e-6).point).not.toBeNull()
    expect(() => loaded(1 + 1e-3)).toThrow(StudyRefusal)
  })

  it('has no efficiency without a load', () => {
    const [unloaded, ...others] = result.points.map(({ candidates }) => candidates[0]!)
    expect(unloaded!.efficiency).toBeNull()
    expect(unloaded!.stage_loss_w).toBeGreaterThan(0)
    for (const { efficiency, stage_loss_w } of others) expect(efficiency === null).toBe(stage_loss_w === null)
  })
})

describe('the largest admissible slope', () => {
  const gate = {
    kind: 'gate',
    drive: 10,
    resistance: 60,
    inputCapacitance: 2e-9,
    transconductance: 1,
    threshold: 4,
    plateau: 6,
    sourceInductance: 0,
  } as const
  const cool = { kind: 'sink', ambientTemperature: kelvin(25), sinkToAmbient: 0.1, shared: false } as const

  it('counts the reverse current of every paralleled part against the saturation of the switch', () => {
    const gated = stage({
      cooling: cool,
      loopInductance: 0,
      switch: { slope: gate },
      parallel: { parts: 2, imbalance: 0 },
    })
    const [study] = along(gated, [silicon()], { over: 'slope', from: 20e6, to: 2e9, steps: 7 }).slope!
    expect(study!.largest_because).toBe('saturation')
    const slope = study!.largest_a_per_s!
    const one = alone({ ...gated, switch: { ...gated.switch, slope: { kind: 'given', slope } } }, silicon())
    expect(one.point!.valley_a + 2 * one.event!.peak_reverse_a).toBeCloseTo(6, 3)
  })

  it('is none where low mains has no stable temperature, whatever the nominal mains bears', () => {
    const at = mainsStage({
      input: { tolerance: 0.25 } as Partial<Stage['input']>,
      limits: { junction: kelvin(500), voltageUse: 0.8 },
      cooling: { kind: 'sink', ambientTemperature: kelvin(40), sinkToAmbient: 40, shared: false },
    })
    const part = silicon({ ratings: { reverseVoltage: 650, averageCurrent: 8, junction: kelvin(500) } })
    const here = alone(at, part)
    expect(here.point, 'nominal mains').not.toBeNull()
    expect(reasonCodes(here)).toContain('no-stable-temperature')
    const [study] = along(at, [part], { over: 'slope', from: 199e6, to: 201e6 }).slope!
    expect(study).toMatchObject({ largest_a_per_s: null, largest_because: 'temperature' })
  })
})
