import { findRoot } from '../numerics/find-root.ts'
import { evaluate } from './evaluate.ts'
import { type Kernel, row, switchPower } from './kernel.ts'

/** A hot junction with much heat asks for surroundings below absolute zero; no other junction is taken below this. [K] */
const coldest = 50

/** A switch that would be hotter than this has no stable temperature of its own. [K] */
const switchCeiling = 1500

/**
 * Surroundings (ambient or case) at which the hottest rectifier junction would sit exactly at `junction`, with every
 * other temperature settled: T_ref = Tj − R_th P(Tj). As a function of Tj it needs no iteration over Tj itself, so its
 * first crossing of the real surroundings is the lowest root and its maximum is the edge of stability.
 *
 * @returns Temperature [K]; NaN where the stage cannot deliver or the switch cannot settle.
 */
export function ambientForJunction(kernel: Kernel, junction: number): number {
  const { thermal, temperatures } = kernel
  temperatures[0] = junction
  if (thermal.switchSolved) temperatures[1] = junction
  temperatures[2] = junction
  let before = 0
  let movedBefore = 0
  for (let round = 0; round < 200; round++) {
    const inSwitch = temperatures[1]!
    evaluate(kernel)
    if (!kernel.delivers) return Number.NaN
    const reference = referenceBehind(kernel, junction)
    const moved = slaveOthers(kernel, reference, junction)
    if (!(temperatures[1]! < switchCeiling)) return Number.NaN
    if (moved <= 1e-9) return reference
    // Heat beyond all numbers: nothing settles there.
    if (!(moved < Number.POSITIVE_INFINITY)) return Number.NaN
    if (thermal.switchSolved && kernel.parts === 1) {
      // The switch is the only unknown: the secant through two rounds saves two thirds of the rounds.
      const step = temperatures[1]! - inSwitch
      if (round > 0) temperatures[1] = secantOf(before, movedBefore, inSwitch, step)
      before = inSwitch
      movedBefore = step
    }
  }
  return Number.NaN
}

/** Where a step that falls linearly with the temperature reaches zero; the plain step where it does not fall. [K] */
function secantOf(before: number, stepBefore: number, at: number, step: number): number {
  const fall = (stepBefore - step) / (at - before)
  return fall > 0.2 && fall < 5 ? Math.max(at + step / fall, coldest) : at + step
}

function referenceBehind(kernel: Kernel, junction: number): number {
  const { thermal, rows } = kernel
  const base = junction - thermal.junctionSelf * thermal.factor * rows[row.hotPart]!
  return thermal.rectifierOnSink ? base - thermal.common * thermal.factor * sinkHeat(kernel) : base
}

function sinkHeat(kernel: Kernel): number {
  const { thermal, rows, parts } = kernel
  const rectifiers = thermal.rectifierOnSink ? rows[row.hotPart]! + (parts - 1) * rows[row.otherPart]! : 0
  return rectifiers + (thermal.switchOnSink ? switchPower(rows) : 0)
}

/** Puts switch and other parts where their heat puts them; returns how far they moved. [K] */
function slaveOthers(kernel: Kernel, reference: number, junction: number): number {
  const { thermal, temperatures, rows } = kernel
  const sink = reference + thermal.common * thermal.factor * sinkHeat(kernel)
  let moved = 0
  if (thermal.switchSolved) {
    const next = Math.max(sink + thermal.switchSelf * thermal.factor * switchPower(rows), coldest)
    moved = Math.abs(next - temperatures[1]!)
    temperatures[1] = next
  }
  if (kernel.parts > 1) {
    const base = thermal.rectifierOnSink ? sink : reference
    const next = Math.max(
      Math.min(base + thermal.junctionSelf * thermal.factor * rows[row.otherPart]!, junction),
      coldest,
    )
    moved = Math.max(moved, Math.abs(next - temperatures[2]!))
    temperatures[2] = next
  }
  return moved
}

/** Points of the scan between the surroundings and the ceiling. */
const scanPoints = 48

/**
 * Lowest junction temperature that the real surroundings settle at, searched from below up to the ceiling.
 *
 * @returns Temperature [K], or null when there is none.
 */
export function lowestSettledJunction(kernel: Kernel): number | null {
  const { reference, ceiling } = kernel.thermal
  const excess = (junction: number): number => ambientForJunction(kernel, junction) - reference
  const span = ceiling - reference
  if (!(span > 0)) return null
  let low = reference
  let lowValue = excess(low)
  if (!Number.isFinite(lowValue)) return null
  for (let k = 1; k <= scanPoints; k++) {
    // Quadratic spacing: mild losses have their root close to the surroundings.
    const high = reference + span * (k / scanPoints) ** 2
    const highValue = excess(high)
    if (!Number.isFinite(highValue)) return null
    if (highValue >= 0) return refine(excess, low, high)
    const peak =
      highValue < lowValue
        ? highestBetween(excess, reference + span * (Math.max(k - 2, 0) / scanPoints) ** 2, high)
        : null
    if (peak !== null && peak.value >= 0) return refine(excess, reference, peak.at)
    if (peak !== null) return null
    low = high
    lowValue = highValue
  }
  return null
}

function refine(excess: (junction: number) => number, low: number, high: number): number | null {
  return findRoot({ f: excess, low, high, tolerance: 1e-9, maxIterations: 200 })?.root ?? null
}

/** Golden-section search for the largest value; the function rises, then falls for good (leakage is convex in T). */
export function highestBetween(
  f: (junction: number) => number,
  low: number,
  high: number,
): { readonly at: number; readonly value: number } {
  // Most searches end where they still rise: two values tell, against some forty.
  const end = f(high)
  if (end > f(high - 1e-4 * (high - low))) return { at: high, value: end }
  const ratio = (Math.sqrt(5) - 1) / 2
  let a = low
  let b = high
  let c = b - ratio * (b - a)
  let d = a + ratio * (b - a)
  let fc = f(c)
  let fd = f(d)
  for (let round = 0; round < 60 && b - a > 1e-7; round++) {
    if (fc > fd) {
      b = d
      d = c
      fd = fc
      c = b - ratio * (b - a)
      fc = f(c)
    } else {
      a = c
      c = d
      fc = fd
      d = a + ratio * (b - a)
      fd = f(d)
    }
  }
  return fc > fd ? { at: c, value: fc } : { at: d, value: fd }
}
