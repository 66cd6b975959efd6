import { type CaveatCode, caveatCodes } from '../../domain/caveat.ts'
import type { CandidateResult, Caution, RankResult, SentenceData, Warning } from '../../domain/result.ts'
import type { AnyResult, SwapResult } from '../../domain/study.ts'
import { visible } from '../visible.ts'
import { cautionWords } from './caution-words.ts'
import { notCoveredWords } from './not-covered-words.ts'
import { reasonWords } from './reason-words.ts'
import { sentence, spokenCode } from './sentence.ts'
import { swapBecauseWords, swapVerdictWords } from './swap-words.ts'
import { verdictWords } from './verdict-words.ts'
import { warningWords } from './warning-words.ts'

/**
 * Fills the text fields of a result: reasons, warnings, cautions, verdict and what is not covered.
 * The document itself is filled and returned, so both uses work. Words of a document already filled do not change.
 */
export function words<R extends AnyResult>(result: R): R {
  for (const candidate of candidatesOf(result)) fillReasons(candidate)
  for (const warning of result.warnings) warning.text = warningText(warning)
  for (const caution of result.cautions) caution.text = cautionText(caution)
  const uncovered = result.not_covered as string[]
  uncovered.forEach((entry, index) => {
    uncovered[index] = notCoveredText(entry)
  })
  if (isRank(result)) result.verdict.text = verdictWords(result)
  if (isSwap(result)) fillSwap(result)
  return result
}

export function isRank(result: AnyResult): result is RankResult {
  return 'candidates' in result
}

export function isSwap(result: AnyResult): result is SwapResult {
  return 'from' in result && 'to' in result
}

export function warningText({ code, data }: Pick<Warning, 'code' | 'data'>): string {
  const named = typeof data.figure === 'string' ? { ...data, figure: figureNames[data.figure] ?? data.figure } : data
  return worded(isCaveat(code) ? warningWords : {}, code, named)
}

/** Keys of the document as an engineer calls them. */
const figureNames: Readonly<Record<string, string>> = {
  'event.qrr_c': 'Qrr',
  event: 'The recovery',
  'event.peak_reverse_a': 'I_RM',
  'losses_w.conduction': 'The forward voltage',
  forward_v: 'The forward voltage',
  'losses_w.leakage': 'The leakage',
  'losses_w.capacitive': 'The capacitance',
}

function isCaveat(code: string): code is CaveatCode {
  return (caveatCodes as readonly string[]).includes(code)
}

export function cautionText({ code, data }: Pick<Caution, 'code' | 'data'>): string {
  // a capacitor that never exceeds the limit has nothing to discharge to
  const never = code === 'bulk-capacitor' && data.time === 0
  return worded(cautionWords, code, { until: 60, ...data, ...(never ? { below: data.until ?? 60 } : {}) })
}

function notCoveredText(entry: string): string {
  return Object.hasOwn(notCoveredWords, entry) ? notCoveredWords[entry]! : entry
}

function worded(table: Readonly<Record<string, string>>, code: string, data: SentenceData): string {
  const text = visible(Object.hasOwn(table, code) ? sentence(table[code]!, data) : spokenCode(code))
  return text.charAt(0).toUpperCase() + text.slice(1)
}

function candidatesOf(result: AnyResult): readonly CandidateResult[] {
  if (isRank(result)) return result.candidates
  return isSwap(result) ? [result.from, result.to] : []
}

function fillReasons(candidate: CandidateResult): void {
  for (const reason of candidate.reasons) {
    const numbers = { value: reason.value, limit: reason.limit }
    const data = Object.fromEntries(Object.entries(numbers).filter(([, value]) => value !== null)) as SentenceData
    reason.text = worded(reasonWords, reason.code, data)
  }
}

function fillSwap(result: SwapResult): void {
  const open = result as { -readonly [Key in keyof SwapResult]: SwapResult[Key] }
  open.verdict_text = swapVerdictWords(result)
  for (const ground of result.because) {
    const { energy } = ground.data
    const costs = ground.code === 'yearly-energy' && typeof energy === 'number' && energy < 0
    ground.text = worded(swapBecauseWords, ground.code, costs ? { costs: -energy } : ground.data)
  }
}
