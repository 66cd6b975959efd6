import { readFileSync } from 'node:fs'
import { Ajv2020 } from 'ajv/dist/2020.js'
import { lint } from 'markdownlint/sync'
import papaparse from 'papaparse'
import { describe, expect, it } from 'vitest'
import type { AnyResult } from '../../src/domain/study.ts'
import { renderCsv } from '../../src/report/render-csv.ts'
import { renderHtml } from '../../src/report/render-html.ts'
import { renderJson } from '../../src/report/render-json.ts'
import { renderMarkdown } from '../../src/report/render-markdown.ts'
import { renderTable } from '../../src/report/render-table.ts'
import { words } from '../../src/report/words/words.ts'
import { swapSample, trendSample } from './more-samples.ts'
import { rankSample } from './samples.ts'

const samples: readonly (readonly [string, () => AnyResult])[] = [
  ['rank', rankSample],
  ['trend', trendSample],
  ['swap', swapSample],
]

const hostile = '=1+1|<img src=x onerror=alert(1)>`*_[a](http://b)\u001B[2J"\''

/** A ranking whose second part and whose title are hostile. */
function hostileRank() {
  const sample = rankSample()
  const candidates = sample.candidates.map((part) => (part.rank === 2 ? { ...part, id: hostile } : part))
  return words({
    ...sample,
    candidates,
    stage: { ...sample.stage, title: hostile },
    verdict: { ...sample.verdict, runner_up: hostile, tied: [hostile] },
  })
}

describe.each(samples)('%s as CSV', (_, sample) => {
  it('has units in the header, cautions last and as many cells in every row', () => {
    const { data } = papaparse.parse<string[]>(renderCsv(words(sample())).trimEnd())
    const [header = [], ...rows] = data
    expect(header).toContain('stage loss (W)')
    expect(header.at(-1)).toBe('cautions')
    expect(new Set(header).size).toBe(header.length)
    expect(rows.length).toBeGreaterThan(1)
    for (const row of rows) {
      expect(row).toHaveLength(header.length)
      expect(row.at(-1)).toContain('lethal-voltage')
    }
  })
})

describe('CSV', () => {
  it('holds plain numbers that are those of the document', () => {
    const { data } = papaparse.parse<Record<string, string>>(renderCsv(words(rankSample())), { header: true })
    expect(data[0]).toMatchObject({
      rank: '1',
      'total (W)': '12.4831',
      'Qrr (nC)': '225',
      'voltage margin (%)': '34.5',
    })
    expect(data[1]!.softness).toBe('')
    expect(data[3]).toMatchObject({
      rank: '',
      accepted: 'no',
      'total (W)': '',
      thermal: 'none',
      reasons: 'no-stable-temperature',
    })
  })

  it('keeps a text from becoming a formula and a negative number a number', () => {
    const sample = swapSample()
    const text = renderCsv(words({ ...sample, price_difference: -0.25 }))
    expect(text).toContain(',-0.25,')
    const { data } = papaparse.parse<string[]>(renderCsv(hostileRank()).trimEnd())
    expect(data[2]![1]).toBe(`'${hostile.replace('\u001B', '\uFFFD')}`)
  })
})

describe.each(samples)('%s as Markdown', (_, sample) => {
  it('has complete tables: every row with as many cells as its header', () => {
    const lines = renderMarkdown(words(sample())).split('\n')
    let cells = 0
    for (const line of lines) {
      if (!line.startsWith('|')) cells = 0
      else if (cells === 0) cells = cellsOf(line)
      else expect(cellsOf(line)).toBe(cells)
    }
  })

  it('carries every caution', () => {
    const result = words(sample())
    const text = renderMarkdown(result)
    for (const { code } of result.cautions) expect(text).toContain(`**${code}:**`)
  })
})

function cellsOf(line: string): number {
  return line.split(/(?<!\\)\|/).length
}

