import { describe, expect, it } from 'vitest'
import { reduceCapture } from '../../src/capture/reduce-capture.ts'
import type { CaptureSettings, ReducedCapture, Waveform } from '../../src/domain/capture.ts'
import { seededStream } from '../../src/numerics/seeded-stream.ts'
import { digitised, filtered, settingsFor } from './synthetic.ts'

/**
 * 0.5 A forward, 1 A reverse, a lifetime of 150 ns and a tail of 20 ns: by hand the plateau lasts
 * 150 ln(1.3) = 39.35 ns, and a quarter is reached 20 ln 4 = 27.73 ns later.
 */
const storage = 150 * Math.log(1.3)
const course = (t: number) => (t < 0 ? 0.5 : t < storage ? -1 : -Math.exp(-(t - storage) / 20))
const bandwidth = 0.35 / 1.5e-9
const grid = { start: -60e-9, interval: 1e-9, count: 240 }
const bench = { seed: 4, samplesPerRecovery: 0, bandwidth, noise: 0, offset: 0, bits: 9, before: 0, after: 0 }
/** Full scale is 1.2 times the swing of 1.5 A. */
const converter = (1.2 * 1.5) / 2 ** 9

function capture(change: Partial<typeof bench> = {}, drawn = course): Waveform {
  const amperes = filtered((time) => drawn(time * 1e9), bandwidth, grid)
  return { ...grid, current: digitised(amperes, { ...bench, ...change }, 'current'), voltage: null }
}

interface Asked {
  readonly settings?: Partial<CaptureSettings>
  readonly refits?: number
  readonly reference?: Waveform
}

function reduce(waveform: Waveform, { settings = {}, refits = 0, reference }: Asked = {}): ReducedCapture | null {
  const { uniform } = seededStream('small', 1)
  const all = settingsFor('step', { bandwidth, ...settings })
  return reduceCapture({ settings: all, waveform, reference: reference ?? null, uniform, refits })
}
const stepOf = (reduced: ReducedCapture | null) => {
  if (reduced?.figures.kind !== 'step') throw new Error(reduced?.figures.kind)
  return reduced.figures
}
const noneOf = (reduced: ReducedCapture | null) => {
  if (reduced?.figures.kind !== 'none-measurable') throw new Error(reduced?.figures.kind)
  return reduced.figures
}

describe('a small reversal', () => {
  it('is reduced to its truth, without a warning', () => {
    const reduced = reduce(capture())!
    const figures = stepOf(reduced)
    const truth = {
      current: 0.5,
      reverse: 1,
      storageTime: storage * 1e-9,
      until: 0.25,
      tailTime: 20e-9,
      lifetime: 150e-9,
    }
    for (const [name, value] of Object.entries(truth)) {
      const found = figures[name as keyof typeof truth]!
      expect(Math.abs(found / value - 1), name).toBeLessThan(0.04)
    }
    expect(figures.recoveryTime / ((storage + 20 * Math.log(4)) * 1e-9)).toBeCloseTo(1, 1.5)
    expect(reduced.caveats).toEqual([])
    expect(Object.keys(figures)).not.toContain('endDoubt')
  })

  it('has its voltage in the trace where there is one', () => {
    const waveform = capture()
    const voltage = waveform.current.map((value) => 7 - value)
    const { trace } = reduce({ ...waveform, voltage })!
    for (const [k, value] of trace.voltage!.entries()) expect(value).toBeCloseTo(7 - trace.current[k]!, 1)
  })

  it('that turns back at once has no storage time and no doubt of one', () => {
    const back = (t: number) => (t < 0 ? 0.5 : -1 * Math.exp(-t / 40))
    const reduced = reduce(capture({ noise: 0.002, bits: 0 }, back), { refits: 3 })!
    expect(stepOf(reduced).storageTime).toBeNull()
    expect(Object.keys(reduced.spread)).not.toContain('storageTime')
    expect(reduced.spread.recoveryTime!).toBeLessThan(0.1)
    // from tau I_F/TM: tau_rr (1 + I/I_F)
    expect(stepOf(reduced).lifetime / (40e-9 * 3)).toBeCloseTo(1, 1)
    expect(reduced.spread.lifetime!).toBeLessThan(0.1)
    expect(reduced.rowSpread).toBeLessThan(Math.hypot(0.03, reduced.spread.recoveryTime!) + 0.001)
  })

  it('says what is wrong with it', () => {
    const codes = (reduced: ReducedCapture | null) => reduced!.caveats.map(({ code }) => code)
    expect(codes(reduce(capture(), { settings: { device: { id: null, junction: null } } }))).toEqual([
      'junction-assumed',
    ])
    expect(codes(reduce(capture({ offset: 0.05 })))).toEqual(['residual-offset'])
  })
})

