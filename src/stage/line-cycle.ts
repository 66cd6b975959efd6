import { gaussLegendre } from '../numerics/gauss-legendre.ts'
import { bookInstant } from './book-instant.ts'
import { type Kernel, type LineGrid, row } from './kernel.ts'
import { offVoltageHere, onVoltageAt, placeContinuous, placeDiscontinuous } from './solve-instant.ts'

/** Nodes: near the zero crossing, in the layer below the mode border where residual charge dies out, above the border. */
const farNodes = gaussLegendre(4)
const layerNodes = gaussLegendre(8)
const continuousNodes = gaussLegendre(12)
const lineNodeCount = 24

export function createLineGrid(): LineGrid {
  return {
    sine: new Float64Array(lineNodeCount),
    weight: new Float64Array(lineNodeCount),
    count: 0,
    crestCurrent: 0,
    startCrest: 0,
    bookedMean: 0,
    correction: 0,
    continuousShare: 1,
  }
}

/**
 * Lays Gauss nodes over a quarter of the line period, split at the mode border so that the kink there falls
 * between panels. The border is found with drops at the kernel's present temperatures.
 */
export function layLineGrid(kernel: Kernel): void {
  const grid = kernel.line
  grid.crestCurrent = lossFreeCrest(kernel)
  layPanels(grid, modeBorder(kernel))
  // With drops the crest is a little higher and the border lies a little lower: once more with the scaled crest.
  if (scaleCrest(kernel)) layPanels(grid, modeBorder(kernel))
  grid.startCrest = grid.crestCurrent
}

function layPanels(grid: LineGrid, border: number): void {
  grid.count = 0
  if (border > 0) {
    const layer = 0.75 * border
    addPanel(grid, farNodes, 0, layer)
    addPanel(grid, layerNodes, layer, border)
  }
  if (border < Math.PI / 2) addPanel(grid, continuousNodes, border, Math.PI / 2)
  grid.continuousShare = 1 - border / (Math.PI / 2)
}

function lossFreeCrest(kernel: Kernel): number {
  return (Math.SQRT2 * kernel.outputVoltage * kernel.outputCurrent) / kernel.inputVoltage
}

function addPanel(
  grid: LineGrid,
  rule: { nodes: Float64Array; weights: Float64Array },
  from: number,
  to: number,
): void {
  const half = (to - from) / 2
  const middle = (to + from) / 2
  for (let k = 0; k < rule.nodes.length; k++) {
    grid.sine[grid.count] = Math.sin(middle + half * rule.nodes[k]!)
    grid.weight[grid.count] = (rule.weights[k]! * half) / (Math.PI / 2)
    grid.count++
  }
}

/** Line angle above which conduction is continuous; bisection, since the valley rises with the angle. [rad] */
function modeBorder(kernel: Kernel): number {
  const valleyAt = (angle: number): number => {
    const sine = Math.sin(angle)
    kernel.instant.inputVoltage = Math.SQRT2 * kernel.inputVoltage * sine
    const continuous = placeContinuous(kernel, kernel.line.crestCurrent * sine)
    return continuous ? kernel.instant.continuousValley : -1
  }
  if (kernel.part.synchronous) return 0
  if (valleyAt(Math.PI / 2) < 0) return Math.PI / 2
  // Continuous practically from the zero crossing on: no panel below the border is worth its nodes.
  if (valleyAt(1e-6) >= 0) return 0
  let low = 0
  let high = Math.PI / 2
  for (let round = 0; round < 40; round++) {
    const middle = (low + high) / 2
    if (valleyAt(middle) < 0) low = middle
    else high = middle
  }
  return high
}

/** Currents at one angle: continuous, else discontinuous with the drops at the mean current. False: no power there. */
export function solveLineInstant(kernel: Kernel, sine: number): boolean {
  const instant = kernel.instant
  const mean = kernel.line.crestCurrent * sine
  instant.inputVoltage = Math.SQRT2 * kernel.inputVoltage * sine
  if (!placeContinuous(kernel, mean)) return false
  if (instant.continuousValley >= 0 || kernel.part.synchronous) return true
  const onVoltage = onVoltageAt(kernel, mean)
  const offVoltage = offVoltageHere(kernel, mean)
  if (!(onVoltage > 0) || !(offVoltage > 0)) return false
  const peak = Math.sqrt((2 * mean) / (kernel.inductance * kernel.frequency * (1 / onVoltage + 1 / offVoltage)))
  placeDiscontinuous(kernel, peak, onVoltage, offVoltage)
  instant.idleVoltage = Math.max(kernel.outputVoltage - instant.inputVoltage, 0)
  return true
}

/**
 * Half-cycle means of all rows. The crest current is scaled until the mean rectifier current is the output current;
 * that mean is nearly proportional to the crest, so correction by the ratio converges in a few rounds.
 */
export function evaluateLine(kernel: Kernel): void {
  kernel.delivers = scaleCrest(kernel)
  if (kernel.delivers) bookLine(kernel)
}

/**
 * One round of the same for a solver that comes back with new temperatures anyway: books at the present crest, then
 * corrects it. `correction` tells by what share. Scaling it out in every round costs twice the bookings.
 */
export function evaluateLineRound(kernel: Kernel): void {
  const { line } = kernel
  bookLine(kernel)
  if (!kernel.delivers) return
  const ratio = kernel.outputCurrent / line.bookedMean
  line.correction = ratio - 1
  line.crestCurrent *= ratio
  kernel.delivers = line.crestCurrent < 1e9
}

/** Adds the losses at all angles to the rows. */
function bookLine(kernel: Kernel): void {
  const { line, instant } = kernel
  let mean = 0
  for (let k = 0; k < line.count; k++) {
    kernel.delivers = solveLineInstant(kernel, line.sine[k]!)
    if (!kernel.delivers) return
    const weight = line.weight[k]!
    mean += ((instant.valley + instant.peak) / 2) * instant.conductionShare * weight
    bookInstant(kernel, weight)
    if (!kernel.delivers) return
  }
  line.bookedMean = mean
  kernel.rows[row.meanRectifierCurrent] = kernel.outputCurrent
}

/** False when no crest current delivers the output. */
function scaleCrest(kernel: Kernel): boolean {
  const line = kernel.line
  for (let round = 0; round < 60; round++) {
    const mean = meanRectifierCurrent(kernel)
    if (!(mean > 0)) return false
    const ratio = kernel.outputCurrent / mean
    line.crestCurrent *= ratio
    if (Math.abs(ratio - 1) <= 1e-12) return true
    if (!(line.crestCurrent < 1e9)) return false
  }
  return false
}

function meanRectifierCurrent(kernel: Kernel): number {
  const { line, instant } = kernel
  let mean = 0
  for (let k = 0; k < line.count; k++) {
    if (!solveLineInstant(kernel, line.sine[k]!)) return Number.NaN
    mean += ((instant.valley + instant.peak) / 2) * instant.conductionShare * line.weight[k]!
  }
  return mean
}
