import { capacitanceAt, capacitanceLaw } from '../../src/models/junction-capacitance.ts'
import type { RingingPeakInput } from '../../src/models/peak-reverse-voltage.ts'
import { solveOde, solveToEvent } from './solve-ode.ts'

/**
 * Highest voltage from rest to t_fv + 4π sqrt(L C(0)), each peak located where the current turns; scaled to V and sqrt(L C0).
 * The steps are shorter than half a natural period, so that no turn is passed over.
 */
export function peakByOde({ voltage, voltageFall, loopInductance, capacitance, parts }: RingingPeakInput): number {
  const law = capacitanceLaw(capacitance, parts)
  const unit = Math.sqrt(loopInductance * law.zeroBias)
  const fall = voltageFall / unit
  const relative = (v: number) => capacitanceAt({ capacitance: law, voltage: v * voltage }) / law.zeroBias
  const f = (t: number, [v, i]: number[]) => [i! / relative(v!), (fall > 0 ? Math.min(1, t / fall) : 1) - v!]
  let highest = 0
  let state = [0, 0]
  // the drive has a corner at the end of the ramp: no step may straddle it
  for (const [from, to] of [
    [0, fall],
    [fall, fall + 4 * Math.PI],
  ] as const) {
    const steps = Math.ceil((to - from) / 0.15)
    for (let n = 0; n < steps; n++) {
      const x = from + ((to - from) * n) / steps
      const next = from + ((to - from) * (n + 1)) / steps
      const after = solveOde(f, x, state, next)
      highest = Math.max(highest, after[0]!)
      if (state[1]! > 0 && after[1]! < 0) {
        highest = Math.max(highest, solveToEvent(f, { x, y: state, xMost: next }, (_x, [, i]) => i!).y[0]!)
      }
      state = after
    }
  }
  return highest * voltage
}
