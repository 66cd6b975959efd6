import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { Cooling, Stage } from '../../src/domain/stage.ts'
import { bookInstant } from '../../src/stage/book-instant.ts'
import { placeTemperatures } from '../../src/stage/evaluate.ts'
import { placeHeatInverse } from '../../src/stage/heat-inverse.ts'
import { placeSensitivity, sensitivity } from '../../src/stage/heat-sensitivity.ts'
import { type Kernel, row, switchPower } from '../../src/stage/kernel.ts'
import { leakageRow, rampRow } from '../evidence/records.ts'
import { carbide, kelvin, kernelOf, ledgerAt, onAir, silicon, stage } from './samples.ts'

/** Without ripple one current stands for the interval, and the charge of the recovery is built up. */
const steady = (fields: Parameters<typeof stage>[0] = {}): Stage =>
  stage({ ...fields, inductor: { inductance: 10, ...fields.inductor } })

/** Heat of rectifier and switch at two temperatures, at the currents of the last solution. [W] */
function heatAt(kernel: Kernel, junction: number, inSwitch: number): readonly [number, number] {
  kernel.temperatures.set([junction, inSwitch, junction])
  placeTemperatures(kernel)
  kernel.rows.fill(0)
  bookInstant(kernel, 1)
  return [kernel.rows[row.hotPart]!, switchPower(kernel.rows)]
}

/** The derivatives by central differences. [W/K] */
function differences(kernel: Kernel): { readonly rectifier: number; readonly switchBy: number; readonly own: number } {
  const [t, s] = [kernel.temperatures[0]!, kernel.temperatures[1]!]
  const rows = kernel.rows.slice()
  const h = 0.05
  const [above, below] = [heatAt(kernel, t + h, s), heatAt(kernel, t - h, s)]
  const [hotter, cooler] = [heatAt(kernel, t, s + h), heatAt(kernel, t, s - h)]
  kernel.temperatures.set([t, s, t])
  placeTemperatures(kernel)
  kernel.rows.set(rows)
  const by = (a: readonly [number, number], b: readonly [number, number], k: 0 | 1): number => (a[k] - b[k]) / (2 * h)
  return { rectifier: by(above, below, 0), switchBy: by(above, below, 1), own: by(hotter, cooler, 1) }
}

function expectNear(found: number, wanted: number, name: string, share = 2e-4): void {
  expect(Math.abs(found - wanted), `${name}: ${found} against ${wanted} W/K`).toBeLessThan(
    share * Math.abs(wanted) + 1e-9,
  )
}

function check(kernel: Kernel): void {
  const byHand = differences(kernel)
  placeSensitivity(kernel)
  expectNear(sensitivity.rectifier, byHand.rectifier, 'rectifier')
  expectNear(sensitivity.switchByRectifier, byHand.switchBy, 'switch by rectifier')
  expectNear(sensitivity.switchOwn, byHand.own, 'switch')
}

const leaky = (record: RectifierRecord): RectifierRecord => ({
  ...record,
  leakage: [leakageRow({ voltage: 600, current: 5e-3, junction: kelvin(125) })],
})

describe('the estimated sensitivities are the derivatives of the heat at held currents', () => {
  it.each([
    ['stored charge and leakage', steady(), leaky(silicon())],
    ['an immediate fall of the switch', steady({ switch: { voltageFall: 0 } }), silicon()],
    ['a slow fall of the switch', steady({ switch: { voltageFall: 90e-9 } }), silicon()],
    ['a slow turn-on', steady({ switch: { slope: { kind: 'given', slope: 20e6 } } }), silicon()],
    ['a given line without stored charge', steady(), leaky(carbide())],
    ['stored charge without leakage', steady(), silicon({ class: 'body-diode' })],
    ['a small current', steady({ output: { current: 0.3 } }), silicon({ capacitance: null })],
  ] as const)('%s', (_, at, part) => {
    const kernel = ledgerAt(kernelOf(at, part), 385)!
    check(kernel)
  })

  it('of a channel is its growth at 25 °C, without dead times', () => {
    const part = carbide({ channel: { onResistance: 0.3, perKelvin: 0.004 }, deadTime: { before: 0, after: 0 } })
    const kernel = ledgerAt(kernelOf(steady(), part), 298.15)!
    const { rectifier } = differences(kernel)
    placeSensitivity(kernel)
    expectNear(sensitivity.rectifier, rectifier, 'channel', 1e-3)
  })

  it('takes a share of a hundredth of the rating at least, and half the peak of a discontinuous period', () => {
    const light = ledgerAt(kernelOf(stage({ output: { current: 0.02 }, inductor: { inductance: 1 } }), silicon()), 380)!
    placeSensitivity(light)
    const c = light.coefficients
    const mean = light.rows[row.meanRectifierCurrent]!
    const leakage = (kernel: Kernel): number => (kernel.rows[row.leakage]! * kernel.coefficients[15]!) / 380 ** 2
    const share = light.instant.meanCurrent / 8
    expect(share).toBeLessThan(0.01)
    expect(light.hotEvent.outcome).toBe('hard')
    const drift = mean * (c[11]! + c[12]! * Math.log(0.01) + c[13]! * share)
    const conducted = light.rows[row.conduction]!
    const recovered = light.rows[row.recoveryRectifier]!
    // What is left is the recovery, whose logarithmic derivative lies between 0 and 4.
    const rest = (sensitivity.rectifier - drift - leakage(light)) * 380
    expect(rest).toBeGreaterThan(0)
    expect(rest).toBeLessThan(4 * recovered + 1e-9 * conducted)
    const idle = ledgerAt(kernelOf(stage({ inductor: { inductance: 20e-6 } }), silicon()), 380)!
    placeSensitivity(idle)
    const half = idle.instant.peak / 2 / 8
    const current = idle.rows[row.meanRectifierCurrent]!
    const slope = c[11]! + c[12]! * Math.log(half) + c[13]! * half
    expect(sensitivity.rectifier).toBeCloseTo(current * slope + leakage(idle), 12)
    expect(sensitivity.switchByRectifier).toBe(0)
  })

  it('of a residue that the idle time has left to its tail is not estimated', () => {
    const slow = silicon({ recovery: [rampRow({ charge: 900e-9, peakReverseCurrent: 9, junction: kelvin(125) })] })
    const kernel = ledgerAt(kernelOf(stage({ inductor: { inductance: 112e-6 } }), slow), 392)!
    expect(kernel.hotEvent.outcome).toBe('residual')
    expect(kernel.hotEvent.timeToPeak).toBe(0)
    placeSensitivity(kernel)
    expect(sensitivity.switchByRectifier).toBe(0)
    expect(Number.isFinite(sensitivity.rectifier)).toBe(true)
  })

  it('of a switch at the floor of its resistance is nothing', () => {
    const kernel = kernelOf(steady(), silicon())
    kernel.temperatures.set([380, 120, 380])
    ledgerAt(kernel, 380)
    kernel.temperatures[1] = 120
    placeSensitivity(kernel)
    expect(sensitivity.switchOwn).toBe(0)
  })
})

