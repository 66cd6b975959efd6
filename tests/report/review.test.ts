import { createHash } from 'node:crypto'
import { lint } from 'markdownlint/sync'
import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { ReviewResult } from '../../src/domain/review.ts'
import type { Stage } from '../../src/domain/stage.ts'
import { type ReviewInputs, renderReviewHtml } from '../../src/report/review/render-review-html.ts'
import { renderReviewMarkdown } from '../../src/report/review/render-review-markdown.ts'
import { exactValues } from '../../src/report/review/what-if-result.ts'
import { rank } from '../../src/study/rank.ts'
import { review } from '../../src/study/review.ts'
import { records, stageOf } from './review-samples.ts'

const hostile = '<img src=x onerror=alert(1)>|`*_[a](http://b)'
const settings = { seed: 1, draws: 60, version: '0.0.0', inputs: [{ path: 'stage.yaml', sha256: 'ab'.repeat(32) }] }

function digest(text: string): string {
  return createHash('sha256').update(text).digest('base64')
}

function inputsOf(stage: Stage, chosen: readonly RectifierRecord[]): ReviewInputs {
  return { stage, records: chosen, settings }
}

function htmlOf(result: ReviewResult, inputs: ReviewInputs, script = 'void 0'): string {
  return renderReviewHtml(result, inputs, { script, digest })
}

const pump = stageOf('pump-boost')
const pumpReview = () => review(pump, records, settings)
const titles = [
  'Decision',
  'Cautions',
  'Scope and limits',
  'Operating point',
  'Ledger of losses',
  'Rejected parts',
  'Temperature and runaway',
  'Loss against frequency',
  'Loss against current slope',
  'Efficiency and watts against load',
  'The recovery event',
  'Sensitivity and what to measure next',
  'Assumption ledger',
  'Event model, equations and other conventions',
  'Not covered, and open points',
  'Version, seed and input files',
]

