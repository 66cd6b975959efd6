import { ambientForJunction } from '../../src/stage/ambient-for-junction.ts'
import type { Kernel } from '../../src/stage/kernel.ts'

/** Highest surroundings that any junction temperature asks for, by ever finer scans; beyond them nothing settles. [K] */
export function stabilityEdge(kernel: Kernel): { readonly junction: number; readonly surroundings: number } {
  let junction = (kernel.thermal.reference + kernel.thermal.ceiling) / 2
  let half = (kernel.thermal.ceiling - kernel.thermal.reference) / 2
  let surroundings = Number.NEGATIVE_INFINITY
  while (half > 1e-3) {
    const middle = junction
    const steps = half > 20 ? 40 : 10
    for (let k = -steps; k <= steps; k++) {
      const at = middle + (half * k) / steps
      const asked = ambientForJunction(kernel, at)
      if (asked > surroundings) {
        junction = at
        surroundings = asked
      }
    }
    half *= 2 / steps
  }
  return { junction, surroundings }
}
