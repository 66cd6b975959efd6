import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { gradeEvidence, guessWords } from '../../src/evidence/grade-evidence.ts'
import { posteriorAfterRow } from '../../src/evidence/posterior-after-row.ts'
import { provenanceAt } from '../../src/evidence/provenance.ts'
import { forwardDropAt, recoveryAt } from '../../src/evidence/recovery-at.ts'
import { lumpedFigures } from './lumped.ts'
import { forwardRow, kelvin, leakageRow, rampRow, record, stepRow } from './records.ts'

const point = { current: 8, slope: 200e6, junction: kelvin(100) }

function grade(fields: Partial<RectifierRecord>, condition = point) {
  const held = record({ forward: [forwardRow()], ...fields })
  const { read, rectifier } = calibrate({ record: held, blockingVoltage: 400 })
  return gradeEvidence({ record: read, rectifier, condition })
}

describe('the evidence grade', () => {
  const measured = rampRow({ charge: 100e-9, slope: 200e6, junction: kelvin(100), grade: 'measured' })

  it('is A with a measured row within a factor 1.5 and 25 K', () => {
    expect(grade({ recovery: [measured] })).toBe('A')
    expect(grade({ recovery: [measured] }, { current: 12, slope: 300e6, junction: kelvin(125) })).toBe('A')
    expect(grade({ recovery: [measured] }, { ...point, current: 12.1 })).toBe('C')
    expect(grade({ recovery: [measured] }, { ...point, slope: 130e6 })).toBe('C')
    expect(grade({ recovery: [measured] }, { ...point, junction: kelvin(126) })).toBe('C')
    expect(grade({ recovery: [{ ...measured, grade: 'typical' }] })).toBe('C')
  })

  it('is B with rows around the point in current, slope and temperature each', () => {
    const low = rampRow({ charge: 30e-9, current: 4, slope: 100e6 })
    const high = rampRow({ charge: 300e-9, current: 10, slope: 300e6, junction: kelvin(125) })
    expect(grade({ recovery: [low, high] })).toBe('B')
    expect(grade({ recovery: [low, high] }, { ...point, slope: 301e6 })).toBe('C')
    expect(grade({ recovery: [low, { ...high, junction: kelvin(25) }] })).toBe('C')
    expect(grade({ recovery: [low, { ...high, current: null }] })).toBe('C')
  })

  it('is C with a step row, which has no slope', () => {
    expect(
      grade(
        { recovery: [stepRow({ recoveryTime: 30e-9, grade: 'measured' })] },
        { current: 0.5, slope: 1e8, junction: kelvin(25) },
      ),
    ).toBe('C')
  })

  it('is D where recovery or forward voltage is a guess', () => {
    expect(grade({})).toBe('D')
    expect(grade({ recovery: [measured], forward: [] })).toBe('D')
  })

  it('of a Schottky part goes by its forward rows in temperature and needs capacitance and leakage', () => {
    const whole = {
      class: 'schottky',
      leakage: [leakageRow()],
      capacitance: { kind: 'charge', charge: 1e-9, voltage: 50 },
    } as const
    expect(grade({ ...whole, forward: [forwardRow({ junction: kelvin(110), grade: 'measured' })] })).toBe('A')
    expect(grade({ ...whole, forward: [forwardRow(), forwardRow({ junction: kelvin(125) })] })).toBe('B')
    expect(grade({ ...whole, forward: [forwardRow(), forwardRow({ junction: kelvin(90) })] })).toBe('C')
    expect(grade({ ...whole, capacitance: null })).toBe('D')
    expect(grade({ ...whole, leakage: [] })).toBe('D')
    const because = (fields: Parameters<typeof record>[0]) =>
      guessWords(calibrate({ record: record({ forward: [forwardRow()], ...fields }), blockingVoltage: 400 }).rectifier)
    expect(because({ ...whole, leakage: [] })).toBe('leakage is a class guess')
    expect(because({ ...whole, leakage: [], capacitance: null })).toBe('capacitance and leakage are class guesses')
    expect(because(whole)).toBeNull()
  })
})

