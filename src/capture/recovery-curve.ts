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
  if (isSharp(curve)) return amplitude * Math.exp(-x / tailTime)
  const { w, settled } = parts(curve)
  return settled * Math.exp(-x / tailTime) + (amplitude - slope * w - settled) * Math.exp(-x / w)
}

/** A rounding that cannot be told from none. */
function isSharp({ rounding, tailTime }: RecoveryCurve): boolean {
  return rounding < 1e-6 * tailTime
}

/** Rounding w and the share I tau/(tau − w) of the current that falls with the tail. */
function parts({ amplitude, tailTime, rounding }: RecoveryCurve): { readonly w: number; readonly settled: number } {
  // equal time constants have a limit of their own; a hair beside it is as good
  const w = Math.abs(rounding / tailTime - 1) < 1e-4 ? tailTime * 0.9999 : rounding
  return { w, settled: (amplitude * tailTime) / (tailTime - w) }
}

/** Time of the highest reverse current. [s] */
export function peakTime(curve: RecoveryCurve): number {
  const { slope, amplitude, tailTime, corner } = curve
  if (isSharp(curve) || slope <= 0) return corner
  const { w, settled } = parts(curve)
  const ratio = ((settled - amplitude + slope * w) * tailTime) / (settled * w)
  const x = ratio > 0 ? Math.log(ratio) / (1 / w - 1 / tailTime) : 0
  return corner + Math.max(0, x)
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
  if (isSharp(curve)) return ramp - amplitude * tailTime * Math.expm1(-x / tailTime)
  const { w, settled } = parts(curve)
  return (
    ramp - settled * tailTime * Math.expm1(-x / tailTime) - (amplitude - slope * w - settled) * w * Math.expm1(-x / w)
  )
}
