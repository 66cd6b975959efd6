import { scaleLinear, scaleLog } from 'd3-scale'
import type { TrendResult } from '../../domain/study.ts'
import { significant } from '../format.ts'
import { textWidth, wrapText } from '../text-width.ts'
import { visible } from '../visible.ts'
import { axisTitle, trendAxes } from '../words/trend-words.ts'
import type { LineSeries } from './line-chart.ts'
import { isLogarithmic, trendSeries } from './trend-chart.ts'

const rows = 16
const letters = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz'

/**
 * Stage loss along a trend in characters: a letter per part, its small dot sign `·` between points, `*` where several
 * coincide, `^` under a crossing. Reads without colour; no line is wider than `width`.
 */
export function terminalChart(trend: TrendResult, width: number, colour: boolean): string {
  const series = trendSeries(trend, ({ stage_loss_w }) => stage_loss_w)
  const values = series.flatMap(({ points }) => points.flatMap(({ y }) => (y === null ? [] : [y])))
  if (values.length === 0) return 'No part has a stage loss anywhere along this trend.\n'
  const y = scaleLinear([Math.min(...values), Math.max(...values)], [rows - 1, 0]).nice(4)
  const ticks = y.ticks(4)
  const labels = ticks.map((tick) => significant(tick))
  const margin = Math.max(...labels.map(textWidth)) + 2
  const columns = Math.max(8, width - margin)
  const x = horizontalScale(trend, columns)
  const field = drawField(series, x, (value) => Math.round(y(value)), columns)
  const lines = field.map((cells, row) => {
    const index = ticks.findIndex((tick) => Math.round(y(tick)) === row)
    return `${(labels[index] ?? '').padStart(margin - 2)} ${index < 0 ? '│' : '┤'}${paintRow(cells, colour)}`
  })
  const { scale } = trendAxes[trend.over]
  return [
    ...wrapText(`stage loss (W) against ${axisTitle(trend.over)}`, width),
    ...lines,
    `${' '.repeat(margin - 1)}└${axisLine(trend, x, scale, columns)}`,
    `${' '.repeat(margin)}${endLabels(trend, scale, columns)}`,
    ...legend(series, trend, width),
    '',
  ]
    .map((line) => line.trimEnd())
    .join('\n')
}

function horizontalScale(trend: TrendResult, columns: number): (value: number) => number {
  const { scale } = trendAxes[trend.over]
  const at = trend.points.map((point) => point.at * scale)
  const extent = [at[0]!, at[at.length - 1]!]
  const place = isLogarithmic(at) ? scaleLog(extent, [0, columns - 1]) : scaleLinear(extent, [0, columns - 1])
  return (value) => Math.min(columns - 1, Math.max(0, Math.round(place(value))))
}

/** Index of the series in each cell; -1 empty, -2 several. */
function drawField(
  series: readonly LineSeries[],
  x: (value: number) => number,
  y: (value: number) => number,
  columns: number,
): number[][] {
  const field = Array.from({ length: rows }, () => Array<number>(columns).fill(-1))
  series.forEach(({ points }, index) => {
    for (let point = 0; point < points.length; point++) {
      const { x: at, y: value } = points[point]!
      if (value === null) continue
      const next = points[point + 1]
      const until = next?.y == null ? at : next.x
      for (let column = x(at); column <= Math.max(x(at), x(until) - 1); column++) {
        const share = x(until) === x(at) ? 0 : (column - x(at)) / (x(until) - x(at))
        const row = y(value + share * ((next?.y ?? value) - value))
        const cells = field[row]!
        cells[column] = cells[column] === -1 || cells[column] === index ? index : -2
      }
    }
  })
  return field
}

function paintRow(cells: readonly number[], colour: boolean): string {
  return cells
    .map((index) => {
      if (index === -1) return ' '
      if (index === -2) return '*'
      const letter = letters[index % letters.length]!
      return colour ? `\u001B[${31 + (index % 6)}m${letter}\u001B[0m` : letter
    })
    .join('')
    .trimEnd()
}

function axisLine(trend: TrendResult, x: (value: number) => number, scale: number, columns: number): string {
  const cells = Array<string>(columns).fill('─')
  for (const { at } of trend.crossings) cells[x(at * scale)] = '^'
  return cells.join('')
}

function endLabels(trend: TrendResult, scale: number, columns: number): string {
  const first = significant(trend.points[0]!.at * scale)
  const last = significant(trend.points[trend.points.length - 1]!.at * scale)
  return first + last.padStart(Math.max(last.length + 1, columns - first.length))
}

function legend(series: readonly LineSeries[], trend: TrendResult, width: number): string[] {
  const items = series.map(({ name }, index) => `${letters[index % letters.length]} ${visible(name)}`)
  const signs = trend.crossings.length > 0 ? ['* several', '^ crossing'] : ['* several']
  return wrapText([...items, ...signs].map((item) => item.replaceAll(' ', '\u00A0')).join(', '), width).map((line) =>
    line.replaceAll('\u00A0', ' '),
  )
}
