/**
 * The same drawing in fewer bytes: what the style sheet of the document says of a class does not stand at every
 * element, lines of the grid become one path, and markers that repeat are drawn once and used by reference.
 * Only markup is touched; a quotation mark inside a text is escaped and so never part of a match.
 */
export function compactDrawing(svg: string): string {
  const lean = svg
    .trim()
    .replace(/^<svg [^>]*>(?:<title>[^<]*<\/title>)?/, (head) =>
      head.replace(/ xmlns="[^"]*"| font-family="[^"]*"|<title>[^<]*<\/title>/g, ''),
    )
    .replace(/(<rect [^>]*)><title>[^<]*<\/title><\/rect>/g, '$1/>')
    .replace(/<text [^>]*>/g, (tag) => tag.replace(textDefaults, ''))
    .replace(/<(?:line|path|circle|rect) [^>]*class="chart[^>]*>/g, (tag) => tag.replace(classDefaults, ''))
    .replace(
      / (d|transform)="([^"]*)"/g,
      (_, name, value: string) => ` ${name}="${value.replace(/\d+\.\d{2,}/g, shorter)}"`,
    )
  return shareMarkers(joinGrid(lean), nameOf(svg))
}

const textDefaults =
  / font-size="12"| fill="#222222"| class="chart-ink-fill"| stroke="#ffffff"| stroke-width="3"| stroke-linejoin="round"| paint-order="stroke"/g
const classDefaults = /(?<=class="chart-(?:grid|ink|ink-fill|paper)"[^>]*?) (?:stroke|fill)="#[0-9a-f]{6}"/g

/** A tenth of a pixel is finer than any screen or print shows. */
function shorter(number: string): string {
  return String(Math.round(Number(number) * 10) / 10)
}

const gridLine =
  /<line x1="([\d.-]+)" x2="([\d.-]+)" y1="([\d.-]+)" y2="([\d.-]+)" class="chart-grid" stroke-width="([\d.]+)"\/>/g

/** Grid lines of one width as one path where the first of them stood: under everything else, as before. */
function joinGrid(svg: string): string {
  const paths = new Map<string, string>()
  for (const [, x1, x2, y1, y2, width] of svg.matchAll(gridLine)) {
    const step = x1 === x2 ? `V${y2}` : `H${x2}`
    paths.set(width!, `${paths.get(width!) ?? ''}M${x1} ${y1}${step}`)
  }
  let joined = [...paths].map(([width, d]) => `<path class="chart-grid" stroke-width="${width}" d="${d}"/>`).join('')
  return svg.replace(gridLine, () => {
    const here = joined
    joined = ''
    return here
  })
}

const marker = /<path d="([^"]*)" transform="translate\(([\d.-]+) ([\d.-]+)\)" ([^>]*)\/>/g

function shareMarkers(svg: string, name: string): string {
  const shapes = new Map<string, string>()
  const body = svg.replace(marker, (_, d, x, y, look) => {
    const shape = `d="${d}" ${look}`
    const id = shapes.get(shape) ?? `${name}-${shapes.size}`
    shapes.set(shape, id)
    return `<use href="#${id}" x="${x}" y="${y}"/>`
  })
  const shared = [...shapes].map(([shape, id]) => `<path id="${id}" ${shape}/>`).join('')
  return shared === '' ? svg : body.replace(/^<svg [^>]*>/, (head) => `${head}<defs>${shared}</defs>`)
}

/** A name that another drawing of the page will hardly bear. */
function nameOf(svg: string): string {
  let hash = 5381
  for (let index = 0; index < svg.length; index++) hash = (Math.imul(hash, 33) ^ svg.charCodeAt(index)) >>> 0
  return `m${hash.toString(36)}`
}
