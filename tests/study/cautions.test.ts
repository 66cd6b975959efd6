import { describe, expect, it } from 'vitest'
import type { Stage } from '../../src/domain/stage.ts'
import { stageCautions } from '../../src/study/cautions.ts'
import { trend } from '../../src/study/trend.ts'
import { silicon, stage } from '../stage/samples.ts'
import { ranked, settings } from './settings.ts'

const buck = (voltage: number, fields: Partial<Stage> = {}) =>
  stage({
    kind: 'buck',
    input: { voltage },
    output: { voltage: 12, current: 5 },
    inductor: { inductance: 33e-6 },
    ...fields,
  })

const dataOf = (cautions: readonly { code: string; data: object }[], code: string) =>
  cautions.find((caution) => caution.code === code)?.data

describe('cautions of a stage', () => {
  it('below every limit there is nothing to caution', () => {
    expect(stageCautions(buck(24), [], [30]).map(({ code }) => code)).toEqual([])
    expect(stageCautions(buck(24), [], [null]).map(({ code }) => code)).toEqual([])
  })

  it('overshoot alone makes a stage hazardous', () => {
    expect(dataOf(stageCautions(buck(42), [], [null, 59]), 'lethal-voltage')).toEqual({ voltage: 59, overshoot: 59 })
    expect(stageCautions(buck(42), [], [42.4]).map(({ code }) => code)).toEqual([])
    const ringing = buck(42, { loopInductance: 60e-9 })
    const { cautions, candidates } = ranked(ringing, silicon())
    const peak = candidates[0]!.event!.peak_reverse_v
    expect(peak).toBeGreaterThan(42.4)
    expect(dataOf(cautions, 'lethal-voltage')).toMatchObject({ voltage: peak, overshoot: peak })
    const request = { over: 'load', from: 0.5, to: 1, steps: 2, logarithmic: false } as const
    const along = trend(ringing, [silicon()], request, settings(0)).cautions
    expect(along.map(({ code }) => code)).toContain('qualified-persons')
  })

  it('says which limit is met and by what', () => {
    expect(dataOf(stageCautions(buck(48), [], []), 'lethal-voltage')).toEqual({ voltage: 48, swing: 48 })
    expect(dataOf(stageCautions(buck(120), [], []), 'lethal-voltage')).toMatchObject({ side: 'input', dc: 120 })
    const boost = stage({ input: { voltage: 48 }, output: { voltage: 120, current: 1 } })
    expect(dataOf(stageCautions(boost, [], []), 'lethal-voltage')).toMatchObject({ side: 'output', dc: 120 })
  })

  it('names the input capacitor where that side is higher or hazardous', () => {
    expect(dataOf(stageCautions(buck(120), [], []), 'bulk-capacitor')).toEqual({ input: 120, output: 12 })
    const boost = (voltage: number) => stage({ input: { voltage }, output: { voltage: 400, current: 1 } })
    expect(dataOf(stageCautions(boost(48), [], []), 'bulk-capacitor')).not.toHaveProperty('input')
    expect(dataOf(stageCautions(boost(200), [], []), 'bulk-capacitor')).toMatchObject({ input: 200 })
    const inverting = stage({ kind: 'inverting', input: { voltage: 48 }, output: { voltage: 120, current: 1 } })
    expect(dataOf(stageCautions(inverting, [], []), 'bulk-capacitor')).toMatchObject({ input: 48 })
  })
})
