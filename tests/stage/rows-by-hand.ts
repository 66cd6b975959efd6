import type { Kernel, PartState } from '../../src/stage/kernel.ts'
import { drop, type Event, hardEvent, leakage, lifetimes, partOf, residualEvent, storedCharge } from './by-hand.ts'
import { sampledMean } from './sampled-period.ts'

/** What one of the parts loses and adds to the switch in the kernel's period. */
export interface PartRows {
  readonly event: Event
  readonly conduction: number
  readonly leakage: number
  readonly capacitive: number
  readonly recoveryRectifier: number
  readonly recoverySwitch: number
  readonly meanRectifierCurrent: number
}

const nothing: Event = { peak: 0, charge: 0, toPeak: 0, rectifier: 0, switchAdded: 0 }

/** Recovery of a part that carries a share of current and slope, at its junction (PHYSICS 1 and 2). */
export function eventOf(kernel: Kernel, share: number, junction: number, slope: number): Event {
  const part = partOf(kernel)
  const { valley, peak, duty, conductionShare, blockingVoltage: voltage, discontinuous } = kernel.instant
  if (!part.stores || valley < 0) return nothing
  const { frequency, voltageFall } = kernel
  const { synchronous, deadBefore } = kernel.part
  const current = valley * share
  const { tau, tail } = lifetimes(part, current, slope * share, junction)
  const time = conductionShare / frequency
  if (discontinuous) {
    const charge = storedCharge(peak * share, 0, time, tau)
    const idle = (1 - duty - conductionShare) / frequency
    const decay = (peak * share) / time
    return residualEvent({ decay, idle, slope: slope * share, tau, tail, charge, voltage, voltageFall })
  }
  const charge = synchronous
    ? storedCharge(current, current, deadBefore, tau)
    : storedCharge(peak * share, current, time, tau)
  return hardEvent({ current, slope: slope * share, tau, tail, charge }, voltage, voltageFall)
}

/** Rows of one part of a share; by sums over the period. [W] */
export function partRows(kernel: Kernel, { share }: PartState, junction: number, slope: number): PartRows {
  const { instant, frequency: f } = kernel
  const { valley, peak, duty, conductionShare, blockingVoltage: voltage, idleVoltage, discontinuous } = instant
  const part = partOf(kernel)
  const event = eventOf(kernel, share, junction, slope)
  const { capacitiveCharge: charge, chargingCost } = kernel.part
  const loss = (i: number): number => drop(part, i, junction) * i
  const idle = discontinuous ? idleVoltage * leakage(part, idleVoltage, junction) * (1 - duty - conductionShare) : 0
  return {
    event,
    conduction: sampledMean(peak * share, valley * share, loss) * conductionShare,
    leakage: voltage * leakage(part, voltage, junction) * duty + idle,
    capacitive: charge > 0 ? chargingCost * Math.max(0, 1 - event.charge / charge) * f : 0,
    recoveryRectifier: event.rectifier * f,
    recoverySwitch: event.switchAdded * f,
    meanRectifierCurrent: sampledMean(peak, valley, (i) => i) * conductionShare * share,
  }
}
