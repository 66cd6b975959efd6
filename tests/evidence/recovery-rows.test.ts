import { describe, expect, it } from 'vitest'
import { calibrated } from './calibrated.ts'
import { lumpedFigures } from './lumped.ts'
import { kelvin, place, rampRow } from './records.ts'

const condition = { current: 8, slope: 200e6, junction: kelvin(25) }
const exact = { ...condition, voltage: 400, spread: 1e-4 }
const made = lumpedFigures(condition, Math.log(60e-9), Math.log(2))

describe('a ramp row', () => {
  it.each([
    ['trr and Qrr', { recoveryTime: made.recoveryTime, charge: made.charge }],
    ['trr and I_RM', { recoveryTime: made.recoveryTime, peakReverseCurrent: made.peakReverseCurrent }],
    ['Qrr and I_RM', { charge: made.charge, peakReverseCurrent: made.peakReverseCurrent }],
    ['trr and softness', { recoveryTime: made.recoveryTime, softness: 1.3981021 }],
    ['all of trr, Qrr, I_RM', { ...made }],
    ['all four', { ...made, softness: 1.3981021 }],
  ])('that states %s returns the lifetime and tail time that made it', (_, figures) => {
    const part = calibrated(rampRow({ ...exact, ...figures }))
    const { lifetime, tailTime } = part.at(8, 200e6, 25)
    expect(lifetime / 60e-9).toBeCloseTo(1, 4)
    expect(tailTime / 20e-9).toBeCloseTo(1, 4)
    expect(part.rectifier.softnessKnown).toBe(true)
    expect(part.codes).not.toContain('row-inconsistent')
  })

  it('with trr alone moves the lifetime to meet it and leaves softness to the class', () => {
    const part = calibrated(rampRow({ ...exact, recoveryTime: 50e-9 }))
    const { lifetime, tailTime, ratioDeviation } = part.at(8, 200e6, 25)
    const back = lumpedFigures(condition, Math.log(lifetime), Math.log(lifetime / tailTime - 1))
    expect(back.recoveryTime / 50e-9).toBeCloseTo(1, 2)
    expect(ratioDeviation).toBeGreaterThan(0.4)
    expect(part.rectifier.softnessKnown).toBe(false)
    expect(part.codes).toContain('softness-unknown')
  })

  it.each([6, 12, 20, 30])(
    'with a peak of %d A alone, even beyond the class ceiling, is met within a tenth',
    (peak) => {
      const part = calibrated(rampRow({ ...exact, slope: 100e6, peakReverseCurrent: peak }))
      const { lifetime, tailTime } = part.at(8, 100e6, 25)
      const back = lumpedFigures({ ...condition, slope: 100e6 }, Math.log(lifetime), Math.log(lifetime / tailTime - 1))
      expect(Math.abs(back.peakReverseCurrent / peak - 1)).toBeLessThan(0.1)
    },
  )

  it('with softness alone tells the ratio and hardly moves the lifetime', () => {
    const part = calibrated(rampRow({ softness: 1.5 }))
    expect(part.rectifier.softnessKnown).toBe(true)
    expect(part.rectifier.recovery!.posterior.mean[4]).toBeLessThan(0.5)
    expect(Math.abs(part.rectifier.recovery!.posterior.mean[0]! - Math.log(35e-9))).toBeLessThan(0.2)
  })

  it('with a softness alone that nothing near its class shows is told and leaves the class as it is', () => {
    const part = calibrated(rampRow({ softness: 1e9 }))
    expect(part.codes).toContain('row-impossible')
    expect(part.rectifier.recovery!.origin).toBe('class-guess')
  })

  it('of impossible trr and I_RM keeps its I_RM and says both numbers', () => {
    const part = calibrated(rampRow({ recoveryTime: 20e-9, peakReverseCurrent: 5 }))
    expect(part.dataOf('row-impossible')).toEqual({ row: 'recovery row 1', found: 'trr 20 ns', bound: 'trr 50 ns' })
    const alone = calibrated(rampRow({ peakReverseCurrent: 5 }))
    expect(part.rectifier.recovery).toEqual(alone.rectifier.recovery)
  })

  it('of impossible trr and Qrr keeps its charge', () => {
    const part = calibrated(rampRow({ recoveryTime: 20e-9, charge: 50e-9 }))
    expect(part.dataOf('row-impossible')).toEqual({ row: 'recovery row 1', found: 'Qrr 50 nC', bound: 'Qrr 20 nC' })
    expect(part.rectifier.recovery).toEqual(calibrated(rampRow({ charge: 50e-9 })).rectifier.recovery)
  })

  it('of three figures drops the culprit and keeps the two that fit each other and the class', () => {
    const figures = lumpedFigures({ ...condition, slope: 100e6 }, Math.log(35e-9), 1)
    const part = calibrated(rampRow({ ...figures, peakReverseCurrent: figures.peakReverseCurrent * 10 }))
    expect(part.codes).toContain('row-impossible')
    expect(part.rectifier.recovery).toEqual(
      calibrated(rampRow({ recoveryTime: figures.recoveryTime, charge: figures.charge })).rectifier.recovery,
    )
  })

  it('whose third figure is more than 15 % off says by how much, and 10 % is accepted', () => {
    const off = (share: number) => calibrated(rampRow({ ...exact, spread: null, ...made, charge: made.charge * share }))
    expect(off(1.3).dataOf('row-inconsistent')!.difference).toBeCloseTo(0.3, 6)
    expect(off(1.1).codes).not.toContain('row-inconsistent')
    expect(off(0.82).codes).toContain('row-inconsistent')
  })

  it('whose figures disagree is worth less than one whose figures agree', () => {
    const deviation = (share: number) =>
      calibrated(rampRow({ ...exact, spread: null, ...made, charge: made.charge * share })).at(8, 200e6, 25)
    expect(deviation(1.6).lifetimeDeviation).toBeGreaterThan(1.5 * deviation(1).lifetimeDeviation)
  })

  it('whose charge is only trr × I_RM/2 does not count it as a third measurement', () => {
    const part = calibrated(rampRow({ recoveryTime: 62e-9, charge: 190e-9, peakReverseCurrent: 6.1, slope: 200e6 }))
    expect(part.codes).toContain('charge-computed')
    const pair = calibrated(rampRow({ recoveryTime: 62e-9, peakReverseCurrent: 6.1, slope: 200e6 }))
    expect(part.rectifier.recovery).toEqual(pair.rectifier.recovery)
    const measured = calibrated(rampRow({ recoveryTime: 62e-9, charge: 181e-9, peakReverseCurrent: 6.1, slope: 200e6 }))
    expect(measured.codes).not.toContain('charge-computed')
  })

  it('without a stated definition of trr is worth less and says so', () => {
    const unknown = calibrated(rampRow({ recoveryTime: 42e-9, recoveryTimeBy: { kind: 'unknown' } }))
    expect(unknown.codes).toContain('trr-definition-unknown')
    const known = calibrated(rampRow({ recoveryTime: 42e-9 }))
    expect(unknown.at(8, 1e8, 25).lifetimeDeviation).toBeGreaterThan(1.3 * known.at(8, 1e8, 25).lifetimeDeviation)
  })

  it('without current, slope or junction takes I0, a0 and 25 °C, with doubt about the first two, and says so', () => {
    const figures = { recoveryTime: 42e-9, charge: 60e-9 }
    const bare = calibrated(rampRow({ ...figures, current: null, slope: null, junction: null }))
    const full = calibrated(rampRow(figures))
    expect(bare.dataOf('row-condition-assumed')!.condition).toBe('current and slope')
    expect(bare.codes).toContain('row-junction-assumed')
    expect(bare.at(8, 1e8, 25).lifetime).toBeGreaterThan(0.8 * full.at(8, 1e8, 25).lifetime)
    expect(bare.at(8, 1e8, 25).lifetimeDeviation).toBeGreaterThan(2 * full.at(8, 1e8, 25).lifetimeDeviation)
  })

  it('read at another reverse voltage tells less about softness, and without a voltage still less', () => {
    const ratioDeviation = (voltage: number | null) =>
      calibrated(rampRow({ ...made, slope: 200e6, voltage })).at(8, 200e6, 25).ratioDeviation
    expect(ratioDeviation(400)).toBeLessThan(ratioDeviation(200))
    expect(ratioDeviation(200)).toBeLessThan(ratioDeviation(null))
  })

  it('of grade maximum is taken as 1.65 times the centre, and the shift back reaches the row exactly', () => {
    const part = calibrated(rampRow({ ...exact, ...made, charge: null, grade: 'maximum' }))
    const { lifetime, tailTime } = part.at(8, 200e6, 25)
    expect(Math.log(lifetime / 60e-9)).toBeCloseTo(-0.5, 3)
    const shift = part.rectifier.maximumRecoveryShift!
    expect(Math.log(lifetime) + shift.lifetime).toBeCloseTo(Math.log(60e-9), 9)
    expect(Math.log(lifetime / tailTime - 1) + shift.ratio).toBeCloseTo(Math.log(2), 9)
    expect(part.codes).toContain('maximum-only')
  })

  it('of grade maximum that states one figure is reached along the lifetime', () => {
    const part = calibrated(
      rampRow({ ...made, slope: 200e6 }),
      rampRow({ slope: 200e6, grade: 'maximum', recoveryTime: 100e-9 }),
    )
    const { lifetime, tailTime } = part.at(8, 200e6, 25)
    const shift = part.rectifier.maximumRecoveryShift!
    expect(shift.ratio).toBe(0)
    const guaranteed = lumpedFigures(condition, Math.log(lifetime) + shift.lifetime, Math.log(lifetime / tailTime - 1))
    expect(guaranteed.recoveryTime / 100e-9).toBeCloseTo(1, 9)
  })

  it('sets the spread between units: the least of its rows, the estimated one without any', () => {
    expect(calibrated().rectifier.recovery!.unitSpread).toBe(0.2)
    expect(calibrated(rampRow({ charge: 50e-9 })).rectifier.recovery!.unitSpread).toBe(0.15)
    const both = calibrated(rampRow({ charge: 50e-9 }), rampRow({ charge: 50e-9, grade: 'measured' }))
    expect(both.rectifier.recovery!.unitSpread).toBe(0.1)
    expect(calibrated(rampRow({ charge: 50e-9, spread: 0.02 })).rectifier.recovery!.unitSpread).toBe(0.02)
  })
})

