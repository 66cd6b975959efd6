import { describe, expect, it } from 'vitest'
import type { RecoveryTimeDefinition } from '../../src/domain/rectifier.ts'
import { chooseFigures } from '../../src/evidence/choose-figures.ts'
import { invertPair, type RampFigures, type RecoveryPoint } from '../../src/evidence/invert-pair.ts'
import type { FigureName, RampReading } from '../../src/evidence/recovery-figures.ts'
import { chargeIsComputed, disagreement } from '../../src/evidence/third-figure.ts'
import { lumpedFigures } from './lumped.ts'

const none: RampFigures = { recoveryTime: null, charge: null, peakReverseCurrent: null, softness: null }
const order: readonly FigureName[] = ['recoveryTime', 'charge', 'peakReverseCurrent', 'softness']
const at: RampReading = { current: 8, slope: 100e6, recoveryTimeBy: { kind: 'line-90-25' }, softnessBy: 'times' }
const expected = { lifetime: Math.log(35e-9), ratio: 1, lifetimeVariance: 0.45 ** 2, ratioVariance: 0.5 ** 2 }
const made = lumpedFigures({ current: 8, slope: 100e6, junction: 298 }, expected.lifetime, expected.ratio)
/** S = trr/ta − 1 of the same event. */
const softness = made.recoveryTime / (made.peakReverseCurrent / 100e6) - 1
const whole: RampFigures = { ...made, softness }

const statedIn = (figures: RampFigures) => order.filter((name) => figures[name] !== null)
const choose = (figures: RampFigures, reading = at) => chooseFigures(reading, figures, statedIn(figures), expected)
const ending = (recoveryTimeBy: RecoveryTimeDefinition): RampReading => ({ ...at, recoveryTimeBy })

describe('the figures of a row that are used', () => {
  it('are all of them where every pair is possible, each pair a start', () => {
    const chosen = choose(whole)
    expect(chosen.names).toEqual(order)
    expect(chosen.starts).toHaveLength(6)
    for (const start of chosen.starts) {
      expect(start.lifetime).toBeCloseTo(expected.lifetime, 7)
      expect(start.ratio).toBeCloseTo(expected.ratio, 7)
    }
    expect(chosen.impossible).toBeNull()
  })

  it('are the only one where there is one', () => {
    expect(choose({ ...none, charge: 50e-9 })).toEqual({ names: ['charge'], starts: [], impossible: null })
  })

  it('are the largest set that can belong to one event, without its culprit', () => {
    const culprits: readonly (readonly [FigureName, number])[] = [
      ['peakReverseCurrent', 10],
      ['charge', 10],
      ['recoveryTime', 0.1],
    ]
    for (const [name, factor] of culprits) {
      const three = { ...made, softness: null, [name]: made[name as keyof typeof made] * factor }
      const { names, starts, impossible } = choose(three)
      expect(names).toEqual(statedIn({ ...three, [name]: null }))
      expect(starts).toHaveLength(1)
      expect(impossible).not.toBeNull()
    }
  })

  it('are three of four where one is the culprit', () => {
    const { names, starts } = choose({ ...whole, peakReverseCurrent: made.peakReverseCurrent * 10 })
    expect(names).toEqual(['recoveryTime', 'charge', 'softness'])
    expect(starts).toHaveLength(3)
  })

  it('are the pair nearest to the class, in its own deviations, where two would do', () => {
    // trr fits neither: with Qrr and I_RM of a ten times slower part the class decides for those that suit it better
    const slow = lumpedFigures({ current: 8, slope: 100e6, junction: 298 }, expected.lifetime + 2, 1)
    const mixed = {
      ...none,
      recoveryTime: made.recoveryTime,
      charge: made.charge,
      peakReverseCurrent: slow.peakReverseCurrent,
    }
    expect(choose(mixed).names).toEqual(['recoveryTime', 'charge'])
    const other = { ...expected, lifetime: expected.lifetime + 2 }
    const pulled = {
      ...none,
      recoveryTime: made.recoveryTime,
      charge: slow.charge,
      peakReverseCurrent: slow.peakReverseCurrent,
    }
    expect(chooseFigures(at, pulled, statedIn(pulled), other).names).toEqual(['charge', 'peakReverseCurrent'])
  })

  it('are the largest possible set with a pair nearest to the class, whatever is misread', () => {
    const possible = (figures: RampFigures, names: readonly FigureName[]) => {
      const pairs = names.flatMap((first, index) => names.slice(index + 1).map((second) => [first, second] as const))
      const points = pairs.map(([first, second]) => invertPair(at, figures, first, second))
      return points.every((point) => point !== null) ? points : []
    }
    const away = (point: RecoveryPoint) =>
      Math.hypot((point.lifetime - expected.lifetime) / 0.45, (point.ratio - expected.ratio) / 0.5)
    const sets = Array.from({ length: 16 }, (_, mask) => order.filter((__, bit) => (mask >> bit) & 1))
    let chosenFew = 0
    for (let trial = 0; trial < 400; trial++) {
      const factors = order.map((_, bit) => Math.exp(1.2 * Math.sin(1 + trial * (bit + 1) * Math.SQRT2)))
      const figures = Object.fromEntries(order.map((name, bit) => [name, whole[name]! * factors[bit]!])) as RampFigures
      const candidates = sets
        .map((names) => ({ names, points: possible(figures, names) }))
        .filter(({ points }) => points.length > 0)
      const most = Math.max(...candidates.map(({ names }) => names.length))
      const nearest = candidates
        .filter(({ names }) => names.length === most)
        .map(({ names, points }) => ({ names, away: Math.min(...points.map((point) => away(point!))) }))
        .toSorted((one, other) => one.away - other.away)[0]!
      expect(chooseFigures(at, figures, order, expected).names).toEqual(nearest.names)
      if (most < 4) chosenFew += 1
    }
    expect(chosenFew).toBeGreaterThan(50)
  })

  it('are charge, else peak, else trr where no pair is possible', () => {
    expect(choose({ ...none, recoveryTime: 20e-9, charge: 50e-9 })).toMatchObject({ names: ['charge'], starts: [] })
    expect(choose({ ...none, recoveryTime: 20e-9, peakReverseCurrent: 5 }).names).toEqual(['peakReverseCurrent'])
    const short = ending({ kind: 'level', until: 5 })
    expect(choose({ ...none, recoveryTime: 40e-9, softness: 1 }, short).names).toEqual(['recoveryTime'])
  })
})

