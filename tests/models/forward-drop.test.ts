import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  chordConductionPower,
  type ForwardRangeInput,
  forwardDrop,
  forwardDropUsable,
  trapezoidConductionPower,
} from '../../src/models/forward-drop.ts'
import { gaussLegendre, integrate } from '../../src/numerics/gauss-legendre.ts'
import { evenly, spread } from './random-inputs.ts'

const rule = gaussLegendre(24)

/** Mean of v i by quadrature, split at the knee and at every doubling, where the logarithm is smooth enough for the rule. */
function byQuadrature(input: ForwardRangeInput): number {
  const f = (current: number) => current * forwardDrop({ ...input, current })
  if (input.peak === input.valley) return f(input.peak)
  const edges = [input.valley]
  for (let x = 0.01 * input.ratedCurrent; x < input.peak; x *= 2) if (x > input.valley) edges.push(x)
  edges.push(input.peak)
  let sum = 0
  for (let n = 1; n < edges.length; n++) sum += integrate({ f, low: edges[n - 1]!, high: edges[n]!, rule })
  return sum / (input.peak - input.valley)
}

const curve = { constant: 1, logarithmic: 0.045, linear: 0.3, ratedCurrent: 8, line: false }
const curves = fc.record({
  constant: evenly(0.3, 2),
  logarithmic: evenly(0, 0.06),
  linear: evenly(0, 1),
  ratedCurrent: spread(0.5, 40),
  line: fc.boolean(),
})

describe('forward drop', () => {
  it('is the junction law above a hundredth of the rated current and a line through the origin below', () => {
    expect(forwardDrop({ ...curve, current: 8 })).toBeCloseTo(1.3, 12)
    expect(forwardDrop({ ...curve, current: 0.8 })).toBeCloseTo(1 + 0.045 * Math.log(0.1) + 0.03, 12)
    const knee = forwardDrop({ ...curve, current: 0.08 })
    expect(forwardDrop({ ...curve, current: 0.0799999999 })).toBeCloseTo(knee, 8)
    expect(forwardDrop({ ...curve, current: 0.02 })).toBeCloseTo(knee / 4, 12)
    expect(forwardDrop({ ...curve, current: 0 })).toBe(0)
  })

  it('takes a given line as it stands, without logarithm or small-current rule', () => {
    expect(forwardDrop({ ...curve, line: true, current: 0 })).toBe(1)
    expect(forwardDrop({ ...curve, line: true, current: 4 })).toBeCloseTo(1.15, 12)
  })
})

describe('conduction over a falling current', () => {
  it('equals quadrature to 1e-10 for every curve and range, the knee inside included', () => {
    fc.assert(
      fc.property(curves, evenly(0, 1.2), spread(1e-4, 3), (shape, share, top) => {
        const peak = top * shape.ratedCurrent
        const input = { ...shape, peak, valley: Math.min(1, share) * peak }
        const expected = byQuadrature(input)
        expect(Math.abs(trapezoidConductionPower(input) - expected)).toBeLessThanOrEqual(1e-10 * expected)
      }),
      { numRuns: 400 },
    )
  })

  it('does not lose its digits where valley and peak almost meet', () => {
    for (const gap of [0, 1e-14, 1e-10, 1e-6, 1e-3, 0.0299, 0.0301, 0.1]) {
      const input = { ...curve, peak: 8, valley: 8 * (1 - gap) }
      expect(Math.abs(trapezoidConductionPower(input) / byQuadrature(input) - 1)).toBeLessThan(1e-12)
    }
  })

  it('equals quadrature when the whole range lies below the knee, or at rest', () => {
    const input = { ...curve, peak: 0.05, valley: 0.01 }
    expect(trapezoidConductionPower(input)).toBeCloseTo(byQuadrature(input), 14)
    expect(trapezoidConductionPower({ ...curve, peak: 0, valley: 0 })).toBe(0)
    const resting = { ...curve, peak: 0.05, valley: 0.05 }
    expect(trapezoidConductionPower(resting)).toBeCloseTo(0.05 * forwardDrop({ ...curve, current: 0.05 }), 14)
  })
})

