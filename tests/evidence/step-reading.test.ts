import { describe, expect, it } from 'vitest'
import type { Caveat } from '../../src/domain/caveat.ts'
import type { StepRow } from '../../src/domain/rectifier.ts'
import { invertStepRow } from '../../src/evidence/invert-step-row.ts'
import { priorGaussians } from '../../src/evidence/prior-gaussians.ts'
import type { RowReading } from '../../src/evidence/row-reading.ts'
import { lifetimeFromStep } from '../../src/models/step-fixture.ts'
import { kelvin, stepRow } from './records.ts'

const context = { id: 'part', ratedCurrent: 8, blockingVoltage: 400, prior: priorGaussians('ultrafast').recovery! }
const read = (fields: Partial<StepRow>) => invertStepRow(stepRow(fields), context) as RowReading
const unusable = (fields: Partial<StepRow>) => invertStepRow(stepRow(fields), context) as { readonly unusable: Caveat }

/** Fixtures are centred at 1.7 times the lumped lifetime. */
const centre = Math.log(1.7)
/** tau_rr/tau of the class at 25 °C: y = 1. */
const share = 1 / (1 + Math.E)
/** PHYSICS section 1: tau 150 ns, tau_rr 20 ns, 0.5 A to 1 A. */
const both = { storageTime: 39.3546e-9, recoveryTime: 67.0805e-9 }

describe('storage and recovery time of a step fixture', () => {
  it('tell u and y where both are stated with the level at which trr ends', () => {
    const { point, observation, tellsRatio, single, caveats, condition } = read(both)
    expect(point.lifetime).toBeCloseTo(Math.log(150e-9) + centre, 4)
    expect(point.ratio).toBeCloseTo(Math.log(6.5), 3)
    expect(observation.values).toEqual([point.lifetime, point.ratio])
    expect(observation.designs).toHaveLength(2)
    expect({ tellsRatio, single, caveats }).toEqual({ tellsRatio: true, single: null, caveats: [] })
    expect(condition).toEqual({ ratedCurrent: 8, current: 0.5, slope: 1e8, junction: kelvin(25) })
  })

  it('tell no y where the currents lie so far apart that tau and tau_rr are one number', () => {
    // (1 + IF/IR)(1 − tau_rr/tau) is hardly above 1: the two differ by 1e-10
    const { tellsRatio, caveats } = read({
      current: 1e6,
      reverse: 1e-4,
      until: 5e-5,
      storageTime: 1e-9,
      recoveryTime: 1e-7,
    })
    expect(tellsRatio).toBe(false)
    expect(caveats.map(({ code }) => code)).toEqual(['row-impossible'])
  })

  it('of a maximum are lowered to the centre of the population: u by 0.5, y not', () => {
    const { point, observation } = read({ ...both, grade: 'maximum' })
    expect(observation.values).toEqual([point.lifetime - 0.5, point.ratio])
    const alone = read({ recoveryTime: 28e-9, grade: 'maximum' })
    expect(alone.observation.values).toEqual([alone.point.lifetime - 0.5])
  })

  it('are read at the temperature of the row, 25 °C where it states none', () => {
    expect(read({ ...both, junction: kelvin(100) }).condition.junction).toBe(kelvin(100))
    expect(read({ ...both, junction: null }).condition.junction).toBe(298.15)
    // y of the class at 100 °C is 1 + 0.2 ln(T/T0)
    const { point } = read({ recoveryTime: 28e-9, junction: kelvin(100) })
    expect(point.ratio).toBeCloseTo(1 + 0.2 * Math.log(373.15 / 298.15), 12)
  })
})

describe('the doubt of both times of a step fixture', () => {
  it('is what independent errors of the two make of u and y, whatever the reverse current', () => {
    // ts 8 ns and trr 40 ns, 0.5 A to 2 A: the differences of the inversion in place of its derivatives
    const fields = { current: 0.5, reverse: 2, until: 0.4, storageTime: 8e-9, recoveryTime: 40e-9 } as const
    const solved = (storage: number, recovery: number) => {
      const { lifetime, tailTime } = lifetimeFromStep({
        forwardCurrent: 0.5,
        reverseCurrent: 2,
        until: 0.4,
        storageTime: 8e-9 * Math.exp(storage),
        recoveryTime: 40e-9 * Math.exp(recovery),
      })!
      return [Math.log(lifetime), Math.log(lifetime / tailTime - 1)] as const
    }
    const step = 1e-5
    const slopes = ([storage, recovery]: readonly [number, number]) => {
      const [up, down] = [solved(storage, recovery), solved(-storage, -recovery)]
      return [(up[0] - down[0]) / (2 * step), (up[1] - down[1]) / (2 * step)] as const
    }
    const [byStorage, byRecovery] = [slopes([step, 0]), slopes([0, step])]
    const cross = 0.05 ** 2 * (byStorage[0] * byStorage[1] + byRecovery[0] * byRecovery[1])
    expect(read(fields).observation.noise).toEqual([
      expect.closeTo(0.05 ** 2 * (byStorage[0] ** 2 + byRecovery[0] ** 2) + 0.6 ** 2, 6),
      expect.closeTo(cross, 6),
      expect.closeTo(cross, 6),
      expect.closeTo(0.05 ** 2 * (byStorage[1] ** 2 + byRecovery[1] ** 2) + 0.4 ** 2 + 0.2 ** 2, 6),
    ])
  })
})

