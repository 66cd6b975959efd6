import { celsiusZero } from '../domain/constants.ts'
import type { EventResult } from '../domain/result.ts'
import { recoveryTimeFactor } from '../models/charge-control.ts'
import { placeTemperatures } from '../stage/evaluate.ts'
import type { RecoveryEvent } from '../stage/kernel.ts'
import { type PointEvent, peakReverseVoltage, pointEvent } from '../stage/settled-point.ts'
import { settle } from '../stage/thermal-balance.ts'
import type { Candidate } from './candidate.ts'
import { atMaximumRecovery, type NominalPoint } from './nominal-point.ts'
import { atInput, inputsOf } from './stage-inputs.ts'

const lineFactor = recoveryTimeFactor({ definition: { kind: 'line-90-25' }, peakReverseCurrent: 1 })

const noEventWords: Readonly<Record<RecoveryEvent['outcome'], string | null>> = {
  hard: null,
  residual: null,
  'residual-gone': 'discontinuous conduction: the stored charge is gone before the switch turns on',
  'no-stored-charge': 'no stored charge in this class; the junction capacitance is in the capacitive row',
  'negative-valley': 'the inductor current is negative when the switch turns on, so the part does not recover hard',
}

/** The recovery of the hottest part as the document states it. */
export function eventResult(
  candidate: Candidate,
  event: PointEvent,
  hot: RecoveryEvent,
  junction: number,
  peak: number,
): EventResult {
  const { instant } = event
  const { kernel, rectifier } = candidate
  const happens = hot.outcome === 'hard' || hot.outcome === 'residual'
  const hard = hot.outcome === 'hard'
  return {
    current_a: hard ? hot.current : 0,
    slope_a_per_s: hot.slope,
    blocking_v: instant.blockingVoltage,
    junction_c: junction - celsiusZero,
    tau_s: kernel.part.storesCharge ? hot.lifetime : null,
    tau_rr_s: kernel.part.storesCharge ? hot.tailTime : null,
    stored_c: hot.storedCharge,
    peak_reverse_a: hot.peakReverseCurrent,
    ta_s: hot.timeToPeak,
    trr_s: happens ? recoveryTimeOf(hot) : 0,
    qrr_c: hot.charge,
    softness: hard && rectifier.softnessKnown ? (lineFactor * hot.tailTime) / hot.timeToPeak : null,
    rectifier_j: hot.rectifierEnergy,
    switch_added_j: hot.switchAddedEnergy,
    base_j: hard ? event.baseEnergy : 0,
    peak_reverse_v: peak,
    none: noEventWords[hot.outcome],
  }
}

/**
 * The same at the record's guaranteed maximum, at the junction temperatures of the nominal record; its peak reverse
 * voltage is the highest over the inputs, as that of the event. Null without such a row.
 */
export function maximumEvent(candidate: Candidate, point: NominalPoint, peak: number): EventResult | null {
  if (candidate.rectifier.maximumRecoveryShift === null) return null
  const peaks = inputsOf(candidate.stage).map((voltage) => atInput(candidate, voltage, maximumPeak))
  settle(candidate.kernel)
  return atMaximumRecovery(candidate, () => {
    const event = placedEvent(candidate)
    return eventResult(candidate, event, event.hot, point.junction, Math.max(peak, ...peaks))
  })
}

/** Zero where the part has no stable temperature. [V] */
function maximumPeak(candidate: Candidate): number {
  const { kernel, rectifier } = candidate
  if (!settle(kernel)) return 0
  return (
    atMaximumRecovery(candidate, () => peakReverseVoltage(kernel, placedEvent(candidate), rectifier.capacitance)) ?? 0
  )
}

function placedEvent({ kernel }: Candidate): PointEvent {
  placeTemperatures(kernel)
  return pointEvent(kernel)
}

/** By the line through 90 % and 25 %, the definition of every printed trr. [s] */
export function recoveryTimeOf(hot: RecoveryEvent): number {
  return hot.timeToPeak + lineFactor * hot.tailTime
}
