import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { hottestShare, otherShare } from '../../src/models/parallel-sharing.ts'
import { evenly } from './random-inputs.ts'

describe('sharing among parallel parts', () => {
  it('adds up to the whole, the hottest part carrying most', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 8 }), evenly(0, 3), (parts, imbalance) => {
        const hot = hottestShare({ parts, imbalance })
        const other = otherShare({ parts, imbalance })
        expect(hot + (parts - 1) * other).toBeCloseTo(1, 12)
        expect(hot).toBeGreaterThanOrEqual(other * (1 - 1e-15))
        expect(hot).toBeLessThanOrEqual(1)
        expect(other).toBeGreaterThanOrEqual(0)
      }),
    )
  })

  it('gives a single part everything, whatever the imbalance', () => {
    expect(hottestShare({ parts: 1, imbalance: 0.3 })).toBe(1)
    expect(otherShare({ parts: 1, imbalance: 0.3 })).toBe(0)
  })

  it('is equal without imbalance, and never more than all', () => {
    expect(hottestShare({ parts: 4, imbalance: 0 })).toBe(0.25)
    expect(otherShare({ parts: 4, imbalance: 0 })).toBe(0.25)
    expect(hottestShare({ parts: 2, imbalance: 5 })).toBe(1)
    expect(otherShare({ parts: 2, imbalance: 5 })).toBe(0)
  })
})
