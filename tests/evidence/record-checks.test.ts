import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { caveatsOf } from './caveats.ts'
import { lumpedFigures } from './lumped.ts'
import { forwardRow, kelvin, leakageRow, place, rampRow, record, stepRow } from './records.ts'

function dataOf(code: string, fields: Partial<RectifierRecord>) {
  return caveatsOf(fields)
    .filter((caveat) => caveat.code === code)
    .map(({ data }) => data)
}

const line = {
  ...forwardRow({ place: place('forward line') }),
  threshold: 0.9,
  resistance: 0.05,
  thresholdPerKelvin: null,
  resistancePerKelvin: null,
}

describe('softness', () => {
  const snappy = (...recovery: RectifierRecord['recovery']) => dataOf('snappy', { recovery })
  const soft = (softness: number, fields: Parameters<typeof rampRow>[0] = {}) =>
    rampRow({ charge: 50e-9, softness, ...fields })

  it('below a half by the line definition is told, of the most abrupt row', () => {
    expect(snappy(soft(0.501))).toEqual([])
    expect(snappy(soft(0.4), soft(0.3, { current: 4 }), soft(0.35, { current: 2 }))).toEqual([
      { softness: expect.closeTo(0.3, 6), current: 4 },
    ])
  })

  it('is by the line definition however the row means its own', () => {
    // tau_rr over ta times 1.87896
    expect(snappy(soft(0.2, { softnessBy: 'slopes' }))).toEqual([{ softness: expect.closeTo(0.375792, 5), current: 8 }])
    expect(snappy(soft(0.4, { softnessBy: 'slopes' }))).toEqual([])
  })

  it('is not told of a row that only shows what its class is like', () => {
    const slow = { class: 'standard', recovery: [rampRow({ slope: 1e6, recoveryTime: 4e-6 })] } as const
    expect(dataOf('softness-unknown', slow)).toHaveLength(1)
    expect(dataOf('snappy', slow)).toEqual([])
  })
})

describe('a capacitance beside recovery rows', () => {
  const shares = (...recovery: RectifierRecord['recovery']) =>
    dataOf('capacitance-share', { recovery, capacitance: { kind: 'charge', charge: 20e-9, voltage: 400 } })

  it('is told from 30 % of a charge on, at the voltage of the row', () => {
    expect(shares(rampRow({ charge: 67e-9 }))).toEqual([])
    expect(shares(rampRow({ charge: 66e-9 }))).toEqual([{ share: expect.closeTo(20 / 66, 12), row: 'recovery row 1' }])
    // the charge goes with the root of the voltage: 10 nC at 100 V
    expect(shares(rampRow({ charge: 32e-9, voltage: 100 }))).toEqual([
      { share: expect.closeTo(10 / 32, 12), row: 'recovery row 1' },
    ])
  })

  it('of exactly 30 % is not told', () => {
    const capacitance = { kind: 'charge', charge: 3e-9, voltage: 400 } as const
    expect(dataOf('capacitance-share', { recovery: [rampRow({ charge: 10e-9 })], capacitance })).toEqual([])
  })

  it('has no share of a row without charge, without voltage or of a step fixture', () => {
    expect(shares(rampRow({ recoveryTime: 30e-9 }))).toEqual([])
    expect(shares(rampRow({ charge: 20e-9, voltage: null }))).toEqual([])
    expect(shares(stepRow({ recoveryTime: 30e-9 }))).toEqual([])
  })
})

describe('rows of one property that cannot both be of one part', () => {
  it('are told of forward voltage and of leakage, with their distance', () => {
    const forward = [forwardRow({ drop: 1.2 }), forwardRow({ drop: 1.6, place: place('forward row 2') })]
    // the first leaves 1.2002 ± 0.024 V, the second reads 1.6 ± 0.032 V
    const [told] = dataOf('rows-contradict', { forward })
    expect(told).toMatchObject({ row: 'forward row 2', other: 'forward row 1' })
    const left = 1 / (1 / 0.3 ** 2 + 1 / 0.024 ** 2)
    const expected = left * (1.35 / 0.3 ** 2 + 1.2 / 0.024 ** 2)
    expect(told!.distance).toBeCloseTo((1.6 - expected) / Math.hypot(Math.sqrt(left), 0.032), 9)
    const leakage = [leakageRow({ current: 5e-7 }), leakageRow({ current: 5e-6, place: place('leakage row 2') })]
    expect(dataOf('rows-contradict', { leakage })).toHaveLength(1)
  })
})

