import { celsiusZero } from '../domain/constants.ts'
import type { EventResult } from '../domain/result.ts'
import { recoveryTimeFactor } from '../models/charge-control.ts'
import { placeTemperatures } from '../stage/evaluate.ts'
import type { RecoveryEvent } from '../stage/kernel.ts'
import { type PointEvent, peakReverseVoltage, pointEvent } from '../stage/settled-point.ts'
import type { Candidate } from './candidate.ts'
import { atMaximumRecovery, type NominalPoint } from './nominal-point.ts'

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

/** The same at the record's guaranteed maximum, at the nominal junction temperature; null without such a row. */
export function maximumEvent(candidate: Candidate, point: NominalPoint): EventResult | null {
  const { kernel, rectifier } = candidate
  return atMaximumRecovery(candidate, () => {
    placeTemperatures(kernel)
    const event = pointEvent(kernel)
    const peak = peakReverseVoltage(kernel, event, rectifier.capacitance)
    return eventResult(candidate, event, event.hot, point.junction, peak)
  })
}

/** By the line through 90 % and 25 %, the definition of every printed trr. [s] */
export function recoveryTimeOf(hot: RecoveryEvent): number {
  return hot.timeToPeak + lineFactor * hot.tailTime
}
