import type { EventResult } from '../domain/result.ts'
import type { EventWaveform } from '../domain/review.ts'

/** Points on each piece of the waveform. */
const rampPoints = 24
const tailPoints = 40
/** The tail is drawn for this many time constants. */
const tailLength = 6

/**
 * The recovery event as the model has it: current falls at the slope, turns at −I_RM after ta, dies with tau_rr; the
 * reverse voltage stays zero to the peak and then rises linearly over the switch's voltage fall.
 *
 * @returns Null where the part does not recover hard.
 */
export function eventWaveform(id: string, event: EventResult | null, voltageFall: number): EventWaveform | null {
  if (event === null || !(event.peak_reverse_a > 0) || event.tau_rr_s === null || event.current_a === 0) return null
  const {
    current_a: current,
    slope_a_per_s: slope,
    ta_s: toPeak,
    tau_rr_s: tailTime,
    peak_reverse_a: peak,
    blocking_v: blocking,
  } = event
  const peakAt = current / slope + toPeak
  const lead = 0.3 * peakAt
  const end = peakAt + Math.max(tailLength * tailTime, 1.5 * voltageFall)
  const time: number[] = [-lead]
  for (let k = 0; k <= rampPoints; k++) time.push((peakAt * k) / rampPoints)
  const tail = Array.from({ length: tailPoints }, (_, k) => peakAt + ((end - peakAt) * (k + 1)) / tailPoints)
  // The moment the voltage stands still is a corner, which evenly spaced points would cut off.
  time.push(...[...tail, peakAt + voltageFall].toSorted((a, b) => a - b))
  const currentAt = (t: number): number => {
    if (t <= 0) return current
    return t <= peakAt ? current - slope * t : -peak * Math.exp(-(t - peakAt) / tailTime)
  }
  const voltageAt = (t: number): number => {
    if (t <= peakAt) return 0
    return blocking * (voltageFall > 0 ? Math.min((t - peakAt) / voltageFall, 1) : 1)
  }
  return { id, time_s: time, current_a: time.map(currentAt), voltage_v: time.map(voltageAt) }
}
