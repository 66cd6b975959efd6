import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import type { RankResult } from '../../src/domain/result.ts'
import { readStage } from '../../src/input/read-stage.ts'
import { exactValues } from '../../src/report/review/what-if-result.ts'
import { records } from '../demo/orchard.ts'
import { rampRow, record } from '../evidence/records.ts'
import { carbide, kelvin, silicon, stage } from '../stage/samples.ts'
import { ranked } from './settings.ts'

const functions = ['exp', 'expm1', 'log', 'pow'] as const

/** Runs with a standard library whose last bit is another one: engines differ by that. */
function withOtherLastBits<T>(action: () => T): T {
  const kept = functions.map((name) => Math[name] as (...input: number[]) => number)
  let calls = 0
  const place = (values: typeof kept) => {
    for (const [index, name] of functions.entries()) Object.assign(Math, { [name]: values[index] })
  }
  place(
    kept.map(
      (exact) =>
        (...input) =>
          moved(exact(...input), ++calls),
    ),
  )
  try {
    return action()
  } finally {
    place(kept)
  }
}

/** Down, as it is or up by about an ulp, in an order without a short period; simple answers are exact everywhere. */
function moved(value: number, call: number): number {
  if (value === 0 || value === 1 || !Number.isFinite(value)) return value
  return value * (1 + ((((call * 2654435761) >>> 16) % 3) - 1) * Number.EPSILON)
}

function largestDifference(run: () => RankResult): number {
  const before = exactValues(run())
  const after = exactValues(withOtherLastBits(run))
  expect(after.length).toBe(before.length)
  expect(before.length).toBeGreaterThan(20)
  return Math.max(...before.map((value, k) => Math.abs(after[k]! - value) / Math.max(Math.abs(value), 1e-12)))
}

describe('the last bit of exp and log moves no nominal figure', () => {
  const threeFigures = record({
    id: 'three-figures',
    ratings: { reverseVoltage: 650, averageCurrent: 10, junction: kelvin(175) },
    thermal: silicon().thermal,
    recovery: [
      rampRow({
        current: 10,
        slope: 200e6,
        voltage: 160,
        junction: kelvin(125),
        recoveryTime: 42e-9,
        charge: 95e-9,
        peakReverseCurrent: 4.5,
      }),
    ],
  })

  it('of a part that three figures of one row tell about', () => {
    expect(largestDifference(() => ranked(stage(), threeFigures, silicon(), carbide()))).toBeLessThan(1e-10)
  })

  it.each(['kiln-boost', 'low-line-mains', 'hot-schottky'])('of the demonstration stage %s', (name) => {
    const file = `catalogs-demo/stages/${name}.yaml`
    const at = readStage(readFileSync(file, 'utf8'), file).value!.stage
    expect(largestDifference(() => ranked(at, ...records))).toBeLessThan(1e-10)
  })
})
