import { describe, expect, it } from 'vitest'
import { judgeCandidate } from '../../src/decision/accept.ts'
import { adviseMeasurement } from '../../src/decision/measure-next.ts'
import { countOdds } from '../../src/decision/odds.ts'
import { type GapInput, type GapRegression, regressGap } from '../../src/decision/regress-gap.ts'
import { candidate } from './candidates.ts'

/** Three draws in each cell of the grid of three values of two columns: straight, squared and mixed terms are orthogonal. */
const grid = [-1, 0, 1].flatMap((a) => [-1, 0, 1].flatMap((b) => [-1, 0, 1].map((within) => ({ a, b, within }))))
type Point = (typeof grid)[number]
const column = (of: (point: Point) => number): Float64Array => Float64Array.from(grid, of)
const both: readonly GapInput[] = [{ name: 'both', columns: [column(({ a }) => a), column(({ b }) => b)] }]

describe('a regression that can be done by hand', () => {
  it('takes off what chance fits: five terms of one input on 27 draws', () => {
    // Mean square of a b is 4/9. The noise of 0.3 is orthogonal to all terms: 18 of 0.09, on 27 - 1 - 5 degrees.
    const found = regressGap(
      column(({ a, b, within }) => a * b + 0.3 * within),
      both,
    )!
    const noise = 18 * 0.09
    const residual = noise / 21
    expect(found.variance).toBeCloseTo(4 / 9 + noise / 27, 12)
    expect(found.parts[0]!.variance).toBeCloseTo(4 / 9 - (residual * 5) / 21, 12)
    expect(found.explained).toBeCloseTo(1 - residual / ((4 / 9 + noise / 27) * (27 / 26)), 12)
  })

  it('gives each column its own gradient, in watts per unit of that column', () => {
    const [first, second] = both[0]!.columns as [Float64Array, Float64Array]
    const inputs = [{ name: 'both', columns: [first.map((value) => 10 * value), new Float64Array(27).fill(3), second] }]
    const { gradient } = regressGap(
      column(({ a, b, within }) => 2 * a - 5 * b + 0.01 * within),
      inputs,
    )!.parts[0]!
    for (const [k, exact] of [0.2, 0, -5].entries()) expect(gradient[k]).toBeCloseTo(exact, 12)
  })

  it('takes a column of zeros for what it is', () => {
    const inputs = [...both, { name: 'zero', columns: [new Float64Array(27)] }]
    const { parts, explained } = regressGap(
      column(({ a }) => a),
      inputs,
    )!
    expect(parts[1]).toEqual({ name: 'zero', variance: 0, gradient: Float64Array.of(0) })
    expect(explained).toBeCloseTo(1, 12)
  })

  it('asks for four draws a column and says something with just those', () => {
    const found = regressGap(Float64Array.of(1, 2, 3, 4), [{ name: 'one', columns: [Float64Array.of(2, 4, 6, 8)] }])!
    expect(found.explained).toBeCloseTo(1, 12)
    expect(found.parts[0]!.gradient[0]).toBeCloseTo(0.5, 12)
    for (const gap of [Float64Array.of(1, 2, 3), Float64Array.of(1, 2, 3, Number.NaN), new Float64Array(0)])
      expect(regressGap(gap, [{ name: 'one', columns: [gap.map((_, draw) => draw)] }])).toBeNull()
  })

  it('says nothing about a gap of zeros, or one that only rounding moves', () => {
    expect(regressGap(new Float64Array(27), both)).toBeNull()
    expect(
      regressGap(
        column(({ a }) => 1e6 + 1e-9 * a),
        both,
      ),
    ).toBeNull()
    expect(
      regressGap(
        column(({ a }) => 1e-6 * a),
        both,
      ),
    ).not.toBeNull()
  })
})

describe('products inside one input', () => {
  /** Corners of a cube of four dimensions between its centres: columns are independent and their squares vary. */
  const levels = [-1, 0, 1]
  const points = levels.flatMap((a) => levels.flatMap((b) => levels.flatMap((c) => levels.map((d) => [a, b, c, d]))))
  const columnOf = (k: number): Float64Array => Float64Array.from(points, (point) => point[k]!)
  const productOf = (k: number, l: number): Float64Array => Float64Array.from(points, (point) => point[k]! * point[l]!)
  const explained = (columns: number, gap: Float64Array): number =>
    regressGap(gap, [{ name: 'group', columns: [0, 1, 2, 3].slice(0, columns).map(columnOf) }])!.explained

  it.each([
    [0, 1],
    [0, 2],
    [1, 2],
  ])('of three columns: %d times %d is explained', (k, l) => {
    expect(explained(3, productOf(k, l))).toBeCloseTo(1, 12)
  })

  it('of four columns: only their squares are', () => {
    expect(explained(4, productOf(1, 2))).toBe(0)
    for (const k of [0, 1, 2, 3]) expect(explained(4, productOf(k, k))).toBeCloseTo(1, 12)
  })
})

describe('figures at their edges', () => {
  it('a junction a hair of rounding above its limit still passes, the next number does not', () => {
    const limits = { junctionLimit: 400, peakReverseVoltage: 1, reverseVoltage: 2, voltageUse: 1 }
    const currents = { meanCurrent: 1, averageCurrent: 2, parts: 1, settledAtMaximumLeakage: null, recovery: null }
    const hair = 400 * (1 + 1e-9)
    expect(judgeCandidate({ ...limits, ...currents, junction: hair })).toEqual([])
    expect(judgeCandidate({ ...limits, ...currents, junction: hair + 6e-14 })).toHaveLength(1)
  })

  it('the error of the odds is that of the succession rule over the draws less one', () => {
    // One win in four: p = 2/6, and sqrt(p (1 - p)/3).
    const odds = countOdds([candidate('a', [1, 5, 5, 5]), candidate('b', [2, 2, 2, 2])])
    expect(odds[0]!.error).toBeCloseTo(Math.sqrt((1 / 3) * (2 / 3) * (1 / 3)), 15)
    expect(odds[1]!.error).toBeCloseTo(Math.sqrt((2 / 3) * (1 / 3) * (1 / 3)), 15)
  })

  it('a doubt that rounding has left at or below nothing is not worth a measurement', () => {
    const regression: GapRegression = {
      variance: 1,
      explained: 0.8,
      parts: [{ name: 'one', variance: 1, gradient: Float64Array.of(1) }],
    }
    const options = [
      { input: 'one', advice: { id: 'a', property: 'forward', current_a: 1, slope_a_per_s: null, junction_c: 25 } },
    ] as const
    const advise = (before: number, after: number) =>
      adviseMeasurement(regression, options, () => ({
        before: Float64Array.of(before),
        after: Float64Array.of(after),
      }))
    expect(advise(-1e-18, 1e-18)).toEqual([])
    expect(advise(0, -1e-18)).toEqual([])
    expect(advise(1e-18, 0)).toHaveLength(1)
  })
})
