import { describe, expect, it } from 'vitest'
import { fitFigures } from '../../src/evidence/fit-figures.ts'
import { invertPair, type RampFigures } from '../../src/evidence/invert-pair.ts'
import { type FigureName, logFigure, type RampReading, steadyEvent } from '../../src/evidence/recovery-figures.ts'

const reading: RampReading = { current: 8, slope: 200e6, recoveryTimeBy: { kind: 'line-90-25' }, softnessBy: 'times' }
const made = { lifetime: Math.log(60e-9), ratio: Math.log(2) }
const errors = { recoveryTime: 0.05, charge: 0.04, peakReverseCurrent: 0.03, softness: 0.1 }
const names: readonly FigureName[] = ['recoveryTime', 'charge', 'peakReverseCurrent', 'softness']

type Point = typeof made

const ln = (name: FigureName, { lifetime, ratio }: Point, at = reading) =>
  logFigure(steadyEvent(at, lifetime, ratio), at, name).value

/** The figures of one event, each misread by a factor. */
function misread(factors: Partial<Record<FigureName, number>>): RampFigures {
  return Object.fromEntries(names.map((name) => [name, Math.exp(ln(name, made)) * (factors[name] ?? 1)])) as RampFigures
}

const fitted = (figures: RampFigures, used: readonly FigureName[], start: Point, common = { current: 0, slope: 0 }) =>
  fitFigures({ reading, figures, names: used, errors: { figures: errors, ...common }, start })

const misfitAt = (figures: RampFigures, used: readonly FigureName[], point: Point, at = reading) =>
  used.reduce((sum, name) => sum + ((Math.log(figures[name]!) - ln(name, point, at)) / errors[name]) ** 2, 0)

