import { describe, expect, it } from 'vitest'
import type { FittedRamp } from '../../src/capture/fit-ramp.ts'
import { rampDefects } from '../../src/capture/ramp-defects.ts'
import type { RampFigures } from '../../src/capture/ramp-figures.ts'
import type { RecoveryEnergy } from '../../src/capture/recovery-energy.ts'
import type { CaptureSettings } from '../../src/domain/capture.ts'
import { contextOf, handCorner, handCourse, handCurve, handRamp, someEvent, windowOf } from './handmade.ts'

const grid = { start: 0, interval: 0.25, count: 240 }
const energy: RecoveryEnergy = { voltage: 100, energy: 1, conducting: 0 }
const figures: RampFigures = {
  current: 10,
  slope: 1,
  peakReverseCurrent: 6,
  timeToPeak: 6,
  recoveryTime: 14,
  fallTime: 8,
  charge: 40,
  chargeByEnd: [],
  softness: 1,
  softnessBySlopes: 1,
  endDoubt: 0,
}
/** Straight rise of the voltage to 100 V from `start` on. */
const risingFrom = (start: number) => (t: number) => 100 * Math.min(1, Math.max(0, (t - start) / 20))
/** Marks of the course at four samples per unit of time. */
const event = { ...someEvent, edge: 60, crossing: 80, peak: 104, half: 115, quarter: 126, last: 240 }

interface Given {
  readonly course?: (time: number) => number
  readonly voltage?: (time: number) => number
  readonly count?: number
  readonly ramp?: Partial<FittedRamp>
  readonly figures?: Partial<RampFigures>
  readonly energy?: RecoveryEnergy | null
  readonly settings?: Partial<CaptureSettings>
  readonly event?: Partial<typeof someEvent>
}

function defects(given: Given = {}) {
  const window = windowOf(
    { ...grid, count: given.count ?? grid.count },
    given.course ?? handCourse,
    given.voltage ?? risingFrom(26),
  )
  const waveform = { start: 0, interval: grid.interval, current: window.current, voltage: window.voltage }
  const context = contextOf({ waveform, event: { ...event, ...given.event }, settings: given.settings ?? {} })
  const ramp = handRamp({ fitted: handCorner({ from: 104, to: 240 }), ...given.ramp })
  const asked = given.energy === undefined ? energy : given.energy
  return rampDefects(context, window, ramp, { ...figures, ...given.figures }, asked)
}
const codes = (given: Given) => defects(given).map(({ code }) => code)

describe('a commutation without a defect', () => {
  it('has none', () => {
    expect(defects()).toEqual([])
  })
})

describe('too slow an instrument', () => {
  it('takes more than three tenths of the time to the peak for its rise of 0.35/B', () => {
    expect(defects({ settings: { bandwidth: 0.35 / 1.81 } })).toEqual([
      { code: 'bandwidth-too-low', data: { rise: expect.closeTo(1.81, 12), timeToPeak: 6 } },
    ])
    expect(codes({ settings: { bandwidth: 0.35 / 1.79 } })).toEqual([])
  })

  it('takes fewer than ten samples up to the peak', () => {
    expect(defects({ figures: { timeToPeak: 2.4 } })).toEqual([
      { code: 'samples-too-few', data: { samples: 9.6, wanted: 10 } },
    ])
    expect(codes({ figures: { timeToPeak: 2.5 } })).toEqual([])
  })
})

