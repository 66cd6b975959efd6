import type { SentenceData } from './result.ts'

/**
 * Everything a reviewer must know although the result stands. Closed set: report/words/warning-words.ts words
 * each code, and the compiler refuses a code without wording.
 */
export const caveatCodes = [
  // evidence: the record against itself
  'row-impossible',
  'row-inconsistent',
  'rows-contradict',
  'hot-below-cold',
  'maximum-below-typical',
  'charge-computed',
  'implausible-for-class',
  'row-condition-assumed',
  'row-junction-assumed',
  'trr-definition-unknown',
  'typical-only',
  'maximum-only',
  'recovery-guess',
  'forward-guess',
  'leakage-assumed',
  'capacitance-missing',
  'capacitance-share',
  'evidence-falls',
  'softness-unknown',
  'snappy',
  'extrapolated-far',
  'thermal-assumed',
  // stage: the operating point
  'overshoot-not-included',
  'slope-limited',
  'switch-saturates',
  'peak-current-unchecked',
  'loop-energy',
  'idle-too-short',
  'mode-boundary',
  'recovery-share-of-interval',
  'forward-chord',
  'switch-temperature-assumed',
  'switch-over-limit',
  'turn-on-contains-recovery',
  'turn-on-unknown',
  'turn-on-floor',
  'turn-on-rectifier-missing',
  'incumbent-missing',
  'negative-valley',
  'implausible-stage',
  // decision
  'order-by-total-differs',
  'order-differs-at-mains',
  'order-differs-at-load',
  'thermal-lost',
  'profile-unsettled',
  'odds-beyond-list',
  // input
  'table-rows-left-out',
] as const

export type CaveatCode = (typeof caveatCodes)[number]

/** One caveat: code, the part it concerns ("" for the stage), and the numbers of its sentence (SI). */
export interface Caveat {
  readonly code: CaveatCode
  readonly candidate: string
  readonly data: SentenceData
}
