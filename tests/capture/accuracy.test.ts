import { describe, expect, it } from 'vitest'
import { captureAccuracySection, reducedRamp, reducedStep } from './accuracy.ts'

describe('accuracy of the reduction of captures', () => {
  it('every figure of every random capture lies within the accuracy wanted', () => {
    for (const row of captureAccuracySection().rows()) {
      expect(row.computed, row.quantity).toBeGreaterThan(0)
      expect(row.computed, row.quantity).toBeLessThanOrEqual(row.tolerance)
    }
  })

  it.each([
    ['ramp', reducedRamp, ['current', 'slope', 'peakReverseCurrent', 'recoveryTime', 'charge', 'energy']],
    ['step', reducedStep, ['storageTime', 'recoveryTime', 'lifetime']],
  ] as const)(
    'the stated doubt of a %s holds the truth: within 2 of 9 in 10 figures, within 4 always',
    (_kind, reduce, figures) => {
      const distances: number[] = []
      for (let seed = 0; seed < 30; seed++) {
        const { truth, reduced } = reduce(seed, 24)
        const found = reduced!.figures as unknown as Readonly<Record<string, number>>
        for (const name of figures) distances.push(Math.abs(found[name]! / truth[name]! - 1) / reduced!.spread[name]!)
      }
      expect(Math.max(...distances)).toBeLessThan(4)
      expect(distances.filter((distance) => distance < 2).length).toBeGreaterThan(0.9 * distances.length)
      // nor is the doubt so wide that it says nothing
      expect(distances.filter((distance) => distance > 0.25).length).toBeGreaterThan(0.2 * distances.length)
    },
  )
})
