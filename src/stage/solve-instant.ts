import { forwardDrop } from '../models/forward-drop.ts'
import type { Kernel } from './kernel.ts'

const drop = { constant: 0, logarithmic: 0, linear: 0, ratedCurrent: 1, current: 0, line: false }

/** Drop across the conducting rectifier at a total current, for the volt-second balance. [V] */
function rectifierDrop(kernel: Kernel, totalCurrent: number): number {
  const state = kernel.hot
  drop.constant = state.constant
  drop.logarithmic = state.logarithmic
  drop.linear = state.linear
  drop.ratedCurrent = kernel.part.ratedCurrent
  drop.line = kernel.part.line
  drop.current = Math.abs(totalCurrent) * kernel.hotShare
  const diode = Math.max(forwardDrop(drop), 0)
  if (!kernel.part.synchronous) return diode
  const diodeShare = Math.min(
    1,
    ((kernel.part.deadBefore + kernel.part.deadAfter) * kernel.frequency) / lossFreeConductionShare(kernel),
  )
  return diodeShare * diode + (1 - diodeShare) * totalCurrent * kernel.hotShare * state.channelResistance
}

function lossFreeConductionShare(kernel: Kernel): number {
  const { inputVoltage: vin, outputVoltage: vo } = kernel
  if (kernel.kind === 'buck') return Math.max(1 - vo / vin, 1e-6)
  if (kernel.kind === 'boost') return vin / vo
  return vin / (vin + vo)
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
  const current = kernel.kind === 'buck' ? kernel.outputCurrent : solveContinuousCurrent(kernel)
  if (!(current > 0)) return false
  return placeContinuous(kernel, current)
}

/**
 * Mean inductor current of boost and inverting stages: the lower root of
 * I² (Ron + RL) − I (Vin + Io Ron) + Io (Vo + VF(I) [+ Vin]) = 0, which is the balance with D = 1 − Io/I put in.
 */
function solveContinuousCurrent(kernel: Kernel): number {
  const { inputVoltage: vin, outputVoltage: vo, outputCurrent: io } = kernel
  const quadratic = kernel.onResistance + kernel.inductorResistance
  const linear = vin + io * kernel.onResistance
  const base = kernel.kind === 'boost' ? vo : vo + vin
  let current = (io * base) / vin
  // V_F moves little with I, so the root with V_F held converges by a factor of some 30 a round.
  for (let round = 0; round < 60; round++) {
    const constant = io * (base + rectifierDrop(kernel, current))
    const discriminant = linear * linear - 4 * quadratic * constant
    if (discriminant < 0) return Number.NaN
    const next = (2 * constant) / (linear + Math.sqrt(discriminant))
    const moved = Math.abs(next - current)
    current = next
    if (moved <= 1e-14 * next) break
  }
  return current
}

/** Places duty, ripple and valley for a mean inductor current; also used at each angle of the line. */
export function placeContinuous(kernel: Kernel, current: number): boolean {
  const instant = kernel.instant
  const vin = instant.inputVoltage
  const vo = kernel.outputVoltage
  const forward = rectifierDrop(kernel, current)
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
export function offVoltageAt(kernel: Kernel, mean: number): number {
  const total = kernel.outputVoltage + rectifierDrop(kernel, mean) + mean * kernel.inductorResistance
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