const sink = (shared: boolean): Cooling => ({ kind: 'sink', ambientTemperature: kelvin(40), sinkToAmbient: 1, shared })

/** 1 - d(targets)/dT of rectifier and switch, from the differences and the network (PHYSICS 5). */
function balanceMatrix(kernel: Kernel): readonly [number, number, number, number] {
  const { rectifier, switchBy, own } = differences(kernel)
  const { common, junctionSelf, switchSelf, rectifierOnSink, switchOnSink, switchSolved, factor } = kernel.thermal
  const on = (there: boolean, heat: number): number => (there ? heat : 0)
  const sinkBy = common * factor * (on(rectifierOnSink, rectifier) + on(switchOnSink, switchBy))
  const sinkByOwn = common * factor * on(switchOnSink, own)
  return [
    1 - on(rectifierOnSink, sinkBy) - junctionSelf * factor * rectifier,
    -on(rectifierOnSink && switchSolved, sinkByOwn),
    on(switchSolved, -sinkBy - switchSelf * factor * switchBy),
    switchSolved ? 1 - sinkByOwn - switchSelf * factor * own : 1,
  ]
}

const networks = [
  ['a shared sink', steady({ cooling: sink(true) }), silicon()],
  ['a sink of its own', steady({ cooling: sink(false) }), silicon()],
  ['a fixed case', steady({ cooling: { kind: 'case', caseTemperature: kelvin(70) } }), silicon()],
  ['air, beside a sink', steady({ cooling: sink(true) }), onAir],
] as const

describe('the first guess of the inverse', () => {
  it.each(networks)('inverts the balance of heat: %s', (_, at, part) => {
    const kernel = ledgerAt(kernelOf(at, part), 385)!
    kernel.thermal.factor = 1.3
    const [a, b, c, d] = balanceMatrix(kernel)
    const h = new Float64Array(9)
    const margin = placeHeatInverse(kernel, h)
    expect(margin).toBeGreaterThan(0.2)
    const products = [h[0]! * a + h[1]! * c, h[0]! * b + h[1]! * d, h[3]! * a + h[4]! * c, h[3]! * b + h[4]! * d]
    for (const [k, one] of [1, 0, 0, 1].entries()) expect(products[k]).toBeCloseTo(one, 4)
    expect([h[2], h[5], h[6], h[7], h[8]]).toEqual([0, 0, 0, 0, 1])
    expect(margin).toBeCloseTo(kernel.thermal.switchSolved ? Math.min(a, d, a * d - b * c) : a, 4)
  })

  it.each(networks)('steps plainly where the margin is small: %s', (_, at, part) => {
    const kernel = ledgerAt(kernelOf(at, leaky(part)), 385)!
    // Heat that answers to the temperature through a resistance twenty times as large.
    kernel.thermal.factor = 60
    const h = new Float64Array(9).fill(7)
    expect(placeHeatInverse(kernel, h)).toBeLessThan(0.2)
    expect([...h]).toEqual([1, 0, 0, 0, 1, 0, 0, 0, 1])
  })

  it('knows nothing of several parts', () => {
    const kernel = ledgerAt(kernelOf(steady({ parallel: { parts: 2, imbalance: 0 } }), silicon()), 385)!
    const h = new Float64Array(9).fill(7)
    expect(placeHeatInverse(kernel, h)).toBe(0)
    expect([...h]).toEqual([1, 0, 0, 0, 1, 0, 0, 0, 1])
  })
})
