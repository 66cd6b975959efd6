import { describe, expect, it } from 'vitest'
import type { Grade, RectifierRecord } from '../../src/domain/rectifier.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { gradeEvidence, guessWords } from '../../src/evidence/grade-evidence.ts'
import { rowErrors, unitSpread } from '../../src/evidence/grades.ts'
import { conditionOfRow, distanceOutside, factorOutside } from '../../src/evidence/operating-condition.ts'
import { forwardRow, kelvin, leakageRow, place, rampRow, record, stepRow } from './records.ts'

const point = { current: 8, slope: 100e6, junction: kelvin(25) }

function grade(fields: Partial<RectifierRecord>, at: Partial<typeof point> = {}) {
  const { read, rectifier } = calibrate({
    record: record({ forward: [forwardRow()], ...fields }),
    blockingVoltage: 400,
  })
  return gradeEvidence({ record: read, rectifier, condition: { ...point, ...at } })
}

describe('the evidence grade of a part with stored charge', () => {
  const measured = rampRow({ charge: 50e-9, grade: 'measured' })

  it('is A up to a factor of 1.5 and 25 K on either side, rounding of units apart', () => {
    for (const at of [
      { current: 12 },
      { current: 8 / 1.5 },
      { slope: 150e6 },
      { slope: 100e6 / 1.5 },
      { junction: kelvin(50) },
      { junction: kelvin(0) },
      { current: 12 * (1 + 5e-10), junction: kelvin(50 + 5e-10) },
    ])
      expect(grade({ recovery: [measured] }, at)).toBe('A')
    for (const at of [
      { current: 12.01 },
      { current: 5.3 },
      { slope: 151e6 },
      { slope: 66e6 },
      { junction: kelvin(50.1) },
      { junction: kelvin(-0.1) },
    ])
      expect(grade({ recovery: [measured] }, at)).toBe('C')
  })

  it('is B at the ends of the rows’ span too, and C just beyond it in any direction', () => {
    const low = rampRow({ charge: 30e-9, current: 4, slope: 50e6 })
    const high = rampRow({ charge: 300e-9, current: 10, slope: 200e6, junction: kelvin(125) })
    const among = (at: Partial<typeof point>) => grade({ recovery: [low, high] }, at)
    for (const at of [
      { current: 4, slope: 50e6, junction: kelvin(25) },
      { current: 10, slope: 200e6, junction: kelvin(125) },
      { current: 10 * (1 + 5e-10), slope: 200e6 * (1 + 5e-10), junction: kelvin(125 + 5e-10) },
    ])
      expect(among(at)).toBe('B')
    for (const at of [
      { current: 3.99 },
      { current: 10.01 },
      { slope: 49e6 },
      { slope: 201e6 },
      { junction: kelvin(24.9) },
      { junction: kelvin(125.1) },
    ])
      expect(among(at)).toBe('C')
  })

  it('is not B by rows that do not state where they stand, nor lost by them', () => {
    const rows = [rampRow({ charge: 50e-9 }), rampRow({ charge: 50e-9 })] as const
    expect(grade({ recovery: rows })).toBe('B')
    expect(grade({ recovery: [rows[0], { ...rows[1], slope: null }] }, { slope: 50e6 })).toBe('C')
    expect(grade({ recovery: [rows[0], { ...rows[1], current: null }] }, { current: 4 })).toBe('C')
    const unplaced = [stepRow({ recoveryTime: 30e-9 }), rampRow({ charge: 50e-9, slope: null })]
    expect(grade({ recovery: [...rows, ...unplaced] })).toBe('B')
  })

  it('is C with one row at the point itself that is not measured', () => {
    expect(grade({ recovery: [rampRow({ charge: 50e-9 })] })).toBe('C')
  })

  it('takes a row without temperature as one at 25 °C, and none without current or slope', () => {
    expect(grade({ recovery: [{ ...measured, junction: null }] })).toBe('A')
    expect(grade({ recovery: [{ ...measured, junction: null }] }, { junction: kelvin(51) })).toBe('C')
    expect(grade({ recovery: [{ ...measured, current: null }] })).toBe('C')
    expect(grade({ recovery: [{ ...measured, slope: null }] })).toBe('C')
  })

  it('is D where recovery or forward voltage is a guess, and says which', () => {
    const words = (fields: Partial<RectifierRecord>) =>
      guessWords(calibrate({ record: record(fields), blockingVoltage: 400 }).rectifier)
    expect(words({})).toBe('recovery and forward voltage are class guesses')
    expect(words({ recovery: [measured] })).toBe('forward voltage is a class guess')
    expect(words({ forward: [forwardRow()] })).toBe('recovery is a class guess')
    expect(words({ recovery: [measured], forward: [forwardRow()] })).toBeNull()
    expect(words({ class: 'schottky' })).toBe('forward voltage and capacitance and leakage are class guesses')
    expect(grade({ recovery: [measured], forward: [] })).toBe('D')
  })
})

