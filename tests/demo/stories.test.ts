import { describe, expect, it } from 'vitest'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import { candidateOf, rankDemo, reasonsOf, stageFiles, warnedAbout } from './orchard.ts'

/** The record with one measured row at the condition that the verdict asked for. */
function measured(record: RectifierRecord, at: { current: number; junction: number; drop: number }): RectifierRecord {
  const place = { name: 'forward row of the test', file: 'test', line: 1, column: 1 }
  const row = { ...at, grade: 'measured' as const, spread: null, source: null, place }
  return { ...record, forward: [...record.forward, row] }
}

describe('each demonstration stage tells its story', () => {
  it.each(stageFiles)('%s ranks at least two parts', (file) => {
    const name = file.replace(/^.*\/|\.yaml$/g, '')
    const ranked = rankDemo(name).candidates.filter(({ accepted }) => accepted)
    expect(ranked.length).toBeGreaterThanOrEqual(2)
  })

  it('the pump is decided for the Schottky, and the cheaper one fails the voltage rule', () => {
    const pump = rankDemo('pump-boost')
    expect(pump.verdict).toMatchObject({ best: 'cedar-200v-20a', decided: true })
    expect(reasonsOf(pump, 'elm-150v-20a')).toEqual(['voltage-margin'])
    expect(candidateOf(pump, 'elm-150v-20a').stage_loss_w).toBeLessThan(
      candidateOf(pump, 'cedar-200v-20a').stage_loss_w!,
    )
    expect(candidateOf(pump, 'juniper-200v-10a-fast')).toMatchObject({ thermal: 'none', junction_c: null })
    expect(warnedAbout(pump, 'hazel-200v-16a')).toContain('maximum-only')
  })

  it('the drying loft is not decided between silicon and silicon carbide', () => {
    const { verdict } = rankDemo('low-line-mains')
    expect(verdict.decided).toBe(false)
    expect([verdict.best, ...verdict.tied].sort()).toEqual(['hornbeam-600v-8a', 'quartz-650v-6a-sic'])
  })

  it('the cold store is better off with silicon carbide at full load, and not at a quarter of it', () => {
    const store = rankDemo('cold-store-mains')
    expect(candidateOf(store, store.verdict.best!).class).toBe('sic-schottky')
    expect(store.verdict.decided).toBe(true)
    expect(store.warnings.map(({ code }) => code)).toContain('order-differs-at-load')
    expect(warnedAbout(store, 'thistle-600v-8a')).toContain('row-inconsistent')
  })

  it('in the sun one Schottky runs away and the other settles', () => {
    const box = rankDemo('hot-schottky')
    expect(candidateOf(box, 'acacia-100v-20a')).toMatchObject({ accepted: false, thermal: 'none', junction_c: null })
    expect(candidateOf(box, 'maple-100v-20a')).toMatchObject({ accepted: true, thermal: 'settled' })
  })

  it('in the frost sensors the quick part recovers nothing and the slow one still does', () => {
    const loop = rankDemo('frost-sensor-boost')
    const quick = candidateOf(loop, 'clover-100v-6a')
    expect(quick.losses_w).toMatchObject({ recovery_rectifier: 0, recovery_switch: 0 })
    expect(quick.event!.none).not.toBeNull()
    expect(candidateOf(loop, 'teasel-100v-3a').losses_w.recovery_rectifier).toBeGreaterThan(0.1)
    expect(warnedAbout(loop, 'teasel-100v-3a')).toContain('idle-too-short')
  })

  it('in the dryer the part known by its headline alone has the wider band', () => {
    const dryer = rankDemo('kiln-boost')
    const width = (id: string): number =>
      candidateOf(dryer, id).interval_w!.high / candidateOf(dryer, id).interval_w!.low
    expect(width('rowan-600v-8a-headline')).toBeGreaterThan(1.3 * width('rowan-600v-8a'))
  })

  it('the tractor leaves a transistor and a Schottky undecided', () => {
    const { verdict } = rankDemo('tractor-sync-buck')
    expect(verdict.decided).toBe(false)
    expect([verdict.best, ...verdict.tied]).toEqual(expect.arrayContaining(['aspen-60v-40a-channel', 'sedge-60v-15a']))
  })

  it('the pulse fixture alone leaves a wider band than the sheet, and little is left to gain from both', () => {
    const pump = rankDemo('fixture-or-sheet')
    const [both, fixture, sheet] = ['both', 'fixture-alone', 'sheet-alone'].map((judged) => {
      const { high, low } = candidateOf(pump, `medlar-${judged}`).interval_w!
      return high / low
    })
    expect(fixture).toBeGreaterThan(sheet!)
    expect(sheet).toBeGreaterThan(both!)
  })

  it('the unit from the bench is cheapest by its headline, and not decided', () => {
    expect(rankDemo('bench-unit').verdict).toMatchObject({ best: 'bench-unit-3', decided: false })
  })

  it('where the frost sensors are undecided, the advised measurement narrows the gap', () => {
    const before = rankDemo('frost-sensor-boost')
    const advice = before.verdict.measure_next![0]!
    expect(advice).toMatchObject({ id: 'clover-100v-6a', property: 'forward' })
    const at = { current: advice.current_a, junction: advice.junction_c + 273.15 }
    const drop = 0.72
    const after = rankDemo('frost-sensor-boost', (record) =>
      record.id === advice.id ? measured(record, { ...at, drop }) : record,
    )
    const width = ({ verdict }: typeof before): number => verdict.gap_high_w! - verdict.gap_low_w!
    expect(width(after)).toBeLessThan(0.5 * width(before))
    expect(after.verdict.decided).toBe(true)
  })
})
