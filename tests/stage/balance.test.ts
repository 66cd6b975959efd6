import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { Stage } from '../../src/domain/stage.ts'
import { ambientForJunction, lowestSettledJunction } from '../../src/stage/ambient-for-junction.ts'
import { type Kernel, row } from '../../src/stage/kernel.ts'
import { holdStart, refine, settle, settleFromHeld } from '../../src/stage/thermal-balance.ts'
import { kelvin, kernelOf, leaky, mainsStage, onAir, silicon, sink, stage } from './samples.ts'
import { stabilityEdge } from './stability-edge.ts'

/** How far the ledger in the kernel would move each solved junction through the network of PHYSICS 5. [K] */
function unrest(kernel: Kernel): number {
  const { reference, junctionSelf, common, switchSelf, rectifierOnSink, switchOnSink, switchSolved, factor } =
    kernel.thermal
  const { rows, temperatures: t, parts } = kernel
  const keys = ['switchConduction', 'turnOnBase', 'turnOff', 'stored', 'recoverySwitch', 'capacitive'] as const
  const inSwitch = keys.reduce((sum, key) => sum + rows[row[key]]!, 0)
  const [hot, other] = [rows[row.hotPart]!, rows[row.otherPart]!]
  const heat = (rectifierOnSink ? hot + (parts - 1) * other : 0) + (switchOnSink ? inSwitch : 0)
  const onSink = reference + factor * common * heat
  const base = rectifierOnSink ? onSink : reference
  return Math.max(
    Math.abs(base + factor * junctionSelf * hot - t[0]!),
    switchSolved ? Math.abs(onSink + factor * switchSelf * inSwitch - t[1]!) : 0,
    parts > 1 ? Math.abs(base + factor * junctionSelf * other - t[2]!) : 0,
  )
}

/** Evaluations of the ledger that a call takes: the core loss is read once in each. */
function rounds(kernel: Kernel, call: () => void): number {
  let count = 0
  const coreLoss = kernel.coreLoss
  const counted = (): number => {
    count++
    return coreLoss
  }
  Object.defineProperty(kernel, 'coreLoss', { configurable: true, get: counted })
  call()
  Object.defineProperty(kernel, 'coreLoss', { value: coreLoss, configurable: true, writable: true })
  return count
}

const cases: readonly (readonly [string, Stage, RectifierRecord])[] = [
  ['a shared sink', stage({ cooling: sink(true) }), silicon()],
  ['a sink of its own', stage({ cooling: sink(false) }), silicon()],
  ['a fixed case', stage({ cooling: { kind: 'case', caseTemperature: kelvin(70) } }), silicon()],
  ['air, beside a sink', stage({ cooling: sink(true) }), onAir],
  ['air', stage({ cooling: { kind: 'ambient', ambientTemperature: kelvin(30) } }), onAir],
  ['two parts', stage({ cooling: sink(true), parallel: { parts: 2, imbalance: 0.2 } }), silicon()],
  ['three parts in air', stage({ cooling: sink(true), parallel: { parts: 3, imbalance: 0.2 } }), onAir],
  ['much leakage', stage({ cooling: sink(true, 4) }), leaky(2)],
  ['the mains', mainsStage({ cooling: sink(true) }), silicon()],
  ['the mains, two parts', mainsStage({ cooling: sink(true), parallel: { parts: 2, imbalance: 0.2 } }), silicon()],
]
const make = (at: Stage, part: RectifierRecord): Kernel => {
  const kernel = kernelOf(at, part)
  kernel.thermal.factor = 1.2
  return kernel
}

