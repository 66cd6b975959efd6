import type { CaptureSettings, Waveform } from '../../src/domain/capture.ts'
import { rampRecovery, recoveryTimeFactor } from '../../src/models/charge-control.ts'
import { stepRecoveryTime, stepStorageTime } from '../../src/models/step-fixture.ts'
import { normalQuantile } from '../../src/numerics/normal-quantile.ts'
import { seededStream } from '../../src/numerics/seeded-stream.ts'

/** The bench of a synthetic capture: what probe, oscilloscope and fixture do to the truth. */
export interface Bench {
  readonly seed: number
  /** Samples across the recovery time. */
  readonly samplesPerRecovery: number
  /** [Hz]; infinite: none. */
  readonly bandwidth: number
  /** Of full scale, one standard deviation. */
  readonly noise: number
  /** Of full scale. */
  readonly offset: number
  /** 0: no quantisation. */
  readonly bits: number
  /** Record before the reversal and after the corner. [s] */
  readonly before: number
  readonly after: number
}

/** One channel's true course over time from the zero crossing. */
type Course = (time: number) => number

/** First-order response of a course, by exact steps of a fine grid on which the course is taken as straight. */
export function filtered(
  course: Course,
  bandwidth: number,
  times: { readonly start: number; readonly interval: number; readonly count: number },
): Float64Array {
  const out = new Float64Array(times.count)
  if (!Number.isFinite(bandwidth)) return out.map((_, k) => course(times.start + k * times.interval))
  const constant = 1 / (2 * Math.PI * bandwidth)
  const fine = Math.max(2, Math.ceil((8 * times.interval) / constant))
  const step = times.interval / fine
  const decay = Math.exp(-step / constant)
  let state = course(times.start)
  let value = state
  for (let k = 0; k < times.count; k++) {
    out[k] = state
    for (let j = 1; j <= fine; j++) {
      const next = course(times.start + k * times.interval + j * step)
      const rise = (next - value) / step
      // exact answer of dx/dt = (u − x)/constant to u straight over the step
      state = next - rise * constant + (state - value + rise * constant) * decay
      value = next
    }
  }
  return out
}

/** Offset, noise and the converter's steps. Full scale is 1.2 times the swing, as an operator sets it. */
export function digitised(values: Float64Array, bench: Bench, channel: string): Float64Array {
  let low = Number.POSITIVE_INFINITY
  let high = Number.NEGATIVE_INFINITY
  for (const value of values) {
    low = Math.min(low, value)
    high = Math.max(high, value)
  }
  const full = 1.2 * (high - low)
  const stream = seededStream('bench', channel, bench.seed)
  const step = bench.bits > 0 ? full / 2 ** bench.bits : 0
  return values.map((value) => {
    const read = value + bench.offset * full + bench.noise * full * normalQuantile(stream.uniform())
    return step > 0 ? Math.round(read / step) * step : read
  })
}

/** A commutation and its truth. */
export interface RampTruth {
  readonly current: number
  readonly slope: number
  readonly lifetime: number
  readonly tailTime: number
  readonly voltage: number
  readonly voltageFall: number
}

/** Figures that a perfect reduction would give. */
export function rampTruth(part: RampTruth) {
  const event = rampRecovery({ ...part, storedCharge: part.lifetime * part.current })
  const { peakReverseCurrent, timeToPeak } = event
  const factor = recoveryTimeFactor({ definition: { kind: 'line-90-25' }, peakReverseCurrent })
  const x = part.voltageFall / part.tailTime
  const g = x > 0 ? -Math.expm1(-x) / x : 1
  return {
    current: part.current,
    slope: part.slope,
    peakReverseCurrent,
    timeToPeak,
    recoveryTime: timeToPeak + factor * part.tailTime,
    charge: peakReverseCurrent * (0.5 * timeToPeak + 0.98 * part.tailTime),
    wholeCharge: event.charge,
    softness: (factor * part.tailTime) / timeToPeak,
    voltage: part.voltage,
    energy: part.voltage * peakReverseCurrent * part.tailTime * g,
  }
}

