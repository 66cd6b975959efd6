import { describe, expect, it } from 'vitest'
import { type ReadableTail, recoveryEnd } from '../../src/capture/recovery-end.ts'
import type { RecoveryTimeDefinition } from '../../src/domain/rectifier.ts'

/** 6 A at 20, an exponential of time 3 after it. */
const tail: ReadableTail = {
  reverse: (time) => 6 * Math.exp(-(time - 20) / 3),
  peakTime: 20,
  peak: 6,
  tailTime: 3,
}

describe('the end of the recovery of an exponential tail', () => {
  // a line through the shares a and b of the peak, extended: t_b + (t_b - t_a) b/(a - b)
  const line = (a: number, b: number) => {
    const early = 3 * Math.log(1 / a)
    const late = 3 * Math.log(1 / b)
    return 20 + late + ((late - early) * b) / (a - b)
  }

  it.each<readonly [RecoveryTimeDefinition, number]>([
    [{ kind: 'line-90-25' }, line(0.9, 0.25)],
    [{ kind: 'line-75-50' }, line(0.75, 0.5)],
    [{ kind: 'unknown' }, line(0.9, 0.25)],
    [{ kind: 'level-25' }, 20 + 3 * Math.log(4)],
    [{ kind: 'level-10' }, 20 + 3 * Math.log(10)],
    [{ kind: 'level', until: 1.5 }, 20 + 3 * Math.log(6 / 1.5)],
    [{ kind: 'level', until: 6 }, 20],
    [{ kind: 'level', until: 7 }, 20],
  ])('by %j stands where its definition says', (definition, end) => {
    expect(recoveryEnd(tail, definition)).toBeCloseTo(end, 9)
  })

  it('of a straight tail is where it ends, by either line', () => {
    const straight = { ...tail, reverse: (time: number) => 6 - (time - 20) }
    expect(recoveryEnd(straight, { kind: 'line-90-25' })).toBeCloseTo(26, 9)
    expect(recoveryEnd(straight, { kind: 'line-75-50' })).toBeCloseTo(26, 9)
  })

  it('of a level that is the peak or above is the peak, whatever the tail does after it', () => {
    const hump = { ...tail, reverse: (time: number) => (time < 22 ? 8 : 0) }
    expect(recoveryEnd(hump, { kind: 'level', until: 6 })).toBe(20)
    expect(recoveryEnd(hump, { kind: 'level', until: 7 })).toBe(20)
  })
})
