import { describe, expect, it } from 'vitest'
import type { ForwardLine, RectifierRecord } from '../../src/domain/rectifier.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { type ProvenanceInput, provenanceAt } from '../../src/evidence/provenance.ts'
import { forwardDropAt, leakageCurrentAt } from '../../src/evidence/recovery-at.ts'
import { steadyFiguresAt } from '../../src/evidence/steady-figures.ts'
import { forwardRow, kelvin, leakageRow, place, rampRow, record, stepRow } from './records.ts'

const here = { current: 8, slope: 100e6, junction: kelvin(25) }

function origins(fields: Partial<RectifierRecord>, at: Partial<ProvenanceInput> = {}) {
  const held = record(fields)
  const { rectifier, read } = calibrate({ record: held, blockingVoltage: 400 })
  const input = { condition: here, forwardCurrent: 8, blockingVoltage: 600, event: null, ...at }
  const { provenance, caveats } = provenanceAt({ record: read, rectifier, ...input })
  const of = (figure: string) => {
    const entry = provenance.find((one) => one.figure === figure)
    return entry && { how: entry.how, from: entry.from, factor: entry.factor }
  }
  return { of, caveats, rectifier, figures: provenance.map(({ figure }) => figure) }
}

const at = (fields: Partial<typeof here>) => ({ condition: { ...here, ...fields } })

