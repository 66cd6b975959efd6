import { describe, expect, it } from 'vitest'
import { hashText, mixBits, seededStream } from '../../src/numerics/seeded-stream.ts'

const first = (...keys: (string | number)[]): number => seededStream(...keys).uniform()

describe('seededStream', () => {
  it('hashes text as published for 64-bit FNV-1a', () => {
    expect(hashText('').toString(16)).toBe('cbf29ce484222325')
    expect(hashText('a').toString(16)).toBe('af63dc4c8601ec8c')
    expect(hashText('foobar').toString(16)).toBe('85944171f73967e8')
  })

  it('expands as published for SplitMix64 started at 1234567', () => {
    const golden = 0x9e3779b97f4a7c15n
    const outputs = [1n, 2n, 3n].map((step) => mixBits(BigInt.asUintN(64, 1234567n + step * golden)))
    expect(outputs).toEqual([6457827717110365317n, 3203168211198807973n, 9817491932198370423n])
  })

  it('gives the same numbers for the same keys and keeps its bytes from release to release', () => {
    const stream = seededStream(1, 'larch', 'recovery')
    const again = seededStream(1, 'larch', 'recovery')
    const numbers = Array.from({ length: 5 }, () => stream.uniform())
    expect(numbers).toEqual(Array.from({ length: 5 }, () => again.uniform()))
    expect(numbers).toMatchInlineSnapshot(`
      [
        0.35073666985396007,
        0.9506487521146461,
        0.4873415407523039,
        0.0406821864943549,
        0.7943521891385878,
      ]
    `)
  })

  it('tells apart keys that only join, type or place differently', () => {
    const values = [
      first('ab', 'c'),
      first('a', 'bc'),
      first('abc'),
      first(1),
      first('1'),
      first(1, 2),
      first(2, 1),
      first(),
    ]
    expect(new Set(values).size).toBe(values.length)
  })

  it('tells apart characters beyond Latin-1', () => {
    expect(first('Ω')).not.toBe(first('©'))
    expect(first('µ')).not.toBe(first('μ'))
  })

  it('starts anywhere in (0, 1) for small neighbouring seeds', () => {
    const starts = Array.from({ length: 10000 }, (_, seed) => first(seed))
    const mean = starts.reduce((sum, value) => sum + value, 0) / starts.length
    // Standard error of the mean of 10000 uniforms: 0.0029; four of them.
    expect(Math.abs(mean - 0.5)).toBeLessThan(0.0115)
    const bins = new Array(20).fill(0)
    for (const value of starts) bins[Math.floor(value * 20)]++
    const chiSquare = bins.reduce((sum, count) => sum + (count - 500) ** 2 / 500, 0)
    // 19 degrees of freedom: 43.8 is exceeded once in 1000.
    expect(chiSquare).toBeLessThan(43.8)
  })

  it('has unrelated neighbouring streams', () => {
    const one = seededStream(1, 'a')
    const other = seededStream(1, 'b')
    let product = 0
    for (let draw = 0; draw < 20000; draw++) product += (one.uniform() - 0.5) * (other.uniform() - 0.5)
    // Correlation has standard error 1/sqrt(20000) = 0.0071; four of them.
    expect(Math.abs((product / 20000) * 12)).toBeLessThan(0.0283)
  })

  it('draws whole numbers evenly below the limit', () => {
    const stream = seededStream('below')
    const counts = new Array(7).fill(0)
    for (let draw = 0; draw < 70000; draw++) counts[stream.below(7)]++
    expect(counts).toHaveLength(7)
    const chiSquare = counts.reduce((sum, count) => sum + (count - 10000) ** 2 / 10000, 0)
    // 6 degrees of freedom: 22.5 is exceeded once in 1000.
    expect(chiSquare).toBeLessThan(22.5)
  })
})
