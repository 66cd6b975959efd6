import { settle } from '../../src/stage/thermal-balance.ts'
import type { Candidate } from '../../src/study/candidate.ts'

/** Slopes of the points, relative to the stage's: every point differs from the one before. */
export const slopeFactors = Array.from({ length: 64 }, (_, k) => 0.75 + (0.5 * ((k * 37) % 64)) / 64)

/** Settles every candidate at every slope, each from the temperature of the surroundings; returns how many points. */
export function settlePoints(candidates: readonly Candidate[]): number {
  for (const { kernel } of candidates) {
    for (const factor of slopeFactors) {
      kernel.slopeFactor = factor
      settle(kernel)
    }
    kernel.slopeFactor = 1
  }
  return candidates.length * slopeFactors.length
}

/** Mean junction temperature over all points, by which another program shows that it does the same work. [K] */
export function meanJunction(candidates: readonly Candidate[]): number {
  let sum = 0
  for (const { kernel } of candidates) {
    for (const factor of slopeFactors) {
      kernel.slopeFactor = factor
      settle(kernel)
      sum += kernel.temperatures[0]!
    }
    kernel.slopeFactor = 1
  }
  return sum / (candidates.length * slopeFactors.length)
}
