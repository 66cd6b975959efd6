import { ambientForJunction, lowestSettledJunction } from './ambient-for-junction.ts'
import { evaluateRound } from './evaluate.ts'
import { placeSensitivity, sensitivity } from './heat-sensitivity.ts'
import { type Kernel, row, switchPower } from './kernel.ts'

/** Temperatures are solved to this. [K] */
const tolerance = 1e-6
/** The crest of the line current is solved to this share of itself, beside the temperatures. */
const crestTolerance = 1e-9
/** Closer to running away than this, estimates of the sensitivity are not used. */
const leastMargin = 0.2
const maxRounds = 25

// Scratch of the solver: unknowns are the solved temperatures, at most three.
const index = new Int32Array(3)
const residual = new Float64Array(3)
const previous = new Float64Array(3)
const step = new Float64Array(3)
const inverse = new Float64Array(9)
const change = new Float64Array(3)
const product = new Float64Array(3)
const target = new Float64Array(3)

/**
 * Settles the junction temperatures with the losses (PHYSICS 5): the lowest root of T = T_ref + R_th P(T), from below.
 * Broyden's method (C. G. Broyden, Math. Comp. 19, 1965, 577-593) started with the plain fixed-point step; a result
 * that was not approached from below, or no result, is settled by the slow bracketed search.
 *
 * @returns True when a stable temperature exists; `kernel` then holds the ledger there. False: none, or no power.
 */
export function settle(kernel: Kernel): boolean {
  const count = startFromReference(kernel)
  evaluateRound(kernel)
  if (!kernel.delivers) return settleSlowly(kernel)
  computeResidual(kernel, count)
  placeInverse(kernel, count)
  for (let round = 0; round < maxRounds; round++) {
    const moving = largest(residual, count) > tolerance
    if (!moving && Math.abs(kernel.line.correction) <= crestTolerance) return true
    if (moving && !stepForward(kernel, count)) return settleSlowly(kernel)
    const crestMoves = Math.abs(kernel.line.correction) * (kernel.temperatures[0]! - kernel.thermal.reference)
    evaluateRound(kernel)
    if (!kernel.delivers) return settleSlowly(kernel)
    computeResidual(kernel, count)
    // What the crest's move did to the heat must not be taken for an answer to the temperatures.
    if (moving && crestMoves <= 0.02 * largest(step, count)) updateInverse(count)
  }
  return settleSlowly(kernel)
}

function settleSlowly(kernel: Kernel): boolean {
  const junction = lowestSettledJunction(kernel)
  if (junction === null) return false
  // Leaves the ledger of the root in the kernel.
  ambientForJunction(kernel, junction)
  return kernel.delivers
}

/** Where the heat flow through the network would put each solved junction, minus where it is. */
function computeResidual(kernel: Kernel, count: number): void {
  heatTargets(kernel, target)
  // The crest of a mains stage has been corrected after the booking: most heat follows its power of 1.5.
  if (kernel.kind === 'mains-boost') {
    const growth = 1.5 * kernel.line.correction
    for (let k = 0; k < 3; k++) target[k]! += growth * (target[k]! - kernel.thermal.reference)
  }
  for (let k = 0; k < count; k++) residual[k] = target[index[k]!]! - kernel.temperatures[index[k]!]!
}

/** Junction temperatures that the present losses would cause. [K] */
export function heatTargets(kernel: Kernel, out: Float64Array): void {
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

function startFromReference(kernel: Kernel): number {
  const { thermal, temperatures } = kernel
  let count = 0
  index[count++] = 0
  temperatures[0] = thermal.reference
  if (thermal.switchSolved) {
    index[count++] = 1
    temperatures[1] = thermal.reference
  }
  temperatures[2] = thermal.reference
  kernel.startCurrent = 0
  kernel.line.crestCurrent = kernel.line.startCrest
  kernel.line.correction = 0
  if (kernel.parts > 1) index[count++] = 2
  return count
}

/**
 * First guess of the inverse of I − d(heatTargets)/dT: from the estimated sensitivities for a single part, else the
 * identity, which makes the first step that of the plain fixed point.
 */
function placeInverse(kernel: Kernel, count: number): void {
  inverse.fill(0)
  for (let k = 0; k < count; k++) inverse[k * 3 + k] = 1
  if (kernel.parts > 1) return
  const { thermal } = kernel
  placeSensitivity(kernel)
  const { rectifier, switchByRectifier, switchOwn } = sensitivity
  const common = thermal.common * thermal.factor
  const self = thermal.junctionSelf * thermal.factor
  const ownSwitch = thermal.switchSelf * thermal.factor
  // Heat of either on the common sink warms both.
  const sinkByRectifier =
    common * ((thermal.rectifierOnSink ? rectifier : 0) + (thermal.switchOnSink ? switchByRectifier : 0))
  const sinkBySwitch = thermal.switchOnSink ? common * switchOwn : 0
  const a = 1 - (thermal.rectifierOnSink ? sinkByRectifier : 0) - self * rectifier
  if (count === 1) {
    if (a > leastMargin) inverse[0] = 1 / a
    return
  }
  const b = thermal.rectifierOnSink ? -sinkBySwitch : 0
  const c = -sinkByRectifier - ownSwitch * switchByRectifier
  const d = 1 - sinkBySwitch - ownSwitch * switchOwn
  const determinant = a * d - b * c
  if (!(a > leastMargin && d > leastMargin && determinant > leastMargin)) return
  inverse[0] = d / determinant
  inverse[1] = -b / determinant
  inverse[3] = -c / determinant
  inverse[4] = a / determinant
}

/** Moves along the quasi-Newton direction; false when the step leaves the searched range. */
function stepForward(kernel: Kernel, count: number): boolean {
  const { temperatures, thermal } = kernel
  for (let k = 0; k < count; k++) {
    let moved = 0
    for (let j = 0; j < count; j++) moved += inverse[k * 3 + j]! * residual[j]!
    previous[k] = residual[k]!
    step[k] = moved
    const next = temperatures[index[k]!]! + moved
    // The switch and the other parts may pass the rectifier's ceiling; only absurd values stop the fast route.
    const highest = index[k] === 0 ? thermal.ceiling : thermal.ceiling + 1000
    if (!(next <= highest) || next < thermal.reference - 1) return false
    temperatures[index[k]!] = next
  }
  return true
}

/**
 * Broyden's rank-one update of the inverse, with the residual's sign turned so that the first step is the
 * fixed-point step: H += (s − H y) sᵀH / (sᵀ H y), y = r_old − r_new.
 */
function updateInverse(count: number): void {
  let denominator = 0
  for (let k = 0; k < count; k++) {
    change[k] = previous[k]! - residual[k]!
  }
  for (let k = 0; k < count; k++) {
    let sum = 0
    for (let j = 0; j < count; j++) sum += inverse[k * 3 + j]! * change[j]!
    product[k] = sum
    denominator += step[k]! * sum
  }
  if (!(Math.abs(denominator) > 1e-300)) return
  for (let j = 0; j < count; j++) {
    let row = 0
    for (let k = 0; k < count; k++) row += step[k]! * inverse[k * 3 + j]!
    target[j] = row
  }
  for (let k = 0; k < count; k++) {
    const scale = (step[k]! - product[k]!) / denominator
    for (let j = 0; j < count; j++) inverse[k * 3 + j]! += scale * target[j]!
  }
}

function largest(values: Float64Array, count: number): number {
  let most = 0
  for (let k = 0; k < count; k++) most = Math.max(most, Math.abs(values[k]!))
  return most
}
