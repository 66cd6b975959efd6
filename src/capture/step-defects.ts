import type { CaptureCaveat } from '../domain/capture.ts'
import type { CaptureContext } from './capture-context.ts'
import type { EventWindow } from './event-window.ts'
import { channelQuantum, clippedPlateau, sampleNoise } from './find-clipping.ts'
import type { FittedStep } from './fit-step.ts'
import { chargedShare } from './lifetime-from-ramp.ts'
import { tailRinging } from './ramp-defects.ts'
import type { StepFigures } from './step-figures.ts'

const riseShare = 0.3
const fewestSamples = 10
const offsetShare = 0.015
const chargedEnough = 0.95

/** Everything wrong with a step capture, in the order of the list of codes. */
export function stepDefects(
  context: CaptureContext,
  window: EventWindow,
  step: FittedStep,
  figures: StepFigures,
): readonly CaptureCaveat[] {
  const found: CaptureCaveat[] = []
  const add = (code: CaptureCaveat['code'], data: CaptureCaveat['data']) => found.push({ code, data })
  const { waveform, event, settings } = context
  const time = figures.storageTime ?? figures.recoveryTime
  const rise = settings.bandwidth === null ? 0 : 0.35 / settings.bandwidth
  if (rise > riseShare * time) add('bandwidth-too-low', { rise, timeToPeak: time })
  const samples = time / waveform.interval
  if (samples < fewestSamples) add('samples-too-few', { samples, wanted: fewestSamples })
  const clipped = clipping(context)
  if (clipped !== null) add('clipping', { channel: 'current', ...clipped })
  const span = figures.current + figures.reverse
  if (Math.abs(step.fitted.base) > offsetShare * span)
    add('residual-offset', { offset: step.fitted.base, share: Math.abs(step.fitted.base) / span })
  const ringing = tailRinging(window, step.fitted)
  if (ringing !== null) add('ringing', { frequency: ringing.frequency, amplitude: ringing.amplitude })
  const followed = window.time[window.time.length - 1]! - step.fitted.curve.corner
  const wanted = figures.tailTime * Math.log(1 / Math.max(settings.chargeUntil, 0.01))
  if (followed < 0.9 * wanted) add('tail-truncated', { followed, wanted })
  const conduction = (event.edge - event.first) * waveform.interval
  if (event.startVisible && chargedShare(conduction, figures.lifetime) < chargedEnough)
    add('plateau-too-short', { conduction, wanted: 3 * figures.lifetime })
  if (step.plateau === null) add('no-reverse-plateau', {})
  return found
}

/** Either plateau flat at the record's extreme while the quiet end is noisy. */
function clipping({ waveform, event }: CaptureContext) {
  const { current } = waveform
  const quietFrom = Math.min(event.last - 1, event.quarter + 4 * (event.quarter - event.half))
  const noise = sampleNoise(current, quietFrom, event.last)
  const step = channelQuantum(current)
  const forward = event.inverted ? -1 : 1
  return clippedPlateau(current, forward, noise, step) ?? clippedPlateau(current, forward === 1 ? -1 : 1, noise, step)
}
