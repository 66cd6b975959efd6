import type { CaptureCaveatCode, CaptureSettings, Waveform } from '../../src/domain/capture.ts'
import {
  type Bench,
  type RampTruth,
  rampCapture,
  rampTruth,
  type StepTruth,
  settingsFor,
  stepCapture,
  stepTruth,
} from './synthetic.ts'
import { rampWorld, stepWorld } from './worlds.ts'

/** One defect put into an otherwise honest capture, and the one warning it has to raise. */
export interface InjectedDefect {
  readonly name: string
  readonly fixture: 'ramp' | 'step'
  readonly code: CaptureCaveatCode
  readonly make: (seed: number) => { readonly settings: CaptureSettings; readonly waveform: Waveform }
}

type RampMake = (part: RampTruth, bench: Bench, truth: ReturnType<typeof rampTruth>) => Waveform
type StepMake = (part: StepTruth, bench: Bench, truth: ReturnType<typeof stepTruth>) => Waveform

/** `bandwidth`: what the settings state, where it is not the bench's. */
function ramp(name: string, code: CaptureCaveatCode, make: RampMake, slower = 1): InjectedDefect {
  return {
    name,
    fixture: 'ramp',
    code,
    make: (seed) => {
      const { part, bench } = rampWorld(seed)
      const used = {
        ...bench,
        bandwidth: slower === 1 ? bench.bandwidth : 0.35 / (slower * rampTruth(part).timeToPeak),
      }
      const settings = settingsFor('ramp', { bandwidth: used.bandwidth })
      return { settings, waveform: make(part, used, rampTruth(part)) }
    },
  }
}

function step(name: string, code: CaptureCaveatCode, make: StepMake, slower = 1): InjectedDefect {
  return {
    name,
    fixture: 'step',
    code,
    make: (seed) => {
      const { part, bench } = stepWorld(seed)
      const used = {
        ...bench,
        bandwidth: slower === 1 ? bench.bandwidth : 0.35 / (slower * stepTruth(part).storageTime),
      }
      return {
        settings: settingsFor('step', { bandwidth: used.bandwidth }),
        waveform: make(part, used, stepTruth(part)),
      }
    },
  }
}

function limited(values: Float64Array, low: number, high: number): Float64Array {
  return values.map((value) => Math.min(high, Math.max(low, value)))
}

function twice(one: Waveform, other: Waveform): Waveform {
  const join = (a: Float64Array, b: Float64Array) => Float64Array.from([...a, ...b])
  const voltage = one.voltage === null ? null : join(one.voltage, other.voltage!)
  return { ...one, current: join(one.current, other.current), voltage }
}

const ring = (start: number, amplitude: number, decay: number, frequency: number) => (time: number) =>
  time < start ? 0 : amplitude * Math.exp(-(time - start) / decay) * Math.sin(2 * Math.PI * frequency * (time - start))

