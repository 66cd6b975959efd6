import { describe, expect, it } from 'vitest'
import { fitFigures } from '../../src/evidence/fit-figures.ts'
import { invertPair, type RampFigures } from '../../src/evidence/invert-pair.ts'
import { invertRampRow } from '../../src/evidence/invert-ramp-row.ts'
import { invertStepRow } from '../../src/evidence/invert-step-row.ts'
import { priorGaussians } from '../../src/evidence/prior-gaussians.ts'
import type { FigureName, RampReading } from '../../src/evidence/recovery-figures.ts'
import type { RowReading } from '../../src/evidence/row-reading.ts'
import { lifetimeFromStep } from '../../src/models/step-fixture.ts'
import { lumpedFigures } from './lumped.ts'
import { rampRow, stepRow } from './records.ts'

const reading: RampReading = { current: 8, slope: 200e6, recoveryTimeBy: { kind: 'line-90-25' }, softnessBy: 'times' }
const made = lumpedFigures({ ...reading, junction: 298 }, Math.log(60e-9), Math.log(2))
const figures: RampFigures = { ...made, softness: 1.3981021 }
const errors = { recoveryTime: 0.05, charge: 0.04, peakReverseCurrent: 0.03, softness: 0.1 }

type Pair = readonly [FigureName, FigureName]

/** u and y after one input is misread by a small share. */
function moved([first, second]: Pair, what: FigureName | 'current' | 'slope', by: number): readonly [number, number] {
  const at = what === 'current' || what === 'slope' ? { ...reading, [what]: reading[what] * Math.exp(by) } : reading
  const read = what === 'current' || what === 'slope' ? figures : { ...figures, [what]: figures[what]! * Math.exp(by) }
  const point = invertPair(at, read, first, second)!
  return [point.lifetime, point.ratio]
}

/** Covariance of (u, y) by differences: the sum over independent errors of what each does. */
function byDifferences(
  sources: readonly (readonly [deviation: number, move: (by: number) => readonly [number, number]])[],
) {
  const sum = [0, 0, 0, 0]
  for (const [deviation, move] of sources) {
    const [up, down] = [move(1e-5), move(-1e-5)]
    const u = (deviation * (up[0] - down[0])) / 2e-5
    const y = (deviation * (up[1] - down[1])) / 2e-5
    for (const [index, term] of [u * u, u * y, y * u, y * y].entries()) sum[index]! += term
  }
  return sum
}

describe('reading errors', () => {
  it.each([
    ['recoveryTime', 'charge'],
    ['recoveryTime', 'peakReverseCurrent'],
    ['charge', 'peakReverseCurrent'],
    ['recoveryTime', 'softness'],
  ] as const)(
    'of %s and %s reach (u, y) through the Jacobian of the inversion, those of the condition too',
    (...pair: Pair) => {
      const start = invertPair(reading, figures, pair[0], pair[1])!
      const { covariance } = fitFigures({
        reading,
        figures,
        names: pair,
        errors: { figures: errors, current: 0.5, slope: 0.4 },
        start,
      })
      const expected = byDifferences([
        [errors[pair[0]], (by) => moved(pair, pair[0], by)],
        [errors[pair[1]], (by) => moved(pair, pair[1], by)],
        [0.5, (by) => moved(pair, 'current', by)],
        [0.4, (by) => moved(pair, 'slope', by)],
      ])
      for (const [index, value] of covariance.entries()) expect(value / expected[index]!).toBeCloseTo(1, 4)
    },
  )

  it('of 5 % in trr are 7 to 14 % in tau_rr', () => {
    const tail = (by: number) => {
      const [u, y] = moved(['recoveryTime', 'peakReverseCurrent'], 'recoveryTime', by)
      return u - Math.log(1 + Math.exp(y))
    }
    const share = (0.05 * (tail(1e-4) - tail(-1e-4))) / 2e-4
    expect(share).toBeGreaterThan(0.07)
    expect(share).toBeLessThan(0.14)
  })

  it('weigh three contradicting figures: no neighbouring point fits better', () => {
    const read = { ...figures, charge: made.charge * 1.3 }
    const names = ['recoveryTime', 'charge', 'peakReverseCurrent'] as const
    const fitted = (from: { lifetime: number; ratio: number }) =>
      fitFigures({ reading, figures: read, names, errors: { figures: errors, current: 0, slope: 0 }, start: from })
    const best = fitted(invertPair(reading, read, 'recoveryTime', 'charge')!)
    const other = fitted(invertPair(reading, read, 'charge', 'peakReverseCurrent')!)
    expect(other.point.lifetime).toBeCloseTo(best.point.lifetime, 8)
    for (const [du, dy] of [
      [0.01, 0],
      [-0.01, 0],
      [0, 0.01],
      [0, -0.01],
    ] as const) {
      const { lifetime, ratio } = best.point
      const near = lumpedFigures({ ...reading, junction: 298 }, lifetime + du, ratio + dy)
      const misfit = names.reduce((sum, name) => sum + (Math.log(read[name]! / near[name]) / errors[name]) ** 2, 0)
      expect(misfit).toBeGreaterThan(best.misfit)
    }
  })

  it('of both times of a step fixture reach (u, y) the same way, beside the errors of the method itself', () => {
    const row = stepRow({ storageTime: 39.3546e-9, recoveryTime: 67.0805e-9, spread: 0.05 })
    const prior = priorGaussians('fast').recovery!
    const { observation, point } = invertStepRow(row, {
      id: 'x',
      ratedCurrent: 8,
      blockingVoltage: 400,
      prior,
    }) as RowReading
    const at = (storage: number, recovery: number): readonly [number, number] => {
      const { lifetime, tailTime } = lifetimeFromStep({
        storageTime: row.storageTime! * Math.exp(storage),
        recoveryTime: row.recoveryTime! * Math.exp(recovery),
        forwardCurrent: 0.5,
        reverseCurrent: 1,
        until: 0.25,
      })!
      return [Math.log(lifetime), Math.log(lifetime / tailTime - 1)]
    }
    const expected = byDifferences([
      [0.05, (by) => at(by, 0)],
      [0.05, (by) => at(0, by)],
    ])
    expect(observation.noise[0]).toBeCloseTo(expected[0]! + 0.6 ** 2, 6)
    expect(observation.noise[1]).toBeCloseTo(expected[1]!, 6)
    expect(observation.noise[3]).toBeCloseTo(expected[3]! + 0.4 ** 2 + 0.2 ** 2, 6)
    // PHYSICS section 1: tau 150 ns, tau_rr 20 ns
    expect(Math.exp(point.lifetime) / (1.7 * 150e-9)).toBeCloseTo(1, 4)
    expect(1 + Math.exp(point.ratio)).toBeCloseTo(7.5, 3)
  })
})

