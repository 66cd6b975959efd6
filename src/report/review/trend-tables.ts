import type { SlopeStudy, TrendCandidate, TrendResult } from '../../domain/study.ts'
import { decimalsFor, fixed, quantity } from '../format.ts'
import { type ColumnSpec, numberColumn, tableOf } from '../table-view.ts'
import { edgeWords, limitWords, positionWords, trendAxes } from '../words/trend-words.ts'
import { type ReviewBlock, type TableBlock, tableBlock } from './review-types.ts'

type Point = TrendResult['points'][number]

/** One figure of every traced part at every point of the axis. */
export function pointsTable(
  trend: TrendResult,
  heading: string,
  unit: string,
  value: (part: TrendCandidate) => number | null,
  decimals?: number,
): TableBlock {
  const { name, unit: axisUnit, scale } = trendAxes[trend.over]
  const names = trend.points[0]?.candidates.map(({ id }) => id) ?? []
  const axis: ColumnSpec<Point> = numberColumn(name, axisUnit, 'axis', ({ at }) => at, { scale, key: true })
  const columns = names.map((id) => partColumn(trend, id, unit, value, decimals))
  return tableBlock(heading, tableOf([axis, ...columns], trend.points), {
    long: true,
    note: 'In parentheses: the part is not acceptable there. None: it has no stable temperature.',
  })
}

function partColumn(
  { points }: TrendResult,
  id: string,
  unit: string,
  value: (part: TrendCandidate) => number | null,
  decimals?: number,
): ColumnSpec<Point> {
  const find = (point: Point) => point.candidates.find((candidate) => candidate.id === id)
  const read = (point: Point) => {
    const part = find(point)
    return part === undefined ? null : value(part)
  }
  const places = decimals ?? decimalsFor(points.map(read))
  return numberColumn(id, unit, id, read, {
    decimals: places,
    words: (point) => {
      const part = find(point)
      if (part === undefined || part.thermal === 'none') return 'none'
      const number = read(point)
      return part.accepted || number === null ? null : `(${fixed(number, places)})`
    },
  })
}

export function crossingsList({ over, crossings, draws }: TrendResult): ReviewBlock {
  const interval = (low: number | null, high: number | null) =>
    low === null || high === null
      ? ''
      : ` (${positionWords(over, low)} to ${positionWords(over, high)}, ${draws} draws)`
  const items = crossings.map(({ at, low, high, from, to }) => ({
    lead: positionWords(over, at),
    text: `${from} costs the stage less below, ${to} above${interval(low, high)}.`,
  }))
  return items.length === 0
    ? { kind: 'text', text: 'No two acceptable parts exchange their order within this range.' }
    : { kind: 'list', heading: `Crossings along ${trendAxes[over].name}`, tone: 'plain', items }
}

export function limitsList(trend: TrendResult): ReviewBlock {
  const items = trend.limits.map((limit) => ({
    lead: positionWords(trend.over, limit.at),
    text: `${limit.id} ${limitWords(trend, limit)}.`,
  }))
  return items.length === 0
    ? { kind: 'text', text: 'No part meets a limit within this range.' }
    : { kind: 'list', heading: `Limits along ${trendAxes[trend.over].name}`, tone: 'plain', items }
}

export function slopeItem(study: SlopeStudy): { readonly lead: string; readonly text: string } {
  const slope = (value: number) => quantity(value, 'A/us')
  const { knee_a_per_s: knee, largest_a_per_s: largest, optimum_a_per_s: optimum, gain_w: gain } = study
  const because = edgeWords(study.largest_because)
  const sentences = [
    largest === null
      ? `Not admissible at the lowest slope looked at, because of ${because}.`
      : `Largest admissible slope ${slope(largest)}, set by ${because}.`,
    knee === null ? '' : `Knee at ${slope(knee)}: above it at most 5 % is left to gain.`,
    gain === null
      ? ''
      : `Going from the slope of the stage to the largest ${gain >= 0 ? `saves ${quantity(gain, 'W')}` : `costs ${quantity(-gain, 'W')}`}.`,
    optimum === null ? '' : `Least loss at ${slope(optimum)}, because of ${edgeWords(study.optimum_because ?? '')}.`,
  ]
  return { lead: study.id, text: sentences.filter(Boolean).join(' ') }
}
