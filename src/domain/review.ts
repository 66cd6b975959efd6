import type { RankResult } from './result.ts'
import type { TrendQuantity, TrendResult } from './study.ts'

/** Current and reverse voltage of one recovery against time; time 0 is where the switch turns on. */
export interface EventWaveform {
  readonly id: string
  readonly time_s: readonly number[]
  /** Rectifier current, positive forward. */
  readonly current_a: readonly number[]
  /** Reverse voltage, positive while it blocks. */
  readonly voltage_v: readonly number[]
}

/** A figure that a record states beside what the model makes of it under the row's own conditions. */
export interface RowComparison {
  readonly id: string
  readonly row: string
  readonly figure: 'qrr_c' | 'peak_reverse_a' | 'trr_s'
  readonly current_a: number
  readonly slope_a_per_s: number
  readonly junction_c: number
  readonly given: number
  readonly model: number
  readonly grade: string
}

/** What one published convention would call the recovery loss of the same event. */
export interface ConventionFigure {
  readonly id: string
  readonly name: string
  readonly heats: string
  readonly energy_j: number
  readonly power_w: number
  readonly source: string
}

/** One input with its origin; SI value with the unit's symbol, or a text. */
export interface LedgerEntry {
  /** "stage" or a record's id. */
  readonly subject: string
  readonly path: string
  readonly value: number | string
  readonly unit: string
  /** given | default | class */
  readonly origin: string
  readonly grade: string | null
  readonly source: string | null
  /** file:line of a row; "" where the file as a whole is meant. */
  readonly place: string
}

/** Everything the review document shows. */
export interface ReviewResult {
  readonly rank: RankResult
  /** Null where the stage has no such axis (ambient with a fixed case). */
  readonly trends: Readonly<Record<Exclude<TrendQuantity, 'input' | 'inductance'>, TrendResult | null>>
  readonly waveforms: readonly EventWaveform[]
  readonly rows: readonly RowComparison[]
  readonly conventions: readonly ConventionFigure[]
  readonly ledger: readonly LedgerEntry[]
  readonly limits: { readonly junction_c: number | null; readonly voltage_use: number }
}
