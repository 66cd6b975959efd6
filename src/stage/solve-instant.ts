import { forwardDrop } from '../models/forward-drop.ts'
import type { Kernel } from './kernel.ts'

const curve = { constant: 0, logarithmic: 0, linear: 0, ratedCurrent: 1, current: 0, line: false }

/** Drop of the conducting rectifier in the volt-second balance, where {@link placeDrop} last took it. [V] */
const balance = { drop: 0 }

/** Takes the rectifier's drop at a total current. */
function placeDrop(kernel: Kernel, totalCurrent: number): void {
  const { part, hot: state, hotShare } = kernel
  const current = Math.abs(totalCurrent) * hotShare
  curve.constant = state.constant
  curve.logarithmic = state.logarithmic
  curve.linear = state.linear
  curve.ratedCurrent = part.ratedCurrent
  curve.line = part.line
  curve.current = current
  const diode = Math.max(forwardDrop(curve), 0)
  if (part.synchronous) {
    const share = diodeShare(kernel)
    balance.drop = share * diode + (1 - share) * totalCurrent * hotShare * state.channelResistance
  } else balance.drop = diode
}

/** Steepness of the drop, for the next step of an iteration only: roots do not depend on it. [Ω] */
function dropSlope(kernel: Kernel, totalCurrent: number): number {
  const { part, hot: state, hotShare } = kernel
  const logarithmic = part.line ? 0 : state.logarithmic / totalCurrent
  const diode = Math.max(logarithmic + (state.linear / part.ratedCurrent) * hotShare, 0)
  if (!part.synchronous) return diode
  const share = diodeShare(kernel)
  return share * diode + (1 - share) * hotShare * state.channelResistance
}

/** Share of the conduction interval that the dead times leave to a synchronous part's diode. */
function diodeShare({ kind, part, frequency, instant, outputVoltage: vo }: Kernel): number {
  const vin = instant.inputVoltage
  const lossFreeShare = kind === 'buck' ? 1 - vo / vin : kind === 'inverting' ? vin / (vin + vo) : vin / vo
  return Math.min(1, ((part.deadBefore + part.deadAfter) * frequency) / Math.max(lossFreeShare, 1e-6))
}

/**
 * Currents of one period of a dc stage (volt-second and charge balance, with drops; PHYSICS 4).
 * Continuous first; where its valley is negative, discontinuous with the same drops at half the peak.
 * A synchronous part lets the valley go negative and stays continuous.
 */
export function solveDcInstant(kernel: Kernel): void {
  const instant = kernel.instant
  instant.inputVoltage = kernel.inputVoltage
  kernel.delivers = solveContinuous(kernel)
  if (!kernel.delivers) return
  if (instant.continuousValley >= 0 || kernel.part.synchronous) return
  solveDiscontinuous(kernel)
}

function solveContinuous(kernel: Kernel): boolean {
  if (kernel.kind === 'buck') return placeContinuous(kernel, kernel.outputCurrent)
  const current = solveContinuousCurrent(kernel)
  if (!(current > 0)) return false
  return placePeriod(kernel, current)
}

/**
 * Mean inductor current of boost and inverting stages: the lower root of
 * I² (Ron + RL) − I (Vin + Io Ron) + Io (Vo + VF(I) [+ Vin]) = 0, which is the balance with D = 1 − Io/I put in.
 * Each round solves the quadratic exactly with V_F's tangent, so that two or three rounds give all digits (holding
 * V_F instead takes eight; tests/bench/points.ts). Leaves the drop at the root in `balance`.
 */
function solveContinuousCurrent(kernel: Kernel): number {
  const { inputVoltage: vin, outputVoltage: vo, outputCurrent: io } = kernel
  const quadratic = kernel.onResistance + kernel.inductorResistance
  const held = vin + io * kernel.onResistance
  const base = kernel.kind === 'boost' ? vo : vo + vin
  let current = kernel.startCurrent > 0 ? kernel.startCurrent : (io * base) / vin
  let tangent = true
  for (let round = 0; round < 60; round++) {
    placeDrop(kernel, current)
    const slope = tangent ? dropSlope(kernel, current) : 0
    const linear = held - io * slope
    const constant = io * (base + balance.drop - slope * current)
    const discriminant = linear * linear - 4 * quadratic * constant
    if (!(discriminant >= 0 && linear > 0)) {
      // A tangent far from the root lies above the curve and may have none: hold V_F from here on.
      if (!tangent) return Number.NaN
      tangent = false
      continue
    }
    const next = (2 * constant) / (linear + Math.sqrt(discriminant))
    const moved = next - current
    current = next
    if (Math.abs(moved) <= (tangent ? 1e-7 : 1e-14) * next) {
      // Within this step curve and tangent differ by less than rounding.
      balance.drop += slope * moved
      break
    }
  }
  kernel.startCurrent = current
  return current
}

