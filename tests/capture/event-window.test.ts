import { describe, expect, it } from 'vitest'
import { eventWindow } from '../../src/capture/event-window.ts'
import type { Waveform } from '../../src/domain/capture.ts'
import { someEvent } from './handmade.ts'

/** Every reading is its own sample number, the voltage ten times that. */
const waveform: Waveform = {
  start: 100,
  interval: 0.5,
  current: Float64Array.from({ length: 8000 }, (_, k) => k),
  voltage: Float64Array.from({ length: 8000 }, (_, k) => 10 * k),
}

type Change = Partial<typeof someEvent>
const edges = { edge: 3000, crossing: 3010, first: 0, last: 8000 }

/** First sample, samples averaged, and one past the last of a window. */
function cut(change: Change, fixture: 'ramp' | 'step') {
  const window = eventWindow(waveform, { ...someEvent, ...edges, ...change }, fixture, 1)
  const from = window.current[0]! - 0.5 * (window.averaged - 1)
  return [from, window.averaged, from + window.averaged * window.time.length]
}

describe('the window of an event', () => {
  it.each<readonly [string, 'ramp' | 'step', Change, readonly [number, number, number]]>([
    // 12 falls and 4 rises before the edge; 30 decays and 10 rises after the quarter; 150 samples across the rise
    ['a ramp', 'ramp', { peak: 3310, half: 3510, quarter: 3530 }, [3000 - 120 - 1200, 2, 3530 + 600 + 3000]],
    // the width of 450 is shorter than the rise of 590
    ['a narrow ramp', 'ramp', { peak: 3600, half: 3460, quarter: 3470 }, [3000 - 120 - 2360, 3, 8000 - 1]],
    // 20 falls and 2 widths before the edge; 30 decays and 4 widths after the quarter; 400 samples across the width
    ['a step', 'step', { peak: 3100, half: 3810, quarter: 3830 }, [3000 - 200 - 1600, 2, 3830 + 600 + 3200]],
    ['a short step', 'step', { peak: 3100, half: 3260, quarter: 3270 }, [3000 - 200 - 500, 1, 3270 + 300 + 1000]],
    // a tail of one sample counts as four, a rise or a width of none as one
    ['a spike', 'ramp', { peak: 3010, half: 3010, quarter: 3011 }, [3000 - 120 - 4, 1, 3011 + 120 + 10]],
    ['a spike of a step', 'step', { peak: 3010, half: 3010, quarter: 3011 }, [3000 - 200 - 2, 1, 3011 + 120 + 4]],
  ])('of %s holds what the fit needs', (_name, fixture, change, wanted) => {
    expect(cut(change, fixture)).toEqual(wanted)
  })

  it('begins with the conduction and ends with the event', () => {
    const change = { peak: 3310, half: 3510, quarter: 3530, first: 2500, last: 5000 }
    expect(cut(change, 'ramp')).toEqual([2500, 2, 5000])
  })

  it('has the mean times and readings of its samples', () => {
    const change = { ...edges, peak: 3310, half: 3510, quarter: 3530 }
    const window = eventWindow(waveform, { ...someEvent, ...change }, 'ramp', 1)
    expect(window.interval).toBe(1)
    expect(window.current.slice(0, 3)).toEqual(Float64Array.of(1680.5, 1682.5, 1684.5))
    expect(window.time.slice(0, 2)).toEqual(Float64Array.of(100 + 840.25, 100 + 841.25))
    expect(window.voltage!.slice(0, 2)).toEqual(Float64Array.of(16805, 16825))
    // three samples in one: the middle one's time
    const three = eventWindow(waveform, { ...someEvent, ...change, peak: 3600, half: 3460 }, 'ramp', 1)
    expect(three.time[0]).toBe(100 + 0.5 * three.current[0]!)
  })

  it('turns the channels that are upside down, and has no voltage where there is none', () => {
    const change = { ...someEvent, ...edges, peak: 3310, half: 3510, quarter: 3530 }
    const turned = eventWindow(waveform, { ...change, inverted: true }, 'ramp', -1)
    expect([turned.current[0], turned.voltage![0]]).toEqual([-1680.5, -16805])
    expect(eventWindow({ ...waveform, voltage: null }, change, 'ramp', 1).voltage).toBeNull()
  })
})
