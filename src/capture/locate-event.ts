/** Where the first reversal stands in a capture: sample numbers, and levels good to some percent. */
export interface LocatedEvent {
  /** The channel showed reverse current as positive. */
  readonly inverted: boolean
  /** Reversals in the record. */
  readonly events: number
  /** First sample of the forward conduction. */
  readonly first: number
  /** The start of the conduction is in the record, not before it. */
  readonly startVisible: boolean
  /** Last sample of the fall above half the forward current. */
  readonly edge: number
  /** First sample below the baseline. */
  readonly crossing: number
  /** Lowest sample. */
  readonly peak: number
  /** Last sample below half the reverse peak. */
  readonly half: number
  /** First sample above a quarter of the reverse peak after `half`. */
  readonly quarter: number
  /** End of the record, or of what belongs to this event. */
  readonly last: number
  readonly forward: number
  readonly base: number
  /** Lowest reading. */
  readonly lowest: number
}

/** Width of the running mean for the second look, as share of the reversal: it blurs nothing that is looked for. */
const blur = 1 / 14

/**
 * Finds the first fall from forward conduction to reverse current by the record's largest swing.
 * Null where nothing falls: a record without an event. A second look at running means keeps noise from setting the marks.
 */
export function locateEvent(current: Float64Array): LocatedEvent | null {
  const raw = locateIn(current)
  if (raw === null) return null
  const width = Math.floor(blur * (raw.half - raw.crossing))
  return width < 2 ? raw : (locateIn(runningMean(current, width)) ?? raw)
}

function runningMean(values: Float64Array, width: number): Float64Array {
  const out = new Float64Array(values.length)
  const back = Math.floor(width / 2)
  let sum = 0
  for (let k = 0; k < values.length + back; k++) {
    if (k < values.length) sum += values[k]!
    if (k >= width) sum -= values[k - width]!
    const at = k - back
    if (at >= 0) out[at] = sum / Math.min(width, k + 1, values.length - k + width - 1)
  }
  return out
}

function locateIn(current: Float64Array): LocatedEvent | null {
  const inverted = isInverted(current)
  const sign = inverted ? -1 : 1
  const fall = largestFall(current, sign)
  return fall.size > 0 ? findFirst(current, sign, roughLevels(current, sign, fall), inverted) : null
}

/** A reading this much smaller than the opposite one is no reversal, only what the larger one leaves. */
const oneSided = 0.05

/** A direction that much faster than the other is the fall, whatever the record begins with. */
const clearlyFaster = 3

/**
 * Forward conduction comes before the reversal, so the extreme that is reached first is the forward one. A record that
 * begins in the middle of things is told by speed: the fall is one ramp, the way back goes through tail and quiet time.
 */
function isInverted(current: Float64Array): boolean {
  const from = Math.floor(0.95 * current.length)
  let base = 0
  for (let k = from; k < current.length; k++) base += current[k]! / (current.length - from)
  let low = base
  let high = base
  for (const value of current) {
    if (value < low) low = value
    if (value > high) high = value
  }
  if (Math.min(high - base, base - low) < oneSided * Math.max(high - base, base - low)) return base - low > high - base
  const upper = base + 0.5 * (high - base)
  const lower = base - 0.5 * (base - low)
  const falling = fastestPass(current, 1, upper, lower)
  const rising = fastestPass(current, -1, -lower, -upper)
  if (falling * clearlyFaster < rising) return false
  if (rising * clearlyFaster < falling) return true
  return current.find((value) => value >= upper || value <= lower)! <= lower
}

/** Fewest samples from at least `upper` to at most `lower`; infinite where that never happens. */
function fastestPass(current: Float64Array, sign: 1 | -1, upper: number, lower: number): number {
  let lastHigh = -1
  let fastest = Number.POSITIVE_INFINITY
  for (let k = 0; k < current.length; k++) {
    const value = sign * current[k]!
    if (value >= upper) lastHigh = k
    else if (value <= lower && lastHigh >= 0) {
      fastest = Math.min(fastest, k - lastHigh)
      lastHigh = -1
    }
  }
  return fastest
}

interface Fall {
  readonly size: number
  readonly high: number
  readonly low: number
}

/** Largest drop from a maximum to a later minimum of sign × current. */
function largestFall(current: Float64Array, sign: 1 | -1): Fall {
  let high = Number.NEGATIVE_INFINITY
  let best: Fall = { size: 0, high: 0, low: 0 }
  for (let k = 0; k < current.length; k++) {
    const value = sign * current[k]!
    if (value >= high) {
      high = value
    } else if (high - value > best.size) {
      best = { size: high - value, high, low: value }
    }
  }
  return best
}

interface Levels {
  readonly base: number
  readonly high: number
  readonly low: number
  readonly quarter: number
}

/** The quiet end gives the baseline, as far as an oscilloscope's zero may be believed to be off. */
function roughLevels(current: Float64Array, sign: number, fall: Fall): Levels {
  const from = Math.floor(0.95 * current.length)
  let sum = 0
  for (let k = from; k < current.length; k++) sum += sign * current[k]!
  const limit = 0.15 * fall.size
  const base = Math.min(limit, Math.max(-limit, sum / Math.max(1, current.length - from)))
  const reverse = Math.max(base - fall.low, 0.02 * fall.size)
  return {
    base,
    high: base + 0.5 * (fall.high - base),
    low: base - 0.5 * reverse,
    quarter: base - 0.25 * reverse,
  }
}

function findFirst(current: Float64Array, sign: number, levels: Levels, inverted: boolean): LocatedEvent | null {
  const count = current.length
  let events = 0
  let lastHigh = -1
  let armed = false
  let edge = -1
  let below = -1
  let last = count
  for (let k = 0; k < count; k++) {
    const value = sign * current[k]!
    if (value >= levels.high) {
      if (events > 0 && last === count) last = k
      lastHigh = k
      armed = true
    } else if (value <= levels.low && armed) {
      armed = false
      events += 1
      if (events > 1) continue
      edge = lastHigh
      below = k
    }
  }
  if (edge < 0) return null
  const quiet = 0.1 * (levels.high - levels.base)
  if (last < count) while (last > below + 1 && Math.abs(sign * current[last - 1]! - levels.base) > quiet) last -= 1
  return { inverted, events, edge, last, ...around(current, sign, levels, edge, below, last) }
}

function around(current: Float64Array, sign: number, levels: Levels, edge: number, below: number, last: number) {
  let first = edge
  const off = levels.base + 0.5 * (levels.high - levels.base)
  while (first > 0 && sign * current[first - 1]! >= off) first -= 1
  let crossing = edge + 1
  while (crossing < below && sign * current[crossing]! > levels.base) crossing += 1
  let peak = below
  let half = below
  let k = below
  for (; k < last; k++) {
    const value = sign * current[k]!
    if (value < sign * current[peak]!) peak = k
    if (value <= levels.low) half = k
    if (value > levels.quarter && k - half > 0.1 * (half - crossing) + 3) break
  }
  let quarter = half + 1
  while (quarter < last && sign * current[quarter]! <= levels.quarter) quarter += 1
  let sum = 0
  const from = Math.max(first, edge - 50)
  for (let j = from; j <= edge; j++) sum = Math.max(sum, sign * current[j]!)
  return {
    first,
    startVisible: first > 0,
    crossing,
    peak,
    half,
    quarter,
    forward: sum - levels.base,
    base: levels.base,
    lowest: sign * current[peak]!,
  }
}