/** Places duty, ripple and valley for a mean inductor current; also used at each angle of the line. */
export function placeContinuous(kernel: Kernel, current: number): boolean {
  placeDrop(kernel, current)
  return placePeriod(kernel, current)
}

/** The period of the continuous balance with the drop in `balance`. */
function placePeriod(kernel: Kernel, current: number): boolean {
  const instant = kernel.instant
  const vin = instant.inputVoltage
  const vo = kernel.outputVoltage
  const forward = balance.drop
  const inductorDrop = current * kernel.inductorResistance
  const switchDrop = current * kernel.onResistance
  let duty: number
  let onVoltage: number
  if (kernel.kind === 'buck') {
    duty = (vo + forward + inductorDrop) / (vin + forward - switchDrop)
    onVoltage = vin - vo - switchDrop - inductorDrop
  } else if (kernel.kind === 'inverting') {
    duty = (vo + forward + inductorDrop) / (vin + vo + forward - switchDrop)
    onVoltage = vin - switchDrop - inductorDrop
  } else {
    duty = (vo + forward + inductorDrop - vin) / (vo + forward - switchDrop)
    onVoltage = vin - switchDrop - inductorDrop
  }
  if (!(duty < 1) || !(onVoltage > 0)) return false
  duty = Math.max(duty, 0)
  const ripple = (onVoltage * duty) / (kernel.inductance * kernel.frequency)
  instant.duty = duty
  instant.conductionShare = 1 - duty
  instant.meanCurrent = current
  instant.ripple = ripple
  instant.continuousValley = current - ripple / 2
  instant.valley = instant.continuousValley
  instant.peak = current + ripple / 2
  instant.discontinuous = false
  return true
}

function solveDiscontinuous(kernel: Kernel): void {
  const instant = kernel.instant
  const { outputCurrent: io, inductance, frequency, outputVoltage: vo, inputVoltage: vin } = kernel
  const buck = kernel.kind === 'buck'
  let peak = instant.peak
  let onVoltage = 1
  let offVoltage = 1
  for (let round = 0; round < 80; round++) {
    const mean = peak / 2
    onVoltage = onVoltageAt(kernel, mean)
    offVoltage = offVoltageAt(kernel, mean)
    const inverse = buck ? 1 / onVoltage + 1 / offVoltage : 1 / offVoltage
    const next = Math.sqrt((2 * io) / (inductance * frequency * inverse))
    const moved = Math.abs(next - peak)
    peak = next
    if (moved <= 1e-14 * next) break
  }
  if (!(peak > 0) || !(onVoltage > 0) || !(offVoltage > 0)) {
    kernel.delivers = false
    return
  }
  placeDiscontinuous(kernel, peak, onVoltage, offVoltage)
  instant.idleVoltage = kernel.kind === 'boost' ? Math.max(vo - vin, 0) : vo
}

/** Voltage across the inductor while the switch is on, drops at a mean current. [V] */
export function onVoltageAt(kernel: Kernel, mean: number): number {
  const drops = mean * (kernel.onResistance + kernel.inductorResistance)
  const vin = kernel.instant.inputVoltage
  return kernel.kind === 'buck' ? vin - kernel.outputVoltage - drops : vin - drops
}

/** Magnitude of the voltage across the inductor while the rectifier conducts, drops at a mean current. [V] */
function offVoltageAt(kernel: Kernel, mean: number): number {
  placeDrop(kernel, mean)
  return offVoltageHere(kernel, mean)
}

/** The same where {@link placeContinuous} has just taken the drop at this mean current. [V] */
export function offVoltageHere(kernel: Kernel, mean: number): number {
  const total = kernel.outputVoltage + balance.drop + mean * kernel.inductorResistance
  return kernel.kind === 'buck' || kernel.kind === 'inverting' ? total : total - kernel.instant.inputVoltage
}

/** Writes a discontinuous period from its peak current. */
export function placeDiscontinuous(kernel: Kernel, peak: number, onVoltage: number, offVoltage: number): void {
  const instant = kernel.instant
  const reactance = kernel.inductance * kernel.frequency
  const duty = (peak * reactance) / onVoltage
  const decay = (peak * reactance) / offVoltage
  // Rounding at the mode border may put the sum an ulp above 1: there is no idle time then.
  const excess = Math.max(duty + decay, 1)
  instant.duty = duty / excess
  instant.conductionShare = decay / excess
  instant.meanCurrent = (peak * (instant.duty + instant.conductionShare)) / 2
  instant.ripple = peak
  instant.valley = 0
  instant.peak = peak
  instant.discontinuous = true
}