describe('the doubt without resampling', () => {
  it('has a step of the converter over the root of twelve in the currents', () => {
    const { spread, figures } = reduce(capture())!
    const step = converter / Math.sqrt(12)
    expect(spread.current! / (step / 0.5)).toBeCloseTo(1, 1)
    expect(spread.reverse! / (step / 1)).toBeCloseTo(1, 1)
    expect([spread.until, spread.tailTime]).toEqual([0, 0])
    expect(figures.kind).toBe('step')
  })

  it('has 15 % of the longer of edge and rise time in the times', () => {
    // the rise of 1.5 ns and the recorded edge of a jump, 2.2 time constants, are the same
    const { spread } = reduce(capture())!
    expect(spread.storageTime! / ((0.15 * 1.5) / storage)).toBeGreaterThan(0.9)
    expect(spread.storageTime! / ((0.15 * 1.5) / storage)).toBeLessThan(1.8)
    expect(spread.recoveryTime!).toBeLessThan(spread.storageTime!)
    expect(spread.recoveryTime!).toBeGreaterThan((0.14 * 1.5) / (storage + 28))
    // an instrument ten times slower than the edge, as stated
    const slow = reduce(capture(), { settings: { bandwidth: 0.35 / 6e-9 } })!
    expect(slow.spread.storageTime! / ((0.15 * 6) / (stepOf(slow).storageTime! * 1e9))).toBeCloseTo(1, 1)
  })

  it('has half the gap between the two lifetimes in the lifetime', () => {
    const reduced = reduce(capture())!
    // erf(sqrt(ts/tau)) = 1/3 at 0.304570: 424 ns against 150 ns
    const gap = 0.5 * Math.log(storage / 0.30457 ** 2 / 150)
    expect(reduced.spread.lifetime! / gap).toBeCloseTo(1, 1)
  })

  it('gives the row the larger of the two times, with the gain', () => {
    const { spread, rowSpread } = reduce(capture(), { settings: { bandwidth: 0.35 / 6e-9 } })!
    const largest = Math.max(spread.recoveryTime!, spread.storageTime!)
    expect(rowSpread).toBeGreaterThanOrEqual(Math.hypot(0.03, largest))
    expect(rowSpread).toBeLessThan(Math.hypot(0.03, largest) + 0.001)
  })
})

describe('the doubt by resampling', () => {
  it('of the plateaus is the noise over the root of their samples', () => {
    const noise = 0.01
    const { spread, noise: left } = reduce(capture({ noise, bits: 0 }), { refits: 12 })!
    // full scale 1.8 A; some 40 samples before the edge, the middle 20 of the reverse plateau
    const sigma = noise * 1.8
    expect(spread.current! / (sigma / Math.sqrt(40) / 0.5)).toBeGreaterThan(0.4)
    expect(spread.current! / (sigma / Math.sqrt(40) / 0.5)).toBeLessThan(2.5)
    expect(spread.reverse! / (sigma / Math.sqrt(20) / 1)).toBeGreaterThan(0.3)
    expect(spread.reverse! / (sigma / Math.sqrt(20) / 1)).toBeLessThan(3)
    expect(left / sigma).toBeCloseTo(1, 0.3)
    expect(spread.until).toBeGreaterThan(0)
    expect(spread.tailTime!).toBeGreaterThan(0)
    for (const name of ['storageTime', 'recoveryTime', 'tailTime']) expect(spread[name]!, name).toBeLessThan(0.2)
  })
})

