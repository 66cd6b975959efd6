import type { CaptureSettings, Waveform } from '../domain/capture.ts'
import type { LocatedEvent } from './locate-event.ts'

/** What the fixture does by itself, read off the reference capture. */
export interface FixtureResponse {
  /** The reference was as large as the capture: it is the fixture's own edge, not a disturbance to take away. */
  readonly subtracted: boolean
  /** 10 to 90 % of its fall. [s] */
  readonly edgeTime: number
}

/** A capture with its event found, ready for either reduction. */
export interface CaptureContext {
  readonly settings: CaptureSettings
  readonly waveform: Waveform
  readonly event: LocatedEvent
  /** Null without a reference. */
  readonly fixture: FixtureResponse | null
  readonly uniform: () => number
  readonly refits: number
}

/** Rise time of a first-order response, 10 to 90 %, times its bandwidth (2.197/(2 pi); common practice). */
const riseBandwidth = 0.35

/** Time constant of the instrument; null when its bandwidth is not stated. [s] */
export function instrumentTime(settings: CaptureSettings): number | null {
  return settings.bandwidth === null ? null : 1 / (2 * Math.PI * settings.bandwidth)
}

/** Shortest time the capture can tell apart. [s] */
export function resolution(context: CaptureContext): number {
  const { bandwidth } = context.settings
  return Math.max(bandwidth === null ? 0 : riseBandwidth / bandwidth, 2 * context.waveform.interval)
}
