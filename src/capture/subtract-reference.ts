import type { Waveform } from '../domain/capture.ts'
import type { FixtureResponse } from './capture-context.ts'

/** A reference that swings more than this share of the capture is the fixture's own reversal. */
const largeShare = 0.5

/**
 * Takes the response with a short in the rectifier's place away from a capture, at equal times.
 * A reference that reverses as the capture does is not a disturbance: it is kept as the fixture's own edge.
 */
export function subtractReference(
  waveform: Waveform,
  reference: Waveform | null,
): { readonly waveform: Waveform; readonly fixture: FixtureResponse | null } {
  if (reference === null) return { waveform, fixture: null }
  const subtracted = swing(reference.current) <= largeShare * swing(waveform.current)
  const fixture = { subtracted, edgeTime: edgeTime(reference) }
  if (!subtracted) return { waveform, fixture }
  const current = waveform.current.map(
    (value, k) => value - readAt(reference.current, reference, waveform.start + k * waveform.interval),
  )
  return { waveform: { ...waveform, current }, fixture }
}

function swing(values: Float64Array): number {
  let lowest = Number.POSITIVE_INFINITY
  let highest = Number.NEGATIVE_INFINITY
  for (const value of values) {
    if (value < lowest) lowest = value
    if (value > highest) highest = value
  }
  return highest - lowest
}

/** Value at a time, straight between samples, the ends held. */
export function readAt(
  values: Float64Array,
  grid: { readonly start: number; readonly interval: number },
  time: number,
): number {
  const x = (time - grid.start) / grid.interval
  const last = values.length - 1
  if (x <= 0) return values[0]!
  if (x >= last) return values[last]!
  const left = Math.floor(x)
  return values[left]! + (x - left) * (values[left + 1]! - values[left]!)
}

function edgeTime(reference: Waveform): number {
  const { current } = reference
  let high = 0
  for (let k = 0; k < current.length; k++) if (current[k]! > current[high]!) high = k
  let low = high
  for (let k = high; k < current.length; k++) if (current[k]! < current[low]!) low = k
  const size = current[high]! - current[low]!
  let early = high
  for (let k = high; k < low; k++) if (current[k]! >= current[high]! - 0.1 * size) early = k
  let late = early
  while (late < low && current[late]! > current[low]! + 0.1 * size) late += 1
  return (late - early) * reference.interval
}
