import type { CaptureCaveat } from '../domain/capture.ts'
import type { CaptureContext } from './capture-context.ts'

/** Caveats that need no fit. */
export function generalCaveats(context: CaptureContext, voltageSign: 1 | -1): readonly CaptureCaveat[] {
  const { event, settings, fixture } = context
  const found: CaptureCaveat[] = []
  if (event.inverted) found.push({ code: 'wrong-sign', data: { channel: 'current' } })
  if (voltageSign < 0) found.push({ code: 'wrong-sign', data: { channel: 'voltage' } })
  if (event.events > 1) found.push({ code: 'several-events', data: { events: event.events } })
  if (fixture !== null && !fixture.subtracted && settings.fixture === 'ramp')
    found.push({ code: 'reference-not-subtracted', data: {} })
  if (settings.device.junction === null) found.push({ code: 'junction-assumed', data: {} })
  return found
}
