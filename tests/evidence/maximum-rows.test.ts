import { describe, expect, it } from 'vitest'
import type { RampRow } from '../../src/domain/rectifier.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { stepLifetimeAt } from '../../src/evidence/invert-step-row.ts'
import { calibrated } from './calibrated.ts'
import { lumpedFigures } from './lumped.ts'
import { kelvin, rampRow, record, stepRow } from './records.ts'

type Part = ReturnType<typeof calibrated>

/** The guaranteed event at a condition: the posterior mean and the shift on top. */
function guaranteed(part: Part, current: number, slope: number, celsius = 25) {
  const { lifetime, tailTime } = part.at(current, slope, celsius)
  const shift = part.rectifier.maximumRecoveryShift!
  const at = { current, slope, junction: kelvin(celsius) }
  return lumpedFigures(at, Math.log(lifetime) + shift.lifetime, Math.log(lifetime / tailTime - 1) + shift.ratio)
}

describe('the shift to a guaranteed maximum', () => {
  const typical = rampRow({ recoveryTime: 42e-9, charge: 50e-9 })
  const maximum = (fields: Partial<RampRow>) => rampRow({ grade: 'maximum', ...fields })

  it('does not exist without a maximum row', () => {
    expect(calibrated(typical).rectifier.maximumRecoveryShift).toBeNull()
    const schottky = calibrate({ record: record({ class: 'schottky' }), blockingVoltage: 40 }).rectifier
    expect(schottky).toMatchObject({ maximumRecoveryShift: null, recovery: null, softnessKnown: false })
  })

  it('reaches a pair of figures in both, at the row’s own condition', () => {
    const row = maximum({ recoveryTime: 60e-9, charge: 150e-9, slope: 200e6, junction: kelvin(100) })
    const { recoveryTime, charge } = guaranteed(calibrated(typical, row), 8, 200e6, 100)
    expect(recoveryTime).toBeCloseTo(60e-9, 15)
    expect(charge).toBeCloseTo(150e-9, 15)
  })

  it.each([{ charge: 150e-9 }, { peakReverseCurrent: 3 }])(
    'reaches a single figure %o along the lifetime',
    (figure) => {
      const part = calibrated(typical, maximum(figure))
      expect(part.rectifier.maximumRecoveryShift!.ratio).toBe(0)
      expect(guaranteed(part, 8, 100e6)).toMatchObject(
        Object.fromEntries(Object.entries(figure).map(([name, value]) => [name, expect.closeTo(value, 12)])),
      )
    },
  )

  it('goes by both u and y to a peak above what any lifetime gives at the y of the part', () => {
    // the peak has its ceiling at I e^y: 8 e = 22 A
    const part = calibrated(maximum({ peakReverseCurrent: 60, slope: 1e9, spread: 1 }))
    expect(part.rectifier.maximumRecoveryShift!.ratio).not.toBe(0)
    expect(guaranteed(part, 8, 1e9).peakReverseCurrent / 60).toBeCloseTo(1, 2)
  })

  it('is that of the row that asks for the most charge at I0 and a0', () => {
    const small = maximum({ recoveryTime: 50e-9, charge: 70e-9 })
    const large = maximum({ recoveryTime: 80e-9, charge: 220e-9 })
    for (const rows of [
      [small, large],
      [large, small],
    ]) {
      const part = calibrated(typical, ...rows)
      expect(guaranteed(part, 8, 100e6).charge).toBeCloseTo(220e-9, 15)
    }
  })

  it('is that of the higher peak where lifetimes are about the same', () => {
    const rowOf = (u: number, y: number) => {
      const { charge, peakReverseCurrent } = lumpedFigures({ current: 8, slope: 100e6, junction: 298 }, u, y)
      return { charge, peakReverseCurrent }
    }
    const [abrupt, soft] = [rowOf(Math.log(60e-9), 1.6), rowOf(Math.log(60e-9) + 0.02, 0.4)]
    expect(abrupt.charge).toBeGreaterThan(1.02 * soft.charge)
    const part = calibrated(typical, maximum(abrupt), maximum(soft))
    expect(guaranteed(part, 8, 100e6).charge).toBeCloseTo(abrupt.charge, 15)
  })

  it('is not asked for by a row of another grade, however large', () => {
    const part = calibrated(
      rampRow({ recoveryTime: 300e-9, charge: 2e-6 }),
      maximum({ recoveryTime: 50e-9, charge: 70e-9 }),
    )
    expect(guaranteed(part, 8, 100e6).charge).toBeCloseTo(70e-9, 15)
  })

  it('reaches the time of a step row along the lifetime, at the y of the part', () => {
    const row = stepRow({ recoveryTime: 80e-9, grade: 'maximum' })
    const part = calibrated(typical, row)
    const { lifetime, tailTime } = part.at(0.5, 1e8, 25)
    const shift = part.rectifier.maximumRecoveryShift!
    expect(shift.ratio).toBe(0)
    expect(Math.log(lifetime) + shift.lifetime).toBeCloseTo(stepLifetimeAt(row, Math.log(lifetime / tailTime - 1))!, 12)
  })

  it('reaches u and y of a step row that tells both', () => {
    // PHYSICS section 1: tau 150 ns, tau_rr 20 ns; a fixture is centred at 1.7 tau
    const row = stepRow({ storageTime: 39.3546e-9, recoveryTime: 67.0805e-9, grade: 'maximum' })
    const part = calibrated(typical, row)
    const { lifetime, tailTime } = part.at(0.5, 1e8, 25)
    const shift = part.rectifier.maximumRecoveryShift!
    expect(Math.log(lifetime) + shift.lifetime).toBeCloseTo(Math.log(1.7 * 150e-9), 4)
    expect(Math.log(lifetime / tailTime - 1) + shift.ratio).toBeCloseTo(Math.log(6.5), 3)
  })
})
