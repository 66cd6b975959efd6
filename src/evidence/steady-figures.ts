import type { CalibratedRectifier } from '../domain/calibrated-rectifier.ts'
import { rampRecovery, recoveryTimeFactor } from '../models/charge-control.ts'
import type { OperatingCondition } from './operating-condition.ts'
import { recoveryAt } from './recovery-at.ts'

/** The figures of a recovery that a data sheet would print. */
export interface EventFigures {
  /** [C] */
  readonly charge: number
  /** [A] */
  readonly peakReverseCurrent: number
  /** By the line through 90 % and 25 %. [s] */
  readonly recoveryTime: number
}

/** Figures of the posterior mean at a condition, started from the steady state as data-sheet rows are; null without stored charge. */
export function steadyFiguresAt(rectifier: CalibratedRectifier, condition: OperatingCondition): EventFigures | null {
  const { current, slope, junction } = condition
  const recovery = recoveryAt({ rectifier, current, slope, junction })
  if (recovery === null) return null
  const { lifetime, tailTime } = recovery
  const event = rampRecovery({ current, slope, lifetime, tailTime, storedCharge: lifetime * current })
  const factor = recoveryTimeFactor({
    definition: { kind: 'line-90-25' },
    peakReverseCurrent: event.peakReverseCurrent,
  })
  return {
    charge: event.charge,
    peakReverseCurrent: event.peakReverseCurrent,
    recoveryTime: event.timeToPeak + factor * tailTime,
  }
}
