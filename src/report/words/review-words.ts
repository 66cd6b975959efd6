import type { CandidateResult, RankResult } from '../../domain/result.ts'
import { celsius, odds, quantity, significant, withInterval } from '../format.ts'
import { lostWords } from './verdict-words.ts'

/** The decision in three sentences: what is cheapest and by how much, how sure, and what holds it or is still open. */
export function decisionSentences(result: RankResult): readonly [string, string, string] {
  const best = result.candidates.find(({ id }) => id === result.verdict.best)
  if (best === undefined) return nothing(result)
  return [cheapest(result, best), certainty(result, best), standing(result, best)]
}

function cheapest({ verdict }: RankResult, best: CandidateResult): string {
  const loss = quantity(best.stage_loss_w, 'W')
  const { gap_w: gap, gap_low_w: low, gap_high_w: high, runner_up: next } = verdict
  if (next === null) return `${best.id} is the only acceptable candidate: it costs the stage ${loss}${lostWords(best)}.`
  const lead = gap === null ? '' : `, ${withInterval(gap, low, high, 'W')} less than ${next}`
  return `${best.id} costs the stage least: ${loss}${lead}${lostWords(best)}.`
}

function certainty({ verdict }: RankResult, best: CandidateResult): string {
  const chance = oddsText(best)
  if (verdict.runner_up === null) return 'There is nothing to compare it with, so no odds are stated.'
  if (verdict.decided === null || chance === null) return 'How sure this order is was not computed.'
  if (verdict.decided) return `The order is decided: the odds that it is the cheapest are ${chance}.`
  const rivals = verdict.tied.filter((id) => id !== best.id)
  const named = rivals.length === 0 ? verdict.runner_up : rivals.join(', ')
  return `The order is not decided: the odds that it is the cheapest are ${chance}, and the data do not tell it from ${named}.`
}

function standing(result: RankResult, best: CandidateResult): string {
  const high = best.junction_high_c === null ? '' : ` (high ${celsius(best.junction_high_c)})`
  const margin =
    best.voltage_margin === null
      ? ''
      : ` and leaves ${significant(best.voltage_margin * 100)} % of its voltage rating free`
  return (
    `Its junction reaches ${celsius(best.junction_c)}${high} of the ${celsius(best.junction_limit_c)} allowed${margin}; ` +
    `${rejectedText(result)}, and ${openText(result)}.`
  )
}

function rejectedText({ candidates }: RankResult): string {
  const rejected = candidates.filter(({ accepted }) => !accepted).length
  return `${rejected} of ${candidates.length} candidates ${rejected === 1 ? 'is' : 'are'} rejected (section 6)`
}

function openText({ warnings }: RankResult): string {
  const count = warnings.length
  return `${count === 0 ? 'no warning stands' : count === 1 ? '1 warning stands' : `${count} warnings stand`} open (section 15)`
}

function nothing(result: RankResult): readonly [string, string, string] {
  return [
    'No candidate is acceptable.',
    `${capital(rejectedText(result))}, each with its reason.`,
    `Change the stage, its cooling or the candidates; ${openText(result)}.`,
  ]
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1)
}

function oddsText({ odds_best: chance, odds_error: error }: CandidateResult): string | null {
  if (chance === null) return null
  return error !== null && error >= 0.005 ? `${odds(chance)} (±${error.toFixed(2)})` : odds(chance)
}

/** How a figure came about, as the document says it. */
export const howWords = {
  given: 'given',
  converted: 'converted',
  extrapolated: 'extrapolated',
  'class-guess': 'class guess',
} as const

/** Keys of the result with a name and, where it is not a loss, its unit. */
export const figureWords: Readonly<Record<string, string>> = {
  'event.qrr_c': 'Qrr',
  'event.peak_reverse_a': 'I_RM',
  'event.trr_s': 'trr',
  forward_v: 'V_F hot',
  'losses_w.leakage': 'leakage loss',
  'losses_w.capacitive': 'capacitive loss',
}
