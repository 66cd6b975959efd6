import type { CaptureCaveatCode, CaptureDocument } from '../../domain/capture.ts'
import { visible } from '../visible.ts'
import { sentence } from './sentence.ts'
import { cautionText } from './words.ts'

/** One sentence per defect: what is the matter, the numbers, what to do next (pattern language: sentence.ts). */
const captureWarningWords: Readonly<Record<CaptureCaveatCode, string>> = {
  'bandwidth-too-low':
    'The stated bandwidth rises in {rise:s}, too slow for a peak reached {timeToPeak:s} after the zero crossing: the peak is read low and late. ' +
    'Use a faster probe or oscilloscope, or a lower slope.',
  'samples-too-few':
    'Only {samples} samples lie between zero crossing and peak; {wanted} are wanted. Sample faster or use interleaved averaging.',
  clipping:
    'The {channel} channel is clipped: {samples} samples stand at its limit. Enlarge the vertical range and capture again.',
  'residual-offset':
    'The quiet end shows {offset:A} of offset, {share:%} of the swing. It was taken out; null the probe and degauss it before the next capture.',
  ringing:
    'The tail rings at {frequency:Hz} with {amplitude:A}: ends and charge are read through it. Shorten loop and ground lead, or damp the fixture.',
  skew:
    'The reverse voltage begins to rise {skew:s} after the current peak; zero is expected, so the channels are skewed and the energy is wrong. ' +
    'Deskew them, or lower current_delay by {skew:s}.',
  'shunt-inductance':
    'The current jumps by {error:A} at the start of the ramp, as a shunt with {jump:s} of L/R does[ ({inductance:H})]: slope is right, peak and charge are read high. ' +
    'Use a coaxial shunt or compensate it.',
  'tail-truncated':
    'The record ends {followed:s} after the peak; {wanted:s} are needed to reach the stated end. Baseline, charge and energy rest on the extended fit. Capture longer.',
  'wrong-sign': 'The {channel} channel is upside down; it was turned. Set invert: true, or turn the probe.',
  'several-events': 'The record holds {events} reversals; the first is reduced. Cut the record or trigger on one.',
  'plateau-too-short':
    'Forward current flowed for {conduction:s} only; {wanted:s} are needed to charge the junction. The charge is below that of steady conduction. Lengthen the forward pulse.',
  'no-reverse-plateau':
    'The reverse current turns back at once: there is no plateau, so no storage time and not the current of the fixture. Raise the forward current or lower the reverse current.',
  'reference-not-subtracted':
    'The reference swings as far as the capture itself, so it is no disturbance to take away; it was not subtracted.',
  'junction-assumed': 'The junction temperature is not stated: 25 °C is assumed. Set device.junction.',
}

const benchVoltage =
  'Lethal voltage: this bench carries [{voltage:V}|a voltage that the capture does not show; take it as hazardous], above the limits of 60 V dc and 42.4 V peak. ' +
  'Touching live parts can kill.'

/** Fills the text fields of a reduced capture; the document itself is filled and returned. */
export function captureWords(document: CaptureDocument): CaptureDocument {
  for (const warning of document.warnings) {
    warning.text = visible(sentence(captureWarningWords[warning.code], warning.data))
  }
  for (const caution of document.cautions) {
    caution.text =
      caution.code === 'lethal-voltage' ? visible(sentence(benchVoltage, caution.data)) : cautionText(caution)
  }
  return document
}
