import { describe, expect, it } from 'vitest'
import { formatProblem } from '../../src/problems/format-problem.ts'
import { didYouMean, nearestWords } from '../../src/problems/nearest.ts'
import { type Problem, problemCodes, sortProblems } from '../../src/problems/problem.ts'
import { shown } from '../../src/problems/shown.ts'
import { problemSentence } from '../../src/problems/words.ts'

const problem = (more: Partial<Problem>): Problem => ({
  code: 'unit-unknown',
  file: 'catalogs-demo/stages/pump.yaml',
  line: 14,
  column: 18,
  path: 'frequency',
  found: '100 khz',
  expected: 'a frequency such as "100 kHz"',
  hint: 'did you mean "kHz"?',
  ...more,
})

describe('a problem as a person reads it', () => {
  it('has place, code, path and sentence, as the interface shows it', () => {
    expect(formatProblem(problem({}))).toBe(
      'catalogs-demo/stages/pump.yaml:14:18  unit-unknown  frequency: "100 khz": "khz" is no unit here (did you mean "kHz"?)',
    )
  })

  it('shows the line of the file with a caret below what was found', () => {
    const source = 'stage: boost\nfrequency: "100 khz"\n'
    expect(formatProblem(problem({ file: 'a.yaml', line: 2, column: 12 }), source)).toBe(
      `a.yaml:2:12  unit-unknown  frequency: "100 khz": "khz" is no unit here (did you mean "kHz"?)
    frequency: "100 khz"
               ^^^^^^^^^`,
    )
  })

  it('cuts a long line to what stands around the place, and never repeats control characters', () => {
    const source = `${'x'.repeat(500)}\u001b[31m100 khz${'y'.repeat(500)}`
    const [, line, caret] = formatProblem(problem({ line: 1, column: 506 }), source).split('\n')
    expect(line!.length).toBeLessThan(130)
    expect(line).not.toContain('\u001b')
    expect(line!.slice(caret!.indexOf('^'), caret!.lastIndexOf('^') + 1)).toBe('100 khz')
  })

  it('shows no line of a table, whose columns are not characters', () => {
    expect(formatProblem(problem({ file: 'parts.CSV', line: 1 }), 'a,b,c').split('\n')).toHaveLength(1)
  })

  it('has no place inside the file where there is none, and shows no line that the file has not', () => {
    expect(formatProblem(problem({ code: 'file-missing', line: 0, column: 0, path: '', hint: '' }))).toBe(
      'catalogs-demo/stages/pump.yaml  file-missing  there is no such file or folder',
    )
    expect(formatProblem(problem({ line: 99 }), 'one line').split('\n')).toHaveLength(1)
  })

  it.each(problemCodes)(
    'has words for %s, with and without a hint, that end neither in a blank nor an exclamation',
    (code) => {
      for (const hint of ['', 'do this']) {
        const sentence = problemSentence(problem({ code, hint }))
        expect(sentence).toMatch(/[^\s!]$/)
        expect(sentence).not.toMatch(/undefined|\(\)|; ?$|invalid|sorry/i)
      }
    },
  )
})

it('problems are sorted by file, line, column and code', () => {
  const places = [
    problem({ file: 'b', line: 1, column: 1 }),
    problem({ file: 'a', line: 10, column: 1 }),
    problem({ file: 'a', line: 9, column: 10 }),
    problem({ file: 'a', line: 9, column: 9, code: 'value-kind' }),
    problem({ file: 'a', line: 9, column: 9, code: 'key-unknown' }),
  ]
  expect(sortProblems(places)).toEqual([...places].reverse())
})

describe('the nearest word', () => {
  const known = ['frequency', 'inductor', 'input', 'output', 'kHz', 'MHz', 'mHz']
  it.each<[string, readonly string[]]>([
    ['freq', ['frequency']],
    ['outpt-of-stage', []],
    ['frequenzy', ['frequency']],
    ['freqeuncy', ['frequency']],
    ['FREQUENCY', ['frequency']],
    ['khz', ['kHz']],
    ['mhz', ['MHz', 'mHz']],
    ['inptu', ['input']],
    ['loop', []],
    ['', []],
    ['x'.repeat(100), []],
  ])('to "%s" is %j', (typed, near) => {
    expect(nearestWords(typed, known)).toEqual(near)
  })

  it('counts a hyphen for an underscore, and offers at most two', () => {
    expect(nearestWords('core-loss', ['core_loss'])).toEqual(['core_loss'])
    expect(didYouMean('ax', ['ab', 'ac', 'ad'])).toBe('did you mean "ab" or "ac"?')
    expect(didYouMean('q', ['frequency'])).toBe('')
  })
})

it('a piece of a file stands in a sentence on one line, cut, without control characters', () => {
  expect(shown('a\n\u001bb\u202ec')).toBe('a  b c')
  expect(shown('x'.repeat(500))).toHaveLength(60)
  expect([[], {}, null, undefined, true, 4].map(shown)).toEqual([
    'a list',
    'a group of keys',
    'nothing',
    'nothing',
    'true',
    '4',
  ])
})
