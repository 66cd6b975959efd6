import type { Waveform } from '../domain/capture.ts'
import { readAt } from './subtract-reference.ts'

/** Moves the voltage channel to the current channel's time: the current arrives `delay` later than the voltage. */
export function correctSkew(waveform: Waveform, delay: number): Waveform {
  const { voltage, start, interval } = waveform
  if (voltage === null || delay === 0) return waveform
  return { ...waveform, voltage: voltage.map((_, k) => readAt(voltage, waveform, start + k * interval - delay)) }
}
