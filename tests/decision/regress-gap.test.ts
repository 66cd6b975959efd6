import { describe, expect, it } from 'vitest'
import { type GapInput, regressGap } from '../../src/decision/regress-gap.ts'
import { shareVariance } from '../../src/decision/sensitivity.ts'
import { latinHypercube } from '../../src/numerics/latin-hypercube.ts'
import { seededStream } from '../../src/numerics/seeded-stream.ts'

const normals = (dimensions: number, draws = 1000, key = 'gap'): Float64Array[] =>
  latinHypercube({ draws, dimensions, stream: seededStream(key) })
const each = (draws: number, value: (draw: number) => number): Float64Array =>
  Float64Array.from({ length: draws }, (_, draw) => value(draw))
const sharesOf = (gap: Float64Array, inputs: readonly GapInput[]): Record<string, number> =>
  Object.fromEntries(shareVariance(regressGap(gap, inputs)!).map(({ input, share }) => [input, share]))

describe('regressGap and shareVariance', () => {
  it('give the exact shares of a straight sum: 9, 4 and 1 of 14', () => {
    const [a, b, c] = normals(3)
    const gap = each(1000, (d) => 7 + 3 * a![d]! - 2 * b![d]! + c![d]!)
    const inputs = [
      { name: 'c', columns: [c!] },
      { name: 'a', columns: [a!] },
      { name: 'b', columns: [b!] },
    ]
    const shares = shareVariance(regressGap(gap, inputs)!)
    expect(shares.map(({ input }) => input)).toEqual(['a', 'b', 'c'])
    expect(shares.map(({ share }) => share * 14).map(Math.round)).toEqual([9, 4, 1])
    for (const [index, exact] of [9 / 14, 4 / 14, 1 / 14].entries()) expect(shares[index]!.share).toBeCloseTo(exact, 2)
    expect(regressGap(gap, inputs)!.explained).toBeCloseTo(1, 10)
  })

  it('see an input that acts only by its square, which straight coefficients would miss', () => {
    const [a, b] = normals(2)
    // Var(a² ) = 2, Var(b) = 1: shares 2/3 and 1/3.
    const shares = sharesOf(
      each(1000, (d) => a![d]! ** 2 + b![d]!),
      [
        { name: 'square', columns: [a!] },
        { name: 'line', columns: [b!] },
      ],
    )
    expect(shares.square).toBeCloseTo(2 / 3, 1)
    expect(shares.square! + shares.line!).toBeCloseTo(1, 10)
  })

  it('leave interaction between inputs unexplained but count it inside one input', () => {
    const [a, b] = normals(2)
    const gap = each(1000, (d) => a![d]! + a![d]! * b![d]!)
    const apart = regressGap(gap, [
      { name: 'a', columns: [a!] },
      { name: 'b', columns: [b!] },
    ])!
    // Var = 1 + 1: half is interaction.
    expect(apart.explained).toBeCloseTo(0.5, 1)
    const together = regressGap(gap, [{ name: 'both', columns: [a!, b!] }])!
    expect(together.explained).toBeCloseTo(1, 10)
  })

  it('do not depend on how the columns of one input are mixed, scaled and shifted', () => {
    const [a, b, c] = normals(3)
    const gap = each(1000, (d) => Math.exp(0.3 * a![d]! - 0.2 * b![d]!) + 0.3 * c![d]!)
    const other = { name: 'other', columns: [c!] }
    const plain = sharesOf(gap, [{ name: 'recovery', columns: [a!, b!] }, other])
    const mixed = {
      name: 'recovery',
      columns: [each(1000, (d) => 1e-9 * (5 + a![d]! + b![d]!)), each(1000, (d) => 2e6 * b![d]!)],
    }
    expect(sharesOf(gap, [mixed, other]).recovery).toBeCloseTo(plain.recovery!, 9)
  })

  it('agree with the definition, the variance of the conditional mean, on a nonlinear gap', () => {
    const [a, b, c] = normals(3, 4000)
    // E[gap | a] = e^{0.3 a} + const: variance e^{0.18} − e^{0.09}; c: 0.25; the product a·b is pure interaction: 0.04.
    const gap = each(4000, (d) => Math.exp(0.3 * a![d]!) + 0.5 * c![d]! + 0.2 * a![d]! * b![d]!)
    const ofA = Math.exp(0.18) - Math.exp(0.09)
    const sum = ofA + 0.25 + 0.04
    const shares = sharesOf(gap, [
      { name: 'a', columns: [a!] },
      { name: 'b', columns: [b!] },
      { name: 'c', columns: [c!] },
    ])
    expect(shares.a).toBeCloseTo(ofA / sum, 1)
    expect(Math.abs(shares.a! - ofA / sum)).toBeLessThan(0.02)
    expect(Math.abs(shares.c! - 0.25 / sum)).toBeLessThan(0.02)
    expect(shares.b).toBeLessThan(0.005)
  })

  it('give next to nothing to inputs that do not act, however many there are', () => {
    let idle = 0
    let explained = 0
    for (let world = 0; world < 20; world++) {
      const columns = normals(22, 400, `idle-${world}`)
      const inputs = columns.slice(0, 21).map((column, index) => ({ name: `input-${index}`, columns: [column] }))
      const gap = each(400, (d) => columns[0]![d]! + columns[21]![d]!)
      explained += regressGap(gap, inputs)!.explained / 20
      idle += (1 - sharesOf(gap, inputs)['input-0']! / regressGap(gap, inputs)!.explained) / 20
    }
    // Half of the variance comes from a column that is no input. Of the rest, 20 idle inputs of two terms each may keep
    // what clipping at zero leaves of chance: 20 · 2/e · 0.5/357 of the variance, 0.04 of the explained half.
    expect(Math.abs(explained - 0.5)).toBeLessThan(0.03)
    expect(idle).toBeLessThan(0.055)
  })

  it('leave lost draws out', () => {
    const [a, b] = normals(2)
    const gap = each(1000, (d) => (a![d]! > 1 ? Number.NaN : 2 * b![d]!))
    const regression = regressGap(gap, [
      { name: 'a', columns: [a!] },
      { name: 'b', columns: [b!] },
    ])!
    expect(regression.parts[0]!.variance).toBeLessThan(1e-20)
    expect(regression.parts[1]!.gradient[0]).toBeCloseTo(2, 10)
    expect(regression.explained).toBeCloseTo(1, 10)
  })

  it('take constant columns for what they are, rounding included', () => {
    const [a] = normals(1)
    const regression = regressGap(
      each(1000, (d) => a![d]! / 3),
      [
        { name: 'fixed', columns: [each(1000, () => 0.1), each(1000, (d) => 300 + (d % 2) * 1e-13)] },
        { name: 'a', columns: [a!] },
      ],
    )!
    expect(regression.parts[0]).toEqual({ name: 'fixed', variance: 0, gradient: Float64Array.of(0, 0) })
    expect(regression.parts[1]!.gradient[0]).toBeCloseTo(1 / 3, 12)
  })

  it('fit straight terms only where draws are few, and say nothing where they are fewer', () => {
    const [a, b] = normals(2, 12)
    const gap = each(12, (d) => a![d]! + a![d]! ** 2 + b![d]!)
    const inputs = [
      { name: 'a', columns: [a!] },
      { name: 'b', columns: [b!] },
    ]
    // Two straight terms need 8 draws, four terms 16.
    expect(regressGap(gap, inputs)!.explained).toBeLessThan(0.999)
    const [c, d] = normals(2, 16)
    const enough = each(16, (k) => c![k]! + c![k]! ** 2 + d![k]!)
    expect(
      regressGap(enough, [
        { name: 'c', columns: [c!] },
        { name: 'd', columns: [d!] },
      ])!.explained,
    ).toBeCloseTo(1, 10)
    expect(
      regressGap(
        gap.subarray(0, 7),
        inputs.map((input) => ({ ...input, columns: input.columns.map((x) => x.subarray(0, 7)) })),
      ),
    ).toBeNull()
  })

  it('say nothing about a gap that is constant, lost or has no inputs', () => {
    const [a] = normals(1)
    const input = [{ name: 'a', columns: [a!] }]
    expect(
      regressGap(
        each(1000, () => 0.1),
        input,
      ),
    ).toBeNull()
    expect(
      regressGap(
        each(1000, () => Number.NaN),
        input,
      ),
    ).toBeNull()
    expect(regressGap(a!, [])).toBeNull()
    expect(regressGap(a!, [{ name: 'fixed', columns: [each(1000, () => 1)] }])).toBeNull()
    expect(regressGap(new Float64Array(0), [{ name: 'a', columns: [new Float64Array(0)] }])).toBeNull()
  })

  it('give shares between 0 and 1 that add up to the explained share', () => {
    for (let world = 0; world < 50; world++) {
      const columns = normals(6, 60 + world, `world-${world}`)
      const inputs = [0, 2, 4].map((k) => ({ name: `input-${k}`, columns: columns.slice(k, k + 2) }))
      const gap = each(60 + world, (d) => Math.exp(columns[0]![d]!) * (1 + columns[3]![d]!) + columns[5]![d]! ** 3)
      const regression = regressGap(gap, inputs)!
      const shares = shareVariance(regression)
      for (const { share } of shares) expect(share).toBeGreaterThanOrEqual(0)
      expect(shares.reduce((sum, { share }) => sum + share, 0)).toBeCloseTo(regression.explained, 12)
      expect(regression.explained).toBeLessThanOrEqual(1)
    }
  })

  it('give the mean derivative as gradient, in watts per unit of the column', () => {
    const [a] = normals(1, 4000)
    const temperature = a!.map((value) => 350 + 12 * value)
    // d/dT of T²/100 is T/50; its mean over the draws is 7.
    const { gradient } = regressGap(
      temperature.map((value) => value ** 2 / 100),
      [{ name: 'T', columns: [temperature] }],
    )!.parts[0]!
    expect(gradient[0]).toBeCloseTo(7, 2)
  })
})
