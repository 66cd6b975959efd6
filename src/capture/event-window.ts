import type { Waveform } from '../domain/capture.ts'
import type { LocatedEvent } from './locate-event.ts'

/** The part of a capture around its event, sign corrected, neighbouring samples averaged where there are plenty. */
export interface EventWindow {
  /** From the capture's own zero. [s] */
  readonly time: Float64Array
  /** As measured: the baseline is still in it. [A] */
  readonly current: Float64Array
  readonly voltage: Float64Array | null
  /** Of the averaged samples. [s] */
  readonly interval: number
  /** Samples averaged into one. */
  readonly averaged: number
}

/** Averaged samples across the shorter of rise to the peak and width of the reversal; more bring nothing. */
const enough = { ramp: 150, step: 400 }

/** Samples below which a window holds no event that could be fitted. */
export const leastWindow = 16

/** Cuts the event out: plateau before it, tail and quiet end after it. */
export function eventWindow(
  waveform: Waveform,
  event: LocatedEvent,
  fixture: 'ramp' | 'step',
  voltageSign: 1 | -1,
): EventWindow {
  const rise = Math.max(1, event.peak - event.crossing)
  const width = Math.max(1, event.half - event.crossing)
  const averaged = Math.max(1, Math.floor((fixture === 'ramp' ? Math.min(rise, width) : width) / enough[fixture]))
  const fall = event.crossing - event.edge
  const decay = Math.max(4, event.quarter - event.half)
  const before = fixture === 'ramp' ? 12 * fall + 4 * rise : 20 * fall + 2 * width
  const from = Math.max(event.first, event.edge - before)
  const to = Math.min(event.last, event.quarter + 30 * decay + (fixture === 'ramp' ? 10 * rise : 4 * width))
  return average(waveform, from, Math.floor((to - from) / averaged), averaged, event.inverted ? -1 : 1, voltageSign)
}

function average(
  waveform: Waveform,
  from: number,
  count: number,
  averaged: number,
  sign: number,
  voltageSign: number,
): EventWindow {
  const time = new Float64Array(count)
  const current = new Float64Array(count)
  const voltage = waveform.voltage === null ? null : new Float64Array(count)
  const { interval } = waveform
  for (let k = 0; k < count; k++) {
    const start = from + k * averaged
    let sum = 0
    let volts = 0
    for (let j = start; j < start + averaged; j++) {
      sum += waveform.current[j]!
      if (waveform.voltage !== null) volts += waveform.voltage[j]!
    }
    time[k] = waveform.start + (start + 0.5 * (averaged - 1)) * interval
    current[k] = (sign * sum) / averaged
    if (voltage !== null) voltage[k] = (voltageSign * volts) / averaged
  }
  return { time, current, voltage, interval: interval * averaged, averaged }
}