function origins(
  fields: Partial<RectifierRecord>,
  condition = point,
  event: Parameters<typeof provenanceAt>[0]['event'] = null,
) {
  const held = record(fields)
  const { rectifier, read } = calibrate({ record: held, blockingVoltage: 400 })
  const { provenance, caveats } = provenanceAt({
    record: read,
    rectifier,
    condition,
    forwardCurrent: 8,
    blockingVoltage: 400,
    event,
  })
  return { of: (figure: string) => provenance.find((entry) => entry.figure === figure), caveats, rectifier }
}

describe('the origin of a figure', () => {
  const row = rampRow({ charge: 50e-9, recoveryTime: 42e-9 })

  it('is given at the row itself, for what the row states', () => {
    const at = origins({ recovery: [row] }, { current: 8, slope: 100e6, junction: kelvin(25) })
    expect(at.of('event.qrr_c')).toMatchObject({ how: 'given', from: 'recovery row 1', factor: expect.closeTo(1, 1) })
    expect(at.of('event.peak_reverse_a')).toMatchObject({ how: 'converted', factor: expect.closeTo(1, 6) })
  })

  it('is converted near the row, extrapolated beyond a factor 1.5 or 25 K, and far beyond a factor 3 or 75 K', () => {
    const how = (slope: number, celsius: number) =>
      origins({ recovery: [row] }, { current: 8, slope, junction: kelvin(celsius) })
    expect(how(149e6, 49).of('event.qrr_c')!.how).toBe('converted')
    expect(how(151e6, 25).of('event.qrr_c')!.how).toBe('extrapolated')
    expect(how(100e6, 51).of('event.qrr_c')!.how).toBe('extrapolated')
    expect(how(299e6, 99).caveats).toEqual([])
    expect(how(310e6, 25).caveats).toEqual([
      {
        code: 'extrapolated-far',
        candidate: 'test-part',
        data: { figure: 'Recovery', row: 'recovery row 1', factor: expect.closeTo(3.1, 9) },
      },
    ])
    expect(how(100e6, 101).caveats).toEqual([
      { code: 'extrapolated-far', candidate: 'test-part', data: { figure: 'Recovery', row: 'recovery row 1' } },
    ])
  })

  it('shows the factor from the row to the point, of the event as it was solved', () => {
    const event = { charge: 125e-9, peakReverseCurrent: 5, recoveryTime: 84e-9 }
    const at = origins({ recovery: [row] }, point, event)
    expect(at.of('event.qrr_c')!.factor).toBeCloseTo(2.5, 12)
    expect(at.of('event.trr_s')!.factor).toBeCloseTo(2, 12)
  })

  it('names the nearest row', () => {
    const hot = rampRow({
      charge: 150e-9,
      slope: 200e6,
      junction: kelvin(125),
      place: { ...row.place, name: 'recovery row 2' },
    })
    expect(origins({ recovery: [row, hot] }).of('event.qrr_c')!.from).toBe('recovery row 2')
  })

  it('is a class guess without rows', () => {
    const at = origins({})
    for (const figure of ['event.qrr_c', 'event.trr_s', 'forward_v', 'losses_w.leakage']) {
      expect(at.of(figure)).toEqual({ figure, how: 'class-guess', from: 'class', factor: null })
    }
    expect(origins({ class: 'schottky' }).of('losses_w.capacitive')!.how).toBe('class-guess')
  })

  it('of recovery without stored charge is the class itself, which is no guess', () => {
    expect(origins({ class: 'sic-schottky' }).of('event.qrr_c')).toMatchObject({ how: 'given', factor: null })
  })

  it('of forward voltage and leakage shows what temperature did', () => {
    const at = origins({
      forward: [forwardRow({ junction: kelvin(90) })],
      leakage: [leakageRow({ junction: kelvin(90), voltage: 400 })],
    })
    expect(at.of('forward_v')).toMatchObject({ how: 'converted', from: 'forward row 1' })
    expect(at.of('forward_v')!.factor).toBeLessThan(1)
    expect(at.of('losses_w.leakage')!.factor).toBeGreaterThan(1.3)
  })

  it('at no current at all still has numbers only', () => {
    const at = origins(
      { recovery: [row] },
      { current: 0, slope: 200e6, junction: kelvin(100) },
      { charge: 0, peakReverseCurrent: 0, recoveryTime: 0 },
    )
    expect(at.of('event.qrr_c')!.factor).toBe(0)
    // u and y are read at a hundredth of I0 there
    expect(at.caveats[0]!.data).toMatchObject({ factor: expect.closeTo(100, 9) })
  })

  it('of a recovery that does not take place is no extrapolation', () => {
    const at = origins({ recovery: [row] }, { current: 0, slope: 200e6, junction: kelvin(100) })
    expect(at.of('event.qrr_c')).toEqual({ figure: 'event.qrr_c', how: 'converted', from: 'recovery row 1', factor: 0 })
    expect(at.caveats).toEqual([])
  })
})

