import { describe, expect, it } from 'vitest'
import { reduceCapture } from '../../src/capture/reduce-capture.ts'
import { seededStream } from '../../src/numerics/seeded-stream.ts'
import { rampCapture, settingsFor, stepCapture } from './synthetic.ts'
import { rampWorld, stepWorld } from './worlds.ts'

type Make = (count: number, uniform: () => number) => Float64Array

const nonsense: Readonly<Record<string, Make>> = {
  noise: (count, uniform) => new Float64Array(count).map(() => uniform() - 0.5),
  'a wave': (count, uniform) => new Float64Array(count).map((_, k) => 3 * Math.sin(k / (1 + 20 * uniform()))),
  'one spike': (count) => new Float64Array(count).map((_, k) => (k === count >> 1 ? -100 : 1)),
  'a straight fall': (count) => new Float64Array(count).map((_, k) => 5 - (10 * k) / count),
  'a walk': (count, uniform) => {
    let at = 0
    return new Float64Array(count).map(() => {
      at += uniform() - 0.5
      return at
    })
  },
}

/** Every number in whatever was returned. */
function numbersIn(value: unknown): readonly number[] {
  if (typeof value === 'number') return [value]
  if (value instanceof Float64Array) return [...value]
  return typeof value === 'object' && value !== null ? Object.values(value).flatMap(numbersIn) : []
}

describe('a record that holds no proper event', () => {
  it.each(Object.entries(nonsense))('%s is refused or reduced to finite numbers, never more', (_name, make) => {
    for (let seed = 0; seed < 40; seed++) {
      const { uniform } = seededStream('nonsense', seed)
      const current = make(20 + Math.floor(900 * uniform()), uniform)
      const settings = settingsFor(seed % 2 === 0 ? 'ramp' : 'step', { bandwidth: seed % 3 === 0 ? null : 1e8 })
      const waveform = {
        start: 0,
        interval: 1e-9,
        current,
        voltage: seed % 4 === 0 ? current.map((v) => 40 * v) : null,
      }
      const reduced = reduceCapture({ settings, waveform, reference: null, uniform, refits: 2 })
      expect([seed, numbersIn(reduced).every(Number.isFinite)]).toEqual([seed, true])
    }
  })

  it('any stretch of a true capture is refused or reduced to finite numbers', () => {
    for (let seed = 0; seed < 80; seed++) {
      const { uniform } = seededStream('stretch', seed)
      const ramp = seed % 2 === 0
      const { part, bench } = rampWorld(seed)
      const step = stepWorld(seed)
      const rough = { noise: 0.05 * uniform(), samplesPerRecovery: 6 + 90 * uniform(), bits: 5 }
      const whole = ramp
        ? rampCapture(part, { ...bench, ...rough })
        : stepCapture(step.part, { ...step.bench, ...rough })
      const from = Math.floor(0.6 * uniform() * whole.current.length)
      const to = from + 20 + Math.floor(uniform() * whole.current.length)
      const waveform = {
        ...whole,
        current: whole.current.slice(from, to),
        voltage: whole.voltage?.slice(from, to) ?? null,
      }
      const reduced = reduceCapture({
        settings: settingsFor(ramp ? 'ramp' : 'step'),
        waveform,
        reference: null,
        uniform,
        refits: 2,
      })
      expect([seed, numbersIn(reduced).every(Number.isFinite)]).toEqual([seed, true])
    }
  })
})
