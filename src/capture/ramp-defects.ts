import type { CaptureCaveat } from '../domain/capture.ts'
import { type CaptureContext, instrumentTime, resolution } from './capture-context.ts'
import type { EventWindow } from './event-window.ts'
import { channelQuantum, clippedPeak, clippedPlateau, sampleNoise } from './find-clipping.ts'
import { findRinging } from './find-ringing.ts'
import { inductiveJump } from './find-shunt-inductance.ts'
import { voltageOnsetAfterPeak } from './find-skew.ts'
import type { FittedCorner } from './fit-corner.ts'
import { type FittedRamp, firstAfter } from './fit-ramp.ts'
import { chargedShare, lifetimeFromRamp } from './lifetime-from-ramp.ts'
import type { RampFigures } from './ramp-figures.ts'
import { reverseCurrentAt } from './recovery-curve.ts'
import type { RecoveryEnergy } from './recovery-energy.ts'
import { signOfVoltage } from './sign-of-voltage.ts'

/** Share of ta that the instrument's rise time may take. */
const riseShare = 0.3
/** Samples across ta below which the peak is a guess. */
const fewestSamples = 10
/** Share of the swing above which a baseline is worth a word. */
const offsetShare = 0.015
/** A ringing below this share of the peak changes no figure by a percent. */
const ringingShare = 0.02
/** Share of the steady charge that the plateau must have built. */
const chargedEnough = 0.95

/** Everything wrong with a ramp capture, in the order of the list of codes. */
export function rampDefects(
  context: CaptureContext,
  window: EventWindow,
  ramp: FittedRamp,
  figures: RampFigures,
  energy: RecoveryEnergy | null,
): readonly CaptureCaveat[] {
  const found: CaptureCaveat[] = []
  const add = (code: CaptureCaveat['code'], data: CaptureCaveat['data']) => found.push({ code, data })
  const { bandwidth } = context.settings
  const rise = bandwidth === null ? 0 : 0.35 / bandwidth
  if (rise > riseShare * figures.timeToPeak) add('bandwidth-too-low', { rise, timeToPeak: figures.timeToPeak })
  const samples = figures.timeToPeak / context.waveform.interval
  if (samples < fewestSamples) add('samples-too-few', { samples, wanted: fewestSamples })
  const clipped = clipping(context, ramp)
  if (clipped !== null) add('clipping', clipped)
  const followed = window.time[window.time.length - 1]! - ramp.fitted.curve.corner
  const wanted = ramp.fitted.curve.tailTime * Math.log(1 / Math.max(context.settings.chargeUntil, 0.01))
  const truncated = followed < 0.9 * wanted
  // a jump, a cut peak, a cut tail or a ringing bends the fit: what it then says of the other defects is not believed
  const jump = inductiveJump(window, ramp)
  const ringing = jump === null && clipped === null ? tailRinging(window, ramp.fitted) : null
  const span = figures.current + figures.peakReverseCurrent
  const offset = Math.abs(ramp.fitted.base)
  const believed = jump === null && !truncated && offset > (ringing?.amplitude ?? 0)
  if (believed && offset > offsetShare * span)
    add('residual-offset', { offset: ramp.fitted.base, share: offset / span })
  if (ringing !== null) add('ringing', { frequency: ringing.frequency, amplitude: ringing.amplitude })
  const timed = energy !== null && jump === null && clipped === null && ringing === null
  const skew = timed ? voltageOnsetAfterPeak(window, ramp, energy.conducting, energy.voltage) : null
  if (skew !== null && Math.abs(skew) > skewLimit(context, window, figures)) add('skew', { skew })
  const { shunt } = context.settings.current
  if (jump !== null) {
    const inductance = shunt === null ? {} : { inductance: jump * shunt }
    add('shunt-inductance', { jump, error: jump * figures.slope, ...inductance })
  }
  if (truncated) add('tail-truncated', { followed, wanted })
  const lifetime = lifetimeFromRamp({ ...figures, tailTime: ramp.fitted.curve.tailTime })
  const conduction = (context.event.edge - context.event.first) * context.waveform.interval
  if (context.event.startVisible && lifetime !== null && chargedShare(conduction, lifetime) < chargedEnough)
    add('plateau-too-short', { conduction, wanted: 3 * lifetime })
  return found
}

function skewLimit(context: CaptureContext, window: EventWindow, figures: RampFigures): number {
  return Math.max(
    0.08 * figures.timeToPeak,
    1.5 * window.interval,
    0.7 * resolution(context),
    2 * (instrumentTime(context.settings) ?? 0),
  )
}

/** Clipping of the reverse peak, of the forward plateau, or of the voltage. */
function clipping(context: CaptureContext, ramp: FittedRamp): CaptureCaveat['data'] | null {
  const { waveform, event } = context
  const { interval, current, voltage } = waveform
  const quietFrom = Math.min(event.last - 1, event.quarter + 4 * (event.quarter - event.half))
  const noise = sampleNoise(current, quietFrom, event.last)
  const drift = Math.min(ramp.curve.slope, ramp.curve.amplitude / ramp.curve.tailTime) * interval
  const peak = clippedPeak(current, event, drift, noise)
  if (peak !== null) return { channel: 'current', ...peak }
  const plateau = clippedPlateau(current, event.inverted ? -1 : 1, noise, channelQuantum(current))
  if (plateau !== null) return { channel: 'current', ...plateau }
  if (voltage === null) return null
  const high = clippedPlateau(
    voltage,
    signOfVoltage(context),
    sampleNoise(voltage, event.first, event.edge),
    channelQuantum(voltage),
  )
  return high === null ? null : { channel: 'voltage', ...high }
}

/** Oscillation of the current after the corner, on top of the fitted tail. */
export function tailRinging(window: EventWindow, fitted: FittedCorner) {
  const { curve, base } = fitted
  const from = firstAfter(window, curve.corner + 2 * curve.rounding)
  for (const tails of [3, 8]) {
    const to = Math.min(window.time.length, firstAfter(window, curve.corner + tails * curve.tailTime))
    const residuals = new Float64Array(Math.max(0, to - from))
    for (let k = from; k < to; k++)
      residuals[k - from] = window.current[k]! - base + reverseCurrentAt(curve, window.time[k]!)
    const found = findRinging(residuals, window.interval, ringingShare * curve.amplitude)
    if (found !== null) return found
  }
  return null
}
