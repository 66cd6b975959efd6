import { describe, expect, it } from 'vitest'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { blockingVoltageOf, nominalCoefficients } from '../../src/stage/create-kernel.ts'
import { capacitive } from './by-hand.ts'
import { carbide, gateDrive, kelvin, kernelOf, mainsStage, silicon, stage } from './samples.ts'

describe('a new kernel holds what stage and record say', () => {
  it('the conditions of the stage', () => {
    const kernel = kernelOf(stage({ parallel: { parts: 3, imbalance: 0.2 } }), silicon())
    expect(kernel).toMatchObject({
      kind: 'boost',
      inputVoltage: 250,
      outputVoltage: 400,
      outputCurrent: 2.5,
      frequency: 100e3,
      inductance: 500e-6,
      inductorResistance: 0.05,
      coreLoss: 2,
      onResistance25: 0.03,
      onResistancePerKelvin: 0.006,
      slope: 200e6,
      gate: null,
      slopeFactor: 1,
      voltageFall: 15e-9,
      loopInductance: 8e-9,
      turnOff: { kind: 'times', voltageRise: 12e-9, currentFall: 10e-9, energy: 0 },
      storedEnergy: 2e-6,
      turnOn: { current: 0, voltage: 0, energy: 0, addedShare: 1 },
      parts: 3,
      delivers: true,
      thermal: { factor: 1 },
    })
    // (1 + 0.2)/3 for the hottest of three, half of the rest for each of the two others.
    expect(kernel.hotShare).toBeCloseTo(0.4, 15)
    expect(kernel.otherShare).toBeCloseTo(0.3, 15)
    expect([kernel.hot.share, kernel.hot.count]).toEqual([kernel.hotShare, 1])
    expect([kernel.other.share, kernel.other.count]).toEqual([kernel.otherShare, 2])
  })

  it('a gate drive in place of a slope', () => {
    const gate = { ...gateDrive, resistance: 10 }
    const kernel = kernelOf(stage({ switch: { slope: gate } }), silicon())
    expect(kernel.slope).toBe(0)
    expect(kernel.gate).toEqual(gate)
  })

  it('a measured turn-off already holds the stored energy; without any turn-off nothing is lost there', () => {
    const measured = kernelOf(stage({ switch: { turnOff: { kind: 'energy', energy: 30e-6 } } }), silicon())
    expect(measured.turnOff).toEqual({ kind: 'energy', voltageRise: 0, currentFall: 0, energy: 30e-6 })
    expect(measured.storedEnergy).toBe(0)
    const none = kernelOf(stage({ switch: { turnOff: null } }), silicon())
    expect(none.turnOff).toEqual({ kind: 'none', voltageRise: 0, currentFall: 0, energy: 0 })
    expect(none.storedEnergy).toBe(2e-6)
  })

  it('no loop inductance where none is stated', () => {
    expect(kernelOf(stage({ loopInductance: null }), silicon()).loopInductance).toBe(0)
  })

  it('the part with its forward recovery and, with dead times, its channel', () => {
    const plain = kernelOf(stage(), silicon()).part
    expect(plain).toMatchObject({
      storesCharge: true,
      leaks: true,
      line: false,
      ratedCurrent: 8,
      ratedVoltage: 600,
      forwardRecoveryPeak: 0,
      forwardRecoveryTime: 0,
      forwardRecoverySlope: 1,
      synchronous: false,
      deadBefore: 0,
      deadAfter: 0,
      channelResistance25: 0,
      channelPerKelvin: 0,
    })
    const channel = { onResistance: 0.04, perKelvin: 0.005 }
    const part = silicon({
      class: 'body-diode',
      channel,
      deadTime: { before: 40e-9, after: 60e-9 },
      forwardRecovery: { peak: 6, time: 150e-9, slope: 3e8 },
    })
    expect(kernelOf(stage(), part).part).toMatchObject({
      forwardRecoveryPeak: 6,
      forwardRecoveryTime: 150e-9,
      forwardRecoverySlope: 3e8,
      leaks: false,
      synchronous: true,
      deadBefore: 40e-9,
      deadAfter: 60e-9,
      channelResistance25: 0.04,
      channelPerKelvin: 0.005,
    })
    expect(kernelOf(stage(), silicon({ channel })).part).toMatchObject({ synchronous: false, channelResistance25: 0 })
    const schottky = kernelOf(stage(), carbide()).part
    expect([schottky.storesCharge, schottky.line]).toEqual([false, true])
  })

  it('the junction charge at the voltage blocked, none without a capacitance', () => {
    const kernel = kernelOf(stage(), silicon())
    const { charge, cost } = capacitive(150e-12, 0.8, 0.45, 400)
    expect(kernel.part.capacitiveCharge / charge).toBeCloseTo(1, 6)
    expect(kernel.part.chargingCost / cost).toBeCloseTo(1, 6)
    const none = kernelOf(stage(), silicon({ capacitance: null })).part
    expect([none.capacitiveCharge, none.chargingCost]).toEqual([0, 0])
  })

  it('starts every junction at the surroundings, and a switch that is not solved at 100 °C', () => {
    expect([...kernelOf(stage(), silicon()).temperatures]).toEqual([kelvin(40), kelvin(40), kelvin(40)])
    const alone = { kind: 'sink', ambientTemperature: kelvin(40), sinkToAmbient: 1, shared: false } as const
    for (const make of [stage, mainsStage]) {
      const kernel = kernelOf(make({ cooling: alone }), silicon())
      expect([...kernel.temperatures]).toEqual([kelvin(40), kelvin(100), kelvin(40)])
    }
  })
})

describe('the coefficients of a part', () => {
  it('recovery first, then forward, then leakage; zero where the part has none', () => {
    const { rectifier } = calibrate({ record: silicon(), blockingVoltage: 400 })
    const both = [rectifier.recovery!, rectifier.forward, rectifier.leakage!]
    expect([...nominalCoefficients(rectifier)]).toEqual(both.flatMap(({ posterior }) => [...posterior.mean]))
    const schottky = nominalCoefficients(calibrate({ record: carbide(), blockingVoltage: 400 }).rectifier)
    expect([...schottky.subarray(0, 8)]).toEqual(Array(8).fill(0))
    expect(schottky[8]).toBeCloseTo(0.9, 6)
    expect(schottky[14]).toBeLessThan(0)
    const body = calibrate({ record: silicon({ class: 'body-diode' }), blockingVoltage: 400 }).rectifier
    expect([...nominalCoefficients(body).subarray(14)]).toEqual([0, 0, 0])
  })
})

describe('the voltage that the rectifier blocks', () => {
  it.each([
    ['buck', 250],
    ['boost', 400],
    ['inverting', 650],
    ['mains-boost', 400],
  ] as const)('of a %s stage of 250 V and 400 V is %d V', (kind, voltage) => {
    expect(blockingVoltageOf(stage({ kind }))).toBe(voltage)
  })

  it('at another input', () => {
    expect(blockingVoltageOf(stage({ kind: 'inverting' }), 300)).toBe(700)
    expect(blockingVoltageOf(stage({ kind: 'buck' }), 300)).toBe(300)
  })
})