describe('the evidence grade of a Schottky part', () => {
  const whole = {
    class: 'schottky',
    leakage: [leakageRow()],
    capacitance: { kind: 'charge', charge: 1e-9, voltage: 50 },
  } as const

  it('is A with a measured forward row within 25 K, rounding apart, whatever the current', () => {
    const at = (celsius: number) =>
      grade({ ...whole, forward: [forwardRow({ grade: 'measured' })] }, { current: 100, junction: kelvin(celsius) })
    expect([50, 0, 50 + 5e-10, 50.1, -0.1].map(at)).toEqual(['A', 'A', 'A', 'C', 'C'])
    expect(grade({ ...whole, forward: [forwardRow({ grade: 'measured', junction: null })] })).toBe('A')
    const hot = forwardRow({ junction: kelvin(125) })
    expect(grade({ ...whole, forward: [hot, forwardRow({ grade: 'measured' })] })).toBe('A')
  })

  it('is B between two forward rows in temperature, ends included', () => {
    const forward = [forwardRow(), forwardRow({ junction: kelvin(125) })]
    const at = (celsius: number) => grade({ ...whole, forward }, { junction: kelvin(celsius) })
    expect([25, 75, 125, 125 + 5e-10, 126, 24].map(at)).toEqual(['B', 'B', 'B', 'B', 'C', 'C'])
    expect(grade({ ...whole, forward: [forwardRow()] })).toBe('C')
  })

  it('given as a line goes by the line: B where it states how it moves with temperature', () => {
    const line = {
      ...forwardRow({ place: place('forward line') }),
      threshold: 0.4,
      resistance: 0.01,
      thresholdPerKelvin: -1e-3,
      resistancePerKelvin: 1e-5,
    }
    const of = (fields: Partial<typeof line> & { readonly grade?: Grade }, forward: RectifierRecord['forward'] = []) =>
      grade({ ...whole, forwardLine: { ...line, ...fields }, forward })
    expect(of({ grade: 'measured' })).toBe('A')
    expect(of({})).toBe('B')
    expect(of({ thresholdPerKelvin: null } as never)).toBe('C')
    expect(of({ resistancePerKelvin: null } as never)).toBe('C')
    // rows beside a line are not read
    expect(of({ thresholdPerKelvin: null } as never, [forwardRow({ grade: 'measured' }), forwardRow()])).toBe('C')
  })
})

describe('what a figure of a grade is worth', () => {
  it('is its own spread where it states one, never nothing at all', () => {
    expect(rowErrors({ grade: 'typical', spread: null }, 'forward')).toEqual({ reading: 0.02, unit: 0.03 })
    expect(rowErrors({ grade: 'typical', spread: 0.07 }, 'forward')).toEqual({ reading: 0.07, unit: 0.07 })
    expect(rowErrors({ grade: 'typical', spread: 0 }, 'leakage')).toEqual({ reading: 1e-5, unit: 1e-5 })
  })

  it('sets the spread between units by its least, the estimate without any', () => {
    const of = (...grades: readonly Grade[]) =>
      unitSpread(
        grades.map((one) => ({ grade: one, spread: null })),
        'leakage',
      )
    expect([of(), of('estimated', 'measured', 'maximum'), of('maximum')]).toEqual([0.7, 0.3, 0.5])
  })
})

describe('a condition and rows', () => {
  it('of a set of values are outside by a factor or a distance, 1 and 0 within', () => {
    expect([2, 4, 5, 8, 16].map((value) => factorOutside(value, [8, 4]))).toEqual([2, 1, 1, 1, 2])
    expect([2, 4, 5, 8, 16].map((value) => distanceOutside(value, [8, 4]))).toEqual([2, 0, 0, 0, 8])
  })

  it('stand where the row states, else at I0, a0 and 25 °C; a step fixture has the slope a0', () => {
    expect(conditionOfRow(rampRow({ current: 3, slope: 2e8, junction: 350 }), record())).toEqual({
      current: 3,
      slope: 2e8,
      junction: 350,
    })
    const bare = { current: 8, slope: 1e8, junction: 298.15 }
    expect(conditionOfRow(rampRow({ current: null, slope: null, junction: null }), record())).toEqual(bare)
    expect(conditionOfRow(stepRow({ junction: null }), record())).toEqual({ ...bare, current: 0.5 })
    expect(conditionOfRow(stepRow({ junction: 350 }), record())).toEqual({ ...bare, current: 0.5, junction: 350 })
  })
})
