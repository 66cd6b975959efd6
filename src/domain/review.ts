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

/** A recovery charge against the slope at a part's own current and temperature, with the rows that carry it. */
export interface EvidenceCurve {
  readonly id: string
  readonly current_a: number
  readonly junction_c: number
  /** Where the stage stands. */
  readonly slope_a_per_s: number
  readonly points: readonly {
    readonly slope_a_per_s: number
    readonly qrr_c: number
    /** Outside the rows by more than counts as conversion. */
    readonly extrapolated: boolean
  }[]
  /** Charges that rows state, each under its own condition. */
  readonly given: readonly {
    readonly row: string
    readonly slope_a_per_s: number
    readonly current_a: number
    readonly junction_c: number
    readonly qrr_c: number
  }[]
}

/** The mean current of a part beside its rating. */
export interface CurrentCheck {
  readonly id: string
  readonly mean_a: number | null
  readonly limit_a: number
  readonly reverse_voltage_v: number
}

/** A method with its equation and where it is from. */
export interface ReviewMethod {
  readonly id: string
  readonly equation: string
  readonly source: string
  readonly bias: string
  readonly validity: readonly {
    readonly input: string
    readonly low: number | null
    readonly high: number | null
    readonly unit: string
  }[]
}

export type ReviewTrendQuantity = Exclude<TrendQuantity, 'input' | 'inductance'>

/** Everything the review document shows. */
export interface ReviewResult {
  readonly rank: RankResult
  /** Null where the stage has no such axis (ambient with a fixed case). */
  readonly trends: Readonly<Record<ReviewTrendQuantity, TrendResult | null>>
  readonly waveforms: readonly EventWaveform[]
  readonly evidence: readonly EvidenceCurve[]
  readonly rows: readonly RowComparison[]
  readonly conventions: readonly ConventionFigure[]
  readonly ledger: readonly LedgerEntry[]
  readonly currents: readonly CurrentCheck[]
  readonly methods: readonly ReviewMethod[]
  readonly limits: { readonly junction_c: number | null; readonly voltage_use: number }
}
