import type { TrendCandidate, TrendResult } from '../../domain/study.ts'
import { type LineMark, lineChart } from '../charts/line-chart.ts'
import { isLogarithmic, trendSeries } from '../charts/trend-chart.ts'
import { axisTitle, limitWords, positionWords, trendAxes } from '../words/trend-words.ts'
import type { ReviewBlock } from './review-types.ts'

/** Marks a chart bears; all of them stand in the lists below it. */
const mostMarks = 5

export const stageLoss = (part: TrendCandidate): number | null => part.stage_loss_w
export const total = (part: TrendCandidate): number | null => part.total_w
export const junction = (part: TrendCandidate): number | null => part.junction_c
export const efficiency = (part: TrendCandidate): number | null =>
  part.efficiency === null ? null : part.efficiency * 100

/** One quantity of every traced part along the axis. */
export function trendFigure(
  trend: TrendResult,
  title: string,
  axis: string,
  value: (part: TrendCandidate) => number | null,
  marks: readonly LineMark[] = [],
): ReviewBlock {
  return drawn(trend, title, axis, trendSeries(trend, value), marks)
}

function drawn(
  trend: TrendResult,
  title: string,
  axis: string,
  series: ReturnType<typeof trendSeries>,
  marks: readonly LineMark[],
): ReviewBlock {
  const { name } = trendAxes[trend.over]
  const x = { title: axisTitle(trend.over), logarithmic: isLogarithmic(trend.points.map(({ at }) => at)) }
  const heading = `${title} against ${name}`
  const svg = lineChart({ title: heading, x, y: { title: axis }, series, marks, height: 330 + 15 * marks.length })
  return { kind: 'figure', svg, caption: `${heading}.` }
}

/** Rectifier's and switch's shares of turn-on of one part along the slope. */
export function sharesFigure(trend: TrendResult, id: string): ReviewBlock {
  const only = (name: string, value: (part: TrendCandidate) => number | null) => ({
    name,
    points: trendSeries(trend, value).find((series) => series.name === id)?.points ?? [],
  })
  const series = [
    only('recovery, rectifier', ({ losses_w }) => losses_w.recovery_rectifier),
    only('recovery, switch', ({ losses_w }) => losses_w.recovery_switch),
    only('overlap, switch', ({ turn_on_base_w }) => turn_on_base_w),
  ]
  return drawn(trend, `Shares of turn-on with ${id}`, 'loss (W)', series, [])
}

/** Crossings first, then limits. */
export function trendMarks(trend: TrendResult): LineMark[] {
  const { scale } = trendAxes[trend.over]
  const scaled = (value: number | null) => (value === null ? null : value * scale)
  const marks = [
    ...trend.crossings.map(({ at, low, high, from, to }) => ({
      x: at * scale,
      low: scaled(low),
      high: scaled(high),
      text: `${positionWords(trend.over, at)}: above it ${to} is cheaper than ${from}`,
    })),
    ...trend.limits.map((limit) => ({
      x: limit.at * scale,
      text: `${positionWords(trend.over, limit.at)}: ${limit.id} ${limitWords(trend, limit)}`,
    })),
  ]
  return marks.slice(0, mostMarks).toSorted((a, b) => a.x - b.x)
}
