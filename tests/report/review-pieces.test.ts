import { describe, expect, it } from 'vitest'
import { lossBars } from '../../src/report/charts/render-chart.ts'
import { compactDrawing } from '../../src/report/review/compact-drawing.ts'
import { inputText } from '../../src/report/review/exact-value.ts'
import { trendFigure } from '../../src/report/review/trend-figures.ts'
import { whatIfControls, whatIfValue } from '../../src/report/review/what-if-quantities.ts'
import { rank } from '../../src/study/rank.ts'
import { stageAt } from '../../src/study/stage-variation.ts'
import { trendSample } from './more-samples.ts'
import { records, stageOf } from './review-samples.ts'

const settings = { seed: 1, draws: 0, version: '0.0.0', inputs: [] }

describe('a compact drawing', () => {
  const figure = trendFigure(trendSample(), 'Stage loss', 'loss (W)', ({ stage_loss_w }) => stage_loss_w)
  const svg = figure.kind === 'figure' ? figure.svg : ''
  const compact = compactDrawing(svg)

  it('keeps every label, curve and marker and is a third smaller', () => {
    const texts = (markup: string) => [...markup.matchAll(/<text[^>]*>([^<]*)</g)].map(([, text]) => text)
    const markers = svg.match(/transform="translate/g)!.length
    expect(texts(compact)).toEqual(texts(svg))
    expect(compact.match(/<use /g)).toHaveLength(markers)
    expect(compact.match(/fill="none" stroke="#/g)!.length).toBe(svg.match(/fill="none" stroke="#/g)!.length)
    expect(compact.length).toBeLessThan((svg.length * 2) / 3)
  })

  it('keeps every line of the grid', () => {
    const lines = svg.match(/<line [^>]*chart-grid/g)!.length
    const moves = [...compact.matchAll(/class="chart-grid"[^>]* d="([^"]*)"/g)].flatMap(([, d]) => d!.match(/M/g)!)
    expect(moves).toHaveLength(lines)
  })

  it('defines every marker it uses, under names of its own', () => {
    const used = new Set([...compact.matchAll(/href="#([^"]*)"/g)].map(([, id]) => id))
    const defined = new Set([...compact.matchAll(/<path id="([^"]*)"/g)].map(([, id]) => id))
    expect(used).toEqual(defined)
    expect(compactDrawing(svg.replace('Stage loss', 'Other'))).not.toContain([...used][0])
  })

  it('leaves text alone that looks like an attribute', () => {
    const hostile = ' font-size="12" class="chart-grid"'
    expect(compactDrawing(lossBars([], hostile))).toContain('font-size=&quot;12&quot; class=&quot;chart-grid&quot;')
  })
})

describe('an input', () => {
  it.each([
    [0.000273, 'H', '273 µH'],
    [1.23456e-9, 'F', '1.23456 nF'],
    [350e6, 'A/s', '350 A/µs'],
    [-40, 'degC', '-40 °C'],
    [0.022, 'ohm', '22 mΩ'],
    [0.006, '1/K', '0.006 1/K'],
    [-0.0018, 'V/K', '-0.0018 V/K'],
    [0.1, '1', '0.1'],
    [0, 'F', '0 F'],
    [Number.NaN, 'V', '–'],
    ['yes', '', 'yes'],
  ] as const)('%s %s reads %s', (value, unit, text) => {
    expect(inputText(value, unit)).toBe(text)
  })
})

describe.each(['pump-boost', 'cold-store-mains', 'pack-buck', 'sprayer-inverting'])('the controls of %s', (name) => {
  const stage = stageOf(name)
  const result = rank(stage, records, settings)
  const controls = whatIfControls(stage, result.stage)

  it('start at the issued value, inside their range', () => {
    for (const { over, issued, low, high } of controls) {
      expect(issued, over).toBeGreaterThanOrEqual(low)
      expect(issued, over).toBeLessThanOrEqual(high)
    }
  })

  it('offer inputs from end to end that the stage can convert', () => {
    const { low, high } = controls.find(({ over }) => over === 'input')!
    for (const shown of [low, high]) expect(() => stageAt(stage, 'input', whatIfValue('input', shown))).not.toThrow()
  })

  it('stand for the value of the stage', () => {
    const shown = controls.find(({ over }) => over === 'frequency')!.issued
    expect(whatIfValue('frequency', shown)).toBeCloseTo(stage.frequency, 3)
  })
})
