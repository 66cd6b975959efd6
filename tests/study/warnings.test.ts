import { describe, expect, it } from 'vitest'
import { prepareCandidate } from '../../src/study/candidate.ts'
import { rampRow } from '../evidence/records.ts'
import { carbide, kelvin, silicon, stage } from '../stage/samples.ts'
import { alone, ranked, reasonCodes, warningCodes } from './settings.ts'

describe('overshoot that is not in the peak', () => {
  const codes = (loopInductance: number | null, part = silicon({ capacitance: null })) =>
    warningCodes(ranked(stage({ loopInductance, output: { current: 0.05 } }), part))

  it('is said of a part without capacitance in discontinuous conduction, where no charge recovers', () => {
    const { event } = alone(stage({ output: { current: 0.05 } }), silicon({ capacitance: null }))
    expect(event).toMatchObject({ peak_reverse_a: 0, peak_reverse_v: 400 })
    expect(codes(8e-9)).toContain('overshoot-not-included')
    expect(codes(8e-9, silicon())).not.toContain('overshoot-not-included')
  })

  it('is not missing where the loop is stated as 0', () => {
    expect(codes(0)).not.toContain('overshoot-not-included')
    expect(codes(null)).toContain('overshoot-not-included')
    const ideal = stage({ loopInductance: 0 })
    expect(warningCodes(ranked(ideal, carbide({ capacitance: null })))).not.toContain('overshoot-not-included')
  })
})

describe('the loop against the voltage', () => {
  it('is told of a part that does not recover too: slope times inductance above 0.2 V', () => {
    // 0.2 · 400 V / 200 A/µs
    const edge = 400e-9
    const codes = (loopInductance: number) => warningCodes(ranked(stage({ loopInductance }), carbide()), 'carbide')
    expect(codes(0.99 * edge)).not.toContain('loop-energy')
    expect(codes(1.01 * edge)).toContain('loop-energy')
  })
})

describe('an abrupt part', () => {
  const hot = { slope: 200e6, charge: 190e-9, softness: 0.3, junction: kelvin(100) }

  it('is told once: at the point where it recovers hard there', () => {
    const part = silicon({ recovery: [rampRow(hot)] })
    const found = ranked(stage(), part).warnings.filter(({ code }) => code === 'snappy')
    expect(found).toHaveLength(1)
    expect(found[0]!.data.current).toBeCloseTo(alone(stage(), part).event!.current_a, 9)
  })

  it('and by its row where it does not', () => {
    const found = ranked(stage({ output: { current: 0.05 } }), silicon({ recovery: [rampRow(hot)] })).warnings
    const snappy = found.filter(({ code }) => code === 'snappy')
    expect(snappy).toHaveLength(1)
    expect(snappy[0]!.data.current).toBe(8)
  })
})

describe('recovery of a charge that discontinuous conduction leaves', () => {
  it('must fit the on-time as well', () => {
    const charge = 3e-6 ** 2 * 50e6
    const slow = silicon({ recovery: [rampRow({ slope: 200e6, recoveryTime: 3e-6, charge, junction: kelvin(100) })] })
    const result = alone(stage({ output: { current: 0.1 }, input: { voltage: 380 } }), slow)
    expect(result.point!.mode).toBe('discontinuous')
    expect(result.event!.qrr_c).toBeGreaterThan(0)
    expect(reasonCodes(result)).toContain('recovery-too-slow')
    const { value, limit } = result.reasons.find(({ code }) => code === 'recovery-too-slow')!
    expect(value).toBeCloseTo(result.event!.ta_s + 3 * result.event!.tau_rr_s!, 12)
    expect(limit).toBeCloseTo(result.point!.duty / 100e3, 12)
  })
})

describe('the slope of a measured turn-on', () => {
  it('is limited by the loop and the voltage of that measurement, not by those of the stage', () => {
    const turnOn = { energy: 400e-6, current: 6, voltage: 380, includesRectifier: 'yes', rectifier: 'silicon' } as const
    const energy = (loopInductance: number, voltage = 380) => {
      const low = stage({
        kind: 'buck',
        input: { voltage: 24 },
        output: { voltage: 5 },
        loopInductance,
        switch: { turnOn: { ...turnOn, voltage } },
      })
      return prepareCandidate(low, silicon(), [silicon()]).turnOn!.nominal.energy
    }
    expect(24 / 200e-9, 'the stage itself would be limited').toBeLessThan(200e6)
    expect(energy(200e-9)).toBe(energy(0))
    expect(energy(200e-9, 20), 'at 20 V the measurement was').not.toBe(energy(0, 20))
  })
})