describe('one time of a step fixture', () => {
  const { log } = Math

  it('that is trr means ts and a tail to the level at the y of the class', () => {
    // ts/tau = ln((1 + IF/IR)(1 − q)), tail/tau = q ln(IR/Ix)
    const factor = log(1.5 * (1 - share)) + share * log(4)
    const { point, observation, tellsRatio, caveats } = read({ recoveryTime: 28e-9 })
    expect(point.lifetime).toBeCloseTo(log(28e-9 / factor) + centre, 12)
    expect(point.ratio).toBe(1)
    expect(observation.noise).toEqual([expect.closeTo(0.05 ** 2 + 0.6 ** 2, 12)])
    expect(observation.designs).toHaveLength(1)
    expect({ tellsRatio, caveats }).toEqual({ tellsRatio: false, caveats: [] })
  })

  it('that is a storage time means ts alone', () => {
    const { point, caveats } = read({ storageTime: 10e-9 })
    expect(point.lifetime).toBeCloseTo(log(10e-9 / log(1.5 * (1 - share))) + centre, 12)
    expect(caveats).toEqual([])
  })

  it('of a fixture so hard that the class would store nothing is taken by the simplest form, ts/ln(1 + IF/IR)', () => {
    // 1.1 times 1 − q is below 1
    const { point } = read({ storageTime: 10e-9, current: 0.1 })
    expect(point.lifetime).toBeCloseTo(log(10e-9 / log(1.1)) + centre, 12)
  })

  it('is the storage time where trr ends at an unknown or no lower level', () => {
    const expected = read({ storageTime: 10e-9 }).point
    for (const until of [null, 0, 1, 1.5]) {
      const { point, tellsRatio } = read({ storageTime: 10e-9, recoveryTime: 28e-9, until })
      expect(point).toEqual(expected)
      expect(tellsRatio).toBe(false)
    }
  })

  it('is trr where a storage time of zero stands beside it, and that is no contradiction', () => {
    const { point, caveats } = read({ storageTime: 0, recoveryTime: 28e-9 })
    expect(point).toEqual(read({ recoveryTime: 28e-9 }).point)
    expect(caveats).toEqual([])
  })

  it('is told where both are stated and cannot be of one event', () => {
    expect(read({ storageTime: 30e-9, recoveryTime: 28e-9 }).caveats).toEqual([
      {
        code: 'row-impossible',
        candidate: 'part',
        data: { row: 'recovery row 1', found: 'storage 30 ns', bound: 'trr 28 ns' },
      },
    ])
  })

  it('has as its tail at most what the stored charge gives where the fixture is hard', () => {
    // IF (tau/tau_rr − 1) = e × 0.05 A is the highest peak, and nothing is stored before it: 1.05 (1 − q) < 1
    const { point } = read({ recoveryTime: 5e-9, current: 0.05, until: 0.05 })
    expect(point.lifetime).toBeCloseTo(log(5e-9 / (share * 1)) + centre, 12)
  })
})

describe('a step row from which nothing can be read', () => {
  it('says which level was not below which current', () => {
    expect(unusable({ recoveryTime: 28e-9, until: 1 }).unusable).toEqual({
      code: 'row-impossible',
      candidate: 'part',
      data: { row: 'recovery row 1', found: 'the level 1 A', bound: 'the reverse current 1 A' },
    })
  })

  it('names its two times where it states both', () => {
    const { data } = unusable({ recoveryTime: 28e-9, storageTime: 0, until: 3 }).unusable
    expect(data).toEqual({ row: 'recovery row 1', found: 'storage 0 ns', bound: 'trr 28 ns' })
  })

  it('names itself alone where it states no level', () => {
    expect(unusable({ recoveryTime: 28e-9, until: null }).unusable.data).toEqual({ row: 'recovery row 1' })
    expect(unusable({ storageTime: 0, until: null }).unusable.data).toEqual({ row: 'recovery row 1' })
  })

  it('is one without reverse current', () => {
    expect(unusable({ ...both, reverse: 0 }).unusable.code).toBe('row-impossible')
    expect(unusable({ recoveryTime: 28e-9, reverse: 0 }).unusable.code).toBe('row-impossible')
    expect(unusable({ storageTime: 28e-9, reverse: 0 }).unusable.code).toBe('row-impossible')
  })

  it('is one whose level is above the highest peak that the class could show', () => {
    expect(unusable({ recoveryTime: 5e-9, current: 0.05, until: 0.2 }).unusable.data).toMatchObject({
      found: 'the level 0.2 A',
    })
  })
})
