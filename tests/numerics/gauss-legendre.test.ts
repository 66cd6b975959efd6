import { describe, expect, it } from 'vitest'
import { errorFunction } from '../../src/numerics/error-function.ts'
import { gaussLegendre, integrate } from '../../src/numerics/gauss-legendre.ts'

describe('Gauss-Legendre quadrature', () => {
  it('has the nodes and weights of the published tables', () => {
    expect([...gaussLegendre(1).nodes, ...gaussLegendre(1).weights]).toEqual([0, 2])
    const three = gaussLegendre(3)
    expect(three.nodes[2]).toBeCloseTo(Math.sqrt(0.6), 15)
    expect(three.nodes[1]).toBe(0)
    expect(three.weights[0]).toBeCloseTo(5 / 9, 14)
    expect(three.weights[1]).toBeCloseTo(8 / 9, 14)
    const five = gaussLegendre(5)
    expect(five.nodes[4]).toBeCloseTo(0.906179845938664, 14)
    expect(five.weights[4]).toBeCloseTo(0.236926885056189, 14)
  })

  it.each([1, 2, 3, 4, 7, 16, 33, 64])('with %i nodes integrates every power up to 2n − 1', (n) => {
    const rule = gaussLegendre(n)
    for (let power = 0; power <= 2 * n - 1; power++) {
      const exact = power % 2 === 0 ? 2 / (power + 1) : 0
      expect(integrate({ f: (x) => x ** power, low: -1, high: 1, rule })).toBeCloseTo(exact, 13)
    }
    // and not the next even one
    if (n < 8) {
      const next = integrate({ f: (x) => x ** (2 * n), low: -1, high: 1, rule })
      expect(Math.abs(next - 2 / (2 * n + 1))).toBeGreaterThan(1e-6)
    }
  })

  it.each([2, 9, 100])('with %i nodes is symmetric, rising and positive, its weights adding up to 2', (n) => {
    const { nodes, weights } = gaussLegendre(n)
    for (let i = 0; i < n; i++) {
      expect(nodes[i]!).toBeCloseTo(-nodes[n - 1 - i]!, 15)
      expect(weights[i]!).toBeGreaterThan(0)
      if (i > 0) expect(nodes[i]!).toBeGreaterThan(nodes[i - 1]!)
    }
    expect(weights.reduce((sum, weight) => sum + weight, 0)).toBeCloseTo(2, 13)
  })

  it('scales to any interval, turned round included', () => {
    const rule = gaussLegendre(20)
    expect(integrate({ f: Math.sin, low: 0, high: Math.PI, rule })).toBeCloseTo(2, 14)
    expect(integrate({ f: Math.sin, low: Math.PI, high: 0, rule })).toBeCloseTo(-2, 14)
  })

  it('refuses a number of nodes that makes no rule', () => {
    expect(() => gaussLegendre(0)).toThrow('gaussLegendre: 0 nodes are no rule')
    expect(() => gaussLegendre(2.5)).toThrow('gaussLegendre: 2.5 nodes are no rule')
  })
})

describe('error function', () => {
  it('has the tabulated values and equals the integral it stands for', () => {
    expect(errorFunction(0.5)).toBeCloseTo(0.5204998778130465, 15)
    expect(errorFunction(1)).toBeCloseTo(0.8427007929497149, 15)
    expect(errorFunction(2)).toBeCloseTo(0.9953222650189527, 15)
    const rule = gaussLegendre(40)
    for (const x of [0.01, 0.3, 1.7, 3, 5]) {
      const integral = integrate({ f: (t) => Math.exp(-t * t), low: 0, high: x, rule })
      expect(errorFunction(x)).toBeCloseTo((2 / Math.sqrt(Math.PI)) * integral, 13)
    }
  })

  it('is odd, 0 at 0 and 1 far out', () => {
    expect(errorFunction(0)).toBe(0)
    expect(errorFunction(-0.7)).toBe(-errorFunction(0.7))
    expect([errorFunction(6.1), errorFunction(-7)]).toEqual([1, -1])
    expect(errorFunction(5.999)).toBeCloseTo(1, 14)
  })
})
