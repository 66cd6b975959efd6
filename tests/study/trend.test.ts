import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { Stage } from '../../src/domain/stage.ts'
import type { TrendQuantity, TrendResult } from '../../src/domain/study.ts'
import { StudyRefusal } from '../../src/domain/study-refusal.ts'
import { trend } from '../../src/study/trend.ts'
import { leakageRow, rampRow } from '../evidence/records.ts'
import { capacitive } from '../stage/by-hand.ts'
import { carbide, kelvin, mainsStage, silicon, stage } from '../stage/samples.ts'
import { linearPart, linearStage } from './linear-parts.ts'
import { alone, settings } from './settings.ts'

interface Axis {
  readonly over: TrendQuantity
  readonly from: number
  readonly to: number
  readonly steps?: number
  readonly logarithmic?: boolean
}

function along(at: Stage, records: readonly RectifierRecord[], axis: Axis, draws = 0): TrendResult {
  return trend(at, records, { steps: 7, logarithmic: false, ...axis }, settings(draws))
}

describe('crossings', () => {
  const low = linearPart('low', 0.9, 800e-12)
  const high = linearPart('high', 1.2, 200e-12)
  const costOf = (zeroBias: number): number => capacitive(zeroBias, 1, 0.5, 400).cost

  /** Both losses are lines over the frequency; a higher drop also raises the mean current's overlap a little. */
  function analytic(): number {
    const mean = (drop: number): number => (2.5 * (400 + drop)) / 200
    const perHertz = (drop: number, zeroBias: number): number =>
      costOf(zeroBias) + ((400 * mean(drop)) / 2) * (mean(drop) / 200e6 + 15e-9)
    return (2.5 * (1.2 - 0.9)) / (perHertz(0.9, 800e-12) - perHertz(1.2, 200e-12))
  }

  it('of two parts with losses linear in frequency: the analytic value, to 1e-6 of the axis', () => {
    for (const logarithmic of [false, true]) {
      const axis = { over: 'frequency', from: 20e3, to: 1e6, logarithmic } as const
      const { crossings } = along(linearStage, [low, high], axis)
      expect(crossings).toHaveLength(1)
      expect(crossings[0]).toMatchObject({ from: 'low', to: 'high' })
      // The by-hand capacitance integral has 1e-9 of error.
      expect(Math.abs(crossings[0]!.at - analytic()), 'crossing').toBeLessThan(1e-6 * (1e6 - 20e3))
    }
  })

  it('have an interval from the draws around them', () => {
    const axis = { over: 'frequency', from: 20e3, to: 1e6 } as const
    const [crossing] = along(linearStage, [low, high], axis, 100).crossings
    if (crossing!.low !== null) {
      expect(crossing!.low).toBeLessThan(crossing!.at)
      expect(crossing!.high!).toBeGreaterThan(crossing!.at)
    }
    const narrow = [low, high].map((part) => ({ ...part, forwardLine: { ...part.forwardLine!, spread: 0.002 } }))
    const [sure] = along(linearStage, narrow, axis, 100).crossings
    expect(sure!.low).toBeGreaterThan(0.8 * sure!.at)
    expect(sure!.low).toBeLessThan(sure!.at)
    expect(sure!.high).toBeGreaterThan(sure!.at)
  })

  it('a rejected part crosses nobody', () => {
    const weak = linearPart('weak', 1.2, 200e-12, {
      ratings: { reverseVoltage: 450, averageCurrent: 8, junction: kelvin(175) },
    })
    expect(along(linearStage, [low, weak], { over: 'frequency', from: 20e3, to: 1e6 }).crossings).toEqual([])
  })
})

describe('limits', () => {
  it('the ambient at which a part reaches its junction limit: ambient plus its margin', () => {
    const found = alone(stage(), silicon())
    const { limits } = along(stage(), [silicon()], { over: 'ambient', from: kelvin(20), to: kelvin(140) })
    const edge = limits.find(({ why }) => why === 'junction-over-limit')!
    expect(edge.at, 'in degrees Celsius').toBeCloseTo(40 + found.ambient_margin_k!, 3)
  })

  it('the frequency at which the junction limit is reached, against a bisection on rank', () => {
    const at = stage({ limits: { junction: kelvin(90), voltageUse: 0.8 } })
    const { limits } = along(at, [silicon()], { over: 'frequency', from: 50e3, to: 600e3 })
    const edge = limits.find(({ why }) => why === 'junction-over-limit')!.at
    const junctionAt = (frequency: number): number => alone({ ...at, frequency }, silicon()).junction_c!
    expect(junctionAt(edge)).toBeCloseTo(90, 3)
  })

  it('every point is what rank gives there', () => {
    const { points } = along(mainsStage(), [silicon()], { over: 'load', from: 0.2, to: 1, steps: 3 })
    points.forEach(({ at, candidates: [one] }) => {
      const there = alone(mainsStage({ output: { current: 2.5 * at } }), silicon())
      expect(one!.stage_loss_w, `load ${at}`).toBeCloseTo(there.stage_loss_w!, 6)
      expect(one!.efficiency, `load ${at}`).toBeCloseTo(there.efficiency!, 9)
      expect(one!.mode).toBe(there.point!.mode)
      expect(one!.accepted).toBe(there.accepted)
    })
  })
})

