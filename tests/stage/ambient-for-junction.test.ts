import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import { ambientForJunction, highestBetween, lowestSettledJunction } from '../../src/stage/ambient-for-junction.ts'
import { type Kernel, row } from '../../src/stage/kernel.ts'
import { kelvin, kernelOf, leaky, mainsStage, onAir, silicon, sink, stage } from './samples.ts'
import { stabilityEdge } from './stability-edge.ts'

function switchHeat({ rows }: Kernel): number {
  const keys = ['switchConduction', 'turnOnBase', 'turnOff', 'stored', 'recoverySwitch', 'capacitive'] as const
  return keys.reduce((sum, key) => sum + rows[row[key]]!, 0)
}

/** Where the network of PHYSICS 5 puts junction, switch and others from a reference with the kernel's ledger. [K] */
function targets(kernel: Kernel, reference: number): readonly [number, number, number] {
  const { junctionSelf, common, switchSelf, rectifierOnSink, switchOnSink, factor } = kernel.thermal
  const [hot, other] = [kernel.rows[row.hotPart]!, kernel.rows[row.otherPart]!]
  const rectifiers = hot + (kernel.parts - 1) * other
  const heat = (rectifierOnSink ? rectifiers : 0) + (switchOnSink ? switchHeat(kernel) : 0)
  const onSink = reference + factor * common * heat
  const base = rectifierOnSink ? onSink : reference
  const own = factor * junctionSelf
  return [base + own * hot, onSink + factor * switchSelf * switchHeat(kernel), base + own * other]
}

describe('the surroundings behind a junction temperature', () => {
  it.each([
    ['a shared sink', stage({ cooling: sink(true) }), silicon()],
    ['a sink of its own', stage({ cooling: sink(false) }), silicon()],
    ['a fixed case', stage({ cooling: { kind: 'case', caseTemperature: kelvin(70) } }), silicon()],
    ['air, beside a sink', stage({ cooling: sink(true) }), onAir],
    ['air', stage({ cooling: { kind: 'ambient', ambientTemperature: kelvin(30) } }), onAir],
    ['two parts', stage({ cooling: sink(true), parallel: { parts: 2, imbalance: 0.2 } }), silicon()],
    [
      'three parts on a sink of their own',
      stage({ cooling: sink(false), parallel: { parts: 3, imbalance: 0.2 } }),
      silicon(),
    ],
    ['two parts in air', stage({ cooling: sink(true), parallel: { parts: 2, imbalance: 0.2 } }), onAir],
    ['the mains', mainsStage({ cooling: sink(true) }), silicon()],
  ] as const)('%s: the network puts every junction where it is', (_, at, part) => {
    const kernel = kernelOf(at, part)
    kernel.thermal.factor = 1.2
    for (const junction of [350, 400]) {
      const reference = ambientForJunction(kernel, junction)
      const [hot, inSwitch, other] = targets(kernel, reference)
      expect(kernel.temperatures[0]).toBe(junction)
      expect(hot).toBeCloseTo(junction, 7)
      if (kernel.thermal.switchSolved) expect(kernel.temperatures[1]).toBeCloseTo(inSwitch, 6)
      else expect(kernel.temperatures[1]).toBe(kelvin(100))
      if (kernel.parts > 1) expect(kernel.temperatures[2]).toBeCloseTo(other, 6)
    }
  })

  it('do not depend on where the last search ended', () => {
    const kernel = kernelOf(stage({ parallel: { parts: 2, imbalance: 0.2 } }), silicon())
    const first = ambientForJunction(kernel, 360)
    ambientForJunction(kernel, 420)
    expect(ambientForJunction(kernel, 360)).toBe(first)
  })

  it('take few rounds where the switch is the only unknown: the secant', () => {
    const kernel = kernelOf(stage({ switch: { onResistance: 0.12 } }), silicon())
    let rounds = 0
    // Read once in each evaluation of the ledger.
    Object.defineProperty(kernel, 'coreLoss', { get: () => ++rounds && 2 })
    for (const junction of [330, 360, 390, 420]) ambientForJunction(kernel, junction)
    expect(rounds).toBeLessThanOrEqual(4 * 6)
  })

  it('do not exist where the stage cannot deliver', () => {
    const kernel = kernelOf(
      stage({ input: { voltage: 5 }, output: { voltage: 12 }, switch: { onResistance: 3 } }),
      silicon(),
    )
    expect(ambientForJunction(kernel, 350)).toBeNaN()
  })

  it('do not exist where the switch has no temperature of its own', () => {
    // 2.5 A at 250 V and 0.25 ohm: some 2 W, +0.6 % a kelvin over 200 K/W, is more than it can shed.
    const at = stage({ switch: { onResistance: 0.25, thermal: { junctionToSink: 200, junctionLimit: null } } })
    expect(ambientForJunction(kernelOf(at, silicon()), 350)).toBeNaN()
  })

  it('do not exist with heat beyond all numbers', () => {
    const kernel = kernelOf(stage({ parallel: { parts: 2, imbalance: 0 } }), silicon())
    kernel.part.chargingCost = Number.POSITIVE_INFINITY
    expect(ambientForJunction(kernel, 350)).toBeNaN()
  })

  it('lie below absolute zero for a cold junction with much heat, and no other junction follows below 50 K', () => {
    const kernel = kernelOf(stage({ cooling: sink(true, 80), parallel: { parts: 2, imbalance: 0.2 } }), silicon())
    expect(ambientForJunction(kernel, 60)).toBeLessThan(-500)
    expect(kernel.temperatures[1]).toBeGreaterThanOrEqual(50)
    expect(kernel.temperatures[2]).toBeGreaterThanOrEqual(50)
    const colder = kernelOf(
      stage({ cooling: { kind: 'case', caseTemperature: 300 }, parallel: { parts: 2, imbalance: 0.8 } }),
      silicon(),
    )
    colder.thermal.junctionSelf = 40
    ambientForJunction(colder, 60)
    expect([colder.temperatures[1], colder.temperatures[2]]).toEqual([50, 50])
  })
})

