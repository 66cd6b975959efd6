import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { Stage } from '../../src/domain/stage.ts'
import { evaluate } from '../../src/stage/evaluate.ts'
import { type Kernel, row } from '../../src/stage/kernel.ts'
import { holdStart, settle, settleFromHeld } from '../../src/stage/thermal-balance.ts'
import { leakageRow } from '../evidence/records.ts'
import { between, carbide, kelvin, kernelOf, mainsStage, silicon, stage } from './samples.ts'

/** Heat of one part with every junction at a temperature; NaN where the stage cannot deliver. [W] */
function heatAt(kernel: Kernel, junction: number): number {
  kernel.temperatures[0] = junction
  evaluate(kernel)
  return kernel.delivers ? kernel.rows[row.hotPart]! : Number.NaN
}

/** Lowest temperature at which T − T_ref − R_th P(T) turns from negative to positive, by a dense scan and bisection. */
function scannedRoot(kernel: Kernel): number | null {
  const { reference, junctionSelf, common, ceiling, rectifierOnSink } = kernel.thermal
  const resistance = junctionSelf + (rectifierOnSink ? common : 0)
  const excess = (t: number): number => t - reference - resistance * heatAt(kernel, t)
  const steps = 1500
  let before = reference
  for (let k = 1; k <= steps; k++) {
    const at = reference + ((ceiling - reference) * k) / steps
    if (excess(at) >= 0) {
      let [low, high] = [before, at]
      for (let round = 0; round < 60; round++) {
        const middle = (low + high) / 2
        if (excess(middle) >= 0) high = middle
        else low = middle
      }
      return high
    }
    before = at
  }
  return null
}

/** Holds a solution against the scan and returns its loop gain d(R_th P)/dT; null where neither finds one. */
function checkRoot(kernel: Kernel, found: number | null): number | null {
  const root = scannedRoot(kernel)
  expect(found === null, `scan: ${root} K, settled: ${found} K`).toBe(root === null)
  if (root === null || found === null) return null
  const slope = (heatAt(kernel, found + 0.01) - heatAt(kernel, found - 0.01)) / 0.02
  const { junctionSelf, common, rectifierOnSink } = kernel.thermal
  const gain = slope * (junctionSelf + (rectifierOnSink ? common : 0))
  expect(gain, 'stability: dP/dT below 1/Rth').toBeLessThan(1)
  // 1e-6 K of the solver, magnified where the balance is nearly tangent.
  expect(Math.abs(found - root), 'lowest root').toBeLessThan(1e-5 / (1 - gain))
  return gain
}

/** T ← T_ref + R_th P(T) until nothing moves (true) or a junction passes the search's end (false). */
function iterated(kernel: Kernel): boolean | 'slow' {
  const { thermal, temperatures, rows, parts } = kernel
  temperatures.fill(thermal.reference)
  for (let round = 0; round < 4000; round++) {
    evaluate(kernel)
    if (!kernel.delivers || temperatures[0]! > thermal.ceiling || temperatures[1]! > 1500) return false
    const inSwitch = [
      row.switchConduction,
      row.turnOnBase,
      row.turnOff,
      row.stored,
      row.recoverySwitch,
      row.capacitive,
    ].reduce((sum, k) => sum + rows[k]!, 0)
    const hot = rows[row.hotPart]!
    const other = rows[row.otherPart]!
    const sink = thermal.reference + thermal.common * (inSwitch + hot + (parts - 1) * other)
    const next = [
      sink + thermal.junctionSelf * hot,
      sink + thermal.switchSelf * inSwitch,
      sink + thermal.junctionSelf * other,
    ]
    const moved = Math.max(...next.map((t, k) => (k === 2 && parts === 1 ? 0 : Math.abs(t - temperatures[k]!))))
    temperatures.set(next)
    if (moved < 1e-8) return true
  }
  return 'slow'
}

const hotPart = (microamps: number): RectifierRecord =>
  carbide({
    id: 'leaky',
    class: 'schottky',
    ratings: { reverseVoltage: 600, averageCurrent: 20, junction: kelvin(150) },
    leakage: [leakageRow({ voltage: 600, current: microamps * 1e-6, junction: kelvin(100) })],
  })

const lone = (sink: number, ambient: number): Partial<Stage> => ({
  cooling: { kind: 'sink', ambientTemperature: kelvin(ambient), sinkToAmbient: sink, shared: false },
})