/** True current of a commutation: exactly the charge-control waveform. */
function rampCourse(part: RampTruth): Course {
  const { peakReverseCurrent, timeToPeak } = rampTruth(part)
  return (time) => {
    if (time < -part.current / part.slope) return part.current
    if (time < timeToPeak) return -part.slope * time
    return -peakReverseCurrent * Math.exp(-(time - timeToPeak) / part.tailTime)
  }
}

/** Reverse voltage: a drop while it conducts, then straight to the blocking voltage from the peak on. */
function voltageCourse(part: RampTruth): Course {
  const { timeToPeak } = rampTruth(part)
  return (time) => part.voltage * Math.min(1, Math.max(0, (time - timeToPeak) / Math.max(part.voltageFall, 1e-12)))
}

/** A ramp capture through the bench; `change` may spoil the course of the current. */
export function rampCapture(
  part: RampTruth,
  bench: Bench,
  change: (course: Course) => Course = (course) => course,
  voltageChange: (course: Course) => Course = (course) => course,
): Waveform {
  const truth = rampTruth(part)
  const interval = truth.recoveryTime / bench.samplesPerRecovery
  const start = -part.current / part.slope - bench.before
  const count = Math.ceil((truth.timeToPeak + bench.after - start) / interval)
  const grid = { start: start + 0.37 * interval, interval, count }
  return {
    start: grid.start,
    interval,
    current: digitised(filtered(change(rampCourse(part)), bench.bandwidth, grid), bench, 'current'),
    voltage: digitised(filtered(voltageChange(voltageCourse(part)), bench.bandwidth, grid), bench, 'voltage'),
  }
}

/** A resistor-limited reversal and its truth. */
export interface StepTruth {
  readonly current: number
  readonly reverse: number
  readonly lifetime: number
  readonly tailTime: number
}

export function stepTruth(part: StepTruth) {
  const input = { ...part, forwardCurrent: part.current, reverseCurrent: part.reverse }
  return {
    current: part.current,
    reverse: part.reverse,
    storageTime: stepStorageTime(input),
    recoveryTime: stepRecoveryTime({ ...input, until: part.reverse / 4 }),
    lifetime: part.lifetime,
    tailTime: part.tailTime,
  }
}

export function stepCourse(part: StepTruth, edge = 0): Course {
  const { storageTime } = stepTruth(part)
  const rise = (edge * part.current) / (part.current + part.reverse)
  return (time) => {
    if (time < -rise) return part.current
    if (time < edge - rise) return part.current - ((time + rise) / edge) * (part.current + part.reverse)
    if (time < storageTime) return -part.reverse
    return -part.reverse * Math.exp(-(time - storageTime) / part.tailTime)
  }
}

export function stepCapture(
  part: StepTruth,
  bench: Bench,
  change: (course: Course) => Course = (course) => course,
): Waveform {
  const truth = stepTruth(part)
  const interval = truth.recoveryTime / bench.samplesPerRecovery
  const count = Math.ceil((truth.storageTime + bench.after + bench.before) / interval)
  const grid = { start: -bench.before + 0.37 * interval, interval, count }
  const current = digitised(filtered(change(stepCourse(part)), bench.bandwidth, grid), bench, 'current')
  return { start: grid.start, interval, current, voltage: null }
}

/** Settings with everything at its default. */
export function settingsFor(fixture: 'ramp' | 'step', change: Partial<CaptureSettings> = {}): CaptureSettings {
  const column = (position: number, unit: string) => ({ column: position, factor: 1, unit, shunt: null })
  return {
    fixture,
    file: 'synthetic.csv',
    time: column(1, 's'),
    interval: null,
    current: column(2, 'A'),
    voltage: fixture === 'ramp' ? column(3, 'V') : null,
    decimal: 'auto',
    segment: 1,
    recoveryTimeBy: fixture === 'ramp' ? { kind: 'line-90-25' } : { kind: 'level-25' },
    chargeUntil: 0.02,
    bandwidth: null,
    currentDelay: 0,
    reference: null,
    device: { id: null, junction: 298.15 },
    assumed: [],
    ...change,
  }
}