describe('one more measured row', () => {
  const held = record({ recovery: [rampRow({ charge: 50e-9 })], forward: [forwardRow()], leakage: [leakageRow()] })
  const { rectifier } = calibrate({ record: held, blockingVoltage: 400 })
  const condition = { ...point, voltage: 400 }

  it('of recovery leaves the doubt that really adding it leaves, whatever it reads', () => {
    const after = posteriorAfterRow({ rectifier, property: 'recovery', condition })!
    const { lifetime, tailTime } = recoveryAt({ rectifier, ...point })!
    const figures = lumpedFigures(point, Math.log(lifetime), Math.log(lifetime / tailTime - 1))
    const row = rampRow({ ...point, recoveryTime: figures.recoveryTime, charge: figures.charge, grade: 'measured' })
    const added = calibrate({ record: { ...held, recovery: [...held.recovery, row] }, blockingVoltage: 400 }).rectifier
    for (const [index, value] of after.posterior.covariance.entries()) {
      expect(value).toBeCloseTo(added.recovery!.posterior.covariance[index]!, 10)
    }
    expect(after.unitSpread).toBe(0.1)
    expect(after.posterior.mean).toEqual(rectifier.recovery!.posterior.mean)
    expect(after.posterior.mean).not.toBe(rectifier.recovery!.posterior.mean)
  })

  it('of forward voltage and leakage too', () => {
    const { drop } = forwardDropAt({ rectifier, current: 8, junction: point.junction })
    const withForward = { ...held, forward: [...held.forward, forwardRow({ ...point, drop, grade: 'measured' })] }
    const withLeakage = {
      ...held,
      leakage: [...held.leakage, leakageRow({ voltage: 400, junction: point.junction, grade: 'measured' })],
    }
    const added = {
      forward: calibrate({ record: withForward, blockingVoltage: 400 }).rectifier.forward,
      leakage: calibrate({ record: withLeakage, blockingVoltage: 400 }).rectifier.leakage!,
    }
    for (const property of ['forward', 'leakage'] as const) {
      const after = posteriorAfterRow({ rectifier, property, condition })!
      expect(after.unitSpread).toBe(added[property].unitSpread)
      for (const [index, value] of after.posterior.covariance.entries()) {
        const expected = added[property].posterior.covariance[index]!
        expect(Math.abs(value - expected)).toBeLessThanOrEqual(1e-9 * Math.abs(expected) + 1e-18)
      }
    }
  })

  it('does not exist for a property that the part does not have', () => {
    const schottky = calibrate({ record: record({ class: 'schottky' }), blockingVoltage: 40 }).rectifier
    expect(posteriorAfterRow({ rectifier: schottky, property: 'recovery', condition })).toBeNull()
  })
})
