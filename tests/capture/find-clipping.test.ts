import { describe, expect, it } from 'vitest'
import { channelQuantum, clippedPeak, clippedPlateau, sampleNoise } from '../../src/capture/find-clipping.ts'
import { someEvent } from './handmade.ts'

describe('a clipped peak', () => {
  // crossing at 2, quarter at 12; steps of 0.5 A elsewhere
  const event = { ...someEvent, edge: 0, crossing: 2, quarter: 12, last: 14 }
  const cut = [9, 4, -1, -2, -5, -5, -5, -5, -4, -3, -2.5, -2, -1, 0]
  const find = (readings: readonly number[], drift = 1.01, noise = 0, change = {}) =>
    clippedPeak(Float64Array.from(readings), { ...event, ...change }, drift, noise)

  it('is a run of lowest readings in which the current would have moved by more than six steps', () => {
    // four samples in a row are three intervals: 3 x 1.01 A against 6 x 0.5 A
    expect(find(cut)).toEqual({ at: -5, samples: 4 })
    expect(find(cut, 1)).toBeNull()
    // smaller steps before the event do not count
    expect(find([9, 8.9, ...cut.slice(2)], 1, 0, { edge: 2 })).toBeNull()
  })

  it('is none where noise would explain it', () => {
    expect(find(cut, 1.01, 0.504)).toEqual({ at: -5, samples: 4 })
    expect(find(cut, 1.01, 0.506)).toBeNull()
  })

  it('is at least four samples long, in one piece', () => {
    expect(find(cut.with(7, -4.5), 100)).toBeNull()
    expect(find(cut.with(5, -4.5), 100)).toBeNull()
    expect(find(cut.with(7, -4.5).with(9, -5).with(10, -5).with(11, -5), 100)).toBeNull()
  })

  it('is looked for between crossing and quarter only', () => {
    expect(find(cut.with(0, -7).with(1, -7).with(13, -9))).toEqual({ at: -5, samples: 4 })
    expect(find(cut.with(12, -9))).toEqual({ at: -5, samples: 4 })
    const late = [9, 4, -1, -2, -4, -4.5, -4, -4, -3, -5, -5, -5, -5, -5]
    expect(find(late, 100)).toEqual({ at: -5, samples: 4 })
    expect(find(late, 100, 0, { last: 12 })).toBeNull()
  })

  it('is the highest reading of a channel that is upside down', () => {
    const turned = cut.map((value) => -value)
    expect(find(turned, 1.01, 0, { inverted: true })).toEqual({ at: 5, samples: 4 })
  })
})

describe('a clipped plateau', () => {
  const flat = (count: number) => [0.5, 0.2, 0, ...Array.from({ length: count }, () => 5), 0, 1, 0.5]
  const find = (readings: readonly number[], side: 1 | -1 = 1, noise = 0.01, step = 0.01) =>
    clippedPlateau(Float64Array.from(readings), side, noise, step)

  it('is a run of twelve readings at the extreme', () => {
    expect(find(flat(12))).toEqual({ at: 5, samples: 12 })
    expect(find(flat(11))).toBeNull()
    expect(find([5, ...flat(12), 5])).toEqual({ at: 5, samples: 12 })
  })

  it('may be at either end of the channel', () => {
    const low = flat(13).map((value) => -value)
    expect(find(low, -1)).toEqual({ at: -5, samples: 13 })
    expect(find(low, 1)).toBeNull()
  })

  it('forgets a run that a higher reading shows not to be the limit', () => {
    expect(find([...flat(12), 6])).toBeNull()
    expect(find([...flat(20), ...flat(12).map((value) => value + 1)])).toEqual({ at: 6, samples: 12 })
  })

  it('needs a channel that is noisy elsewhere: 0.6 steps of the converter and 1e-4 of the swing', () => {
    expect(find(flat(12), 1, 0.01, 0.0168)).toBeNull()
    expect(find(flat(12), 1, 0.01, 0.0165)).not.toBeNull()
    expect(find(flat(12), 1, 0.6 * 0.01, 0.01)).toBeNull()
    expect(find(flat(12), 1, 0.00049, 0)).toBeNull()
    expect(find(flat(12), 1, 1e-4 * 5, 0)).toBeNull()
    expect(find(flat(12), 1, 0.00051, 0)).not.toBeNull()
    // a channel that swings from -5 to 5
    expect(find([-5, ...flat(12)], 1, 0.00099, 0)).toBeNull()
    expect(find([-5, ...flat(12)], 1, 0.00101, 0)).not.toBeNull()
    expect(find(flat(12), 1, Number.NaN, 0)).toBeNull()
  })
})

describe('the step of a converter', () => {
  it('is the smallest difference of neighbours that differ', () => {
    expect(channelQuantum(Float64Array.of(1, 1, 3, 2.75, 2.75, 9))).toBe(0.25)
    expect(channelQuantum(Float64Array.of(1, 1.5))).toBe(0.5)
  })

  it('is nothing where nothing differs', () => {
    expect(channelQuantum(Float64Array.of(4, 4, 4))).toBe(0)
    expect(channelQuantum(Float64Array.of())).toBe(0)
  })

  it('is read from the first twenty thousand samples', () => {
    const long = new Float64Array(20_010).map((_, k) => (k < 20_000 ? k % 2 : 0.25))
    expect(channelQuantum(long)).toBe(1)
    expect(channelQuantum(long.with(19_999, 0.75))).toBe(0.75)
  })
})

describe('the noise of one sample', () => {
  it('is a sixth of the mean square of the second differences, under its root', () => {
    // 0 1 0 1 0 1: every second difference is 2 or -2
    expect(sampleNoise(Float64Array.of(9, 0, 1, 0, 1, 0, 1, 9), 1, 7)).toBeCloseTo(Math.sqrt(4 / 6), 12)
    expect(sampleNoise(Float64Array.of(0, 0, 3), 0, 3)).toBeCloseTo(Math.sqrt(9 / 6), 12)
  })

  it('does not see a slope, and is nothing of fewer than three samples', () => {
    expect(sampleNoise(Float64Array.of(1, 4, 7, 10), 0, 4)).toBe(0)
    expect(sampleNoise(Float64Array.of(1, 4), 0, 2)).toBe(0)
  })
})
