import { describe, expect, it } from 'vitest'
import type { FittedStep } from '../../src/capture/fit-step.ts'
import { stepDefects } from '../../src/capture/step-defects.ts'
import type { StepFigures } from '../../src/capture/step-figures.ts'
import type { CaptureSettings } from '../../src/domain/capture.ts'
import { contextOf, handCorner, someEvent, windowOf } from './handmade.ts'

/** 2 A forward, 3 A reverse up to 20, a tail of 4: four samples per unit of time, the crossing at 0. */
const curve = { corner: 20, slope: 0, amplitude: 3, tailTime: 4, rounding: 0 }
const grid = { start: -20, interval: 0.25, count: 260 }
/** A plateau of an unclipped channel is never quite flat. */
const shiver = (t: number) => 0.003 * Math.sin(27.2 * t * t)
const course = (t: number) => (t < 0 ? 2 : t < 20 ? -3 : -3 * Math.exp(-(t - 20) / 4)) + shiver(t)
const level = { at: 0, value: 0, rise: 0, residual: 0.01, count: 10 }
const step: FittedStep = {
  forward: { ...level, value: 2 },
  plateau: { ...level, value: -3 },
  fitted: handCorner({ curve, from: 100, to: 260 }),
  curve,
  current: 2,
  reverse: 3,
  crossing: 0,
  edgeTime: 0.25,
  edgeEnd: 0.25,
}
const figures: StepFigures = {
  current: 2,
  reverse: 3,
  storageTime: 20,
  recoveryTime: 26,
  until: 0.75,
  lifetime: 30,
  tailTime: 4,
  diffusionLifetime: 40,
  endDoubt: 0,
}
const event = { ...someEvent, edge: 79, crossing: 80, peak: 100, half: 171, quarter: 182, last: 260 }

interface Given {
  readonly course?: (time: number) => number
  readonly count?: number
  readonly step?: Partial<FittedStep>
  readonly figures?: Partial<StepFigures>
  readonly settings?: Partial<CaptureSettings>
  readonly event?: Partial<typeof someEvent>
}

function defects(given: Given = {}) {
  const window = windowOf({ ...grid, count: given.count ?? grid.count }, given.course ?? course)
  const waveform = { start: -20, interval: grid.interval, current: window.current, voltage: null }
  const { settings = {} } = given
  const context = contextOf({ kind: 'step', waveform, event: { ...event, ...given.event }, settings })
  return stepDefects(context, window, { ...step, ...given.step }, { ...figures, ...given.figures })
}
const codes = (given: Given) => defects(given).map(({ code }) => code)

describe('a reversal without a defect', () => {
  it('has none', () => {
    expect(defects()).toEqual([])
  })
})

describe('too slow an instrument for the storage time', () => {
  it('takes more than three tenths of it for its rise of 0.35/B', () => {
    expect(defects({ settings: { bandwidth: 0.35 / 6.01 } })).toEqual([
      { code: 'bandwidth-too-low', data: { rise: expect.closeTo(6.01, 12), timeToPeak: 20 } },
    ])
    expect(codes({ settings: { bandwidth: 0.35 / 5.99 } })).toEqual([])
  })

  it('takes fewer than ten samples of it', () => {
    expect(defects({ figures: { storageTime: 2.25 } })).toEqual([
      { code: 'samples-too-few', data: { samples: 9, wanted: 10 } },
    ])
    expect(codes({ figures: { storageTime: 2.5 } })).toEqual([])
  })

  it('is measured by the recovery time where there is no plateau', () => {
    const none = { storageTime: null, recoveryTime: 2 }
    expect(defects({ figures: none })).toEqual([{ code: 'samples-too-few', data: { samples: 8, wanted: 10 } }])
  })
})

