import type { LocatedEvent } from './locate-event.ts'

/** What one channel's limits did to its samples. */
export interface FoundClipping {
  /** Reading that is never exceeded, in the channel's own sense. */
  readonly at: number
  readonly samples: number
}

/**
 * Clipping shows as a run of equal extreme samples that is longer than the signal can be: on a peak, where the current
 * would have moved by several steps of the converter in that time; on a plateau, where noise would have shown.
 * `drift` is what the signal must have moved in one sample near the extreme. [A]
 */
export function clippedPeak(
  current: Float64Array,
  event: LocatedEvent,
  drift: number,
  noise: number,
): FoundClipping | null {
  const sign = event.inverted ? -1 : 1
  let lowest = current[event.crossing]!
  for (let k = event.crossing; k < event.quarter; k++) if (sign * current[k]! < sign * lowest) lowest = current[k]!
  let run = 0
  let longest = 0
  for (let k = event.crossing; k < Math.min(event.last, event.quarter + 1); k++) {
    run = current[k] === lowest ? run + 1 : 0
    longest = Math.max(longest, run)
  }
  const moved = drift * (longest - 1)
  return longest >= 4 && moved > 6 * Math.max(noise, quantum(current, event.edge, event.quarter))
    ? { at: lowest, samples: longest }
    : null
}

/** Samples in a row that noise would have moved. */
const longRun = 12
/** Of a converter's step: a quiet level between two codes flickers with half a step and may sit still on another code. */
const twoCodes = 0.6
/** Of the swing: with less noise than this an unclipped plateau is flat, too. */
const leastNoise = 1e-4

/**
 * A run of samples at the record's extreme, without any noise, in a channel that is noisy elsewhere: noise would have
 * left the level on both sides. `side` is 1 for the highest reading, -1 for the lowest.
 */
export function clippedPlateau(values: Float64Array, side: 1 | -1, noise: number, step: number): FoundClipping | null {
  if (!(noise > twoCodes * step)) return null
  let extreme = Number.NEGATIVE_INFINITY
  let other = Number.POSITIVE_INFINITY
  let run = 0
  let longest = 0
  for (let k = 0; k < values.length; k++) {
    const value = side * values[k]!
    if (value > extreme) {
      extreme = value
      run = 0
      longest = 0
    }
    if (value < other) other = value
    run = value === extreme ? run + 1 : 0
    if (run > longest) longest = run
  }
  return longest >= longRun && noise > leastNoise * (extreme - other) ? { at: side * extreme, samples: longest } : null
}

/** Step of the converter: the smallest difference between neighbouring samples that are not equal. */
function quantum(values: Float64Array, from: number, to: number): number {
  let smallest = Number.POSITIVE_INFINITY
  for (let k = from; k < to; k++) {
    const difference = Math.abs(values[k]! - values[k - 1]!)
    if (difference > 0 && difference < smallest) smallest = difference
  }
  return Number.isFinite(smallest) ? smallest : 0
}

/** Step of the converter of a channel, from the first part of its record. */
export function channelQuantum(values: Float64Array): number {
  return quantum(values, 1, Math.min(values.length, 20_000))
}

/** Standard deviation of one raw sample from second differences of neighbours, which no slope of the signal reaches. */
export function sampleNoise(values: Float64Array, from: number, to: number): number {
  let sum = 0
  const count = to - from - 2
  for (let k = from + 1; k + 1 < to; k++) sum += (values[k + 1]! - 2 * values[k]! + values[k - 1]!) ** 2
  return count > 0 ? Math.sqrt(sum / count / 6) : 0
}
