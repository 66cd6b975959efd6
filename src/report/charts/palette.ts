import {
  symbol,
  symbolCircle,
  symbolCross,
  symbolDiamond,
  symbolSquare,
  symbolStar,
  symbolTriangle,
  symbolWye,
} from 'd3-shape'
import { element, pixels } from './svg.ts'

/**
 * Colours told apart by colour-blind readers, dark enough for lines on white.
 * After M. Okabe & K. Ito, Color Universal Design, 2008 (values from memory, yellow left out for its contrast).
 */
const colours = ['#0072b2', '#d55e00', '#007a5a', '#b0568a', '#8a6d00', '#2b8cc4', '#4d4d4d'] as const

export function colourOf(index: number): string {
  return colours[index % colours.length]!
}

const shapes = [symbolCircle, symbolSquare, symbolTriangle, symbolDiamond, symbolCross, symbolStar, symbolWye]

/** Marker of a series: shape and filling change with the index, so that colour is never the only sign. */
export function marker(index: number, x: number, y: number, colour: string, area = 36): string {
  const shape = shapes[(index + Math.floor(index / shapes.length)) % shapes.length]!
  const hollow = Math.floor(index / shapes.length) % 2 === 1
  return element('path', {
    d: symbol(shape, area)() ?? '',
    transform: `translate(${pixels(x)} ${pixels(y)})`,
    fill: hollow ? '#ffffff' : colour,
    stroke: colour,
    'stroke-width': 1.2,
  })
}

/** Fillings of stacked parts: colour and hatch together. */
const hatches = ['', 'M0 0L8 8', 'M0 8L8 0', 'M0 4H8', 'M4 0V8', 'M0 0L8 8M0 8L8 0', 'M2 2h2v2h-2z']

/** Definition of filling `index`; `prefix` keeps the ids of several drawings in one page apart. */
export function filling(prefix: string, index: number): string {
  const hatch = hatches[index % hatches.length]!
  return element(
    'pattern',
    { id: fillingId(prefix, index), width: 8, height: 8, patternUnits: 'userSpaceOnUse' },
    element('rect', { width: 8, height: 8, fill: colourOf(index) }),
    ...(hatch === '' ? [] : [element('path', { d: hatch, stroke: '#ffffff', 'stroke-width': 1.4, fill: 'none' })]),
  )
}

export function fillingId(prefix: string, index: number): string {
  return `${prefix}-filling-${index}`
}
