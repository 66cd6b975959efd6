import type { CaptureContext } from '../../src/capture/capture-context.ts'
import type { EventWindow } from '../../src/capture/event-window.ts'
import type { FittedCorner } from '../../src/capture/fit-corner.ts'
import type { FittedRamp } from '../../src/capture/fit-ramp.ts'
import type { LocatedEvent } from '../../src/capture/locate-event.ts'
import type { RecoveryCurve } from '../../src/capture/recovery-curve.ts'
import type { CaptureSettings, Waveform } from '../../src/domain/capture.ts'
import { settingsFor } from './synthetic.ts'

type Course = (time: number) => number

/** A window of few samples whose every reading is known. */
export function windowOf(
  grid: { readonly start: number; readonly interval: number; readonly count: number },
  current: Course,
  voltage: Course | null = null,
): EventWindow {
  const time = Float64Array.from({ length: grid.count }, (_, k) => grid.start + k * grid.interval)
  const volts = voltage === null ? null : time.map(voltage)
  return { time, current: time.map(current), voltage: volts, interval: grid.interval, averaged: 1 }
}

/** An event with every mark a number of its own. */
export const someEvent: LocatedEvent = {
  inverted: false,
  events: 1,
  first: 0,
  startVisible: false,
  edge: 10,
  crossing: 14,
  peak: 18,
  half: 22,
  quarter: 25,
  last: 60,
  forward: 5,
  base: 0,
  lowest: -3,
}

/** Waveform of the given readings, one per nanosecond. */
export function waveformOf(current: readonly number[], voltage: readonly number[] | null = null): Waveform {
  return {
    start: 0,
    interval: 1e-9,
    current: Float64Array.from(current),
    voltage: voltage === null ? null : Float64Array.from(voltage),
  }
}

export function contextOf(
  change: Partial<Omit<CaptureContext, 'settings'>> & {
    readonly settings?: Partial<CaptureSettings>
    readonly kind?: 'ramp' | 'step'
  } = {},
): CaptureContext {
  const { settings = {}, kind = 'ramp', ...rest } = change
  return {
    settings: settingsFor(kind, settings),
    waveform: waveformOf([]),
    event: someEvent,
    fixture: null,
    uniform: () => 0.5,
    refits: 0,
    ...rest,
  }
}

/** Rises 1 A per unit of time to 6 A at 26, then falls with a time of 4: every number of the fit known. */
export const handCurve: RecoveryCurve = { corner: 26, slope: 1, amplitude: 6, tailTime: 4, rounding: 0 }

/** A tail as fitted from sample `from` on. */
export function handCorner(change: Partial<FittedCorner> = {}): FittedCorner {
  return { curve: handCurve, base: 0, noise: 0.01, from: 0, to: 100, ...change }
}

/** 10 A up to 10, a fall of 1 A per unit of time through zero at 20, the corner of {@link handCurve}. */
export function handRamp(change: Partial<FittedRamp> = {}): FittedRamp {
  return {
    plateau: { at: 5, value: 10, rise: 0, residual: 0.01, count: 10 },
    line: { at: 20, value: 0, rise: -1, residual: 0.01, count: 10 },
    fitted: handCorner(),
    curve: handCurve,
    current: 10,
    crossing: 20,
    onset: 10,
    ...change,
  }
}

/** The current that {@link handRamp} is the exact fit of. */
export function handCourse(time: number): number {
  if (time < 10) return 10
  return time < 26 ? 20 - time : -6 * Math.exp(-(time - 26) / 4)
}
