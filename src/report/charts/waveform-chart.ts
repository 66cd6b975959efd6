import { line } from 'd3-shape'
import { type Axis, type Box, makeAxis } from './axis.ts'
import { colourOf } from './palette.ts'
import { drawing, element, fittingText, ink, label, labelWidth, paper } from './svg.ts'

interface Trace {
  readonly name: string
  /** Time and value, in the units of the axes. */
  readonly points: readonly (readonly [number, number])[]
  readonly dashed?: boolean
}

interface WaveformPanel {
  readonly axis: string
  readonly traces: readonly Trace[]
  /** Points given by a source, apart from what was computed. */
  readonly given?: readonly { readonly time: number; readonly value: number; readonly text: string }[]
}

export interface WaveformData {
  readonly title: string
  readonly time: string
  /** One above the other over the same time: current, then voltage. */
  readonly panels: readonly WaveformPanel[]
  readonly marks?: readonly { readonly time: number; readonly text: string }[]
  readonly width?: number
  readonly panelHeight?: number
}

/** Current and voltage of an event against time, in panels that share their time axis. */
export function waveformChart(data: WaveformData): string {
  const width = data.width ?? 760
  const panelHeight = data.panelHeight ?? 190
  const marks = data.marks ?? []
  const top = 40 + 15 * marks.length
  const height = top + data.panels.length * (panelHeight + 16) + 40
  const names = Math.max(0, ...data.panels.flatMap(({ traces }) => traces.map(({ name }) => labelWidth(name, 11))))
  const right = width - Math.min(width * 0.3, names) - 20
  const times = data.panels.flatMap(({ traces }) => traces.flatMap(({ points }) => points.map(([time]) => time)))
  const boxes = data.panels.map((_, index): Box => {
    const above = top + index * (panelHeight + 16)
    return { left: 64, top: above, right, bottom: above + panelHeight }
  })
  const lowest = boxes[boxes.length - 1] ?? { left: 64, top, right, bottom: top + panelHeight }
  const whole = { ...lowest, top }
  const x = makeAxis('x', { title: data.time }, times, whole)
  return drawing(
    width,
    height,
    data.title,
    `${data.panels.map(({ axis }) => axis).join(' and ')} against ${data.time}`,
    label(12, 22, fittingText(data.title, width - 24, 14), { bold: true, size: 14 }),
    x.markup,
    ...data.panels.map((panel, index) => panelMarkup(panel, x, boxes[index]!)),
    ...marks.map(({ time, text }, row) => mark(x.place(time), 38 + 15 * row, text, whole)),
  )
}

function panelMarkup(panel: WaveformPanel, x: Axis, box: Box): string {
  const values = panel.traces.flatMap(({ points }) => points.map(([, value]) => value))
  const all = [0, ...values, ...(panel.given ?? []).map(({ value }) => value)]
  const y = makeAxis('y', { title: panel.axis }, all, box)
  const zero = y.place(0)
  return [
    y.markup,
    element('line', {
      x1: box.left,
      x2: box.right,
      y1: zero,
      y2: zero,
      class: 'chart-ink',
      stroke: ink,
      'stroke-width': 0.8,
    }),
    ...panel.traces.map((trace, index) => traceMarkup(trace, index, x, y, box)),
    ...(panel.given ?? []).map(({ time, value, text }) => {
      const [cx, cy] = [x.place(time), y.place(value)]
      return (
        element('circle', { cx, cy, r: 5, class: 'chart-ink', fill: paper, stroke: ink, 'stroke-width': 1.6 }) +
        label(cx + 8, cy + 14, text, { size: 11, rim: true })
      )
    }),
  ].join('')
}

function traceMarkup(trace: Trace, index: number, x: Axis, y: Axis, box: Box): string {
  const colour = colourOf(index)
  const draw = line<readonly [number, number]>(
    ([time]) => x.place(time),
    ([, value]) => y.place(value),
  ).digits(2)
  const dash = trace.dashed ? '5 4' : index === 0 ? undefined : '9 3 2 3'
  const path = {
    d: draw(trace.points) ?? '',
    fill: 'none',
    stroke: colour,
    'stroke-width': 2,
    'stroke-dasharray': dash,
  }
  const last = trace.points[trace.points.length - 1]
  const name =
    last === undefined
      ? ''
      : label(box.right + 6, y.place(last[1]) + 4 + 13 * index, trace.name, { size: 11, fill: colour })
  return element('path', path) + name
}

function mark(at: number, y: number, text: string, box: Box): string {
  const line = { x1: at, x2: at, y1: y, y2: box.bottom, class: 'chart-ink', stroke: ink, 'stroke-dasharray': '1 3' }
  const flipped = at + labelWidth(text, 11) > box.right
  return (
    element('line', line) +
    label(flipped ? at - 5 : at + 5, y + 4, text, { size: 11, anchor: flipped ? 'end' : 'start', rim: true })
  )
}