describe('clipping', () => {
  /** Of one standard deviation 0.05 A or so, the same every time. */
  const noisy = (course: (time: number) => number) => (time: number) =>
    course(time) + 0.05 * Math.sin(4 * time * 4 * time * 1.7) * 1.4

  it('of the reverse peak is told with its reading and its length', () => {
    // below -4 A: from 24 to 26 + 4 ln 1.5 = 27.62, fifteen samples at four per unit of time
    const cut = (t: number) => Math.max(-4, handCourse(t))
    expect(defects({ course: cut }).filter(({ code }) => code === 'clipping')).toEqual([
      { code: 'clipping', data: { channel: 'current', at: -4, samples: 15 } },
    ])
  })

  it('of the reverse peak is measured by the slower of rise and tail', () => {
    // 14 intervals of a quarter at min(1, 6/4) A per unit are 3.5 A: more than six steps of up to 0.58 A
    const cut = (t: number) => Math.max(-4, handCourse(t))
    expect(codes({ course: cut, ramp: { curve: { ...handCurve, slope: 0.01 } } })).not.toContain('clipping')
    expect(codes({ course: cut, ramp: { curve: { ...handCurve, tailTime: 600 } } })).not.toContain('clipping')
  })

  it('of the forward plateau is told where the quiet end is noisy', () => {
    const cut = (t: number) => Math.min(9.5, noisy(handCourse)(t))
    expect(defects({ course: cut })).toContainEqual({
      code: 'clipping',
      data: { channel: 'current', at: 9.5, samples: expect.closeTo(42, -1) },
    })
    // upside down it is the lowest reading
    expect(defects({ course: (t) => -cut(t), event: { inverted: true } })).toContainEqual({
      code: 'clipping',
      data: { channel: 'current', at: -9.5, samples: expect.closeTo(42, -1) },
    })
    expect(codes({ course: noisy(handCourse) })).not.toContain('clipping')
  })

  it('of the voltage is told where the conduction is noisy', () => {
    const cut = (t: number) => Math.min(90, noisy(risingFrom(26))(t))
    expect(defects({ voltage: cut })).toContainEqual({
      code: 'clipping',
      data: { channel: 'voltage', at: 90, samples: expect.closeTo(63, -1) },
    })
    expect(defects({ voltage: (t) => -cut(t) })).toContainEqual({
      code: 'clipping',
      data: { channel: 'voltage', at: -90, samples: expect.closeTo(63, -1) },
    })
    expect(codes({ voltage: noisy(risingFrom(26)) })).not.toContain('clipping')
  })
})

const lifted = (base: number) => ({
  course: (t: number) => handCourse(t) + base,
  ramp: { fitted: handCorner({ base, from: 104, to: 240 }), line: { ...handRamp().line, value: base } },
})

describe('an offset', () => {
  it('is worth a word above 1.5 % of the swing of 16 A', () => {
    expect(defects(lifted(0.25))).toEqual([
      { code: 'residual-offset', data: { offset: 0.25, share: expect.closeTo(0.25 / 16, 12) } },
    ])
    expect(defects(lifted(-0.25))).toEqual([
      { code: 'residual-offset', data: { offset: -0.25, share: expect.closeTo(0.25 / 16, 12) } },
    ])
    expect(codes(lifted(0.23))).toEqual([])
  })
})

describe('ringing', () => {
  // a plateau without any noise beside a ringing end would be a clipped one
  const ringing = (amplitude: number) => (t: number) =>
    handCourse(t) + (t > 26 ? amplitude * Math.sin(Math.PI * (t - 26)) : t < 10 ? 0.01 * Math.sin(9 * t) : 0)

  it('of more than 2 % of the amplitude is told', () => {
    const found = defects({ course: ringing(0.15) })
    expect(found.map(({ code }) => code)).toEqual(['ringing'])
    expect(found[0]!.data.frequency).toBeCloseTo(0.5, 2)
    expect(found[0]!.data.amplitude).toBeCloseTo(0.15, 1.5)
    expect(codes({ course: ringing(0.11) })).toEqual([])
  })

  it('excuses an offset that is smaller than it, and the voltage of its time', () => {
    const { ramp } = lifted(0.3)
    const course = (t: number) => ringing(0.5)(t) + 0.3
    expect(codes({ course, ramp })).toEqual(['ringing'])
    expect(codes({ course: (t) => ringing(0.2)(t) + 0.3, ramp })).toEqual(['residual-offset', 'ringing'])
    expect(codes({ course: ringing(0.5), voltage: risingFrom(30) })).toEqual(['ringing'])
  })
})

