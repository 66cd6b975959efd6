import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { forwardDropAt, leakageCurrentAt } from '../../src/evidence/recovery-at.ts'
import { capacitanceAt, capacitiveCharge } from '../../src/models/junction-capacitance.ts'
import { forwardRow, kelvin, leakageRow, place, rampRow, record } from './records.ts'

function calibrated(fields: Partial<RectifierRecord>) {
  const { rectifier, caveats } = calibrate({ record: record(fields), blockingVoltage: 400 })
  return { rectifier, codes: caveats.map((caveat) => caveat.code), caveats }
}

describe('forward voltage', () => {
  const rows = [forwardRow({ drop: 1.55 }), forwardRow({ drop: 1.28, junction: kelvin(125) })]
  const drop = (fields: Partial<RectifierRecord>, current: number, celsius: number) =>
    forwardDropAt({ rectifier: calibrated(fields).rectifier, current, junction: kelvin(celsius) })

  it('passes close to its rows, with the reading error as its doubt', () => {
    const halfReadingError = 0.01
    expect(Math.abs(drop({ forward: rows }, 8, 25).drop / 1.55 - 1)).toBeLessThan(halfReadingError)
    expect(Math.abs(drop({ forward: rows }, 8, 125).drop / 1.28 - 1)).toBeLessThan(halfReadingError)
    expect(drop({ forward: rows }, 8, 25).deviation).toBeLessThan(0.02 * 1.55)
  })

  it('of grade maximum is centred at 1/1.08 of the figure', () => {
    const forward = [forwardRow({ drop: 1.62, grade: 'maximum', spread: 1e-4 })]
    expect(drop({ forward }, 8, 25).drop).toBeCloseTo(1.5, 3)
  })

  const line = {
    place: place('forward line'),
    grade: 'typical',
    spread: null,
    source: null,
    junction: kelvin(125),
    threshold: 0.95,
    resistance: 0.035,
    thresholdPerKelvin: -1.8e-3,
    resistancePerKelvin: 0.02e-3,
  } as const

  it('given as a line is that line at every current and temperature, with no prior on its centre', () => {
    for (const [current, celsius] of [
      [0.05, 25],
      [1, 125],
      [8, 80],
      [20, 150],
    ] as const) {
      const rise = celsius - 125
      const stated = 0.95 - 1.8e-3 * rise + (0.035 + 0.02e-3 * rise) * current
      const found = drop({ forwardLine: line }, current, celsius)
      expect(found.drop).toBeCloseTo(stated, 12)
      expect(found.deviation).toBeCloseTo(0.02 * stated, 12)
    }
  })

  it('given as a line without its temperature moves as the class does at I0', () => {
    const forwardLine = { ...line, thresholdPerKelvin: null, resistancePerKelvin: null }
    const [cold, hot] = [drop({ forwardLine }, 8, 25), drop({ forwardLine }, 8, 125)]
    expect(hot.drop).toBeCloseTo(0.95 + 0.28, 12)
    expect((hot.drop - cold.drop) / 100).toBeCloseTo(-2e-3, 12)
    expect(cold.deviation).toBeGreaterThan(hot.deviation)
  })

  it('that is no guess is never called one', () => {
    expect(calibrated({}).codes).toContain('forward-guess')
    expect(calibrated({ forwardLine: line }).codes).not.toContain('forward-guess')
    expect(calibrated({ forward: rows }).codes).not.toContain('forward-guess')
  })

  it('of 0 V is refused as a reading', () => {
    const part = calibrated({ forward: [forwardRow({ drop: 0 })] })
    expect(part.codes).toContain('row-impossible')
    expect(part.rectifier.forward.origin).toBe('class-guess')
  })
})

