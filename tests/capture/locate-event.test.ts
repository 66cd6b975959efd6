import { describe, expect, it } from 'vitest'
import { locateEvent } from '../../src/capture/locate-event.ts'

const times = (count: number, value: number) => Array.from({ length: count }, () => value)

/** 10 A from sample 3 on, a fall of 4 A per sample, 6 A reverse at 12, a tail of 1 A per sample, quiet from 19 on. */
const short = [...times(3, 0), ...times(6, 10), 6, 2, -2, -6, -5, -4, -3, -2, -1, -0.5, ...times(41, 0)]
/** A baseline of a quarter of an ampere, so that nothing is zero by chance. */
const record = short.map((value) => value + 0.25)
const locate = (readings: readonly number[]) => locateEvent(Float64Array.from(readings))

/** Read off the list above: half the forward current is 5 A, half the reverse peak 3 A, a quarter 1.5 A. */
const event = {
  inverted: false,
  events: 1,
  first: 3,
  startVisible: true,
  edge: 9,
  crossing: 11,
  peak: 12,
  half: 15,
  quarter: 17,
  last: 60,
  forward: 10,
  base: 0.25,
  lowest: -5.75,
}

describe('the event in a record', () => {
  it('has its marks at the samples that can be counted', () => {
    expect(record).toHaveLength(60)
    expect(locate(record)).toEqual(event)
  })

  it('is the same upside down', () => {
    expect(locate(record.map((value) => -value))).toEqual({ ...event, inverted: true })
  })

  it('may begin with the record', () => {
    const marks = locate(record.slice(3))!
    expect([marks.first, marks.startVisible, marks.edge, marks.last]).toEqual([0, false, 6, 57])
  })

  it('begins where the current is above a quarter of the forward current', () => {
    expect(locate(record.with(2, 2.75))!.first).toBe(2)
    expect(locate(record.with(2, 2.7))!.first).toBe(3)
  })

  it('has levels that count in full: half the currents, a quarter of the peak', () => {
    // 5.25 A is half of 10 A above the baseline; -2.75 A half of the peak; -1.25 A a quarter
    expect(locate(record.with(10, 5.25))!.edge).toBe(10)
    expect(locate(record.with(10, 5.2))!.edge).toBe(9)
    expect(locate(record.with(16, -2.75))!.half).toBe(16)
    expect(locate(record.with(16, -2.7))!.half).toBe(15)
    expect(locate(record.with(17, -1.25))!.quarter).toBe(18)
    expect(locate(record.with(17, -1.2))!.quarter).toBe(17)
    expect(locate(record.with(10, 0.25))!.crossing).toBe(10)
  })

  it('takes the highest of the last fifty samples before the edge for the forward current', () => {
    const long = [...times(60, 10.25), ...record.slice(9)]
    expect(locate(long.with(60 - 50, 12.25))!.forward).toBe(12)
    expect(locate(long.with(60 - 51, 12.25))!.forward).toBe(10)
    // and nothing from before the conduction
    expect(locate([...times(3, 0.25), 13, 0.25, ...record.slice(3)])!.forward).toBe(10)
  })

  it('follows the tail until it has been quiet for a tenth of the reversal and three samples', () => {
    // half at 15, crossing at 11: a dip at 18 or 19 belongs to it, one at 20 after a quiet 19 does not
    expect(locate(record.with(18, -4))!.half).toBe(18)
    expect(locate(record.with(19, -4))!.half).toBe(19)
    expect(locate(record.with(20, -4))!.half).toBe(15)
    expect(locate(record.with(20, -5.75))!.peak).toBe(12)
  })

  it('has its quarter at the end of a record that is cut short', () => {
    const marks = locate(record.slice(0, 14))!
    expect([marks.half, marks.quarter, marks.last]).toEqual([13, 14, 14])
  })
})

describe('the baseline', () => {
  it('is the mean of the last twentieth', () => {
    // three of sixty samples
    expect(locate([...record.slice(0, 57), 0.5, 0.25, 1.5])!.base).toBe(0.75)
    expect(locate([...record.slice(0, 56), 9, 0.25, 0.25, 0.25])!.base).toBe(0.25)
  })

  it('is believed up to 15 % of the swing', () => {
    // the swing is 16 A
    const ending = (level: number) => [...short.slice(0, 19), ...times(41, level)]
    expect(locate(ending(4))!.base).toBeCloseTo(2.4, 12)
    expect(locate(ending(-2.9))!.base).toBeCloseTo(-2.4, 12)
    expect(locate(ending(-2))!.base).toBe(-2)
  })
})