describe('rows of one record', () => {
  const cold = rampRow({ recoveryTime: 60e-9, charge: 90e-9 })

  it('whose charge falls when hot are told, and the fit that follows them too', () => {
    const part = calibrated(
      cold,
      rampRow({ recoveryTime: 50e-9, charge: 70e-9, junction: kelvin(125), place: place('recovery row 2') }),
    )
    expect(part.dataOf('hot-below-cold')).toEqual({ hot: 70e-9, cold: 90e-9, hotAt: 398.15, coldAt: 298.15 })
    expect(part.codes).toContain('evidence-falls')
    expect(part.dataOf('evidence-falls')!.quantity).toBe('temperature')
  })

  it('that agree are not accused', () => {
    const part = calibrated(cold, rampRow({ recoveryTime: 95e-9, charge: 190e-9, junction: kelvin(125) }))
    for (const code of ['hot-below-cold', 'evidence-falls', 'rows-contradict', 'row-inconsistent'])
      expect(part.codes).not.toContain(code)
  })

  it('whose charge grows a little when hot are not told', () => {
    const part = calibrated(cold, rampRow({ recoveryTime: 70e-9, charge: 110e-9, junction: kelvin(125) }))
    expect(part.codes).not.toContain('hot-below-cold')
  })

  it('whose charge falls with a harder slope make a fit that is told', () => {
    const harder = rampRow({ slope: 500e6, recoveryTime: 30e-9, charge: 80e-9, spread: 0.01 })
    const part = calibrated({ ...cold, spread: 0.01 }, harder)
    expect(part.dataOf('evidence-falls')!.quantity).toBe('slope')
  })

  it('that cannot both be of one part are told with their distance', () => {
    const part = calibrated(cold, rampRow({ recoveryTime: 150e-9, charge: 500e-9, place: place('recovery row 2') }))
    expect(part.codes).toContain('rows-contradict')
    expect(part.dataOf('rows-contradict')!.distance).toBeGreaterThan(3)
  })

  it('with a maximum below the typical figure are told', () => {
    const part = calibrated(cold, rampRow({ charge: 80e-9, grade: 'maximum' }))
    expect(part.dataOf('maximum-below-typical')).toEqual({
      property: 'recovery',
      maximum: 'Qrr 80 nC',
      typical: 'Qrr 90 nC',
    })
  })

  it('that are typical only are told; one maximum or measured row ends that', () => {
    expect(calibrated(cold).codes).toContain('typical-only')
    expect(calibrated(cold, rampRow({ charge: 200e-9, grade: 'maximum' })).codes).not.toContain('typical-only')
    expect(calibrated(cold, rampRow({ charge: 90e-9, grade: 'measured' })).codes).not.toContain('typical-only')
  })
})
