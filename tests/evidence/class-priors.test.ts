import { describe, expect, it } from 'vitest'
import type { RectifierClass } from '../../src/domain/rectifier.ts'
import { predictedDeviation, predictedMean } from '../../src/evidence/bayesian-update.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { classPriors } from '../../src/evidence/class-priors.ts'
import { forwardDesign } from '../../src/evidence/design-rows.ts'
import { priorGaussians } from '../../src/evidence/prior-gaussians.ts'
import { forwardDropAt, leakageCurrentAt, recoveryAt } from '../../src/evidence/recovery-at.ts'
import { steadyFiguresAt } from '../../src/evidence/steady-figures.ts'
import { kelvin, record } from './records.ts'

function ofClass(name: RectifierClass) {
  return calibrate({ record: record({ class: name }), blockingVoltage: 400 }).rectifier
}

describe('a class without any row', () => {
  // "for orientation" figures of PHYSICS section 3: 8 A, 100 A/µs, printed to two or three digits
  it.each([
    ['standard', 1289, 39, 2.3],
    ['fast', 260, 12, 1.2],
    ['ultrafast', 42, 2.4, 0.7],
    ['soft-ultrafast', 53, 2.1, 1.5],
    ['body-diode', 174, 8.7, 1.0],
  ] as const)('%s recovers in %d ns with a peak of %d A and a softness of %d', (name, trr, peak, softness) => {
    const figures = steadyFiguresAt(ofClass(name), { current: 8, slope: 100e6, junction: kelvin(25) })!
    expect(Math.abs(figures.recoveryTime * 1e9 - trr)).toBeLessThanOrEqual(0.5)
    expect(Math.abs(figures.peakReverseCurrent - peak)).toBeLessThanOrEqual(peak > 10 ? 0.5 : 0.05)
    const timeToPeak = figures.peakReverseCurrent / 100e6
    expect(Math.abs(figures.recoveryTime / timeToPeak - 1 - softness)).toBeLessThanOrEqual(0.05)
  })

  it.each(['standard', 'fast', 'ultrafast', 'soft-ultrafast', 'body-diode'] as const)(
    '%s grows from 25 to 125 °C as published tables do',
    (name) => {
      for (const slope of [100e6, 200e6, 300e6]) {
        const cold = steadyFiguresAt(ofClass(name), { current: 8, slope, junction: kelvin(25) })!
        const hot = steadyFiguresAt(ofClass(name), { current: 8, slope, junction: kelvin(125) })!
        // PHYSICS section 3: Qrr ×1.8 to ×2.7, I_RM ×1.1 to ×1.6, trr ×1.5 to ×1.7; rounded to a digit
        expect(hot.charge / cold.charge).toBeGreaterThan(1.75)
        expect(hot.charge / cold.charge).toBeLessThan(2.75)
        expect(hot.peakReverseCurrent / cold.peakReverseCurrent).toBeGreaterThan(1.05)
        expect(hot.peakReverseCurrent / cold.peakReverseCurrent).toBeLessThan(1.65)
        expect(hot.recoveryTime / cold.recoveryTime).toBeGreaterThan(1.45)
        expect(hot.recoveryTime / cold.recoveryTime).toBeLessThan(1.75)
      }
    },
  )

  it.each(Object.keys(classPriors) as RectifierClass[])(
    '%s has the V_F and temperature coefficient of the table at I0',
    (name) => {
      const { level, perKelvin } = classPriors[name].forward
      const prior = priorGaussians(name).forward
      const cold = forwardDesign({ ratedCurrent: 8, current: 8, junction: kelvin(25), line: false })
      const hot = forwardDesign({ ratedCurrent: 8, current: 8, junction: kelvin(26), line: false })
      const rise = hot.map((entry, index) => entry - cold[index]!)
      expect(predictedMean(prior, cold)).toBeCloseTo(level[0], 12)
      expect(predictedDeviation(prior, cold)).toBeCloseTo(level[1], 12)
      expect(predictedMean(prior, rise)).toBeCloseTo(perKelvin[0], 12)
      expect(predictedDeviation(prior, rise)).toBeCloseTo(perKelvin[1], 10)
    },
  )

  it('splits V_F into a resistive share that grows 0.4 % per kelvin and a logarithmic part proportional to T', () => {
    const { mean } = priorGaussians('ultrafast').forward
    expect(mean[2]).toBeCloseTo(0.3 * 1.35, 12)
    expect(mean[5]! / mean[2]!).toBeCloseTo(0.004, 12)
    expect(mean[4]! / mean[1]!).toBeCloseTo(1 / 298.15, 12)
  })

  it('draws V_F as proportional to current below a hundredth of I0', () => {
    const part = ofClass('ultrafast')
    const knee = forwardDropAt({ rectifier: part, current: 0.08, junction: kelvin(80) })
    const below = forwardDropAt({ rectifier: part, current: 0.02, junction: kelvin(80) })
    expect(below.drop).toBeCloseTo(knee.drop / 4, 12)
    expect(forwardDropAt({ rectifier: part, current: 0, junction: kelvin(80) })).toEqual({ drop: 0, deviation: 0 })
  })

  it('multiplies leakage by its barrier: a doubling per 10 K reads three times low from 25 to 125 °C at 0.7 eV', () => {
    const at = (celsius: number) =>
      leakageCurrentAt({ rectifier: ofClass('schottky'), voltage: 600, junction: kelvin(celsius) })!.current
    expect(at(25)).toBeCloseTo(50e-6, 12)
    expect(at(125) / at(25) / 2 ** 10).toBeGreaterThan(0.8)
    expect(at(125) / at(25)).toBeCloseTo(Math.exp((0.7 / 8.617333e-5) * (1 / 298.15 - 1 / 398.15)), 6)
  })

  it('stores no charge where it is a Schottky, and has no leakage where it is a body diode', () => {
    for (const name of ['schottky', 'sic-schottky'] as const) {
      expect(ofClass(name).recovery).toBeNull()
      expect(ofClass(name).maximumRecoveryShift).toBeNull()
      const condition = { current: 8, slope: 100e6, junction: kelvin(25) }
      expect(recoveryAt({ rectifier: ofClass(name), ...condition })).toBeNull()
      expect(steadyFiguresAt(ofClass(name), condition)).toBeNull()
    }
    expect(ofClass('body-diode').leakage).toBeNull()
  })
})
