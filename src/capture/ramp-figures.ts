import type { RecoveryTimeDefinition } from '../domain/rectifier.ts'
import type { EventWindow } from './event-window.ts'
import type { FittedRamp } from './fit-ramp.ts'
import { chargeUnder, fallsTo, peakTime, type RecoveryCurve, reverseCurrentAt } from './recovery-curve.ts'
import { recoveryEnd } from './recovery-end.ts'
import { correctionAt, tailCorrection } from './tail-correction.ts'

/** Currents, times, charges and softness of one commutation. */
export interface RampFigures {
  readonly current: number
  readonly slope: number
  readonly peakReverseCurrent: number
  readonly timeToPeak: number
  readonly recoveryTime: number
  readonly fallTime: number
  readonly charge: number
  readonly chargeByEnd: readonly { readonly end: number; readonly charge: number }[]
  readonly softness: number
  readonly softnessBySlopes: number
  /** Recovery time on the samples' own tail against that on the fitted exponential; relative. */
  readonly endDoubt: number
}

/** Other ends at which the charge is given beside the stated one, as share of the peak; 0 is the whole tail. */
const otherEnds = [0.1, 0, 0.25]

/** Reads the figures off a fitted commutation. */
export function rampFigures(
  window: EventWindow,
  ramp: FittedRamp,
  definition: RecoveryTimeDefinition,
  chargeUntil: number,
): RampFigures {
  const { curve, fitted, crossing } = ramp
  const correction = tailCorrection(window, fitted)
  const top = peakTime(curve)
  const peak = reverseCurrentAt(curve, top)
  const plain = { reverse: (t: number) => reverseCurrentAt(curve, t), peakTime: top, peak, tailTime: curve.tailTime }
  const corrected = { ...plain, reverse: (t: number) => reverseCurrentAt(curve, t) + correctionAt(correction, t) }
  const tail = correction.significant ? corrected : plain
  const end = recoveryEnd(tail, definition)
  const otherEnd = recoveryEnd(correction.significant ? plain : corrected, definition)
  const recoveryTime = end - crossing
  const timeToPeak = top - crossing
  const left = leftOverCharge(window, ramp)
  const chargeTo = (share: number) =>
    left +
    chargeUnder(
      curve,
      crossing,
      share > 0 ? fallsTo(plain.reverse, top, curve.tailTime, share * peak) : top + 60 * curve.tailTime,
    )
  return {
    current: ramp.current,
    slope: curve.slope,
    peakReverseCurrent: peak,
    timeToPeak,
    recoveryTime,
    fallTime: recoveryTime - timeToPeak,
    charge: chargeTo(chargeUntil),
    chargeByEnd: [chargeUntil, ...otherEnds.filter((share) => share !== chargeUntil).slice(0, 2)].map((share) => ({
      end: share,
      charge: chargeTo(share),
    })),
    softness: (recoveryTime - timeToPeak) / timeToPeak,
    softnessBySlopes: curve.slope / steepestFall(curve, top),
    endDoubt: Math.abs(otherEnd - end) / recoveryTime,
  }
}

/** Charge between the samples and the fitted curve: what a tail that is no exponential adds or lacks. [C] */
function leftOverCharge(window: EventWindow, { fitted }: FittedRamp): number {
  const { curve, base } = fitted
  const end = curve.corner + 4 * curve.tailTime
  let sum = 0
  for (let k = fitted.from; k < fitted.to && window.time[k]! < end; k++) {
    sum += base - window.current[k]! - reverseCurrentAt(curve, window.time[k]!)
  }
  return sum * window.interval
}

function steepestFall(curve: RecoveryCurve, top: number): number {
  let steepest = 0
  const step = 0.01 * curve.tailTime
  for (let k = 0; k < 300; k++) {
    const t = top + k * step
    steepest = Math.max(steepest, (reverseCurrentAt(curve, t) - reverseCurrentAt(curve, t + step)) / step)
  }
  return steepest
}
