import { describe, expect, it } from 'vitest'
import { lineChart } from '../../src/report/charts/line-chart.ts'
import { placeLabels } from '../../src/report/charts/place-labels.ts'
import { renderChart } from '../../src/report/charts/render-chart.ts'
import { stackedBars } from '../../src/report/charts/stacked-bars.ts'
import { escapeText } from '../../src/report/charts/svg.ts'
import { isLogarithmic, renderTrendChart } from '../../src/report/charts/trend-chart.ts'
import { waveformChart } from '../../src/report/charts/waveform-chart.ts'
import { words } from '../../src/report/words/words.ts'
import { swapSample, trendSample } from './more-samples.ts'
import { rankSample } from './samples.ts'

const line = (points: readonly { x: number; y: number | null; dashed?: boolean }[]) =>
  lineChart({ title: 'T', x: { title: 'x (kHz)' }, y: { title: 'y (W)' }, series: [{ name: 'one', points }] })

/** Every number of a drawing is finite and every text lies on the paper. */
function expectDrawn(svg: string) {
  expect(svg).not.toMatch(/NaN|Infinity|undefined/)
  const [, width, height] = /viewBox="0 0 (\S+) (\S+)"/.exec(svg)!.map(Number)
  for (const [, x, y] of svg.matchAll(/<text x="(\S+)" y="(\S+)"/g)) {
    expect(Number(x)).toBeGreaterThanOrEqual(0)
    expect(Number(x)).toBeLessThanOrEqual(width!)
    expect(Number(y)).toBeLessThanOrEqual(height!)
  }
}

describe('a line chart', () => {
  it('interrupts a line where there is no value and dashes what is beyond the data', () => {
    const svg = line([
      { x: 1, y: 1 },
      { x: 2, y: 2 },
      { x: 3, y: null },
      { x: 4, y: 3 },
      { x: 5, y: 4, dashed: true },
    ])
    const paths = [
      ...svg.matchAll(/<path d="(M[^"]+)" fill="none" stroke="#0072b2" stroke-width="2"( stroke-dasharray="5 4")?/g),
    ]
    expect(paths.map(([, d, dash]) => [d!.match(/M/g)!.length, dash !== undefined])).toEqual([
      [2, false],
      [1, true],
    ])
    expectDrawn(svg)
  })

  it('survives a single point, equal values and no series', () => {
    expectDrawn(line([{ x: 1, y: 5 }]))
    expectDrawn(
      line([
        { x: 1, y: 0 },
        { x: 2, y: 0 },
      ]),
    )
    expectDrawn(lineChart({ title: 'T', x: { title: 'x', logarithmic: true }, y: { title: 'y' }, series: [] }))
  })

  it('labels a logarithmic axis at 1, 2 and 5', () => {
    const points = [10, 100, 1000].map((x) => ({ x, y: x }))
    const svg = lineChart({
      title: 'T',
      x: { title: 'x', logarithmic: true },
      y: { title: 'y' },
      series: [{ name: 'one', points }],
    })
    const ticks = [...svg.matchAll(/text-anchor="middle" font-size="12"[^>]*>([\d.]+)</g)].map(([, text]) => text)
    expect(ticks).toEqual(['10', '20', '50', '100', '200', '500', '1000'])
  })

  it('shows a hostile name as text', () => {
    const svg = lineChart({
      title: '<script>',
      x: { title: 'x' },
      y: { title: 'y' },
      series: [
        {
          name: '"><img src=x onerror=alert(1)>',
          points: [
            { x: 0, y: 0 },
            { x: 1, y: 1 },
          ],
        },
      ],
    })
    expect(svg).not.toMatch(/<script|<img/)
    expect(svg).toContain('&quot;&gt;&lt;img src=x onerror=alert(1)&gt;')
  })

  it('keeps twenty names apart', () => {
    const places = placeLabels(Array<number>(20).fill(100), 13, 40, 370)
    const sorted = places.map((place) => place!).toSorted((a, b) => a - b)
    for (let index = 1; index < sorted.length; index++)
      expect(sorted[index]! - sorted[index - 1]!).toBeGreaterThanOrEqual(13)
    expect(sorted[0]).toBeGreaterThanOrEqual(40)
    expect(placeLabels([null, 50], 13, 0, 100)).toEqual([null, 50])
  })
})

