import { referenceTemperature } from '../domain/constants.ts'
import { bookInstant } from './book-instant.ts'
import { type Kernel, row } from './kernel.ts'
import { evaluateLine, layLineGrid } from './line-cycle.ts'
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
  kernel.rows.fill(0)
  if (kernel.kind === 'mains-boost') evaluateLine(kernel)
  else {
    solveDcInstant(kernel)
    if (!kernel.delivers) return
    bookInstant(kernel, 1)
  }
  kernel.rows[row.stored] = kernel.storedEnergy * kernel.frequency
  kernel.rows[row.inductor]! += kernel.coreLoss
}

/** To be called after conditions other than draws of the part change: blocking voltage, and the line's nodes. */
export function placeConditions(kernel: Kernel): void {
  const instant = kernel.instant
  if (kernel.kind === 'buck') instant.blockingVoltage = kernel.inputVoltage
  else if (kernel.kind === 'inverting') instant.blockingVoltage = kernel.inputVoltage + kernel.outputVoltage
  else instant.blockingVoltage = kernel.outputVoltage
  if (kernel.kind === 'mains-boost') {
    placeTemperatures(kernel)
    layLineGrid(kernel)
  }
}
