import { describe, expect, it } from 'vitest'
import type { CapacitanceData, RectifierClass } from '../../src/domain/rectifier.ts'
import { capacitanceEvidence } from '../../src/evidence/capacitance-evidence.ts'
import { record } from './records.ts'

const through = (
  points: readonly (readonly [voltage: number, capacitance: number])[],
  name: RectifierClass = 'schottky',
) =>
  capacitanceEvidence(
    record({
      class: name,
      capacitance: { kind: 'points', points: points.map(([voltage, capacitance]) => ({ voltage, capacitance })) },
    }),
  )
const of = (capacitance: CapacitanceData | null) => capacitanceEvidence(record({ capacitance }))

describe('the junction capacitance of a record', () => {
  it('is none where it states none, or a charge at no voltage', () => {
    expect(of(null)).toBeNull()
    expect(of({ kind: 'charge', charge: 1e-9, voltage: 0 })).toBeNull()
    expect(of({ kind: 'charge', charge: 1e-9, voltage: 1 })).toEqual({ kind: 'charge', charge: 1e-9, voltage: 1 })
  })

  it('goes through two points with C0 and the grading that they ask for', () => {
    // 100 pF (1 + 8/0.8)^−1/2 and (1 + 80/0.8)^−1/2
    const law = through([
      [8, 100e-12 / Math.sqrt(11)],
      [80, 100e-12 / Math.sqrt(101)],
    ])
    expect(law).toMatchObject({ kind: 'law', builtIn: 0.8 })
    expect(law).toMatchObject({ grading: expect.closeTo(0.5, 12), zeroBias: expect.closeTo(100e-12, 22) })
  })

  it('is the least-squares line of ln C over ln(1 + V/Vj) where points do not lie on one law', () => {
    const [xs, ys] = [
      [0, 1, 3],
      [-23, -23.9, -24.6],
    ] as const
    const law = through(xs.map((x, index) => [0.8 * Math.expm1(x), Math.exp(ys[index]!)]))
    // means 4/3 and −71.5/3; slope −(Σxy − 3 x̄ ȳ)/(Σx² − 3 x̄²) = (97.7 − 286/3)/(10 − 16/3)
    const grading = (97.7 - 286 / 3) / (10 - 16 / 3)
    expect(law).toMatchObject({
      grading: expect.closeTo(grading, 9),
      zeroBias: expect.closeTo(Math.exp(-71.5 / 3 + (grading * 4) / 3), 18),
    })
  })

  it('has a grading between 0 and 0.95, whatever points say', () => {
    expect(
      through([
        [1, 100e-12],
        [10, 200e-12],
      ]),
    ).toMatchObject({ grading: 0 })
    expect(
      through([
        [1, 100e-12],
        [10, 1e-12],
      ]),
    ).toMatchObject({ grading: 0.95 })
  })

  it('takes points at one voltage as one, at the mean of their logarithms and the usual grading', () => {
    const law = through([
      [0, 100e-12],
      [0, 400e-12],
    ])
    expect(law).toMatchObject({ grading: 0.46, zeroBias: expect.closeTo(200e-12, 20) })
  })

  it('leaves points of no capacitance out, and is none where all are', () => {
    expect(
      through([
        [10, 100e-12],
        [20, 0],
      ]),
    ).toEqual(through([[10, 100e-12]]))
    expect(through([[20, 0]])).toBeNull()
    expect(through([])).toBeNull()
  })

  it('has the built-in voltage of its material where none is stated', () => {
    expect(through([[1, 100e-12]], 'sic-schottky')).toMatchObject({ builtIn: 1.2 })
    expect(through([[1, 100e-12]], 'ultrafast')).toMatchObject({ builtIn: 0.8 })
    const law = (builtIn: number) =>
      capacitanceEvidence(
        record({ class: 'sic-schottky', capacitance: { kind: 'law', zeroBias: 1e-10, builtIn, grading: 0.5 } }),
      )
    expect(law(0)).toMatchObject({ builtIn: 1.2 })
    expect(law(0.7)).toMatchObject({ builtIn: 0.7 })
  })
})