describe('a trend', () => {
  it('is drawn with its crossing, its limit and the same bytes each time', () => {
    const svg = renderTrendChart(trendSample())
    expectDrawn(svg)
    expect(svg).toContain('92.3 kHz: above it alder-200v-8a-ultrafast is cheaper than larch-200v-10a-soft')
    expect(svg).toContain('131 kHz: rowan-150v-20a-schottky loses its stable temperature')
    expect(svg).toContain('dashed: read far beyond the data')
    expect(renderTrendChart(trendSample())).toBe(svg)
    expect(svg).not.toMatch(/<style|\sstyle=|href/)
  })

  it('over the slope shows the shares of turn-on', () => {
    const svg = renderTrendChart({ ...trendSample(), over: 'slope_a_per_s' })
    expect(svg).toContain('overlap, switch')
  })

  it('finds out how its points are spaced', () => {
    expect([
      isLogarithmic([1, 2, 4]),
      isLogarithmic([1, 2, 3]),
      isLogarithmic([5, 5, 5]),
      isLogarithmic([0, 1, 2]),
    ]).toEqual([true, false, false, false])
  })
})

describe('stacked bars', () => {
  it('give every part its own filling, the sum at the end and a whisker', () => {
    const svg = renderChart(rankSample())
    expectDrawn(svg)
    expect(new Set([...svg.matchAll(/<pattern id="([^"]+)"/g)].map(([, id]) => id)).size).toBe(6)
    expect(svg).toContain('>12.5</text>')
    expect(svg).toContain('hazel-150v-10a-fast (rejected)')
    expect(svg).not.toContain('rowan-150v-20a-schottky')
  })

  it('say below that the voltage is hazardous, with every caution in full', () => {
    const rank = words(rankSample())
    const drawings = [rank, words(trendSample()), words(swapSample())].map(renderChart)
    for (const svg of drawings) {
      expectDrawn(svg)
      expect(svg).toContain('>Hazardous voltage: see the cautions of the result; qualified persons only,')
      for (const { text } of rank.cautions) expect(svg).toContain(escapeText(text))
    }
    const harmless = renderChart({ ...rank, cautions: [{ code: 'estimate-only', text: 'E', data: {} }] })
    expect(harmless).not.toContain('Hazardous')
    expect(harmless).toContain('confirm them on the bench')
  })

  it('survive no bars at all', () => {
    expectDrawn(stackedBars({ title: 'T', axis: 'loss (W)', parts: ['a'], bars: [], idPrefix: 'p' }))
  })

  it('show both parts of a swap', () => {
    expect(renderChart(swapSample())).toMatch(/alder-200v-8a-ultrafast[\s\S]*larch-200v-10a-soft/)
  })
})

describe('a waveform', () => {
  it('puts current above voltage over one time axis, given points apart', () => {
    const svg = waveformChart({
      title: 'Event',
      time: 'time (ns)',
      panels: [
        {
          axis: 'current (A)',
          traces: [
            {
              name: 'rectifier',
              points: [
                [0, 5],
                [20, -4],
                [60, 0],
              ],
            },
          ],
          given: [{ time: 18, value: -3.8, text: 'row 1' }],
        },
        {
          axis: 'voltage (V)',
          traces: [
            {
              name: 'reverse',
              points: [
                [0, 0],
                [20, 0],
                [40, 120],
              ],
            },
          ],
        },
      ],
      marks: [{ time: 20, text: 'I_RM' }],
    })
    expectDrawn(svg)
    expect(svg).toContain('>row 1</text>')
    expect(svg.indexOf('current (A)')).toBeLessThan(svg.indexOf('voltage (V)'))
  })
})
