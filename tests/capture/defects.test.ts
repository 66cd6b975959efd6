import { describe, expect, it } from 'vitest'
import { reduceCapture } from '../../src/capture/reduce-capture.ts'
import { captureCaveatCodes } from '../../src/domain/capture.ts'
import { reducedRamp, reducedStep } from './accuracy.ts'
import { rampDefectList, stepDefectList } from './defects.ts'
import { rampCapture, settingsFor, stepCapture } from './synthetic.ts'
import { rampWorld, stepWorld } from './worlds.ts'

const seeds = [0, 1, 2, 3, 4, 5]
const fixed = { reference: null, uniform: () => 0.5, refits: 0 }

describe.each([
  ['ramp', rampDefectList],
  ['step', stepDefectList],
] as const)('a %s capture with one defect', (_fixture, list) => {
  it.each(list.map((defect) => [defect.name, defect] as const))(
    '%s raises its own warning and no other',
    (_name, { make, code }) => {
      for (const seed of seeds) {
        const reduced = reduceCapture({ ...make(seed), ...fixed })
        expect([seed, ...reduced!.caveats.map((caveat) => caveat.code)]).toEqual([seed, code])
      }
    },
  )
})

describe('a capture without a defect', () => {
  it('raises no warning, whatever the part and the bench', () => {
    for (let seed = 0; seed < 60; seed++) {
      expect([seed, reducedRamp(seed).reduced!.caveats]).toEqual([seed, []])
      expect([seed, reducedStep(seed).reduced!.caveats]).toEqual([seed, []])
    }
  })
})

describe('further caveats', () => {
  it('an unstated junction temperature is said', () => {
    const { part, bench } = rampWorld(0)
    const settings = settingsFor('ramp', { bandwidth: bench.bandwidth, device: { id: null, junction: null } })
    const reduced = reduceCapture({ settings, waveform: rampCapture(part, bench), ...fixed })
    expect(reduced!.caveats.map(({ code }) => code)).toEqual(['junction-assumed'])
  })

  it('a reference as large as the capture is not subtracted from a ramp, and said', () => {
    const { part, bench } = rampWorld(1)
    const waveform = rampCapture(part, bench)
    const settings = settingsFor('ramp', { bandwidth: bench.bandwidth })
    const reduced = reduceCapture({ settings, waveform, ...fixed, reference: waveform })
    expect(reduced!.caveats.map(({ code }) => code)).toEqual(['reference-not-subtracted'])
  })

  it('a reversal that turns back at once has no storage time, and its lifetime follows from the first current', () => {
    const { bench } = stepWorld(2)
    const part = { current: 0.02, reverse: 0.1, lifetime: 200e-9, tailTime: 60e-9 }
    const start = (part.current * (part.lifetime - part.tailTime)) / part.tailTime
    const course = (time: number) => (time < 0 ? part.current : -start * Math.exp(-time / part.tailTime))
    const waveform = stepCapture(
      part,
      { ...bench, bandwidth: 300e6, samplesPerRecovery: 300, before: 100e-9, after: 400e-9 },
      () => course,
    )
    const settings = settingsFor('step', { bandwidth: 300e6 })
    const { figures, caveats } = reduceCapture({ settings, waveform, ...fixed })!
    expect(caveats.map(({ code }) => code)).toEqual(['no-reverse-plateau'])
    if (figures.kind !== 'step') throw new Error(figures.kind)
    expect(figures.storageTime).toBeNull()
    expect(figures.tailTime / part.tailTime).toBeCloseTo(1, 1)
    expect(figures.lifetime / part.lifetime).toBeGreaterThan(0.9)
    expect(figures.lifetime / part.lifetime).toBeLessThan(1.1)
  })

  it('every code is raised by some test', () => {
    const raised = new Set([...rampDefectList, ...stepDefectList].map(({ code }) => code as string))
    for (const code of ['junction-assumed', 'reference-not-subtracted', 'no-reverse-plateau']) raised.add(code)
    expect([...captureCaveatCodes].filter((code) => !raised.has(code))).toEqual([])
  })
})
