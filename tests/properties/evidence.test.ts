import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type {
  ForwardRow,
  LeakageRow,
  RecoveryRow,
  RectifierClass,
  RectifierRecord,
} from '../../src/domain/rectifier.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { forwardDropAt, leakageCurrentAt, recoveryAt } from '../../src/evidence/recovery-at.ts'
import { choleskyFactor } from '../../src/numerics/cholesky.ts'
import { lumpedFigures } from '../evidence/lumped.ts'
import { forwardRow, kelvin, leakageRow, place, rampRow, record, stepRow } from '../evidence/records.ts'

const grade = fc.constantFrom('measured' as const, 'typical' as const, 'maximum' as const, 'estimated' as const)
const spread = fc.constantFrom(null, null, null, 0.001, 0.05, 0.3)
const junction = fc.option(fc.double({ min: kelvin(-40), max: kelvin(175), noNaN: true }), { freq: 6 })
const number = (min: number, max: number) => fc.double({ min, max, noNaN: true })
const maybe = (min: number, max: number) => fc.option(number(min, max))

/** Rows that a part could show, with any of their figures left out, and then misread by up to a third. */
const ramp: fc.Arbitrary<RecoveryRow> = fc
  .record({
    grade,
    spread,
    junction,
    current: fc.option(number(0.2, 30), { freq: 8 }),
    slope: fc.option(number(2e7, 1e9), { freq: 8 }),
    voltage: fc.option(number(20, 600), { freq: 5 }),
    u: number(Math.log(10e-9), Math.log(1e-6)),
    y: number(-0.5, 3),
    shown: fc.integer({ min: 1, max: 15 }),
    misread: fc.tuple(number(0.7, 1.3), number(0.7, 1.3), number(0.7, 1.3), number(0.7, 1.3)),
    recoveryTimeBy: fc.constantFrom(
      { kind: 'line-90-25' as const },
      { kind: 'level-25' as const },
      { kind: 'level' as const, until: 0.05 },
      { kind: 'unknown' as const },
    ),
    softnessBy: fc.constantFrom('times' as const, 'slopes' as const),
  })
  .map(({ u, y, shown, misread, ...fields }) => {
    const at = { current: fields.current ?? 8, slope: fields.slope ?? 1e8, junction: 300 }
    const figures = lumpedFigures(at, u, y)
    const given = (bit: number, value: number) => (shown & bit ? value : null)
    return rampRow({
      ...fields,
      recoveryTime: given(1, figures.recoveryTime * misread[0]),
      charge: given(2, figures.charge * misread[1]),
      peakReverseCurrent: given(4, figures.peakReverseCurrent * misread[2]),
      softness: given(8, (figures.recoveryTime / (figures.peakReverseCurrent / at.slope) - 1) * misread[3]),
    })
  })

const step: fc.Arbitrary<RecoveryRow> = fc
  .record({
    grade,
    spread,
    junction,
    current: number(0.01, 5),
    reverse: number(0.01, 5),
    until: maybe(0.005, 2),
    recoveryTime: maybe(5e-9, 1e-6),
    storageTime: maybe(2e-9, 8e-7),
  })
  .map(stepRow)

const forward: fc.Arbitrary<ForwardRow> = fc
  .record({ grade, spread, junction, current: number(0.01, 30), drop: number(0.3, 3) })
  .map(forwardRow)

const leakage: fc.Arbitrary<LeakageRow> = fc
  .record({ grade, spread, junction, voltage: number(10, 600), current: number(1e-9, 1e-2) })
  .map(leakageRow)

const named = <R extends { readonly place: unknown }>(rows: readonly R[]) =>
  rows.map((row, index) => ({ ...row, place: place(`row ${index + 1}`) }))

const records: fc.Arbitrary<RectifierRecord> = fc
  .record({
    class: fc.constantFrom<RectifierClass>('standard', 'fast', 'ultrafast', 'soft-ultrafast'),
    recovery: fc
      .array(fc.oneof({ weight: 3, arbitrary: ramp }, { weight: 1, arbitrary: step }), { maxLength: 5 })
      .map(named),
    forward: fc.array(forward, { maxLength: 4 }).map(named),
    leakage: fc.array(leakage, { maxLength: 4 }).map(named),
  })
  .map(record)

const conditions = fc.record({
  current: number(0, 40),
  slope: number(1e7, 2e9),
  junction: number(kelvin(-40), kelvin(200)),
  voltage: number(5, 700),
})

type Condition = typeof conditions extends fc.Arbitrary<infer T> ? T : never

