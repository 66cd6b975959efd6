import type { CandidateResult, MeasureNext, RankResult } from '../../domain/result.ts'
import { celsius, odds, quantity, significant, withInterval } from '../format.ts'

/** The decision in one to three sentences: which part, by how much, how sure, and what to do next. */
export function verdictWords(result: RankResult): string {
  const { verdict } = result
  const best = result.candidates.find(({ id }) => id === verdict.best)
  if (best === undefined) return nothingAcceptable(result)
  const loss = quantity(best.stage_loss_w, 'W')
  if (verdict.runner_up === null)
    return `${best.id} is the only acceptable candidate, with ${loss} stage loss${lostWords(best)}. ${rejectedCount(result)}`.trim()
  if (verdict.decided === null)
    return `${best.id} is the cheapest by nominal figures: ${loss} stage loss, ${gap(result)}. How sure this is was not computed.`
  if (verdict.decided)
    return `${best.id} is the cheapest: ${loss} stage loss, ${gap(result)}; decided${withOdds(best)}${lostWords(best)}.`
  return `${undecided(result, best, loss)} ${advice(verdict.measure_next)}`.trim()
}

function undecided(result: RankResult, best: CandidateResult, loss: string): string {
  const others = result.verdict.tied.filter((id) => id !== best.id)
  const chance = best.odds_best === null ? '' : ` Its odds of being the cheapest are ${oddsText(best)}.`
  const rivals = others.length > 0 ? others : [result.verdict.runner_up!]
  return `Not decided: ${best.id} has the lowest stage loss, ${loss}, but is not distinguishable from ${list(rivals)}; it is ${gap(result)}${lostWords(best)}.${chance}`
}

function gap(result: RankResult): string {
  const { gap_w, gap_low_w, gap_high_w, runner_up } = result.verdict
  if (gap_w === null) return `ahead of ${runner_up}`
  return `${withInterval(gap_w, gap_low_w, gap_high_w, 'W')} below ${runner_up}`
}

function withOdds(best: CandidateResult): string {
  return best.odds_best === null ? '' : ` with odds ${oddsText(best)}`
}

/** Above this share of draws without a temperature a part is not simply the best. */
const muchLost = 0.05

/** What follows a part's loss where it may have no temperature: the loss holds for the other draws alone. */
export function lostWords({ thermal_lost_share: lost }: CandidateResult): string {
  return lost !== null && lost > muchLost
    ? `, but in ${significant(lost * 100, 2)} % of the draws it has no stable temperature`
    : ''
}

/** Odds with their standard error where it shows. */
function oddsText({ odds_best, odds_error }: CandidateResult): string {
  if (odds_best === null) return 'unknown'
  const text = odds(odds_best)
  return odds_error !== null && odds_error >= 0.005 ? `${text} (±${odds_error.toFixed(2)})` : text
}

/** Below this share of the variance a measurement settles nothing, and saying otherwise would send people to the bench in vain. */
const worthMeasuring = 0.1

function advice(next: readonly MeasureNext[] | null): string {
  const first = next?.[0]
  if (first === undefined) return ''
  return first.share >= worthMeasuring
    ? `To settle it, ${measureWords(first)}.`
    : 'No single measurement would settle it: what is left is the spread between units and of the stage. Take them as equal and choose by other grounds.'
}

/** One measurement as an order for the bench: "measure the recovery of X at 8 A, 350 A/µs and 110 °C (…)". */
export function measureWords(next: MeasureNext): string {
  const name = { recovery: 'the recovery', forward: 'the forward voltage', leakage: 'the leakage' }[next.property]
  const share = `should remove ${significant(next.share * 100, 2)} % of the variance of the gap`
  return `measure ${name} of ${next.id} at ${conditionWords(next)} (${share})`
}

function conditionWords({ property, current_a, slope_a_per_s, junction_c }: MeasureNext): string {
  if (property === 'leakage') return `the blocking voltage and ${celsius(junction_c)}`
  const slope = slope_a_per_s === null ? '' : `, ${quantity(slope_a_per_s, 'A/us')}`
  return `${quantity(current_a, 'A')}${slope} and ${celsius(junction_c)}`
}

function nothingAcceptable(result: RankResult): string {
  if (result.candidates.length === 0) return 'No candidate was given.'
  return `No candidate is acceptable. ${rejectedCount(result)} Change the stage, its cooling or the candidates.`
}

function rejectedCount(result: RankResult): string {
  const count = result.candidates.filter(({ accepted }) => !accepted).length
  if (count === 0) return ''
  return count === 1 ? 'One is rejected, with its reason.' : `${count} are rejected, each with its reason.`
}

/** So many names read as a sentence; of more the first are told, and how many more there are. */
const mostNames = 8

/** "A", "A and B", "A, B and C". */
function list(names: readonly string[]): string {
  if (names.length > mostNames) return `${names.slice(0, mostNames).join(', ')} and ${names.length - mostNames} more`
  if (names.length < 2) return names.join('')
  return `${names.slice(0, -1).join(', ')} and ${names[names.length - 1]}`
}
