import { celsiusZero } from '../domain/constants.ts'
import type { SentenceData } from '../domain/result.ts'
import type { SwapResult } from '../domain/study.ts'
import { breakEvenReach } from './swap-break-even.ts'

/** The figures of a swap from which its grounds are read. */
type SwapFigures = Omit<
  SwapResult,
  'format' | 'tool' | 'seed' | 'draws' | 'inputs' | 'verdict_text' | 'because' | 'warnings' | 'cautions' | 'not_covered'
>

/** Why the verdict is what it is, most important first; worded in report/words. */
export function swapGrounds(figures: SwapFigures): SwapResult['because'] {
  const { from, to } = figures
  if (from.id === to.id) return [ground('same-part', {})]
  const grounds = [...rejectionGrounds(figures), ...savingGrounds(figures), ...frequencyGrounds(figures)]
  const { energy_kwh_per_year: energy, price_difference: price, runaway_ambient_c: runaway } = figures
  if (energy !== null) grounds.push(ground('yearly-energy', { energy }))
  if (price !== null) grounds.push(ground('price', { difference: price }))
  if (figures.junction_change_k !== null) grounds.push(ground('junction-change', { change: figures.junction_change_k }))
  if (figures.switch_junction_change_k !== null) {
    grounds.push(ground('switch-junction-change', { change: figures.switch_junction_change_k }))
  }
  // Above the junction limit that limit is reached first.
  if (to.class === 'schottky' && runaway !== null && runaway <= to.junction_limit_c)
    grounds.push(ground('runaway-edge', { ambient: runaway + celsiusZero }))
  if (to.voltage_margin !== null && from.voltage_margin !== null) {
    grounds.push(ground('voltage-margin', { margin: to.voltage_margin, before: from.voltage_margin }))
  }
  return grounds
}

type Ground = SwapResult['because'][number]

function ground(code: string, data: SentenceData): Ground {
  return { code, text: '', data }
}

function rejectionGrounds({ from, to }: SwapFigures): Ground[] {
  const grounds: Ground[] = []
  const codes = (reasons: SwapFigures['from']['reasons']): string =>
    reasons.map(({ code }) => code.replaceAll('-', ' ')).join(', ')
  if (!to.accepted) grounds.push(ground('to-rejected', { id: to.id, reasons: codes(to.reasons) }))
  if (!from.accepted) grounds.push(ground('from-rejected', { id: from.id, reasons: codes(from.reasons) }))
  return grounds
}

function savingGrounds({ saves_w, odds_better: odds, verdict }: SwapFigures): Ground[] {
  const { median, low, high } = saves_w
  if (median === null || low === null || high === null || odds === null) return []
  if (verdict === 'not-settled') return [ground('odds-not-settled', { saves: median, low, high, odds })]
  if (median > 0) return [ground('saves', { saves: median, low, high, odds })]
  return [ground('costs-more', { costs: -median, low: -high, high: -low, odds })]
}

function frequencyGrounds({ break_even_hz: frequency, stage, from, to, difference_w }: SwapFigures): Ground[] {
  if (difference_w.stage === null) return []
  if (frequency === null) {
    return [
      ground('no-break-even', { low: stage.frequency_hz / breakEvenReach, high: stage.frequency_hz * breakEvenReach }),
    ]
  }
  // Which part is cheaper at the stage's own frequency tells which side of the break-even that is.
  const cheaperHere = difference_w.stage < 0 ? to.id : from.id
  const cheaperAcross = difference_w.stage < 0 ? from.id : to.id
  return [ground('break-even', { frequency, cheaper: stage.frequency_hz < frequency ? cheaperHere : cheaperAcross })]
}
