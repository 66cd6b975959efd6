import { readdirSync, readFileSync } from 'node:fs'
import { parseAst } from 'vite'
import { describe, expect, it } from 'vitest'

interface Found {
  readonly place: string
  readonly pattern: string
  readonly flags: string
}

/** Every regular expression that stands in the sources, by walking their syntax trees. */
function regularExpressions(): readonly Found[] {
  const files = readdirSync('src', { recursive: true, encoding: 'utf8' }).filter((name) => name.endsWith('.ts'))
  return files.filter((name) => !name.startsWith('build/')).flatMap((name) => inFile(`src/${name}`))
}

function inFile(path: string): readonly Found[] {
  const text = readFileSync(path, 'utf8')
  const found: Found[] = []
  const walk = (node: unknown): void => {
    if (Array.isArray(node)) for (const one of node) walk(one)
    else if (typeof node === 'object' && node !== null) {
      const { regex, start } = node as { regex?: { pattern: string; flags: string }; start?: number }
      if (regex !== undefined) {
        const line = text.slice(0, start).split('\n').length
        found.push({ place: `${path}:${line}`, pattern: regex.pattern, flags: regex.flags })
      }
      for (const value of Object.values(node)) walk(value)
    }
  }
  walk(parseAst(text, { lang: 'ts' }))
  return found
}

const length = 40_000

/** What such a pattern likes to go back over: its own signs and the usual ones, many times, with an end that fits nothing. */
function adversarialTexts(pattern: string): readonly string[] {
  const own = [...new Set(pattern.match(/[\p{L}\p{N}=,;:.%/"'<>|_*#+@ -]/gu) ?? [])]
  const words = pattern.match(/[^\\()[\]{}?*+|^$.]{2,}/g) ?? []
  const units = [
    ...own,
    ...words,
    'a',
    '0',
    ' ',
    '\t',
    '\n',
    '.',
    '-',
    '"',
    "'",
    '\\',
    'a b',
    '0,',
    '0.',
    ' 1',
    'a: ',
    '- ',
    'A0_',
  ]
  const begun = ['', 'a', '0', '"', '{', '[']
  return units.flatMap((unit) => begun.map((start) => `${start}${unit.repeat(length / unit.length)}\u0001!`))
}

/** Processor time of one use; a global pattern is used as in `replaceAll`, from every place. */
function milliseconds(expression: RegExp, text: string): number {
  const before = process.cpuUsage().user
  if (expression.global) text.replace(expression, '')
  else if (expression.sticky) expression.exec(text)
  else expression.test(text)
  return (process.cpuUsage().user - before) / 1000
}

const all = regularExpressions()
/** Patterns that no long text of a person can come to, and why. */
const bounded: readonly (readonly [file: string, pattern: RegExp, why: string])[] = [
  ['src/report/review/compact-drawing.ts', /./, 'markup of ours, in which every text of a person is escaped'],
  ['src/evidence/third-figure.ts', /^0\+\$$/, 'the digits of one number'],
  ['src/report/format.ts', /0\+\$$/, 'the digits of one number'],
  ['src/commands/usage-failure.ts', /Wanted is/, 'one sentence of ours about one word of the command line'],
]
const facingPeople = all.filter(
  ({ place, pattern }) => !bounded.some(([file, of]) => place.startsWith(file) && of.test(pattern)),
)

describe('regular expressions', () => {
  it('are found in the sources, all of them as literals or from words of ours', () => {
    expect(all.length).toBeGreaterThan(30)
    const built = readdirSync('src', { recursive: true, encoding: 'utf8' })
      .filter((name) => name.endsWith('.ts'))
      .filter((name) => /new RegExp\(|RegExp\(/.test(readFileSync(`src/${name}`, 'utf8')))
    // The key that a kind of file has at its top, from a list in the same file.
    expect(built).toEqual(['commands/check.ts'])
  })

  it.each(facingPeople)('$place is done with any long text in time: $pattern', ({ pattern, flags }) => {
    const slow = adversarialTexts(pattern).find((text) => {
      // The least of three: the first may carry the compiler's time, or another process's.
      const takes = () => milliseconds(new RegExp(pattern, flags), text) > 60
      return takes() && takes() && takes()
    })
    expect(slow?.slice(0, 20)).toBeUndefined()
  })

  it('that no long text can come to are all there still', () => {
    for (const [file, of, why] of bounded) {
      expect(
        all.some(({ place, pattern }) => place.startsWith(file) && of.test(pattern)),
        why,
      ).toBe(true)
    }
  })

  it('built from the name of a key is, too', () => {
    const topKey = /^(?:\{[ \t]*)?["']?stage["']?[ \t]*:/m
    for (const text of adversarialTexts(topKey.source)) expect(milliseconds(topKey, text)).toBeLessThan(200)
  })
})
