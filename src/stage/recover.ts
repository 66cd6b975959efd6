import { currentFloor, referenceSlope } from '../domain/constants.ts'
import { chargeAtTurnOff, recoveredCharge, timeToPeak } from '../models/charge-control.ts'
import { rectifierEnergy, switchAddedEnergy, tailShare } from '../models/commutation-energy.ts'
import { residualRecovery } from '../models/residual-recovery.ts'
import type { Kernel, PartState, RecoveryEvent } from './kernel.ts'

/** Bounds of u and y far outside any part: 1e-18 s to 100 s, a tail of 1e-13 lifetimes. They keep products finite. */
const shortestLog = Math.log(1e-18)
const longestLog = Math.log(100)
const steepest = 30

const turnOff = { peakCurrent: 0, current: 0, conductionTime: 0, lifetime: 0 }
const ramp = { current: 0, slope: 0, lifetime: 0, tailTime: 0, storedCharge: 0 }
const tail = { voltageFall: 0, tailTime: 0 }
const energy = { voltage: 0, current: 0, timeToPeak: 0, peakReverseCurrent: 0, tailTime: 0, tailShare: 0 }
const residual = { slopeOfDecay: 0, idleTime: 0, slope: 0, lifetime: 0, tailTime: 0, storedChargeAtZero: 0 }
const left = { peakReverseCurrent: 0, charge: 0, timeToPeak: 0 }
const recovered = { peakReverseCurrent: 0, timeToPeak: 0, tailTime: 0 }

/**
 * The recovery of one part at one turn-on, written into `event`: lumped-charge model from the charge that the real
 * conduction interval built up, soft residue in discontinuous conduction, exactly nothing without stored charge.
 */
export function recover(kernel: Kernel, state: PartState, event: RecoveryEvent): void {
  const instant = kernel.instant
  event.slope = kernel.turnOnSlope * state.share
  event.current = Math.max(instant.valley, 0) * state.share
  if (!kernel.part.storesCharge) {
    clear(event, 'no-stored-charge')
    return
  }
  placeLifetimes(kernel, state, event)
  if (instant.valley < 0) {
    clear(event, 'negative-valley')
    return
  }
  tail.voltageFall = kernel.voltageFall
  tail.tailTime = event.tailTime
  event.tailShare = tailShare(tail)
  if (instant.discontinuous) recoverResidue(kernel, state, event)
  else {
    placeStoredCharge(kernel, state, event)
    placeRamp(event)
    placeEnergies(kernel, event)
    event.outcome = 'hard'
  }
}

function placeLifetimes(kernel: Kernel, state: PartState, event: RecoveryEvent): void {
  const c = kernel.coefficients
  const logCurrent = Math.log(Math.max(event.current / kernel.part.ratedCurrent, currentFloor))
  if (state.slope !== event.slope) {
    state.slope = event.slope
    state.slopeLog = Math.log(event.slope / referenceSlope)
  }
  const logSlope = state.slopeLog
  const lifetimeLog = state.lifetimeLog + c[1]! * logCurrent + c[2]! * logSlope
  const ratioLog = state.ratioLog + c[5]! * logCurrent + c[6]! * logSlope
  event.lifetime = Math.exp(Math.min(Math.max(lifetimeLog, shortestLog), longestLog))
  event.tailTime = event.lifetime / (1 + Math.exp(Math.min(ratioLog, steepest)))
}

function placeStoredCharge(kernel: Kernel, state: PartState, event: RecoveryEvent): void {
  const instant = kernel.instant
  const synchronous = kernel.part.synchronous
  turnOff.current = event.current
  turnOff.peakCurrent = synchronous ? event.current : instant.peak * state.share
  turnOff.conductionTime = synchronous ? kernel.part.deadBefore : instant.conductionShare / kernel.frequency
  turnOff.lifetime = event.lifetime
  event.storedCharge = chargeAtTurnOff(turnOff)
}

function placeRamp(event: RecoveryEvent): void {
  ramp.current = event.current
  ramp.slope = event.slope
  ramp.lifetime = event.lifetime
  ramp.tailTime = event.tailTime
  ramp.storedCharge = event.storedCharge
  event.timeToPeak = timeToPeak(ramp)
  event.peakReverseCurrent = event.slope * event.timeToPeak
}

function placeEnergies(kernel: Kernel, event: RecoveryEvent): void {
  recovered.peakReverseCurrent = event.peakReverseCurrent
  recovered.timeToPeak = event.timeToPeak
  recovered.tailTime = event.tailTime
  event.charge = recoveredCharge(recovered)
  energy.voltage = kernel.instant.blockingVoltage
  energy.current = event.current
  energy.timeToPeak = event.timeToPeak
  energy.peakReverseCurrent = event.peakReverseCurrent
  energy.tailTime = event.tailTime
  energy.tailShare = event.tailShare
  event.rectifierEnergy = rectifierEnergy(energy)
  event.switchAddedEnergy = switchAddedEnergy(energy)
}

function recoverResidue(kernel: Kernel, state: PartState, event: RecoveryEvent): void {
  const instant = kernel.instant
  const conductionTime = instant.conductionShare / kernel.frequency
  const peak = instant.peak * state.share
  turnOff.current = 0
  turnOff.peakCurrent = peak
  turnOff.conductionTime = conductionTime
  turnOff.lifetime = event.lifetime
  event.storedCharge = chargeAtTurnOff(turnOff)
  residual.slopeOfDecay = peak / conductionTime
  residual.idleTime = Math.max(1 - instant.duty - instant.conductionShare, 0) / kernel.frequency
  residual.slope = event.slope
  residual.lifetime = event.lifetime
  residual.tailTime = event.tailTime
  residual.storedChargeAtZero = event.storedCharge
  residualRecovery(residual, left)
  if (!(left.charge > 0)) {
    clear(event, 'residual-gone')
    return
  }
  event.peakReverseCurrent = left.peakReverseCurrent
  event.timeToPeak = left.timeToPeak
  event.charge = left.charge
  energy.voltage = instant.blockingVoltage
  energy.peakReverseCurrent = left.peakReverseCurrent
  energy.tailTime = event.tailTime
  energy.tailShare = event.tailShare
  event.rectifierEnergy = rectifierEnergy(energy)
  event.switchAddedEnergy = Math.max(instant.blockingVoltage * left.charge - event.rectifierEnergy, 0)
  event.outcome = 'residual'
}

function clear(event: RecoveryEvent, outcome: RecoveryEvent['outcome']): void {
  event.storedCharge = 0
  event.timeToPeak = 0
  event.peakReverseCurrent = 0
  event.charge = 0
  event.tailShare = 0
  event.rectifierEnergy = 0
  event.switchAddedEnergy = 0
  event.outcome = outcome
}
