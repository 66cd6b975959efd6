import { describe, expect, it } from 'vitest'
import type { RampRow } from '../../src/domain/rectifier.ts'
import { fitFigures } from '../../src/evidence/fit-figures.ts'
import { invertRampRow } from '../../src/evidence/invert-ramp-row.ts'
import { priorGaussians } from '../../src/evidence/prior-gaussians.ts'
import type { RowReading } from '../../src/evidence/row-reading.ts'
import { calibrated } from './calibrated.ts'
import { lumpedFigures } from './lumped.ts'
import { kelvin, rampRow } from './records.ts'

const context = { id: 'part', ratedCurrent: 8, blockingVoltage: 400, prior: priorGaussians('ultrafast').recovery! }
const read = (fields: Partial<RampRow>) => invertRampRow(rampRow(fields), context) as RowReading

/** A part of the middle of its class, where the class's own y is right for single figures. */
const point = { lifetime: Math.log(35e-9), ratio: 1 }
const made = lumpedFigures({ current: 8, slope: 100e6, junction: 298 }, point.lifetime, point.ratio)

describe('what a ramp row is read as', () => {
  it('is u and y of a pair, with no doubt about y beyond its own at the voltage of use', () => {
    const { point: found, observation, tellsRatio, single, caveats } = read({ ...made, peakReverseCurrent: null })
    expect(found.lifetime).toBeCloseTo(point.lifetime, 9)
    expect(found.ratio).toBeCloseTo(point.ratio, 9)
    expect(observation.values).toEqual([found.lifetime, found.ratio])
    expect({ tellsRatio, single, caveats }).toEqual({ tellsRatio: true, single: null, caveats: [] })
  })

  it('of a maximum is lowered by 0.5 in u: a pair in its value, a single figure by what u does to it', () => {
    const pair = read({ ...made, peakReverseCurrent: null, grade: 'maximum' })
    expect(pair.observation.values).toEqual([pair.point.lifetime - 0.5, pair.point.ratio])
    const [typical, maximum] = [read({ charge: made.charge }), read({ charge: made.charge, grade: 'maximum' })]
    expect(maximum.point).toEqual(typical.point)
    const byLifetime = maximum.observation.designs[0]![0]!
    expect(maximum.observation.values[0]).toBeCloseTo(typical.observation.values[0]! - 0.5 * byLifetime, 12)
  })

  it('of a single figure is one line through u and y that the point itself lies on', () => {
    for (const name of ['charge', 'recoveryTime', 'peakReverseCurrent'] as const) {
      const { point: found, observation, tellsRatio, single } = read({ [name]: made[name] })
      expect(found.lifetime).toBeCloseTo(point.lifetime, 9)
      expect(found.ratio).toBeCloseTo(point.ratio, 9)
      const [design] = observation.designs
      expect(design![0]! * found.lifetime + design![4]! * found.ratio).toBeCloseTo(observation.values[0]!, 9)
      expect(tellsRatio).toBe(false)
      expect(single).toMatchObject({ name, value: made[name] })
    }
  })

  it('of a single figure at another condition spans the coefficients of both u and y', () => {
    const { observation } = read({ charge: 90e-9, current: 4, slope: 200e6, junction: kelvin(100) })
    const [design] = observation.designs
    const over = [1, Math.log(0.5), Math.log(2), Math.log(373.15 / 298.15)]
    for (const [index, value] of over.entries()) {
      expect(design![index]! / design![0]!).toBeCloseTo(value, 12)
      expect(design![index + 4]! / design![4]!).toBeCloseTo(value, 12)
    }
  })

  it('of a softness of no length is one of 0.02', () => {
    expect(read({ recoveryTime: 40e-9, softness: 0 })).toMatchObject({
      point: read({ recoveryTime: 40e-9, softness: 0.02 }).point,
    })
    expect(read({ recoveryTime: 40e-9, softness: 0.03 }).point).not.toEqual(
      read({ recoveryTime: 40e-9, softness: 0.02 }).point,
    )
  })

  it('of a softness alone tells y', () => {
    expect(read({ softness: 0.7 }).tellsRatio).toBe(true)
  })

  it('is nothing without a figure, and unusable where nothing near the class shows its only one', () => {
    expect(invertRampRow(rampRow(), context)).toBeNull()
    expect(invertRampRow(rampRow({ softness: 1e9 }), context)).toEqual({
      unusable: { code: 'row-impossible', candidate: 'part', data: { row: 'recovery row 1' } },
    })
  })
})