describe('leakage', () => {
  const leakage = (rows: readonly ReturnType<typeof leakageRow>[]) =>
    calibrated({ class: 'schottky', leakage: rows }).rectifier

  it('passes close to its row', () => {
    const part = leakage([leakageRow({ current: 40e-6, junction: kelvin(125) })])
    const at = leakageCurrentAt({ rectifier: part, voltage: 600, junction: kelvin(125) })!
    expect(Math.abs(Math.log(at.current / 40e-6))).toBeLessThan(0.2)
    expect(at.deviation).toBeLessThan(0.2)
  })

  it('of grade maximum is reached exactly by the shift from a centre that lies between class and row', () => {
    const part = leakage([leakageRow({ current: 5e-3, junction: kelvin(125), grade: 'maximum' })])
    const at = leakageCurrentAt({ rectifier: part, voltage: 600, junction: kelvin(125) })!
    expect(at.current * Math.exp(part.leakage!.maximumShift)).toBeCloseTo(5e-3, 12)
    // 50 µA (ln sd 1.5) at 25 °C, 0.70 ± 0.10 eV; the row says ln 5 mA − 1.6 ± 0.8
    const inverse = (1 / 298.15 - 1 / 398.15) / 8.617333e-5
    const expected = Math.log(50e-6) + 0.7 * inverse
    const variance = 1.5 ** 2 + (0.1 * inverse) ** 2
    const centre = expected + (variance / (variance + 0.8 ** 2)) * (Math.log(5e-3) - 1.6 - expected)
    expect(part.leakage!.maximumShift).toBeCloseTo(Math.log(5e-3) - centre, 9)
  })

  it('without a maximum row is judged at two spreads between units; without any row at the centre, and says so', () => {
    expect(leakage([leakageRow()]).leakage!.maximumShift).toBe(1)
    const guess = calibrated({ class: 'schottky' })
    expect(guess.rectifier.leakage!.maximumShift).toBe(0)
    expect(guess.codes).toContain('leakage-assumed')
  })

  it('that is lower when hot contradicts itself', () => {
    const part = calibrated({
      leakage: [
        leakageRow({ current: 40e-6 }),
        leakageRow({ current: 4e-6, junction: kelvin(125), place: place('leakage row 2') }),
      ],
    })
    expect(part.caveats).toContainEqual({
      code: 'rows-contradict',
      candidate: 'test-part',
      data: { row: 'leakage row 2', other: 'leakage row 1' },
    })
  })
})

describe('capacitance', () => {
  const points = [1, 10, 100].map((voltage) => ({ voltage, capacitance: 400e-12 * (1 + voltage / 0.8) ** -0.42 }))

  it('through points of one law is that law', () => {
    const { capacitance } = calibrated({ capacitance: { kind: 'points', points } }).rectifier
    for (const { voltage, capacitance: stated } of points) {
      expect(capacitanceAt({ capacitance: capacitance!, voltage }) / stated).toBeCloseTo(1, 10)
    }
  })

  it('through one point has the usual grading', () => {
    const { capacitance } = calibrated({ capacitance: { kind: 'points', points: points.slice(1, 2) } }).rectifier
    expect(capacitance).toMatchObject({ kind: 'law', builtIn: 0.8, grading: 0.46 })
    expect(capacitanceAt({ capacitance: capacitance!, voltage: 10 }) / points[1]!.capacitance).toBeCloseTo(1, 12)
  })

  it('of a silicon-carbide part has the higher built-in voltage', () => {
    const { capacitance } = calibrated({ class: 'sic-schottky', capacitance: { kind: 'points', points } }).rectifier
    expect(capacitance).toMatchObject({ builtIn: 1.2 })
  })

  it('given as a law is that law, a built-in voltage of 0 V replaced', () => {
    const law = (builtIn: number) =>
      calibrated({ capacitance: { kind: 'law', zeroBias: 4e-10, builtIn, grading: 0.5 } }).rectifier.capacitance
    expect(law(1)).toEqual({ kind: 'law', zeroBias: 4e-10, builtIn: 1, grading: 0.5 })
    expect(law(0)).toEqual({ kind: 'law', zeroBias: 4e-10, builtIn: 0.8, grading: 0.5 })
  })

  it('given as one charge stays that charge', () => {
    const { capacitance } = calibrated({ capacitance: { kind: 'charge', charge: 20e-9, voltage: 400 } }).rectifier
    expect(capacitiveCharge({ capacitance: capacitance!, voltage: 100 })).toBeCloseTo(10e-9, 15)
  })

  it('missing is told for Schottky classes only', () => {
    expect(calibrated({ class: 'sic-schottky' }).codes).toContain('capacitance-missing')
    expect(calibrated({ class: 'ultrafast' }).codes).not.toContain('capacitance-missing')
  })

  it('that is a large part of a stated Qrr is told with its share', () => {
    const fields = {
      recovery: [rampRow({ charge: 40e-9 })],
      capacitance: { kind: 'charge', charge: 20e-9, voltage: 400 },
    } as const
    expect(calibrated(fields).caveats).toContainEqual({
      code: 'capacitance-share',
      candidate: 'test-part',
      data: { share: 0.5, row: 'recovery row 1' },
    })
    expect(calibrated({ ...fields, recovery: [rampRow({ charge: 80e-9 })] }).codes).not.toContain('capacitance-share')
  })
})

