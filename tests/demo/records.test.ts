import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import type { RampRow, RectifierClass } from '../../src/domain/rectifier.ts'
import { recordFiles, recordOf, records, stageFiles } from './orchard.ts'

const classes: readonly RectifierClass[] = [
  'standard',
  'fast',
  'ultrafast',
  'soft-ultrafast',
  'body-diode',
  'schottky',
  'sic-schottky',
]

function rampRows(id: string): readonly RampRow[] {
  return recordOf(id).recovery.filter((row): row is RampRow => row.fixture === 'ramp')
}

/** Triangle of the row's own time and peak over its charge. */
function triangleShare({ recoveryTime, peakReverseCurrent, charge }: RampRow): number | null {
  if (recoveryTime === null || peakReverseCurrent === null || charge === null) return null
  return (recoveryTime * peakReverseCurrent) / 2 / charge
}

describe('the demonstration records', () => {
  it('are at least eighteen and cover every class', () => {
    expect(records.length).toBeGreaterThanOrEqual(18)
    expect(classes.filter((name) => !records.some((record) => record.class === name))).toEqual([])
  })

  it('say that they are invented', () => {
    expect(records.filter(({ origin }) => origin !== 'invented for the demonstration')).toEqual([])
  })

  it.each([...recordFiles, ...stageFiles])('%s names its schema and tells its story in a comment', (file) => {
    const [schema, story] = readFileSync(file, 'utf8').split('\n')
    const kind = file.includes('/stages/') ? 'stage' : 'rectifier'
    expect(schema).toBe(`# yaml-language-server: $schema=../../schemas/${kind}.schema.json`)
    expect(story).toMatch(/^# \S.{20,}/)
  })

  it('agree with themselves within 15 %, but for the one that is meant not to', () => {
    const shares = records.flatMap(({ id }) => rampRows(id).map((row) => ({ id, share: triangleShare(row) })))
    const apart = shares.filter(({ share }) => share !== null && Math.abs(share - 1) > 0.15).map(({ id }) => id)
    expect(apart).toEqual(['thistle-600v-8a'])
  })

  it('store more charge when hot, but for the one that is meant not to', () => {
    const falling = records.filter(({ id }) => {
      const rows = rampRows(id).filter(({ charge }) => charge !== null)
      return rows.some((hot) =>
        rows.some((cold) => sameCommutation(hot, cold) && isHotter(hot, cold) && hot.charge! <= cold.charge!),
      )
    })
    expect(falling.map(({ id }) => id)).toEqual(['nettle-200v-16a'])
  })

  it('hold one part whose headline, hot typical and hot maximum give 0.65, 5 and 14.4 W at 400 V and 100 kHz', () => {
    const [headline, typical, maximum] = rampRows('rowan-600v-8a')
    const watts = (charge: number): number => 400 * charge * 100e3
    expect(watts((headline!.slope! * headline!.recoveryTime! ** 2) / 2)).toBeCloseTo(0.65, 2)
    expect(watts(typical!.charge!)).toBeCloseTo(5, 1)
    expect(watts(maximum!.charge!)).toBeCloseTo(14.4, 1)
    expect([headline!.grade, typical!.grade, maximum!.grade]).toEqual(['typical', 'typical', 'maximum'])
  })
})

function sameCommutation(one: RampRow, other: RampRow): boolean {
  return one.grade === other.grade && one.current === other.current && one.slope === other.slope
}

function isHotter(one: RampRow, other: RampRow): boolean {
  return (one.junction ?? 0) > (other.junction ?? 0)
}
