import { seededStream } from '../../src/numerics/seeded-stream.ts'
import { type Bench, type RampTruth, rampTruth, type StepTruth, stepTruth } from './synthetic.ts'

/**
 * A random part on a random, honest bench: 8 to 10 bits, 0.4 % noise, up to 1 % offset, a bandwidth of
 * 0.35/(0.02 trr), sampled 120 to 500 times across trr, the tail followed over 5 to 9 of its times.
 */
function honestBench(uniform: () => number, seed: number, recoveryTime: number, tailTime: number): Bench {
  return {
    seed,
    samplesPerRecovery: 120 + 380 * uniform(),
    bandwidth: 0.35 / (0.02 * recoveryTime),
    noise: 0.004,
    offset: 0.02 * (uniform() - 0.5),
    bits: 8 + Math.floor(3 * uniform()),
    before: recoveryTime * (0.5 + uniform()),
    after: (5 + 4 * uniform()) * tailTime,
  }
}

/** A commutation as converters and test benches make it: ta between a tenth of trr and most of it. */
export function rampWorld(seed: number): { readonly part: RampTruth; readonly bench: Bench } {
  const { uniform } = seededStream('ramp world', seed)
  for (;;) {
    const lifetime = 25e-9 * 40 ** uniform()
    const tailTime = lifetime * (0.15 + 0.35 * uniform())
    const slope = (50 + 450 * uniform()) * 1e6
    const current = 1 + 19 * uniform()
    const voltage = 48 + 352 * uniform()
    const part = { current, slope, lifetime, tailTime, voltage, voltageFall: tailTime * (0.2 + uniform()) }
    const truth = rampTruth(part)
    const bench = honestBench(uniform, seed, truth.recoveryTime, tailTime)
    // a peak within a tenth of trr asks for a faster probe than the one stated here
    if (truth.timeToPeak > 0.15 * truth.recoveryTime) return { part, bench }
  }
}

/** A reversal in a fixture: currents of milliamperes to an ampere, a plateau of a fifth of trr or more. */
export function stepWorld(seed: number): { readonly part: StepTruth; readonly bench: Bench } {
  const { uniform } = seededStream('step world', seed)
  for (;;) {
    const lifetime = 25e-9 * 160 ** uniform()
    const tailTime = lifetime * (0.08 + 0.22 * uniform())
    const current = 0.01 * 100 ** uniform()
    const part = { current, reverse: current * (0.5 + 1.5 * uniform()), lifetime, tailTime }
    const truth = stepTruth(part)
    const bench = honestBench(uniform, seed, truth.recoveryTime, tailTime)
    if (truth.storageTime > 0.2 * truth.recoveryTime) return { part, bench }
  }
}
