import { type FigureName, factorOf, type RampReading } from './recovery-figures.ts'

/** The figures of one ramp row; null where it does not state them. */
export type RampFigures = Readonly<Record<FigureName, number | null>>

/** A point of the recovery model: u = ln tau, y = ln(tau/tau_rr − 1). */
export interface RecoveryPoint {
  readonly lifetime: number
  readonly ratio: number
}

/**
 * Lifetime and tail time from two figures of one row.
 *
 * The pair gives ta and tau_rr in closed form (by search for an absolute level); tau is then the unique root of
 * ta = (tau − tau_rr)(1 − exp(−(I/a + ta)/tau)). Null for an impossible pair: its times have no logarithms.
 */
export function invertPair(
  reading: RampReading,
  figures: RampFigures,
  first: FigureName,
  second: FigureName,
): RecoveryPoint | null {
  const time = peakTime(reading, figures, first, second)
  const tail = tailOf(reading, figures, first, second, time)
  const lifetime = lifetimeOf(reading.current / reading.slope, time, tail)
  const point = { lifetime: Math.log(lifetime), ratio: Math.log((lifetime - tail) / tail) }
  return Number.isFinite(point.lifetime) && Number.isFinite(point.ratio) ? point : null
}

/** ta from a pair; not a number where none exists. */
function peakTime(reading: RampReading, figures: RampFigures, first: FigureName, second: FigureName): number {
  const { peakReverseCurrent, recoveryTime, charge, softness } = figures
  const has = (name: FigureName) => first === name || second === name
  if (has('peakReverseCurrent')) return peakReverseCurrent! / reading.slope
  if (reading.recoveryTimeBy.kind === 'level') {
    const least = reading.recoveryTimeBy.until / reading.slope
    return searchPeakTime(reading, figures, least, { charge: has('charge'), softness: has('softness') })
  }
  const area = (charge ?? 0) / reading.slope
  const factor = factorOf(reading, 1)
  if (has('softness')) {
    const tailShare = softness! / (reading.softnessBy === 'slopes' ? 1 : factor)
    return has('charge') ? Math.sqrt(area / (0.5 + tailShare)) : recoveryTime! / (1 + factor * tailShare)
  }
  // ta (ta/2 + (trr − ta)/k) = Qrr/a: the root that stays finite where the square term vanishes (k = 2)
  const square = 0.5 - 1 / factor
  const straight = recoveryTime! / factor
  return (2 * area) / (straight + Math.sqrt(straight * straight + 4 * square * area))
}

/** tau_rr that goes with ta. */
function tailOf(
  reading: RampReading,
  figures: RampFigures,
  first: FigureName,
  second: FigureName,
  time: number,
): number {
  const other = first === 'peakReverseCurrent' ? second : second === 'peakReverseCurrent' ? first : null
  const name = other ?? (first === 'softness' || second === 'softness' ? 'softness' : 'recoveryTime')
  return tailBy(reading, figures, name, time)
}

function tailBy(reading: RampReading, figures: RampFigures, name: FigureName, time: number): number {
  if (name === 'charge') return figures.charge! / (reading.slope * time) - 0.5 * time
  if (name === 'recoveryTime') return (figures.recoveryTime! - time) / factorOf(reading, time)
  return (figures.softness! * time) / (reading.softnessBy === 'slopes' ? 1 : factorOf(reading, time))
}

/**
 * ta where trr ends at an absolute level, which the current reaches at `least`: the factor depends on the peak, so the
 * longest fitting ta is searched for.
 */
function searchPeakTime(
  reading: RampReading,
  figures: RampFigures,
  least: number,
  has: { readonly charge: boolean; readonly softness: boolean },
): number {
  const longest = figures.recoveryTime ?? Math.sqrt((2 * figures.charge!) / reading.slope)
  const surplus = (time: number) => {
    const tail = tailBy(reading, figures, has.softness ? 'softness' : 'recoveryTime', time)
    if (has.charge) return reading.slope * time * (0.5 * time + tail) - figures.charge!
    return time + factorOf(reading, time) * tail - figures.recoveryTime!
  }
  return least < longest ? lastCrossing(surplus, least, longest) : Number.NaN
}

/** The highest zero at which a function rises through 0, if any, on a logarithmic grid refined by halving. */
function lastCrossing(surplus: (time: number) => number, least: number, longest: number): number {
  const steps = 96
  const at = (index: number) => longest * ((Math.max(least, longest * 1e-9) * (1 + 1e-9)) / longest) ** (index / steps)
  for (let index = 0; index < steps; index++) {
    let high = at(index)
    let low = at(index + 1)
    if (!(surplus(high) >= 0 && surplus(low) < 0)) continue
    for (let halving = 0; halving < 60; halving++) {
      const middle = 0.5 * (low + high)
      if (surplus(middle) < 0) low = middle
      else high = middle
    }
    return 0.5 * (low + high)
  }
  return Number.NaN
}

/**
 * tau from ta and tau_rr. The right-hand side is concave and rising in tau, so Newton's steps from tau_rr + ta, which is
 * too short, approach the root from one side and cannot overshoot.
 */
function lifetimeOf(crossing: number, time: number, tail: number): number {
  const end = crossing + time
  let lifetime = tail + time
  for (let iteration = 0; iteration < 80; iteration++) {
    const x = end / lifetime
    const gone = -Math.expm1(-x)
    const rise = gone - ((lifetime - tail) * (1 - gone) * x) / lifetime
    const step = (time - (lifetime - tail) * gone) / rise
    lifetime += step
    if (!(Math.abs(step) > 4e-16 * lifetime)) break
  }
  return lifetime
}
