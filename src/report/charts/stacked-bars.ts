import { scaleLinear } from 'd3-scale'
import { stack } from 'd3-shape'
import type { Caution } from '../../domain/result.ts'
import { significant } from '../format.ts'
import { makeAxis } from './axis.ts'
import { cautionFoot } from './caution-foot.ts'
import { filling, fillingId } from './palette.ts'
import { drawing, element, escapeText, fittingText, ink, label, labelWidth, pixels } from './svg.ts'

export interface StackedBarsData {
  readonly title: string
  readonly axis: string
  /** Names of the stacked parts, in order from the left. */
  readonly parts: readonly string[]
  readonly bars: readonly {
    readonly name: string
    /** As many as parts, in the unit of the axis. */
    readonly values: readonly number[]
    readonly low: number | null
    readonly high: number | null
  }[]
  /** Keeps the ids of several drawings in one page apart. */
  readonly idPrefix: string
  readonly width?: number
  /** Told below, where the drawing may leave its document. */
  readonly cautions?: readonly Caution[]
}

const barHeight = 24
const barStep = 36

/** Horizontal stacked bars, one a candidate, with the interval of the sum as a whisker and the sum at its end. */
export function stackedBars(data: StackedBarsData): string {
  const width = data.width ?? 760
  const left = Math.min(width * 0.4, 20 + Math.max(40, ...data.bars.map(({ name }) => labelWidth(name))))
  const legend = legendMarkup(data, 12, 34, width - 24)
  const top = 44 + legend.height
  const box = { left, top, right: width - 70, bottom: top + barStep * data.bars.length }
  const sums = data.bars.map(({ values }) => values.reduce((sum, value) => sum + value, 0))
  const reach = data.bars.map(({ high }, index) => Math.max(sums[index]!, high ?? 0))
  const axis = makeAxis('x', { title: data.axis, fromZero: true }, reach, box)
  const layers = stack<unknown, { values: readonly number[] }, number>()
    .keys(data.parts.map((_, index) => index))
    .value(({ values }, index) => values[index] ?? 0)(data.bars)
  const rows = scaleLinear([0, data.bars.length], [box.top, box.bottom])
  const bars = data.bars.map((bar, row) => {
    const y = rows(row) + (barStep - barHeight) / 2
    const segments = layers.map((layer, part) => segment(data, part, layer[row]!, y, axis.place, bar.name))
    return [
      label(left - 8, y + barHeight / 2 + 4, fittingText(bar.name, left - 12), { anchor: 'end' }),
      ...segments,
      whisker(bar.low, bar.high, y + barHeight / 2, axis.place),
      label(axis.place(reach[row]!) + 6, y + barHeight / 2 + 4, significant(sums[row]!), { bold: true }),
    ].join('')
  })
  const definitions = element('defs', {}, ...data.parts.map((_, index) => filling(data.idPrefix, index)), ' ')
  const heading = label(12, 22, fittingText(data.title, width - 24, 14), { bold: true, size: 14 })
  const foot = cautionFoot(data.cautions ?? [], box.bottom + 48)
  return drawing(
    width,
    box.bottom + 48 + foot.height,
    data.title,
    describe(data, sums),
    definitions,
    heading,
    legend.markup,
    axis.markup,
    ...bars,
    foot.markup,
  )
}

function segment(
  data: StackedBarsData,
  part: number,
  [from, to]: readonly number[],
  y: number,
  place: (value: number) => number,
  name: string,
): string {
  const width = place(to!) - place(from!)
  if (!(width > 0)) return ''
  const tip = `${name}, ${data.parts[part]}: ${significant(to! - from!)}`
  return element(
    'rect',
    { x: place(from!), y, width, height: barHeight, fill: `url(#${fillingId(data.idPrefix, part)})` },
    element('title', {}, escapeText(tip)),
  )
}

function whisker(low: number | null, high: number | null, y: number, place: (value: number) => number): string {
  if (low === null || high === null) return ''
  const [a, b] = [pixels(place(low)), pixels(place(high))]
  const d = `M${a} ${y}H${b}M${a} ${y - 6}V${y + 6}M${b} ${y - 6}V${y + 6}`
  // a rim of paper under the ink keeps the whisker visible over dark bars
  return (
    element('path', { d, class: 'chart-paper-line', stroke: '#ffffff', 'stroke-width': 4, fill: 'none' }) +
    element('path', { d, class: 'chart-ink', stroke: ink, 'stroke-width': 1.6, fill: 'none' })
  )
}

function legendMarkup({ parts, idPrefix }: StackedBarsData, left: number, top: number, width: number) {
  let x = left
  let y = top
  const items = parts.map((part, index) => {
    const wide = 24 + labelWidth(part)
    if (x + wide > left + width) {
      x = left
      y += 20
    }
    const item =
      element('rect', { x, y, width: 14, height: 14, fill: `url(#${fillingId(idPrefix, index)})` }) +
      label(x + 19, y + 11, part)
    x += wide + 10
    return item
  })
  return { markup: items.join(''), height: y - top + 20 }
}

function describe({ bars, axis }: StackedBarsData, sums: readonly number[]): string {
  return `${axis}: ${bars.map(({ name }, index) => `${name} ${significant(sums[index]!)}`).join(', ')}`
}
