import { line } from 'd3-shape'
import type { Caution } from '../../domain/result.ts'
import { type Axis, type AxisSpec, type Box, makeAxis } from './axis.ts'
import { cautionFoot } from './caution-foot.ts'
import { colourOf, marker } from './palette.ts'
import { placeLabels } from './place-labels.ts'
import { drawing, element, fittingText, ink, label, labelWidth, pixels } from './svg.ts'

interface LinePoint {
  readonly x: number
  /** Null interrupts the line. */
  readonly y: number | null
  /** Beyond the data: drawn dashed. */
  readonly dashed?: boolean
}

export interface LineSeries {
  readonly name: string
  readonly points: readonly LinePoint[]
  /** Colour and marker; the position in the list when left out. */
  readonly style?: number
}

/** A vertical mark: a crossing (with its interval) or a limit. */
export interface LineMark {
  readonly x: number
  readonly low?: number | null
  readonly high?: number | null
  readonly text: string
}

export interface LineChartData {
  readonly title: string
  readonly x: AxisSpec
  readonly y: AxisSpec
  readonly series: readonly LineSeries[]
  readonly marks?: readonly LineMark[]
  /** Points given by a source, drawn as open rings apart from what was computed. */
  readonly given?: readonly { readonly x: number; readonly y: number; readonly text: string }[]
  readonly width?: number
  readonly height?: number
  /** Told below, where the drawing may leave its document. */
  readonly cautions?: readonly Caution[]
}

/** Lines over a linear or logarithmic axis, each named at its end; marks stand in numbered columns above. */
export function lineChart(data: LineChartData): string {
  const width = data.width ?? 760
  const names = Math.min(width * 0.35, Math.max(30, ...data.series.map(({ name }) => labelWidth(name, 11) + 14)))
  const marks = data.marks ?? []
  const dashed = data.series.some(({ points }) => points.some((point) => point.dashed === true))
  const box: Box = {
    left: 64,
    top: 40 + 15 * marks.length,
    right: width - names - 14,
    bottom: (data.height ?? 420) - 50,
  }
  const x = makeAxis('x', data.x, allX(data), box)
  const y = makeAxis('y', data.y, allY(data), box)
  const ends = data.series.map((series, index) => endOf(series, index, x, y))
  const bodies = data.series.map((series, index) => seriesMarkup(series, index, x, y))
  const rings = (data.given ?? []).map((point) => ring(x.place(point.x), y.place(point.y), point.text))
  const foot = cautionFoot(data.cautions ?? [], data.height ?? 420)
  return drawing(
    width,
    (data.height ?? 420) + foot.height,
    data.title,
    `${data.y.title} against ${data.x.title} for ${data.series.map(({ name }) => name).join(', ')}`,
    label(12, 22, fittingText(data.title, width - 24, 14), { bold: true, size: 14 }),
    ...(dashed ? [label(width - 12, 22, 'dashed: read far beyond the data', { size: 11, anchor: 'end' })] : []),
    x.markup,
    y.markup,
    ...marks.map((mark, row) => markLine(mark, row, x, box)),
    ...marks.map((mark, row) => markLabel(mark, row, x, box, width)),
    ...bodies,
    ...rings,
    ...nameLabels(data.series, ends, box),
    foot.markup,
  )
}

function allX({ series, marks = [] }: LineChartData): number[] {
  return [
    ...series.flatMap(({ points }) => points.map(({ x }) => x)),
    ...(series.length === 0 ? marks.map(({ x }) => x) : []),
  ]
}

function allY({ series, given = [] }: LineChartData): number[] {
  const lines = series.flatMap(({ points }) => points.flatMap(({ y }) => (y === null ? [] : [y])))
  return [...lines, ...given.map(({ y }) => y)]
}

function seriesMarkup(series: LineSeries, index: number, x: Axis, y: Axis): string {
  const style = series.style ?? index
  const colour = colourOf(style)
  const path = (dashed: boolean) => {
    const draw = line<LinePoint>(
      (point) => x.place(point.x),
      (point) => y.place(point.y ?? 0),
    )
    draw.digits(2).defined((point) => point.y !== null && Number.isFinite(point.y))
    return strokes(series.points, dashed)
      .map((points) => draw(points))
      .filter((d): d is string => d !== null && d !== '')
      .map((d) =>
        element('path', {
          d,
          fill: 'none',
          stroke: colour,
          'stroke-width': 2,
          'stroke-dasharray': dashed ? '5 4' : undefined,
        }),
      )
      .join('')
  }
  return path(false) + path(true) + sparseMarkers(series, style, colour, x, y)
}

