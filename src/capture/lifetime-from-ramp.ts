import { chargeAtTurnOff, timeToPeak } from '../models/charge-control.ts'
import { findRoot } from '../numerics/find-root.ts'
import { allPositive } from './is-sound.ts'

/** Carrier lifetime whose steady charge gives the measured time to the peak; null where none does. [s] */
export function lifetimeFromRamp(input: {
  readonly current: number
  readonly slope: number
  readonly timeToPeak: number
  readonly tailTime: number
}): number | null {
  const { current, slope, tailTime } = input
  if (!allPositive([current, slope, tailTime, input.timeToPeak])) return null
  const gap = (logarithm: number) => {
    const lifetime = Math.exp(logarithm)
    return timeToPeak({ current, slope, lifetime, tailTime, storedCharge: lifetime * current }) - input.timeToPeak
  }
  const shortest = Math.log(tailTime * 1.0001)
  const found = findRoot({ f: gap, low: shortest, high: shortest + 14, tolerance: 1e-6, maxIterations: 100 })
  return found === null ? null : Math.exp(found.root)
}

/** Share of the steady charge that a conduction of this length builds at constant current. [1] */
export function chargedShare(conductionTime: number, lifetime: number): number {
  const charge = chargeAtTurnOff({ peakCurrent: 1, current: 1, conductionTime, lifetime })
  return charge / lifetime
}
