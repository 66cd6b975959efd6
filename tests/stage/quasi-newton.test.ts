import { describe, expect, it } from 'vitest'
import { createQuasiNewton, largest, placeStep, updateInverse } from '../../src/stage/quasi-newton.ts'

type Vector = readonly number[]
const rows = [0, 1, 2]

/** Matrix times vector, and its transpose, of nine numbers by rows. */
const times = (h: ArrayLike<number>, v: Vector): number[] =>
  rows.map((i) => rows.reduce((sum, j) => sum + h[3 * i + j]! * v[j]!, 0))
const dot = (a: Vector, b: Vector): number => rows.reduce((sum, k) => sum + a[k]! * b[k]!, 0)

const inverse = [1.2, 0.3, -0.2, 0.1, 0.9, 0.4, -0.5, 0.25, 1.1]
const before = [2, -3, 1.5]
const after = [0.4, 0.7, -0.6]

function updated() {
  const solver = createQuasiNewton()
  solver.inverse.set(inverse)
  solver.residual.set(before)
  placeStep(solver)
  solver.residual.set(after)
  updateInverse(solver)
  return solver
}

describe('the quasi-Newton step', () => {
  it('is inverse times residual, and keeps the residual it was taken from', () => {
    const { step, previous } = updated()
    times(inverse, before).forEach((expected, k) => {
      expect(step[k]).toBeCloseTo(expected, 14)
    })
    expect([...previous]).toEqual(before)
  })
})

describe('the update by rank one', () => {
  const fall = before.map((value, k) => value - after[k]!)

  it('maps the fall of the residual to the step that caused it', () => {
    const { inverse: h, step } = updated()
    times(h, fall).forEach((found, k) => {
      expect(found).toBeCloseTo(step[k]!, 13)
    })
  })

  it('changes the old inverse by (s - H y) times s H over s H y and nothing else', () => {
    const { inverse: h, step } = updated()
    const s = [...step]
    const sh = rows.map((j) => rows.reduce((sum, i) => sum + s[i]! * inverse[3 * i + j]!, 0))
    const hy = times(inverse, fall)
    for (const i of rows)
      for (const j of rows)
        expect(h[3 * i + j]).toBeCloseTo(inverse[3 * i + j]! + ((s[i]! - hy[i]!) * sh[j]!) / dot(s, hy), 13)
  })

  it('is left out where the residual did not move, which tells nothing', () => {
    const solver = createQuasiNewton()
    solver.inverse.set(inverse)
    solver.residual.set(before)
    placeStep(solver)
    updateInverse(solver)
    expect([...solver.inverse]).toEqual(inverse)
  })

  it('finds the root of a linear system in as many steps as Broyden takes: twice its three unknowns', () => {
    const matrix = [3, 1, 0.5, -1, 2, 0.3, 0.2, -0.4, 4]
    const right = [1, -2, 0.5]
    const solver = createQuasiNewton()
    solver.inverse.set([1, 0, 0, 0, 1, 0, 0, 0, 1])
    const at = [0, 0, 0]
    const place = (): void => {
      const image = times(matrix, at)
      solver.residual.set(right.map((value, k) => value - image[k]!))
    }
    place()
    for (let round = 0; round < 6; round++) {
      placeStep(solver)
      for (const k of rows) at[k]! += solver.step[k]!
      place()
      updateInverse(solver)
    }
    expect(largest(solver.residual)).toBeLessThan(1e-9)
  })
})

describe('the largest of three', () => {
  it.each([
    [[-3, 1, 2], 3],
    [[1, -4, 2], 4],
    [[1, 2, -5], 5],
  ])('of %j is %d', (values, size) => {
    expect(largest(Float64Array.from(values))).toBe(size)
  })
})
