import { describe, expect, it } from 'vitest'
import { CommandFailure } from '../../src/commands/failure.ts'
import { outcomeOf } from '../../src/commands/outcome.ts'
import type { Problem } from '../../src/problems/problem.ts'
import { recordingSession } from './session-double.ts'

const problem: Problem = {
  code: 'unit-unknown',
  file: 'pump.yaml',
  line: 2,
  column: 12,
  path: 'frequency',
  found: '100 khz',
  expected: 'a frequency such as "100 kHz"',
  hint: 'did you mean "kHz"?',
}

async function outcome(argv: readonly string[], work: () => Promise<number>) {
  const session = recordingSession()
  const code = await outcomeOf(session, argv, work)
  return { code, out: session.printed.join(''), err: session.told.join('') }
}

describe('the end of a run', () => {
  it('is the exit code of the work', async () => {
    expect(await outcome([], async () => 3)).toEqual({ code: 3, out: '', err: '' })
  })

  it('tells every problem with its line and exits with 2', async () => {
    const sources = new Map([['pump.yaml', 'stage: boost\nfrequency: 100 khz\n']])
    const twice = [problem, { ...problem, line: 9, column: 1 }]
    const { code, out, err } = await outcome(['rank'], async () => {
      throw new CommandFailure(twice, sources)
    })
    expect(code).toBe(2)
    expect(out).toBe('')
    expect(err).toBe(
      [
        'pump.yaml:2:12  unit-unknown  frequency: "100 khz": "khz" is no unit here (did you mean "kHz"?)',
        '    frequency: 100 khz',
        '               ^^^^^^^',
        'pump.yaml:9:1  unit-unknown  frequency: "100 khz": "khz" is no unit here (did you mean "kHz"?)',
        '',
      ].join('\n'),
    )
  })

  it('puts one document on stdout where --json was asked for', async () => {
    const { code, out } = await outcome(['rank', 'pump.yaml', '--json'], async () => {
      throw new CommandFailure([problem])
    })
    expect(code).toBe(2)
    expect(JSON.parse(out)).toEqual({
      error: {
        code: 'unit-unknown',
        text: 'pump.yaml:2:12  unit-unknown  frequency: "100 khz": "khz" is no unit here (did you mean "kHz"?)',
        problems: [problem],
      },
    })
  })

  it('counts several problems in the document', async () => {
    const { out } = await outcome(['--json'], async () => {
      throw new CommandFailure([problem, problem])
    })
    expect(JSON.parse(out).error).toMatchObject({ code: 'input-unusable', text: '2 problems stand in the way' })
  })

  it('counts those that a bounded list only numbers, and no warning', async () => {
    const warning = { ...problem, code: 'value-implausible', line: 1 } as const
    const { out, err } = await outcome(['--json'], async () => {
      throw new CommandFailure([problem, { ...problem, code: 'more-problems', found: '30' }], new Map(), [warning])
    })
    expect(JSON.parse(out).error).toMatchObject({ text: '31 problems stand in the way', problems: [{}, {}] })
    expect(err.split('\n').map((line) => /warning {2}[a-z-]+|[a-z]+-[a-z]+/.exec(line)?.[0])).toEqual([
      'warning  value-implausible',
      'more-problems',
      'unit-unknown',
      undefined,
    ])
  })

  it('does not repeat in the text what the document says of the command line', async () => {
    const { out } = await outcome(['--json'], async () => {
      throw new CommandFailure([{ ...problem, file: 'command line', line: 0, column: 0, path: '--from' }])
    })
    expect(JSON.parse(out).error.text).toBe('--from: "100 khz": "khz" is no unit here (did you mean "kHz"?)')
  })

  it('takes --json after -- for a name', async () => {
    const { out } = await outcome(['rank', '--', '--json'], async () => {
      throw new CommandFailure([problem])
    })
    expect(out).toBe('')
  })

  it('owns up to a defect with its stack and exits with 1', async () => {
    const { code, out, err } = await outcome(['--json'], async () => {
      throw new TypeError('x is not a function')
    })
    expect(code).toBe(1)
    expect(err).toMatch(
      /^internal error: this is a defect of ebbwatt, not of your input\nTypeError: x is not a function\n {4}at /,
    )
    expect(JSON.parse(out).error).toEqual({
      code: 'internal-fault',
      text: 'TypeError: x is not a function',
      problems: [],
    })
  })
})
