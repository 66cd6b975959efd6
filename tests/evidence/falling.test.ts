import { describe, expect, it } from 'vitest'
import type { CalibratedRectifier } from '../../src/domain/calibrated-rectifier.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { forwardDesign, leakageDesign, recoveryDesigns } from '../../src/evidence/design-rows.ts'
import { findFalling } from '../../src/evidence/find-falling.ts'
import { lumpedFigures } from './lumped.ts'
import { kelvin, rampRow, record } from './records.ts'

const { rectifier } = calibrate({ record: record({ recovery: [rampRow({ charge: 50e-9 })] }), blockingVoltage: 400 })

/** A part whose posterior mean has these coefficients of ln(I/I0), ln(a/a0) and ln(T/T0) in u and in y. */
function part(u: readonly number[], y: readonly number[] = [0, 0, 0], lifetime = 35e-9): CalibratedRectifier {
  const mean = Float64Array.of(Math.log(lifetime), ...u, 1, ...y)
  return { ...rectifier, recovery: { ...rectifier.recovery!, posterior: { ...rectifier.recovery!.posterior, mean } } }
}

const falls = (held: CalibratedRectifier) => findFalling(held).map(({ data }) => data.quantity)

/** ln Qrr of such a part at shares of I0 and a0 and a rise above 25 °C. */
function lnCharge(u: readonly number[], y: readonly number[], [lnI, lnA, lnT]: readonly [number, number, number]) {
  const at = { current: 8 * Math.exp(lnI), slope: 1e8 * Math.exp(lnA), junction: 298.15 }
  const over = (c: readonly number[]) => c[0]! * lnI + c[1]! * lnA + c[2]! * lnT
  return Math.log(lumpedFigures(at, Math.log(35e-9) + over(u), 1 + over(y)).charge)
}

/** Least exponent of Qrr over the quantity `index` at the eight corners: 0.25 and 1 I0, 1 and 5 a0, 25 and 125 °C. */
function leastExponent(index: 0 | 1 | 2, u: readonly number[], y: readonly number[]): number {
  let least = Number.POSITIVE_INFINITY
  for (const lnI of [Math.log(0.25), 0]) {
    for (const lnA of [0, Math.log(5)]) {
      for (const lnT of [0, Math.log(398.15 / 298.15)]) {
        const at = (by: number) => {
          const corner: [number, number, number] = [lnI, lnA, lnT]
          corner[index] += by
          return lnCharge(u, y, corner)
        }
        least = Math.min(least, (at(1e-5) - at(-1e-5)) / 2e-5)
      }
    }
  }
  return least
}

describe('a fit in which Qrr falls', () => {
  it.each([
    ['current', 0],
    ['slope', 1],
    ['temperature', 2],
  ] as const)('with %s is told from an exponent of −0.05 at any corner of the usual range', (quantity, index) => {
    for (const through of ['u', 'y'] as const) {
      const coefficients = (value: number): readonly [number[], number[]] => {
        const moved = [0, 0, 1].map((rest, position) => (position === index ? value : rest))
        return through === 'u' ? [moved, [0, 0, 0]] : [[0, 0, index === 2 ? 0 : 1], moved]
      }
      // more tail time for its lifetime is less charge before it, so y may work either way: the sign is looked for
      const [near, away] = [-8, 8].map((end) => leastExponent(index, ...coefficients(end)))
      const end = near! < away! ? -8 : 8
      let [kept, fallen] = [0, end]
      for (let halving = 0; halving < 40; halving++) {
        const middle = (kept + fallen) / 2
        if (leastExponent(index, ...coefficients(middle)) > -0.05) kept = middle
        else fallen = middle
      }
      expect(falls(part(...coefficients(kept - 1e-3 * end)))).not.toContain(quantity)
      expect(falls(part(...coefficients(fallen + 1e-3 * end)))).toContain(quantity)
    }
  })

  it('is told quantity by quantity, with its part', () => {
    expect(falls(part([0, 0, 2]))).toEqual([])
    expect(findFalling(part([-2, -2, -2]))).toEqual(
      ['current', 'slope', 'temperature'].map((quantity) => ({
        code: 'evidence-falls',
        candidate: 'test-part',
        data: { quantity },
      })),
    )
  })

  it('is not looked for in a guess, nor without stored charge', () => {
    const falling = part([-2, -2, -2])
    expect(falls({ ...falling, recovery: { ...falling.recovery!, origin: 'class-guess' } })).toEqual([])
    expect(falls({ ...falling, recovery: null })).toEqual([])
  })
})

describe('a design row', () => {
  const whole = { ratedCurrent: 8, current: 4, slope: 3e8, junction: kelvin(125) }
  const heat = Math.log(398.15 / 298.15)

  it('of recovery holds 1 and the logarithms of current, slope and temperature, in its own half', () => {
    const over = [1, Math.log(0.5), Math.log(3), heat]
    const [u, y] = recoveryDesigns(whole)
    expect([...u]).toEqual([...over.map((value) => expect.closeTo(value, 14)), 0, 0, 0, 0])
    expect([...y]).toEqual([0, 0, 0, 0, ...over.map((value) => expect.closeTo(value, 14))])
  })

  it('of recovery goes no lower than a hundredth of the rated current', () => {
    expect(recoveryDesigns({ ...whole, current: 0 })[0][1]).toBe(Math.log(0.01))
    expect(recoveryDesigns({ ...whole, current: 0.09 })[0][1]).toBeCloseTo(Math.log(0.09 / 8), 14)
  })

  it('of forward voltage holds 1, ln(I/I0), I/I0 and each times the rise', () => {
    const design = forwardDesign({ ratedCurrent: 8, current: 4, junction: kelvin(125), line: false })
    const ln = Math.log(0.5)
    expect([...design].map((value) => Number(value.toPrecision(12)))).toEqual(
      [1, ln, 0.5, 100, 100 * ln, 50].map((value) => Number(value.toPrecision(12))),
    )
  })

  it('of forward voltage is in proportion to the current below a hundredth of it, but a line keeps its threshold', () => {
    const at = (current: number, line: boolean) => [
      ...forwardDesign({ ratedCurrent: 8, current, junction: kelvin(125), line }),
    ]
    const half = at(0.08, false).map((value) => expect.closeTo(value / 2, 12))
    expect(at(0.04, false)).toEqual(half)
    expect(at(0.04, true).map((value) => Number(value.toPrecision(9)))).toEqual([1, 0, 0.005, 100, 0, 0.5])
    expect(at(4, true)[1]).toBe(0)
  })

  it('of leakage holds 1, 1/T0 − 1/T and ln(V/V0)', () => {
    const [one, inverse, ln] = leakageDesign({ ratedVoltage: 600, voltage: 300, junction: kelvin(125) })
    expect([one, inverse, ln]).toEqual([1, expect.closeTo(1 / 298.15 - 1 / 398.15, 15), -Math.LN2])
  })
})
