import { describe, expect, it } from 'vitest'
import type { FittedStep } from '../../src/capture/fit-step.ts'
import { stepFigures } from '../../src/capture/step-figures.ts'
import { handCorner, windowOf } from './handmade.ts'

/**
 * 0.5 A forward, 1 A reverse, a lifetime of 150 and a tail of 20: the storage time by hand is
 * tau ln((I_F + I_R)(tau - tau_rr)/(I_R tau)) = 150 ln(1.3) = 39.3546.
 */
const storageTime = 150 * Math.log(1.3)
const curve = { corner: storageTime, slope: 0, amplitude: 1, tailTime: 20, rounding: 0 }
const level = { at: 20, value: -1, rise: 0, residual: 0.001, count: 10 }
const fitted = handCorner({ curve, from: 43, to: 240, noise: 0.001 })
const step: FittedStep = {
  forward: { ...level, value: 0.5 },
  plateau: level,
  fitted,
  curve,
  current: 0.5,
  reverse: 1,
  crossing: 0,
  edgeTime: 1,
  edgeEnd: 1,
}
const course = (time: number) => (time < 0 ? 0.5 : time < storageTime ? -1 : -Math.exp(-(time - storageTime) / 20))
const window = windowOf({ start: -3.5, interval: 1, count: 240 }, course)
const figures = (
  change: Partial<FittedStep> = {},
  definition: Parameters<typeof stepFigures>[2] = { kind: 'level-25' },
) => stepFigures(window, { ...step, ...change }, definition)

describe('the figures of a reversal with a plateau', () => {
  it('are storage time, recovery time and lifetime of the charge model', () => {
    const found = figures()
    expect(found.current).toBe(0.5)
    expect(found.reverse).toBe(1)
    expect(found.until).toBe(0.25)
    expect(found.tailTime).toBe(20)
    expect(found.storageTime!).toBeCloseTo(storageTime, 9)
    expect(found.recoveryTime).toBeCloseTo(storageTime + 20 * Math.log(4), 6)
    expect(found.lifetime).toBeCloseTo(150, 3)
    expect(found.endDoubt).toBeCloseTo(0, 6)
  })

  it('count from the crossing', () => {
    const late = figures({ crossing: 5 })
    expect(late.storageTime!).toBeCloseTo(storageTime - 5, 9)
    expect(late.recoveryTime).toBeCloseTo(storageTime + 20 * Math.log(4) - 5, 6)
  })

  it('have the lifetime of diffusion: erf(sqrt(ts/tau)) = I_F/(I_F + I_R)', () => {
    // erf(x) = 1/3 at x = 0.304570 (tables)
    expect(figures().diffusionLifetime!).toBeCloseTo(storageTime / 0.30457 ** 2, 0)
  })

  it.each<readonly [Parameters<typeof stepFigures>[2], number]>([
    [{ kind: 'level-25' }, 0.25],
    [{ kind: 'level-10' }, 0.1],
    [{ kind: 'unknown' }, 0.25],
    [{ kind: 'level', until: 0.05 }, 0.05],
  ])('end by %j', (definition, until) => {
    const found = figures({}, definition)
    expect(found.until).toBeCloseTo(until, 12)
    expect(found.recoveryTime).toBeCloseTo(storageTime + 20 * Math.log(1 / until), 6)
  })
})

describe('the figures of a reversal that turns back at once', () => {
  it('have no storage time, and the lifetime tau_rr (1 + I/I_F)', () => {
    const found = figures({ plateau: null, reverse: 7, curve: { ...curve, amplitude: 3 } })
    expect(found.storageTime).toBeNull()
    expect(found.diffusionLifetime).toBeNull()
    expect(found.reverse).toBeCloseTo(3, 9)
    expect(found.lifetime).toBeCloseTo(20 * (1 + 3 / 0.5), 9)
  })

  it('have that lifetime, too, where no lifetime gives the storage time', () => {
    const found = figures({ crossing: storageTime })
    expect(found.storageTime).toBe(0)
    expect(found.lifetime).toBeCloseTo(20 * (1 + 1 / 0.5), 9)
  })
})

describe('a tail that is no exponential', () => {
  // a tenth of an ampere more: down to 0.25 A where the exponential is at 0.15 A
  const more = windowOf({ start: -3.5, interval: 1, count: 240 }, (t) => course(t) - (t > storageTime ? 0.1 : 0))

  it('is read from the samples where they say so', () => {
    const found = stepFigures(more, step, { kind: 'level-25' })
    expect(found.recoveryTime).toBeCloseTo(storageTime + 20 * Math.log(1 / 0.15), 3)
    expect(found.endDoubt).toBeCloseTo((20 * Math.log(0.25 / 0.15)) / found.recoveryTime, 4)
  })

  it('is read from the fit where noise explains it, with the doubt of the end', () => {
    const found = stepFigures(more, { ...step, fitted: { ...fitted, noise: 1 } }, { kind: 'level-25' })
    expect(found.recoveryTime).toBeCloseTo(storageTime + 20 * Math.log(4), 6)
    expect(found.endDoubt).toBeCloseTo((20 * Math.log(0.25 / 0.15)) / found.recoveryTime, 4)
  })
})
