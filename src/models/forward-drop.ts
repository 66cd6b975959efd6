/** A forward characteristic at one temperature. */
interface ForwardCurve {
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
 * Forward voltage at a current, at the temperature the coefficients stand for.
 *
 * Equation: V_F = constant + logarithmic ln(i/I0) + linear i/I0; below 0.01 I0 a straight line through the origin.
 * A given line has neither the logarithm nor that rule.
 *
 * Valid for: i ≥ 0. Deviations: the small-current line is an own rule that keeps the logarithm finite.
 *
 * @returns V_F. [V]
 * @throws Never.
 * @see Junction law with a series resistance, common practice.
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

/**
 * Mean conduction power while the current runs linearly from peak to valley.
 *
 * Equation: 1/(peak − valley) ∫ V_F(i) i di in closed form, split at 0.01 I0. Where the ends almost meet, the logarithm's
 * part is taken by three-point Gauss-Legendre quadrature (error below 1e-13 of itself there).
 *
 * Valid for: 0 ≤ valley ≤ peak. Deviations: none.
 *
 * @returns Mean power over the conduction interval; its share of the period is the caller's. [W]
 * @throws Never.
 * @see Own integration; checked against quadrature.
 * @example trapezoidConductionPower({ constant: 1, logarithmic: 0.045, linear: 0.3, ratedCurrent: 8, line: false, valley: 4, peak: 8 }) // 7.32738
 */
export function trapezoidConductionPower(input: ForwardRangeInput): number {
  const rated = input.ratedCurrent
  const low = input.valley / rated
  const high = input.peak / rated
  const width = high - low
  if (input.line || low >= knee) return rated * meanAbove(input, low, high)
  const kneeSlope = (input.constant + input.logarithmic * lnKnee + input.linear * knee) / knee
  const end = Math.min(high, knee)
  const below = (kneeSlope * (low * low + low * end + end * end)) / 3
  if (high <= knee) return rated * below
  return (rated * (below * (knee - low) + meanAbove(input, knee, high) * (high - knee))) / width
}

/**
 * Whether the curve is positive and does not fall over the range used; else {@link chordConductionPower} stands in.
 *
 * Equation: V_F > 0 at the lower end and dV_F/di ≥ 0 at both ends, between which the slope is monotone.
 *
 * Valid for: 0 ≤ valley ≤ peak; below 0.01 I0 the line through the origin counts. Deviations: none.
 *
 * @returns True where the curve can be used.
 * @throws Never.
 * @see Own rule.
 * @example forwardDropUsable({ constant: 1, logarithmic: 0.045, linear: 0.3, ratedCurrent: 8, line: false, valley: 0, peak: 8 }) // true
 */
export function forwardDropUsable(input: ForwardRangeInput): boolean {
  const high = input.peak / input.ratedCurrent
  let low = input.valley / input.ratedCurrent
  if (!input.line && low < knee) low = knee
  if (low >= high) return dropAt(input, low) > 0
  const logarithmic = input.line ? 0 : input.logarithmic
  // dV_F/d ln i at both ends
  if (!(logarithmic + input.linear * low >= 0 && logarithmic + input.linear * high >= 0)) return false
  // ln x ≥ 1 − 1/x spares the logarithm in nearly every case
  if (logarithmic >= 0 && input.constant + logarithmic * (1 - 1 / low) + input.linear * low > 0) return true
  return dropAt(input, low) > 0
}

/**
 * Mean conduction power with the chord between the range's ends in place of the curve.
 *
 * Equation: mean of v i, both linear: (v1 (2 valley + peak) + v2 (valley + 2 peak))/6, v1 = max(0, V_F(valley)), v2 = max(v1, V_F(peak)).
 *
 * Valid for: 0 ≤ valley ≤ peak; never negative. Deviations: a fallback where the fitted curve falls or turns negative.
 *
 * @returns Mean power over the conduction interval. [W]
 * @throws Never.
 * @see Own rule.
 * @example chordConductionPower({ constant: 1, logarithmic: 0.045, linear: 0.3, ratedCurrent: 8, line: false, valley: 4, peak: 8 }) // 7.31682
 */
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
