import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { Stage } from '../../src/domain/stage.ts'
import { evaluate } from '../../src/stage/evaluate.ts'
import { type Kernel, row } from '../../src/stage/kernel.ts'
import { rampRow } from '../evidence/records.ts'
import { partRows } from './rows-by-hand.ts'
import { sampledMean } from './sampled-period.ts'
import { carbide, kelvin, kernelOf, silicon, stage } from './samples.ts'

/** Junctions of the hottest part, the switch and the others: all different. [K] */
const temperatures = [392, 371, 365] as const

function booked(at: Stage, part: RectifierRecord): Kernel {
  const kernel = kernelOf(at, part)
  // The posterior of these parts does not depend on the current; that of others does.
  kernel.coefficients[1] = 0.04
  kernel.coefficients[5] = -0.03
  kernel.temperatures.set(temperatures)
  evaluate(kernel)
  expect(kernel.delivers).toBe(true)
  return kernel
}

function expectRow(kernel: Kernel, key: keyof typeof row, wanted: number): void {
  const found = kernel.rows[row[key]]!
  // Midpoint sums of 4000 leave 1e-7, the corner of the small-current rule 1e-6.
  expect(Math.abs(found - wanted), `${key}: ${found} W against ${wanted} W`).toBeLessThan(
    2e-6 * Math.abs(wanted) + 1e-12,
  )
}

/** Every row of the ledger against sums over the period, part by part. */
function check(kernel: Kernel, slope: number): void {
  const hot = partRows(kernel, kernel.hot, temperatures[0], slope)
  const other = kernel.parts > 1 ? partRows(kernel, kernel.other, temperatures[2], slope) : null
  const others = kernel.parts - 1
  for (const key of [
    'conduction',
    'leakage',
    'capacitive',
    'recoveryRectifier',
    'recoverySwitch',
    'meanRectifierCurrent',
  ] as const)
    expectRow(kernel, key, hot[key] + (other === null ? 0 : others * other[key]))
  const heat = ({ conduction, leakage, recoveryRectifier }: typeof hot): number =>
    conduction + leakage + recoveryRectifier
  expectRow(kernel, 'hotPart', heat(hot))
  expectRow(kernel, 'otherPart', other === null ? 0 : heat(other))
  checkSwitch(kernel, slope)
}

function checkSwitch(kernel: Kernel, slope: number): void {
  const { instant, frequency: f, turnOff } = kernel
  const { valley, peak, duty, conductionShare, blockingVoltage: voltage } = instant
  const square = sampledMean(valley, peak, (i) => i * i)
  // 0.03 ohm at 25 °C and 0.6 % per kelvin.
  expectRow(kernel, 'switchConduction', square * duty * 0.03 * (1 + 0.006 * (temperatures[1] - 298.15)))
  expectRow(kernel, 'inductor', square * (duty + conductionShare) * 0.05 + 2)
  const rise = Math.max(valley, 0)
  expectRow(kernel, 'turnOnBase', 0.5 * voltage * rise * (rise / slope + 15e-9) * f)
  expectRow(kernel, 'turnOff', 0.5 * voltage * peak * (turnOff.voltageRise + turnOff.currentFall) * f)
  expectRow(kernel, 'stored', 2e-6 * f)
}

const slow = silicon({
  id: 'slow',
  class: 'fast',
  recovery: [rampRow({ charge: 900e-9, peakReverseCurrent: 9, junction: kelvin(125) })],
})
const kinds = {
  buck: { kind: 'buck', input: { voltage: 200 }, output: { voltage: 80, current: 6 } },
  boost: { kind: 'boost' },
  inverting: { kind: 'inverting', input: { voltage: 150 }, output: { voltage: 100, current: 4 } },
} as const

/** Inductance of the border between the modes with the slow part. [H] */
const besideBorder = { buck: 40.37e-6, boost: 117.3e-6, inverting: 44.99e-6 } as const

