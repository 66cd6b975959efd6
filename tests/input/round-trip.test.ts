import fc, { type Arbitrary } from 'fast-check'
import { expect, it } from 'vitest'
import type { RecoveryRow, RecoveryTimeDefinition, RectifierRecord } from '../../src/domain/rectifier.ts'
import { readRecords } from '../../src/input/read-records.ts'
import { writeRecords } from './write-record.ts'

const place = { name: '', file: '', line: 0, column: 0 }
const positive = fc.double({ min: 1e-12, max: 1e12, noNaN: true })
const kelvin = fc.double({ min: 1, max: 1000, noNaN: true })
const maybe = <T>(value: Arbitrary<T>) => fc.option(value, { nil: null })
/** A share that survives being written as a percentage. */
const share = fc.integer({ min: 0, max: 100 }).map((percent) => percent / 100)
/** Any text that a person can type; the YAML writer chooses the quotes. */
const freeText = fc
  .string({ unit: 'grapheme', minLength: 1, maxLength: 40 })
  .filter((text) => !/[\p{Cc}\p{Cs}]/u.test(text))
const id = freeText.filter((text) => text.length <= 200)

const basics = {
  grade: fc.constantFrom('measured' as const, 'typical' as const, 'maximum' as const, 'estimated' as const),
  spread: maybe(share),
  source: maybe(freeText),
  place: fc.constant(place),
  junction: maybe(kelvin),
}
const definition: Arbitrary<RecoveryTimeDefinition> = fc.oneof(
  fc.record({ kind: fc.constantFrom('line-90-25', 'line-75-50', 'level-25', 'level-10', 'unknown') }),
  fc.record({ kind: fc.constant('level'), until: positive }),
) as Arbitrary<RecoveryTimeDefinition>
const ramp: Arbitrary<RecoveryRow> = fc
  .record({
    fixture: fc.constant('ramp' as const),
    current: maybe(positive),
    slope: maybe(positive),
    voltage: maybe(positive),
    recoveryTime: maybe(positive),
    recoveryTimeBy: definition,
    charge: positive,
    peakReverseCurrent: maybe(positive),
    softness: maybe(positive),
    softnessBy: fc.constantFrom('times' as const, 'slopes' as const),
    ...basics,
  })
  .map((row) => ({
    ...row,
    recoveryTimeBy: row.recoveryTime === null ? { kind: 'unknown' } : row.recoveryTimeBy,
    softnessBy: row.softness === null ? 'times' : row.softnessBy,
  }))
const step: Arbitrary<RecoveryRow> = fc.record({
  fixture: fc.constant('step' as const),
  current: positive,
  reverse: fc.double({ min: 1, max: 10, noNaN: true }),
  until: fc.double({ min: 0.01, max: 0.9, noNaN: true }),
  recoveryTime: fc.double({ min: 2e-9, max: 1e-6, noNaN: true }),
  storageTime: maybe(fc.double({ min: 0, max: 1.9e-9, noNaN: true }).filter((time) => time === 0 || time > 1e-30)),
  ...basics,
})
const forwardRow = fc.record({ current: positive, drop: positive, ...basics })
const forwardLine = fc.record({
  threshold: positive,
  resistance: positive,
  thresholdPerKelvin: maybe(fc.double({ min: -1, max: -1e-9, noNaN: true })),
  resistancePerKelvin: maybe(positive),
  ...basics,
})
const capacitance: Arbitrary<RectifierRecord['capacitance']> = fc.oneof(
  fc.record({
    kind: fc.constant('law' as const),
    zeroBias: positive,
    builtIn: positive,
    grading: share.filter((x) => x < 1),
  }),
  fc.record({ kind: fc.constant('charge' as const), charge: positive, voltage: positive }),
  fc.record({
    kind: fc.constant('points' as const),
    points: fc.array(fc.record({ voltage: positive, capacitance: positive }), { minLength: 1, maxLength: 3 }),
  }),
)
const thermal: Arbitrary<RectifierRecord['thermal']> = fc.oneof(
  fc.record({ kind: fc.constant('case' as const), junctionToCase: positive, caseToSink: maybe(positive) }),
  fc.record({ kind: fc.constant('ambient' as const), junctionToAmbient: positive, mounting: maybe(freeText) }),
)
const record: Arbitrary<RectifierRecord> = fc
  .record({
    id,
    class: fc.constantFrom('standard', 'ultrafast', 'schottky', 'sic-schottky', 'body-diode') as Arbitrary<
      RectifierRecord['class']
    >,
    title: maybe(freeText),
    origin: maybe(freeText),
    place: fc.constant(place),
    ratings: fc.record({ reverseVoltage: positive, averageCurrent: positive, junction: kelvin }),
    thermal: maybe(thermal),
    price: maybe(positive),
    forward: fc.array(forwardRow, { maxLength: 2 }),
    forwardLine: maybe(forwardLine),
    recovery: fc.array(fc.oneof(ramp, step), { maxLength: 3 }),
    leakage: fc.array(fc.record({ voltage: positive, current: positive, ...basics }), { maxLength: 2 }),
    capacitance: maybe(capacitance),
    forwardRecovery: maybe(fc.record({ peak: positive, time: positive, slope: positive })),
    deadTime: maybe(fc.record({ before: positive, after: positive })),
    channel: maybe(fc.record({ onResistance: positive, perKelvin: positive })),
  })
  .map((made) => ({
    ...made,
    forward: made.forwardLine === null ? made.forward : [],
    deadTime: made.class === 'body-diode' ? made.deadTime : null,
    channel: made.class === 'body-diode' ? made.channel : null,
  }))

/** Where a row stands is not part of what it says; percentages may round in the last place. */
function comparable(value: unknown): unknown {
  const text = JSON.stringify(value, (key, inner) => {
    if (key === 'place') return undefined
    return key === 'spread' && typeof inner === 'number' ? Number(inner.toPrecision(12)) : inner
  })
  return JSON.parse(text)
}

it('records survive being written as YAML and read back, whatever they hold', () => {
  fc.assert(
    fc.property(fc.array(record, { minLength: 1, maxLength: 3 }), (records) => {
      const { value, problems } = readRecords(writeRecords(records), 'made.yaml')
      expect(problems).toEqual([])
      expect(comparable(value)).toEqual(comparable(records))
    }),
    { numRuns: 300 },
  )
})