describe('no event', () => {
  it('is in a record in which nothing moves', () => {
    expect(locate(times(30, 3))).toBeNull()
    expect(locate([])).toBeNull()
  })

  it('is in a fall that stops within a hundredth below the baseline', () => {
    const fallsTo = (lowest: number) => [...times(10, 10), 5, lowest, ...times(40, 0)]
    expect(locate(fallsTo(-0.1))).toBeNull()
    const seen = locate(fallsTo(-0.15))!
    expect([seen.inverted, seen.edge, seen.lowest]).toEqual([false, 10, -0.15])
  })
})

describe('several events', () => {
  const second = [...record.slice(0, 40), ...record]

  it('are counted, and the first is the one', () => {
    expect(locate(second)).toEqual({ ...event, events: 2, last: 43 })
    expect(locate([...second.slice(0, 80), ...record])!.events).toBe(3)
  })

  it('end the first where the next begins to rise', () => {
    // a tenth of the half forward current is 0.5 A
    expect(locate(second.with(42, 0.76))!.last).toBe(42)
    expect(locate(second.with(42, 0.74))!.last).toBe(43)
    expect(locate(second.with(42, 2).with(41, -0.5))!.last).toBe(41)
    // never before the first one has turned
    expect(locate([...record.slice(0, 14), ...record.slice(3)])!.last).toBe(13)
  })

  it('are none where the current dips twice without conducting between', () => {
    expect(locate(record.with(30, -5))!.events).toBe(1)
  })
})

describe('the direction of a channel', () => {
  const rise = (count: number) => Array.from({ length: count }, (_, k) => -6 + (16 * (k + 1)) / (count + 1))
  /** Begins reverse, rises to conduction, then falls in three samples. */
  const late = (count: number) => [...times(2, -6), ...rise(count), ...short.slice(3)]

  it('is that of the faster change, where one is three times faster', () => {
    // from -3 A to 5 A on the way up, from 5 A to -3 A in three samples on the way down
    expect(locate(late(24))!.inverted).toBe(false)
    expect(locate(late(24).map((value) => -value))!.inverted).toBe(true)
  })

  it('is told by what comes first, where neither is', () => {
    expect(locate(late(8))!.inverted).toBe(true)
    expect(locate(late(8).map((value) => -value))!.inverted).toBe(false)
  })

  it('is told by the larger side, where the other is less than a twentieth', () => {
    const one = (reverse: number) => [...times(10, -10), 0, reverse, reverse, ...times(40, 0)]
    expect(locate(one(0.4))!.inverted).toBe(true)
    expect(locate(one(0.4).map((value) => -value))!.inverted).toBe(false)
  })
})

describe('a slow event is looked at a second time, in running means', () => {
  // 40 A, a fall of 4 A per sample through zero at 29 to -40 A at 39
  const fall = [...times(20, 40), ...Array.from({ length: 20 }, (_, k) => 36 - 4 * k)]
  const tail = (rise: number) => Array.from({ length: 40 / rise }, (_, k) => -40 + rise * (k + 1))
  const slow = (rise: number) => [...fall, ...tail(rise), ...times(60, 0)].map((value) => value + 0.25)

  it('of three samples where the reversal is 42 samples wide', () => {
    // a tail of half an ampere per sample: the means at 39 and 40 are -38.5 and -39.5 A
    expect(locate(slow(0.5))).toEqual({
      ...{ inverted: false, events: 1, first: 0, startVisible: false, edge: 24, crossing: 29 },
      ...{ peak: 40, half: 79, quarter: 100, last: 180, forward: 40, base: 0.25, lowest: -39.25 },
    })
  })

  it('of two where it is 28, each with the sample after it', () => {
    // one ampere per sample: the mean of 39 and 40 is -39.5 A, so half is 19.75 A and a quarter 9.875 A
    expect(locate(slow(1))).toEqual({
      ...{ inverted: false, events: 1, first: 0, startVisible: false, edge: 23, crossing: 29 },
      ...{ peak: 39, half: 58, quarter: 69, last: 140, forward: 40, base: 0.25, lowest: -39.25 },
    })
  })

  it('and one reading far out does not set the marks', () => {
    const rough = slow(0.5).with(60, -60)
    expect(locate(rough)!.lowest).toBeGreaterThan(-45)
  })
})
