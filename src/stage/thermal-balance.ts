import { ambientForJunction, lowestSettledJunction } from './ambient-for-junction.ts'
import { evaluateRound } from './evaluate.ts'
import { placeHeatInverse } from './heat-inverse.ts'
import { type Kernel, row, switchPower } from './kernel.ts'
import { createQuasiNewton, largest, placeStep, updateInverse } from './quasi-newton.ts'

/** Temperatures are solved to this. [K] */
const tolerance = 1e-6
/** The crest of the line current is solved to this share of itself, beside the temperatures. */
const crestTolerance = 1e-9
const maxRounds = 25
const refiningRounds = 12
/** A share of the crest weighs as much as this share of the temperatures' rise. [K] */
const restWeight = 100
/** A root that is this far from running away, by the estimated sensitivities, is the lowest one. */
const safeMargin = 0.35

const solver = createQuasiNewton()
const { residual, step } = solver
const target = new Float64Array(3)

/**
 * Settles the junction temperatures with the losses (PHYSICS 5): the lowest root of T = T_ref + R_th P(T), from below.
 * Broyden's method from the temperature of the surroundings, its first step by estimated sensitivities; where it finds
 * nothing, the slow bracketed search has the word.
 *
 * @returns True when a stable temperature exists; `kernel` then holds the ledger there. False: none, or no power.
 */
export function settle(kernel: Kernel): boolean {
  startFromReference(kernel)
  return iterate(kernel) || settleSlowly(kernel)
}

/**
 * Goes on from a settled kernel until rounding alone moves it, for figures that are printed and compared: at the
 * tolerance of {@link settle}, two machines whose exp differs in its last bit stop some 1e-8 apart. Where a round does
 * not bring it nearer (close to running away) the settled point stays.
 */
export function refine(kernel: Kernel): void {
  const { temperatures, line } = kernel
  evaluateRound(kernel)
  placeResidual(kernel)
  placeHeatInverse(kernel, solver.inverse)
  for (let round = 0; round < refiningRounds; round++) {
    const before = distanceFromRest(kernel)
    const [hot, inSwitch, other, crest] = [temperatures[0]!, temperatures[1]!, temperatures[2]!, line.crestCurrent]
    if (before === 0) return
    const stepped = stepForward(kernel)
    if (stepped) {
      evaluateRound(kernel)
      placeResidual(kernel)
    }
    if (stepped && kernel.delivers && distanceFromRest(kernel) < before) {
      updateInverse(solver)
      continue
    }
    temperatures[0] = hot
    temperatures[1] = inSwitch
    temperatures[2] = other
    line.crestCurrent = crest
    evaluateRound(kernel)
    return
  }
}

/** Temperatures in kelvin and the crest as its share, in one figure. */
function distanceFromRest({ line }: Kernel): number {
  return Math.max(largest(residual), restWeight * Math.abs(line.correction))
}

/** Keeps the present solution as the start of {@link settleFromHeld}. */
export function holdStart(kernel: Kernel): void {
  const { held } = kernel
  held.temperatures.set(kernel.temperatures)
  held.crestCurrent = kernel.line.crestCurrent
  held.current = kernel.startCurrent
}

/**
 * As {@link settle}, from the held solution of a neighbouring case: fewer rounds, the same root. Between the lowest
 * root and the edge of stability P(T) grows ever faster, so that a root with a wide margin to that edge is the lowest;
 * one without, or none, is solved again from below.
 */
export function settleFromHeld(kernel: Kernel): boolean {
  // The estimated sensitivities, and with them the margin, are those of a single part.
  if (kernel.parts > 1) return settle(kernel)
  const { held } = kernel
  kernel.temperatures.set(held.temperatures)
  kernel.line.crestCurrent = held.crestCurrent
  kernel.startCurrent = held.current
  kernel.line.correction = 0
  return (iterate(kernel) && placeHeatInverse(kernel, solver.inverse) > safeMargin) || settle(kernel)
}