describe('Markdown', () => {
  it('passes a Markdown linter, line length and table width left aside', () => {
    const strings = Object.fromEntries(samples.map(([name, sample]) => [name, renderMarkdown(words(sample()))]))
    strings.hostile = renderMarkdown(hostileRank())
    const found = lint({ strings, config: { default: true, MD013: false } })
    expect(found).toEqual({ rank: [], trend: [], swap: [], hostile: [] })
  })

  it('shows text from files as text', () => {
    const text = renderMarkdown(hostileRank())
    // biome-ignore lint/suspicious/noControlCharactersInRegex: the escape character is what is looked for
    expect(text).not.toMatch(/<img|(?<!\\)`|(?<!\\)\[a|\u001B/)
    expect(text).toContain('\\=1+1\\|&lt;img src=x onerror=alert(1)&gt;\\`\\*\\_\\[a\\](http:&#47;&#47;b)')
  })
})

describe('HTML', () => {
  it('shows text from files as text and loads nothing', () => {
    const page = renderHtml(hostileRank())
    expect(page).not.toContain('<img')
    expect(page).toContain('&lt;img src=x onerror=alert(1)&gt;')
    expect(page).toContain("default-src 'none'")
    expect(page).not.toMatch(/<script|url\((?!#)/)
    expect(page.replace(/"[^"]*"/g, '""')).not.toMatch(/<[^>]*\s(src|href)=/)
  })

  it.each(samples)('closes every element of %s', (_, sample) => {
    expectBalanced(renderHtml(words(sample())))
  })
})

/** Every opening tag has its closing tag, in order. */
function expectBalanced(markup: string) {
  const open: string[] = []
  for (const [, closing, name, rest] of markup.matchAll(/<(\/?)([a-zA-Z][\w-]*)((?:[^>"]|"[^"]*")*)>/g)) {
    if (name === 'meta' || rest!.endsWith('/')) continue
    if (closing === '') open.push(name!)
    else expect(open.pop()).toBe(name)
  }
  expect(open).toEqual([])
}

describe('JSON', () => {
  it.each(samples)('gives %s back unchanged, with the same bytes each time', (_, sample) => {
    const result = words(sample())
    const text = renderJson(result)
    expect(JSON.parse(text)).toEqual(result)
    expect(renderJson(words(sample()))).toBe(text)
    expect(text.endsWith('}\n')).toBe(true)
  })

  it('lets no character steer a terminal, and loses none', () => {
    const title = 'a\u001B[2J\u009Bb\u202Ec'
    const text = renderJson({ title })
    expect(text).toBe('{\n  "title": "a\\u001b[2J\\u009bb\\u202ec"\n}\n')
    expect(JSON.parse(text)).toEqual({ title })
  })
})

describe('the schema of results', () => {
  const schema = JSON.parse(readFileSync(new URL('../../schemas/result.schema.json', import.meta.url), 'utf8'))
  const validate = new Ajv2020({ strict: true, strictRequired: false, allErrors: true, allowUnionTypes: true }).compile(
    schema,
  )

  it.each(samples)('accepts %s before and after it is worded', (_, sample) => {
    expect(validate(sample()), JSON.stringify(validate.errors)).toBe(true)
    expect(validate(words(sample())), JSON.stringify(validate.errors)).toBe(true)
  })

  it('accepts the document of an error', () => {
    const problem = {
      file: 'a.yaml',
      line: 14,
      column: 18,
      code: 'unit-unknown',
      path: 'frequency',
      found: '"khz"',
      expected: 'Hz',
      hint: '',
    }
    expect(validate({ error: { code: 'unit-unknown', text: 'one problem', problems: [problem] } })).toBe(true)
  })

  it('refuses a further loss row, a missing key and a rank for nobody', () => {
    const { candidates, ...rest } = rankSample()
    const [first, ...others] = candidates
    const added = { ...first!, losses_w: { ...first!.losses_w, tail: 1 } }
    expect(validate({ ...rest, candidates: [added, ...others] })).toBe(false)
    expect(validate({ ...rest, candidates: [{ ...first!, rank: 0 }, ...others] })).toBe(false)
    expect(validate(rest)).toBe(false)
  })
})

describe('columns over the mains', () => {
  it('stand in every form with the voltage in their title', () => {
    const sample = rankSample()
    const at_mains = [207, 230, 253].map((mains_v) => ({
      mains_v,
      total_w: 5,
      stage_loss_w: 20,
      junction_c: 70,
      thermal: 'settled' as const,
    }))
    const result = words({ ...sample, candidates: sample.candidates.map((part) => ({ ...part, at_mains })) })
    expect(renderCsv(result)).toContain('207 V: stage loss (W),207 V: total (W),207 V: Tj (°C)')
    expect(renderMarkdown(result)).toContain('### Over the mains')
    expect(renderTable(result, { width: 80, colour: false })).toMatch(/\n +207 V: +230 V: +253 V:\n/)
  })
})
