import { describe, expect, it } from 'vitest'
import { fitLeastSquares } from '../../src/capture/fit-least-squares.ts'

type Model = (parameters: Float64Array, x: number) => number

/** Fits a model to readings at 0, 1, 2, ... and counts how often the residuals are asked for. */
function solve(model: Model, readings: readonly number[], start: readonly number[], iterations = 50) {
  let calls = 0
  const found = fitLeastSquares({
    residuals: (parameters, out) => {
      calls += 1
      readings.forEach((y, x) => {
        out[x] = model(parameters, x) - y
      })
    },
    count: readings.length,
    start: Float64Array.from(start),
    steps: Float64Array.from(start, () => 1e-4),
    iterations,
  })
  return { found: [...found], calls }
}

function expectNear(found: readonly number[], truth: readonly number[]): void {
  for (const [j, value] of truth.entries()) expect(found[j]!).toBeCloseTo(value, 4)
}

const line: Model = (p, x) => p[0]! + p[1]! * x
const decay: Model = (p, x) => p[0]! * Math.exp(-p[1]! * x) + p[2]!

describe('least squares', () => {
  it('of a line gives the line of the normal equations', () => {
    // by hand: means 1.5 and 4, rise 11/5, so the start is 4 - 3.3
    const { found } = solve(line, [1, 3, 4, 8], [50, -20])
    expectNear(found, [0.7, 2.2])
  })

  it('of a parabola solves three normal equations', () => {
    // 2 - 3 x + 0.5 x^2, read exactly
    const readings = [0, 1, 2, 3, 4, 5].map((x) => 2 - 3 * x + 0.5 * x * x)
    const { found } = solve((p, x) => p[0]! + p[1]! * x + p[2]! * x * x, readings, [0, 0, 0])
    expectNear(found, [2, -3, 0.5])
  })

  it('gives back the truth of a curve in three parameters', () => {
    const truth = [3, 0.4, -1]
    const readings = Array.from({ length: 12 }, (_, x) => decay(Float64Array.from(truth), x))
    const { found } = solve(decay, readings, [1, 0.1, 0])
    expectNear(found, truth)
  })

  it('of readings that no curve meets has no slope left in any parameter', () => {
    const readings = [3.1, 1.2, 0.4, -0.3, -0.2, -0.7, -0.5]
    const { found } = solve(decay, readings, [2, 0.5, 0])
    const cost = (p: readonly number[]) =>
      readings.reduce((sum, y, x) => sum + (decay(Float64Array.from(p), x) - y) ** 2, 0)
    for (const j of found.keys()) {
      for (const side of [-1, 1]) {
        const moved = found.map((value, i) => (i === j ? value + side * 0.01 : value))
        expect(cost(moved)).toBeGreaterThan(cost(found))
      }
    }
  })

  it('stops where nothing is gained, long before the iterations run out', () => {
    expect(solve(line, [1, 3, 4, 8], [50, -20], 1000).calls).toBeLessThan(40)
    // at the best already: one look, two derivatives, eight steps that gain nothing
    expect(solve(line, [1, 3, 5, 7], [1, 2], 1000).calls).toBeLessThanOrEqual(1 + 2 + 8)
  })

  it('of a line is all but there after one step', () => {
    const { found } = solve(line, [1, 3, 4, 8], [50, -20], 1)
    expect(Math.abs(found[0]! - 0.7)).toBeLessThan(0.5)
    expect(Math.abs(found[1]! - 2.2)).toBeLessThan(0.3)
  })

  it('makes no more steps than it may', () => {
    expect(solve(decay, [5, 2, 1, 0.5], [1, 0.1, 0], 0)).toEqual({ found: [1, 0.1, 0], calls: 1 })
    const once = solve(decay, [5, 2, 1, 0.5], [1, 0.1, 0], 1)
    expect(once.calls).toBeLessThanOrEqual(1 + 3 + 8)
    expect(once.found).not.toEqual([1, 0.1, 0])
  })

  it('stays where it stands when a parameter changes nothing', () => {
    expect(solve((p) => p[0]!, [1, 2, 3], [0.5, 7]).found).toEqual([0.5, 7])
  })

  it('does not step to where the residuals are no numbers', () => {
    // the full step from 9 of the root to 1 would go below zero, where there is no root
    const { found } = solve((p, x) => Math.sqrt(p[0]!) * (x + 1), [1, 2, 3], [9])
    expect(found[0]!).toBeGreaterThan(0)
    expect(found[0]!).toBeCloseTo(1, 3)
  })
})