describe('the origin of recovery', () => {
  const row = rampRow({ charge: 50e-9, recoveryTime: 42e-9 })
  const qrr = (fields: Partial<typeof here>, ...rows: RectifierRecord['recovery']) =>
    origins({ recovery: rows.length > 0 ? rows : [row] }, at(fields)).of('event.qrr_c')!

  it('is the row within 2 % of its current and slope and 2 K of its temperature, one or the other way', () => {
    for (const near of [
      { current: 8.16 },
      { slope: 102e6 },
      { slope: 98.1e6 },
      { junction: kelvin(27) },
      { junction: kelvin(23) },
    ])
      expect(qrr(near).how).toBe('given')
    for (const off of [{ current: 8.17 }, { slope: 97.9e6 }, { junction: kelvin(27.1) }, { junction: kelvin(22.9) }])
      expect(qrr(off).how).toBe('converted')
  })

  it('ends at a factor of 1.5 or 25 K outside the span of the rows, and is called far at 3 or 75 K', () => {
    for (const inside of [{ current: 12 }, { current: 8 / 1.49 }, { junction: kelvin(50) }, { junction: kelvin(0.5) }])
      expect(qrr(inside).how).toBe('converted')
    for (const out of [{ current: 12.1 }, { current: 5.3 }, { junction: kelvin(50.5) }, { junction: kelvin(-0.5) }])
      expect(qrr(out).how).toBe('extrapolated')
    const far = (fields: Partial<typeof here>) => origins({ recovery: [row] }, at(fields)).caveats.map((c) => c.data)
    expect(far({ current: 24 })).toEqual([])
    expect(far({ current: 24.1 })).toEqual([
      { figure: 'Recovery', row: 'recovery row 1', factor: expect.closeTo(24.1 / 8) },
    ])
    expect(far({ current: 4, slope: 25e6 })).toEqual([
      { figure: 'Recovery', row: 'recovery row 1', factor: expect.closeTo(4) },
    ])
    const at300 = { ...row, junction: 300 }
    const farthest = (fields: Partial<typeof here>) =>
      origins({ recovery: [at300] }, at(fields)).caveats.map((c) => c.data)
    expect(farthest({ junction: 375 })).toEqual([])
    expect(farthest({ junction: 375.1, current: 24 })).toEqual([{ figure: 'Recovery', row: 'recovery row 1' }])
    expect(far({ junction: kelvin(99.9), current: 16 })).toEqual([])
    expect(far({ junction: kelvin(100.1), current: 16 })).toEqual([{ figure: 'Recovery', row: 'recovery row 1' }])
  })

  it('spans all rows in each of current, slope and temperature', () => {
    const high = rampRow({ ...row, current: 16, slope: 400e6, junction: kelvin(125) })
    expect(qrr({ current: 24, slope: 600e6, junction: kelvin(150) }, row, high).how).toBe('converted')
    expect(qrr({ current: 6, slope: 70e6, junction: kelvin(1) }, row, high).how).toBe('converted')
    expect(qrr({ slope: 601e6 }, row, high).how).toBe('extrapolated')
  })

  it('is the row nearest in units of a factor of 1.5 and of 25 K', () => {
    const from = (fields: Partial<typeof here>, ...others: readonly Partial<typeof row>[]) => {
      const rows = others.map((other, index) => ({ ...row, ...other, place: place(`row ${index + 1}`) }))
      return qrr(fields, ...rows).from
    }
    // 12 A is one unit away, 24 K a little less, 26 K a little more; likewise 150 A/µs
    expect(from({}, { current: 12 }, { junction: kelvin(49) })).toBe('row 2')
    expect(from({}, { current: 12 }, { junction: kelvin(51) })).toBe('row 1')
    expect(from({}, { slope: 150e6 }, { junction: kelvin(1) })).toBe('row 2')
    expect(from({}, { slope: 150e6 }, { junction: kelvin(-1) })).toBe('row 1')
    // and they add up: 1.3 and 1.3 are 1.29 units together
    expect(from({}, { current: 10.4, slope: 130e6 }, { junction: kelvin(56) })).toBe('row 2')
    expect(from({}, { current: 10.4, slope: 130e6 }, { junction: kelvin(58) })).toBe('row 1')
    expect(from({}, { current: 8 }, { slope: 100e6 })).toBe('row 1')
    expect(from({ current: 16 }, { current: 8 }, { current: 30 })).toBe('row 2')
    expect(from({}, { slope: 60e6 }, { slope: 125e6 })).toBe('row 2')
  })

  it('has the factor to what the row states, else to what the fit gives at the row', () => {
    const event = { charge: 120e-9, peakReverseCurrent: 4, recoveryTime: 63e-9 }
    const part = origins({ recovery: [row] }, { ...at({ slope: 200e6 }), event })
    expect(part.of('event.qrr_c')).toEqual({ how: 'extrapolated', from: 'recovery row 1', factor: 120 / 50 })
    expect(part.of('event.trr_s')!.factor).toBeCloseTo(63 / 42, 12)
    const fitted = steadyFiguresAt(part.rectifier, here)!
    expect(part.of('event.peak_reverse_a')!.factor).toBeCloseTo(4 / fitted.peakReverseCurrent, 12)
  })

  it('takes the event from the steady state where none was solved', () => {
    const part = origins({ recovery: [row] }, at({ slope: 140e6 }))
    const { charge } = steadyFiguresAt(part.rectifier, { ...here, slope: 140e6 })!
    expect(part.of('event.qrr_c')).toEqual({
      how: 'converted',
      from: 'recovery row 1',
      factor: expect.closeTo(charge / 50e-9, 12),
    })
  })

  it('has a stated trr only where it ends as ours does or does not say', () => {
    const how = (recoveryTimeBy: typeof row.recoveryTimeBy) =>
      origins({ recovery: [{ ...row, recoveryTimeBy }] }).of('event.trr_s')!.how
    expect(how({ kind: 'line-90-25' })).toBe('given')
    expect(how({ kind: 'unknown' })).toBe('given')
    expect(how({ kind: 'level-25' })).toBe('converted')
    expect(how({ kind: 'level', until: 0.1 })).toBe('converted')
  })

  it('of a step row is converted at I0 and a0: its times are another thing', () => {
    const recovery = [stepRow({ current: 8, reverse: 8, until: 2, recoveryTime: 35e-9 })]
    const part = origins({ recovery })
    for (const figure of ['event.qrr_c', 'event.peak_reverse_a', 'event.trr_s'])
      expect(part.of(figure)).toEqual({ how: 'converted', from: 'recovery row 1', factor: expect.closeTo(1, 12) })
  })

  it('of a row without condition is at I0, a0 and 25 °C', () => {
    const bare = { ...row, current: null, slope: null, junction: null }
    expect(qrr({}, bare).how).toBe('given')
    expect(qrr({ current: 9 }, bare).how).toBe('converted')
    expect(qrr({ slope: 2e8 }, bare).how).toBe('extrapolated')
    expect(qrr({ junction: kelvin(51) }, bare).how).toBe('extrapolated')
  })

  it('of three figures is the class where no row tells it, and none where no charge is stored', () => {
    const three = ['event.qrr_c', 'event.peak_reverse_a', 'event.trr_s']
    expect(origins({}).figures.slice(0, 3)).toEqual(three)
    const schottky = origins({ class: 'schottky' })
    for (const figure of three)
      expect(schottky.of(figure)).toEqual({ how: 'given', from: 'class without stored charge', factor: null })
    expect(schottky.caveats).toEqual([])
  })
})

