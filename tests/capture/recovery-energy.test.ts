import { describe, expect, it } from 'vitest'
import { recoveryEnergy } from '../../src/capture/recovery-energy.ts'
import { handCorner, handCourse, handCurve, handRamp, windowOf } from './handmade.ts'

const grid = { start: 0.25, interval: 0.5, count: 160 }

/** Reads `conducting` up to 26, `blocking` from there on. */
const stepping = (conducting: number, blocking: number) => (time: number) => (time < 26 ? conducting : blocking)
const energyOf = (conducting: number, blocking: number, ramp = handRamp(), current = handCourse) =>
  recoveryEnergy(windowOf(grid, current, stepping(conducting, blocking)), ramp)!

/**
 * Sum of the samples 6 exp(-(k + 1/2)/8) from the peak to 3 %, a geometric series, and the exponential after it.
 * ln(1/0.03) = 3.5066 tail times are 28.05 samples: 28 of them are summed.
 */
const summed = (count: number) => 0.5 * 6 * Math.exp(-1 / 16) * ((1 - Math.exp(-count / 8)) / (1 - Math.exp(-1 / 8)))
const charge = summed(28) + 0.03 * 6 * 4

describe('the energy of a recovery', () => {
  it('is voltage times charge from the peak to the end of the tail', () => {
    const { voltage, energy, conducting } = energyOf(-1, 100)
    expect([voltage, conducting]).toEqual([100, -1])
    expect(energy).toBeCloseTo(100 * charge, 6)
    // and that is near 100 V x 6 A x 4
    expect(energy / 2400).toBeCloseTo(1, 2)
  })

  it('believes a drop of up to two volts while it conducts, and moves an offset to the nearer end', () => {
    expect(energyOf(0, 100).voltage).toBe(100)
    expect(energyOf(-2, 100).voltage).toBe(100)
    expect(energyOf(5, 100).voltage).toBe(95)
    expect(energyOf(5, 100).energy).toBeCloseTo(95 * charge, 6)
    expect(energyOf(-7, 100).voltage).toBe(105)
    expect(energyOf(-7, 100).energy).toBeCloseTo(105 * charge, 6)
  })

  it('counts the current from its baseline', () => {
    const ramp = handRamp({ fitted: handCorner({ base: 0.5 }) })
    expect(energyOf(-1, 100, ramp, (t) => handCourse(t) + 0.5).energy).toBeCloseTo(100 * charge, 6)
  })

  it('reads the conducting voltage up to four fifths of the ramp', () => {
    // onset 10, crossing 20: up to 18; a spike after that is not conduction
    const at = (from: number, to: number) => (time: number) => (time >= from && time <= to ? 37 : -1)
    const read = (voltage: (time: number) => number) =>
      recoveryEnergy(windowOf(grid, handCourse, voltage), handRamp())!.conducting
    expect(read(at(18.1, 26))).toBe(-1)
    // one of the 36 readings up to 17.75
    expect(read(at(17.6, 18))).toBeCloseTo(-1 + 38 / 36, 12)
  })

  it('reads the blocking voltage over six tail times after the tail is quiet', () => {
    // quiet at 26 + 4 x 3.5066 = 40.03; up to 64.03: the 48 readings from 40.25 to 63.75
    const read = (from: number, to: number) => {
      const voltage = (t: number) => (t > from && t < to ? 100 : t < 26 ? 0 : 50)
      return recoveryEnergy(windowOf(grid, handCourse, voltage), handRamp())!.voltage
    }
    expect(read(40, 64)).toBe(100)
    expect(read(40.5, 64)).toBeCloseTo(100 - 50 / 48, 9)
    expect(read(40, 63.5)).toBeCloseTo(100 - 50 / 48, 9)
  })

  it('takes what a record cut short still shows', () => {
    // cut at 30.75: the last reading is the blocking voltage, and the exponential stands for the rest
    const short = windowOf({ ...grid, count: 62 }, handCourse, stepping(-1, 80))
    const { voltage, energy } = recoveryEnergy(short, handRamp())!
    expect(voltage).toBe(80)
    const left = 6 * Math.exp(-4.75 / 4)
    expect(energy).toBeCloseTo(80 * (summed(9) + left * 4), 6)
  })

  it('begins at the peak of a rounded corner', () => {
    // w = 1 and tau = 4: the peak at 4/3 ln(1 + 3/6) = 0.5406 after the corner; samples from 26.75 on
    const fitted = handCorner({ curve: { ...handCurve, rounding: 1 } })
    const spiked = (time: number) => (time === 26.25 ? -1000 : 0)
    const window = windowOf(grid, spiked, stepping(0, 100))
    expect(recoveryEnergy(window, handRamp({ fitted }))!.energy).toBeLessThan(100 * 2)
  })

  it('is none without a voltage', () => {
    expect(recoveryEnergy(windowOf(grid, handCourse), handRamp())).toBeNull()
  })

  it('of a voltage that was never read while it conducts takes its last reading for that', () => {
    const late = windowOf({ start: 19, interval: 0.5, count: 100 }, handCourse, () => 40)
    expect(recoveryEnergy(late, handRamp())!.conducting).toBe(40)
    expect(recoveryEnergy({ ...late, voltage: new Float64Array() }, handRamp())!.conducting).toBe(0)
  })
})