describe('plausibility by class', () => {
  const implausible = (fields: Partial<RectifierRecord>) =>
    calibrated(fields)
      .caveats.filter((caveat) => caveat.code === 'implausible-for-class')
      .map((caveat) => caveat.data.property)

  it('accepts ordinary figures of every property', () => {
    expect(
      implausible({
        recovery: [rampRow({ recoveryTime: 42e-9, charge: 52e-9 })],
        forward: [forwardRow({ drop: 1.5 })],
        leakage: [leakageRow({ current: 1e-6 })],
      }),
    ).toEqual([])
  })

  it('tells microseconds of an ultrafast part, a Schottky drop of a PN part and a leakage of an ampere', () => {
    const found = implausible({
      recovery: [rampRow({ recoveryTime: 2e-6, charge: 90e-6 })],
      forward: [forwardRow({ drop: 0.3 })],
      leakage: [leakageRow({ current: 1 })],
    })
    expect(found).toEqual(['The carrier lifetime', 'Lifetime over tail time', 'The forward voltage', 'The leakage'])
  })

  it('expects a higher drop of a Schottky part for more reverse voltage, and names the condition', () => {
    const drop = (reverseVoltage: number, volts: number) =>
      calibrated({
        class: 'schottky',
        ratings: { reverseVoltage, averageCurrent: 10, junction: kelvin(150) },
        forward: [forwardRow({ current: 10, drop: volts })],
      }).caveats.find(({ code }) => code === 'implausible-for-class')?.data
    expect(drop(200, 0.9)).toBeUndefined()
    expect(drop(40, 0.45)).toBeUndefined()
    expect(drop(200, 1.4)).toMatchObject({ property: 'The forward voltage', condition: '10 A, 25 °C' })
    expect(drop(40, 0.95)).toMatchObject({ value: '0.95 V' })
  })

  it('expects more of a guaranteed maximum than of a typical figure', () => {
    expect(implausible({ leakage: [leakageRow({ current: 30e-6 })] })).toEqual(['The leakage'])
    expect(implausible({ leakage: [leakageRow({ current: 30e-6, grade: 'maximum' })] })).toEqual([])
  })

  it('tells recovery rows and a rated voltage that no Schottky has', () => {
    const found = implausible({ class: 'schottky', recovery: [rampRow({ charge: 50e-9 })] })
    expect(found).toEqual(['The rated reverse voltage', 'A recovery row'])
  })

  it('tells a softness that will ring', () => {
    const snappy = calibrated({ recovery: [rampRow({ recoveryTime: 42e-9, softness: 0.3 })] }).caveats.find(
      ({ code }) => code === 'snappy',
    )
    expect(snappy!.data).toEqual({ softness: expect.closeTo(0.3, 6), current: 8 })
    expect(calibrated({ recovery: [rampRow({ recoveryTime: 42e-9, softness: 0.8 })] }).codes).not.toContain('snappy')
  })
})

describe('the grades of a record', () => {
  it('are told by property: typical recovery only, whatever the others have, and maxima only of the others', () => {
    const { caveats } = calibrated({
      recovery: [rampRow({ charge: 90e-9 })],
      forward: [forwardRow({ grade: 'maximum' })],
      leakage: [leakageRow({ grade: 'maximum' })],
    })
    const dataOf = (wanted: string) => caveats.find(({ code }) => code === wanted)?.data
    expect(dataOf('typical-only')).toEqual({ property: 'recovery' })
    expect(dataOf('maximum-only')).toEqual({ property: 'forward voltage and of leakage', factors: '0.93 and 0.20' })
  })
})
