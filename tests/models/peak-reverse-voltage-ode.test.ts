import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { ringingPeakVoltage } from '../../src/models/peak-reverse-voltage.ts'
import { evenly, spread } from './random-inputs.ts'
import { peakByOde } from './ringing-ode.ts'

describe('peak reverse voltage by a second route', () => {
  it('agrees with an ODE solver on random loops', () => {
    const loops = fc.sample(
      fc.record({
        voltage: spread(20, 800),
        voltageFall: evenly(0, 30e-9),
        loopInductance: evenly(5e-9, 60e-9),
        capacitance: fc.record({
          kind: fc.constant('law' as const),
          zeroBias: evenly(1e-10, 2e-9),
          builtIn: evenly(0.5, 1.5),
          grading: evenly(0.3, 0.5),
        }),
        parts: fc.integer({ min: 1, max: 3 }),
      }),
      { numRuns: 25, seed: 20265 },
    )
    // 64 Runge-Kutta steps per shortest period: phase error below 3e-4 rad over the few periods of a usual fall
    for (const loop of loops) expect(Math.abs(ringingPeakVoltage(loop) / peakByOde(loop) - 1)).toBeLessThan(2e-5)
  })

  it('covers a fall too slow to be followed by an envelope that the ringing stays under', () => {
    const law = { kind: 'law', zeroBias: 20e-12, builtIn: 1, grading: 0.46 } as const
    for (const voltageFall of [60e-9, 100e-9]) {
      const loop = { voltage: 400, voltageFall, loopInductance: 1e-9, capacitance: law, parts: 1 }
      const peak = ringingPeakVoltage(loop)
      const solved = peakByOde(loop)
      expect(peak).toBeGreaterThanOrEqual(solved)
      expect(peak).toBeLessThan(1.02 * solved)
    }
  })
})
