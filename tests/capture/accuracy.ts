import { reduceCapture } from '../../src/capture/reduce-capture.ts'
import type { ReducedCapture } from '../../src/domain/capture.ts'
import { seededStream } from '../../src/numerics/seeded-stream.ts'
import type { Comparison, ValidationSection } from '../published/compare.ts'
import { rampCapture, rampTruth, settingsFor, stepCapture, stepTruth } from './synthetic.ts'
import { rampWorld, stepWorld } from './worlds.ts'

/** Captures of each kind. */
const count = 120

/** Largest relative error allowed, by figure of the reduction. */
const limits = {
  ramp: { current: 0.02, slope: 0.03, peakReverseCurrent: 0.03, charge: 0.04, recoveryTime: 0.06, energy: 0.06 },
  step: { current: 0.02, reverse: 0.02, storageTime: 0.05, recoveryTime: 0.05, lifetime: 0.25 },
} as const

const names: Readonly<Record<string, string>> = {
  current: 'forward current',
  slope: 'slope',
  peakReverseCurrent: 'peak reverse current',
  charge: 'recovered charge',
  recoveryTime: 'recovery time',
  energy: 'energy from the peak on',
  reverse: 'reverse current',
  storageTime: 'storage time',
  lifetime: 'lifetime',
}

/** The reduction of random captures against their truth: the largest error of each figure. */
export function captureAccuracySection(): ValidationSection {
  return {
    title: 'Captures',
    text:
      `Largest relative error over ${count} random synthetic captures of each kind: charge-control waveforms with 8 to 10 bit ` +
      'quantisation, 0.4 % noise, up to 1 % offset and a bandwidth of 0.35/(0.02 trr).',
    rows: () => [...rowsOf('ramp'), ...rowsOf('step')],
  }
}

function rowsOf(fixture: 'ramp' | 'step'): readonly Comparison[] {
  const worst = new Map<string, number>()
  for (let seed = 0; seed < count; seed++) {
    const { truth, reduced } = fixture === 'ramp' ? reducedRamp(seed) : reducedStep(seed)
    for (const name of Object.keys(limits[fixture])) {
      const value = (reduced?.figures as unknown as Readonly<Record<string, unknown>> | undefined)?.[name]
      // a capture that was not reduced is an error without bound
      const error = typeof value === 'number' ? Math.abs(value / truth[name]! - 1) : Number.POSITIVE_INFINITY
      worst.set(name, Math.max(worst.get(name) ?? 0, error))
    }
  }
  return Object.entries(limits[fixture]).map(([name, limit]) => {
    const error = 100 * worst.get(name)!
    return {
      id: fixture === 'ramp' ? 'C1' : 'C2',
      quantity: `${names[name]}, ${fixture}, largest error of ${count}`,
      unit: '%',
      printed: '0',
      expected: 0,
      computed: error,
      error,
      tolerance: 100 * limit,
      within: error <= 100 * limit,
      because: 'accuracy wanted of the reduction',
      source: 'own: captures of known truth',
    }
  })
}

interface Reduced {
  readonly truth: Readonly<Record<string, number>>
  readonly reduced: ReducedCapture | null
}

export function reducedRamp(seed: number, refits = 0): Reduced {
  const { part, bench } = rampWorld(seed)
  const settings = settingsFor('ramp', { bandwidth: bench.bandwidth })
  const { uniform } = seededStream('accuracy', seed)
  return {
    truth: rampTruth(part),
    reduced: reduceCapture({ settings, waveform: rampCapture(part, bench), reference: null, uniform, refits }),
  }
}

export function reducedStep(seed: number, refits = 0): Reduced {
  const { part, bench } = stepWorld(seed)
  const settings = settingsFor('step', { bandwidth: bench.bandwidth })
  const { uniform } = seededStream('accuracy', seed)
  return {
    truth: stepTruth(part),
    reduced: reduceCapture({ settings, waveform: stepCapture(part, bench), reference: null, uniform, refits }),
  }
}