describe('a fit through three or four figures', () => {
  const cases = [
    ['Qrr 30 % high', { charge: 1.3 }, names.slice(0, 3)],
    ['trr 20 % low', { recoveryTime: 0.8 }, names.slice(0, 3)],
    ['I_RM 15 % low among four', { peakReverseCurrent: 0.85 }, names],
    ['softness twice as high', { softness: 2 }, names],
    ['all of them off', { recoveryTime: 1.1, charge: 0.9, peakReverseCurrent: 1.05, softness: 0.7 }, names],
  ] as const

  it.each(cases)('with %s lies where the misfit is flat, from any start', (_, factors, used) => {
    const figures = misread(factors)
    const found = [
      [0, 0],
      [1, -0.7],
      [-1, 1.3],
      [4, -3],
      [-4, 3],
      [3, 3],
      [-3, -4],
    ].map(([u, y]) => fitted(figures, used, { lifetime: made.lifetime + u!, ratio: made.ratio + y! }))
    const { point, misfit } = found[0]!
    for (const other of found) {
      expect(other.point.lifetime).toBeCloseTo(point.lifetime, 9)
      expect(other.point.ratio).toBeCloseTo(point.ratio, 9)
    }
    expect(misfit).toBeCloseTo(misfitAt(figures, used, point), 9)
    const step = 1e-4
    for (const [u, y] of [
      [step, 0],
      [0, step],
    ] as const) {
      const moved = (sign: 1 | -1) =>
        misfitAt(figures, used, { lifetime: point.lifetime + sign * u, ratio: point.ratio + sign * y })
      const slope = (moved(1) - moved(-1)) / (2 * step)
      const curvature = (moved(1) + moved(-1) - 2 * misfit) / step ** 2
      // where a parabola would have its bottom: no farther than the differences can tell
      expect(Math.abs(slope / curvature)).toBeLessThan(1e-7)
    }
  })

  it('that agree is met exactly', () => {
    const { point, misfit } = fitted(misread({}), names, { lifetime: made.lifetime + 0.5, ratio: 0 })
    expect(point.lifetime).toBeCloseTo(made.lifetime, 11)
    expect(point.ratio).toBeCloseTo(made.ratio, 11)
    expect(misfit).toBeLessThan(1e-20)
  })

  it.each([
    ['2.65 A, hardly below the peak', 2.65, 64e6, { recoveryTime: 65e-9, peakReverseCurrent: 2.775, softness: 0.318 }],
    ['2.18 A', 2.18, 168e6, { recoveryTime: 48e-9, peakReverseCurrent: 3.4, softness: 0.034 }],
    ['4.2 A', 4.2, 65e6, { recoveryTime: 226e-9, peakReverseCurrent: 5.82, softness: 0.276 }],
  ])(
    'goes down to the least misfit where trr ends at %s, and whole steps would go astray',
    (_, until, slope, stated) => {
      const at: RampReading = { ...reading, slope, recoveryTimeBy: { kind: 'level', until } }
      const used = ['recoveryTime', 'peakReverseCurrent', 'softness'] as const
      const figures = { ...stated, charge: null }
      const found = used.map((_, index) => {
        const [first, second] = used.filter((__, position) => position !== index)
        const start = invertPair(at, figures, first!, second!)!
        return fitFigures({
          reading: at,
          figures,
          names: used,
          errors: { figures: errors, current: 0, slope: 0 },
          start,
        })
      })
      const { point, misfit } = found[0]!
      for (const other of found) expect(other.misfit / misfit).toBeCloseTo(1, 9)
      for (let direction = 0; direction < 12; direction++) {
        const angle = (direction * Math.PI) / 6
        for (const reach of [1e-3, 0.1, 1]) {
          const near = {
            lifetime: point.lifetime + reach * Math.cos(angle),
            ratio: point.ratio + reach * Math.sin(angle),
          }
          expect(misfitAt(figures, used, near, at)).toBeGreaterThan(misfit)
        }
      }
    },
  )

  it('has (J’ W J)⁻¹ as its covariance, J by differences', () => {
    const { covariance } = fitted(misread({}), names, made)
    const step = 1e-5
    let [uu, uy, yy] = [0, 0, 0]
    for (const name of names) {
      const by = (u: number, y: number) =>
        (ln(name, { lifetime: made.lifetime + u, ratio: made.ratio + y }) -
          ln(name, { lifetime: made.lifetime - u, ratio: made.ratio - y })) /
        (2 * step)
      const [u, y] = [by(step, 0), by(0, step)]
      uu += u * u * errors[name] ** -2
      uy += u * y * errors[name] ** -2
      yy += y * y * errors[name] ** -2
    }
    const determinant = uu * yy - uy * uy
    for (const [index, expected] of [yy, -uy, -uy, uu].entries())
      expect((covariance[index]! * determinant) / expected).toBeCloseTo(1, 6)
  })

  it.each(['current', 'slope'] as const)('carries a common error of the %s through itself', (what) => {
    const used = names.slice(0, 3)
    const figures = misread({})
    const plain = fitted(figures, used, made).covariance
    const common = fitted(figures, used, made, { current: 0, slope: 0, [what]: 0.4 }).covariance
    // the same figures fitted at a condition that is a little off
    const step = 1e-4
    const moved = (by: number) => {
      const at = { ...reading, [what]: reading[what] * Math.exp(by) }
      return fitFigures({
        reading: at,
        figures,
        names: used,
        errors: { figures: errors, current: 0, slope: 0 },
        start: made,
      }).point
    }
    const [up, down] = [moved(step), moved(-step)]
    const u = (0.4 * (up.lifetime - down.lifetime)) / (2 * step)
    const y = (0.4 * (up.ratio - down.ratio)) / (2 * step)
    for (const [index, term] of [u * u, u * y, u * y, y * y].entries())
      expect((common[index]! - plain[index]!) / term).toBeCloseTo(1, 4)
  })
})

describe('a fit through two figures', () => {
  it('stays where it starts: a pair is met exactly', () => {
    const figures = misread({ recoveryTime: 1.1 })
    const start = invertPair(reading, figures, 'recoveryTime', 'charge')!
    const { point, misfit } = fitted(figures, ['recoveryTime', 'charge'], start)
    expect(point).toBe(start)
    expect(misfit).toBeLessThan(1e-16)
  })
})