describe('the lowest settled junction', () => {
  /** Surroundings over the junction temperature, densely; they do not depend on the kernel's own surroundings. */
  function curve(kernel: Kernel): readonly (readonly [number, number])[] {
    const { reference, ceiling } = kernel.thermal
    const steps = 150
    return Array.from({ length: steps + 1 }, (_, k) => {
      const junction = reference + ((ceiling - reference) * k) / steps
      return [junction, ambientForJunction(kernel, junction)] as const
    })
  }
  const at = (part: RectifierRecord, resistance = 3): Kernel =>
    kernelOf(stage({ cooling: sink(false, resistance) }), part)

  it('is on the rising branch of that curve, wherever the surroundings are', () => {
    for (const milliamps of [0.5, 30]) {
      const kernel = at(leaky(milliamps))
      const points = curve(kernel)
      const peak = points.reduce((best, point) => (point[1] > best[1] ? point : best))
      for (const [k, [junction, reference]] of points.entries()) {
        if (k % 7 !== 2 || junction > peak[0] - 0.5 || !(reference > 200)) continue
        kernel.thermal.reference = reference
        expect(lowestSettledJunction(kernel)).toBeCloseTo(junction, 5)
      }
    }
  })

  it('exists up to the maximum of that curve and not beyond', () => {
    for (const milliamps of [5, 12, 30]) {
      const kernel = at(leaky(milliamps))
      const { junction, surroundings } = stabilityEdge(kernel)
      expect(junction).toBeLessThan(kernel.thermal.ceiling - 1)
      kernel.thermal.reference = surroundings - 1e-3
      const found = lowestSettledJunction(kernel)
      expect(found).not.toBeNull()
      expect(found!).toBeLessThanOrEqual(junction)
      expect(ambientForJunction(kernel, found!)).toBeCloseTo(surroundings - 1e-3, 5)
      kernel.thermal.reference = surroundings + 1e-4
      expect(lowestSettledJunction(kernel)).toBeNull()
    }
  })

  it('may lie at the end of the search but not beyond it', () => {
    const kernel = at(silicon())
    const { ceiling } = kernel.thermal
    kernel.thermal.reference = ambientForJunction(kernel, ceiling - 0.01)
    expect(lowestSettledJunction(kernel)).toBeCloseTo(ceiling - 0.01, 5)
    kernel.thermal.reference = ambientForJunction(kernel, ceiling + 0.01)
    expect(lowestSettledJunction(kernel)).toBeNull()
  })

  it('does not exist in surroundings at or above the end of the search', () => {
    const kernel = at(silicon())
    for (const above of [0, 10]) {
      kernel.thermal.reference = kernel.thermal.ceiling + above
      expect(lowestSettledJunction(kernel)).toBeNull()
    }
  })

  it('does not exist where the stage does not deliver, at the surroundings or from some junction on', () => {
    const never = at(silicon())
    never.onResistance25 = 100
    expect(lowestSettledJunction(never)).toBeNull()
    // The switch shares the sink: beyond some junction it would have no temperature of its own.
    const later = kernelOf(stage({ cooling: sink(true, 30), switch: { onResistance: 0.15 } }), silicon())
    expect(ambientForJunction(later, later.thermal.reference)).not.toBeNaN()
    expect(lowestSettledJunction(later)).toBeNull()
  })
})

describe('the largest value between two ends', () => {
  it('is found inside, at the end of a rise and at the start of a fall', () => {
    const inside = highestBetween((x) => 5 - (x - 3) ** 2, 0, 10)
    expect(inside.at).toBeCloseTo(3, 6)
    expect(inside.value).toBeCloseTo(5, 12)
    const rising = highestBetween((x) => 2 * x, 0, 10)
    expect(rising).toEqual({ at: 10, value: 20 })
    const falling = highestBetween((x) => -x, 2, 10)
    expect(falling.at).toBeCloseTo(2, 6)
    expect(falling.value).toBe(-falling.at)
  })

  it('is found wherever it lies, in some forty values, and goes with its place', () => {
    for (const middle of [0.3, 2.2, 4.9, 6.1, 8.8, 9.9]) {
      let asked = 0
      const f = (x: number): number => {
        asked++
        return -Math.abs(x - middle)
      }
      const { at, value } = highestBetween(f, 0, 10)
      expect(at).toBeCloseTo(middle, 6)
      expect(value).toBe(-Math.abs(at - middle))
      expect(asked).toBeLessThan(46)
    }
  })
})
