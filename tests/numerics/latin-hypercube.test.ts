import { describe, expect, it } from 'vitest'
import { latinHypercube } from '../../src/numerics/latin-hypercube.ts'
import { normalQuantile } from '../../src/numerics/normal-quantile.ts'
import { seededStream } from '../../src/numerics/seeded-stream.ts'

describe('latinHypercube', () => {
  it('puts exactly one draw of each column in each stratum', () => {
    const columns = latinHypercube({ draws: 200, dimensions: 3, stream: seededStream(1), distribution: 'uniform' })
    expect(columns).toHaveLength(3)
    for (const column of columns) {
      const strata = Array.from(column, (value) => Math.floor(value * 200)).sort((a, b) => a - b)
      expect(strata).toEqual(Array.from({ length: 200 }, (_, stratum) => stratum))
    }
  })

  it('gives standard normals: the uniform draws through the quantile', () => {
    const normal = latinHypercube({ draws: 50, dimensions: 2, stream: seededStream(7) })
    const uniform = latinHypercube({ draws: 50, dimensions: 2, stream: seededStream(7), distribution: 'uniform' })
    expect(normal).toEqual(uniform.map((column) => column.map(normalQuantile)))
  })

  it('shuffles the columns independently', () => {
    const [one, other] = latinHypercube({ draws: 10000, dimensions: 2, stream: seededStream(3) })
    let product = 0
    for (let draw = 0; draw < 10000; draw++) product += one![draw]! * other![draw]!
    // Standard error of the correlation: 0.01; four of them.
    expect(Math.abs(product / 10000)).toBeLessThan(0.04)
  })

  it('is finite for a single draw and reproducible', () => {
    const once = latinHypercube({ draws: 1, dimensions: 40, stream: seededStream(5) })
    expect(once.every((column) => Number.isFinite(column[0]))).toBe(true)
    expect(latinHypercube({ draws: 1, dimensions: 40, stream: seededStream(5) })).toEqual(once)
  })

  it('keeps 1 out of the last stratum even where rounding reaches it', () => {
    const stream = { uniform: () => 1 - 2 ** -54, below: () => 0 }
    const [column] = latinHypercube({ draws: 1000, dimensions: 1, stream })
    expect(column!.every(Number.isFinite)).toBe(true)
  })

  it('converges much faster than plain draws on an additive function', () => {
    const additive = (x: readonly number[]): number => x[0]! + 0.5 * x[1]! + 0.2 * x[2]! ** 2
    expect(rootMeanSquareError(additive, 0.2, 'stratified')).toBeLessThan(
      rootMeanSquareError(additive, 0.2, 'plain') / 8,
    )
  })

  it('is no worse than plain draws where columns only interact, which is the worst case', () => {
    const product = (x: readonly number[]): number => x[0]! * x[1]!
    const ratio = rootMeanSquareError(product, 0, 'stratified') / rootMeanSquareError(product, 0, 'plain')
    // Both have standard error 1/16 over 128 repetitions of each root mean square.
    expect(ratio).toBeGreaterThan(0.75)
    expect(ratio).toBeLessThan(1.25)
  })
})

/** Of the mean of 256 draws, over 128 repetitions. */
function rootMeanSquareError(
  model: (x: readonly number[]) => number,
  truth: number,
  kind: 'plain' | 'stratified',
): number {
  let squares = 0
  for (let repetition = 0; repetition < 128; repetition++) {
    const stream = seededStream(kind, repetition)
    const plain = (): Float64Array => Float64Array.from({ length: 256 }, () => normalQuantile(stream.uniform()))
    const columns =
      kind === 'plain' ? [plain(), plain(), plain()] : latinHypercube({ draws: 256, dimensions: 3, stream })
    let sum = 0
    for (let draw = 0; draw < 256; draw++) sum += model(columns.map((column) => column[draw]!))
    squares += (sum / 256 - truth) ** 2
  }
  return Math.sqrt(squares / 128)
}