describe('the grades of what a record states', () => {
  const whole = (grade: 'maximum' | 'typical' | 'measured' | 'estimated') => ({
    recovery: [rampRow({ charge: 90e-9, grade })],
    forward: [forwardRow({ grade })],
    leakage: [leakageRow({ grade })],
  })

  it('are told where all of a property are maxima, with how far below its centre is taken', () => {
    expect(dataOf('maximum-only', whole('maximum'))).toEqual([
      { property: 'recovery and of forward voltage and of leakage', factors: '0.61 and 0.93 and 0.20' },
    ])
    expect(dataOf('maximum-only', { forwardLine: { ...line, grade: 'maximum' } })).toEqual([
      { property: 'forward voltage', factors: '0.93' },
    ])
    expect(dataOf('maximum-only', { forward: [forwardRow(), forwardRow({ grade: 'maximum' })] })).toEqual([])
    expect(dataOf('maximum-only', {})).toEqual([])
    expect(dataOf('maximum-only', whole('estimated'))).toEqual([])
  })

  it('of leakage do not count where leakage is not used', () => {
    expect(dataOf('maximum-only', { class: 'body-diode', leakage: [leakageRow({ grade: 'maximum' })] })).toEqual([])
  })

  it('are told where the main loss rests on typical figures: recovery, or all that a Schottky part has', () => {
    expect(dataOf('typical-only', whole('typical'))).toEqual([{ property: 'recovery' }])
    expect(dataOf('typical-only', { ...whole('typical'), recovery: [] })).toEqual([])
    const schottky = { ...whole('typical'), class: 'schottky', recovery: [] } as const
    expect(dataOf('typical-only', schottky)).toEqual([{ property: 'forward voltage and of leakage' }])
    const mixed = { ...schottky, leakage: [leakageRow({ grade: 'maximum' })] }
    expect(dataOf('typical-only', mixed)).toEqual([{ property: 'forward voltage' }])
    expect(dataOf('maximum-only', mixed)).toEqual([{ property: 'leakage', factors: '0.20' }])
  })

  it('are typical only beside an estimate too, but an estimate alone is not called typical', () => {
    const recovery = [rampRow({ charge: 90e-9 }), rampRow({ charge: 90e-9, grade: 'estimated' })]
    expect(dataOf('typical-only', { recovery })).toHaveLength(1)
    expect(dataOf('typical-only', whole('estimated'))).toEqual([])
    expect(dataOf('typical-only', whole('measured'))).toEqual([])
  })
})

describe('what a record does not say', () => {
  const codes = (fields: Partial<RectifierRecord>) => caveatsOf(fields).map(({ code }) => code)

  it('is told property by property', () => {
    expect(codes({})).toEqual(['recovery-guess', 'forward-guess', 'leakage-assumed'])
    expect(codes({ class: 'body-diode' })).toEqual(['recovery-guess', 'forward-guess'])
    const ratings = { reverseVoltage: 600, averageCurrent: 8, junction: kelvin(175) }
    expect(codes({ class: 'sic-schottky', ratings })).toEqual([
      'forward-guess',
      'leakage-assumed',
      'capacitance-missing',
    ])
    const capacitance = { kind: 'charge', charge: 1e-9, voltage: 50 } as const
    expect(codes({ class: 'sic-schottky', ratings, capacitance })).toEqual(['forward-guess', 'leakage-assumed'])
  })

  it('is everything of a record without rows, and leakage rows of a body diode are not read', () => {
    const { read, rectifier } = calibrate({
      record: record({ class: 'body-diode', leakage: [leakageRow()] }),
      blockingVoltage: 400,
    })
    expect(read.leakage).toEqual([])
    expect([rectifier.recovery!.origin, rectifier.forward.origin]).toEqual(['class-guess', 'class-guess'])
  })

  it('is softness where no recovery row tells it', () => {
    const rest = { forward: [forwardRow({ grade: 'measured' })], leakage: [leakageRow({ grade: 'measured' })] }
    const grade = 'measured'
    expect(codes({ ...rest, recovery: [rampRow({ charge: 50e-9, grade })] })).toEqual(['softness-unknown'])
    const both = lumpedFigures({ current: 8, slope: 100e6, junction: kelvin(25) }, Math.log(35e-9), 1)
    expect(codes({ ...rest, recovery: [rampRow({ ...both, charge: null, grade })] })).toEqual([])
    const alone = rampRow({ charge: both.charge, grade })
    expect(codes({ ...rest, recovery: [alone, rampRow({ ...both, charge: null, grade })] })).toEqual([])
  })
})