describe('over the slope', () => {
  const axis = { over: 'slope', from: 50e6, to: 4e9, steps: 12, logarithmic: true } as const
  const cool = stage({ cooling: { kind: 'case', caseTemperature: kelvin(50) } })
  const withSlope = (at: Stage, slope: number): Stage => ({
    ...at,
    switch: { ...at.switch, slope: { kind: 'given', slope } },
  })
  const turnOn = (at: Stage, slope: number, part = silicon()): number => {
    const { losses_w, switch: own } = alone(withSlope(at, slope), part)
    return own.turn_on_base_w! + losses_w.recovery_rectifier! + losses_w.recovery_switch!
  }

  it('the knee is the smallest slope within 5 % of the loss at the largest admissible one, by a dense scan', () => {
    const [study] = along(cool, [silicon()], axis).slope!
    const goal = 1.05 * turnOn(cool, study!.largest_a_per_s!)
    const scan = Array.from({ length: 240 }, (_, k) => 50e6 * 80 ** (k / 240))
    const knee = scan.find((slope) => turnOn(cool, slope) <= goal)!
    expect(study!.knee_a_per_s! / knee).toBeGreaterThan(80 ** (-1 / 240))
    expect(study!.knee_a_per_s! / knee).toBeLessThanOrEqual(1 + 1e-6)
    expect(turnOn(cool, study!.knee_a_per_s!) / goal).toBeCloseTo(1, 5)
  })

  it('the admissible edge set by the voltage, by a dense scan', () => {
    const part = silicon({ capacitance: null })
    const looped = stage({ cooling: cool.cooling, loopInductance: 12e-9 })
    const [least, most] = [50e6, 4e9].map((slope) => alone(withSlope(looped, slope), part).event!.peak_reverse_v)
    const tight = { ...looped, limits: { junction: null, voltageUse: (least! + most!) / 2 / 600 } }
    const [study] = along(tight, [part], axis).slope!
    expect(study!.largest_because).toBe('voltage')
    const edge = study!.largest_a_per_s!
    expect(alone(withSlope(tight, edge * (1 - 1e-5)), part).accepted).toBe(true)
    expect(alone(withSlope(tight, edge * (1 + 1e-5)), part).reasons.map(({ code }) => code)).toContain('voltage-margin')
    const now = alone(tight, part).stage_loss_w!
    expect(study!.gain_w).toBeCloseTo(now - alone(withSlope(tight, edge), part).stage_loss_w!, 4)
  })

  it('the admissible edge set by the loop is V/L_loop', () => {
    const wide = stage({ cooling: cool.cooling, loopInductance: 200e-9, limits: { junction: null, voltageUse: 1 } })
    const [study] = along(
      wide,
      [silicon({ capacitance: null, ratings: { reverseVoltage: 5000, averageCurrent: 8, junction: kelvin(175) } })],
      axis,
    ).slope!
    expect(study!.largest_because).toBe('loop')
    expect(study!.largest_a_per_s! / 2e9).toBeCloseTo(1, 5)
  })

  it('the lowest slopes being inadmissible hides nothing: the admissible range above them is found', () => {
    const warm = (kelvins: number): Stage =>
      stage({
        frequency: 200e3,
        cooling: { kind: 'sink', ambientTemperature: kelvin(40), sinkToAmbient: 1, shared: true },
        limits: { junction: kelvins, voltageUse: 0.8 },
      })
    const junction = (slope: number): number => alone(withSlope(warm(kelvin(170)), slope), silicon()).junction_c!
    const limit = (junction(50e6) + junction(150e6)) / 2
    expect(limit, 'slow turn-on heats the common sink').toBeLessThan(junction(50e6))
    const [study] = along(warm(kelvin(limit)), [silicon()], axis).slope!
    expect(study!.largest_a_per_s, 'largest admissible slope').toBeGreaterThan(150e6)
    expect(study!.knee_a_per_s, 'the knee lies within the admissible range').toBeGreaterThan(50e6)
    const never = along(warm(kelvin(41)), [silicon()], axis).slope![0]!
    expect(never).toMatchObject({
      largest_a_per_s: null,
      knee_a_per_s: null,
      largest_because: 'temperature',
      gain_w: null,
    })
  })

  it('a gate drive bounds I + I_RM, and what is gained counts from the slope that it gives', () => {
    const slope = {
      kind: 'gate',
      drive: 10,
      resistance: 60,
      inputCapacitance: 2e-9,
      transconductance: 1,
      threshold: 4,
      plateau: 6,
      sourceInductance: 0,
    } as const
    const gated = stage({ cooling: cool.cooling, switch: { slope } })
    const [study] = along(gated, [silicon()], { ...axis, from: 20e6 }).slope!
    expect(study!.largest_because).toBe('saturation')
    const { event } = alone(withSlope(gated, study!.largest_a_per_s!), silicon())
    expect(event!.current_a + event!.peak_reverse_a).toBeCloseTo(6, 3)
    const now = alone(gated, silicon()).stage_loss_w!
    expect(study!.gain_w).toBeCloseTo(
      now - alone(withSlope(gated, study!.largest_a_per_s!), silicon()).stage_loss_w!,
      4,
    )
    expect(study!.gain_w).toBeGreaterThan(0.01)
  })

  it('at a held temperature the turn-on loss never rises with the slope: no optimum is claimed', () => {
    const held = stage({ cooling: { kind: 'case', caseTemperature: kelvin(50) }, loopInductance: 0 })
    const part = silicon({ thermal: { kind: 'case', junctionToCase: 1e-6, caseToSink: 0 } })
    expect(along(held, [part], axis).slope![0]).toMatchObject({ optimum_a_per_s: null, largest_because: 'range' })
  })
})