describe('the rows of one period are sums over it', () => {
  it.each(
    Object.values(kinds).flatMap((fields) =>
      [silicon(), slow, carbide()].flatMap((part) =>
        [1, 3].map((parts) => [fields.kind, part.id, parts, fields, part] as const),
      ),
    ),
  )('%s, %s, %d in parallel, continuous', (_, __, parts, fields, part) => {
    const kernel = booked(stage({ ...fields, parallel: { parts, imbalance: 0.2 } }), part)
    expect(kernel.instant.valley).toBeGreaterThan(0.5)
    check(kernel, 200e6)
  })

  it.each(
    Object.values(kinds).flatMap((fields) =>
      [slow, carbide()].flatMap((part) => [1, 2].map((parts) => [fields.kind, part.id, parts, fields, part] as const)),
    ),
  )('%s, %s, %d in parallel, discontinuous: what the idle time left over', (_, __, parts, fields, part) => {
    const inductance = besideBorder[fields.kind] * (parts === 1 ? 0.99 : 0.96)
    const kernel = booked(stage({ ...fields, parallel: { parts, imbalance: 0.2 }, inductor: { inductance } }), part)
    expect(kernel.instant.discontinuous).toBe(true)
    if (part.id === 'slow') expect(kernel.hotEvent.outcome).toBe('residual')
    check(kernel, 200e6)
  })

  it('a residue that has died out leaves the whole junction to be charged', () => {
    const kernel = booked(stage({ inductor: { inductance: 20e-6 } }), silicon())
    expect(kernel.hotEvent).toMatchObject({ outcome: 'residual-gone', charge: 0, peakReverseCurrent: 0, timeToPeak: 0 })
    check(kernel, 200e6)
  })
})

describe('the event of a period', () => {
  it('is that of the part, with share, slope, times and outcome', () => {
    const kernel = booked(stage({ parallel: { parts: 2, imbalance: 0.1 } }), silicon())
    const { event } = partRows(kernel, kernel.other, temperatures[2], 200e6)
    const found = kernel.otherEvent
    expect(found.outcome).toBe('hard')
    expect(found.current).toBeCloseTo(0.45 * kernel.instant.valley, 12)
    expect(found.slope).toBeCloseTo(0.45 * 200e6, 3)
    expect(found.timeToPeak / event.toPeak).toBeCloseTo(1, 9)
    expect(found.peakReverseCurrent / event.peak).toBeCloseTo(1, 9)
    expect(found.charge / event.charge).toBeCloseTo(1, 9)
    expect(kernel.otherEvent.storedCharge).toBeGreaterThan(0)
  })

  it('of a residue keeps its peak and charge, and no time where the junction is empty already', () => {
    const found = (share: number): Kernel =>
      booked(stage({ inductor: { inductance: besideBorder.boost * share } }), slow)
    for (const share of [0.99, 0.955]) {
      const kernel = found(share)
      const { event } = partRows(kernel, kernel.hot, temperatures[0], 200e6)
      expect(kernel.hotEvent.current).toBe(0)
      expect(kernel.hotEvent.peakReverseCurrent / event.peak).toBeCloseTo(1, 8)
      expect(kernel.hotEvent.charge / event.charge).toBeCloseTo(1, 8)
    }
    expect(found(0.955).hotEvent.timeToPeak).toBe(0)
    // At the turn-on the current flows backwards already, at the slope of its decay; from there it runs to the peak.
    const { instant, hotEvent } = found(0.99)
    const { peak, duty, conductionShare } = instant
    const flowing = (peak / conductionShare) * (1 - duty - conductionShare)
    expect((hotEvent.peakReverseCurrent - flowing) / 200e6 / hotEvent.timeToPeak).toBeCloseTo(1, 9)
  })

  it('of a part without stored charge is nothing at all', () => {
    expect(booked(stage(), carbide()).hotEvent).toMatchObject({
      outcome: 'no-stored-charge',
      storedCharge: 0,
      timeToPeak: 0,
      peakReverseCurrent: 0,
      charge: 0,
      tailShare: 0,
      rectifierEnergy: 0,
      switchAddedEnergy: 0,
    })
  })
})

describe('lifetimes outside any part are held where products stay finite', () => {
  it.each([
    [0, -80, 1e-18],
    [0, 20, 100],
  ])('coefficient %d at %d: %d s', (index, value, lifetime) => {
    const kernel = kernelOf(stage(), silicon())
    kernel.coefficients[index] = value
    evaluate(kernel)
    expect(kernel.hotEvent.lifetime / lifetime).toBeCloseTo(1, 9)
  })

  it('a tail of no less than e^-30 lifetimes', () => {
    const kernel = kernelOf(stage(), silicon())
    kernel.coefficients[4] = 60
    evaluate(kernel)
    expect(kernel.hotEvent.lifetime / kernel.hotEvent.tailTime / Math.exp(30)).toBeCloseTo(1, 9)
  })
})
