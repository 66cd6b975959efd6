/**
 * The result document: the public contract of INTERFACE, keys carry their unit.
 * This is the edge: temperatures in keys ending `_c` are in degrees Celsius, everything else is plain SI.
 */
import type { RectifierClass } from './rectifier.ts'
import type { AssumedInput, ConductionMode, StageKind } from './stage.ts'

export type EvidenceGrade = 'A' | 'B' | 'C' | 'D'
export type ThermalOutcome = 'settled' | 'over-limit' | 'none'
/** Data of a sentence that report/words will write. */
export type SentenceData = Readonly<Record<string, string | number>>

export interface Reason {
  readonly code: string
  text: string
  readonly value: number | null
  readonly limit: number | null
}
export interface Warning {
  readonly code: string
  /** Id of the part, or "" for the stage. */
  readonly candidate: string
  text: string
  readonly data: SentenceData
}
export interface Caution {
  readonly code: string
  text: string
  readonly data: SentenceData
}

export interface PointResult {
  readonly duty: number
  readonly mean_a: number
  readonly ripple_a: number
  readonly valley_a: number
  readonly peak_a: number
  readonly mode: ConductionMode
}

export interface EventResult {
  readonly current_a: number
  readonly slope_a_per_s: number
  readonly blocking_v: number
  readonly junction_c: number
  readonly tau_s: number | null
  readonly tau_rr_s: number | null
  readonly stored_c: number
  readonly peak_reverse_a: number
  readonly ta_s: number
  readonly trr_s: number
  readonly qrr_c: number
  readonly softness: number | null
  readonly rectifier_j: number
  readonly switch_added_j: number
  readonly base_j: number
  readonly peak_reverse_v: number
  readonly none: string | null
}

export interface LossesResult {
  readonly conduction: number | null
  readonly recovery_rectifier: number | null
  readonly recovery_switch: number | null
  readonly capacitive: number | null
  readonly leakage: number | null
  readonly forward_recovery: number | null
  readonly total: number | null
}

export interface Provenance {
  readonly figure: string
  readonly how: 'given' | 'converted' | 'extrapolated' | 'class-guess'
  readonly from: string
  readonly factor: number | null
}

export interface CandidateResult {
  readonly id: string
  rank: number | null
  readonly accepted: boolean
  readonly reasons: Reason[]
  readonly class: RectifierClass
  readonly title: string | null
  readonly price: number | null
  readonly evidence: EvidenceGrade
  /** Which figures are guesses, where the grade is D. */
  readonly evidence_because: string | null
  readonly point: PointResult | null
  readonly event: EventResult | null
  readonly event_maximum: EventResult | null
  readonly forward_v: number | null
  readonly losses_w: LossesResult
  readonly interval_w: { readonly low: number; readonly high: number; readonly level: number } | null
  readonly odds_best: number | null
  readonly odds_error: number | null
  readonly thermal_lost_share: number | null
  readonly junction_c: number | null
  readonly junction_high_c: number | null
  readonly junction_limit_c: number
  readonly thermal: ThermalOutcome
  readonly ambient_margin_k: number | null
  readonly voltage_margin: number | null
  readonly efficiency: number | null
  readonly stage_loss_w: number | null
  readonly switch: {
    readonly conduction_w: number | null
    readonly turn_on_base_w: number | null
    readonly turn_off_w: number | null
    readonly stored_w: number | null
    readonly junction_c: number | null
  }
  readonly inductor_w: number | null
  readonly snubber_w: number
  readonly fixed_w: number
  readonly at_mains:
    | readonly {
        readonly mains_v: number
        readonly total_w: number | null
        readonly stage_loss_w: number | null
        readonly junction_c: number | null
        readonly thermal: ThermalOutcome
      }[]
    | null
  readonly line: { readonly continuous_share: number } | null
  readonly weighted_w: number | null
  readonly energy_kwh_per_year: number | null
  readonly provenance: readonly Provenance[]
}

export interface MeasureNext {
  readonly id: string
  readonly property: 'recovery' | 'forward' | 'leakage'
  readonly current_a: number
  readonly slope_a_per_s: number | null
  readonly junction_c: number
  /** Expected share of the gap's variance that such a row removes. */
  readonly share: number
}

export interface Verdict {
  readonly best: string | null
  readonly decided: boolean | null
  readonly tied: readonly string[]
  readonly runner_up: string | null
  readonly gap_w: number | null
  readonly gap_low_w: number | null
  readonly gap_high_w: number | null
  text: string
  readonly sensitivity: readonly { readonly input: string; readonly share: number }[] | null
  readonly measure_next: readonly MeasureNext[] | null
}

export interface StageResult {
  readonly kind: StageKind
  readonly title: string
  readonly frequency_hz: number
  readonly input_v: number
  readonly output_v: number
  readonly output_w: number
  readonly blocking_v: number
  readonly mode: ConductionMode | null
  readonly slope_a_per_s: number
  readonly loss_model: string
  readonly assumed: readonly AssumedInput[]
}

export interface DocumentHead {
  readonly format: 1
  readonly tool: { readonly name: 'ebbwatt'; readonly version: string }
  readonly seed: number
  readonly draws: number
  readonly inputs: readonly { readonly path: string; readonly sha256: string }[]
}

/** What became of the parts that a ranking of very many does not list. */
export interface NotListed {
  readonly count: number
  /** Their stage loss is above that of the last one listed; they were not judged further. */
  readonly costlier: number
  /** Each part once, under the first rule it was found to break. */
  readonly rejected: readonly { readonly code: string; readonly count: number }[]
}

/** Result of `rank`. */
export interface RankResult extends DocumentHead {
  readonly stage: StageResult
  readonly candidates: readonly CandidateResult[]
  /** Null where all candidates are listed. */
  readonly not_listed: NotListed | null
  readonly verdict: Verdict
  readonly warnings: readonly Warning[]
  readonly cautions: readonly Caution[]
  readonly not_covered: readonly string[]
}
