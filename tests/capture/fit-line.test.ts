import { describe, expect, it } from 'vitest'
import { fitLevel, fitLine, lineAt, lineReaches } from '../../src/capture/fit-line.ts'

const time = Float64Array.of(9, 0, 1, 2, 3, 9)
const current = Float64Array.of(99, 1, 3, 4, 8, -99)

describe('a line through samples', () => {
  it('is the least-squares line, of the samples asked for alone', () => {
    // by hand: means 1.5 and 4; sums of squares 5 and products 11; what is left 0.3, -0.1... squared 1.8 over 4 - 2
    const line = fitLine(time, current, 1, 5)
    expect(line.at).toBe(1.5)
    expect(line.value).toBe(4)
    expect(line.rise).toBeCloseTo(11 / 5, 12)
    expect(line.residual).toBeCloseTo(Math.sqrt(1.8 / 2), 12)
    expect(line.count).toBe(4)
  })

  it('is flat through one sample, and leaves nothing there', () => {
    expect(fitLine(time, current, 2, 3)).toEqual({ at: 1, value: 3, rise: 0, residual: 0, count: 1 })
  })

  it('gives values at times and times of values', () => {
    const line = { at: 2, value: 10, rise: -4, residual: 0, count: 2 }
    expect(lineAt(line, 5)).toBe(-2)
    expect(lineReaches(line, -2)).toBe(5)
    expect(lineReaches(line, lineAt(line, 7.3))).toBeCloseTo(7.3, 12)
  })
})

describe('a level through samples', () => {
  it('is their mean, and its spread takes the tilt in', () => {
    // an even rise from -1 to 1 spreads by its range over the root of 12
    const level = fitLevel(Float64Array.of(0, 0, 1, 2), Float64Array.of(50, -1, 0, 1), 1, 4)
    expect([level.at, level.value, level.rise, level.count]).toEqual([1, 0, 0, 3])
    expect(level.residual).toBeCloseTo(2 / Math.sqrt(12), 12)
  })

  it('adds noise and tilt as independent parts', () => {
    const level = fitLevel(time, current, 1, 5)
    expect(level.residual).toBeCloseTo(Math.sqrt(0.9 + (2.2 * 3) ** 2 / 12), 12)
    const late = time.map((t) => t + 50)
    expect(fitLevel(late, current, 1, 5).residual).toBeCloseTo(level.residual, 12)
  })

  it('of one sample has no spread', () => {
    expect(fitLevel(time, current, 3, 4)).toEqual({ at: 2, value: 4, rise: 0, residual: 0, count: 1 })
  })
})