describe('a flat plateau', () => {
  // noise of a twentieth of an ampere wherever the channel is not cut
  const noisy = (t: number) => course(t) + 0.07 * Math.sin(27.2 * t * t)

  it.each<readonly [string, (t: number) => number, number, number, Partial<typeof someEvent>]>([
    ['the forward plateau', (t) => Math.min(1.9, noisy(t)), 1.9, 80, {}],
    ['the reverse plateau', (t) => Math.max(-2.9, noisy(t)), -2.9, 80, {}],
    ['the forward plateau upside down', (t) => -Math.min(1.9, noisy(t)), -1.9, 80, { inverted: true }],
    ['the reverse plateau upside down', (t) => -Math.max(-2.9, noisy(t)), 2.9, 80, { inverted: true }],
  ])('is clipping: %s', (_name, given, at, samples, change) => {
    expect(defects({ course: given, event: change })).toContainEqual({
      code: 'clipping',
      data: { channel: 'current', at, samples: expect.closeTo(samples, -1) },
    })
  })

  it('is none where the plateaus are as noisy as the end, or all is quiet', () => {
    expect(codes({ course: noisy })).not.toContain('clipping')
    const flat = (t: number) => course(t) - shiver(t)
    expect(codes({ course: flat })).not.toContain('clipping')
  })
})

describe('an offset, a ringing, a short tail', () => {
  const lifted = (base: number) => ({
    course: (t: number) => course(t) + base,
    step: { fitted: handCorner({ curve, base, from: 100, to: 260 }) },
  })

  it('an offset is worth a word above 1.5 % of the swing of 5 A', () => {
    for (const base of [0.08, -0.08]) {
      expect(defects(lifted(base))).toEqual([
        { code: 'residual-offset', data: { offset: base, share: expect.closeTo(0.016, 12) } },
      ])
    }
    expect(codes(lifted(0.07))).toEqual([])
  })

  it('a ringing is told with frequency and amplitude', () => {
    const ringing = (t: number) => course(t) + (t > 20 ? 0.15 * Math.sin(Math.PI * (t - 20)) : 0.1 * shiver(3 * t))
    const found = defects({ course: ringing })
    expect(found.map(({ code }) => code)).toEqual(['ringing'])
    expect(found[0]!.data.frequency).toBeCloseTo(0.5, 2)
    expect(found[0]!.data.amplitude).toBeCloseTo(0.15, 1.5)
  })

  it('a tail is followed over nine tenths of what the stated end wants', () => {
    // 0.9 x 4 ln 50 = 14.083 after 20: up to sample 216.3
    expect(defects({ count: 217 })).toEqual([
      { code: 'tail-truncated', data: { followed: 14, wanted: expect.closeTo(4 * Math.log(50), 9) } },
    ])
    expect(codes({ count: 218 })).toEqual([])
    const wanted = (chargeUntil: number) => defects({ count: 190, settings: { chargeUntil } })[0]!.data.wanted
    expect(wanted(0)).toBeCloseTo(4 * Math.log(100), 9)
    expect(wanted(0.1)).toBeCloseTo(4 * Math.log(10), 9)
  })
})

describe('the conduction before it', () => {
  // 95 % of the charge takes 30 ln 20 = 89.87, 359.5 samples
  const conduction = (samples: number) => ({ startVisible: true, edge: 400, first: 400 - samples })

  it('is long enough when it has built 95 % of the charge, or when its beginning is not seen', () => {
    const late = { ...event, crossing: 401, quarter: 420, half: 410 }
    expect(defects({ event: { ...late, ...conduction(359) } })).toEqual([
      { code: 'plateau-too-short', data: { conduction: 89.75, wanted: 90 } },
    ])
    expect(codes({ event: { ...late, ...conduction(360) } })).toEqual([])
    expect(codes({ event: { ...late, ...conduction(100), startVisible: false } })).toEqual([])
  })

  it('says where there is no reverse plateau', () => {
    expect(defects({ step: { plateau: null } })).toEqual([{ code: 'no-reverse-plateau', data: {} }])
  })
})
