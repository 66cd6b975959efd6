import { describe, expect, it } from 'vitest'
import { storedChargePeakVoltage } from '../../src/models/peak-reverse-voltage.ts'
import type { Kernel } from '../../src/stage/kernel.ts'
import { solveLineInstant } from '../../src/stage/line-cycle.ts'
import {
  conductionModeOf,
  crestInstant,
  peakReverseVoltage,
  pointEvent,
  totalPeakReverseCurrent,
} from '../../src/stage/settled-point.ts'
import { capacitive } from './by-hand.ts'
import { eventOf } from './rows-by-hand.ts'
import { carbide, gateDrive, kernelOf, ledgerAt, mainsStage, silicon, stage } from './samples.ts'

const junction = 380
const at = (made: Parameters<typeof kernelOf>[0], part = silicon()): Kernel => ledgerAt(kernelOf(made, part), junction)!
const law = { kind: 'law', zeroBias: 150e-12, builtIn: 0.8, grading: 0.45 } as const

describe('the event that stands for a point', () => {
  it('of a dc stage is that of its period, of the hottest and of the other parts', () => {
    const kernel = at(stage({ parallel: { parts: 2, imbalance: 0.1 } }))
    const { instant, hot, other, slope, baseEnergy } = pointEvent(kernel)
    expect(instant).toEqual(kernel.instant)
    expect(slope).toBe(200e6)
    expect(hot.peakReverseCurrent / eventOf(kernel, 0.55, junction, slope).peak).toBeCloseTo(1, 9)
    expect(other.peakReverseCurrent / eventOf(kernel, 0.45, junction, slope).peak).toBeCloseTo(1, 9)
    expect(baseEnergy).toBeCloseTo(0.5 * 400 * instant.valley * (instant.valley / 200e6 + 15e-9), 15)
  })

  it('is a copy: the next solution does not change it', () => {
    const kernel = at(stage({ parallel: { parts: 2, imbalance: 0.1 } }))
    const point = pointEvent(kernel)
    expect(point.instant).not.toBe(kernel.instant)
    expect(point.hot).not.toBe(kernel.hotEvent)
    expect(point.other).not.toBe(kernel.otherEvent)
    const period = { ...kernel.instant }
    expect(crestInstant(kernel)).not.toBe(kernel.instant)
    expect(crestInstant(kernel)).toEqual(period)
  })

  it('takes the slope at the valley, at no current where there is none', () => {
    const body = silicon({ channel: { onResistance: 0.05, perKelvin: 0 }, deadTime: { before: 1e-7, after: 1e-7 } })
    const kernel = at(stage({ switch: { slope: gateDrive }, inductor: { inductance: 80e-6 } }), body)
    expect(kernel.instant.valley).toBeLessThan(0)
    expect(pointEvent(kernel).slope / ((15 * 8.5) / 55e-9)).toBeCloseTo(1, 12)
    const loaded = at(stage({ switch: { slope: gateDrive } }))
    kernel.turnOnSlope = 1
    const { slope, instant, hot } = pointEvent(loaded)
    expect(slope / ((15 * (8.5 - instant.valley / 30)) / 55e-9)).toBeCloseTo(1, 12)
    expect(hot.slope).toBe(slope)
  })

  it('of a mains stage is that of the crest', () => {
    const kernel = at(mainsStage())
    solveLineInstant(kernel, 0.3)
    const { instant, hot } = pointEvent(kernel)
    expect(instant.inputVoltage).toBeCloseTo(230 * Math.SQRT2, 10)
    expect(hot.current).toBe(instant.valley)
    solveLineInstant(kernel, 0.3)
    expect(crestInstant(kernel).inputVoltage).toBeCloseTo(230 * Math.SQRT2, 10)
  })

  it('of a mains stage with several parts holds the crest of the others too', () => {
    const kernel = at(mainsStage({ parallel: { parts: 2, imbalance: 0.1 } }))
    const { other, instant, slope } = pointEvent(kernel)
    solveLineInstant(kernel, 1)
    expect(other.current).toBeCloseTo(0.45 * instant.valley, 12)
    expect(other.peakReverseCurrent / eventOf(kernel, 0.45, junction, slope).peak).toBeCloseTo(1, 9)
  })

  it('of a mains stage without a valley anywhere is that of the crest too', () => {
    const kernel = at(mainsStage({ output: { current: 0.1 } }))
    const { instant } = pointEvent(kernel)
    expect(instant.discontinuous).toBe(true)
    expect(instant.inputVoltage).toBeCloseTo(230 * Math.SQRT2, 10)
  })

  it('takes the largest valley among the nodes where the crest alone has none', () => {
    const kernel = kernelOf(mainsStage({ output: { current: 0.9 } }), silicon())
    // No real part: its drop rises steeply near the crest, so that only there the current runs out.
    const crest = kernel.line.crestCurrent / 8
    kernel.coefficients.set([-4000, 0, 4000 / (0.99 * crest), 0, 0, 0], 8)
    kernel.hot.constant = -4000
    kernel.hot.logarithmic = 0
    kernel.hot.linear = 4000 / (0.99 * crest)
    kernel.inductance *= 0.45
    solveLineInstant(kernel, 1)
    expect(kernel.instant.discontinuous).toBe(true)
    const valleys = [...kernel.line.sine.subarray(0, kernel.line.count)].map((sine) => {
      solveLineInstant(kernel, sine)
      return kernel.instant.valley
    })
    const largest = Math.max(...valleys)
    expect(largest).toBeGreaterThan(0)
    const { instant } = pointEvent(kernel)
    expect(instant.valley).toBe(largest)
    expect(instant.inputVoltage).toBeCloseTo(kernel.line.sine[valleys.indexOf(largest)]! * 230 * Math.SQRT2, 10)
  })
})