describe('a skew', () => {
  it('is the onset of the voltage against the peak, beyond 8 % of the time to it', () => {
    expect(defects({ voltage: risingFrom(26.55) })).toEqual([{ code: 'skew', data: { skew: expect.closeTo(0.55, 9) } }])
    expect(defects({ voltage: risingFrom(25.4) })).toEqual([{ code: 'skew', data: { skew: expect.closeTo(-0.6, 9) } }])
    expect(codes({ voltage: risingFrom(26.45) })).toEqual([])
    expect(codes({ voltage: risingFrom(26.55), figures: { timeToPeak: 7 } })).toEqual([])
  })

  it('is beyond what the instrument tells apart: 0.7 rise times and two time constants', () => {
    // 0.35/B = 1 is 0.7; a time constant of 1/(2 pi B) = 0.455 is 0.909
    expect(codes({ voltage: risingFrom(26.95), settings: { bandwidth: 0.35 } })).toEqual(['skew'])
    expect(codes({ voltage: risingFrom(26.88), settings: { bandwidth: 0.35 } })).toEqual([])
  })

  it('is beyond one and a half samples, and not asked for without an energy', () => {
    // two samples of 0.25 times 0.7 are 0.35, 1.5 samples 0.375; a time to the peak of 4 leaves 0.32
    const short = { timeToPeak: 4 }
    expect(codes({ voltage: risingFrom(26.39), figures: short })).toEqual(['skew'])
    expect(codes({ voltage: risingFrom(26.36), figures: short })).toEqual([])
    expect(codes({ voltage: risingFrom(30), energy: null })).toEqual([])
  })
})

describe('an inductive shunt', () => {
  const jumping = (t: number) => handCourse(t) + (t >= 10 && t < 13 ? 3 : 0)

  it('is told with its jump, its error, and its inductance where the shunt is stated', () => {
    const of = (shunt: number | null) =>
      defects({
        course: jumping,
        settings: { current: { column: 2, factor: 1, unit: 'A', shunt } },
        figures: { slope: 2 },
      })
    expect(of(null)).toEqual([{ code: 'shunt-inductance', data: { jump: 3, error: 6 } }])
    expect(of(0.05)).toEqual([
      { code: 'shunt-inductance', data: { jump: 3, error: 6, inductance: expect.closeTo(0.15, 12) } },
    ])
  })

  it('bends the fit: offset, ringing and skew are not believed beside it', () => {
    const fitted = handCorner({ base: 0.5, from: 104, to: 240 })
    const ring = (t: number) => jumping(t) + (t > 26 ? Math.sin(Math.PI * (t - 26)) : 0)
    expect(codes({ course: ring, voltage: risingFrom(30), ramp: { fitted } })).toEqual(['shunt-inductance'])
  })
})

describe('a record that ends too early', () => {
  // ln(1/0.02) = 3.912 tail times are wanted: nine tenths of 15.648 are 14.083 after 26
  it('is one that follows less than nine tenths of the tail up to the stated end', () => {
    expect(defects({ count: 161 })).toEqual([
      { code: 'tail-truncated', data: { followed: 14, wanted: expect.closeTo(4 * Math.log(50), 9) } },
    ])
    expect(codes({ count: 162 })).toEqual([])
  })

  it('is followed to 1 % at most, and its offset is not believed', () => {
    const wanted = (chargeUntil: number) => defects({ count: 130, settings: { chargeUntil } })[0]!.data.wanted
    expect(wanted(0)).toBeCloseTo(4 * Math.log(100), 9)
    expect(wanted(0.1)).toBeCloseTo(4 * Math.log(10), 9)
    expect(codes({ count: 140, ...lifted(0.5) })).toEqual(['tail-truncated'])
  })
})

describe('a plateau too short', () => {
  // 10 A, 1 A per unit, TM 4, peak after 6: a lifetime whose 3 times build 95 % of the charge
  const conduction = (samples: number) => ({ startVisible: true, edge: 60, first: 60 - samples })

  it('is one whose beginning is seen, and that has not built 95 % of the charge', () => {
    const short = defects({ event: conduction(40) })
    expect(short.map(({ code }) => code)).toEqual(['plateau-too-short'])
    const { conduction: time, wanted } = short[0]!.data as { readonly conduction: number; readonly wanted: number }
    expect(time).toBe(10)
    const lifetime = wanted / 3
    // charge control: a (tau - TM) (ta - ...) balance, i.e. the peak stands where tau (I - a ta') is used up
    expect(lifetime).toBeGreaterThan(4)
    const enough = Math.ceil((lifetime * Math.log(20)) / 0.25)
    expect(codes({ event: conduction(enough) })).toEqual([])
    expect(codes({ event: conduction(enough - 1) })).toEqual(['plateau-too-short'])
  })

  it('is none where the beginning is not seen, or no lifetime fits', () => {
    expect(codes({ event: { ...conduction(20), startVisible: false } })).toEqual([])
    expect(codes({ event: conduction(20), figures: { timeToPeak: 1e9 } })).toEqual([])
  })
})
