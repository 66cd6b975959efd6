import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { readCatalogue } from '../../src/input/read-catalogue.ts'
import { readMapping } from '../../src/input/read-mapping.ts'
import { readProfile } from '../../src/input/read-profile.ts'
import { readRecords } from '../../src/input/read-records.ts'
import { readStage } from '../../src/input/read-stage.ts'
import { formatProblem } from '../../src/problems/format-problem.ts'
import type { Reading } from '../../src/problems/problem.ts'
import { fullRecords, fullStage, smallStage } from './samples.ts'

const { stage } = readStage(smallStage, 's').value!
const mappingText =
  'catalogue: x\nrecord: {id: {column: 1}, class: fast, ratings: {reverse_voltage: {column: 2, unit: V}, average_current: 1 A, junction: {column: 3}}}\n'
const mapping = readMapping(mappingText, 'm').value!
const readers: Readonly<Record<string, (text: string) => Reading<unknown>>> = {
  stage: (text) => readStage(text, 'file'),
  records: (text) => readRecords(text, 'file'),
  mapping: (text) => readMapping(text, 'file'),
  profile: (text) => readProfile(text, 'file', stage),
  catalogue: (text) => readCatalogue(text, 'file', mapping),
}

/** Whatever the text: a value or problems, never both and never neither; each told with a place, no number that is none. */
function check(text: string): void {
  for (const [name, reader] of Object.entries(readers)) {
    const { value, problems, warnings } = reader(text)
    expect(value === null, `${name} gives a value or problems`).toBe(problems.length > 0)
    for (const problem of [...problems, ...warnings]) {
      expect(problem.line).toBeGreaterThanOrEqual(1)
      expect(problem.column).toBeGreaterThanOrEqual(1)
      const told = formatProblem(problem, text)
      expect(told.split('\n').length).toBeLessThanOrEqual(3)
      expect(told).not.toMatch(/undefined|\[object|\bnull\b.*null/)
    }
    if (value !== null) JSON.stringify(value, (key, inner) => finite(name, key, inner))
  }
}

function finite(name: string, key: string, value: unknown): unknown {
  if (typeof value === 'number') expect(Number.isFinite(value), `${name}: ${key} is finite`).toBe(true)
  return value
}

const bits = fc.constantFrom(
  ...[
    '[',
    ']',
    '{',
    '}',
    ': ',
    ', ',
    '- ',
    '\n',
    '\n  ',
    '"',
    "'",
    '&a ',
    '*a',
    '!!js/function ',
    '%YAML 1.1\n---\n',
    '---\n',
    '? ',
    '| ',
    '> ',
    '#',
    '\t',
  ],
  ...[
    '\u0000',
    '\ufeff',
    '\r\n',
    '\ud800',
    '\u202e',
    '\u2212',
    '0',
    '-',
    '1e400 V',
    '1e-30 A',
    '1e30 s',
    '.inf',
    '.nan',
    '0,5 ohm',
    'khz',
    '<<: ',
    '__proto__: ',
    'constructor: ',
  ],
  ...[
    'stage: boost\n',
    'id: x\n',
    'ratings: ',
    'duty_profile: ',
    'recovery: ',
    'catalogue: ',
    'record: ',
    'column: ',
    'hours',
    'load',
    ',',
  ],
)
const seeds = fc.constantFrom(
  fullStage,
  fullRecords,
  smallStage,
  mappingText,
  'hours [h],load [%]\n1,50\n2,60\n',
  'a,b,c\nx,5,3 K\ny,6,4 K\n',
)
const mutated = fc
  .tuple(seeds, fc.array(fc.tuple(fc.nat(), fc.nat({ max: 12 }), bits), { minLength: 1, maxLength: 6 }))
  .map(([seed, changes]) =>
    changes.reduce<string>((text, [where, length, bit]) => {
      const at = where % (text.length + 1)
      return text.slice(0, at) + bit + text.slice(at + length)
    }, seed),
  )

describe('any text', () => {
  it('that was a good file once is read or refused with places', () => {
    fc.assert(fc.property(mutated, check), { numRuns: 400 })
  })

  it('made of pieces is read or refused with places', () => {
    fc.assert(
      fc.property(
        fc.array(bits, { maxLength: 40 }).map((parts) => parts.join('')),
        check,
      ),
      { numRuns: 150 },
    )
  })

  it('of random characters is read or refused with places', () => {
    fc.assert(fc.property(fc.string({ unit: 'binary', maxLength: 200 }), check), { numRuns: 150 })
  })

  const deep = 30_000
  it.each<[string, string]>([
    ['brackets', '['.repeat(deep)],
    ['braces', '{a: '.repeat(deep)],
    ['dashes', '- '.repeat(deep)],
    ['question marks', '? '.repeat(deep)],
    ['colons', 'a: '.repeat(deep)],
    ['indentation', Array.from({ length: 2000 }, (_, level) => `${' '.repeat(level)}a:`).join('\n')],
    ['closed brackets', '['.repeat(deep) + ']'.repeat(deep)],
    ['one long line', `title: ${'x'.repeat(deep)}`],
    ['one long number', `frequency: ${'1'.repeat(deep)} Hz`],
    ['one long unit', `frequency: 1 ${'(Hz'.repeat(deep)}`],
    ['many keys', Array.from({ length: 20_000 }, (_, key) => `k${key}: 1`).join('\n')],
    ['many quotes', '"'.repeat(deep)],
    ['many backslashes', `title: "${'\\'.repeat(deep)}"`],
    ['many commas', ','.repeat(deep)],
  ])('of very many %s is refused in time, without running out of stack', (_, text) => {
    const before = process.cpuUsage().user
    check(text)
    expect((process.cpuUsage().user - before) / 1e6).toBeLessThan(20)
  })

  it('of more than 64 MB is refused before it is parsed', () => {
    const { problems } = readStage(' '.repeat(64 * 1024 * 1024 + 1), 'big.yaml')
    expect(problems.map((one) => formatProblem(one))).toEqual([
      'big.yaml  file-too-large  is too large (65 MB); at most 64 MB are read',
    ])
  })
})

it('names of object internals do no harm', () => {
  const text = '__proto__: {polluted: 1}\nconstructor: {prototype: {polluted: 1}}\n'
  expect(readStage(text, 'file').value).toBeNull()
  expect(({} as Record<string, unknown>).polluted).toBeUndefined()
})