describe('a curve that cannot be used', () => {
  const range = { valley: 1, peak: 8 }

  it('is one that is not positive or falls somewhere in the range', () => {
    expect(forwardDropUsable({ ...curve, ...range })).toBe(true)
    expect(forwardDropUsable({ ...curve, ...range, constant: -1 })).toBe(false)
    expect(forwardDropUsable({ ...curve, ...range, logarithmic: 0.1, linear: -0.2 })).toBe(false)
    expect(forwardDropUsable({ ...curve, ...range, logarithmic: -0.1, linear: 0.2 })).toBe(false)
    expect(forwardDropUsable({ ...curve, ...range, line: true, linear: -0.1 })).toBe(false)
    expect(forwardDropUsable({ ...curve, ...range, line: true, constant: 0.5, logarithmic: -9, linear: 0.1 })).toBe(
      true,
    )
    expect(forwardDropUsable({ ...curve, constant: 0.1, logarithmic: 0.045, valley: 0, peak: 8 })).toBe(false)
    expect(forwardDropUsable({ ...curve, constant: 0.3, valley: 0, peak: 8 })).toBe(true)
    expect(forwardDropUsable({ ...curve, valley: 0, peak: 0.02 })).toBe(true)
  })

  it('is judged over the range alone, from the small-current line or the end of a given line on', () => {
    const low = { ...curve, constant: 0.1 }
    // 0.1 + 0.045 ln 0.5 + 0.15 is positive, 0.1 + 0.045 ln 0.01 is not
    expect(forwardDropUsable({ ...low, valley: 4, peak: 8 })).toBe(true)
    // a given line is not cut off at a hundredth of the rated current: −2 mV at no current
    expect(forwardDropUsable({ ...curve, line: true, constant: -0.002, valley: 0, peak: 8 })).toBe(false)
    // 0.1 − 0.2 × 0.4 still rises at 3.2 A, 0.1 − 0.2 × 0.6 no more at 4.8 A
    const bent = { ...curve, logarithmic: 0.1, linear: -0.2, valley: 0.8 }
    expect(forwardDropUsable({ ...bent, peak: 3.2 })).toBe(true)
    expect(forwardDropUsable({ ...bent, peak: 4.8 })).toBe(false)
    // −0.1 − ln e + 0.37 e is −0.094
    const sunk = { ...curve, constant: -0.1, logarithmic: -1, linear: 0.37 }
    expect(forwardDropUsable({ ...sunk, valley: 8 * Math.E, peak: 40 })).toBe(false)
  })

  it('needs only a positive drop where the current does not move', () => {
    const falling = { ...curve, line: true, constant: 1, linear: -0.1, valley: 4, peak: 4 }
    expect(forwardDropUsable(falling)).toBe(true)
    expect(forwardDropUsable({ ...falling, constant: 0, linear: 0 })).toBe(false)
  })

  it('is replaced by the chord between its ends, which never books a negative loss', () => {
    const straight = { ...curve, line: true, constant: 0.9, linear: 0.4 }
    expect(chordConductionPower({ ...straight, ...range })).toBeCloseTo(
      trapezoidConductionPower({ ...straight, ...range }),
      12,
    )
    // 1 V at 2 A and 1.3 V at 8 A: (1 × (4 + 8) + 1.3 × (2 + 16))/6
    expect(chordConductionPower({ ...straight, valley: 2, peak: 8 })).toBeCloseTo(35.4 / 6, 12)
    expect(chordConductionPower({ ...straight, ...range, constant: -5 })).toBe(0)
    // a falling curve is held at its higher, earlier value
    expect(chordConductionPower({ ...straight, ...range, linear: -0.4 })).toBeCloseTo(4.5 * (0.9 - 0.05), 12)
    fc.assert(
      fc.property(curves, evenly(-2, 1), (shape, linear) => {
        expect(chordConductionPower({ ...shape, linear, valley: 0.3, peak: 9 })).toBeGreaterThanOrEqual(0)
      }),
    )
  })
})
