/** A forward characteristic at one temperature. */
export interface ForwardCurve {
  /** Constant term. [V] */
  readonly constant: number
  /** Coefficient of ln(i/I0). [V] */
  readonly logarithmic: number
  /** Coefficient of i/I0. [V] */
  readonly linear: number
  /** I0. [A] */
  readonly ratedCurrent: number
  /** The record gave the characteristic itself: no small-current rule. */
  readonly line: boolean
}

/** Below this share of I0 the characteristic is a straight line through the origin. [1] */
const knee = 0.01
const lnKnee = Math.log(knee)

/** Inputs of {@link forwardDrop}. */
export interface ForwardDropInput extends ForwardCurve {
  /** [A] */
  readonly current: number
}

/**
 * Forward voltage at a current.
 * @example forwardDrop({ constant: 1, logarithmic: 0.045, linear: 0.3, ratedCurrent: 8, line: false, current: 4 }) // 1.11881
 */
export function forwardDrop(input: ForwardDropInput): number {
  return dropAt(input, input.current / input.ratedCurrent)
}

/** Inputs of the functions over a current that falls linearly. */
export interface ForwardRangeInput extends ForwardCurve {
  /** Current at the end, not negative. [A] */
  readonly valley: number
  /** Current at the start. [A] */
  readonly peak: number
}

/** Mean power while the current runs linearly from peak to valley. */
export function trapezoidConductionPower(input: ForwardRangeInput): number {
  const rated = input.ratedCurrent
  const low = input.valley / rated
  const high = input.peak / rated
  const width = high - low
  if (input.line || low >= knee) return rated * meanAbove(input, low, high)
  const kneeSlope = (input.constant + input.logarithmic * lnKnee + input.linear * knee) / knee
  const end = high < knee ? high : knee
  const below = (kneeSlope * (low * low + low * end + end * end)) / 3
  if (high <= knee) return rated * below
  return (rated * (below * (knee - low) + meanAbove(input, knee, high) * (high - knee))) / width
}

/** Whether the curve is positive and does not fall over the range. */
export function forwardDropUsable(input: ForwardRangeInput): boolean {
  const high = input.peak / input.ratedCurrent
  let low = input.valley / input.ratedCurrent
  if (!input.line && low < knee) low = knee
  if (low >= high) return dropAt(input, low) > 0
  const rises = (x: number) => input.logarithmic + input.linear * x >= 0
  if (input.line) return input.linear >= 0 && dropAt(input, low) > 0
  return rises(low) && rises(high) && dropAt(input, low) > 0
}

/** Mean power with the straight line between the range's ends in place of the curve. */
export function chordConductionPower(input: ForwardRangeInput): number {
  const { valley, peak, ratedCurrent } = input
  const low = Math.max(0, dropAt(input, valley / ratedCurrent))
  const high = Math.max(low, dropAt(input, peak / ratedCurrent))
  return (low * (2 * valley + peak) + high * (valley + 2 * peak)) / 6
}

function dropAt(curve: ForwardCurve, x: number): number {
  if (curve.line) return curve.constant + curve.linear * x
  if (x >= knee) return curve.constant + curve.logarithmic * Math.log(x) + curve.linear * x
  return ((curve.constant + curve.logarithmic * lnKnee + curve.linear * knee) * x) / knee
}

/** Mean of x v(x) between two currents, both above the knee or on a given line. */
function meanAbove(curve: ForwardCurve, low: number, high: number): number {
  const straight = 0.5 * curve.constant * (low + high) + (curve.linear * (low * low + low * high + high * high)) / 3
  return curve.line ? straight : straight + curve.logarithmic * meanTimesLog(low, high)
}

/** Mean of x ln x between two positive numbers. */
function meanTimesLog(low: number, high: number): number {
  const width = high - low
  if (width > 0.03 * high) {
    return (0.5 * (high * high * Math.log(high) - low * low * Math.log(low))) / width - 0.25 * (high + low)
  }
  // three-point Gauss-Legendre: the difference above would lose its digits here
  const middle = 0.5 * (low + high)
  const offset = 0.5 * width * Math.sqrt(0.6)
  const left = middle - offset
  const right = middle + offset
  return (5 * left * Math.log(left) + 8 * middle * Math.log(middle) + 5 * right * Math.log(right)) / 18
}