describe('the junction settles at the lowest root of the heat balance', () => {
  it.each([
    ['dc', (fields: Partial<Stage>) => stage(fields)],
    ['mains', (fields: Partial<Stage>) => mainsStage(fields)],
  ] as const)('%s: found by a dense scan from below, and stable there', (kind, make) => {
    const seen = { settled: 0, none: 0 }
    const drawn = fc.record({
      sink: between(0.5, 14),
      ambient: fc.integer({ min: 0, max: 90 }),
      leak: fc.integer({ min: 0, max: 400 }).map((k) => 10 ** (1 + k / 100)),
      stores: fc.boolean(),
    })
    fc.assert(
      fc.property(drawn, ({ sink, ambient, leak, stores }) => {
        const part = stores ? silicon() : hotPart(leak)
        const kernel = kernelOf(make(lone(sink, ambient)), part)
        const settled = settle(kernel)
        const found = settled ? kernel.temperatures[0]! : null
        if (checkRoot(kernel, found) === null) seen.none++
        else seen.settled++
      }),
      { seed: 3, numRuns: kind === 'dc' ? 60 : 16 },
    )
    expect(Math.min(seen.settled, seen.none), 'both outcomes met').toBeGreaterThan(0)
  })

  it('near the edge of running away too, on both sides of it', () => {
    const gains: number[] = []
    const drawn = fc.record({
      sink: between(0.5, 8),
      ambient: fc.integer({ min: 0, max: 60 }),
      short: between(0.001, 0.4),
    })
    fc.assert(
      fc.property(drawn, ({ sink, ambient, short }) => {
        const kernel = kernelOf(stage(lone(sink, ambient)), hotPart(100))
        const c = kernel.coefficients
        let [low, high] = [-20, 5]
        for (let round = 0; round < 30; round++) {
          c[14] = (low + high) / 2
          if (scannedRoot(kernel) === null) high = c[14]!
          else low = c[14]!
        }
        c[14] = low - short
        gains.push(checkRoot(kernel, settle(kernel) ? kernel.temperatures[0]! : null)!)
        c[14] = high + short
        expect(settle(kernel), 'no root above the edge').toBe(false)
      }),
      { seed: 5, numRuns: 12 },
    )
    expect(Math.max(...gains), 'a root close to the edge met').toBeGreaterThan(0.8)
  })

  it.each([
    ['dc', stage],
    ['mains', mainsStage],
  ] as const)('%s: a neighbouring solution as the start changes neither outcome nor root', (_, make) => {
    const seen = { settled: 0, none: 0 }
    const drawn = fc.record({
      sink: between(0.5, 10),
      leak: fc.integer({ min: 0, max: 300 }).map((k) => 10 ** (1 + k / 100)),
      shared: fc.boolean(),
      shifts: fc.array(between(-2.5, 2.5), { minLength: 6, maxLength: 6 }),
      stores: fc.boolean(),
    })
    fc.assert(
      fc.property(drawn, ({ sink, leak, shared, shifts, stores }) => {
        const cooling = { kind: 'sink', ambientTemperature: kelvin(50), sinkToAmbient: sink, shared } as const
        const kernel = kernelOf(make({ cooling }), stores ? silicon() : hotPart(leak))
        if (!settle(kernel)) return
        holdStart(kernel)
        const nominal = kernel.coefficients.slice()
        for (const shift of shifts) {
          kernel.coefficients.set(nominal)
          kernel.coefficients[stores ? 0 : 14]! += shift * (stores ? 0.5 : 1)
          kernel.coefficients[8]! *= 1 + shift / 20
          const near = settleFromHeld(kernel)
          const found = kernel.temperatures[0]!
          const below = settle(kernel)
          expect(near, 'one outcome').toBe(below)
          if (!below) seen.none++
          else {
            seen.settled++
            expect(Math.abs(found - kernel.temperatures[0]!), 'one root').toBeLessThan(1e-3)
          }
        }
      }),
      { seed: 4, numRuns: 60 },
    )
    expect(Math.min(seen.settled, seen.none), 'both outcomes met').toBeGreaterThan(5)
  })

  it('several junctions on one sink settle where plain iteration from below ends, or nowhere as it does', () => {
    const seen = { settled: 0, none: 0 }
    const drawn = fc.record({
      sink: between(0.3, 8),
      ambient: fc.integer({ min: 0, max: 80 }),
      leak: fc.integer({ min: 0, max: 400 }).map((k) => 10 ** (1 + k / 100)),
      parts: fc.integer({ min: 1, max: 3 }),
      stores: fc.boolean(),
    })
    fc.assert(
      fc.property(drawn, ({ sink, ambient, leak, parts, stores }) => {
        const cooling = {
          kind: 'sink',
          ambientTemperature: kelvin(ambient),
          sinkToAmbient: sink,
          shared: true,
        } as const
        const at = stage({ cooling, parallel: { parts, imbalance: parts > 1 ? 0.2 : 0 } })
        const kernel = kernelOf(at, stores ? silicon() : hotPart(leak))
        const settled = settle(kernel)
        const found = kernel.temperatures.slice()
        const ended = iterated(kernel)
        if (ended === 'slow') return
        expect(settled, 'one outcome').toBe(ended)
        if (!settled) {
          seen.none++
          return
        }
        seen.settled++
        const junctions = parts > 1 ? [0, 1, 2] : [0, 1]
        for (const k of junctions)
          expect(Math.abs(found[k]! - kernel.temperatures[k]!), `junction ${k}`).toBeLessThan(1e-3)
      }),
      { seed: 9, numRuns: 80 },
    )
    expect(Math.min(seen.settled, seen.none), 'both outcomes met').toBeGreaterThan(5)
  })
})
