import { describe, expect, it } from 'vitest'
import { checkReferences } from '../../src/input/check-references.ts'
import { readRecords } from '../../src/input/read-records.ts'
import { readStage } from '../../src/input/read-stage.ts'
import { formatProblem } from '../../src/problems/format-problem.ts'
import { fullRecords, smallStage } from './samples.ts'
import { told } from './told.ts'

function read(text: string, file = 'records.yaml') {
  const { value, problems } = readRecords(text, file)
  expect(problems).toEqual([])
  return value!
}

describe('a record file', () => {
  it('is read in SI with the place of every row', () => {
    const [first, second] = read(fullRecords)
    expect(first).toMatchObject({
      id: 'larch-600v-8a-soft',
      class: 'soft-ultrafast',
      title: 'Larch 8 A 600 V soft recovery',
      origin: 'invented for the tests',
      place: { name: 'record', file: 'records.yaml', line: 1, column: 3 },
      ratings: { reverseVoltage: 600, averageCurrent: 8, junction: 448.15 },
      thermal: { kind: 'case', junctionToCase: 1.9, caseToSink: 0.5 },
      price: 0.62,
      forwardLine: null,
      capacitance: { kind: 'law', zeroBias: 400e-12, builtIn: 1.2, grading: 0.46 },
      forwardRecovery: { peak: 4, time: 60e-9, slope: 2e8 },
      deadTime: null,
      channel: null,
    })
    expect(first!.forward).toEqual([
      {
        current: 8,
        drop: 1.55,
        grade: 'typical',
        spread: null,
        source: null,
        place: { name: 'forward row 1', file: 'records.yaml', line: 9, column: 7 },
        junction: 298.15,
      },
      {
        current: 8,
        drop: 1.28,
        grade: 'maximum',
        spread: 0.01,
        source: 'table 4',
        place: { name: 'forward row 2', file: 'records.yaml', line: 10, column: 7 },
        junction: 398.15,
      },
    ])
    expect(first!.recovery).toEqual([
      {
        fixture: 'ramp',
        current: 8,
        slope: 2e8,
        voltage: 390,
        recoveryTime: 62e-9,
        recoveryTimeBy: { kind: 'line-90-25' },
        charge: 190e-9,
        peakReverseCurrent: 6.1,
        softness: null,
        softnessBy: 'times',
        grade: 'measured',
        spread: null,
        source: null,
        place: { name: 'recovery row 1', file: 'records.yaml', line: 12, column: 7 },
        junction: 398.15,
      },
      {
        fixture: 'ramp',
        current: null,
        slope: null,
        voltage: null,
        recoveryTime: 80e-9,
        recoveryTimeBy: { kind: 'level', until: 0.5 },
        charge: null,
        peakReverseCurrent: null,
        softness: 0.8,
        softnessBy: 'slopes',
        grade: 'typical',
        spread: null,
        source: null,
        place: { name: 'recovery row 2', file: 'records.yaml', line: 13, column: 7 },
        junction: null,
      },
      {
        fixture: 'step',
        current: 0.5,
        reverse: 1,
        until: 0.25,
        recoveryTime: 28e-9,
        storageTime: 12e-9,
        grade: 'maximum',
        spread: null,
        source: null,
        place: { name: 'recovery row 3', file: 'records.yaml', line: 14, column: 7 },
        junction: 298.15,
      },
    ])
    expect(first!.leakage).toMatchObject([{ voltage: 600, current: 40e-6, junction: 398.15, grade: 'typical' }])
    expect(second).toMatchObject({
      id: 'moth-100v-30a',
      title: null,
      origin: null,
      price: null,
      thermal: { kind: 'ambient', junctionToAmbient: 55, mounting: 'on 6 cm2 of copper' },
      forward: [],
      forwardLine: {
        threshold: 0.7,
        resistance: 8e-3,
        thresholdPerKelvin: -1.8e-3,
        resistancePerKelvin: 0.02e-3,
        grade: 'estimated',
        place: { name: 'forward line', line: 23, column: 17 },
      },
      recovery: [],
      leakage: [],
      capacitance: {
        kind: 'points',
        points: [
          { voltage: 10, capacitance: 400e-12 },
          { voltage: 50, capacitance: 200e-12 },
        ],
      },
      deadTime: { before: 40e-9, after: 30e-9 },
      channel: { onResistance: 8e-3, perKelvin: 0.006 },
    })
  })

  it('may hold one record instead of a list', () => {
    const [record, ...others] = read(
      'id: one\nclass: fast\nratings: {reverse_voltage: 100 V, average_current: 1 A, junction: 150 degC}\n',
    )
    expect(others).toEqual([])
    expect(record).toMatchObject({ id: 'one', place: { line: 1, column: 1 }, thermal: null, capacitance: null })
  })

  it('takes a charge as capacitance, and leaves out what a zero makes meaningless', () => {
    const one = (capacitance: string) =>
      read(
        `id: a\nclass: schottky\nratings: {reverse_voltage: 100 V, average_current: 1 A, junction: 150 degC}\ncapacitance: ${capacitance}\n`,
      )[0]!.capacitance
    expect(one('{charge: 20 nC, voltage: 400 V}')).toEqual({ kind: 'charge', charge: 20e-9, voltage: 400 })
    expect(one('{charge: 20 nC, voltage: 0 V}')).toBeNull()
    expect(one('{zero_bias: 20 pF, built_in: 0 V, grading: 0.5}')).toBeNull()
    expect(one('{points: [{voltage: 0 V, capacitance: 0 pF}]}')).toBeNull()
    expect(one('{points: [{voltage: 0 V, capacitance: 4 pF}]}')).toMatchObject({ kind: 'points' })
  })

  it.each(['current: 0 A', 'slope: 0 A/us', 'trr: 0 ns', 'qrr: 0 nC', 'irrm: 0 A'])('refuses a row with %s', (zero) => {
    const [key] = zero.split(':')
    const row = ['current: 8 A', 'slope: 200 A/us', 'trr: 30 ns', 'qrr: 40 nC', 'irrm: 2 A'].filter(
      (given) => !given.startsWith(`${key}:`),
    )
    const text = `id: a\nclass: fast\nratings: {reverse_voltage: 100 V, average_current: 1 A, junction: 150 degC}\nrecovery: [{fixture: ramp, ${[...row, zero].join(', ')}}]\n`
    expect(readRecords(text, 'file.yaml').problems.map(({ code }) => code)).toEqual(['number-zero'])
  })

  it('tells the first two hundred problems of very many, and how many more there are', () => {
    const text = Array.from({ length: 1000 }, () => '- {id: a}').join('\n')
    const { problems } = readRecords(text, 'file.yaml')
    expect(problems).toHaveLength(201)
    expect(formatProblem(problems[200]!)).toBe('file.yaml:100:3  more-problems  and 1800 more; these come first')
  })
})