describe('the origin of forward voltage', () => {
  const v = (fields: Partial<RectifierRecord>, more: Partial<ProvenanceInput> = {}) =>
    origins(fields, more).of('forward_v')!

  it('is the nearest row in current and temperature, with the factor from its drop', () => {
    const forward = [forwardRow({ drop: 1.4 }), forwardRow({ current: 16, drop: 1.6, place: place('at 16 A') })]
    const part = origins({ forward })
    const { drop } = forwardDropAt({ rectifier: part.rectifier, current: 8, junction: kelvin(25) })
    expect(part.of('forward_v')).toEqual({
      how: 'given',
      from: 'forward row 1',
      factor: expect.closeTo(drop / 1.4, 12),
    })
    expect(part.caveats).toEqual([])
    const twice = [forwardRow(), forwardRow({ place: place('again') })]
    expect(v({ forward: twice }).from).toBe('forward row 1')
    expect(v({ forward }, { forwardCurrent: 15 })).toMatchObject({ how: 'converted', from: 'at 16 A' })
    expect(v({ forward }, { forwardCurrent: 25 }).how).toBe('extrapolated')
    expect(v({ forward }, at({ junction: kelvin(28) })).how).toBe('converted')
    expect(v({ forward }, at({ slope: 1e9 })).how).toBe('given')
  })

  it('of a row without temperature is at 25 °C', () => {
    expect(v({ forward: [forwardRow({ junction: null })] }).how).toBe('given')
  })

  it('moved far is told by name', () => {
    const { caveats } = origins({ forward: [forwardRow()] }, { forwardCurrent: 32 })
    expect(caveats).toEqual([
      {
        code: 'extrapolated-far',
        candidate: 'test-part',
        data: { figure: 'Forward voltage', row: 'forward row 1', factor: 4 },
      },
    ])
  })

  it('given as a line is that line within 2 K; farther with its own coefficients or 25 K converted, else extrapolated', () => {
    const line: ForwardLine = {
      ...forwardRow({ place: place('forward line'), junction: kelvin(125) }),
      threshold: 0.9,
      resistance: 0.05,
      thresholdPerKelvin: -2e-3,
      resistancePerKelvin: 1e-4,
    }
    const how = (fields: Partial<ForwardLine>, celsius: number) => {
      const found = v({ forwardLine: { ...line, ...fields } }, at({ junction: kelvin(celsius) }))
      expect(found).toMatchObject({ from: 'forward line', factor: null })
      return found.how
    }
    expect(how({}, 127)).toBe('given')
    expect(how({}, 122.9)).toBe('converted')
    expect(how({}, 25)).toBe('converted')
    for (const part of [{ thresholdPerKelvin: null }, { resistancePerKelvin: null }]) {
      expect(how(part, 123)).toBe('given')
      expect(how(part, 100)).toBe('converted')
      expect(how(part, 99)).toBe('extrapolated')
    }
    expect(how({ junction: null }, 25)).toBe('given')
  })
})

describe('the origin of leakage and capacitance', () => {
  it('is the nearest leakage row in voltage and temperature', () => {
    const leakage = [leakageRow(), leakageRow({ voltage: 300, place: place('at 300 V'), junction: null })]
    const part = origins({ leakage })
    const at600 = leakageCurrentAt({ rectifier: part.rectifier, voltage: 600, junction: kelvin(25) })!
    const factor = expect.closeTo(at600.current / 1e-6, 12)
    expect(part.of('losses_w.leakage')).toEqual({ how: 'given', from: 'leakage row 1', factor })
    const low = origins({ leakage }, { blockingVoltage: 300 })
    expect(low.of('losses_w.leakage')).toMatchObject({ how: 'given', from: 'at 300 V' })
    expect(origins({ leakage }, { blockingVoltage: 80 }).caveats).toEqual([
      {
        code: 'extrapolated-far',
        candidate: 'test-part',
        data: { figure: 'Leakage', row: 'at 300 V', factor: 3.75 },
      },
    ])
  })

  it('is nowhere where leakage is not used or a capacitance of no importance is not stated', () => {
    expect(origins({ class: 'body-diode' }).figures).not.toContain('losses_w.leakage')
    expect(origins({}).figures).not.toContain('losses_w.capacitive')
  })

  it('of a capacitance is what the record states of it: a law is given, a charge or points are converted', () => {
    const how = (capacitance: RectifierRecord['capacitance']) => origins({ capacitance }).of('losses_w.capacitive')
    expect(how({ kind: 'law', zeroBias: 1e-10, builtIn: 0.8, grading: 0.5 })).toEqual({
      how: 'given',
      from: 'capacitance',
      factor: null,
    })
    expect(how({ kind: 'charge', charge: 1e-9, voltage: 50 })!.how).toBe('converted')
    expect(how({ kind: 'points', points: [{ voltage: 10, capacitance: 1e-10 }] })!.how).toBe('converted')
  })
})
