import type { Gaussian } from '../domain/calibrated-rectifier.ts'
import type { Caveat } from '../domain/caveat.ts'
import type { RecoveryRow } from '../domain/rectifier.ts'
import type { Observation } from './bayesian-update.ts'
import type { RecoveryCondition } from './design-rows.ts'
import type { RecoveryPoint } from './invert-pair.ts'
import type { FigureName, RampReading } from './recovery-figures.ts'

/** What stands around a row while it is read. */
export interface RowContext {
  readonly id: string
  /** I0. [A] */
  readonly ratedCurrent: number
  /** Voltage at which the rows will be used. [V] */
  readonly blockingVoltage: number
  /** The class prior; never the running posterior, so that the order of rows cannot matter. */
  readonly prior: Gaussian
}

/** One recovery row as evidence on (u, y). */
export interface RowReading {
  readonly row: RecoveryRow
  /** Where it was read, assumptions filled in. */
  readonly condition: RecoveryCondition
  readonly observation: Observation
  /** (u, y) as the row states it, before a maximum is lowered to the population's centre. */
  readonly point: RecoveryPoint
  /** Whether the row says something about y, and so about softness. */
  readonly tellsRatio: boolean
  /** The one figure of a ramp row that is used alone; null where several are, and for step rows. */
  readonly single: { readonly reading: RampReading; readonly name: FigureName; readonly value: number } | null
  readonly caveats: readonly Caveat[]
}

/** A row from which nothing can be read, and why. */
export interface UnusableRow {
  readonly unusable: Caveat
}
