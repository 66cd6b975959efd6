import { describe, expect, it } from 'vitest'
import type { Cooling } from '../../src/domain/stage.ts'
import { ambientForJunction, lowestSettledJunction } from '../../src/stage/ambient-for-junction.ts'
import { evaluate } from '../../src/stage/evaluate.ts'
import { type Kernel, row } from '../../src/stage/kernel.ts'
import { settle } from '../../src/stage/thermal-balance.ts'
import { carbide, kelvin, kernelOf, leaky, silicon, sink, stage } from './samples.ts'
import { stabilityEdge } from './stability-edge.ts'

const onCase: Cooling = { kind: 'case', caseTemperature: kelvin(70) }

describe('a switch near running away by itself', () => {
  /** A case at 70 °C and a switch that only conducts: its heat grows by 0.6 % of its 25 °C value a kelvin. */
  function conducting(gain: number): { readonly kernel: Kernel; readonly power: () => number } {
    const at = stage({
      cooling: onCase,
      switch: { turnOff: null, storedEnergy: 0, voltageFall: 0, slope: { kind: 'given', slope: 1e14 } },
    })
    const kernel = kernelOf(at, carbide({ capacitance: null }))
    kernel.temperatures.fill(298.15)
    evaluate(kernel)
    kernel.thermal.switchSelf = gain / (0.006 * kernel.rows[row.switchConduction]!)
    return { kernel, power: () => kernel.rows[row.switchConduction]! + kernel.rows[row.turnOnBase]! }
  }

  it.each([0.3, 0.7, 0.8])('settles at a gain of %d, where its heat puts it', (gain) => {
    const { kernel, power } = conducting(gain)
    expect(ambientForJunction(kernel, 380)).not.toBeNaN()
    const { switchSelf } = kernel.thermal
    expect(kernel.temperatures[1]! - kelvin(70)).toBeGreaterThan(0)
    // The case of the search is the one that 380 K asks for.
    const reference = 380 - kernel.thermal.junctionSelf * kernel.rows[row.hotPart]!
    expect(kernel.temperatures[1]).toBeCloseTo(reference + switchSelf * power(), 5)
  })

  it.each([0.5, 0.75])('takes a handful of rounds at a gain of %d, where plain iteration takes dozens', (gain) => {
    const { kernel } = conducting(gain)
    // Two digits a round by the secant; 27 and 80 rounds to 1e-9 K without.
    expect(rounds(kernel, () => ambientForJunction(kernel, 380))).toBeLessThanOrEqual(8)
  })

  it('counts as without temperature above 1500 K, though its heat would balance there', () => {
    for (const [energy, there] of [
      [10.5e-3, true],
      [13.5e-3, false],
    ] as const) {
      const at = stage({ cooling: onCase, switch: { turnOff: { kind: 'energy', energy }, onResistancePerKelvin: 0 } })
      const kernel = kernelOf(at, silicon())
      kernel.thermal.switchSelf = 1
      expect(Number.isNaN(ambientForJunction(kernel, 380))).toBe(!there)
      if (there) expect(kernel.temperatures[1]).toBeGreaterThan(1300)
      kernel.thermal.reference = 300
      expect(settle(kernel)).toBe(there)
    }
  })

  it('has no temperature beyond a gain of 1', () => {
    expect(ambientForJunction(conducting(1.05).kernel, 380)).toBeNaN()
  })
})

/** Evaluations of the ledger that a call takes: the core loss is read once in each. */
function rounds(kernel: Kernel, call: () => void): number {
  let count = 0
  const counted = (): number => {
    count++
    return 2
  }
  Object.defineProperty(kernel, 'coreLoss', { configurable: true, get: counted })
  call()
  return count
}

describe('heat without a number', () => {
  const record = silicon({ forwardRecovery: { peak: 1e308, time: 100e-9, slope: 1e-9 } })

  it.each([1, 2])('is no rest: nothing settles with %d parts', (parts) => {
    for (const cooling of [sink(false, 1), { ...sink(false, 1), shared: true }, onCase]) {
      const kernel = kernelOf(stage({ cooling, parallel: { parts, imbalance: 0.1 * (parts - 1) } }), record)
      evaluate(kernel)
      expect(kernel.rows[row.hotPart]).toBe(Number.POSITIVE_INFINITY)
      expect(ambientForJunction(kernel, 380)).not.toBeGreaterThan(0)
      expect(settle(kernel)).toBe(false)
    }
  })
})

describe('a search that comes to where the switch has no temperature', () => {
  it('finds nothing there, though nothing had turned before', () => {
    const kernel = kernelOf(stage({ cooling: onCase, switch: { onResistance: 0.02 } }), silicon())
    const { reference, ceiling } = kernel.thermal
    // Far from its own root; its recovery heats the switch ever more.
    kernel.thermal.junctionSelf = 40
    kernel.thermal.switchSelf = 1
    while (!Number.isNaN(ambientForJunction(kernel, reference + 40))) kernel.thermal.switchSelf *= 1.01
    expect(ambientForJunction(kernel, reference)).not.toBeNaN()
    expect(reference + 40).toBeLessThan(ceiling)
    expect(lowestSettledJunction(kernel)).toBeNull()
    expect(settle(kernel)).toBe(false)
  })
})

describe('a stage that stops delivering as its switch warms up', () => {
  it('has no operating point, though it would start', () => {
    const at = (onResistance: number): Kernel =>
      kernelOf(
        stage({
          input: { voltage: 5 },
          output: { voltage: 12, current: 1.5 },
          inductor: { inductance: 60e-6 },
          switch: { onResistance },
        }),
        silicon(),
      )
    const starts = (onResistance: number): boolean => {
      const kernel = at(onResistance)
      evaluate(kernel)
      return kernel.delivers
    }
    let onResistance = 0.05
    while (starts(onResistance + 1e-3)) onResistance += 1e-3
    const kernel = at(onResistance)
    evaluate(kernel)
    expect(kernel.delivers).toBe(true)
    kernel.temperatures[1] = kelvin(150)
    evaluate(kernel)
    expect(kernel.delivers).toBe(false)
    expect(settle(kernel)).toBe(false)
  })
})

describe('a root a tenth of a millikelvin from the edge of stability', () => {
  it('is left to the bracketed search, for the fast route does not come to rest', () => {
    const at = stage({ cooling: sink(false, 0.5), parallel: { parts: 2, imbalance: 0.3 } })
    const kernel = kernelOf(at, leaky(10))
    const { surroundings } = stabilityEdge(kernel)
    kernel.thermal.reference = surroundings - 1e-4
    const taken = rounds(kernel, () => expect(settle(kernel)).toBe(true))
    expect(taken).toBeGreaterThan(100)
    expect(ambientForJunction(kernel, kernel.temperatures[0]!)).toBeCloseTo(surroundings - 1e-4, 6)
  })
})

describe('a root just below the end of the search', () => {
  it.each([
    [1, 30],
    [2, 30],
    [1, 8],
    [2, 8],
  ])('is found where the fast route would overshoot that end: %d parts, %d mA', (parts, milliamps) => {
    const at = stage({ cooling: sink(false, 3), parallel: { parts, imbalance: 0.2 } })
    const kernel = kernelOf(at, leaky(milliamps))
    const { junction, surroundings } = stabilityEdge(kernel)
    for (const below of [0.01, 0.5]) {
      kernel.thermal.reference = surroundings - below
      kernel.thermal.ceiling = junction + 0.3
      expect(settle(kernel)).toBe(true)
      expect(ambientForJunction(kernel, kernel.temperatures[0]!)).toBeCloseTo(surroundings - below, 5)
    }
  })
})
