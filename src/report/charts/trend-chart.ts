import type { TrendCandidate, TrendResult } from '../../domain/study.ts'
import { axisTitle, limitWords, positionWords, trendAxes } from '../words/trend-words.ts'
import { cautionFoot } from './caution-foot.ts'
import { type LineMark, type LineSeries, lineChart } from './line-chart.ts'
import { drawing } from './svg.ts'

const mostMarks = 10
const panelHeight = 380

/** A trend as one self-contained drawing: stage loss with crossings and limits, junction, and what the quantity asks for. */
export function renderTrendChart(trend: TrendResult): string {
  const marks = trendMarks(trend)
  const panels = [
    panel(trend, 'Stage loss', 'stage loss (W)', ({ stage_loss_w }) => stage_loss_w, marks),
    panel(trend, 'Junction of the rectifier', 'junction (°C)', ({ junction_c }) => junction_c),
    ...(trend.over === 'load' ? [panel(trend, 'Efficiency', 'efficiency (%)', percent)] : []),
    ...(trend.over === 'slope_a_per_s' ? [sharesPanel(trend)] : []),
  ]
  let y = 0
  const placed = panels.map(({ markup, height }) => {
    const group = `<g transform="translate(0 ${y})">${markup}</g>`
    y += height
    return group
  })
  const title = trend.stage.title === '' ? 'Trend' : trend.stage.title
  const foot = cautionFoot(trend.cautions, y)
  const about = `Trend over ${trendAxes[trend.over].name}`
  return `${drawing(760, y + foot.height, title, about, ...placed, foot.markup)}\n`
}

function percent({ efficiency }: TrendCandidate): number | null {
  return efficiency === null ? null : efficiency * 100
}

interface Panel {
  readonly markup: string
  readonly height: number
}

function panel(
  trend: TrendResult,
  title: string,
  axis: string,
  value: (candidate: TrendCandidate) => number | null,
  marks: readonly LineMark[] = [],
): Panel {
  return drawn(trend, `${title} against ${trendAxes[trend.over].name}`, axis, trendSeries(trend, value), marks)
}

function drawn(
  trend: TrendResult,
  title: string,
  axis: string,
  series: readonly LineSeries[],
  marks: readonly LineMark[],
): Panel {
  const height = panelHeight + 15 * marks.length
  const x = { title: axisTitle(trend.over), logarithmic: isLogarithmic(trend.points.map(({ at }) => at)) }
  return { markup: lineChart({ title, x, y: { title: axis }, series, marks, height }), height }
}

/** One line a candidate, in the order of the first point; dashed where recovery is extrapolated far. */
export function trendSeries(trend: TrendResult, value: (candidate: TrendCandidate) => number | null): LineSeries[] {
  const names = trend.points[0]?.candidates.map(({ id }) => id) ?? []
  return names.map((name) => ({
    name,
    points: trend.points.map(({ at, candidates }) => {
      const candidate = candidates.find(({ id }) => id === name)
      return {
        x: at * trendAxes[trend.over].scale,
        y: candidate === undefined ? null : value(candidate),
        dashed: candidate?.extrapolated ?? false,
      }
    }),
  }))
}

/** Over the slope: what the rectifier's recovery and the overlap in the switch cost, for the part cheapest at the last point. */
function sharesPanel(trend: TrendResult): Panel {
  const last = trend.points[trend.points.length - 1]?.candidates ?? []
  const losses = last.filter(({ stage_loss_w }) => stage_loss_w !== null)
  const best = losses.toSorted((a, b) => a.stage_loss_w! - b.stage_loss_w!)[0]?.id ?? ''
  const only = (name: string, value: (candidate: TrendCandidate) => number | null) => ({
    name,
    points: trendSeries(trend, value).find((series) => series.name === best)?.points ?? [],
  })
  const series = [
    only('recovery, rectifier', ({ losses_w }) => losses_w.recovery_rectifier),
    only('recovery, switch', ({ losses_w }) => losses_w.recovery_switch),
    only('overlap, switch', ({ turn_on_base_w }) => turn_on_base_w),
  ]
  return drawn(trend, `Shares of turn-on with ${best}`, 'loss (W)', series, [])
}

/** Crossings of the cheapest first, then limits, as far as there is room; all of them stand in the tables. */
function trendMarks(trend: TrendResult): LineMark[] {
  const { scale } = trendAxes[trend.over]
  const scaled = (value: number | null) => (value === null ? null : value * scale)
  const crossings = trend.crossings.toSorted(
    (a, b) => rankOf(trend, a.from, a.at) - rankOf(trend, b.from, b.at) || a.at - b.at,
  )
  const marks = [
    ...crossings.map(({ at, low, high, from, to }) => ({
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

/** How many parts are cheaper than this one at the nearest point. */
function rankOf({ points }: TrendResult, id: string, at: number): number {
  const nearest = points.toSorted((a, b) => Math.abs(a.at - at) - Math.abs(b.at - at))[0]
  const own = nearest?.candidates.find((candidate) => candidate.id === id)?.stage_loss_w ?? Number.POSITIVE_INFINITY
  return nearest?.candidates.filter(({ stage_loss_w }) => stage_loss_w !== null && stage_loss_w < own).length ?? 0
}

/** Points spaced by a constant factor were asked for on a logarithmic axis. */
export function isLogarithmic(values: readonly number[]): boolean {
  const [first, second, third] = values
  if (first === undefined || second === undefined || third === undefined || first <= 0) return false
  const [factor, next] = [second / first, third / second]
  return Math.abs(factor - next) < 1e-6 * factor && Math.abs(second - first - (third - second)) > 1e-6 * second
}
