import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { Stage } from '../../src/domain/stage.ts'
import { type Kernel, row } from '../../src/stage/kernel.ts'
import { rank } from '../../src/study/rank.ts'
import { place, rampRow } from '../evidence/records.ts'
import { between, carbide, kelvin, kernelOf, ledgerAt, mainsStage, silicon, stage } from '../stage/samples.ts'
import { anyRecord, anyStage } from '../study/random-studies.ts'
import { alone, ranked, settings } from '../study/settings.ts'

const slow = silicon({
  id: 'slow',
  class: 'fast',
  recovery: [rampRow({ charge: 900e-9, peakReverseCurrent: 9, junction: kelvin(125) })],
})
const bases = {
  buck: stage({ kind: 'buck', input: { voltage: 200 }, output: { voltage: 80, current: 6 } }),
  boost: stage(),
  inverting: stage({ kind: 'inverting', input: { voltage: 150 }, output: { voltage: 100, current: 4 } }),
  mains: mainsStage(),
} as const

/** The load at which the valley (of a mains stage: that of the crest) is zero. */
function borderLoad(at: Stage, record: RectifierRecord): number {
  let [low, high] = [0, 2]
  for (let round = 0; round < 70; round++) {
    const middle = (low + high) / 2
    if (valleyOf(rowsAt(at, record, middle))! < 0) low = middle
    else high = middle
  }
  return high
}

function withLoad(at: Stage, load: number): Stage {
  return { ...at, output: { ...at.output, current: at.output.current * load } }
}

function rowsAt(at: Stage, record: RectifierRecord, load: number): Kernel {
  return ledgerAt(kernelOf(withLoad(at, load), record), 380)!
}

const valleyOf = (kernel: Kernel): number => kernel.instant.continuousValley

function expectSame(one: Float64Array, other: Float64Array, share: number, law: string): void {
  for (const [name, index] of Object.entries(row)) {
    const scale = Math.max(Math.abs(one[index]!), 1e-3)
    expect(Math.abs(one[index]! - other[index]!), `${law}: row ${name}`).toBeLessThan(share * scale)
  }
}

describe('nothing jumps at the border of the modes', () => {
  const dc = [bases.buck, bases.boost, bases.inverting].flatMap((at) =>
    [silicon(), slow, carbide()].map((part) => [at.kind, part.id, at, part] as const),
  )
  it.each(dc)('%s, %s: driven through it by the load', (_, __, at, part) => {
    const load = borderLoad(at, part)
    const below = rowsAt(at, part, load * (1 - 1e-9)).rows.slice()
    const above = rowsAt(at, part, load * (1 + 1e-9))
    expect([valleyOf(above) >= 0, valleyOf(rowsAt(at, part, load * (1 - 1e-9))) < 0]).toEqual([true, true])
    // Next to the border the current of the event is a nanoampere and its charge moves with the square root of nothing.
    expectSame(below, above.rows, 1e-6, 'continuity over the load')
  })

  it.each(dc)('%s, %s: driven through it by the inductance', (_, __, at, part) => {
    const load = borderLoad(at, part)
    const rows = [1 - 1e-9, 1 + 1e-9].map((factor) => {
      const inductance = at.inductor.inductance * factor
      return rowsAt({ ...at, inductor: { ...at.inductor, inductance } }, part, load).rows.slice()
    })
    expectSame(rows[0]!, rows[1]!, 1e-6, 'continuity over the inductance')
  })

  it.each([silicon(), slow, carbide()])('mains, $id: the crest driven through it', (part) => {
    // As the crest leaves continuous conduction a panel of the quadrature vanishes: its width, not its height, is what is left.
    let [low, high] = [0.01, 1]
    for (let round = 0; round < 50; round++) {
      const middle = (low + high) / 2
      if (rowsAt(bases.mains, part, middle).line.continuousShare === 0) low = middle
      else high = middle
    }
    const below = rowsAt(bases.mains, part, low * (1 - 1e-7)).rows.slice()
    expectSame(below, rowsAt(bases.mains, part, high * (1 + 1e-7)).rows, 1e-2, 'continuity at the crest')
  })
})