describe('the trace of a reversal', () => {
  const traced = (change = {}) => reduce(capture(change))!.trace

  it('runs from four tenths of the plateau before the edge to six tail times after the corner', () => {
    const { time } = traced()
    const last = time[time.length - 1]!
    expect(time[0]! * 1e9).toBeGreaterThan(-0.4 * storage - 2 * 3)
    expect(time[0]! * 1e9).toBeLessThan(-0.4 * storage)
    expect(last * 1e9).toBeGreaterThan(storage + 110)
    expect(last * 1e9).toBeLessThan(storage + 125)
  })

  it('has its zero at the crossing and its currents from the baseline, with the fit on the samples', () => {
    for (const change of [{}, { offset: 0.05 }]) {
      const { time, current, fitted, voltage } = traced(change)
      const zero = current.findIndex((value) => value < 0)
      expect(Math.abs(time[zero]!)).toBeLessThan(1.5e-9)
      expect(current[0]!).toBeCloseTo(0.5, 1.5)
      expect(voltage).toBeNull()
      for (const [k, value] of fitted.entries()) expect(Math.abs(value - current[k]!), String(k)).toBeLessThan(0.05)
    }
  })
})

describe('a part without stored charge', () => {
  // 0.5 A falls to -0.3 A within 2 ns, and that is gone with 2 ns: some 0.7 nC
  const bare = (t: number) => (t < 0 ? 0.5 : t < 2 ? 0.5 - 0.4 * t : -0.3 * Math.exp(-(t - 2) / 2))
  const flowed = 0.3 * (0.3 / 0.4 / 2 + 2) * 1e-9

  it('is bounded by the charge that flowed, the noise, and what the shortest time may hide', () => {
    const reduced = reduce(capture({ noise: 0.002, bits: 0 }, bare))!
    const { fixture, current, peakReverseCurrent, chargeUpperBound, timeUpperBound } = noneOf(reduced)
    expect([fixture, reduced.rowSpread, reduced.spread]).toEqual(['step', 0, {}])
    expect(current).toBeCloseTo(0.5, 1.5)
    expect(peakReverseCurrent).toBeGreaterThan(0.15)
    expect(peakReverseCurrent).toBeLessThan(0.32)
    expect(chargeUpperBound).toBeGreaterThan(flowed)
    expect(chargeUpperBound).toBeLessThan(3 * flowed)
    expect(timeUpperBound).toBeGreaterThanOrEqual(2e-9)
    expect(timeUpperBound).toBeLessThan(6e-9)
  })

  it('is told by a reference whose own edge is as long as the reversal', () => {
    const shortest = 40
    const slow = (t: number) => (t < -shortest ? 0.5 : Math.max(-1, 0.5 - (1.5 * (t + shortest)) / shortest))
    const reference = capture({}, slow)
    const { timeUpperBound } = noneOf(reduce(capture(), { reference }))
    // eight tenths of its edge
    expect(timeUpperBound * 1e9).toBeGreaterThan(0.8 * shortest - 2)
    expect(reduce(capture(), { reference: capture() })!.figures.kind).toBe('step')
  })

  it('is one whose reverse current is below a fiftieth', () => {
    const small = (t: number) => (t < 0 ? 0.5 : -0.009 * Math.exp(-t / 60))
    expect(noneOf(reduce(capture({ noise: 0.0002, bits: 0 }, small))).peakReverseCurrent).toBeLessThan(0.012)
  })
})
