import { describe, expect, it } from 'vitest'
import { reduceCapture } from '../../src/capture/reduce-capture.ts'
import type { CaptureSettings, ReducedCapture, Waveform } from '../../src/domain/capture.ts'
import { seededStream } from '../../src/numerics/seeded-stream.ts'
import { handCourse } from './handmade.ts'
import { digitised, filtered, settingsFor } from './synthetic.ts'

/** The hand-made commutation in nanoseconds: 10 A, 1 A/ns, 6 A at 26 ns, a tail of 4 ns; 100 V from the peak on. */
const grid = { start: -20e-9, interval: 0.5e-9, count: 140 }
const bandwidth = 0.35 / 0.6e-9
const bench = { seed: 4, samplesPerRecovery: 0, bandwidth, noise: 0, offset: 0, bits: 9, before: 0, after: 0 }
/** Full scale is 1.2 times the swing of 16 A, as `digitised` sets it. */
const converter = (1.2 * 16) / 2 ** 9

function capture(change: Partial<typeof bench> = {}, course = handCourse): Waveform {
  const amperes = filtered((time) => course(time * 1e9), bandwidth, grid)
  const volts = filtered((time) => (time < 26e-9 ? 0 : Math.min(100, 20 * (time * 1e9 - 26))), bandwidth, grid)
  const used = { ...bench, ...change }
  return { ...grid, current: digitised(amperes, used, 'current'), voltage: digitised(volts, used, 'voltage') }
}

function reduce(waveform: Waveform, settings: Partial<CaptureSettings> = {}, refits = 0): ReducedCapture | null {
  const { uniform } = seededStream('small', 1)
  const all = settingsFor('ramp', { bandwidth, ...settings })
  return reduceCapture({ settings: all, waveform, reference: null, uniform, refits })
}
const rampOf = (reduced: ReducedCapture | null) => {
  if (reduced?.figures.kind !== 'ramp') throw new Error(reduced?.figures.kind)
  return reduced.figures
}

describe('a small commutation', () => {
  it('is reduced to its truth, without a warning', () => {
    const reduced = reduce(capture())
    const figures = rampOf(reduced)
    const truth = { current: 10, slope: 1e9, peakReverseCurrent: 6, timeToPeak: 6e-9, charge: 18e-9 + 0.98 * 24e-9 }
    for (const [name, value] of Object.entries(truth)) {
      const found = figures[name as keyof typeof truth]
      expect(Math.abs(found / value - 1), name).toBeLessThan(0.02)
    }
    expect(figures.chargeByEnd.map(({ end }) => end)).toEqual([0.02, 0.1, 0])
    expect(figures.voltage!).toBeCloseTo(100, 0)
    // 100 V x 6 A x 4 ns, less a rise of 5 ns: (1 - exp(-1.25))/1.25 of it
    expect(figures.energy! * 1e9).toBeCloseTo((2400 * (1 - Math.exp(-1.25))) / 1.25, -2.2)
    expect(reduced!.caveats).toEqual([])
    expect(Math.abs(reduced!.offset)).toBeLessThan(0.1)
  })

  it('has neither voltage nor energy without a channel for it', () => {
    const reduced = reduce({ ...capture(), voltage: null })
    expect([rampOf(reduced).voltage, rampOf(reduced).energy]).toEqual([null, null])
    expect(Object.keys(reduced!.spread)).not.toContain('energy')
    expect(Object.keys(reduced!.spread)).not.toContain('voltage')
    expect(reduced!.trace.voltage).toBeNull()
  })

  it('says what is wrong with its fixture and with its event', () => {
    const codes = (reduced: ReducedCapture | null) => reduced!.caveats.map(({ code }) => code)
    expect(codes(reduce(capture(), { device: { id: null, junction: null } }))).toEqual(['junction-assumed'])
    const late = (t: number) => handCourse(t)
    expect(codes(reduce(capture({ offset: 0.05 }, late)))).toEqual(['residual-offset'])
  })
})