describe('an impossible pair', () => {
  const why = (figures: Partial<RampFigures>, reading = at) => choose({ ...none, ...figures }, reading).impossible

  it('has trr against the time to its peak, I_RM/a', () => {
    expect(why({ recoveryTime: 20e-9, peakReverseCurrent: 5 })).toEqual({ found: 'trr 20 ns', bound: 'trr 50 ns' })
  })

  it('has Qrr against a trr²/2, or against I_RM²/(2a)', () => {
    expect(why({ recoveryTime: 20e-9, charge: 50e-9 })).toEqual({ found: 'Qrr 50 nC', bound: 'Qrr 20 nC' })
    expect(why({ charge: 20e-9, peakReverseCurrent: 3 })).toEqual({ found: 'Qrr 20 nC', bound: 'Qrr 45 nC' })
  })

  it('has I_RM against the level at which trr ends', () => {
    const high = ending({ kind: 'level', until: 3 })
    const told = { found: 'I_RM 2 A', bound: 'the level 3 A' }
    expect(why({ recoveryTime: 60e-9, peakReverseCurrent: 2 }, high)).toEqual(told)
    expect(why({ recoveryTime: 60e-9, peakReverseCurrent: 3 }, high)).toEqual({ ...told, found: 'I_RM 3 A' })
    expect(why({ recoveryTime: 20e-9, peakReverseCurrent: 4 }, high)).toEqual({
      found: 'trr 20 ns',
      bound: 'trr 40 ns',
    })
  })

  it('has trr against the time to that level where no peak is stated', () => {
    const high = ending({ kind: 'level', until: 3 })
    expect(why({ recoveryTime: 20e-9, softness: 1, charge: null }, { ...high, softnessBy: 'slopes' })).toEqual({
      found: 'trr 20 ns',
      bound: 'trr 30 ns',
    })
  })

  it('has Qrr against the least charge of a peak at that level where trr is not stated', () => {
    const high = ending({ kind: 'level', until: 3 })
    expect(why({ charge: 20e-9, softness: 1 }, high)).toEqual({ found: 'Qrr 20 nC', bound: 'Qrr 45 nC' })
  })

  it('has trr against the time to that level before Qrr against trr', () => {
    const high = ending({ kind: 'level', until: 3 })
    const told = { found: 'trr 20 ns', bound: 'trr 30 ns' }
    expect(why({ recoveryTime: 20e-9, charge: 50e-9 }, high)).toEqual(told)
    expect(why({ recoveryTime: 20e-9, charge: 50e-9, peakReverseCurrent: 2 }, high)).toEqual(told)
    expect(why({ recoveryTime: 30e-9, charge: 50e-9 }, high)).toEqual({ ...told, found: 'trr 30 ns' })
    expect(why({ recoveryTime: 31e-9, charge: 20e-9 }, high)!.found).toBe('Qrr 20 nC')
  })

  it('does not concern a figure beside it', () => {
    // trr and Qrr suit each other, trr and I_RM do not
    expect(why({ recoveryTime: 40e-9, charge: 50e-9, peakReverseCurrent: 10 })).toEqual({
      found: 'trr 40 ns',
      bound: 'trr 100 ns',
    })
  })

  it('is the first of the row, in the order trr, Qrr, I_RM, softness', () => {
    expect(why({ recoveryTime: 20e-9, charge: 50e-9, peakReverseCurrent: 5 })!.bound).toBe('Qrr 20 nC')
  })
})

