import { baseEnergy } from '../models/commutation-energy.ts'
import {
  chordConductionPower,
  forwardDrop,
  forwardDropUsable,
  trapezoidConductionPower,
} from '../models/forward-drop.ts'
import { gateDrivenSlope } from '../models/gate-slope.ts'
import { type Kernel, type PartState, type RecoveryEvent, row } from './kernel.ts'
import { leakageAt } from './part-at-temperature.ts'
import { recover } from './recover.ts'

const conduction = { constant: 0, logarithmic: 0, linear: 0, ratedCurrent: 1, valley: 0, peak: 0, line: false }
const drop = { constant: 0, logarithmic: 0, linear: 0, ratedCurrent: 1, current: 0, line: false }
const base = { voltage: 0, current: 0, slope: 0, voltageFall: 0 }
const gate = {
  drive: 0,
  resistance: 0,
  inputCapacitance: 0,
  transconductance: 0,
  threshold: 0,
  plateau: null as number | null,
  sourceInductance: 0,
  current: 0,
}

/** Turn-on di/dt at a current: given or from the gate drive, times the draw's factor, at most V/L_loop. [A/s] */
export function slopeAt(kernel: Kernel, current: number): number {
  const slope = statedSlopeAt(kernel, current) * kernel.slopeFactor
  return kernel.loopInductance > 0 ? Math.min(slope, kernel.instant.blockingVoltage / kernel.loopInductance) : slope
}

/** Turn-on di/dt as stated or as the gate drive sets it, before draw and loop. [A/s] */
export function statedSlopeAt(kernel: Kernel, current: number): number {
  let slope = kernel.slope
  if (kernel.gate !== null) {
    gate.drive = kernel.gate.drive
    gate.resistance = kernel.gate.resistance
    gate.inputCapacitance = kernel.gate.inputCapacitance
    gate.transconductance = kernel.gate.transconductance
    gate.threshold = kernel.gate.threshold
    gate.plateau = kernel.gate.plateau
    gate.sourceInductance = kernel.gate.sourceInductance
    gate.current = current
    slope = gateDrivenSlope(gate)
  }
  return slope
}

/**
 * Adds the losses of one switching period, weighted, to the kernel's rows: each watt enters exactly one row.
 *
 * Here and in recover.ts functions hand numbers on in fields of the kernel: a double that is passed to or returned from
 * a function which the compiler does not inline is allocated, some twenty times a period (tests/bench/points.ts).
 */
export function bookInstant(kernel: Kernel, weight: number): void {
  kernel.weight = weight
  kernel.turnOnSlope = slopeAt(kernel, Math.max(kernel.instant.valley, 0))
  // The gate drive cannot bring the switch to this current: it stays out of its ohmic region.
  if (!(kernel.turnOnSlope > 0)) {
    kernel.delivers = false
    return
  }
  bookPart(kernel, kernel.hot, kernel.hotEvent, row.hotPart)
  if (kernel.parts > 1) bookPart(kernel, kernel.other, kernel.otherEvent, row.otherPart)
  bookSwitch(kernel)
}

/** Books equal parts, and the heat in one of them in its own row. */
function bookPart(kernel: Kernel, state: PartState, event: RecoveryEvent, heatRow: number): void {
  const { rows, frequency, part, instant, turnOn, weight } = kernel
  recover(kernel, state, event)
  placeConduction(kernel, state)
  const conducted = state.conducted
  const leaked = part.leaks ? leakagePower(kernel, state) : 0
  const forward = part.forwardRecoveryTime > 0 ? forwardRecoveryPower(kernel, state) : 0
  const inRectifier = event.rectifierEnergy * frequency
  const cost =
    part.capacitiveCharge > 0
      ? part.chargingCost * Math.max(0, 1 - event.charge / part.capacitiveCharge) * frequency
      : 0
  const scale = weight * state.count
  rows[row.conduction]! += conducted * scale
  rows[row.leakage]! += leaked * scale
  rows[row.forwardRecovery]! += forward * scale
  rows[row.recoveryRectifier]! += inRectifier * scale
  rows[row.recoverySwitch]! += event.switchAddedEnergy * turnOn.addedShare * frequency * scale
  rows[row.capacitive]! += cost * turnOn.addedShare * scale
  rows[row.meanRectifierCurrent]! +=
    0.5 * (instant.valley + instant.peak) * instant.conductionShare * state.share * scale
  rows[heatRow]! += (conducted + leaked + forward + inRectifier) * weight
}