describe('laws of the ledger', () => {
  it('the identity E_rectifier + E_switch = V (Qrr + I ta) holds on the event of the result', () => {
    const drawn = fc.record({
      kind: fc.constantFrom(bases.buck, bases.boost, bases.inverting, bases.mains),
      slope: between(50e6, 900e6),
      load: between(0.2, 1.5),
      fall: between(0, 100e-9),
    })
    fc.assert(
      fc.property(drawn, ({ kind, slope, load, fall }) => {
        const at = withLoad(
          { ...kind, switch: { ...kind.switch, slope: { kind: 'given', slope }, voltageFall: fall } },
          load,
        )
        const { event } = alone(at, silicon())
        if (event === null || event.none !== null) return
        const { rectifier_j, switch_added_j, blocking_v, qrr_c, current_a, ta_s } = event
        // Residual charge starts without forward current: its identity has no I ta.
        const bound = blocking_v * (qrr_c + current_a * ta_s)
        expect(Math.abs(rectifier_j + switch_added_j - bound), 'identity of the event').toBeLessThan(1e-13 * bound)
      }),
      { seed: 2, numRuns: 40 },
    )
  })

  it('a part without stored charge: recovery rows 0, capacitive row moved by nothing but frequency and voltage', () => {
    const drawn = fc.record({ slope: between(50e6, 900e6), load: between(0.05, 1.2), ambient: between(0, 80) })
    const rows = new Set<number>()
    fc.assert(
      fc.property(drawn, ({ slope, load, ambient }) => {
        const at = withLoad(
          stage({
            switch: { slope: { kind: 'given', slope } },
            cooling: { kind: 'sink', ambientTemperature: kelvin(ambient), sinkToAmbient: 1, shared: true },
          }),
          load,
        )
        const { losses_w, event } = alone(at, carbide())
        expect([losses_w.recovery_rectifier, losses_w.recovery_switch], 'recovery of a Schottky').toEqual([0, 0])
        expect(event, 'no stored charge, said so').toMatchObject({
          qrr_c: 0,
          peak_reverse_a: 0,
          ta_s: 0,
          trr_s: 0,
          rectifier_j: 0,
          switch_added_j: 0,
          base_j: 0,
          current_a: 0,
          tau_s: null,
          tau_rr_s: null,
          softness: null,
          none: expect.stringContaining('no stored charge'),
        })
        rows.add(losses_w.capacitive!)
      }),
      { seed: 2, numRuns: 25 },
    )
    expect(rows.size, 'the capacitive row never moved').toBe(1)
  })

  it('a long idle time leaves exactly nothing, and the reason is printed', () => {
    const { losses_w, event, point } = alone(withLoad(stage({ inductor: { inductance: 40e-6 } }), 0.05), silicon())
    expect(point!.mode).toBe('discontinuous')
    expect([losses_w.recovery_rectifier, losses_w.recovery_switch]).toEqual([0, 0])
    expect(event!.none).toContain('gone')
    expect(event!.tau_s).toBeGreaterThan(0)
  })

  it('residual charge stands in the event, which then has no forward current', () => {
    const { losses_w, event, point } = alone(withLoad(bases.boost, borderLoad(bases.boost, slow) * 0.98), slow)
    expect(point!.mode).toBe('discontinuous')
    expect(losses_w.recovery_rectifier).toBeGreaterThan(0)
    expect(event).toMatchObject({ none: null, current_a: 0, base_j: 0, softness: null })
    expect(event!.qrr_c).toBeGreaterThan(0)
  })
})

