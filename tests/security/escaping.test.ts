import { readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { scratchFolder } from '../commands/scratch.ts'
import { ebbwatt } from '../end-to-end/run-command.ts'

/** Titles that mean something to a terminal, a browser, a Markdown reader or a spreadsheet. */
const hostile = [
  '\\u001B[2J\\u001B]0;owned\\u0007 \\u202Etxet',
  '<script>fetch(1)</script> <img src=x onerror=alert(1)> &amp;',
  '| a | b |\\n|---|---| [link](javascript:alert(1)) ![x](http://x.test/y) `code` <b>',
  '=HYPERLINK(1)',
  '+1',
  '-1',
  '@SUM(A1)',
  '\\t=1+1',
  '"quoted", and comma',
]

function stageWith(title: string): string {
  const folder = scratchFolder()
  const id = title.replace(/\\u00[01][0-9A-F]|\\t|\\n/g, '').slice(0, 150)
  writeFileSync(
    join(folder, 'stage.yaml'),
    `stage: boost
title: "${title.replaceAll('"', '\\"')}"
input: {voltage: 48 V}
output: {voltage: 120 V, current: 5 A}
frequency: 100 kHz
inductor: {inductance: 150 uH}
cooling: {case: 70 degC}
records: [parts.yaml]
`,
  )
  const part = (name: string) => `- id: "${name.replaceAll('"', '\\"')}"
  class: schottky
  title: "${title.replaceAll('"', '\\"')}"
  ratings: {reverse_voltage: 200 V, average_current: 16 A, junction: 175 degC}
  thermal: {junction_to_case: 1.4 K/W}
`
  writeFileSync(join(folder, 'parts.yaml'), `${part(id)}${part('plain')}`)
  return folder
}

function shown(title: string, ...options: readonly string[]): string {
  const { code, out, err } = ebbwatt(['rank', 'stage.yaml', '--draws', '20', ...options], { cwd: stageWith(title) })
  expect(code, err).toBe(0)
  return out
}

describe.each(hostile)('the text %j', (title) => {
  it('does not steer a terminal', () => {
    for (const form of [[], ['--csv'], ['--markdown'], ['--json']]) {
      // biome-ignore lint/suspicious/noControlCharactersInRegex: these are what must not be there
      expect(shown(title, ...form)).not.toMatch(/[\u0000-\u0008\u000B-\u001F\u007F-\u009F\u202A-\u202E\u2066-\u2069]/)
    }
  })

  it('brings no element, no attribute and no address into a page', () => {
    const cwd = stageWith(title)
    for (const command of ['rank', 'review']) {
      const target = command === 'rank' ? 'out.svg' : 'out.html'
      const { code, err } = ebbwatt([command, 'stage.yaml', '-o', target], { cwd })
      expect(code, err).toBe(0)
    }
    expect(ebbwatt(['rank', 'stage.yaml', '-o', 'rank.html'], { cwd }).code).toBe(0)
    for (const name of ['out.svg', 'out.html', 'rank.html']) {
      const page = readFileSync(join(cwd, name), 'utf8')
      expect(page).not.toMatch(/<script>fetch|<img|<b>/)
      expect(page).not.toMatch(/(?:src|href)="(?:https?:|javascript:)/)
    }
  })

  it('opens no formula in a spreadsheet', () => {
    for (const line of shown(title, '--csv').split('\n')) {
      for (const cell of line.split(',')) expect(cell).not.toMatch(/^"?\s*[=@]|^"?\s*[+-](?!\d)/)
    }
  })

  it('adds no column, link, picture or element to a Markdown table', () => {
    const lines = shown(title, '--markdown').split('\n')
    const columns = lines.filter((line) => line.startsWith('|')).map((line) => line.split(/(?<!\\)\|/).length)
    const tables = lines.filter((line) => /^\|[ :-]+\|/.test(line)).length
    expect(new Set(columns).size).toBeLessThanOrEqual(tables)
    for (const line of lines) expect(line).not.toMatch(/(?<!\\)\]\((?:javascript|http)|<script>|<b>|<img/)
  })
})