function placeConduction(kernel: Kernel, state: PartState): void {
  const { instant, part } = kernel
  if (part.synchronous) {
    state.conducted = synchronousConduction(kernel, state)
    return
  }
  conduction.constant = state.constant
  conduction.logarithmic = state.logarithmic
  conduction.linear = state.linear
  conduction.ratedCurrent = part.ratedCurrent
  conduction.line = part.line
  conduction.valley = instant.valley * state.share
  conduction.peak = instant.peak * state.share
  state.chord = !forwardDropUsable(conduction)
  const power = state.chord ? chordConductionPower(conduction) : trapezoidConductionPower(conduction)
  state.conducted = power * instant.conductionShare
}

/** Body diode in the two dead times, channel in between. */
function synchronousConduction(kernel: Kernel, state: PartState): number {
  const { instant, part, frequency } = kernel
  const { share } = state
  const valley = instant.valley * share
  const peak = instant.peak * share
  const before = valley > 0 ? dropAt(kernel, state, valley) * valley * frequency * part.deadBefore : 0
  const after = dropAt(kernel, state, peak) * peak * frequency * part.deadAfter
  const channelShare = Math.max(instant.conductionShare - (part.deadBefore + part.deadAfter) * frequency, 0)
  const meanSquare = (valley * valley + valley * peak + peak * peak) / 3
  return before + after + meanSquare * state.channelResistance * channelShare
}

function dropAt(kernel: Kernel, state: PartState, current: number): number {
  drop.constant = state.constant
  drop.logarithmic = state.logarithmic
  drop.linear = state.linear
  drop.ratedCurrent = kernel.part.ratedCurrent
  drop.line = kernel.part.line
  drop.current = current
  return Math.max(forwardDrop(drop), 0)
}

function leakagePower(kernel: Kernel, state: PartState): number {
  const instant = kernel.instant
  const blocking = instant.blockingVoltage * state.leakage * instant.duty
  if (!instant.discontinuous) return blocking
  const idleShare = Math.max(1 - instant.duty - instant.conductionShare, 0)
  return blocking + instant.idleVoltage * leakageAt(kernel, state, instant.idleVoltage) * idleShare
}

/** (V_FP − V_F) I_peak t_fr/2 per period; V_FP scales with the square root of the slope. */
function forwardRecoveryPower(kernel: Kernel, state: PartState): number {
  const part = kernel.part
  const peak = kernel.instant.peak * state.share
  const fall = kernel.turnOff.currentFall
  const turnOffSlope = fall > 0 ? peak / fall : kernel.turnOnSlope * state.share
  const overshoot =
    part.forwardRecoveryPeak * Math.sqrt(turnOffSlope / part.forwardRecoverySlope) - dropAt(kernel, state, peak)
  return (Math.max(overshoot, 0) * peak * part.forwardRecoveryTime * kernel.frequency) / 2
}

function bookSwitch(kernel: Kernel): void {
  const { rows, instant, frequency, weight } = kernel
  const { valley, peak, duty, conductionShare } = instant
  const meanSquare = (valley * valley + valley * peak + peak * peak) / 3
  rows[row.switchConduction]! += meanSquare * duty * kernel.onResistance * weight
  rows[row.inductor]! += meanSquare * (duty + conductionShare) * kernel.inductorResistance * weight
  rows[row.turnOnBase]! += turnOnBase(kernel, kernel.turnOnSlope) * frequency * weight
  rows[row.turnOff]! += turnOffEnergy(kernel) * frequency * weight
}

function turnOffEnergy(kernel: Kernel): number {
  const { turnOff, instant } = kernel
  if (turnOff.kind === 'energy') return turnOff.energy
  return (instant.blockingVoltage * Math.max(instant.peak, 0) * (turnOff.voltageRise + turnOff.currentFall)) / 2
}

/** Turn-on energy with an ideal rectifier; a measured one is carried over by the ratio of the overlap energies. */
export function turnOnBase(kernel: Kernel, slope: number): number {
  const { instant, turnOn } = kernel
  const current = Math.max(instant.valley, 0)
  if (current === 0) return 0
  base.voltage = instant.blockingVoltage
  base.current = current
  base.slope = slope
  base.voltageFall = kernel.voltageFall
  const here = baseEnergy(base)
  if (turnOn.current === 0) return here
  base.voltage = turnOn.voltage
  base.current = turnOn.current
  return (turnOn.energy * here) / baseEnergy(base)
}