describe('settling', () => {
  it.each(cases)('%s: ends at rest, in few rounds, where the bracketed search ends', (_, at, part) => {
    const kernel = make(at, part)
    const taken = rounds(kernel, () => expect(settle(kernel)).toBe(true))
    expect(unrest(kernel)).toBeLessThan(2e-6)
    expect(taken).toBeLessThanOrEqual(5)
    const settled = kernel.temperatures.slice()
    const slow = make(at, part)
    const junction = lowestSettledJunction(slow)!
    ambientForJunction(slow, junction)
    expect(settled[0]).toBeCloseTo(junction, 4)
    expect(settled[1]).toBeCloseTo(slow.temperatures[1]!, 4)
    if (kernel.parts > 1) expect(settled[2]).toBeCloseTo(slow.temperatures[2]!, 4)
  })

  it.each(cases)('%s: starts anew whatever stands in the kernel', (_, at, part) => {
    const kernel = make(at, part)
    settle(kernel)
    const rows = kernel.rows.slice()
    kernel.temperatures.set([450, kernel.thermal.switchSolved ? 440 : kernel.temperatures[1]!, 430])
    kernel.startCurrent = 30
    kernel.line.crestCurrent *= 3
    kernel.line.correction = 0.5
    settle(kernel)
    expect(kernel.rows).toEqual(rows)
  })

  it.each(['switch', 'rectifier'] as const)('carries the crest of the mains to rest too: %s', (hot) => {
    const kernel = make(hot === 'switch' ? mainsStage() : mainsStage({ cooling: sink(false, 6) }), silicon())
    settle(kernel)
    expect(Math.abs(kernel.line.correction)).toBeLessThan(1e-9)
    expect(kernel.line.bookedMean / 2.5).toBeCloseTo(1, 8)
  })

  it('finds a root so near the edge that the fast route does not reach it, and none beyond', () => {
    const found = [1e-3, 0.05].map((short) => {
      const kernel = kernelOf(stage({ cooling: sink(false, 3) }), leaky(12))
      const { surroundings: peak } = stabilityEdge(kernel)
      kernel.thermal.reference = peak - short
      expect(settle(kernel)).toBe(true)
      expect(unrest(kernel)).toBeLessThan(1e-5)
      const settled = kernel.temperatures[0]!
      kernel.thermal.reference = peak + 0.01
      expect(settle(kernel)).toBe(false)
      return settled
    })
    // The closer to the edge, the hotter.
    expect(found[0]).toBeGreaterThan(found[1]!)
  })

  it('says no where the stage does not deliver, cold or from some temperature on', () => {
    expect(settle(kernelOf(stage({ switch: { onResistance: 60 } }), silicon()))).toBe(false)
    expect(settle(kernelOf(mainsStage({ switch: { onResistance: 60 } }), silicon()))).toBe(false)
    const later = kernelOf(stage({ cooling: sink(true, 30), switch: { onResistance: 0.15 } }), silicon())
    expect(settle(later)).toBe(false)
  })

  it('lets a switch be hotter than any rectifier may be', () => {
    const at = stage({ switch: { thermal: { junctionToSink: 30, junctionLimit: null } } })
    const kernel = kernelOf(at, silicon())
    expect(settle(kernel)).toBe(true)
    expect(kernel.temperatures[1]).toBeGreaterThan(kernel.thermal.ceiling)
    expect(unrest(kernel)).toBeLessThan(2e-6)
  })

  it('finds a junction up to the end of the search and none beyond it', () => {
    const kernel = kernelOf(stage({ cooling: sink(false) }), silicon())
    const { ceiling } = kernel.thermal
    for (const [above, outcome] of [
      [-0.01, true],
      [0.01, false],
    ] as const) {
      kernel.thermal.reference = ambientForJunction(kernel, ceiling + above)
      expect(settle(kernel)).toBe(outcome)
    }
  })
})

describe('refining', () => {
  it.each(cases)('%s: goes on until rounding alone is left', (_, at, part) => {
    const kernel = make(at, part)
    settle(kernel)
    const settled = kernel.temperatures.slice()
    const taken = rounds(kernel, () => refine(kernel))
    expect(unrest(kernel)).toBeLessThan(2e-12 * settled[0]! * 4)
    expect(Math.abs(kernel.line.correction)).toBeLessThan(1e-14)
    expect(taken).toBeLessThan(12)
    for (const k of [0, 1, 2]) expect(kernel.temperatures[k]).toBeCloseTo(settled[k]!, 5)
  })

  it('leaves a point that it cannot better where it is', () => {
    const kernel = make(...(cases[0]!.slice(1) as [Stage, RectifierRecord]))
    settle(kernel)
    refine(kernel)
    const [temperatures, rows] = [kernel.temperatures.slice(), kernel.rows.slice()]
    refine(kernel)
    for (const k of [0, 1]) expect(kernel.temperatures[k]).toBeCloseTo(temperatures[k]!, 11)
    for (const [k, watts] of rows.entries()) expect(kernel.rows[k]).toBeCloseTo(watts, 11)
  })

  it('takes two ways to one point: from below and from a neighbour', () => {
    for (const [, at, part] of cases) {
      const below = make(at, part)
      settle(below)
      refine(below)
      const near = make(at, part)
      near.thermal.factor = 1
      settle(near)
      holdStart(near)
      near.thermal.factor = 1.2
      settleFromHeld(near)
      refine(near)
      for (const k of [0, 1]) expect(near.temperatures[k]).toBeCloseTo(below.temperatures[k]!, 10)
      expect(near.line.crestCurrent).toBeCloseTo(below.line.crestCurrent, 11)
    }
  })
})

describe('settling from a held neighbour', () => {
  it.each(cases)('%s: takes fewer rounds to the same point', (_, at, part) => {
    const kernel = make(at, part)
    settle(kernel)
    const settled = kernel.temperatures.slice()
    const from = rounds(kernel, () => settle(kernel))
    holdStart(kernel)
    kernel.thermal.factor = 1.19
    settle(kernel)
    kernel.thermal.factor = 1.2
    kernel.temperatures.fill(300)
    kernel.startCurrent = 0
    kernel.line.crestCurrent = 1
    kernel.line.correction = 3
    const taken = rounds(kernel, () => expect(settleFromHeld(kernel)).toBe(true))
    for (const k of [0, 1]) expect(kernel.temperatures[k]).toBeCloseTo(settled[k]!, 4)
    // Several parts are always settled from below; else the held point is at rest and asks for one evaluation.
    expect(taken).toBe(kernel.parts > 1 ? from : 1)
  })

  it('never takes the upper of two roots for the lowest', () => {
    const kernel = kernelOf(stage({ cooling: sink(false, 3) }), leaky(12))
    expect(settle(kernel)).toBe(true)
    const lowest = kernel.temperatures[0]!
    let upper = lowest + 1
    while (ambientForJunction(kernel, upper) > kernel.thermal.reference) upper += 0.05
    expect(upper).toBeLessThan(kernel.thermal.ceiling)
    ambientForJunction(kernel, upper - 0.03)
    holdStart(kernel)
    expect(settleFromHeld(kernel)).toBe(true)
    expect(kernel.temperatures[0]).toBeCloseTo(lowest, 4)
  })
})