/** Standard deviations of u, y, V_F and ln I_R at a condition. */
function doubts(held: RectifierRecord, at: Condition): readonly number[] {
  const { rectifier } = calibrate({ record: held, blockingVoltage: 400 })
  const recovery = recoveryAt({ rectifier, ...at })!
  return [
    recovery.lifetimeDeviation,
    recovery.ratioDeviation,
    forwardDropAt({ rectifier, ...at }).deviation,
    leakageCurrentAt({ rectifier, ...at })!.deviation,
  ]
}

describe('evidence', () => {
  it('never gains doubt about u, y, V_F or ln I_R at any condition from one more row, over subsets of rows', () => {
    fc.assert(
      fc.property(records, conditions, fc.integer({ min: 0, max: 4095 }), fc.nat(), (held, at, mask, pick) => {
        const subset = <R>(rows: readonly R[], shift: number) =>
          rows.filter((_, index) => (mask >> (shift + index)) & 1)
        const kept = {
          ...held,
          recovery: subset(held.recovery, 0),
          forward: subset(held.forward, 4),
          leakage: subset(held.leakage, 8),
        }
        const missing = [
          ...held.recovery
            .filter((row) => !kept.recovery.includes(row))
            .map((row) => ({ ...kept, recovery: [...kept.recovery, row] })),
          ...held.forward
            .filter((row) => !kept.forward.includes(row))
            .map((row) => ({ ...kept, forward: [...kept.forward, row] })),
          ...held.leakage
            .filter((row) => !kept.leakage.includes(row))
            .map((row) => ({ ...kept, leakage: [...kept.leakage, row] })),
        ]
        const more = missing[pick % Math.max(missing.length, 1)]
        fc.pre(more !== undefined)
        const before = doubts(kept, at)
        for (const [index, after] of doubts(more!, at).entries())
          expect(after).toBeLessThanOrEqual(before[index]! * (1 + 1e-9) + 1e-12)
      }),
      { numRuns: 500, seed: 1 },
    )
  })

  it('keeps tau_rr below tau, every number finite, and every covariance one that can be drawn from', () => {
    fc.assert(
      fc.property(records, conditions, (held, at) => {
        const { rectifier, caveats } = calibrate({ record: held, blockingVoltage: 400 })
        const recovery = recoveryAt({ rectifier, ...at })!
        expect(recovery.tailTime).toBeGreaterThan(0)
        expect(recovery.tailTime).toBeLessThan(recovery.lifetime)
        for (const { posterior } of [rectifier.recovery!, rectifier.forward, rectifier.leakage!]) {
          const n = posterior.mean.length
          expect([...posterior.mean, ...posterior.covariance].every(Number.isFinite)).toBe(true)
          const symmetric = posterior.covariance.every(
            (value, k) => value === posterior.covariance[(k % n) * n + Math.floor(k / n)],
          )
          expect(symmetric).toBe(true)
          expect(() => choleskyFactor(posterior.covariance, n)).not.toThrow()
        }
        const shift = rectifier.maximumRecoveryShift
        if (shift !== null) expect(Number.isFinite(shift.lifetime + shift.ratio)).toBe(true)
        for (const { data } of caveats)
          for (const value of Object.values(data)) expect(String(value)).not.toMatch(/NaN|Infinity/)
      }),
      { numRuns: 500, seed: 1 },
    )
  })

  it('does not depend on the order of the rows beyond rounding', () => {
    fc.assert(
      fc.property(records, conditions, (held, at) => {
        const turned = {
          ...held,
          recovery: held.recovery.toReversed(),
          forward: held.forward.toReversed(),
          leakage: held.leakage.toReversed(),
        }
        const nominal = (one: RectifierRecord) => {
          const { rectifier } = calibrate({ record: one, blockingVoltage: 400 })
          const { lifetime, tailTime } = recoveryAt({ rectifier, ...at })!
          const leak = leakageCurrentAt({ rectifier, ...at })!.current
          return [Math.log(lifetime), Math.log(tailTime), forwardDropAt({ rectifier, ...at }).drop, Math.log(leak)]
        }
        const straight = nominal(held)
        for (const [index, value] of nominal(turned).entries()) expect(value).toBeCloseTo(straight[index]!, 6)
      }),
      { numRuns: 200, seed: 1 },
    )
  })

  it('gives the same bytes for the same record', () => {
    fc.assert(
      fc.property(records, (held) => {
        const text = () => JSON.stringify(calibrate({ record: held, blockingVoltage: 400 }))
        expect(text()).toBe(text())
      }),
      { numRuns: 50, seed: 1 },
    )
  })
})
