import { describe, expect, it } from 'vitest'
import type { Kernel } from '../../src/stage/kernel.ts'
import { leakageAt, moveToTemperature } from '../../src/stage/part-at-temperature.ts'
import { drop, leakage, lifetimes, partOf } from './by-hand.ts'
import { carbide, kelvin, kernelOf, silicon, stage } from './samples.ts'

const synchronous = silicon({
  class: 'body-diode',
  channel: { onResistance: 0.04, perKelvin: 0.005 },
  deadTime: { before: 40e-9, after: 60e-9 },
})

function moved(part = silicon(), junction = 390): Kernel {
  const kernel = kernelOf(stage(), part)
  moveToTemperature(kernel, kernel.hot, junction)
  return kernel
}

describe('a part moved to a junction temperature', () => {
  it.each([silicon(), carbide()])('$id has the forward drop of its linear temperature law', (part) => {
    const kernel = moved(part)
    const { constant, logarithmic, linear } = kernel.hot
    for (const current of [2, 5, 16]) {
      const x = current / 8
      expect(constant + logarithmic * Math.log(x) + linear * x).toBeCloseTo(drop(partOf(kernel), current, 390), 12)
    }
  })

  it('has the lifetime and tail of the power law in absolute temperature', () => {
    const kernel = moved()
    // At the rated current and 100 A/us only the temperature acts.
    const { tau, tail } = lifetimes(partOf(kernel), 8, 1e8, 390)
    expect(Math.exp(kernel.hot.lifetimeLog) / tau).toBeCloseTo(1, 12)
    expect(Math.exp(kernel.hot.lifetimeLog) / (1 + Math.exp(kernel.hot.ratioLog)) / tail).toBeCloseTo(1, 12)
  })

  it('leaks by the law in 1/T at the blocking voltage and at any other, not at all without voltage', () => {
    const kernel = moved()
    const part = partOf(kernel)
    expect(kernel.hot.leakage / leakage(part, 400, 390)).toBeCloseTo(1, 12)
    expect(leakageAt(kernel, kernel.hot, 150) / leakage(part, 150, 390)).toBeCloseTo(1, 12)
    expect(leakageAt(kernel, kernel.hot, 0)).toBe(0)
    expect(leakageAt(kernel, kernel.hot, -1)).toBe(0)
  })

  it('stays finite where a leakage runs away: e^7 A', () => {
    const kernel = moved(silicon(), 5000)
    kernel.coefficients[14] = 20
    moveToTemperature(kernel, kernel.hot, 390)
    expect(kernel.hot.leakage).toBeCloseTo(1096.6, 1)
    expect(leakageAt(kernel, kernel.hot, 400)).toBeCloseTo(1096.6, 1)
  })

  it('counts as at 1 K below that, where logarithms and reciprocals have no meaning', () => {
    const kernel = moved(silicon(), -5)
    const at = lifetimes(partOf(kernel), 8, 1e8, 1)
    expect(Math.exp(kernel.hot.lifetimeLog) / at.tau).toBeCloseTo(1, 12)
    expect(kernel.hot.leakage).toBe(leakage(partOf(kernel), 400, 1))
  })

  it('leaves untouched what the part does not have', () => {
    const kernel = moved(carbide())
    expect([kernel.hot.lifetimeLog, kernel.hot.ratioLog, kernel.hot.channelResistance]).toEqual([0.5, 0.5, 0.5])
    const body = moved(synchronous)
    expect([body.hot.leakageLog, body.hot.leakage]).toEqual([-0.5, 0])
  })

  it('has a channel that grows linearly, never below a tenth of its 25 °C value', () => {
    expect(moved(synchronous, kelvin(125)).hot.channelResistance).toBeCloseTo(0.04 * 1.5, 12)
    expect(moved(synchronous, kelvin(25 - 190)).hot.channelResistance).toBeCloseTo(0.004, 12)
  })
})
