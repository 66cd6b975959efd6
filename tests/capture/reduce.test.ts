import { describe, expect, it } from 'vitest'
import { reduceCapture } from '../../src/capture/reduce-capture.ts'
import type { RecoveryTimeDefinition } from '../../src/domain/rectifier.ts'
import { recoveryTimeFactor } from '../../src/models/charge-control.ts'
import { digitised, filtered, rampCapture, rampTruth, settingsFor } from './synthetic.ts'
import { rampWorld } from './worlds.ts'

const part = { current: 8, slope: 200e6, lifetime: 60e-9, tailTime: 20e-9, voltage: 400, voltageFall: 15e-9 }
const ideal = {
  seed: 1,
  samplesPerRecovery: 150,
  bandwidth: Number.POSITIVE_INFINITY,
  noise: 0,
  offset: 0,
  bits: 0,
  before: 60e-9,
  after: 200e-9,
}
const fixed = { reference: null, uniform: () => 0.5, refits: 0 }

function ramp(change: Parameters<typeof settingsFor>[1] = {}, bench = ideal) {
  const settings = settingsFor('ramp', { bandwidth: 1e12, ...change })
  const { figures } = reduceCapture({ settings, waveform: rampCapture(part, bench), ...fixed })!
  if (figures.kind !== 'ramp') throw new Error(figures.kind)
  return figures
}

describe('an ideal ramp capture of the worked example 8 A, 200 A/us, 60/20 ns', () => {
  it('gives back peak, times, charge and energy of the charge model', () => {
    const figures = ramp()
    expect(figures.peakReverseCurrent).toBeCloseTo(5.37575, 2)
    expect(figures.timeToPeak * 1e9).toBeCloseTo(26.8787, 1)
    expect(figures.recoveryTime * 1e9).toBeCloseTo(64.458, 1)
    expect(figures.softness).toBeCloseTo(1.3981, 2)
    expect(figures.chargeByEnd.find(({ end }) => end === 0)!.charge * 1e9).toBeCloseTo(179.762, 0)
    expect(figures.energy! * 1e6).toBeCloseTo(30.2552, 0)
    expect(figures.softnessBySlopes).toBeCloseTo(20 / 26.8787, 1)
  })

  it.each<RecoveryTimeDefinition>([
    { kind: 'line-90-25' },
    { kind: 'line-75-50' },
    { kind: 'level-25' },
    { kind: 'level-10' },
    { kind: 'level', until: 0.5 },
  ])('reads the end of trr by $kind', (definition) => {
    const factor = recoveryTimeFactor({ definition, peakReverseCurrent: 5.37575 })
    expect(ramp({ recoveryTimeBy: definition }).recoveryTime * 1e9).toBeCloseTo(26.8787 + factor * 20, 1)
  })

  it('ends the charge where it is told to, on the fitted tail', () => {
    const whole = 5.37575 * (26.8787 / 2 + 20)
    expect(ramp({ chargeUntil: 0.1 }).charge * 1e9).toBeCloseTo(whole - 0.1 * 5.37575 * 20, 0)
    expect(ramp({ chargeUntil: 0 }).charge * 1e9).toBeCloseTo(whole, 0)
  })
})

describe('corrections', () => {
  it('current_delay takes the skew out, and the energy with it', () => {
    const delay = 6e-9
    const settings = settingsFor('ramp', { bandwidth: 1e12 })
    const late = rampCapture(part, ideal, (course) => (time) => course(time - delay))
    const spoiled = reduceCapture({ settings, waveform: late, ...fixed })!
    expect(spoiled.caveats.map(({ code }) => code)).toEqual(['skew'])
    const right = reduceCapture({ settings: { ...settings, currentDelay: delay }, waveform: late, ...fixed })!
    expect(right.caveats).toEqual([])
    const energy = (reduced: typeof right) => (reduced.figures as { readonly energy: number }).energy * 1e6
    expect(energy(right)).toBeCloseTo(30.26, 0)
    expect(Math.abs(energy(spoiled) - 30.26)).toBeGreaterThan(3)
  })

  it('a small reference is subtracted at equal times', () => {
    const disturbance = (time: number) => 0.4 * Math.sin(2 * Math.PI * 30e6 * time)
    const waveform = rampCapture(part, ideal, (course) => (time) => course(time) + disturbance(time))
    const grid = { start: waveform.start - 7.3e-9, interval: 0.2e-9, count: 2500 }
    const reference = { ...grid, current: filtered(disturbance, Number.POSITIVE_INFINITY, grid), voltage: null }
    const settings = settingsFor('ramp', { bandwidth: 1e12 })
    const reduced = reduceCapture({ settings, waveform, ...fixed, reference })!
    expect(reduced.caveats).toEqual([])
    expect((reduced.figures as { readonly charge: number }).charge * 1e9).toBeCloseTo(ramp().charge * 1e9, 0)
  })
})

