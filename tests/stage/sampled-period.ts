import { bisect } from './by-hand.ts'

export interface PeriodInput {
  readonly kind: 'buck' | 'boost' | 'inverting'
  readonly vin: number
  readonly vout: number
  readonly current: number
  readonly inductance: number
  readonly period: number
  /** Ron and RL. [Ω] */
  readonly on: number
  readonly coil: number
  /** V_F at a current. */
  readonly drop: (current: number) => number
}

/** One simulated period: where the inductor's current goes with the drops held, and what a sampled sum makes of it. */
export interface Period {
  readonly start: number
  readonly peak: number
  readonly end: number
  readonly onTime: number
  /** Time in which the rectifier conducts. */
  readonly offTime: number
}

/** Voltages across the inductor with the drops at one current (PHYSICS 4). */
function voltages({ kind, vin, vout, on, coil, drop }: PeriodInput, at: number) {
  const rising = (kind === 'buck' ? vin - vout : vin) - at * (on + coil)
  const falling = vout + drop(at) + at * coil - (kind === 'boost' ? vin : 0)
  return { rising, falling }
}

/** Lets the current rise for the on-time, then fall until the period ends or nothing is left. */
function simulate(input: PeriodInput, at: number, start: number, onTime: number): Period {
  const { rising, falling } = voltages(input, at)
  const peak = start + (rising / input.inductance) * onTime
  const rest = input.period - onTime
  const end = peak - (falling / input.inductance) * rest
  if (end >= 0) return { start, peak, end, onTime, offTime: rest }
  return { start, peak, end: 0, onTime, offTime: (peak * input.inductance) / falling }
}

/** What reaches the output: all of a buck's inductor current, only the rectifier's of the others. Straight lines need few samples. */
function delivered(input: PeriodInput, period: Period): number {
  const rectifier = sampledMean(period.peak, period.end, (i) => i, 16) * period.offTime
  const switched = sampledMean(period.start, period.peak, (i) => i, 16) * period.onTime
  return (rectifier + (input.kind === 'buck' ? switched : 0)) / input.period
}

/** Mean of f(i) while the current runs linearly between two values, by midpoint samples. */
export function sampledMean(from: number, to: number, f: (current: number) => number, samples = 4000): number {
  let sum = 0
  for (let k = 0; k < samples; k++) sum += f(from + ((to - from) * (k + 0.5)) / samples)
  return sum / samples
}

/** Continuous steady state at a mean current: the on-time that brings the current back to where it began. */
function periodicAt(input: PeriodInput, mean: number): Period {
  const drift = (onTime: number): number => simulate(input, mean, 1e4, onTime).end - 1e4
  const onTime = bisect((t) => -drift(t), 0, input.period)
  const { rising } = voltages(input, mean)
  return simulate(input, mean, mean - (rising * onTime) / input.inductance / 2, onTime)
}

/** The steady period that delivers the output current; found by search, not by formula. */
export function steadyPeriod(input: PeriodInput): Period {
  const { kind, vin, vout, current, period } = input
  const base = kind === 'boost' ? vout : vin + vout
  const lossFree = kind === 'buck' ? current : (current * base) / vin
  const mean =
    kind === 'buck'
      ? current
      : bisect((i) => current - delivered(input, periodicAt(input, i)), lossFree / 2, lossFree * 1.5)
  const continuous = periodicAt(input, mean)
  if (continuous.start >= 0) return continuous
  let at = continuous.peak / 2
  let found = continuous
  for (let round = 0; round < 60; round++) {
    const held = at
    const onTime = bisect((t) => current - delivered(input, simulate(input, held, 0, t)), 0, period)
    found = simulate(input, held, 0, onTime)
    at = found.peak / 2
    if (Math.abs(at - held) < 1e-13 * at) break
  }
  return found
}