/** Runs of points whose stretch to the next is dashed or not; neighbouring runs share their point. */
function strokes(points: readonly LinePoint[], dashed: boolean): LinePoint[][] {
  const runs: LinePoint[][] = []
  let run: LinePoint[] = []
  for (let index = 0; index + 1 < points.length; index++) {
    const [from, to] = [points[index]!, points[index + 1]!]
    if ((from.dashed === true || to.dashed === true) !== dashed) {
      if (run.length > 0) runs.push(run)
      run = []
      continue
    }
    if (run.length === 0) run.push(from)
    run.push(to)
  }
  return run.length > 0 ? [...runs, run] : runs
}

/** A marker every few points, shifted by series so that coinciding lines stay apart. */
function sparseMarkers({ points }: LineSeries, style: number, colour: string, x: Axis, y: Axis): string {
  const drawn = points.filter((point) => point.y !== null)
  const every = Math.max(1, Math.floor(drawn.length / 6))
  return drawn
    .filter((_, index) => (index + style) % every === 0)
    .map((point) => marker(style, x.place(point.x), y.place(point.y!), colour))
    .join('')
}

function endOf({ points, style }: LineSeries, index: number, x: Axis, y: Axis) {
  const last = points.findLast((point) => point.y !== null)
  return last === undefined ? null : { x: x.place(last.x), y: y.place(last.y!), style: style ?? index }
}

function nameLabels(series: readonly LineSeries[], ends: readonly ReturnType<typeof endOf>[], box: Box): string[] {
  const places = placeLabels(
    ends.map((end) => (end === null ? null : end.y)),
    13,
    box.top,
    box.bottom,
  )
  return series.flatMap(({ name }, index) => {
    const end = ends[index]!
    if (end === null) return []
    const place = places[index]!
    const colour = colourOf(end.style)
    const leader = `M${pixels(end.x)} ${pixels(end.y)}L${pixels(box.right + 6)} ${pixels(place)}`
    return [
      element('path', { d: leader, stroke: colour, 'stroke-width': 0.9, 'stroke-dasharray': '1 3', fill: 'none' }),
      marker(end.style, box.right + 10, place, colour, 28),
      label(box.right + 18, place + 4, name, { size: 11, fill: colour, rim: true }),
    ]
  })
}

/** The dotted lines and intervals of all marks; drawn first, so that no label is crossed by a line. */
function markLine(mark: LineMark, row: number, x: Axis, box: Box): string {
  const at = x.place(mark.x)
  const y = markHeight(row)
  const line = { x1: at, x2: at, y1: y, y2: box.bottom, class: 'chart-ink', stroke: ink, 'stroke-dasharray': '1 3' }
  if (mark.low == null || mark.high == null) return element('line', line)
  const d = `M${pixels(inside(x.place(mark.low), box))} ${y}H${pixels(inside(x.place(mark.high), box))}`
  const interval = { d, class: 'chart-ink', stroke: ink, 'stroke-width': 3, 'stroke-opacity': 0.45 }
  return element('line', line) + element('path', interval)
}

/** Dot and label, on the right of the line, else on the left, else where it fits: each mark has a row of its own. */
function markLabel(mark: LineMark, row: number, x: Axis, box: Box, width: number): string {
  const at = x.place(mark.x)
  const y = markHeight(row)
  const wide = labelWidth(mark.text, 11)
  const right = (mark.high == null ? at : Math.max(at, inside(x.place(mark.high), box))) + 7
  const left = (mark.low == null ? at : Math.min(at, inside(x.place(mark.low), box))) - 7 - wide
  const start = right + wide < width ? right : left > 4 ? left : Math.max(4, width - wide - 4)
  const dot = element('circle', { cx: at, cy: y, r: 3, class: 'chart-ink-fill', fill: ink })
  return label(start, y + 4, mark.text, { size: 11, rim: true }) + dot
}

function markHeight(row: number): number {
  return 38 + 15 * row
}

function inside(position: number, box: Box): number {
  return Math.min(box.right, Math.max(box.left, position))
}

function ring(x: number, y: number, text: string): string {
  const circle = element('circle', {
    cx: x,
    cy: y,
    r: 5,
    class: 'chart-ink',
    fill: 'none',
    stroke: ink,
    'stroke-width': 1.6,
  })
  return circle + label(x + 8, y - 6, text, { size: 11, rim: true })
}
