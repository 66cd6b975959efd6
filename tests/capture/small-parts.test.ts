import { describe, expect, it } from 'vitest'
import { generalCaveats } from '../../src/capture/general-caveats.ts'
import { allPositive, knownDoubts } from '../../src/capture/is-sound.ts'
import { chargedShare, lifetimeFromRamp } from '../../src/capture/lifetime-from-ramp.ts'
import { rowSpread } from '../../src/capture/row-spread.ts'
import { signOfVoltage } from '../../src/capture/sign-of-voltage.ts'
import { marksIn } from '../../src/capture/window-marks.ts'
import { contextOf, someEvent, waveformOf, windowOf } from './handmade.ts'

describe('sound figures', () => {
  it('are numbers above zero, every one', () => {
    expect(allPositive([1, 1e-30])).toBe(true)
    for (const bad of [0, -1, Number.NaN, Number.POSITIVE_INFINITY]) expect(allPositive([1, bad, 2])).toBe(false)
  })

  it('have doubts of at most 100 %, and of 100 % where none could be had', () => {
    expect(knownDoubts({ a: 0.2, b: 3, c: Number.NaN, d: Number.POSITIVE_INFINITY })).toEqual({
      a: 0.2,
      b: 1,
      c: 1,
      d: 1,
    })
  })
})

describe('the doubt of a row', () => {
  it('is the largest of its figures with 3 % of gain, rounded up to a tenth of a percent', () => {
    // sqrt(0.03^2 + 0.04^2) = 0.05 and sqrt(0.03^2 + 0.01^2) = 0.03162
    expect(rowSpread([0.01, 0.04, 0.02])).toBeCloseTo(0.05, 12)
    expect(rowSpread([0.01])).toBe(0.032)
  })

  it('never falls below that of the gain', () => {
    expect(rowSpread([0])).toBe(0.03)
    expect(rowSpread([])).toBe(0.03)
  })
})

describe('the sign of the voltage', () => {
  // conduction from 1 to 3, blocking from 5 to 7; what lies between and outside says nothing
  const event = { ...someEvent, first: 1, edge: 3, quarter: 5, last: 7 }
  const sign = (voltage: readonly number[] | null) =>
    signOfVoltage(contextOf({ event, waveform: waveformOf([], voltage) }))

  it('is that of the change from conduction to blocking', () => {
    expect(sign([-900, -1, -1, 0, 0, 90, 110, -900])).toBe(1)
    expect(sign([900, 1, 1, 0, 0, -90, -110, 900])).toBe(-1)
    expect(sign([0, 300, 340, 0, 0, 310, 300, 0])).toBe(-1)
  })

  it('is taken for right where there is no voltage, or none that moves', () => {
    expect(sign(null)).toBe(1)
    expect(sign([0, 2, 2, 0, 0, 2, 2, 0])).toBe(1)
  })

  it('compares means, however long the parts are', () => {
    const long = { ...someEvent, first: 0, edge: 6, quarter: 6, last: 8 }
    const voltage = [20, 20, 20, 20, 20, 20, 50, 50]
    expect(signOfVoltage(contextOf({ event: long, waveform: waveformOf([], voltage) }))).toBe(1)
  })
})

describe('the marks in an averaged window', () => {
  it('are the nearest averaged samples of the event', () => {
    // one sample per 2 units, the window starts at the capture's sample 6 and averages 4
    const waveform = { ...waveformOf([]), start: 100, interval: 2 }
    const window = windowOf({ start: 100 + 2 * 7.5, interval: 8, count: 20 }, () => 0)
    const event = { ...someEvent, edge: 9, crossing: 15, peak: 24, half: 40, quarter: 60 }
    // (k - 7.5)/4, rounded
    expect(marksIn(window, contextOf({ waveform, event }))).toEqual({
      edge: 0,
      crossing: 2,
      peak: 4,
      half: 8,
      quarter: 13,
      forward: 5,
      base: 0,
      lowest: -3,
    })
  })

  it('stay in the window, with the peak after the crossing and the quarter after the half', () => {
    const waveform = { ...waveformOf([]), start: 0, interval: 1 }
    const window = windowOf({ start: 10, interval: 4, count: 6 }, () => 0)
    const event = { ...someEvent, edge: 0, crossing: 18, peak: 19, half: 22, quarter: 23 }
    const { edge, crossing, peak, half, quarter } = marksIn(window, contextOf({ waveform, event }))
    expect([edge, crossing, peak, half, quarter]).toEqual([0, 2, 3, 3, 4])
    const late = marksIn(window, contextOf({ waveform, event: { ...event, edge: 99 } }))
    expect(late.edge).toBe(5)
  })
})

describe('caveats that need no fit', () => {
  const codes = (change: Parameters<typeof contextOf>[0], sign: 1 | -1 = 1) => generalCaveats(contextOf(change), sign)

  it('are none for an honest capture', () => {
    expect(codes({})).toEqual([])
  })

  it('name the channel that is upside down', () => {
    const turned = { ...someEvent, inverted: true }
    expect(codes({ event: turned })).toEqual([{ code: 'wrong-sign', data: { channel: 'current' } }])
    expect(codes({}, -1)).toEqual([{ code: 'wrong-sign', data: { channel: 'voltage' } }])
  })

  it('count the reversals', () => {
    expect(codes({ event: { ...someEvent, events: 2 } })).toEqual([{ code: 'several-events', data: { events: 2 } }])
  })

  it('say that a large reference is kept, on a ramp alone', () => {
    const fixture = { subtracted: false, edgeTime: 1e-9 }
    expect(codes({ fixture })).toEqual([{ code: 'reference-not-subtracted', data: {} }])
    expect(codes({ fixture, kind: 'step' })).toEqual([])
    expect(codes({ fixture: { ...fixture, subtracted: true } })).toEqual([])
  })

  it('say that the junction temperature is assumed', () => {
    expect(codes({ settings: { device: { id: null, junction: null } } })).toEqual([
      { code: 'junction-assumed', data: {} },
    ])
  })
})

describe('the lifetime of a commutation', () => {
  // worked by hand: 8 A, 200 A/us, tau 60 ns and TM 20 ns give ta = 26.8787 ns
  const figures = { current: 8, slope: 200e6, timeToPeak: 26.8787e-9, tailTime: 20e-9 }

  it('is the one that gives the measured time to the peak', () => {
    expect(lifetimeFromRamp(figures)! * 1e9).toBeCloseTo(60, 2)
  })

  it('is none where no lifetime gives that time, or a figure is none', () => {
    expect(lifetimeFromRamp({ ...figures, timeToPeak: 1e-15 })).toBeNull()
    for (const name of ['current', 'slope', 'timeToPeak', 'tailTime'] as const)
      expect(lifetimeFromRamp({ ...figures, [name]: 0 })).toBeNull()
  })

  it('is reached by the charge as 1 - exp(-t/tau)', () => {
    expect(chargedShare(60e-9, 60e-9)).toBeCloseTo(1 - Math.exp(-1), 12)
    expect(chargedShare(180e-9, 60e-9)).toBeCloseTo(0.9502, 4)
  })
})