describe('the review document', () => {
  const result = pumpReview()
  const html = htmlOf(result, inputsOf(pump, records))
  const markdown = renderReviewMarkdown(result)

  it('holds its sections in the order a reviewer reads, in both forms', () => {
    const inHtml = [...html.matchAll(/<h2 id="title-\d+"><span class="label">(\d+)<\/span>([^<]*)/g)]
    const inMarkdown = [...markdown.matchAll(/^## (\d+) (.*)$/gm)]
    const numbered = titles.map((title, index) => `${index + 1} ${title}`)
    expect(inHtml.map(([, number, title]) => `${number} ${title}`)).toEqual(numbered)
    expect(inMarkdown.map(([, number, title]) => `${number} ${title}`)).toEqual(numbered)
  })

  it('decides in three sentences, with the odds', () => {
    const lead = /<p class="lead">(.*?)<\/p>/.exec(html)![1]!.replace(/<[^>]*>/g, '')
    expect(lead.split(/(?<=\.) (?=[A-Z])/)).toHaveLength(3)
    expect(lead).toMatch(/odds that it is the cheapest are/)
  })

  it('shows every caution near the top', () => {
    const section = html.indexOf('id="section-3"')
    for (const { code, text } of result.rank.cautions) {
      expect(html.indexOf(`<strong>${code}:</strong>`)).toBeGreaterThan(0)
      expect(html.indexOf(`<strong>${code}:</strong>`)).toBeLessThan(section)
      expect(markdown).toContain(text.slice(0, 12))
    }
    expect(result.rank.cautions.length).toBeGreaterThan(4)
  })

  it('is the same, byte for byte, for the same input and seed', () => {
    expect(htmlOf(pumpReview(), inputsOf(pump, records))).toBe(html)
    expect(renderReviewMarkdown(pumpReview())).toBe(markdown)
  })

  it('lets in only the style and the script whose hashes it states', () => {
    const style = /<style>([\s\S]*?)<\/style>/.exec(html)![1]!
    const script = /<script>([\s\S]*?)<\/script>/.exec(html)![1]!
    expect(html).toContain(
      `content="default-src 'none'; style-src 'sha256-${digest(style)}'; script-src 'sha256-${digest(script)}'; base-uri 'none'; form-action 'none'"`,
    )
    expect(html).not.toMatch(/ style="| on\w+="|https?:\/\/|url\((?!#)|<link|<img/)
  })

  it('carries whole values that a recalculation without draws gives again', () => {
    const printed = [...html.matchAll(/ data-value="([^"]*)"/g)].map(([, value]) => Number(value))
    expect(printed.length).toBeGreaterThan(100)
    expect(printed).toEqual(exactValues(rank(pump, records, { ...settings, draws: 0 })))
  })

  it('traces every figure of a part to a row, with grade and factor, and every input to its origin', () => {
    for (const { id, provenance, point } of result.rank.candidates) {
      expect(provenance.length > 0, id).toBe(point !== null)
      expect(html, id).toContain(`<caption>Inputs of ${id}</caption>`)
    }
    expect(html).toContain('<caption>Where the figures of each part come from</caption>')
    expect(html).toMatch(/Qrr [\d.]+ [nµ]C × [\d.]+/)
    expect(html).toContain('<caption>Inputs of class ultrafast</caption>')
  })

  it('names the source of each equation', () => {
    for (const { id, source } of result.methods)
      expect(markdown, id).toContain(source.slice(0, 20).replaceAll('&', '&amp;'))
  })

  it('states version, seed and the hash of every input file', () => {
    expect(markdown).toContain('ebbwatt 0.0.0')
    expect(markdown).toContain('ab'.repeat(32))
  })
})

describe('the Markdown form', () => {
  it('passes a linter, line length left aside', () => {
    const stages = ['pump-boost', 'cold-store-mains', 'pack-buck', 'sprayer-inverting']
    const strings = Object.fromEntries(
      stages.map((name) => [name, renderReviewMarkdown(review(stageOf(name), records, { ...settings, draws: 0 }))]),
    )
    expect(lint({ strings, config: { default: true, MD013: false } })).toEqual(
      Object.fromEntries(stages.map((name) => [name, []])),
    )
  })

  it('has complete tables: as many cells in each row as in its head, and every part in each ledger', () => {
    const result = pumpReview()
    const tables = renderReviewMarkdown(result).match(/(?:^\|.*\n)+/gm)!
    const cells = (line: string) => line.split(/(?<!\\)\|/).length
    for (const table of tables) {
      const [head, ...rows] = table.trimEnd().split('\n')
      for (const row of rows) expect(cells(row), row).toBe(cells(head!))
    }
    const ledgers = tables.filter((table) => table.startsWith('| rank | part |'))
    expect(ledgers.length).toBeGreaterThan(6)
    for (const table of ledgers) for (const { id } of result.rank.candidates) expect(table).toContain(id)
  })
})

describe('text from files', () => {
  const part = {
    ...records.find(({ id }) => id === pump.candidates![0])!,
    id: hostile,
    title: '</script><b>',
    origin: hostile,
  }
  const stage: Stage = { ...pump, title: hostile, candidates: [hostile, pump.candidates![1]!] }
  const all = [...records, part]
  const result = review(stage, all, settings)

  it('is text in HTML, in its data too', () => {
    const html = htmlOf(result, inputsOf(stage, all))
    expect(html).not.toMatch(/<img|<b>/)
    expect(html.match(/<\/script>/g)).toHaveLength(2)
    const data = /<script type="application\/json" id="inputs">([\s\S]*?)<\/script>/.exec(html)![1]!
    expect(JSON.parse(data)).toEqual(JSON.parse(JSON.stringify(inputsOf(stage, all))))
  })

  it('is text in Markdown', () => {
    const strings = { hostile: renderReviewMarkdown(result) }
    expect(strings.hostile).not.toMatch(/<img|\]\(http:\/\//)
    expect(lint({ strings, config: { default: true, MD013: false } })).toEqual({ hostile: [] })
  })

  it('cannot be ended by the program it carries', () => {
    const html = htmlOf(result, inputsOf(stage, all), 'const a = "</script><!--"')
    expect(html.match(/<\/script>/g)).toHaveLength(2)
    expect(html).toContain('const a = "\\x3c/script>\\x3c!--"')
  })
})

describe('where nothing is acceptable', () => {
  it('says so and still shows everything there is', () => {
    const stage: Stage = { ...pump, limits: { ...pump.limits, voltageUse: 0.1 } }
    const result = review(stage, records, settings)
    const html = htmlOf(result, inputsOf(stage, records))
    expect(html).toContain('<p class="lead">No candidate is acceptable.')
    expect(html).not.toMatch(/NaN|Infinity|undefined/)
    expect(renderReviewMarkdown(result)).not.toMatch(/NaN|Infinity|undefined/)
  })
})
