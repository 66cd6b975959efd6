import { describe, expect, it } from 'vitest'
import type { ForwardLine } from '../../src/domain/rectifier.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { forwardDropAt } from '../../src/evidence/recovery-at.ts'
import { forwardRow, kelvin, place, record } from './records.ts'

const stated = { threshold: 0.95, resistance: 0.035 } as const

function part(fields: Partial<ForwardLine>) {
  const forwardLine: ForwardLine = {
    ...forwardRow({ place: place('forward line'), junction: kelvin(125) }),
    ...stated,
    thresholdPerKelvin: null,
    resistancePerKelvin: null,
    ...fields,
  }
  const { rectifier, read, caveats } = calibrate({ record: record({ forwardLine }), blockingVoltage: 400 })
  return {
    rectifier,
    read,
    caveats,
    at: (current: number, celsius: number) => forwardDropAt({ rectifier, current, junction: kelvin(celsius) }),
  }
}

/** Ultrafast: V_F at I0 moves −2 ± 1 mV/K, and the resistance 0.4 ± 0.2 %/K of its value at 25 °C. */
const [perKelvin, growth] = [
  { mean: -2e-3, deviation: 1e-3 },
  { mean: 0.004, deviation: 0.002 },
] as const
const rated = 8

/** The line and the class's part in it written out at a current and a rise above the line's own temperature. */
function expected(fields: Partial<ForwardLine>, current: number, rise: number, pivot = 100) {
  const { threshold, resistance } = stated
  const cold = resistance / (1 + growth.mean * pivot)
  const resistanceSlope = fields.resistancePerKelvin ?? growth.mean * cold
  const thresholdSlope = fields.thresholdPerKelvin ?? perKelvin.mean - resistanceSlope * rated
  const drop = threshold + thresholdSlope * rise + (resistance + resistanceSlope * rise) * current
  // an unknown growth moves threshold and resistance against each other, so that V_F at I0 moves as the class does
  const lever = typeof fields.thresholdPerKelvin === 'number' ? current : current - rated
  const deviation = Math.hypot(
    0.02 * drop,
    typeof fields.thresholdPerKelvin === 'number' ? 0 : perKelvin.deviation * rise,
    typeof fields.resistancePerKelvin === 'number' ? 0 : growth.deviation * cold * lever * rise,
  )
  return { drop, deviation }
}

describe('a forward characteristic given as a line', () => {
  it.each([
    ['nothing', {}],
    ['the threshold alone', { thresholdPerKelvin: -1.5e-3 }],
    ['the resistance alone', { resistancePerKelvin: 8e-5 }],
    ['both', { thresholdPerKelvin: -1.5e-3, resistancePerKelvin: 8e-5 }],
  ] as const)('that says how temperature moves %s takes the rest from its class, doubt and all', (_, fields) => {
    const held = part(fields)
    for (const current of [0, 0.5, 8, 20]) {
      for (const celsius of [25, 100, 125, 150]) {
        const found = held.at(current, celsius)
        const wanted = expected(fields, current, celsius - 125)
        expect(found.drop).toBeCloseTo(wanted.drop, 12)
        expect(found.deviation).toBeCloseTo(wanted.deviation, 9)
      }
    }
  })

  it('without temperature is taken at 25 °C and says so', () => {
    const held = part({ junction: null })
    const wanted = expected({}, 4, 100, 0)
    expect(held.at(4, 125).drop).toBeCloseTo(wanted.drop, 12)
    expect(held.at(4, 125).deviation).toBeCloseTo(wanted.deviation, 12)
    const assumed = held.caveats.filter(({ code }) => code === 'row-junction-assumed')
    expect(assumed).toEqual([{ code: 'row-junction-assumed', candidate: 'test-part', data: { row: 'forward line' } }])
    expect(part({}).caveats.map(({ code }) => code)).not.toContain('row-junction-assumed')
  })

  it('of grade maximum is centred at 1/1.08 of it, with 4 % of that as doubt', () => {
    const { drop, deviation } = part({ grade: 'maximum' }).at(8, 125)
    const centre = (stated.threshold + 8 * stated.resistance) / 1.08
    expect(drop).toBeCloseTo(centre, 12)
    expect(deviation).toBeCloseTo(0.04 * centre, 12)
  })

  it('is what is read in place of rows, with the spread between units of its grade', () => {
    const held = part({ grade: 'measured' })
    expect(held.read.forward).toEqual([])
    expect(held.rectifier.forward).toMatchObject({ unitSpread: 0.02, line: true, origin: 'given' })
  })
})

