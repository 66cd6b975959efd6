import { describe, expect, it } from 'vitest'
import type { CalibratedRectifier } from '../../src/domain/calibrated-rectifier.ts'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { MeasuredTurnOn } from '../../src/domain/stage.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { nominalCoefficients } from '../../src/stage/create-kernel.ts'
import { turnOnMeaning } from '../../src/stage/measured-turn-on.ts'
import { capacitive, hardEvent, lifetimes } from './by-hand.ts'
import { carbide, silicon } from './samples.ts'

const voltage = 400
const slope = 300e6
const voltageFall = 20e-9

function given(includesRectifier: MeasuredTurnOn['includesRectifier'], energy = 900e-6, current = 8): MeasuredTurnOn {
  return { energy, current, voltage, includesRectifier, rectifier: null }
}

/** The part; where it recovers, with lifetimes that depend on the current too. */
function calibrated(record: RectifierRecord): CalibratedRectifier {
  const { rectifier } = calibrate({ record, blockingVoltage: voltage })
  rectifier.recovery?.posterior.mean.set([0.12], 1)
  rectifier.recovery?.posterior.mean.set([-0.2], 5)
  return rectifier
}

/** What the part adds to the switch from a steady current at 25 °C: its recovery, and the charging it leaves over. */
function containedBy(rectifier: CalibratedRectifier, current: number): number {
  const { ratedCurrent: rated, ratedVoltage } = rectifier
  const part = {
    coefficients: nominalCoefficients(rectifier),
    rated,
    ratedVoltage,
    line: false,
    stores: true,
    leaks: true,
  }
  const { tau, tail } = lifetimes(part, current, slope, 298.15)
  const event = hardEvent({ current, slope, tau, tail, charge: tau * current }, voltage, voltageFall)
  const { charge, cost } = capacitive(150e-12, 0.8, 0.45, voltage)
  return event.switchAdded + cost * Math.max(0, 1 - event.charge / charge)
}

const meaningOf = (turnOn: MeasuredTurnOn, testRectifier: CalibratedRectifier | null, at = slope) =>
  turnOnMeaning({ given: turnOn, testRectifier, slope: at, voltageFall })

describe('a measured turn-on energy', () => {
  it('without the rectifier is the base, and candidates add their cost', () => {
    const whole = { energy: 900e-6, addedShare: 1 }
    for (const rectifier of [null, calibrated(silicon())])
      expect(meaningOf(given('no'), rectifier)).toEqual({ nominal: whole, low: whole, high: whole, caveats: [] })
  })

  it('with an unknown rectifier in it lets candidates add nothing, and says so', () => {
    const reading = { energy: 900e-6, addedShare: 0 }
    expect(meaningOf(given('yes'), null)).toEqual({
      nominal: reading,
      low: reading,
      high: reading,
      caveats: [{ code: 'turn-on-contains-recovery', candidate: '', data: { given: 900e-6 } }],
    })
  })

  it.each([8, 2])('with a known rectifier in it loses what that one added at %d A', (current) => {
    const rectifier = calibrated(silicon())
    const { nominal, low, high, caveats } = meaningOf(given('yes', 900e-6, current), rectifier)
    const contained = containedBy(rectifier, current)
    expect(contained).toBeGreaterThan(10e-6)
    expect((900e-6 - nominal.energy) / contained).toBeCloseTo(1, 6)
    expect(nominal.addedShare).toBe(1)
    expect([low, high, caveats]).toEqual([nominal, nominal, []])
  })

  it('holds the lifetime below a hundredth of the rated current', () => {
    const rectifier = calibrated(silicon())
    const { nominal } = meaningOf(given('yes', 900e-6, 0.04), rectifier)
    // lifetimes() by hand holds it too; at this current the charge is small and the junction is charged for the rest.
    expect((900e-6 - nominal.energy) / containedBy(rectifier, 0.04)).toBeCloseTo(1, 6)
  })

  it('is taken as 0 where the known rectifier would have added more than was measured, and says so', () => {
    const rectifier = calibrated(silicon())
    const { nominal, caveats } = meaningOf(given('yes', 1e-6), rectifier)
    expect(nominal).toEqual({ energy: 0, addedShare: 1 })
    expect(caveats).toHaveLength(1)
    const [{ code, candidate, data }] = caveats as [(typeof caveats)[number]]
    expect([code, candidate, data.given]).toEqual(['turn-on-floor', '', 1e-6])
    expect((data.contained as number) / containedBy(rectifier, 8)).toBeCloseTo(1, 6)
  })

  it('of unknown meaning takes the whole as nominal and draws between both readings', () => {
    const rectifier = calibrated(silicon())
    const { nominal, low, high, caveats } = meaningOf(given('unknown'), rectifier)
    expect(nominal).toEqual({ energy: 900e-6, addedShare: 1 })
    expect(high).toEqual(nominal)
    const contained = containedBy(rectifier, 8)
    expect((900e-6 - low.energy) / contained).toBeCloseTo(1, 6)
    expect(low.addedShare).toBe(1)
    expect(caveats.map(({ code, candidate }) => [code, candidate])).toEqual([['turn-on-unknown', '']])
    expect(caveats[0]!.data.given).toBe(900e-6)
    expect((caveats[0]!.data.contained as number) / contained).toBeCloseTo(1, 6)
  })

  it('of unknown meaning and with an unknown rectifier may hold all of its cost', () => {
    const { nominal, low, high, caveats } = meaningOf(given('unknown'), null)
    expect([nominal, high]).toEqual([
      { energy: 900e-6, addedShare: 1 },
      { energy: 900e-6, addedShare: 1 },
    ])
    expect(low).toEqual({ energy: 900e-6, addedShare: 0 })
    expect(caveats).toEqual([{ code: 'turn-on-unknown', candidate: '', data: { given: 900e-6, contained: 0 } }])
  })
})

describe('a rectifier that does not recover', () => {
  const taken = (record: RectifierRecord, at?: number): number =>
    900e-6 - meaningOf(given('yes'), calibrated(record), at).nominal.energy

  it('added the charging of its junction alone', () => {
    expect(taken(carbide()) / capacitive(400e-12, 1.2, 0.46, voltage).cost).toBeCloseTo(1, 6)
  })

  it('nor does one where the drive cannot turn the switch on', () => {
    const { cost } = capacitive(150e-12, 0.8, 0.45, voltage)
    expect(taken(silicon(), 0) / cost).toBeCloseTo(1, 6)
    expect(taken(silicon(), Number.NaN) / cost).toBeCloseTo(1, 6)
  })

  it('and has no junction capacitance added nothing', () => {
    expect(taken(carbide({ capacitance: null }))).toBe(0)
  })
})

describe('a rectifier that recovers and has no junction capacitance', () => {
  it('added its recovery alone', () => {
    const rectifier = calibrated(silicon({ capacitance: null }))
    const { tau, tail } = lifetimes(
      {
        coefficients: nominalCoefficients(rectifier),
        rated: 8,
        ratedVoltage: 600,
        line: false,
        stores: true,
        leaks: true,
      },
      8,
      slope,
      298.15,
    )
    const event = hardEvent({ current: 8, slope, tau, tail, charge: tau * 8 }, voltage, voltageFall)
    const { nominal } = meaningOf(given('yes'), rectifier)
    expect((900e-6 - nominal.energy) / event.switchAdded).toBeCloseTo(1, 6)
  })
})