describe('the doubt without resampling', () => {
  it('has a step of the converter over the root of twelve in every current', () => {
    const reduced = reduce(capture())
    const { current, peakReverseCurrent } = rampOf(reduced)
    const step = converter / Math.sqrt(12)
    expect(reduced!.spread.current! / (step / current)).toBeCloseTo(1, 1)
    expect(reduced!.spread.peakReverseCurrent!).toBeGreaterThan((0.9 * step) / peakReverseCurrent)
    expect(reduced!.spread.slope!).toBeGreaterThan((0.9 * step) / (current + peakReverseCurrent))
    // half the current's own rounding of 0.35/B/2.2 = 0.27 ns: 1 A/ns times that is some percent of 6 A
    expect(reduced!.spread.peakReverseCurrent!).toBeLessThan(0.05)
    expect(reduced!.spread.slope!).toBeLessThan(0.01)
  })

  it('has half of what lies beyond the stated end in the charge', () => {
    // a share s of the peak left is 24 s of 42 ns A
    const doubt = (chargeUntil: number) => reduce(capture(), { chargeUntil })!.spread.charge!
    const none = doubt(0)
    expect(none).toBeLessThan(0.03)
    for (const share of [0.02, 0.1, 0.25])
      expect(doubt(share) / Math.hypot(none, (0.5 * 24 * share) / 42), String(share)).toBeCloseTo(1, 1)
  })

  it('has a percent in the voltage, and a percent beside the charge in the energy', () => {
    const { spread } = reduce(capture())!
    expect(spread.voltage).toBe(0.01)
    expect(spread.energy!).toBeCloseTo(Math.hypot(spread.charge!, 0.01), 12)
  })

  it('is wider where the bandwidth is not stated', () => {
    const stated = reduce(capture())!.spread
    const unstated = reduce(capture(), { bandwidth: null })!.spread
    for (const name of ['peakReverseCurrent', 'timeToPeak']) {
      expect(unstated[name]!, name).toBeGreaterThan(stated[name]!)
      expect(unstated[name]!, name).toBeLessThan(0.3)
    }
  })

  it('gives the row the largest of time, charge and peak, with the gain', () => {
    const { spread, rowSpread } = reduce(capture(), { chargeUntil: 0.25 })!
    const largest = Math.max(spread.recoveryTime!, spread.charge!, spread.peakReverseCurrent!)
    expect(rowSpread).toBeGreaterThanOrEqual(Math.hypot(0.03, largest))
    expect(rowSpread).toBeLessThan(Math.hypot(0.03, largest) + 0.001)
  })
})

describe('the doubt by resampling', () => {
  it('of the current is the noise over the root of the samples of the plateau', () => {
    const noise = 0.01
    const reduced = reduce(capture({ noise, bits: 0 }), {}, 12)!
    // full scale 19.2 A; some 50 samples of the plateau up to a quarter of the ramp before it
    const wanted = (noise * 19.2) / Math.sqrt(50) / 10
    expect(reduced.spread.current! / wanted).toBeGreaterThan(0.4)
    expect(reduced.spread.current! / wanted).toBeLessThan(2.5)
    expect(reduced.noise / (noise * 19.2)).toBeCloseTo(1, 0.3)
    // a wild guess would be 1, a forgotten one 0
    for (const name of ['slope', 'peakReverseCurrent', 'timeToPeak', 'fallTime', 'recoveryTime', 'charge', 'softness'])
      expect(reduced.spread[name]!, name).toBeLessThan(0.3)
  })
})

describe('the trace of a commutation', () => {
  const traced = () => reduce(capture())!.trace

  it('runs from six tenths of the ramp before it to six tail times after the corner', () => {
    const { time } = traced()
    const last = time[time.length - 1]!
    expect(time[0]! * 1e9).toBeCloseTo(-10 - 6, -0.1)
    expect(last * 1e9).toBeCloseTo(6 + 24, -0.1)
  })

  it('has its zero at the crossing, and the fit on the samples', () => {
    const { time, current, fitted, voltage } = traced()
    const zero = current.findIndex((value) => value < 0)
    expect(Math.abs(time[zero]!)).toBeLessThan(1e-9)
    expect([current.length, fitted.length, voltage!.length]).toEqual([time.length, time.length, time.length])
    // the corners are rounded, so no more than 0.3 ns at 1 A/ns lie between
    for (const [k, value] of fitted.entries()) expect(Math.abs(value - current[k]!)).toBeLessThan(0.35)
    expect(voltage!.at(-1)! / 100).toBeCloseTo(1, 1)
    expect(Math.abs(voltage![0]!)).toBeLessThan(1)
  })

  it('is drawn from its baseline', () => {
    const { current, fitted } = reduce(capture({ offset: 0.05 }))!.trace
    expect(current[0]!).toBeCloseTo(10, 0.7)
    expect(fitted[0]!).toBeCloseTo(10, 0.7)
    expect(Math.abs(fitted.at(-1)!)).toBeLessThan(0.1)
  })
})

describe('nothing that can be measured', () => {
  it('is a reverse peak below a fiftieth of the current, bounded by what may hide below it', () => {
    const still = (t: number) => (t < 20.15 ? handCourse(t) : -0.15 * Math.exp(-(t - 20.15) / 4))
    const reduced = reduce(capture({ bits: 0, noise: 0.0005 }, still))!
    if (reduced.figures.kind !== 'none-measurable') throw new Error(reduced.figures.kind)
    const { fixture, current, peakReverseCurrent, chargeUpperBound, timeUpperBound } = reduced.figures
    expect([fixture, reduced.rowSpread, reduced.spread]).toEqual(['ramp', 0, {}])
    expect(current).toBeCloseTo(10, 1)
    expect(peakReverseCurrent).toBeGreaterThan(0.1)
    expect(peakReverseCurrent).toBeLessThan(0.3)
    expect(timeUpperBound).toBeGreaterThanOrEqual(1e-9)
    expect(chargeUpperBound).toBeGreaterThanOrEqual(0.5 * peakReverseCurrent * timeUpperBound)
  })

  it('is in a record of fewer than sixteen samples', () => {
    const short = capture()
    const cut = { ...short, current: short.current.slice(58, 58 + 72).filter((_, k) => k % 6 === 0), voltage: null }
    expect(reduce({ ...cut, interval: 3e-9 })).toBeNull()
  })
})