describe('forward rows', () => {
  const codes = (fields: Parameters<typeof forwardRow>[0]) =>
    calibrate({ record: record({ forward: [forwardRow(fields)] }), blockingVoltage: 400 }).caveats.filter(
      ({ code }) => code === 'row-junction-assumed' || code === 'row-impossible',
    )

  it('without temperature are taken at 25 °C, and say so', () => {
    expect(codes({ junction: null })).toEqual([
      { code: 'row-junction-assumed', candidate: 'test-part', data: { row: 'forward row 1' } },
    ])
    expect(codes({})).toEqual([])
    const of = (junction: number | null) =>
      calibrate({ record: record({ forward: [forwardRow({ junction })] }), blockingVoltage: 400 }).rectifier.forward
    expect(of(null)).toEqual(of(kelvin(25)))
  })

  it('of no voltage are told with both numbers, whether they state a temperature or not', () => {
    expect(codes({ drop: 0, junction: null })).toEqual([
      {
        code: 'row-impossible',
        candidate: 'test-part',
        data: { row: 'forward row 1', found: 'V_F 0 V', bound: '0 V at current 8 A' },
      },
    ])
  })

  it('pull the class towards them by their share of the doubt', () => {
    const drop = (fields: Parameters<typeof forwardRow>[0]) => {
      const { rectifier } = calibrate({ record: record({ forward: [forwardRow(fields)] }), blockingVoltage: 400 })
      return forwardDropAt({ rectifier, current: 8, junction: kelvin(25) })
    }
    // the class says 1.35 ± 0.3 V; typical rows err by 2 %, maxima by 4 % of what is left after dividing by 1.08
    for (const [fields, value, error] of [
      [{ drop: 1.6 }, 1.6, 0.02 * 1.6],
      [{ drop: 1.6, grade: 'maximum' }, 1.6 / 1.08, (0.04 * 1.6) / 1.08],
      [{ drop: 1.6, spread: 0.2 }, 1.6, 0.32],
    ] as const) {
      const precision = 1 / 0.3 ** 2 + 1 / error ** 2
      expect(drop(fields).drop).toBeCloseTo((1.35 / 0.3 ** 2 + value / error ** 2) / precision, 12)
      expect(drop(fields).deviation).toBeCloseTo(1 / Math.sqrt(precision), 12)
    }
  })

  it('at another current pull what the class says there: less by 0.045 V per e-fold, and its resistive share', () => {
    const row = forwardRow({ current: 0.8, drop: 1.1 })
    const { rectifier } = calibrate({ record: record({ forward: [row] }), blockingVoltage: 400 })
    const mean = 0.7 * 1.35 - 0.045 * Math.LN10 + 0.03 * 1.35
    // level, ln term and share: what one deviation of each does at a tenth of I0
    const deviation = Math.hypot(0.73 * 0.3, 0.02 * Math.LN10, 0.9 * 1.35 * 0.15)
    const precision = deviation ** -2 + 0.022 ** -2
    const found = forwardDropAt({ rectifier, current: 0.8, junction: kelvin(25) })
    expect(found.drop).toBeCloseTo((mean * deviation ** -2 + 1.1 * 0.022 ** -2) / precision, 12)
    expect(found.deviation).toBeCloseTo(precision ** -0.5, 12)
    expect(rectifier.forward).toMatchObject({ line: false, origin: 'given', unitSpread: 0.03 })
  })
})
