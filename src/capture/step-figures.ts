import type { RecoveryTimeDefinition } from '../domain/rectifier.ts'
import { diffusionLifetime } from '../models/diffusion-storage.ts'
import { lifetimeFromStep } from '../models/step-fixture.ts'
import type { EventWindow } from './event-window.ts'
import type { FittedStep } from './fit-step.ts'
import { fallsTo, peakTime, reverseCurrentAt } from './recovery-curve.ts'
import { correctionAt, tailCorrection } from './tail-correction.ts'

/** Currents, times and lifetimes of one reversal. */
export interface StepFigures {
  readonly current: number
  readonly reverse: number
  readonly storageTime: number | null
  readonly recoveryTime: number
  readonly until: number
  readonly lifetime: number
  readonly tailTime: number
  readonly diffusionLifetime: number | null
  /** Recovery time on the samples' own tail against the fitted one; relative. */
  readonly endDoubt: number
}

/** Reads the figures off a fitted reversal; the recovery time ends at a level of the reverse plateau. */
export function stepFigures(window: EventWindow, step: FittedStep, definition: RecoveryTimeDefinition): StepFigures {
  const { curve, fitted, current, crossing } = step
  const top = peakTime(curve)
  const reverse = step.plateau === null ? reverseCurrentAt(curve, top) : step.reverse
  const until = levelOf(definition, reverse)
  const correction = tailCorrection(window, fitted)
  const plain = fallsTo((t) => reverseCurrentAt(curve, t), top, curve.tailTime, until)
  const corrected = fallsTo((t) => reverseCurrentAt(curve, t) + correctionAt(correction, t), top, curve.tailTime, until)
  const recoveryTime = (correction.significant ? corrected : plain) - crossing
  const storageTime = step.plateau === null ? null : curve.corner - crossing
  const tailTime = curve.tailTime
  return {
    current,
    reverse,
    storageTime,
    recoveryTime,
    until,
    lifetime: lifetimeOf({ current, reverse, storageTime, tailTime, recoveryTime, until }),
    tailTime,
    diffusionLifetime:
      storageTime === null
        ? null
        : diffusionLifetime({ storageTime, forwardCurrent: current, reverseCurrent: reverse }),
    endDoubt: Math.abs(corrected - plain) / recoveryTime,
  }
}

function levelOf(definition: RecoveryTimeDefinition, reverse: number): number {
  if (definition.kind === 'level') return definition.until
  return (definition.kind === 'level-10' ? 0.1 : 0.25) * reverse
}

/**
 * Lifetime by the charge model. With a plateau from storage and tail time; without one the current starts from
 * tau I_F/TM, so that tau = tau_rr (1 + I_R/I_F).
 */
function lifetimeOf(figures: {
  readonly current: number
  readonly reverse: number
  readonly storageTime: number | null
  readonly tailTime: number
  readonly recoveryTime: number
  readonly until: number
}): number {
  const { current, reverse, storageTime, tailTime } = figures
  const least = tailTime * (1 + reverse / current)
  if (storageTime === null) return least
  const found = lifetimeFromStep({
    storageTime,
    recoveryTime: storageTime + tailTime * Math.log(4),
    forwardCurrent: current,
    reverseCurrent: reverse,
    until: reverse / 4,
  })
  return found?.lifetime ?? least
}