describe('a charge', () => {
  const computed = (charge: number, recoveryTime = 40e-9, peakReverseCurrent = 2.5) =>
    chargeIsComputed({ ...none, charge, recoveryTime, peakReverseCurrent })

  it('is only a product where it is trr × I_RM/2 within half of its last printed digit', () => {
    expect(computed(50e-9)).toBe(true)
    // 40 ns × 2.53 A/2 = 50.6 nC is printed as 51, 50.4 nC is not
    expect(computed(51e-9, 40e-9, 2.53)).toBe(true)
    expect(computed(51e-9, 40e-9, 2.52)).toBe(false)
    // three digits must be met to 0.05 nC, or to half a percent if that is more
    expect(computed(50.1e-9, 40e-9, 2.516)).toBe(true)
    expect(computed(50.1e-9, 40e-9, 2.52)).toBe(false)
  })

  it('printed with one digit is a product within 3 % only', () => {
    expect(computed(50e-9, 40e-9, 2.575)).toBe(false)
    expect(computed(9e-9, 10e-9, 1.85)).toBe(true)
    expect(computed(9e-9, 10e-9, 1.86)).toBe(false)
  })

  it('is no product without both factors', () => {
    const product = { ...none, charge: 50e-9, recoveryTime: 40e-9, peakReverseCurrent: 2.5 }
    for (const name of ['charge', 'recoveryTime', 'peakReverseCurrent'] as const)
      expect(chargeIsComputed({ ...product, [name]: null })).toBe(false)
  })
})

describe('a third figure', () => {
  /** Of a row that states these figures and no other. */
  const off = (names: readonly FigureName[], figures: Partial<RampFigures>) =>
    disagreement(
      at,
      { ...none, ...Object.fromEntries(names.map((name) => [name, figures[name] ?? whole[name]])) },
      names,
    )

  it('misses by its share of what two others give', () => {
    expect(off(['recoveryTime', 'charge', 'peakReverseCurrent'], { charge: made.charge * 1.2 })).toBeCloseTo(0.2, 7)
    expect(off(['recoveryTime', 'charge', 'softness'], { charge: made.charge * 0.9 })).toBeCloseTo(0.1, 7)
    expect(off(['charge', 'peakReverseCurrent', 'softness'], { charge: made.charge * 1.2 })).toBeCloseTo(0.2, 7)
    const peak = { peakReverseCurrent: made.peakReverseCurrent * 1.25 }
    expect(off(['recoveryTime', 'peakReverseCurrent', 'softness'], peak)).toBeCloseTo(0.25, 7)
  })

  it('of four is the worse of charge and peak', () => {
    expect(off(order, { charge: made.charge * 1.3 })).toBeCloseTo(0.3, 7)
    const low = { peakReverseCurrent: made.peakReverseCurrent * 0.6 }
    expect(off(order, low)).toBeGreaterThanOrEqual(0.4 - 1e-7)
  })

  it('does not exist beside one other, and misses nothing where the other two are impossible', () => {
    expect(off(['recoveryTime', 'charge'], { charge: made.charge * 2 })).toBe(0)
    expect(off(['recoveryTime', 'charge', 'peakReverseCurrent'], { peakReverseCurrent: 50 })).toBe(0)
  })
})
