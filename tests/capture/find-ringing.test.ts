import { describe, expect, it } from 'vitest'
import { findRinging } from '../../src/capture/find-ringing.ts'

/** An oscillation of amplitude 1 and whatever is added. */
const ring = (count: number, frequency: number, added: (k: number) => number = () => 0) =>
  Float64Array.from({ length: count }, (_, k) => Math.sin(2 * Math.PI * frequency * k) + added(k))

describe('a ringing', () => {
  it.each([0.03, 0.05, 0.0552, 0.11, 0.199])(
    'of %d cycles in a sample is found with its frequency and amplitude',
    (frequency) => {
      const found = findRinging(ring(200, frequency), 1e-9, 0.1)!
      // the grid steps by (0.2/0.015)^(1/159), 1.6 %
      expect(found.frequency / (frequency * 1e9)).toBeCloseTo(1, 1.6)
      expect(Math.abs(found.amplitude - 1)).toBeLessThan(0.1)
    },
  )

  it('of a cosine is as large as that of a sine', () => {
    const cosine = Float64Array.from({ length: 200 }, (_, k) => 3 * Math.cos(2 * Math.PI * 0.05 * k))
    expect(findRinging(cosine, 1, 0.1)!.amplitude).toBeCloseTo(3, 1)
  })

  it('has to be larger than the least worth a word', () => {
    expect(findRinging(ring(200, 0.05), 1, 0.9)).not.toBeNull()
    expect(findRinging(ring(200, 0.05), 1, 1.1)).toBeNull()
  })

  it('of three cycles in the stretch belongs to the shape of the tail', () => {
    expect(findRinging(ring(200, 3 / 200), 1, 0.1)).toBeNull()
    expect(findRinging(ring(200, 4 / 200), 1, 0.1)!.frequency).toBeCloseTo(0.02, 3)
  })

  it('needs thirty samples', () => {
    expect(findRinging(ring(29, 0.195), 1, 0.1)).toBeNull()
    expect(findRinging(ring(30, 0.195), 1, 0.1)!.frequency).toBeCloseTo(0.195, 2)
  })

  it('stands four times above the line that white noise shows: 2 B/sqrt(N) of an alternation of B', () => {
    const alternating = (size: number) => ring(100, 0.05, (k) => (k % 2 === 0 ? size : -size))
    expect(findRinging(alternating(1.1), 1, 0.1)).not.toBeNull()
    expect(findRinging(alternating(1.4), 1, 0.1)).toBeNull()
  })

  it('stands four times above the median line: 2 h/N of a single reading of h', () => {
    const struck = (size: number) => ring(200, 0.05, (k) => (k === 100 ? size : 0))
    expect(findRinging(struck(20), 1, 0.1)).not.toBeNull()
    expect(findRinging(struck(32), 1, 0.1)).toBeNull()
  })

  it('is looked for in means where there are 3000 samples or more', () => {
    // 3000 samples are means of two: up to a tenth of the sampling rate
    const ten = ring(3000, 10 / 3000)
    const found = findRinging(ten, 1e-9, 0.1)!
    expect(found.frequency / (10e9 / 3000)).toBeCloseTo(1, 1.5)
    expect(found.amplitude).toBeCloseTo(1, 1)
    expect(findRinging(ring(3000, 0.15), 1, 0.1)).toBeNull()
    // both go into a mean: what adds up to nothing there is not seen
    const shaken = ring(3000, 10 / 3000, (k) => (k % 2 === 0 ? 9 : -9))
    expect(findRinging(shaken, 1e-9, 0.1)!.amplitude).toBeCloseTo(found.amplitude, 6)
  })
})
