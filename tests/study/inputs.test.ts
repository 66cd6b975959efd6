import { describe, expect, it } from 'vitest'
import type { DutyPoint, Stage } from '../../src/domain/stage.ts'
import { doPartWork } from '../../src/study/part-work.ts'
import { swap } from '../../src/study/swap.ts'
import { trend } from '../../src/study/trend.ts'
import { leakageRow, rampRow } from '../evidence/records.ts'
import { carbide, kelvin, mainsStage, silicon, stage } from '../stage/samples.ts'
import { alone, ranked, reasonCodes, settings } from './settings.ts'

const year = (...inputs: readonly (number | null)[]): readonly DutyPoint[] =>
  inputs.map((input) => ({ load: 1, hours: 100, ambient: null, input }))

/** 24 V to 5 V; the year may bring more. */
const lowBuck = (dutyProfile: Stage['dutyProfile']) =>
  stage({
    kind: 'buck',
    input: { voltage: 24 },
    output: { voltage: 5, current: 5 },
    inductor: { inductance: 33e-6 },
    dutyProfile,
  })

const rated = (reverseVoltage: number, averageCurrent = 8) =>
  ({ class: 'schottky', ratings: { reverseVoltage, averageCurrent, junction: kelvin(150) } }) as const

describe('inputs of the duty profile', () => {
  it('the highest of them decides the voltage margin: a 40 V part in a stage of up to 100 V is rejected', () => {
    const part = carbide({ ...rated(40), leakage: [leakageRow({ voltage: 40, current: 1e-6, junction: kelvin(125) })] })
    const quiet = lowBuck(year(24, 12))
    expect(alone(quiet, part).accepted, 'at 24 V alone it may be used').toBe(true)
    const result = alone(lowBuck(year(null, 100)), part)
    expect(reasonCodes(result)).toContain('voltage-margin')
    expect(result.event!.peak_reverse_v).toBeGreaterThanOrEqual(100)
    expect(result.voltage_margin).toBeCloseTo(1 - result.event!.peak_reverse_v / 40, 12)
    expect(result.event!.blocking_v, 'the event itself stays that of the stage').toBe(24)
    const work = { stage: lowBuck(year(null, 100)), parts: [part], testRectifiers: [], seed: 1, draws: 0 }
    expect(doPartWork({ ...work, kind: 'screen' })[0]).toMatchObject({ rejected: 'voltage-margin' })
  })

  it('the peak there is what the same stage gives with that as its own input', () => {
    for (const kind of ['buck', 'inverting'] as const) {
      const own = (voltage: number, dutyProfile: Stage['dutyProfile']) =>
        stage({ kind, input: { voltage }, output: { voltage: 12, current: 4 }, dutyProfile })
      const peak = alone(own(100, null), silicon()).event!.peak_reverse_v
      expect(alone(own(48, year(24, 100, null)), silicon()).event!.peak_reverse_v).toBeCloseTo(peak, 6)
    }
  })

  it('the mean current of a buck is judged there too: it conducts longer', () => {
    const held = { dutyProfile: year(null, 100) }
    const at = (fields: Partial<Stage>) => ({ ...lowBuck(null), ...fields })
    const mean = (1 - 5 / 24) * 5 * 1.02
    const part = silicon({ ratings: { reverseVoltage: 600, averageCurrent: mean, junction: kelvin(175) } })
    expect(reasonCodes(alone(at({}), part))).not.toContain('average-current')
    expect(reasonCodes(alone(at(held), part))).toContain('average-current')
  })

  it('cautions know them: 24 V and a year with 100 V is a hazardous stage', () => {
    expect(ranked(lowBuck(year(24)), silicon()).cautions.map(({ code }) => code)).toEqual([])
    const { cautions } = ranked(lowBuck(year(24, 100)), silicon())
    expect(cautions.find(({ code }) => code === 'lethal-voltage')!.data).toMatchObject({ dc: 100, swing: 100 })
    const lowBoost = stage({ input: { voltage: 12 }, output: { voltage: 24, current: 1 }, dutyProfile: year(70) })
    expect(ranked(lowBoost, silicon()).cautions.map(({ code }) => code)).toContain('lethal-voltage')
    const mains = mainsStage({ dutyProfile: year(270) })
    const peak = ranked(mains, silicon()).cautions.find(({ code }) => code === 'mains-fed')!.data.peak
    expect(peak).toBeCloseTo(Math.SQRT2 * 270, 9)
    expect(alone(mains, silicon()).at_mains, 'the three of the mains').toHaveLength(3)
  })

  it('a trend over the input stands at each input alone, and is cautioned for the year', () => {
    const at = lowBuck(year(100))
    const request = { over: 'input', from: 12, to: 30, steps: 3, logarithmic: false } as const
    const { points, cautions } = trend(at, [silicon()], request, settings(0))
    const alonePeak = (voltage: number) =>
      alone({ ...lowBuck(null), input: { kind: 'dc', voltage } }, silicon()).event!.peak_reverse_v
    for (const { at: voltage, candidates } of points) {
      expect(candidates[0]!.peak_reverse_v).toBeCloseTo(alonePeak(voltage), 9)
    }
    expect(cautions.find(({ code }) => code === 'lethal-voltage')!.data.voltage).toBeGreaterThanOrEqual(100)
  })
})

describe('the worst over the mains', () => {
  const inputs = [0.9, 1, 1.1].map((factor) => 230 * factor)
  const held = (voltage: number) => mainsStage({ input: { voltage, tolerance: 0 } as Partial<Stage['input']> })

  it('the ambient margin is the least of the margins at each input', () => {
    const margins = inputs.map((voltage) => alone(held(voltage), silicon()).ambient_margin_k!)
    expect(margins[0], 'low mains is the hardest').toBeLessThan(margins[1]! - 1)
    expect(alone(mainsStage(), silicon()).ambient_margin_k).toBeCloseTo(Math.min(...margins), 3)
  })

  it('so is the ambient at which the new part of a swap runs away', () => {
    const leaky = carbide({
      ratings: { reverseVoltage: 650, averageCurrent: 8, junction: kelvin(150) },
      leakage: [leakageRow({ voltage: 600, current: 8e-3, junction: kelvin(125) })],
    })
    const edge = (at: Stage) =>
      swap(at, [silicon(), leaky], { from: 'silicon', to: 'carbide' }, settings(0)).runaway_ambient_c!
    const edges = inputs.map((voltage) => edge(held(voltage)))
    expect(edges[0]).toBeLessThan(edges[1]! - 1)
    expect(edge(mainsStage())).toBeCloseTo(Math.min(...edges), 3)
  })

  it('the peak of the maximum event is taken at the same inputs: never below that of the event', () => {
    const guaranteed = silicon({
      capacitance: null,
      recovery: [
        rampRow({ slope: 200e6, charge: 190e-9, peakReverseCurrent: 5.8, junction: kelvin(125) }),
        rampRow({ slope: 200e6, charge: 195e-9, peakReverseCurrent: 5.85, junction: kelvin(125), grade: 'maximum' }),
      ],
    })
    const buck = stage({
      kind: 'buck',
      input: { voltage: 48 },
      output: { voltage: 12, current: 4 },
      dutyProfile: year(100),
    })
    for (const at of [mainsStage(), buck]) {
      const { event, event_maximum: most } = alone(at, guaranteed)
      expect(most!.peak_reverse_v).toBeGreaterThanOrEqual(event!.peak_reverse_v)
      expect(most!.peak_reverse_v).toBeGreaterThan(at.kind === 'buck' ? 100 : 400)
    }
  })
})
