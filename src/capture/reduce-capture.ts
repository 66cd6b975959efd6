import type { CaptureSettings, ReducedCapture, Waveform } from '../domain/capture.ts'
import { locateEvent } from './locate-event.ts'
import { reduceRamp } from './reduce-ramp.ts'
import { reduceStep } from './reduce-step.ts'
import { subtractReference } from './subtract-reference.ts'

/** What is reduced, and by which rules. */
export interface CaptureInput {
  readonly settings: CaptureSettings
  readonly waveform: Waveform
  /** Response of the fixture with a short in the rectifier's place. */
  readonly reference: Waveform | null
  /** Even numbers from 0 to 1 from a seeded generator, for the resampling. */
  readonly uniform: () => number
  /** Refits from which the doubt by noise is taken; 0 leaves it out. */
  readonly refits: number
}

/** Reduces a capture to its figures; null where no fall from forward to reverse current can be fitted. */
export function reduceCapture(input: CaptureInput): ReducedCapture | null {
  const { waveform, fixture } = subtractReference(input.waveform, input.reference)
  const event = locateEvent(waveform.current)
  if (event === null) return null
  const context = { ...input, waveform, event, fixture }
  return input.settings.fixture === 'ramp' ? reduceRamp(context) : reduceStep(context)
}