describe('runaway', () => {
  it('the ambient edge of a leaking part is the published limit 1/(V (1 − d) c Rth)', () => {
    const part = linearPart('leaky', 0.5, 100e-12, {
      class: 'schottky',
      leakage: [leakageRow({ voltage: 400, current: 20e-3, junction: kelvin(100), grade: 'measured', spread: 0.001 })],
      thermal: { kind: 'case', junctionToCase: 3, caseToSink: 1 },
    })
    const at = stage({
      ...linearStage,
      limits: { junction: kelvin(150), voltageUse: 0.8 },
      cooling: { kind: 'sink', ambientTemperature: kelvin(20), sinkToAmbient: 6, shared: false },
      input: linearStage.input,
      output: linearStage.output,
      inductor: linearStage.inductor,
      switch: linearStage.switch,
    })
    const { limits } = along(at, [part], { over: 'ambient', from: kelvin(20), to: kelvin(140), steps: 13 })
    const edge = limits.find(({ why }) => why === 'no-stable-temperature')!.at
    const near = alone(
      { ...at, cooling: { ...at.cooling, ambientTemperature: kelvin(edge - 1e-4) } as Stage['cooling'] },
      part,
    )
    const { duty } = near.point!
    const current = near.losses_w.leakage! / (400 * duty)
    // c = d ln I_R/dT of the fitted part at the edge, by a difference of two temperatures far below it.
    const rth = 3 + 1 + 6
    const junction = near.junction_c! + 273.15
    const slopeOf = (): number => {
      const cooler = alone(
        { ...at, cooling: { ...at.cooling, ambientTemperature: kelvin(edge - 3) } as Stage['cooling'] },
        part,
      )
      const [one, two] = [current, cooler.losses_w.leakage! / (400 * cooler.point!.duty)]
      const activation = Math.log(one / two) / (1 / (cooler.junction_c! + 273.15) - 1 / junction)
      return activation / (junction * junction)
    }
    // Within 1e-4 K of the edge the junction is still a few hundredths of a kelvin below its limit.
    expect(current * 400 * duty * slopeOf() * rth).toBeCloseTo(1, 2)
  })
})

describe('bad ranges are refused', () => {
  it.each([
    [stage(), { over: 'frequency', from: 2e5, to: 1e5 }, 'range-reversed'],
    [stage(), { over: 'load', from: 0, to: 1, logarithmic: true }, 'range-outside'],
    [stage(), { over: 'input', from: 200, to: 500 }, 'range-outside'],
    [
      stage({ cooling: { kind: 'case', caseTemperature: 340 } }),
      { over: 'ambient', from: 300, to: 340 },
      'quantity-not-applicable',
    ],
    [stage({ candidates: ['nobody'] }), { over: 'load', from: 0.1, to: 1 }, 'no-candidate'],
  ] as const)('%#: %o', (at, axis, code) => {
    try {
      along(at, [silicon(), carbide()], axis)
      expect.unreachable('must be refused')
    } catch (refusal) {
      expect(refusal).toBeInstanceOf(StudyRefusal)
      expect((refusal as StudyRefusal).code).toBe(code)
    }
  })
})

it('what recovers slowly is marked extrapolated far from its rows', () => {
  const part = silicon({ recovery: [rampRow({ charge: 100e-9, recoveryTime: 40e-9 })] })
  const { points } = along(stage(), [part], { over: 'slope', from: 100e6, to: 4e9, steps: 2 })
  expect(points[1]!.candidates[0]!.extrapolated).toBe(true)
})
