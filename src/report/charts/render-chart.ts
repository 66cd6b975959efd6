import type { CandidateResult, Caution } from '../../domain/result.ts'
import type { AnyResult } from '../../domain/study.ts'
import { isRank, isSwap } from '../words/words.ts'
import { stackedBars } from './stacked-bars.ts'
import { renderTrendChart } from './trend-chart.ts'

/** The drawing of any result: bars of the losses for rank and swap, lines for a trend. */
export function renderChart(result: AnyResult): string {
  const { stage, cautions } = result
  if (isRank(result)) return lossBars(result.candidates, stage.title, 'losses', cautions)
  return isSwap(result) ? lossBars([result.from, result.to], stage.title, 'losses', cautions) : renderTrendChart(result)
}

/** The six rows of every part that has a temperature; rejected ones say so. */
export function lossBars(
  candidates: readonly CandidateResult[],
  title: string,
  idPrefix = 'losses',
  cautions: readonly Caution[] = [],
): string {
  const bars = candidates
    .filter(({ losses_w }) => losses_w.total !== null)
    .map(({ id, accepted, losses_w, interval_w }) => ({
      name: accepted ? id : `${id} (rejected)`,
      values: lossParts.map(([key]) => losses_w[key] ?? 0),
      low: interval_w?.low ?? null,
      high: interval_w?.high ?? null,
    }))
  const heading = title === '' ? 'Losses by part' : `Losses by part: ${title}`
  return `${stackedBars({ title: heading, axis: 'loss caused by the rectifier (W)', parts: lossParts.map(([, name]) => name), bars, idPrefix, cautions })}\n`
}

const lossParts = [
  ['conduction', 'conduction'],
  ['recovery_rectifier', 'recovery, rectifier'],
  ['recovery_switch', 'recovery, switch'],
  ['capacitive', 'capacitive'],
  ['leakage', 'leakage'],
  ['forward_recovery', 'forward recovery'],
] as const
