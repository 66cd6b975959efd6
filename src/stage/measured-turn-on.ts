import type { CalibratedRectifier } from '../domain/calibrated-rectifier.ts'
import type { Caveat } from '../domain/caveat.ts'
import { currentFloor, referenceSlope } from '../domain/constants.ts'
import type { MeasuredTurnOn } from '../domain/stage.ts'
import { recoveredCharge, timeToPeak } from '../models/charge-control.ts'
import { switchAddedEnergy, tailShare } from '../models/commutation-energy.ts'
import { capacitiveCharge, chargingCost } from '../models/junction-capacitance.ts'

/** One reading of a measured turn-on: base energy at the test condition, and whether the rectifier's cost is added. */
export interface TurnOnReading {
  readonly energy: number
  readonly addedShare: number
}

/** What the measured turn-on may mean: nominal, and the two ends between which draws lie. */
export interface TurnOnMeaning {
  readonly nominal: TurnOnReading
  readonly low: TurnOnReading
  readonly high: TurnOnReading
  readonly caveats: readonly Caveat[]
}

export interface TurnOnMeaningInput {
  readonly given: MeasuredTurnOn
  /** The rectifier of that measurement, calibrated at the test voltage; null when the stage names none. */
  readonly testRectifier: CalibratedRectifier | null
  /** Nominal turn-on di/dt and voltage fall of the stage. [A/s], [s] */
  readonly slope: number
  readonly voltageFall: number
}

/**
 * Splits a measured turn-on energy from the rectifier recovery that it may already contain (PHYSICS 2).
 *
 * - `no`: the energy is the base; the candidates' cost is added.
 * - `yes` with the test rectifier: its predicted share is taken off first, floor 0.
 * - `yes` without: nothing is added, so all candidates look alike in the switch.
 * - `unknown`: nominal the reading with the higher loss, draws uniform between both.
 */
export function turnOnMeaning({ given, testRectifier, slope, voltageFall }: TurnOnMeaningInput): TurnOnMeaning {
  const whole: TurnOnReading = { energy: given.energy, addedShare: 1 }
  const same = (reading: TurnOnReading, caveats: readonly Caveat[]): TurnOnMeaning => ({
    nominal: reading,
    low: reading,
    high: reading,
    caveats,
  })
  if (given.includesRectifier === 'no') return same(whole, [])
  const contained = testRectifier === null ? null : addedAtTest(given, testRectifier, slope, voltageFall)
  const reduced: TurnOnReading =
    contained === null
      ? { energy: given.energy, addedShare: 0 }
      : { energy: Math.max(given.energy - contained, 0), addedShare: 1 }
  const floored = contained !== null && contained > given.energy
  const caveats: Caveat[] = []
  if (floored) caveats.push({ code: 'turn-on-floor', candidate: '', data: { given: given.energy, contained } })
  if (given.includesRectifier === 'yes') {
    if (contained === null)
      caveats.push({ code: 'turn-on-contains-recovery', candidate: '', data: { given: given.energy } })
    return same(reduced, caveats)
  }
  caveats.push({ code: 'turn-on-unknown', candidate: '', data: { given: given.energy, contained: contained ?? 0 } })
  return { nominal: whole, low: reduced, high: whole, caveats }
}

/** What the test rectifier added to the switch at the test condition: recovery from a steady current, and charging. [J] */
function addedAtTest(
  given: MeasuredTurnOn,
  rectifier: CalibratedRectifier,
  slope: number,
  voltageFall: number,
): number {
  const { voltage, current } = given
  const capacitance = rectifier.capacitance
  const charge = capacitance === null ? 0 : capacitiveCharge({ capacitance, voltage })
  const cost = capacitance === null ? 0 : chargingCost({ capacitance, voltage })
  // without a slope the drive cannot turn the switch on, and nothing recovers
  if (rectifier.recovery === null || !(slope > 0)) return cost
  const mean = rectifier.recovery.posterior.mean
  const logCurrent = Math.log(Math.max(current / rectifier.ratedCurrent, currentFloor))
  const logSlope = Math.log(slope / referenceSlope)
  const lifetime = Math.exp(mean[0]! + mean[1]! * logCurrent + mean[2]! * logSlope)
  const tailTime = lifetime / (1 + Math.exp(mean[4]! + mean[5]! * logCurrent + mean[6]! * logSlope))
  const toPeak = timeToPeak({ current, slope, lifetime, tailTime, storedCharge: lifetime * current })
  const peakReverseCurrent = slope * toPeak
  const recovered = recoveredCharge({ peakReverseCurrent, timeToPeak: toPeak, tailTime })
  const share = tailShare({ voltageFall, tailTime })
  const added = switchAddedEnergy({
    voltage,
    current,
    timeToPeak: toPeak,
    peakReverseCurrent,
    tailTime,
    tailShare: share,
  })
  return added + (charge > 0 ? cost * Math.max(0, 1 - recovered / charge) : 0)
}
