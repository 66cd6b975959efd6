import { describe, expect, it } from 'vitest'
import type { Stage } from '../../src/domain/stage.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { readRecords } from '../../src/input/read-records.ts'
import { readStage } from '../../src/input/read-stage.ts'
import { chargeAtTurnOff } from '../../src/models/charge-control.ts'
import { ringingPeakVoltage } from '../../src/models/peak-reverse-voltage.ts'
import { scaledTimeToPeak } from '../../src/models/ramp-root.ts'
import { choleskyFactor } from '../../src/numerics/cholesky.ts'
import { formatProblem } from '../../src/problems/format-problem.ts'
import { didYouMean } from '../../src/problems/nearest.ts'
import { turnOnMeaning } from '../../src/stage/measured-turn-on.ts'
import { prepareCandidate } from '../../src/study/candidate.ts'
import { judge } from '../../src/study/judge-candidate.ts'
import { rank } from '../../src/study/rank.ts'
import { loadDemo } from '../bench/demo.ts'

/** The ranks-and-ratings part of a record; rows follow. */
const part = 'id: a\nclass: standard\nratings: {reverse_voltage: 200 V, average_current: 2 A, junction: 100 degC}\n'

function calibrated(rows: string) {
  const { value, problems } = readRecords(part + rows, 'part.yaml')
  expect(problems).toEqual([])
  return calibrate({ record: value![0]!, blockingVoltage: 100 })
}

