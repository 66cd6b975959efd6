import { visible } from '../visible.ts'

type Attributes = Readonly<Record<string, string | number | undefined>>

/** Text made safe for SVG and HTML, in content and in double-quoted attributes: the only place where that happens. */
export function escapeText(text: string): string {
  return visible(text)
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;')
    .replaceAll("'", '&#39;')
}

/** One element; children are markup already. Numbers are rounded to 0.01 px, so that the same data give the same bytes. */
export function element(name: string, attributes: Attributes, ...children: readonly string[]): string {
  const listed = Object.entries(attributes)
    .filter(([, value]) => value !== undefined)
    .map(([key, value]) => ` ${key}="${typeof value === 'number' ? pixels(value) : escapeText(value!)}"`)
    .join('')
  return children.length === 0 ? `<${name}${listed}/>` : `<${name}${listed}>${children.join('')}</${name}>`
}

export function pixels(value: number): string {
  const rounded = Math.round(value * 100) / 100
  return String(rounded === 0 ? 0 : rounded)
}

export interface TextStyle {
  readonly anchor?: 'start' | 'middle' | 'end'
  readonly size?: number
  readonly bold?: boolean
  readonly fill?: string
  readonly rotate?: number
  /** A rim in the colour of the paper keeps a label readable over lines. */
  readonly rim?: boolean
}

export function label(x: number, y: number, text: string, style: TextStyle = {}): string {
  const rotated = style.rotate === undefined ? {} : { transform: `rotate(${style.rotate} ${pixels(x)} ${pixels(y)})` }
  const rim = style.rim
    ? { class: 'chart-rim', stroke: paper, 'stroke-width': 3, 'stroke-linejoin': 'round', 'paint-order': 'stroke' }
    : { class: style.fill === undefined ? 'chart-ink-fill' : undefined }
  return element(
    'text',
    {
      x,
      y,
      'text-anchor': style.anchor,
      'font-size': style.size ?? 12,
      'font-weight': style.bold ? 'bold' : undefined,
      fill: style.fill ?? ink,
      ...rim,
      ...rotated,
    },
    escapeText(text),
  )
}

export const ink = '#222222'
export const paper = '#ffffff'
export const gridColour = '#d9d9d9'

/** Rough width of a label: enough to place things, no font is measured. */
export function labelWidth(text: string, size = 12): number {
  return [...text].length * size * 0.56
}

/** The text cut with an ellipsis where it would not fit; the drawing's description holds it whole. */
export function fittingText(text: string, width: number, size = 12): string {
  const most = Math.max(4, Math.floor(width / (size * 0.56)))
  const characters = [...visible(text)]
  return characters.length <= most ? characters.join('') : `${characters.slice(0, most - 1).join('')}…`
}

/** A whole drawing with its own paper, title and description for those who do not see it. */
export function drawing(
  width: number,
  height: number,
  title: string,
  description: string,
  ...children: string[]
): string {
  return element(
    'svg',
    {
      xmlns: 'http://www.w3.org/2000/svg',
      viewBox: `0 0 ${pixels(width)} ${pixels(height)}`,
      width,
      height,
      role: 'img',
      'aria-label': `${title}. ${description}`,
      'font-family': 'Helvetica, Arial, sans-serif',
    },
    element('title', {}, escapeText(title)),
    element('rect', { class: 'chart-paper', width, height, fill: paper }),
    ...children,
  )
}