export const rampDefectList: readonly InjectedDefect[] = [
  ramp('a rise time of six tenths of ta', 'bandwidth-too-low', (part, bench) => rampCapture(part, bench), 0.6),
  ramp('six samples across ta', 'samples-too-few', (part, bench, { recoveryTime, timeToPeak }) =>
    rampCapture(part, { ...bench, samplesPerRecovery: (6 * recoveryTime) / timeToPeak }),
  ),
  ramp('the reverse peak clipped', 'clipping', (part, bench, { peakReverseCurrent }) => {
    const wave = rampCapture(part, bench)
    return { ...wave, current: limited(wave.current, -0.7 * peakReverseCurrent, Number.POSITIVE_INFINITY) }
  }),
  ramp('the forward plateau clipped', 'clipping', (part, bench) => {
    const wave = rampCapture(part, bench)
    return { ...wave, current: limited(wave.current, Number.NEGATIVE_INFINITY, 0.9 * part.current) }
  }),
  ramp('the voltage clipped', 'clipping', (part, bench) => {
    const wave = rampCapture(part, bench)
    return { ...wave, voltage: limited(wave.voltage!, Number.NEGATIVE_INFINITY, 0.9 * part.voltage) }
  }),
  ramp('an offset of 5 % of full scale', 'residual-offset', (part, bench) =>
    rampCapture(part, { ...bench, offset: 0.05 }),
  ),
  ramp('a tail that rings five times in trr', 'ringing', (part, bench, truth) => {
    const ringing = ring(truth.timeToPeak, 0.1 * truth.peakReverseCurrent, 2 * part.tailTime, 5 / truth.recoveryTime)
    return rampCapture(part, bench, (course) => (time) => course(time) + ringing(time))
  }),
  ramp('a voltage late by a quarter of ta', 'skew', (part, bench, { timeToPeak }) =>
    rampCapture(part, bench, undefined, (course) => (time) => course(time - 0.25 * timeToPeak)),
  ),
  ramp('a voltage early by a quarter of ta', 'skew', (part, bench, { timeToPeak }) =>
    rampCapture(part, bench, undefined, (course) => (time) => course(time + 0.25 * timeToPeak)),
  ),
  ramp('a shunt with L/R of a quarter of ta', 'shunt-inductance', (part, bench, { timeToPeak }) => {
    const constant = 0.25 * timeToPeak
    const step = 1e-3 * constant
    return rampCapture(
      part,
      bench,
      (course) => (time) => course(time) + (constant * (course(time) - course(time - step))) / step,
    )
  }),
  ramp('a record that ends two tail times after the peak', 'tail-truncated', (part, bench) =>
    rampCapture(part, { ...bench, after: 2 * part.tailTime }),
  ),
  ramp('the current upside down', 'wrong-sign', (part, bench) => {
    const wave = rampCapture(part, bench)
    return { ...wave, current: wave.current.map((value) => -value) }
  }),
  ramp('the voltage upside down', 'wrong-sign', (part, bench) => {
    const wave = rampCapture(part, bench)
    return { ...wave, voltage: wave.voltage!.map((value) => -value) }
  }),
  ramp('two reversals in one record', 'several-events', (part, bench) =>
    twice(rampCapture(part, bench), rampCapture(part, { ...bench, seed: bench.seed + 1000 })),
  ),
  ramp('forward current for seven tenths of a lifetime', 'plateau-too-short', (part, bench) => {
    const start = -part.current / part.slope - 0.7 * part.lifetime
    return rampCapture(
      part,
      { ...bench, before: bench.before + part.lifetime },
      (course) => (time) => (time < start ? 0 : course(time)),
    )
  }),
]

export const stepDefectList: readonly InjectedDefect[] = [
  step('a rise time of 0.4 of the storage time', 'bandwidth-too-low', (part, bench) => stepCapture(part, bench), 0.4),
  step('eight samples across the storage time', 'samples-too-few', (part, bench, { recoveryTime, storageTime }) =>
    stepCapture(part, { ...bench, samplesPerRecovery: (8 * recoveryTime) / storageTime }),
  ),
  step('the reverse plateau clipped', 'clipping', (part, bench) => {
    const wave = stepCapture(part, bench)
    return { ...wave, current: limited(wave.current, -0.9 * part.reverse, Number.POSITIVE_INFINITY) }
  }),
  step('the forward plateau clipped', 'clipping', (part, bench) => {
    const wave = stepCapture(part, bench)
    return { ...wave, current: limited(wave.current, Number.NEGATIVE_INFINITY, 0.9 * part.current) }
  }),
  step('an offset of 5 % of full scale', 'residual-offset', (part, bench) =>
    stepCapture(part, { ...bench, offset: 0.05 }),
  ),
  step('a tail that rings', 'ringing', (part, bench, { storageTime }) => {
    const ringing = ring(storageTime, 0.1 * part.reverse, 2 * part.tailTime, 1.2 / part.tailTime)
    return stepCapture(part, bench, (course) => (time) => course(time) + ringing(time))
  }),
  step('a record that ends two tail times after the plateau', 'tail-truncated', (part, bench) =>
    stepCapture(part, { ...bench, after: 2 * part.tailTime }),
  ),
  step('the current upside down', 'wrong-sign', (part, bench) => {
    const wave = stepCapture(part, bench)
    return { ...wave, current: wave.current.map((value) => -value) }
  }),
  step('two reversals in one record', 'several-events', (part, bench) =>
    twice(stepCapture(part, bench), stepCapture(part, { ...bench, seed: bench.seed + 1000 })),
  ),
  step('forward current for seven tenths of a lifetime', 'plateau-too-short', (part, bench) =>
    stepCapture(
      part,
      { ...bench, before: bench.before + part.lifetime },
      (course) => (time) => (time < -0.7 * part.lifetime ? 0 : course(time)),
    ),
  ),
]