describe('the doubt', () => {
  it('grows with the noise, is the same for the same seed, and knows an unstated bandwidth', () => {
    const { part: any, bench } = rampWorld(3)
    const spreadAt = (noise: number, bandwidth: number | null) =>
      reduceCapture({
        settings: settingsFor('ramp', { bandwidth }),
        waveform: rampCapture(any, { ...bench, noise }),
        reference: null,
        uniform: generator(),
        refits: 16,
      })!.spread
    const quiet = spreadAt(0.002, bench.bandwidth)
    expect(spreadAt(0.002, bench.bandwidth)).toEqual(quiet)
    expect(spreadAt(0.02, bench.bandwidth).slope!).toBeGreaterThan(3 * quiet.slope!)
    expect(spreadAt(0.002, null).peakReverseCurrent!).toBeGreaterThan(quiet.peakReverseCurrent!)
  })
})

describe('a capture without stored charge', () => {
  const grid = { start: -60e-9, interval: 0.25e-9, count: 1200 }
  const bench = { ...ideal, noise: 0.004, bits: 9 }

  it('a Schottky part in a step fixture measures nothing, with a bound above what flowed', () => {
    const edge = 3e-9
    const course = (time: number) =>
      time < -edge ? 0.012 : time < edge / 3 ? (-0.012 * time) / edge : -0.004 * Math.exp(-(time - edge / 3) / 2e-9)
    const current = digitised(filtered(course, 250e6, grid), bench, 'current')
    const settings = settingsFor('step', { bandwidth: 250e6 })
    const reduced = reduceCapture({ settings, waveform: { ...grid, current, voltage: null }, ...fixed })!
    if (reduced.figures.kind !== 'none-measurable') throw new Error(reduced.figures.kind)
    const flowed = 0.004 * (edge / 6 + 2e-9)
    expect(reduced.figures.chargeUpperBound).toBeGreaterThan(flowed)
    expect(reduced.figures.chargeUpperBound).toBeLessThan(4 * flowed)
    expect(reduced.spread).toEqual({})
  })

  it('a ramp that only falls to zero measures nothing', () => {
    const course = (time: number) => (time < -40e-9 ? 8 : Math.max(0, -200e6 * time))
    const current = digitised(filtered(course, 250e6, grid), bench, 'current')
    const settings = settingsFor('ramp', { bandwidth: 250e6 })
    const reduced = reduceCapture({ settings, waveform: { ...grid, current, voltage: null }, ...fixed })!
    expect(reduced.figures.kind).toBe('none-measurable')
  })

  it('a record in which nothing happens is no capture of an event', () => {
    const waveform = { ...grid, current: new Float64Array(1200).fill(3), voltage: null }
    expect(reduceCapture({ settings: settingsFor('ramp'), waveform, ...fixed })).toBeNull()
  })
})

describe('the fitted truth', () => {
  it('does not depend on where the record is cut', () => {
    const shorter = ramp({}, { ...ideal, before: 30e-9, after: 120e-9 })
    expect(shorter.charge / ramp().charge).toBeCloseTo(1, 3)
    expect(shorter.slope / rampTruth(part).slope).toBeCloseTo(1, 3)
  })
})

/** A small congruential sequence: enough to draw residuals. */
function generator(): () => number {
  let state = 7
  return () => {
    state = (state * 16807) % 2147483647
    return state / 2147483647
  }
}
