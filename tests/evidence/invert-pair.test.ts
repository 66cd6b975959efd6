import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { RecoveryTimeDefinition } from '../../src/domain/rectifier.ts'
import { invertPair, type RampFigures } from '../../src/evidence/invert-pair.ts'
import { type FigureName, logFigure, type RampReading, steadyEvent } from '../../src/evidence/recovery-figures.ts'

const names: readonly FigureName[] = ['recoveryTime', 'charge', 'peakReverseCurrent', 'softness']
const pairs = names.flatMap((first, index) => names.slice(index + 1).map((second) => [first, second] as const))

function figuresOf(at: RampReading, u: number, y: number): RampFigures {
  const event = steadyEvent(at, u, y)
  return Object.fromEntries(names.map((name) => [name, Math.exp(logFigure(event, at, name).value)])) as RampFigures
}

function rampAt(
  current: number,
  slope: number,
  recoveryTimeBy: RecoveryTimeDefinition,
  softnessBy: 'times' | 'slopes',
): RampReading {
  return { current, slope, recoveryTimeBy, softnessBy }
}

describe('two figures of a row', () => {
  const fixed: readonly RecoveryTimeDefinition[] = [
    { kind: 'line-90-25' },
    { kind: 'line-75-50' },
    { kind: 'level-25' },
    { kind: 'level-10' },
    { kind: 'unknown' },
  ]

  it('return the lifetime and tail time that made them, for every pair and definition', () => {
    fc.assert(
      fc.property(
        fc.double({ min: Math.log(5e-9), max: Math.log(5e-6), noNaN: true }),
        fc.double({ min: -1, max: 3.5, noNaN: true }),
        fc.double({ min: 0.3, max: 40, noNaN: true }),
        fc.double({ min: 2e7, max: 1e9, noNaN: true }),
        fc.constantFrom(...fixed),
        fc.constantFrom('times' as const, 'slopes' as const),
        (u, y, current, slope, definition, softnessBy) => {
          const at = rampAt(current, slope, definition, softnessBy)
          const figures = figuresOf(at, u, y)
          for (const [first, second] of pairs) {
            const point = invertPair(at, figures, first, second)!
            expect(Math.abs(point.lifetime - u)).toBeLessThan(1e-7)
            expect(Math.abs(point.ratio - y)).toBeLessThan(1e-7)
          }
        },
      ),
      { numRuns: 300 },
    )
  })

  it('return them where trr ends at an absolute level as well', () => {
    const u = Math.log(60e-9)
    const y = Math.log(2)
    for (const share of [0.05, 0.1, 0.25]) {
      const at = rampAt(8, 200e6, { kind: 'level', until: 5.37575 * share }, 'times')
      const figures = figuresOf(at, u, y)
      for (const [first, second] of pairs) {
        const point = invertPair(at, figures, first, second)!
        expect(point.lifetime).toBeCloseTo(u, 8)
        expect(point.ratio).toBeCloseTo(y, 8)
      }
    }
  })

  const at = rampAt(8, 100e6, { kind: 'line-90-25' }, 'times')
  const none: RampFigures = { recoveryTime: null, charge: null, peakReverseCurrent: null, softness: null }
  it.each([
    [
      'trr no longer than I_RM/a',
      { ...none, recoveryTime: 24e-9, peakReverseCurrent: 2.4 },
      'recoveryTime',
      'peakReverseCurrent',
    ],
    ['Qrr of at least a trr²/2', { ...none, recoveryTime: 40e-9, charge: 80e-9 }, 'recoveryTime', 'charge'],
    [
      'Qrr of at most I_RM²/(2a)',
      { ...none, charge: 28.8e-9, peakReverseCurrent: 2.4 },
      'charge',
      'peakReverseCurrent',
    ],
  ] as const)('are refused with %s', (_, figures, first, second) => {
    expect(invertPair(at, figures, first, second)).toBeNull()
  })

  it('are refused where the level at which trr ends is not below the peak', () => {
    const level = rampAt(8, 100e6, { kind: 'level', until: 3 }, 'times')
    expect(
      invertPair(
        level,
        { ...none, recoveryTime: 40e-9, peakReverseCurrent: 2.4 },
        'recoveryTime',
        'peakReverseCurrent',
      ),
    ).toBeNull()
  })
})
