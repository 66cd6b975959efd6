import { scaleLinear, scaleLog } from 'd3-scale'
import { fixed, significant } from '../format.ts'
import { element, gridColour, ink, label } from './svg.ts'

/** An axis in the unit it shows; the values given to a chart are already in it. */
export interface AxisSpec {
  readonly title: string
  readonly logarithmic?: boolean
  /** Value 0 belongs to the axis. */
  readonly fromZero?: boolean
}

export interface Box {
  readonly left: number
  readonly top: number
  readonly right: number
  readonly bottom: number
}

export interface Axis {
  readonly place: (value: number) => number
  readonly markup: string
}

type Orientation = 'x' | 'y'

/** Scale, grid, ticks and title of one axis around a box. */
export function makeAxis(orientation: Orientation, spec: AxisSpec, values: readonly number[], box: Box): Axis {
  const range = orientation === 'x' ? [box.left, box.right] : [box.bottom, box.top]
  const extent = extentOf(values, spec)
  const logarithmic = spec.logarithmic === true && extent[0] > 0
  const scale = logarithmic ? scaleLog(extent, range) : scaleLinear(extent, range)
  if (orientation === 'y') scale.nice(5)
  const count = Math.max(2, Math.round(Math.abs(range[1]! - range[0]!) / (orientation === 'x' ? 90 : 45)))
  const ticks = logarithmic
    ? decadeTicks(scale.domain())
    : scale.ticks(count).map((value) => ({ value, labelled: true }))
  const step = ticks.length > 1 ? ticks[1]!.value - ticks[0]!.value : 1
  const text = (value: number) => (logarithmic ? significant(value) : tickText(value, step))
  const markup = ticks.map(({ value, labelled }) => tick(orientation, scale(value), labelled ? text(value) : null, box))
  return {
    place: (value) => scale(value),
    markup: [...markup, edge(orientation, box), titleOf(orientation, spec, box)].join(''),
  }
}

function extentOf(values: readonly number[], spec: AxisSpec): [number, number] {
  const finite = values.filter(Number.isFinite)
  if (finite.length === 0) return [0, 1]
  const low = Math.min(...finite, ...(spec.fromZero ? [0] : []))
  const high = Math.max(...finite, ...(spec.fromZero ? [0] : []))
  if (low !== high) return [low, high]
  return low === 0 ? [0, 1] : [low - Math.abs(low) / 2, high + Math.abs(high) / 2]
}

/** 1, 2 and 5 of every decade are labelled; over a short range every digit is. */
function decadeTicks([low = 1, high = 10]: readonly number[]): { value: number; labelled: boolean }[] {
  const decades = Math.log10(high / low)
  const digits = decades < 0.6 ? [1, 2, 3, 4, 5, 6, 7, 8, 9] : decades < 3 ? [1, 2, 5] : [1]
  const ticks: { value: number; labelled: boolean }[] = []
  for (let power = Math.floor(Math.log10(low)); power <= Math.ceil(Math.log10(high)); power++) {
    for (let digit = 1; digit <= 9; digit++) {
      const value = Number((digit * 10 ** power).toPrecision(6))
      if (value >= low * (1 - 1e-9) && value <= high * (1 + 1e-9))
        ticks.push({ value, labelled: digits.includes(digit) })
    }
  }
  return ticks
}

function tickText(value: number, step: number): string {
  const magnitude = Math.max(Math.abs(value), Math.abs(step))
  if (magnitude >= 1e6 || Math.abs(step) < 1e-6) return significant(value)
  return fixed(value, Math.max(0, -Math.floor(Math.log10(Math.abs(step)) + 1e-9)))
}

function tick(orientation: Orientation, position: number, text: string | null, box: Box): string {
  const line =
    orientation === 'x'
      ? { x1: position, x2: position, y1: box.top, y2: box.bottom }
      : { x1: box.left, x2: box.right, y1: position, y2: position }
  const grid = element('line', {
    ...line,
    class: 'chart-grid',
    stroke: gridColour,
    'stroke-width': text === null ? 0.5 : 1,
  })
  if (text === null) return grid
  return orientation === 'x'
    ? grid + label(position, box.bottom + 17, text, { anchor: 'middle' })
    : grid + label(box.left - 7, position + 4, text, { anchor: 'end' })
}

function edge(orientation: Orientation, box: Box): string {
  const line =
    orientation === 'x'
      ? { x1: box.left, x2: box.right, y1: box.bottom, y2: box.bottom }
      : { x1: box.left, x2: box.left, y1: box.top, y2: box.bottom }
  return element('line', { ...line, class: 'chart-ink', stroke: ink, 'stroke-width': 1.2 })
}

function titleOf(orientation: Orientation, { title }: AxisSpec, box: Box): string {
  const middle = (box.top + box.bottom) / 2
  return orientation === 'x'
    ? label((box.left + box.right) / 2, box.bottom + 36, title, { anchor: 'middle' })
    : label(box.left - 46, middle, title, { anchor: 'middle', rotate: -90 })
}
