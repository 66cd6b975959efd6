import type { Kernel } from '../../src/stage/kernel.ts'

/**
 * The physics of one period written a second time, as plainly as it can be: bisection in place of closed forms, sums in
 * place of integrals. Only the coefficients of the fitted part are shared with the program.
 */
export interface Part {
  readonly coefficients: Float64Array
  readonly rated: number
  readonly ratedVoltage: number
  readonly line: boolean
  readonly stores: boolean
  readonly leaks: boolean
}

export function partOf({ coefficients, part }: Kernel): Part {
  return {
    coefficients: coefficients.slice(),
    rated: part.ratedCurrent,
    ratedVoltage: part.ratedVoltage,
    line: part.line,
    stores: part.storesCharge,
    leaks: part.leaks,
  }
}

/** V_F over [1, ln x, x] × [1, T − T0], proportional to the current below a hundredth of the rating. */
export function drop({ coefficients: c, rated, line }: Part, current: number, junction: number): number {
  const at = (x: number): number => {
    const rise = junction - 298.15
    const log = line ? 0 : Math.log(x)
    return c[8]! + rise * c[11]! + (c[9]! + rise * c[12]!) * log + (c[10]! + rise * c[13]!) * x
  }
  const x = current / rated
  return line || x >= 0.01 ? at(x) : (at(0.01) * x) / 0.01
}

export function leakage({ coefficients: c, ratedVoltage, leaks }: Part, voltage: number, junction: number): number {
  if (!leaks || voltage <= 0) return 0
  return Math.exp(c[14]! + c[15]! * (1 / 298.15 - 1 / junction) + c[16]! * Math.log(voltage / ratedVoltage))
}

export function lifetimes({ coefficients: c, rated }: Part, current: number, slope: number, junction: number) {
  const basis = [1, Math.log(Math.max(current / rated, 0.01)), Math.log(slope / 1e8), Math.log(junction / 298.15)]
  const sum = (from: number): number => basis.reduce((all, each, k) => all + each * c[from + k]!, 0)
  const tau = Math.exp(sum(0))
  return { tau, tail: tau / (1 + Math.exp(sum(4))) }
}

/** Root of a function that falls from low to high. */
export function bisect(f: (x: number) => number, low: number, high: number): number {
  let [a, b] = [low, high]
  for (let k = 0; k < 100 && b - a > 1e-16 * b; k++) {
    const middle = (a + b) / 2
    if (f(middle) > 0) a = middle
    else b = middle
  }
  return (a + b) / 2
}

/** q0 of PHYSICS 1: charge at the end of a conduction interval that runs from `peak` to `current`. */
export function storedCharge(peak: number, current: number, time: number, tau: number): number {
  const m = (peak - current) / time
  return tau * (current + m * tau - (peak + m * tau) * Math.exp(-time / tau))
}

interface Ramp {
  readonly current: number
  readonly slope: number
  readonly tau: number
  readonly tail: number
  readonly charge: number
}

/** ta by bisection of its equation. */
function timeToPeak({ current, slope, tau, tail, charge }: Ramp): number {
  const missing = (ta: number): number =>
    (tau - tail) *
      (1 - Math.exp(-(current / slope + ta) / tau) * (1 + (tau * current - charge) / (slope * tau * tau))) -
    ta
  return bisect(missing, Math.max(0, -current / slope), 2 * tau)
}

export interface Event {
  readonly peak: number
  readonly charge: number
  readonly toPeak: number
  readonly rectifier: number
  readonly switchAdded: number
}
const nothing: Event = { peak: 0, charge: 0, toPeak: 0, rectifier: 0, switchAdded: 0 }

function tailShare(voltageFall: number, tail: number): number {
  const x = voltageFall / tail
  return x === 0 ? 1 : -Math.expm1(-x) / x
}

/** The hard event of PHYSICS 1 and 2. */
export function hardEvent(ramp: Ramp, voltage: number, voltageFall: number): Event {
  const toPeak = timeToPeak(ramp)
  const peak = ramp.slope * toPeak
  const g = tailShare(voltageFall, ramp.tail)
  return {
    peak,
    toPeak,
    charge: peak * (toPeak / 2 + ramp.tail),
    rectifier: voltage * peak * ramp.tail * g,
    switchAdded: voltage * (ramp.current * toPeak + (peak * toPeak) / 2 + peak * ramp.tail * (1 - g)),
  }
}

/** What is left after the idle time of discontinuous conduction (PHYSICS 1). */
export function residualEvent(input: {
  readonly decay: number
  readonly idle: number
  readonly slope: number
  readonly tau: number
  readonly tail: number
  readonly charge: number
  readonly voltage: number
  readonly voltageFall: number
}): Event {
  const { decay: m, idle, slope: a, tau, tail, charge: q0, voltage } = input
  const left = (t: number): { peak: number; charge: number } => {
    const soft = timeToPeak({ current: 0, slope: m, tau, tail, charge: q0 })
    if (t > soft) {
      const peak = m * soft * Math.exp(-(t - soft) / tail)
      return { peak, charge: peak * tail }
    }
    const flowing = m * t
    const remaining = q0 * Math.exp(-t / tau) - m * tau * (t - tau * (1 - Math.exp(-t / tau)))
    const ta = timeToPeak({ current: -flowing, slope: a, tau, tail, charge: Math.max(remaining, 0) })
    const peak = a * ta
    return { peak, charge: (peak * peak - flowing * flowing) / (2 * a) + peak * tail }
  }
  const { peak, charge } = left(idle)
  if (charge < 0.01 * left(0).charge) return nothing
  const rectifier = voltage * peak * tail * tailShare(input.voltageFall, tail)
  return { peak, charge, toPeak: 0, rectifier, switchAdded: voltage * charge - rectifier }
}

/** ∫ C dv and ∫ v C dv by the midpoint rule in √v, where the integrands are tame. */
export function capacitive(zeroBias: number, builtIn: number, grading: number, voltage: number) {
  const steps = 20_000
  let charge = 0
  let energy = 0
  for (let k = 0; k < steps; k++) {
    const root = (Math.sqrt(voltage) * (k + 0.5)) / steps
    const v = root * root
    const dv = (2 * root * Math.sqrt(voltage)) / steps
    const c = zeroBias / (1 + v / builtIn) ** grading
    charge += c * dv
    energy += v * c * dv
  }
  return { charge, cost: voltage * charge - energy }
}
