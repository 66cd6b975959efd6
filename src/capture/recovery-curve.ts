/**
 * The reverse current of one event as the local model draws it: a straight fall up to the corner, an exponential tail
 * after it, both seen through a first-order rounding. Times are absolute, the current is relative to the baseline.
 */
export interface RecoveryCurve {
  /** Where the straight fall ends. [s] */
  readonly corner: number
  /** Slope of the fall, 0 for a plateau. [A/s] */
  readonly slope: number
  /** Magnitude the tail starts from without rounding. [A] */
  readonly amplitude: number
  /** [s] */
  readonly tailTime: number
  /** Time constant of the rounding. [s] */
  readonly rounding: number
}

/**
 * Reverse current (a magnitude) at a time.
 * Before the corner: I + a (t − T1) − a w. After it: w dr/dt + r = I exp(−x/tau), from I − a w on; x = t − T1.
 */
export function reverseCurrentAt(curve: RecoveryCurve, time: number): number {
  const { slope, amplitude, tailTime, rounding } = curve
  const x = time - curve.corner
  if (x <= 0) return amplitude + slope * (x - rounding)
  const { w, settled } = parts(curve)
  return settled * Math.exp(-x / tailTime) + (amplitude - slope * w - settled) * Math.exp(-x / w)
}

/** Rounding w and the share I tau/(tau − w) of the current that falls with the tail. */
function parts({ amplitude, tailTime, rounding }: RecoveryCurve): { readonly w: number; readonly settled: number } {
  // no rounding and equal time constants have limits of their own; a hair beside them is as good
  const w = Math.abs(rounding / tailTime - 1) < 1e-4 ? tailTime * 0.9999 : Math.max(rounding, 1e-12 * tailTime)
  return { w, settled: (amplitude * tailTime) / (tailTime - w) }
}

/** Time of the highest reverse current: x = w tau/(tau − w) ln(1 + a (tau − w)/I) after the corner. [s] */
export function peakTime(curve: RecoveryCurve): number {
  const { slope, amplitude, tailTime, corner } = curve
  const { w } = parts(curve)
  const bend = (slope * (tailTime - w)) / amplitude
  // at −1 and below the current comes from below zero and never leaves it
  return bend > -1 ? corner + Math.max(0, ((w * tailTime) / (tailTime - w)) * Math.log1p(bend)) : corner
}

/** Time after the peak at which the reverse current has fallen to a level. [s] */
export function fallsTo(reverse: (time: number) => number, peak: number, tailTime: number, level: number): number {
  let low = peak
  let high = peak + tailTime
  for (let grow = 0; grow < 60 && reverse(high) > level; grow++) {
    low = high
    high += tailTime
  }
  for (let halving = 0; halving < 60; halving++) {
    const middle = 0.5 * (low + high)
    if (reverse(middle) > level) low = middle
    else high = middle
  }
  return 0.5 * (low + high)
}

/** Charge under the curve between two times, the first at or before the corner. [C] */
export function chargeUnder(curve: RecoveryCurve, from: number, to: number): number {
  const { slope, amplitude, tailTime, corner } = curve
  const atCorner = reverseCurrentAt(curve, corner)
  const rise = corner - from
  const ramp = rise * (atCorner - 0.5 * slope * rise)
  const x = to - corner
  const { w, settled } = parts(curve)
  return (
    ramp - settled * tailTime * Math.expm1(-x / tailTime) - (amplitude - slope * w - settled) * w * Math.expm1(-x / w)
  )
}