describe('defects that random inputs found', () => {
  it('a record of a thousand rows is looked at in a second, and of more is refused', () => {
    const rows = (count: number) => `forward:\n${'  - {current: 2 A, drop: 0.9 V, junction: 125 degC}\n'.repeat(count)}`
    const begin = process.cpuUsage().user
    const ramps = '  - {fixture: ramp, current: 2 A, slope: 100 A/us, qrr: 90 nC, grade: maximum}\n'.repeat(1000)
    calibrated(`${rows(1000)}recovery:\n${ramps}`)
    expect((process.cpuUsage().user - begin) / 1e6).toBeLessThan(5)
    expect(readRecords(part + rows(1001), 'part.yaml').problems.map(({ code, path }) => [code, path])).toEqual([
      ['list-length', 'forward'],
    ])
  })

  it('a junction without capacitance rings with nothing', () => {
    const capacitance = { kind: 'law', zeroBias: 0, builtIn: 0.8, grading: 0.4 } as const
    expect(ringingPeakVoltage({ voltage: 48, voltageFall: 2e-8, loopInductance: 1e-8, capacitance, parts: 1 })).toBe(48)
  })

  it.each([1e9, 1e16, 1e18, 1e25])('charge stored over %d lifetimes is the steady charge', (lifetimes) => {
    const input = { peakCurrent: 3, current: 2, conductionTime: lifetimes * 1e-9, lifetime: 1e-9 }
    expect(chargeAtTurnOff(input) / 2e-9).toBeCloseTo(1, 8)
  })

  it('the time to the peak of a ramp that takes very many lifetimes is tau minus tau_rr', () => {
    expect(scaledTimeToPeak(1e17, 1e17, 0.25)).toBeCloseTo(0.75, 12)
  })

  it.each([
    '{fixture: ramp, qrr: 1 nC, irrm: 1e-30 A}',
    '{fixture: ramp, slope: 1e-30 A/us, trr: 3 ns}',
    '{fixture: ramp, current: 1e-30 A, trr: 3 ns, qrr: 1e-30 nC, irrm: 0.1 A, softness: 0.1}',
    '{fixture: ramp, current: 1 A, slope: 100 A/us, softness: 1e9}',
    '{fixture: step, current: 1e30 A, reverse: 1 A, storage: 12 ns}',
    '{fixture: ramp, qrr: 10 nC, junction: 1e9 K}',
  ])('a row that no part can have is told and left out: %s', (row) => {
    const { rectifier, caveats } = calibrated(`recovery: [${row}]\n`)
    expect(caveats.map(({ code }) => code)).toContain('row-impossible')
    expect(rectifier.recovery?.origin).toBe('class-guess')
  })

  it('thousands of levels below one key are too deep, not a stack that runs out', () => {
    const text = `recovery:\n  - b:\n    ${'a: '.repeat(20_000)}`
    expect(readRecords(`${part}${text}\n x: 1\n`, 'part.yaml').problems.map(({ code }) => code)).toEqual([
      'yaml-too-deep',
    ])
  })

  it('twenty thousand levels on one line are refused at once', () => {
    const begin = process.cpuUsage().user
    for (const opening of ['a: ', '- ', '? ', '"k": ']) {
      const text = part.replace('id: a', `id: a\n ${opening.repeat(20_000)}`)
      expect(readRecords(text, 'part.yaml').problems.map(({ code, line }) => [code, line])).toEqual([
        ['yaml-too-deep', 2],
      ])
    }
    expect((process.cpuUsage().user - begin) / 1e6).toBeLessThan(2)
    const title = part.replace('class', 'title: "see a: b: c: - ? d: one"\nclass')
    expect(readRecords(title, 'part.yaml').problems).toEqual([])
  })

  it('a slip that breaks every line after it is told in a moment', () => {
    const rows = '  - {current: 8 A, drop: 1.55 V, junction: 25 degC, grade: typical}\n'.repeat(3000)
    const begin = process.cpuUsage().user
    const { problems } = readRecords(`  - 1\n${part}forward:\n${rows}`, 'part.yaml')
    expect(problems.map(({ code }) => code)).toContain('yaml-syntax')
    expect((process.cpuUsage().user - begin) / 1e6).toBeLessThan(4)
  })

  it('a line separator of another alphabet stays on its line in a message', () => {
    const problem = {
      code: 'word-unknown',
      file: 'a.yaml',
      line: 1,
      column: 1,
      path: '',
      found: '',
      expected: '',
      hint: '',
    } as const
    expect(formatProblem(problem, 'one\u2028two\u2029three')).toContain('one two three')
  })

  it('a gate drive that cannot reach the measured current adds no recovery', () => {
    const { rectifier } = calibrated('')
    const given = { energy: 1e-6, current: 1, voltage: 20, includesRectifier: 'yes', rectifier: 'a' } as const
    const meaning = turnOnMeaning({ given, testRectifier: rectifier, slope: -1e9, voltageFall: 1e-8 })
    expect(meaning.nominal.energy).toBeGreaterThan(0)
  })

  it('a covariance that rounding leaves a hair below zero is still one', () => {
    const [a, b] = [1, 1 - 1e-13]
    expect(() => choleskyFactor(Float64Array.from([a, b, b, b * b - 1e-9]), 2)).not.toThrow()
    expect(() => choleskyFactor(Float64Array.from([1, 2, 2, 1]), 2)).toThrow('not a covariance')
  })

  it('a hint repeats no control character of the word that is near', () => {
    expect(didYouMean('Part', ['\u0007Part'])).toBe('did you mean " Part"?')
  })

  it('a path repeats no control character in a message', () => {
    const problem = { code: 'file-missing', line: 0, column: 0, path: '', found: '', expected: '', hint: '' } as const
    expect(formatProblem({ ...problem, file: 'a\u001B[2J\u202E.csv' })).toMatch(/^a \[2J \.csv {2}file-missing/)
  })

  it.each(['-273 degC', '0.001 K', '1 K'])(
    'surroundings at %s, where a search may pass absolute zero, have a result',
    (cold) => {
      const text = `stage: buck
input: {voltage: 5.1 V}
output: {voltage: 5 V, current: 50 mA}
frequency: 5 kHz
inductor: {inductance: 1 uH}
switch: {thermal: {junction_to_sink: 0.1 K/W}}
cooling: {case: ${cold}}
`
      const stage = readStage(text, 'stage.yaml').value!.stage
      const thermal = 'thermal: {junction_to_ambient: 10 K/W}\nforward_line: {threshold: 0.2 V, resistance: 1 mohm}\n'
      const { value: records } = readRecords(part + thermal, 'part.yaml')
      const { candidates } = rank(stage, records!, { seed: 0, draws: 1, version: '', inputs: [] })
      expect(JSON.stringify(candidates)).not.toContain('NaN')
      expect(candidates).toHaveLength(1)
    },
  )

  it('a part that runs away is judged without the search for its edge, which a trend would pay at every point', () => {
    const { stage, records } = loadDemo('hot-schottky')
    const code = 'runaway-at-maximum-leakage'
    const record = records.find(({ id }) => id === 'acacia-100v-20a')!
    const at = (ambient: number): Stage => ({
      ...stage,
      cooling: { ...stage.cooling, ambientTemperature: ambient } as Stage['cooling'],
    })
    const isLost = (ambient: number): boolean =>
      judge(prepareCandidate(at(ambient), record, [])).reasons.some((reason) => reason.code === code)
    const ambient = Array.from({ length: 60 }, (_, step) => 293 + step).find(isLost)!
    const [judged] = judge(prepareCandidate(at(ambient), record, [])).reasons
    expect(judged).toMatchObject({ code, limit: null })
    const { candidates } = rank(at(ambient), [record], { seed: 0, draws: 1, version: '', inputs: [] })
    const [told] = candidates[0]!.reasons
    // One step of the search cooler it still settled.
    expect(told!.limit).toBeLessThan(told!.value!)
    expect(told!.limit).toBeGreaterThan(told!.value! - 1)
  })
})