describe('the doubt of a ramp row', () => {
  const context = { id: 'x', ratedCurrent: 8, blockingVoltage: 400, prior: priorGaussians('ultrafast').recovery! }
  const noise = (fields: Parameters<typeof rampRow>[0]) =>
    (invertRampRow(rampRow({ slope: 200e6, ...fields }), context) as RowReading).observation
  const pair = { recoveryTime: made.recoveryTime, charge: made.charge }

  it('has 0.10 |ln(V/V_row)| more on y, 0.2 without a voltage', () => {
    const onRatio = (voltage: number | null) =>
      noise({ ...pair, voltage }).noise[3]! - noise({ ...pair, voltage: 400 }).noise[3]!
    expect(onRatio(200)).toBeCloseTo((0.1 * Math.LN2) ** 2, 12)
    expect(onRatio(800)).toBeCloseTo((0.1 * Math.LN2) ** 2, 12)
    expect(onRatio(null)).toBeCloseTo(0.04, 12)
  })

  it('carries that into a single figure by what y does to it', () => {
    const [without, at] = [noise({ charge: 100e-9, voltage: null }), noise({ charge: 100e-9 })]
    expect(without.noise[0]! - at.noise[0]!).toBeCloseTo(0.04 * at.designs[0]![4]! ** 2, 12)
    expect(at.noise[0]).toBeCloseTo(0.05 ** 2, 12)
  })

  it('is 15 % more on a trr of unknown definition, and 25 % on a softness read from one', () => {
    const unknown = { recoveryTimeBy: { kind: 'unknown' } } as const
    expect(noise({ recoveryTime: 50e-9, ...unknown }).noise[0]).toBeCloseTo(0.05 ** 2 + 0.15 ** 2, 12)
    expect(noise({ softness: 1, ...unknown }).noise[0]).toBeCloseTo(0.25 ** 2, 12)
    expect(noise({ softness: 1, softnessBy: 'slopes', ...unknown }).noise[0]).toBeCloseTo(0.05 ** 2, 12)
  })

  it('is that of 50 % in a current or slope it does not state', () => {
    const start = { lifetime: Math.log(60e-9), ratio: Math.log(2) }
    const exact = { recoveryTime: 0.05, charge: 0.05, peakReverseCurrent: 0.05, softness: 0.05 }
    const input = { figures, names: ['recoveryTime', 'charge'] as const, start, reading }
    const known = fitFigures({ ...input, errors: { figures: exact, current: 0, slope: 0 } })
    const vague = fitFigures({ ...input, errors: { figures: exact, current: 0.5, slope: 0 } })
    const found = noise({ ...pair, current: null }).noise[0]! - noise(pair).noise[0]!
    expect(found / (vague.covariance[0] - known.covariance[0])).toBeCloseTo(1, 6)
  })
})
