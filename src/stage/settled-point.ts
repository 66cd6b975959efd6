import type { JunctionCapacitance } from '../domain/calibrated-rectifier.ts'
import type { ConductionMode } from '../domain/stage.ts'
import { ringingPeakVoltage, storedChargePeakVoltage } from '../models/peak-reverse-voltage.ts'
import { slopeAt, turnOnBase } from './book-instant.ts'
import type { Instant, Kernel, RecoveryEvent } from './kernel.ts'
import { solveLineInstant } from './line-cycle.ts'
import { recover } from './recover.ts'

/** Share of the mean within which a valley counts as the boundary of continuous conduction. */
const boundaryShare = 0.01

/** The period that stands for the point (at the crest of the mains) and the events of the hottest and the other parts. */
export interface PointEvent {
  readonly instant: Instant
  readonly hot: RecoveryEvent
  readonly other: RecoveryEvent
  /** Total turn-on di/dt. [A/s] */
  readonly slope: number
  /** Turn-on energy with an ideal rectifier. [J] */
  readonly baseEnergy: number
}

/**
 * Reads the representative event out of a settled kernel. A mains stage takes the crest of the line; where the crest is
 * in discontinuous conduction and other angles are not, the angle with the largest valley.
 */
export function pointEvent(kernel: Kernel): PointEvent {
  if (kernel.kind === 'mains-boost') placeEventAngle(kernel)
  const slope = slopeAt(kernel, Math.max(kernel.instant.valley, 0))
  kernel.turnOnSlope = slope
  recover(kernel, kernel.hot, kernel.hotEvent)
  if (kernel.parts > 1) recover(kernel, kernel.other, kernel.otherEvent)
  return {
    instant: { ...kernel.instant },
    hot: { ...kernel.hotEvent },
    other: { ...kernel.otherEvent },
    slope,
    baseEnergy: turnOnBase(kernel, slope),
  }
}

/** Period at the crest of the mains; the only one of a dc stage. */
export function crestInstant(kernel: Kernel): Instant {
  if (kernel.kind === 'mains-boost') solveLineInstant(kernel, 1)
  return { ...kernel.instant }
}

function placeEventAngle(kernel: Kernel): void {
  solveLineInstant(kernel, 1)
  if (kernel.instant.valley > 0) return
  let bestSine = 1
  let bestValley = 0
  for (let k = 0; k < kernel.line.count; k++) {
    const sine = kernel.line.sine[k]!
    solveLineInstant(kernel, sine)
    if (kernel.instant.valley > bestValley) {
      bestValley = kernel.instant.valley
      bestSine = sine
    }
  }
  solveLineInstant(kernel, bestSine)
}

/** Label of a period: a continuous valley within 1 % of the mean, on either side of zero, is the boundary. */
export function conductionModeOf(instant: Instant): ConductionMode {
  if (Math.abs(instant.continuousValley) <= boundaryShare * instant.meanCurrent) return 'boundary'
  return instant.discontinuous ? 'discontinuous' : 'continuous'
}

/** Peak reverse current of all parallel parts, whose peaks are taken to coincide. [A] */
export function totalPeakReverseCurrent({ parts }: Kernel, { hot, other }: PointEvent): number {
  return hot.peakReverseCurrent + (parts > 1 ? (parts - 1) * other.peakReverseCurrent : 0)
}

/**
 * Peak reverse voltage: the larger of the stored-charge part and the undamped capacitive ringing (PHYSICS 2).
 * Without loop inductance it is the blocking voltage.
 */
export function peakReverseVoltage(kernel: Kernel, event: PointEvent, capacitance: JunctionCapacitance | null): number {
  const voltage = event.instant.blockingVoltage
  const loopInductance = kernel.loopInductance
  if (loopInductance === 0) return voltage
  let peak = voltage
  if (event.hot.peakReverseCurrent > 0) {
    const peakReverseCurrent = totalPeakReverseCurrent(kernel, event)
    peak = storedChargePeakVoltage({ voltage, loopInductance, peakReverseCurrent, tailTime: event.hot.tailTime })
  }
  if (capacitance === null) return peak
  return Math.max(
    peak,
    ringingPeakVoltage({ voltage, voltageFall: kernel.voltageFall, loopInductance, capacitance, parts: kernel.parts }),
  )
}
