import type { CaptureContext } from './capture-context.ts'

/** A reverse voltage is higher after the event than before it; the other way round the channel is turned. */
export function signOfVoltage({ waveform, event }: CaptureContext): 1 | -1 {
  const { voltage } = waveform
  if (voltage === null) return 1
  const mean = (from: number, to: number) => {
    let sum = 0
    for (let k = from; k < to; k++) sum += voltage[k]!
    return sum / Math.max(1, to - from)
  }
  return mean(event.quarter, event.last) < mean(event.first, event.edge) ? -1 : 1
}
