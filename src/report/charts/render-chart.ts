import type { CandidateResult } from '../../domain/result.ts'
import type { AnyResult } from '../../domain/study.ts'
import { isRank, isSwap } from '../words/words.ts'
import { stackedBars } from './stacked-bars.ts'
import { renderTrendChart } from './trend-chart.ts'

/** The drawing of any result: bars of the losses for rank and swap, lines for a trend. */
export function renderChart(result: AnyResult): string {
  if (isRank(result)) return lossBars(result.candidates, result.stage.title)
  return isSwap(result) ? lossBars([result.from, result.to], result.stage.title) : renderTrendChart(result)
}

/** The six rows of every part that has a temperature; rejected ones say so. */
export function lossBars(candidates: readonly CandidateResult[], title: string, idPrefix = 'losses'): string {
  const bars = candidates
    .filter(({ losses_w }) => losses_w.total !== null)
    .map(({ id, accepted, losses_w, interval_w }) => ({
      name: accepted ? id : `${id} (rejected)`,
      values: lossParts.map(([key]) => losses_w[key] ?? 0),
      low: interval_w?.low ?? null,
      high: interval_w?.high ?? null,
    }))
  const heading = title === '' ? 'Losses by part' : `Losses by part: ${title}`
  return `${stackedBars({ title: heading, axis: 'loss caused by the rectifier (W)', parts: lossParts.map(([, name]) => name), bars, idPrefix })}\n`
}

const lossParts = [
  ['conduction', 'conduction'],
  ['recovery_rectifier', 'recovery, rectifier'],
  ['recovery_switch', 'recovery, switch'],
  ['capacitive', 'capacitive'],
  ['leakage', 'leakage'],
  ['forward_recovery', 'forward recovery'],
] as const
