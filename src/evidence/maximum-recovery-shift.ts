import type { Gaussian } from '../domain/calibrated-rectifier.ts'
import { referenceSlope } from '../domain/constants.ts'
import { predictedMean } from './bayesian-update.ts'
import { recoveryDesigns } from './design-rows.ts'
import type { RecoveryPoint } from './invert-pair.ts'
import { stepLifetimeAt } from './invert-step-row.ts'
import { logFigure, steadyEvent } from './recovery-figures.ts'
import type { RowReading } from './row-reading.ts'
import { lifetimeGiving } from './single-figure.ts'

/**
 * What is added to (u, y) so that the posterior-mean curve passes through the guaranteed maximum at that row's own
 * condition. Of several maximum rows the one that asks for the largest charge at I0, a0, 25 °C counts. Null without one.
 */
export function maximumRecoveryShift(
  readings: readonly RowReading[],
  posterior: Gaussian,
  ratedCurrent: number,
): RecoveryPoint | null {
  let shift: RecoveryPoint | null = null
  let largest = Number.NEGATIVE_INFINITY
  for (const reading of readings) {
    if (reading.row.grade !== 'maximum') continue
    const candidate = shiftTo(reading, posterior)
    const charge = referenceCharge(posterior, candidate, ratedCurrent)
    if (charge > largest) {
      largest = charge
      shift = candidate
    }
  }
  return shift
}

/** From the posterior mean at the row's condition to the row; where it tells one figure only, along the lifetime. */
function shiftTo(reading: RowReading, posterior: Gaussian): RecoveryPoint {
  const [lifetimeDesign, ratioDesign] = recoveryDesigns(reading.condition)
  const lifetime = predictedMean(posterior, lifetimeDesign)
  const ratio = predictedMean(posterior, ratioDesign)
  const reached = lifetimeReaching(reading, { lifetime, ratio })
  if (reached !== null) return { lifetime: reached - lifetime, ratio: 0 }
  return { lifetime: reading.point.lifetime - lifetime, ratio: reading.point.ratio - ratio }
}

function lifetimeReaching({ row, single, tellsRatio }: RowReading, mean: RecoveryPoint): number | null {
  if (row.fixture === 'step') return tellsRatio ? null : stepLifetimeAt(row, mean.ratio)
  if (single === null) return null
  return lifetimeGiving(single.reading, single.name, Math.log(single.value), mean)?.point.lifetime ?? null
}

function referenceCharge(posterior: Gaussian, shift: RecoveryPoint, ratedCurrent: number): number {
  const reading = {
    current: ratedCurrent,
    slope: referenceSlope,
    recoveryTimeBy: { kind: 'line-90-25' },
    softnessBy: 'times',
  } as const
  const event = steadyEvent(reading, posterior.mean[0]! + shift.lifetime, posterior.mean[4]! + shift.ratio)
  return logFigure(event, reading, 'charge').value
}
