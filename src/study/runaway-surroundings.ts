import { ambientForJunction } from '../stage/ambient-for-junction.ts'
import { settle } from '../stage/thermal-balance.ts'
import { hasThermalPath } from '../stage/thermal-network.ts'
import type { Candidate } from './candidate.ts'
import { atMaximumLeakage, deliversCold, highestSurroundings } from './nominal-point.ts'
import { lowestOverInputs } from './stage-inputs.ts'

/** [K] */
const rounding = 1e-6

/**
 * Ambient (or case) temperature above which a part at maximum leakage has no stable junction temperature any more, at
 * the worst of its inputs. Searched up to the junction limit + 100 K; null where no edge lies below that, or where the part has no leakage.
 */
export function runawaySurroundings(candidate: Candidate): number | null {
  const { kernel, stage, record, rectifier } = candidate
  if (rectifier.leakage === null || !hasThermalPath(stage, record)) return null
  const edge = lowestOverInputs(candidate, edgeAt)
  settle(kernel)
  return edge
}

/** Infinite where there is none. [K] */
function edgeAt(candidate: Candidate): number {
  const { kernel } = candidate
  if (!deliversCold(kernel)) return Number.POSITIVE_INFINITY
  const { ceiling } = kernel.thermal
  return atMaximumLeakage(candidate, () => {
    const highest = highestSurroundings(kernel, ceiling)
    // Still rising where the search ends: hotter surroundings only make a hotter part.
    const rising = highest === null || ambientForJunction(kernel, ceiling) >= highest - rounding
    return rising ? Number.POSITIVE_INFINITY : highest
  })
}