describe('figures that contradict each other', () => {
  const threeOff = (share: number, fields: Partial<RampRow> = {}) =>
    read({ ...made, charge: made.charge * share, ...fields }).observation.noise

  it('are worth less by as much as they miss, never more', () => {
    // Qrr alone is off by ln 1.3 = 0.262: the three residuals share it, so the misfit is 0.262²/(0.05² × sum of weights)
    const [doubted, agreed] = [threeOff(1.3), threeOff(1)]
    const factor = doubted[0]! / agreed[0]!
    expect(factor).toBeGreaterThan(3)
    for (const index of [1, 3]) expect(Math.abs(doubted[index]! / agreed[index]! / factor - 1)).toBeLessThan(0.1)
    expect(doubted[2]).toBe(doubted[1])
    const small = { spread: 0.5 }
    // with an error of half a figure 30 % is no misfit at all: the doubt is that of the reading alone
    expect(threeOff(1.3, small)[0]! / threeOff(1, small)[0]!).toBeLessThan(1.3)
  })

  it('count their misfit by the figures that are more than two', () => {
    const softness = (2 * made.recoveryTime * 100e6) / made.peakReverseCurrent - 2
    const figures = { ...made, softness }
    const row = read(figures)
    const names = ['recoveryTime', 'charge', 'peakReverseCurrent', 'softness'] as const
    const errors = { recoveryTime: 0.05, charge: 0.05, peakReverseCurrent: 0.05, softness: 0.05 }
    const fitted = fitFigures({
      reading: { current: 8, slope: 100e6, recoveryTimeBy: { kind: 'line-90-25' }, softnessBy: 'times' },
      figures,
      names,
      errors: { figures: errors, current: 0, slope: 0 },
      start: point,
    })
    for (const [index, value] of fitted.covariance.entries())
      expect(row.observation.noise[index]! / ((value * fitted.misfit) / 2)).toBeCloseTo(1, 8)
  })

  it('do not multiply the doubt that the voltage puts on y', () => {
    const onRatio = threeOff(1.3, { voltage: null })[3]! - threeOff(1.3)[3]!
    expect(onRatio).toBeCloseTo(0.2 ** 2, 12)
  })
})

describe('what a ramp row leaves open', () => {
  const figures = { recoveryTime: made.recoveryTime, charge: made.charge }
  const told = (code: string, fields: Partial<RampRow>) =>
    read(fields)
      .caveats.filter((caveat) => caveat.code === code)
      .map(({ candidate, data }) => ({ candidate, ...data }))
  const row = { candidate: 'part', row: 'recovery row 1' }

  it('is its current, its slope or both', () => {
    expect(told('row-condition-assumed', { ...figures, current: null })).toEqual([{ ...row, condition: 'current' }])
    expect(told('row-condition-assumed', { ...figures, slope: null })).toEqual([{ ...row, condition: 'slope' }])
    expect(told('row-condition-assumed', { ...figures, current: null, slope: null })).toEqual([
      { ...row, condition: 'current and slope' },
    ])
    expect(told('row-condition-assumed', figures)).toEqual([])
  })

  it('is filled in with I0, a0 and 25 °C', () => {
    const { condition, point: found } = read({ ...figures, current: null, slope: null, junction: null })
    expect(condition).toEqual({ ratedCurrent: 8, current: 8, slope: 1e8, junction: 298.15 })
    expect(found).toEqual(read(figures).point)
    expect(read({ ...figures, junction: 400 }).condition.junction).toBe(400)
  })

  it('doubles the doubt of a single figure by 50 % in the current, and in the slope, by what they do to it', () => {
    const noise = (fields: Partial<RampRow>) => read({ charge: made.charge, ...fields }).observation.noise[0]!
    const ln = (current: number, slope: number) =>
      Math.log(lumpedFigures({ current, slope, junction: 298 }, point.lifetime, point.ratio).charge)
    const step = 1e-4
    const byCurrent = (ln(8 * Math.exp(step), 1e8) - ln(8 * Math.exp(-step), 1e8)) / (2 * step)
    const bySlope = (ln(8, 1e8 * Math.exp(step)) - ln(8, 1e8 * Math.exp(-step))) / (2 * step)
    expect(noise({ current: null }) - noise({})).toBeCloseTo((0.5 * byCurrent) ** 2, 7)
    expect(noise({ slope: null }) - noise({})).toBeCloseTo((0.5 * bySlope) ** 2, 7)
  })

  it('is how trr ended, if trr or a softness of times was read that way', () => {
    const unknown = { recoveryTimeBy: { kind: 'unknown' } } as const
    const code = 'trr-definition-unknown'
    expect(told(code, { ...figures, ...unknown })).toEqual([row])
    expect(told(code, { charge: 50e-9, softness: 0.7, ...unknown })).toEqual([row])
    expect(told(code, { charge: 50e-9, softness: 0.7, softnessBy: 'slopes', ...unknown })).toEqual([])
    expect(told(code, { charge: 50e-9, ...unknown })).toEqual([])
    expect(told(code, { ...figures })).toEqual([])
    expect(told(code, { recoveryTime: 42e-9, softness: 0.2, softnessBy: 'slopes', ...unknown })).toEqual([row])
  })

  it('is more doubt about a softness of times than a small spread claims, and no less than a large one', () => {
    const noise = (spread: number | null) =>
      read({ softness: 0.7, recoveryTimeBy: { kind: 'unknown' }, spread }).observation.noise[0]!
    expect(noise(0.01)).toBeCloseTo(0.25 ** 2, 12)
    expect(noise(0.4)).toBeCloseTo(0.4 ** 2, 12)
  })
})

describe('three figures of a ramp row', () => {
  it('are told to miss by the share of the third, from 15 % on, and with the row', () => {
    const part = calibrated(rampRow({ ...made, charge: made.charge * 1.16 }))
    expect(part.dataOf('row-inconsistent')).toEqual({ row: 'recovery row 1', difference: expect.closeTo(0.16, 6) })
    expect(calibrated(rampRow({ ...made, charge: made.charge * 1.14 })).codes).not.toContain('row-inconsistent')
  })

  it('with a charge that is a product keep their other two, and say so', () => {
    const product = { recoveryTime: 40e-9, peakReverseCurrent: 2.5, charge: 50e-9 }
    const { caveats, point: found, observation } = read(product)
    expect(caveats).toEqual([{ code: 'charge-computed', candidate: 'part', data: { row: 'recovery row 1' } }])
    const pair = read({ ...product, charge: null })
    expect(found).toEqual(pair.point)
    expect(observation.noise).toEqual(pair.observation.noise)
  })
})
