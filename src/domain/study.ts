import type { CandidateResult, Caution, DocumentHead, RankResult, StageResult, Verdict, Warning } from './result.ts'

/** What every study needs beside stage and records: the outside world as plain values. */
export interface StudySettings {
  readonly seed: number
  readonly draws: number
  /** At most so many candidates are listed and drawn; left out: 50. */
  readonly top?: number
  /** Version of the tool, printed in every document. */
  readonly version: string
  /** Every file read, path as reached from the stage file, sorted. */
  readonly inputs: readonly { readonly path: string; readonly sha256: string }[]
  /** Tables of parts, with how many of their rows could be read. */
  readonly tables?: readonly TableCount[]
}

/** Rows of a table of parts. */
export interface TableCount {
  readonly path: string
  readonly rows: number
  readonly used: number
  readonly leftOut: number
}

/** Quantities a trend can run over; the unit is in the name. */
export type TrendQuantity = 'frequency' | 'load' | 'slope' | 'ambient' | 'input' | 'inductance'
export type TrendKey = 'frequency_hz' | 'load' | 'slope_a_per_s' | 'ambient_c' | 'input_v' | 'inductance_h'

/** SI; ambient in kelvin; load as share of full output. */
export interface TrendRequest {
  readonly over: TrendQuantity
  readonly from: number
  readonly to: number
  readonly steps: number
  readonly logarithmic: boolean
}

export interface TrendCandidate {
  readonly id: string
  readonly total_w: number | null
  readonly stage_loss_w: number | null
  readonly junction_c: number | null
  readonly switch_junction_c: number | null
  readonly thermal: 'settled' | 'over-limit' | 'none'
  readonly efficiency: number | null
  readonly accepted: boolean
  readonly mode: 'continuous' | 'boundary' | 'discontinuous' | null
  readonly voltage_margin: number | null
  readonly peak_reverse_v: number | null
  readonly losses_w: CandidateResult['losses_w']
  readonly turn_on_base_w: number | null
  /** Recovery is read further than a factor 3 from any row of the record here. */
  readonly extrapolated: boolean
}

export interface Crossing {
  readonly at: number
  readonly low: number | null
  readonly high: number | null
  /** The cheaper part below the crossing. */
  readonly from: string
  readonly to: string
}

export interface SlopeStudy {
  readonly id: string
  /** Smallest slope within 5 % of the total at the largest admissible slope. */
  readonly knee_a_per_s: number | null
  readonly largest_a_per_s: number | null
  /** What sets it: voltage | loop | saturation | temperature | range. */
  readonly largest_because: string
  /** Watts saved from the stage's slope to the largest admissible one. */
  readonly gain_w: number | null
  readonly optimum_a_per_s: number | null
  /** temperature | evidence | null */
  readonly optimum_because: string | null
}

/** Result of `trend`. */
export interface TrendResult extends DocumentHead {
  readonly over: TrendKey
  readonly stage: StageResult
  readonly points: readonly { readonly at: number; readonly candidates: readonly TrendCandidate[] }[]
  readonly crossings: readonly Crossing[]
  readonly limits: readonly { readonly id: string; readonly at: number; readonly why: string }[]
  readonly slope: readonly SlopeStudy[] | null
  readonly warnings: readonly Warning[]
  readonly cautions: readonly Caution[]
  readonly not_covered: readonly string[]
}

/** One load of the duty profile for both parts of a swap. */
export interface SwapLoad {
  readonly load: number
  readonly hours: number | null
  readonly from_efficiency: number | null
  readonly to_efficiency: number | null
  readonly saves_w: number | null
}

/** Result of `swap`. difference = to − from; saves = from − to. */
export interface SwapResult extends DocumentHead {
  readonly stage: StageResult
  readonly from: CandidateResult
  readonly to: CandidateResult
  readonly difference_w: {
    readonly conduction: number | null
    readonly recovery_rectifier: number | null
    readonly recovery_switch: number | null
    readonly capacitive: number | null
    readonly leakage: number | null
    readonly forward_recovery: number | null
    readonly total: number | null
    readonly stage: number | null
  }
  readonly saves_w: { readonly median: number | null; readonly low: number | null; readonly high: number | null }
  readonly odds_better: number | null
  readonly break_even_hz: number | null
  readonly energy_kwh_per_year: number | null
  readonly junction_change_k: number | null
  readonly switch_junction_change_k: number | null
  readonly price_difference: number | null
  /** Ambient at which the `to` part runs away at maximum leakage. */
  readonly runaway_ambient_c: number | null
  readonly loads: readonly SwapLoad[]
  /** justified | not-justified | not-settled */
  readonly verdict: string
  readonly verdict_text: string
  readonly because: readonly {
    readonly code: string
    text: string
    readonly data: Readonly<Record<string, string | number>>
  }[]
  readonly warnings: readonly Warning[]
  readonly cautions: readonly Caution[]
  readonly not_covered: readonly string[]
}

export type AnyResult = RankResult | TrendResult | SwapResult
export type { Verdict }
