import { describe, expect, it } from 'vitest'
import { adviseMeasurement, type MeasurementOption } from '../../src/decision/measure-next.ts'
import { regressGap } from '../../src/decision/regress-gap.ts'
import { latinHypercube } from '../../src/numerics/latin-hypercube.ts'
import { seededStream } from '../../src/numerics/seeded-stream.ts'

const draws = 2000
const columns = latinHypercube({ draws, dimensions: 4, stream: seededStream('measure') })
const each = (value: (draw: number) => number): Float64Array =>
  Float64Array.from({ length: draws }, (_, draw) => value(draw))

/** Recovery of alder (u, y, sd 0.3 each, correlated 0.6), forward of birch (sd 0.05 V), slope: gap = 8 u − 3 y + 20 v + s. */
const u = each((d) => 0.3 * columns[0]![d]!)
const y = each((d) => 0.3 * (0.6 * columns[0]![d]! + 0.8 * columns[1]![d]!))
const v = each((d) => 1 + 0.05 * columns[2]![d]!)
const gap = each((d) => 5 + 8 * u[d]! - 3 * y[d]! + 20 * v[d]! + columns[3]![d]!)
const regression = regressGap(gap, [
  { name: 'recovery of alder', columns: [u, y] },
  { name: 'forward of birch', columns: [v] },
  { name: 'slope', columns: [columns[3]!] },
])!
const recoveryBefore = Float64Array.of(0.09, 0.054, 0.054, 0.09)

const option = (
  input: string,
  id: string,
  property: 'recovery' | 'forward' | 'leakage',
  current = 8,
): MeasurementOption => ({
  input,
  advice: { id, property, current_a: current, slope_a_per_s: property === 'recovery' ? 2e8 : null, junction_c: 80 },
})
const recovery = option('recovery of alder', 'alder', 'recovery')
const forward = option('forward of birch', 'birch', 'forward')

describe('adviseMeasurement', () => {
  it('gives the removed share in closed form', () => {
    const after = Float64Array.of(0.03, 0.01, 0.01, 0.05)
    const advice = adviseMeasurement(regression, [forward, recovery], ({ input }) =>
      input === forward.input
        ? { before: Float64Array.of(0.0025), after: Float64Array.of(0.0005) }
        : { before: recoveryBefore, after },
    )
    // By hand: gᵀBg = 64·0.09 − 48·0.054 + 9·0.09 = 3.978, gᵀAg = 64·0.03 − 48·0.01 + 9·0.05 = 1.89;
    // forward 400·0.0025 = 1 of which 0.8 goes; slope 1; Var = 5.978.
    expect(advice.map(({ id }) => id)).toEqual(['alder', 'birch'])
    expect(Math.abs(advice[0]!.share - (3.978 - 1.89) / 5.978)).toBeLessThan(0.01)
    expect(Math.abs(advice[1]!.share - 0.8 / 5.978)).toBeLessThan(0.01)
    expect(advice[0]).toEqual({ ...recovery.advice, share: advice[0]!.share })
  })

  it('predicts what happens when the doubt does shrink', () => {
    const advice = adviseMeasurement(regression, [recovery], () => ({
      before: recoveryBefore,
      after: recoveryBefore.map((value) => value / 4),
    }))
    const after = each((d) => gap[d]! - 4 * u[d]! + 1.5 * y[d]!)
    const removed = 1 - variance(after) / variance(gap)
    expect(Math.abs(advice[0]!.share - removed)).toBeLessThan(0.01)
  })

  it('names the best condition of each part and property once', () => {
    const options = [2, 8, 16].map((current) => option('recovery of alder', 'alder', 'recovery', current))
    const advice = adviseMeasurement(regression, options, ({ advice: { current_a } }) => ({
      before: recoveryBefore,
      after: recoveryBefore.map((value) => value * (current_a === 8 ? 0.2 : 0.5)),
    }))
    expect(advice.map(({ current_a }) => current_a)).toEqual([8])
  })

  it('gives at most three, the same in any order of the options', () => {
    const options = ['d', 'b', 'a', 'c'].map((id) => option('forward of birch', id, 'forward'))
    const halve = () => ({ before: Float64Array.of(1), after: Float64Array.of(0.5) })
    const ids = (list: MeasurementOption[]) => adviseMeasurement(regression, list, halve).map(({ id }) => id)
    expect(ids(options)).toEqual(['a', 'b', 'c'])
    expect(ids(options.toReversed())).toEqual(['a', 'b', 'c'])
  })

  it('leaves out what would remove nothing or is no input of the gap', () => {
    const useless = () => ({ before: Float64Array.of(1), after: Float64Array.of(1.5) })
    expect(adviseMeasurement(regression, [forward], useless)).toEqual([])
    const exact = () => ({ before: Float64Array.of(0), after: Float64Array.of(0) })
    expect(adviseMeasurement(regression, [forward], exact)).toEqual([])
    expect(adviseMeasurement(regression, [option('leakage of oak', 'oak', 'leakage')], useless)).toEqual([])
  })

  it('never claims more than the input has in the gap', () => {
    const perfect = () => ({ before: Float64Array.of(1), after: Float64Array.of(0) })
    const [advice] = adviseMeasurement(regression, [forward], perfect)
    expect(Math.abs(advice!.share - 1 / 5.978)).toBeLessThan(0.01)
  })
})

function variance(values: Float64Array): number {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length
  return values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / values.length
}