describe('order and seed', () => {
  it('candidates and their records may come in any order: the same bytes', () => {
    fc.assert(
      fc.property(
        anyStage,
        anyRecord('a'),
        anyRecord('b'),
        anyRecord('c'),
        fc.constantFrom([2, 0, 1], [1, 2, 0], [2, 1, 0]),
        (at, a, b, c, order) => {
          const parts = [a, b, c]
          const text = (records: readonly RectifierRecord[]): string => {
            try {
              return JSON.stringify(rank(at, records, settings(20)))
            } catch (refusal) {
              return (refusal as Error).message
            }
          }
          expect(text(order.map((k) => parts[k]!)), 'order independence').toBe(text(parts))
        },
      ),
      { seed: 8, numRuns: 8 },
    )
  })

  it('the company of other parts does not move a part', () => {
    const [mine] = rank(stage(), [silicon()], settings(50)).candidates
    const among = rank(stage(), [carbide(), silicon(), slow], settings(50)).candidates.find(
      ({ id }) => id === 'silicon',
    )!
    const own = ({ interval_w, junction_high_c, losses_w, provenance }: typeof among) => ({
      interval_w,
      junction_high_c,
      losses_w,
      provenance,
    })
    expect(own(among)).toEqual(own(mine!))
  })

  it('nominal figures do not move with seed and draws; the same seed gives the same bytes', () => {
    const at = (draws: number, seed: number) => rank(mainsStage(), [silicon(), carbide()], settings(draws, seed))
    expect(JSON.stringify(at(40, 3)), 'same seed').toBe(JSON.stringify(at(40, 3)))
    const nominal = (draws: number, seed: number) =>
      at(draws, seed).candidates.map(({ losses_w, stage_loss_w, junction_c, event, switch: part }) => ({
        losses_w,
        stage_loss_w,
        junction_c,
        event,
        part,
      }))
    expect(nominal(40, 3), 'another seed').toEqual(nominal(0, 1))
    expect(at(40, 3).warnings.filter(({ code }) => code !== 'thermal-lost')).toEqual(at(0, 1).warnings)
  })
})

describe('parts in parallel', () => {
  const linear = carbide({
    forwardLine: {
      place: place('line'),
      threshold: 0.9,
      resistance: 0.1,
      thresholdPerKelvin: 0,
      resistancePerKelvin: 0,
      junction: kelvin(25),
      grade: 'typical',
      spread: null,
      source: null,
    },
  })

  it('n equal parts are one part of n times the size', () => {
    const three = rowsAt(stage({ parallel: { parts: 3, imbalance: 0 } }), linear, 1).rows.slice()
    const line = { ...linear.forwardLine!, resistance: 0.1 / 3 }
    const large = carbide({
      forwardLine: line,
      capacitance: { kind: 'law', zeroBias: 1200e-12, builtIn: 1.2, grading: 0.46 },
    })
    const one = rowsAt(stage(), large, 1).rows
    for (const key of ['conduction', 'capacitive', 'switchConduction', 'turnOnBase', 'turnOff', 'inductor'] as const)
      expect(three[row[key]], `equal sharing: ${key}`).toBeCloseTo(one[row[key]]!, 9)
    expect(three[row.leakage], 'each part leaks').toBeCloseTo(3 * one[row.leakage]!, 12)
  })

  it('each of the n equal parts recovers from its share of current and slope', () => {
    const two = alone(stage({ parallel: { parts: 2, imbalance: 0 } }), silicon())
    expect(two.event!.current_a).toBeCloseTo(two.point!.valley_a / 2, 9)
    expect(two.event!.slope_a_per_s).toBeCloseTo(100e6, 3)
    const { rectifier_j, switch_added_j } = two.event!
    expect(two.losses_w.recovery_rectifier).toBeCloseTo(2 * rectifier_j * 100e3, 9)
    expect(two.losses_w.recovery_switch).toBeCloseTo(2 * switch_added_j * 100e3, 9)
  })

  it('10 % imbalance: the part that carries more is the hotter one, and the rows are those of unequal parts', () => {
    const even = alone(stage({ parallel: { parts: 2, imbalance: 0 } }), silicon())
    const uneven = alone(stage({ parallel: { parts: 2, imbalance: 0.1 } }), silicon())
    expect(uneven.junction_c, 'the hot part is hotter').toBeGreaterThan(even.junction_c!)
    expect(uneven.event!.current_a).toBeCloseTo(0.55 * uneven.point!.valley_a, 9)
    const kernel = rowsAt(stage({ parallel: { parts: 2, imbalance: 0.1 } }), linear, 1)
    const { valley, peak, conductionShare } = kernel.instant
    const square = (valley * valley + valley * peak + peak * peak) / 3
    const shares = 0.55 * 0.55 + 0.45 * 0.45
    expect(kernel.rows[row.conduction], 'conduction of unequal shares').toBeCloseTo(
      conductionShare * ((0.9 * (valley + peak)) / 2 + 0.1 * square * shares),
      6,
    )
  })
})

it('efficiency is output over output and everything booked', () => {
  const [part] = ranked(stage({ fixedLosses: 7 }), silicon()).candidates
  expect(part!.efficiency).toBeCloseTo(1000 / (1000 + part!.stage_loss_w!), 14)
})
