import { describe, expect, it } from 'vitest'
import type { RecoveryTimeDefinition } from '../../src/domain/rectifier.ts'
import { invertPair, type RampFigures } from '../../src/evidence/invert-pair.ts'
import { type FigureName, logFigure, type RampReading, steadyEvent } from '../../src/evidence/recovery-figures.ts'

const names: readonly FigureName[] = ['recoveryTime', 'charge', 'peakReverseCurrent', 'softness']
const pairs = names.flatMap((first, index) => names.slice(index + 1).map((second) => [first, second] as const))
const none: RampFigures = { recoveryTime: null, charge: null, peakReverseCurrent: null, softness: null }

const at = (recoveryTimeBy: RecoveryTimeDefinition, softnessBy: 'times' | 'slopes' = 'times'): RampReading => ({
  current: 8,
  slope: 200e6,
  recoveryTimeBy,
  softnessBy,
})

function figuresOf(reading: RampReading, u: number, y: number): RampFigures {
  const event = steadyEvent(reading, u, y)
  return Object.fromEntries(names.map((name) => [name, Math.exp(logFigure(event, reading, name).value)])) as RampFigures
}

describe('a pair of figures', () => {
  const [u, y] = [Math.log(60e-9), Math.log(2)]

  it('gives one event whichever figure is named first', () => {
    for (const reading of [
      at({ kind: 'line-90-25' }),
      at({ kind: 'level-25' }, 'slopes'),
      at({ kind: 'level', until: 0.5 }),
    ]) {
      const figures = figuresOf(reading, u, y)
      for (const [first, second] of pairs) {
        for (const point of [
          invertPair(reading, figures, first, second),
          invertPair(reading, figures, second, first),
        ]) {
          expect(point!.lifetime).toBeCloseTo(u, 7)
          expect(point!.ratio).toBeCloseTo(y, 7)
        }
      }
    }
  })

  it('is read by itself, whatever else the row states', () => {
    const level = { kind: 'level', until: 0.5 } as const
    for (const reading of [
      at({ kind: 'line-90-25' }),
      at(level),
      at(level, 'slopes'),
      at({ kind: 'level-10' }, 'slopes'),
    ]) {
      const figures = figuresOf(reading, u, y)
      for (const [first, second] of pairs) {
        const alone = { ...none, [first]: figures[first], [second]: figures[second] }
        const beside = Object.fromEntries(names.map((name) => [name, alone[name] ?? figures[name]! * 3])) as RampFigures
        const point = invertPair(reading, alone, first, second)
        expect(point!.lifetime).toBeCloseTo(u, 7)
        expect(point!.ratio).toBeCloseTo(y, 7)
        expect(invertPair(reading, alone, second, first)).toEqual(point)
        expect(invertPair(reading, beside, first, second)).toEqual(point)
      }
    }
  })

  it('has softness of slopes as tau_rr over ta where trr ends at a level too', () => {
    const reading = at({ kind: 'level', until: 0.5 }, 'slopes')
    const figures = figuresOf(reading, u, y)
    for (const [first, second] of pairs) {
      const point = invertPair(reading, figures, first, second)!
      expect(point.lifetime).toBeCloseTo(u, 7)
      expect(point.ratio).toBeCloseTo(y, 7)
    }
  })

  it('is one of an event a thousand times longer or shorter too', () => {
    for (const lifetime of [1e-12, 1e-3]) {
      const reading = { ...at({ kind: 'line-90-25' }), slope: 8 / lifetime }
      const figures = figuresOf(reading, Math.log(lifetime), y)
      for (const [first, second] of pairs) {
        const point = invertPair(reading, figures, first, second)!
        expect(point.lifetime).toBeCloseTo(Math.log(lifetime), 6)
        expect(point.ratio).toBeCloseTo(y, 6)
      }
    }
  })
})

describe('an impossible pair', () => {
  const line = at({ kind: 'line-90-25' })

  it('is trr at its peak, and possible above it', () => {
    const pair = (recoveryTime: number) =>
      invertPair(line, { ...none, recoveryTime, peakReverseCurrent: 4 }, 'recoveryTime', 'peakReverseCurrent')
    expect(pair(20e-9)).toBeNull()
    expect(pair(19e-9)).toBeNull()
    expect(pair(20.1e-9)).not.toBeNull()
  })

  it('is Qrr at I_RM²/(2a), or at a trr²/2, and possible above or below it', () => {
    const byPeak = (charge: number) =>
      invertPair(line, { ...none, charge, peakReverseCurrent: 4 }, 'charge', 'peakReverseCurrent')
    expect([39.9e-9, 40.1e-9].map((charge) => byPeak(charge) !== null)).toEqual([false, true])
    const byTime = (charge: number) =>
      invertPair(line, { ...none, charge, recoveryTime: 20e-9 }, 'recoveryTime', 'charge')
    expect([39.9e-9, 40.1e-9].map((charge) => byTime(charge) !== null)).toEqual([true, false])
  })

  it('is Qrr of more than any tail gives where the factor of trr is below 2', () => {
    // trr 20 ns with k = 1.879: beyond the vertex of ta (ta/2 + (trr − ta)/k) no ta gives the charge
    const huge = { ...none, charge: 1e-6, recoveryTime: 20e-9 }
    expect(invertPair(line, huge, 'recoveryTime', 'charge')).toBeNull()
  })

  it('is one that has no peak, no charge or no time at all', () => {
    expect(
      invertPair(line, { ...none, recoveryTime: 20e-9, peakReverseCurrent: 0 }, 'recoveryTime', 'peakReverseCurrent'),
    ).toBeNull()
    expect(invertPair(line, { ...none, charge: 0, recoveryTime: 20e-9 }, 'recoveryTime', 'charge')).toBeNull()
    expect(invertPair(line, { ...none, recoveryTime: 0, softness: 1 }, 'recoveryTime', 'softness')).toBeNull()
    expect(invertPair(line, { ...none, charge: 0, softness: 1 }, 'charge', 'softness')).toBeNull()
    expect(invertPair(line, { ...none, recoveryTime: 20e-9, softness: 0 }, 'recoveryTime', 'softness')).toBeNull()
  })

  it('is one whose peak cannot lie above the level at which trr ends', () => {
    const level = at({ kind: 'level', until: 3 })
    const charge = (value: number) =>
      invertPair(level, { ...none, charge: value, recoveryTime: 20e-9 }, 'recoveryTime', 'charge')
    // below a tr²/2 = 40 nC no earlier peak would do, and above it only one hardly over the level, which no sheet means
    expect(charge(60e-9)).toBeNull()
    // the peak cannot come before 15 ns: at 20 ns it leaves no tail and 40 nC, and any earlier one more
    expect([10e-9, 22.4e-9, 39.9e-9].map(charge)).toEqual([null, null, null])
    expect(invertPair(level, { ...none, recoveryTime: 15e-9, softness: 1 }, 'recoveryTime', 'softness')).toBeNull()
    const soft = invertPair(
      { ...level, softnessBy: 'slopes' },
      { ...none, recoveryTime: 14e-9, softness: 1 },
      'recoveryTime',
      'softness',
    )
    expect(soft).toBeNull()
  })
})
