import type { ThermalOutcome } from '../domain/result.ts'
import { ambientForJunction, highestBetween } from '../stage/ambient-for-junction.ts'
import { evaluate } from '../stage/evaluate.ts'
import type { Instant, Kernel } from '../stage/kernel.ts'
import { row } from '../stage/kernel.ts'
import { crestInstant, type PointEvent, pointEvent } from '../stage/settled-point.ts'
import { refine, settle } from '../stage/thermal-balance.ts'
import { junctionLimitOf } from '../stage/thermal-network.ts'
import type { Candidate } from './candidate.ts'

/** A solved point copied out of the kernel. */
export interface NominalPoint {
  readonly rows: Float64Array
  readonly junction: number
  readonly switchJunction: number
  readonly instant: Instant
  readonly event: PointEvent
  /** Share of the line cycle in continuous conduction; 1 or 0 for dc. */
  readonly continuousShare: number
  readonly outcome: Exclude<ThermalOutcome, 'none'>
  /** The chord stands in for a forward curve that left its usable range. */
  readonly chord: boolean
}

/** Solves the kernel where it stands; null when no stable temperature exists (or no power: `delivers` tells). */
export function solvePoint(candidate: Candidate): NominalPoint | null {
  const { kernel, stage, record } = candidate
  if (!settle(kernel)) return null
  refine(kernel)
  const rows = kernel.rows.slice()
  const junction = kernel.temperatures[0]!
  const instant = crestInstant(kernel)
  return {
    rows,
    junction,
    switchJunction: kernel.temperatures[1]!,
    instant,
    event: pointEvent(kernel),
    continuousShare: kernel.kind === 'mains-boost' ? kernel.line.continuousShare : instant.discontinuous ? 0 : 1,
    outcome: junction > junctionLimitOf(stage, record) ? 'over-limit' : 'settled',
    chord: kernel.hot.chord,
  }
}

/** True when the stage can deliver its power with all junctions at the temperature of the surroundings. */
export function deliversCold(kernel: Kernel): boolean {
  const { temperatures, thermal } = kernel
  temperatures[0] = thermal.reference
  temperatures[2] = thermal.reference
  if (thermal.switchSolved) temperatures[1] = thermal.reference
  evaluate(kernel)
  return kernel.delivers
}

/** Runs `action` with the leakage at its guaranteed (or assumed) maximum. */
export function atMaximumLeakage<T>({ rectifier, kernel }: Candidate, action: () => T): T {
  const nominal = kernel.coefficients.slice()
  kernel.coefficients[14]! += rectifier.leakage?.maximumShift ?? 0
  const result = action()
  kernel.coefficients.set(nominal)
  return result
}

/** Runs `action` with lifetime and ratio at the record's guaranteed maximum. */
export function atMaximumRecovery<T>(candidate: Candidate, action: () => T): T | null {
  const shift = candidate.rectifier.maximumRecoveryShift
  if (shift === null) return null
  const c = candidate.kernel.coefficients
  const nominal = c.slice()
  c[0]! += shift.lifetime
  c[4]! += shift.ratio
  const result = action()
  c.set(nominal)
  return result
}

/**
 * Highest surroundings at which the part still settles at or below a junction temperature: the largest
 * T_ref(Tj) over Tj up to it. [K]; null when it settles nowhere in the searched range.
 */
export function highestSurroundings(kernel: Kernel, ceiling: number): number | null {
  const low = Math.min(kernel.thermal.reference, ceiling) - 80
  const steps = 24
  let bestAt = ceiling
  let best = Number.NEGATIVE_INFINITY
  for (let k = 0; k <= steps; k++) {
    const at = low + ((ceiling - low) * k) / steps
    const value = ambientForJunction(kernel, at)
    if (value > best) {
      best = value
      bestAt = at
    }
  }
  if (!Number.isFinite(best)) return null
  const width = (ceiling - low) / steps
  const above = Math.min(bestAt + width, ceiling)
  const top = highestBetween((at) => finite(ambientForJunction(kernel, at)), Math.max(bestAt - width, low), above)
  return Math.max(top.value, best)
}

function finite(value: number): number {
  return Number.isFinite(value) ? value : Number.NEGATIVE_INFINITY
}

/** Losses of the whole stage, each watt once. [W] */
export function stageLossOf(candidate: Candidate, rows: Float64Array): number {
  const { stage, kernel } = candidate
  let loss = 0
  for (let k = 0; k <= row.inductor; k++) loss += rows[k]!
  return loss + snubberLoss(stage.snubberCapacitance, kernel) + stage.fixedLosses
}

/** C V² f of the snubber. [W] */
export function snubberLoss(capacitance: number, kernel: Kernel): number {
  return capacitance * kernel.instant.blockingVoltage ** 2 * kernel.frequency
}

/** The rectifier's six rows. [W] */
export function totalLossOf(rows: Float64Array): number {
  let total = 0
  for (let k = 0; k <= row.forwardRecovery; k++) total += rows[k]!
  return total
}
