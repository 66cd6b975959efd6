import type { CaptureContext } from './capture-context.ts'
import type { EventWindow } from './event-window.ts'
import type { WindowMarks } from './fit-ramp.ts'

/** The first look's sample numbers in the averaged window. */
export function marksIn(window: EventWindow, { waveform, event }: CaptureContext): WindowMarks {
  const at = (k: number) =>
    Math.min(
      window.time.length - 1,
      Math.max(0, Math.floor((waveform.start + k * waveform.interval - window.time[0]!) / window.interval + 0.5)),
    )
  return {
    edge: at(event.edge),
    crossing: at(event.crossing),
    peak: Math.max(at(event.peak), at(event.crossing) + 1),
    half: at(event.half),
    quarter: Math.max(at(event.quarter), at(event.half) + 1),
    forward: event.forward,
    base: event.base,
    lowest: event.lowest,
  }
}
