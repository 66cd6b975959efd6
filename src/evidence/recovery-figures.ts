import type { RecoveryTimeDefinition } from '../domain/rectifier.ts'
import { recoveryTimeFactor, timeToPeak } from '../models/charge-control.ts'

/** The four figures by which a ramp recovery is told. */
export type FigureName = 'recoveryTime' | 'charge' | 'peakReverseCurrent' | 'softness'

/** What the figures of one row mean, and the condition they were read at. */
export interface RampReading {
  /** [A] */
  readonly current: number
  /** [A/s] */
  readonly slope: number
  readonly recoveryTimeBy: RecoveryTimeDefinition
  readonly softnessBy: 'times' | 'slopes'
}

/** ln of a figure and its derivatives with respect to u, y, ln I and ln a. */
export interface LogFigure {
  readonly value: number
  readonly byLifetime: number
  readonly byRatio: number
  readonly byCurrent: number
  readonly bySlope: number
}

/** A recovery from the steady state with the derivatives of its two times. */
export interface SteadyEvent {
  readonly timeToPeak: number
  readonly tailTime: number
  /** Derivatives of ta with respect to u, y, ln I; that to ln a is the opposite of the last. [s] */
  readonly timeByLifetime: number
  readonly timeByRatio: number
  readonly timeByCurrent: number
  /** Derivative of tau_rr with respect to y; that to u is tau_rr itself. [s] */
  readonly tailByRatio: number
}

/** The event at u = ln tau and y = ln(tau/tau_rr − 1), started from the steady state. */
export function steadyEvent(
  reading: { readonly current: number; readonly slope: number },
  u: number,
  y: number,
): SteadyEvent {
  const lifetime = Math.exp(u)
  const tailTime = lifetime / (1 + Math.exp(y))
  const { current, slope } = reading
  const time = timeToPeak({ current, slope, lifetime, tailTime, storedCharge: lifetime * current })
  return withDerivatives(current / slope, lifetime, tailTime, time)
}

/**
 * Derivatives of ta by implicit differentiation of ta = (tau − tau_rr)(1 − exp(−T1/tau)), T1 = I/a + ta
 * (PHYSICS section 1 with q0 = tau I).
 */
function withDerivatives(crossing: number, lifetime: number, tailTime: number, time: number): SteadyEvent {
  const difference = lifetime - tailTime
  const emptied = (crossing + time) / lifetime
  const left = Math.exp(-emptied)
  const gone = -Math.expm1(-emptied)
  const pull = (difference * left) / lifetime
  const denominator = 1 - pull
  const byTail = -gone / denominator
  const tailByRatio = (-tailTime * difference) / lifetime
  return {
    timeToPeak: time,
    tailTime,
    timeByLifetime: (lifetime * (gone - pull * emptied)) / denominator + tailTime * byTail,
    timeByRatio: byTail * tailByRatio,
    timeByCurrent: (crossing * pull) / denominator,
    tailByRatio,
  }
}

/** ln of one figure of an event, as its row defines it, with derivatives. */
export function logFigure(event: SteadyEvent, reading: RampReading, name: FigureName): LogFigure {
  const { timeToPeak: time, tailTime } = event
  switch (name) {
    case 'peakReverseCurrent':
      return combine(event, Math.log(reading.slope * time), 1 / time, 0, 1)
    case 'charge': {
      const width = 0.5 * time + tailTime
      return combine(event, Math.log(reading.slope * time * width), 1 / time + 0.5 / width, 1 / width, 1)
    }
    case 'recoveryTime': {
      const factor = factorOf(reading, time)
      const total = time + factor * tailTime
      const growth = growthOf(reading, factor) * tailTime
      return combine(event, Math.log(total), (1 + growth / time) / total, factor / total, growth / total)
    }
    case 'softness': {
      if (reading.softnessBy === 'slopes') return combine(event, Math.log(tailTime / time), -1 / time, 1 / tailTime, 0)
      // a peak that hardly passes the level has a softness near 0, not one of minus infinity in logarithms
      const factor = Math.max(factorOf(reading, time), leastFactor)
      const growth = factor > leastFactor ? growthOf(reading, factor) / factor : 0
      return combine(event, Math.log((factor * tailTime) / time), (growth - 1) / time, 1 / tailTime, growth)
    }
  }
}

const leastFactor = 1e-3

/** Chain rule: from the derivatives of ln figure with respect to ta, tau_rr and, directly, ln a. */
function combine(event: SteadyEvent, value: number, byTime: number, byTail: number, direct: number): LogFigure {
  return {
    value,
    byLifetime: byTime * event.timeByLifetime + byTail * event.tailTime,
    byRatio: byTime * event.timeByRatio + byTail * event.tailByRatio,
    byCurrent: byTime * event.timeByCurrent,
    bySlope: direct - byTime * event.timeByCurrent,
  }
}

/** Tail times between the peak and the end of trr. */
export function factorOf(reading: RampReading, time: number): number {
  return recoveryTimeFactor({ definition: reading.recoveryTimeBy, peakReverseCurrent: reading.slope * time })
}

/** d factor / d ln I_RM: an absolute level is reached later from a higher peak. */
function growthOf(reading: RampReading, factor: number): number {
  return reading.recoveryTimeBy.kind === 'level' && factor > 0 ? 1 : 0
}
