import { describe, expect, it } from 'vitest'
import { reduceCapture } from '../../src/capture/reduce-capture.ts'
import { reducedRamp, reducedStep } from './accuracy.ts'
import { rampDefectList, stepDefectList } from './defects.ts'

const seeds = [1, 2, 3, 4, 5]
const fixed = { reference: null, uniform: () => 0.5, refits: 0 }

describe.each([
  ['ramp', rampDefectList],
  ['step', stepDefectList],
] as const)('a %s capture with one defect on further benches', (_fixture, list) => {
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
