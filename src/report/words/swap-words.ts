import type { SwapResult } from '../../domain/study.ts'
import { odds, quantity, significant, withInterval } from '../format.ts'

/** Grounds of a swap's verdict: the codes of `because`, each with its sentence (pattern language: sentence.ts). */
export const swapBecauseCodes = [
  'same-part',
  'saves',
  'costs-more',
  'odds-not-settled',
  'to-rejected',
  'from-rejected',
  'break-even',
  'no-break-even',
  'yearly-energy',
  'price',
  'junction-change',
  'switch-junction-change',
  'runaway-edge',
  'voltage-margin',
] as const

export type SwapBecauseCode = (typeof swapBecauseCodes)[number]

export const swapBecauseWords: Readonly<Record<SwapBecauseCode, string>> = {
  'same-part': 'Both are the same part: nothing changes.',
  saves: 'It saves [{saves:W}|power][ ({low:W} to {high:W})][ with odds {odds:odds}].',
  'costs-more': 'It costs [{costs:W} more|more power][ ({low:W} to {high:W})][; odds that it saves {odds:odds}].',
  'odds-not-settled':
    'The saving is not distinguishable from nothing[: {saves:W}][ ({low:W} to {high:W})][, odds {odds:odds}]. Measure both parts at this point.',
  'to-rejected': 'The new part[ {id}] is not acceptable in this stage[: {reasons}].',
  'from-rejected': 'The part in use[ {id}] is itself not acceptable in this stage[: {reasons}].',
  'break-even': 'Break-even lies at [{frequency:Hz}|some frequency][: {cheaper} is cheaper below it].',
  'no-break-even': 'No frequency[ between {low:Hz} and {high:Hz}] makes the two equal.',
  'yearly-energy': 'Over the duty profile it [costs {costs:kWh} more|saves {energy:kWh}|changes the energy] a year.',
  price: 'The price difference is [{difference}|known][; nothing here weighs it against the saving].',
  'junction-change': 'The junction of the rectifier changes by [{change:K}|some kelvin].',
  'switch-junction-change': 'The junction of the switch changes by [{change:K}|some kelvin].',
  'runaway-edge':
    'At maximum leakage the new part runs away at [{ambient:degC}|some] ambient[; the stage is at {at:degC}].',
  'voltage-margin': 'The voltage margin of the new part is [{margin:%}|its own][, of the part in use {before:%}].',
}

/** The swap's verdict as a sentence. */
export function swapVerdictWords(result: SwapResult): string {
  const { from, to } = result
  if (from.id === to.id) return `${to.id} is the part in use already: the swap changes nothing.`
  const change = `Replacing ${from.id} by ${to.id}`
  const saving = savingWords(result)
  switch (result.verdict) {
    case 'justified':
      return from.accepted
        ? `${change} is justified: ${saving}${oddsWords(result)}.`
        : `${change} is justified: ${from.id} is not acceptable in this stage; ${saving}${oddsWords(result)}.`
    case 'not-justified':
      return to.accepted
        ? `${change} is not justified: ${saving}${oddsWords(result)}.`
        : `${change} is not justified: ${to.id} is not acceptable in this stage.`
    default:
      return `${change} is not settled: ${saving}${oddsWords(result)}. A measurement of both parts at this point would settle it.`
  }
}

function savingWords({ saves_w, difference_w }: SwapResult): string {
  const saves = saves_w.median ?? (difference_w.stage === null ? null : -difference_w.stage)
  if (saves === null) return 'no saving can be stated'
  const which = saves_w.median === null ? 'nominal' : 'median of the draws'
  if (saves >= 0) return `it saves ${withInterval(saves, saves_w.low, saves_w.high, 'W')} of stage loss (${which})`
  const turned = (value: number | null) => (value === null ? null : -value)
  return `it costs ${withInterval(-saves, turned(saves_w.high), turned(saves_w.low), 'W')} more stage loss (${which})`
}

function oddsWords({ odds_better, energy_kwh_per_year: energy }: SwapResult): string {
  const chance = odds_better === null ? '' : `, odds that it saves ${odds(odds_better)}`
  if (energy === null) return chance
  return `${chance}; ${energy >= 0 ? 'it saves' : 'it costs'} ${quantity(Math.abs(energy), 'kWh')} a year over the duty profile`
}

/** Price difference with its sign; currencies are not known. */
export function priceWords(difference: number): string {
  return `${difference > 0 ? '+' : ''}${significant(difference)}`
}