describe('the label of a period', () => {
  const mode = (continuousValley: number, discontinuous: boolean): string =>
    conductionModeOf({ ...at(stage()).instant, meanCurrent: 5, continuousValley, discontinuous })

  it.each([
    [1, false, 'continuous'],
    [0.0501, false, 'continuous'],
    [0.05, false, 'boundary'],
    [0, false, 'boundary'],
    [-0.05, true, 'boundary'],
    [-0.0501, true, 'discontinuous'],
    [-2, false, 'continuous'],
  ] as const)('a continuous valley of %d A at a mean of 5 A, discontinuous %s: %s', (valley, discontinuous, label) => {
    expect(mode(valley, discontinuous)).toBe(label)
  })
})

describe('the peak reverse voltage', () => {
  it('adds the peaks of all parts', () => {
    for (const parts of [1, 2, 3]) {
      const kernel = at(stage({ parallel: { parts, imbalance: 0.1 } }))
      const event = pointEvent(kernel)
      const total = event.hot.peakReverseCurrent + (parts > 1 ? (parts - 1) * event.other.peakReverseCurrent : 0)
      expect(totalPeakReverseCurrent(kernel, event)).toBe(total)
    }
    const single = at(stage())
    const event = pointEvent(single)
    expect(totalPeakReverseCurrent(single, { ...event, other: { ...event.other, peakReverseCurrent: 5 } })).toBe(
      event.hot.peakReverseCurrent,
    )
  })

  it('is V + L I_RM/tau_rr of the stored charge where that is the larger', () => {
    const kernel = at(stage({ loopInductance: 60e-9, parallel: { parts: 2, imbalance: 0 } }))
    const event = pointEvent(kernel)
    const { peakReverseCurrent, tailTime } = event.hot
    const stored = 400 + (60e-9 * 2 * peakReverseCurrent) / tailTime
    expect(peakReverseVoltage(kernel, event, null)).toBeCloseTo(stored, 9)
    expect(storedChargePeakVoltage({ voltage: 400, loopInductance: 60e-9, peakReverseCurrent: 0, tailTime })).toBe(400)
  })

  it('is the ringing of the junction capacitance where that is the larger: all parts, from an immediate fall', () => {
    const kernel = at(stage({ switch: { voltageFall: 0 }, parallel: { parts: 2, imbalance: 0 } }), carbide())
    const event = pointEvent(kernel)
    const peak = peakReverseVoltage(kernel, event, law)
    // Undamped and from rest at 0 V the energy against V is back at 0: the integral of (v - V) C dv vanishes.
    const { charge, cost } = capacitive(150e-12, 0.8, 0.45, peak)
    const energy = peak * charge - cost
    expect(energy / (400 * charge)).toBeCloseTo(1, 5)
    expect(peakReverseVoltage(kernel, event, null)).toBe(400)
  })

  it('rings less with a fall of the switch, and at another time with more parts', () => {
    const peakOf = (voltageFall: number, parts: number): number => {
      const kernel = at(
        stage({ loopInductance: 30e-9, switch: { voltageFall }, parallel: { parts, imbalance: 0 } }),
        carbide(),
      )
      return peakReverseVoltage(kernel, pointEvent(kernel), law)
    }
    expect(peakOf(8e-9, 1)).toBeLessThan(peakOf(0, 1) - 1)
    expect(Math.abs(peakOf(8e-9, 1) - peakOf(8e-9, 4))).toBeGreaterThan(1)
  })

  it('is the blocking voltage without a loop', () => {
    const kernel = at(stage({ loopInductance: null }))
    expect(peakReverseVoltage(kernel, pointEvent(kernel), law)).toBe(400)
  })

  it('of the stored charge survives the weaker ringing', () => {
    const kernel = at(stage({ loopInductance: 200e-9, switch: { voltageFall: 3e-6 } }))
    const event = pointEvent(kernel)
    const stored = 400 + (200e-9 * event.hot.peakReverseCurrent) / event.hot.tailTime
    expect(stored).toBeGreaterThan(430)
    expect(peakReverseVoltage(kernel, event, law)).toBeCloseTo(stored, 9)
  })
})
