import { referenceTemperature } from '../domain/constants.ts'
import type { StageKind } from '../domain/stage.ts'
import { bookInstant } from './book-instant.ts'
import { type Kernel, row, rowCount } from './kernel.ts'
import { evaluateLine, evaluateLineRound, layLineGrid } from './line-cycle.ts'
import { moveToTemperature } from './part-at-temperature.ts'
import { solveDcInstant } from './solve-instant.ts'

/** Puts the part and the switch at the kernel's temperatures. */
export function placeTemperatures(kernel: Kernel): void {
  const t = kernel.temperatures
  moveToTemperature(kernel, kernel.hot, t[0]!)
  if (kernel.parts > 1) moveToTemperature(kernel, kernel.other, t[2]!)
  const growth = 1 + kernel.onResistancePerKelvin * (t[1]! - referenceTemperature)
  kernel.onResistance = kernel.onResistance25 * Math.max(growth, 0.1)
}

/** All rows of the ledger at the kernel's conditions and temperatures; `delivers` says whether the point exists. */
export function evaluate(kernel: Kernel): void {
  placeTemperatures(kernel)
  clearRows(kernel.rows)
  if (kernel.kind === 'mains-boost') evaluateLine(kernel)
  else evaluateDc(kernel)
  if (kernel.delivers) bookFixed(kernel)
}

/** As {@link evaluate}, but the crest of a mains stage only comes one step closer: see {@link evaluateLineRound}. */
export function evaluateRound(kernel: Kernel): void {
  placeTemperatures(kernel)
  clearRows(kernel.rows)
  if (kernel.kind === 'mains-boost') evaluateLineRound(kernel)
  else evaluateDc(kernel)
  if (kernel.delivers) bookFixed(kernel)
}

function evaluateDc(kernel: Kernel): void {
  solveDcInstant(kernel)
  if (kernel.delivers) bookInstant(kernel, 1)
}

function bookFixed(kernel: Kernel): void {
  kernel.rows[row.stored] = kernel.storedEnergy * kernel.frequency
  kernel.rows[row.inductor]! += kernel.coreLoss
}

/** A loop: `fill` costs a call that so few elements do not earn back. */
function clearRows(rows: Float64Array): void {
  for (let k = 0; k < rowCount; k++) rows[k] = 0
}

/** Voltage that the rectifier blocks at a dc input (mains stages block the output). [V] */
export function blockingVoltage(kind: StageKind, input: number, output: number): number {
  if (kind === 'buck') return input
  return kind === 'inverting' ? input + output : output
}

/** To be called after conditions other than draws of the part change: blocking voltage, and the line's nodes. */
export function placeConditions(kernel: Kernel): void {
  const instant = kernel.instant
  instant.blockingVoltage = blockingVoltage(kernel.kind, kernel.inputVoltage, kernel.outputVoltage)
  kernel.blockingLog = Math.log(instant.blockingVoltage / kernel.part.ratedVoltage)
  kernel.startCurrent = 0
  if (kernel.kind === 'mains-boost') {
    // From the surroundings' temperature: the nodes must not depend on what was solved before.
    const { temperatures, thermal } = kernel
    temperatures[0] = thermal.reference
    temperatures[2] = thermal.reference
    if (thermal.switchSolved) temperatures[1] = thermal.reference
    placeTemperatures(kernel)
    layLineGrid(kernel)
  }
}
