import { writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { scratchFolder } from '../commands/scratch.ts'
import { ebbwatt } from './run-command.ts'

const goodRecord = `id: good
class: ultrafast
ratings: {reverse_voltage: 200 V, average_current: 16 A, junction: 175 degC}
thermal: {junction_to_case: 1.4 K/W}
recovery:
  - {fixture: ramp, current: 16 A, slope: 200 A/us, junction: 125 degC, trr: 52 ns, qrr: 190 nC}
`

const goodStage = `stage: boost
input: {voltage: 48 V}
output: {voltage: 120 V, current: 5 A}
frequency: 100 kHz
inductor: {inductance: 150 uH}
cooling: {case: 80 degC}
records: [good.yaml]
`

/** The good stage with some of its text replaced. */
function stageWith(...changes: readonly (readonly [string, string])[]): string {
  return changes.reduce((text, [from, to]) => {
    if (!text.includes(from)) throw new Error(`the stage does not hold ${from}`)
    return text.replace(from, to)
  }, goodStage)
}

interface Case {
  readonly name: string
  readonly text: string | Buffer
  /** "line:column code path" of every problem, in order. */
  readonly problems: readonly string[]
}

const stages: readonly Case[] = [
  {
    name: 'missing and unknown units, and a decimal comma',
    text: stageWith(['100 kHz', '100 khz'], ['48 V', '48'], ['{inductance: 150 uH}', '\n  inductance: 150,5 uH']),
    problems: [
      '2:18 unit-missing input.voltage',
      '4:12 unit-unknown frequency',
      '6:15 number-decimal-comma inductor.inductance',
    ],
  },
  {
    name: 'misspelt keys and words, and what is missing through them',
    text: stageWith(['frequency', 'freqency'], ['boost', 'bost'], ['inductor: {inductance: 150 uH}\n', '']),
    problems: ['1:1 key-missing inductor', '1:8 word-unknown stage', '4:1 key-unknown '],
  },
  {
    name: 'quantities of another kind, zero, negative and not finite',
    text: stageWith(['48 V', '48 A'], ['100 kHz', '0 Hz'], ['150 uH', '-150 uH'], ['5 A', '1e999 A']),
    problems: [
      '2:18 unit-dimension input.voltage',
      '3:35 number-not-finite output.current',
      '4:12 number-zero frequency',
      '5:24 number-negative inductor.inductance',
    ],
  },
  {
    name: 'an anchor and an alias',
    text: stageWith(['case: 80', 'case: &a 80'], ['100 kHz', '*a']),
    problems: ['4:12 yaml-forbidden frequency', '6:20 yaml-forbidden cooling.case'],
  },
  { name: 'a directive', text: `%YAML 1.1\n---\n${goodStage}`, problems: ['1:1 yaml-forbidden '] },
  { name: 'an open bracket', text: stageWith(['48 V}', '48 V']), problems: ['3:1 yaml-syntax '] },
  {
    name: 'a key twice and a name of the language',
    text: stageWith(['inductor', 'frequency: 90 kHz\n__proto__: {a: 1}\ninductor']),
    problems: ['5:1 yaml-duplicate-key ', '6:1 yaml-forbidden '],
  },
  {
    name: 'the input of another topology',
    text: stageWith(['boost', 'mains-boost']),
    problems: ['2:1 key-missing input.mains', '2:9 key-not-here input.voltage'],
  },
  {
    name: 'a boost that steps down',
    text: stageWith(['120 V', '20 V']),
    problems: ['3:19 values-contradict output.voltage'],
  },
  {
    name: 'parts that no record bears',
    text: `${goodStage}candidates: [god]\nincumbent: nobody\n`,
    problems: ['8:14 id-unknown candidates[1]', '9:12 id-unknown incumbent'],
  },
  {
    name: 'records that are not there',
    text: stageWith(['good.yaml', 'nowhere, good.yaml']),
    problems: ['0:0 file-missing '],
  },
  {
    name: 'a decimal comma in braces, told once, and a missing word beside its misspelling',
    text: stageWith(['case: 80 degC', 'ambient: 45 degC, sink_to_ambient: 3,5 K/W'], ['current: 5 A', 'curent: 5 A']),
    problems: ['3:26 key-unknown output', '6:46 number-decimal-comma cooling.sink_to_ambient'],
  },
  {
    name: 'a key that is indented too far',
    text: stageWith(['inductor', ' inductor']),
    problems: ['4:12 yaml-syntax '],
  },
  {
    name: 'the file of another command',
    text: 'capture: ramp\nfile: a.csv\ncolumns: {current: {column: 1, unit: A}}\n',
    problems: ['1:1 file-kind '],
  },
  { name: 'records instead of a stage', text: goodRecord, problems: ['1:1 file-kind '] },
  { name: 'nothing at all', text: '', problems: ['1:1 file-empty '] },
]

const records: readonly Case[] = [
  {
    name: 'both forms of the forward characteristic, a misspelt class',
    text: `${goodRecord.replace('ultrafast', 'ultrafst')}forward: [{current: 16 A, drop: 1 V}]\nforward_line: {threshold: 0.95 V, resistance: 35 mohm}\n`,
    problems: ['2:8 word-unknown class', '8:1 key-not-here forward_line'],
  },
  {
    name: 'recovery rows, each wrong in its own way',
    text: `id: rows
class: fast
ratings: {reverse_voltage: 200 V, average_current: 16, junction: 175 degF}
recovery:
  - {fixture: ramp, current: 8 A, slope: 100 A/us}
  - {fixture: step, current: 0.5 A, reverse: 1 A}
  - {fixture: slope, trr: 20 ns}
  - {fixture: ramp, trr: 20 ns, trr_by: line-80-20, peak: 3 A}
`,
    problems: [
      '3:52 unit-missing ratings.average_current',
      '3:66 unit-unknown ratings.junction',
      '5:5 key-missing recovery[1].trr',
      '6:5 key-missing recovery[2].trr',
      '7:15 word-unknown recovery[3].fixture',
      '8:41 word-unknown recovery[4].trr_by',
      '8:53 key-unknown recovery[4]',
    ],
  },
  {
    name: 'a map keyed by id',
    text: 'first: {id: a, class: fast}\n',
    problems: ['1:1 key-missing class', '1:1 key-missing id', '1:1 key-missing ratings', '1:1 key-unknown '],
  },
  {
    name: 'two records of one id',
    text: `${goodRecord}`.replace(/^/gm, '  ').replace('  id', '- id').trimEnd().concat('\n').repeat(2),
    problems: ['7:3 id-duplicate id'],
  },
  { name: 'another encoding', text: Buffer.from('id: caf\xe9\n', 'latin1'), problems: ['1:8 file-not-text '] },
  { name: 'a tag', text: 'id: a\nclass: !!js/function fast\n', problems: ['2:8 yaml-forbidden '] },
]

function problemsOf(
  command: string,
  text: string | Buffer,
): { readonly code: number | null; readonly problems: readonly string[] } {
  const folder = scratchFolder()
  writeFileSync(join(folder, 'good.yaml'), goodRecord)
  writeFileSync(join(folder, 'case.yaml'), text)
  const { code, out, err } = ebbwatt([command, 'case.yaml', '--json'], { cwd: folder })
  const { error } = JSON.parse(out)
  const problems: { line: number; column: number; code: string; path: string }[] = error.problems
  for (const each of problems) expect(err).toContain(each.code)
  expect(err).not.toContain('    at ')
  return { code, problems: problems.map((each) => `${each.line}:${each.column} ${each.code} ${each.path}`) }
}

describe('the good files of these tests', () => {
  it('pass', () => {
    const folder = scratchFolder()
    writeFileSync(join(folder, 'good.yaml'), goodRecord)
    writeFileSync(join(folder, 'case.yaml'), goodStage)
    expect(ebbwatt(['check', 'case.yaml', 'good.yaml'], { cwd: folder })).toMatchObject({ code: 0, err: '' })
  })
})

describe('a broken stage file is refused with all its problems and their places', () => {
  it.each(stages)('$name', ({ text, problems }) => {
    expect(problemsOf('rank', text)).toEqual({ code: 2, problems })
  })
})

it('a broken stage and its broken records are told in one list, warnings at their lines and marked', () => {
  const folder = scratchFolder()
  writeFileSync(join(folder, 'good.yaml'), goodRecord.replace('16 A', '16').replace('class: ultrafast', 'class: ultra'))
  writeFileSync(join(folder, 'case.yaml'), stageWith(['100 kHz', '100'], ['48 V', '48'], ['150 uH', '150 H']))
  for (const command of ['rank', 'check']) {
    const { code, out, err } = ebbwatt([command, 'case.yaml', '--json'], { cwd: folder })
    expect(code).toBe(2)
    const told = err.match(/^\S+:\d+:\d+ {2}(?:warning {2})?[a-z-]+/gm)
    expect(told).toEqual([
      'case.yaml:2:18  unit-missing',
      'case.yaml:4:12  unit-missing',
      'case.yaml:5:24  warning  value-implausible',
      'good.yaml:2:8  word-unknown',
      'good.yaml:3:52  unit-missing',
    ])
    expect(JSON.parse(out).error.text).toBe('4 problems stand in the way')
  }
})

describe('a broken record file is refused with all its problems and their places', () => {
  it.each(records)('$name', ({ text, problems }) => {
    expect(problemsOf('check', text)).toEqual({ code: 2, problems })
  })
})
