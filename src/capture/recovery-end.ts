import type { RecoveryTimeDefinition } from '../domain/rectifier.ts'
import { fallsTo } from './recovery-curve.ts'

/** A tail that can be read at any time: reverse current as a magnitude. */
export interface ReadableTail {
  readonly reverse: (time: number) => number
  readonly peakTime: number
  readonly peak: number
  readonly tailTime: number
}

/**
 * Time at which the reverse recovery ends by a definition. [s]
 * Lines: through two points of the tail, extended to zero. Levels: where the tail falls to them.
 * An unknown definition is read as the line through 90 % and 25 %, the usual one.
 */
export function recoveryEnd(tail: ReadableTail, definition: RecoveryTimeDefinition): number {
  switch (definition.kind) {
    case 'line-75-50':
      return throughTwoPoints(tail, 0.75, 0.5)
    case 'level-25':
      return reaches(tail, 0.25)
    case 'level-10':
      return reaches(tail, 0.1)
    case 'level':
      return reaches(tail, definition.until / tail.peak)
    default:
      return throughTwoPoints(tail, 0.9, 0.25)
  }
}

function reaches(tail: ReadableTail, share: number): number {
  return share >= 1 ? tail.peakTime : fallsTo(tail.reverse, tail.peakTime, tail.tailTime, share * tail.peak)
}

function throughTwoPoints(tail: ReadableTail, high: number, low: number): number {
  const early = reaches(tail, high)
  const late = reaches(tail, low)
  return late + ((late - early) * low) / (high - low)
}