/** True when temperatures, and the crest of a mains stage, have come to rest. */
function iterate(kernel: Kernel): boolean {
  const { line, temperatures, thermal } = kernel
  evaluateRound(kernel)
  if (!kernel.delivers) return false
  placeResidual(kernel)
  placeHeatInverse(kernel, solver.inverse)
  for (let round = 0; round < maxRounds; round++) {
    // Heat beyond all numbers is no rest either.
    const moving = !(largest(residual) <= tolerance)
    if (!moving && Math.abs(line.correction) <= crestTolerance) return true
    if (moving && !stepForward(kernel)) return false
    const crestMoves = Math.abs(line.correction) * (temperatures[0]! - thermal.reference)
    evaluateRound(kernel)
    if (!kernel.delivers) return false
    placeResidual(kernel)
    // What the crest's move did to the heat must not be taken for an answer to the temperatures.
    if (moving && crestMoves <= 0.02 * largest(step)) updateInverse(solver)
  }
  return false
}

function settleSlowly(kernel: Kernel): boolean {
  const junction = lowestSettledJunction(kernel)
  if (junction === null) return false
  // Leaves the ledger of the root in the kernel.
  ambientForJunction(kernel, junction)
  return kernel.delivers
}

function startFromReference(kernel: Kernel): void {
  const { thermal, temperatures, line } = kernel
  temperatures[0] = thermal.reference
  if (thermal.switchSolved) temperatures[1] = thermal.reference
  temperatures[2] = thermal.reference
  kernel.startCurrent = 0
  line.crestCurrent = line.startCrest
  line.correction = 0
}

/** Where the heat flow through the network would put each solved junction, minus where it is. */
function placeResidual(kernel: Kernel): void {
  const { thermal, temperatures, parts } = kernel
  heatTargets(kernel, target)
  // The crest of a mains stage has been corrected after the booking: most heat follows its power of 1.5.
  const growth = kernel.kind === 'mains-boost' ? 1.5 * kernel.line.correction : 0
  const { reference } = thermal
  residual[0] = target[0]! + growth * (target[0]! - reference) - temperatures[0]!
  residual[1] = thermal.switchSolved ? target[1]! + growth * (target[1]! - reference) - temperatures[1]! : 0
  residual[2] = parts > 1 ? target[2]! + growth * (target[2]! - reference) - temperatures[2]! : 0
}

/** Junction temperatures that the present losses would cause. [K] */
function heatTargets(kernel: Kernel, out: Float64Array): void {
  const { thermal, rows, parts } = kernel
  const heat = switchPower(rows)
  const hot = rows[row.hotPart]!
  const other = rows[row.otherPart]!
  const onSink = (thermal.rectifierOnSink ? hot + (parts - 1) * other : 0) + (thermal.switchOnSink ? heat : 0)
  const sink = thermal.reference + thermal.common * thermal.factor * onSink
  const base = thermal.rectifierOnSink ? sink : thermal.reference
  out[0] = base + thermal.junctionSelf * thermal.factor * hot
  out[1] = sink + thermal.switchSelf * thermal.factor * heat
  out[2] = base + thermal.junctionSelf * thermal.factor * other
}

/** Moves along the quasi-Newton direction; false when the step leaves the searched range. */
function stepForward(kernel: Kernel): boolean {
  const { temperatures: t, thermal } = kernel
  placeStep(solver)
  const hot = t[0]! + step[0]!
  const inSwitch = t[1]! + step[1]!
  const other = t[2]! + step[2]!
  const lowest = thermal.reference - 1
  // The switch and the other parts may pass the rectifier's ceiling; only absurd values stop the fast route.
  const absurd = thermal.ceiling + 1000
  if (!(hot <= thermal.ceiling && inSwitch <= absurd && other <= absurd)) return false
  if (hot < lowest || other < lowest || (thermal.switchSolved && inSwitch < lowest)) return false
  t[0] = hot
  t[1] = inSwitch
  t[2] = other
  return true
}