describe('references across files', () => {
  const one = (id: string) =>
    `id: ${id}\nclass: fast\nratings: {reverse_voltage: 100 V, average_current: 1 A, junction: 150 degC}\n`
  const stage = readStage(
    `${smallStage}candidates: [first, secnod]\nincumbent: third\nswitch: {turn_on: {energy: 1 uJ, current: 1 A, voltage: 1 V, rectifier: frist}}\n`,
    'stage.yaml',
  ).value

  it('names both places of an id that stands in two files', () => {
    const records = [...read(one('first'), 'a.yaml'), ...read(one('first'), 'b.yaml')]
    expect(checkReferences(null, records).map((problem) => formatProblem(problem))).toEqual([
      'b.yaml:1:1  id-duplicate  id: "first" is the id of two records; the other stands at a.yaml:1:1 (give one of them another id)',
    ])
  })

  it('tells ids of the stage that no record bears, with the nearest', () => {
    const records = [...read(one('first')), ...read(one('second'))]
    expect(checkReferences(stage, records).map((problem) => formatProblem(problem))).toEqual([
      'stage.yaml:7:21  id-unknown  candidates[2]: no record has the id "secnod" (did you mean "second"?)',
      'stage.yaml:8:12  id-unknown  incumbent: no record has the id "third" (known are first, second)',
      'stage.yaml:9:73  id-unknown  switch.turn_on.rectifier: no record has the id "frist" (did you mean "first"?)',
    ])
  })
})

it('warns of nothing in good records', () => {
  expect(told(readRecords, fullRecords)).toBe('\n\n')
})
