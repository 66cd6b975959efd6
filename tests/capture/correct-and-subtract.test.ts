import { describe, expect, it } from 'vitest'
import { instrumentTime, resolution } from '../../src/capture/capture-context.ts'
import { correctSkew } from '../../src/capture/correct-skew.ts'
import { readAt, subtractReference } from '../../src/capture/subtract-reference.ts'
import type { Waveform } from '../../src/domain/capture.ts'
import { contextOf, waveformOf } from './handmade.ts'

const wave = (start: number, interval: number, current: readonly number[]): Waveform => ({
  start,
  interval,
  current: Float64Array.from(current),
  voltage: null,
})

describe('a reading between samples', () => {
  const grid = { start: 10, interval: 2 }
  const values = Float64Array.of(1, 3, -5)

  it('lies on the straight line between its neighbours, and the ends are held', () => {
    expect([9, 10, 11, 12, 12.5, 14, 99].map((time) => readAt(values, grid, time))).toEqual([1, 1, 2, 3, 1, -5, -5])
  })
})

describe('a known skew', () => {
  const given = { ...wave(5, 2, [1, 2, 3, 4]), voltage: Float64Array.of(0, 10, 30, 30) }

  it('moves the voltage by the delay of the current, and nothing else', () => {
    const { voltage, ...rest } = correctSkew(given, 1)
    expect(voltage).toEqual(Float64Array.of(0, 5, 20, 30))
    expect({ ...rest, voltage: null }).toEqual({ ...given, voltage: null })
    expect(correctSkew(given, -2).voltage).toEqual(Float64Array.of(10, 30, 30, 30))
  })

  it('leaves a capture alone that has none of it, or no voltage', () => {
    expect(correctSkew(given, 0)).toBe(given)
    const plain = wave(5, 1, [1, 2, 3, 4])
    expect(correctSkew(plain, 3)).toBe(plain)
  })
})

describe('a reference', () => {
  it('that is not there changes nothing', () => {
    const waveform = wave(0, 1, [1, 2])
    expect(subtractReference(waveform, null)).toEqual({ waveform, fixture: null })
  })

  it('is taken away at equal times, on whatever grid it stands', () => {
    const waveform = { ...wave(0, 2, [8, 8, 4, 0]), voltage: Float64Array.of(0, 0, 1, 1) }
    const { waveform: left, fixture } = subtractReference(waveform, wave(-2, 4, [0, 2, -2]))
    // at 0, 2, 4, 6 the reference reads 1, 2, 0, -2
    expect(left).toEqual({ ...waveform, current: Float64Array.of(7, 6, 4, 2) })
    expect(fixture!.subtracted).toBe(true)
  })

  it.each([
    [4, true],
    [4.1, false],
  ])('that swings by %d of 8 A is a disturbance: %s', (swing, subtracted) => {
    const waveform = wave(0, 1, [0, 8, 0, 4])
    const found = subtractReference(waveform, wave(0, 1, [1, 1 + swing, 1, 1]))
    expect(found.fixture!.subtracted).toBe(subtracted)
    if (!subtracted) expect(found.waveform).toBe(waveform)
  })

  it('swings about whatever level it stands on', () => {
    const small = subtractReference(wave(0, 1, [8, 8, 0, 0]), wave(0, 1, [-20, -20, -21, -21]))
    expect(small.fixture!.subtracted).toBe(true)
    expect(small.waveform.current).toEqual(Float64Array.of(28, 28, 21, 21))
  })

  it.each<readonly [string, readonly number[], number]>([
    // from 10 to -10: the last sample at 8 or more to the first at -8 or less
    ['a straight fall', [10, 10, 10, 8, 4, 0, -4, -8, -10, -10], 4],
    ['a fall after a dip', [0, -6, 0, 10, 9, 0, -9, -10], 2],
    ['a jump', [10, 10, -10, -10], 1],
    ['a fall that is followed by a rise', [10, 10, 5, -10, -2, 3], 2],
    ['a rise only', [-10, -5, 0, 10], 0],
  ])('has the edge of %s: 10 to 90 %% of it', (_name, readings, samples) => {
    const { fixture } = subtractReference(wave(0, 1, [1, 0]), wave(0, 0.5, readings))
    expect(fixture!.edgeTime).toBeCloseTo(samples * 0.5, 12)
  })
})

describe('what the instrument can tell apart', () => {
  const at = (bandwidth: number | null) => contextOf({ settings: { bandwidth }, waveform: waveformOf([0]) })

  it('is its time constant 1/(2 pi B), unknown without a bandwidth', () => {
    expect(instrumentTime(at(100e6).settings)).toBeCloseTo(1.59154943e-9, 16)
    expect(instrumentTime(at(null).settings)).toBeNull()
  })

  it('is a rise time of 0.35/B, but no less than two samples', () => {
    expect(resolution(at(100e6))).toBeCloseTo(3.5e-9, 18)
    expect(resolution(at(1e9))).toBe(2e-9)
    expect(resolution(at(null))).toBe(2e-9)
  })
})
