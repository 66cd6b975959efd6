import { readdirSync, readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import type { CaptureDocument } from '../../src/domain/capture.ts'
import type { RankResult } from '../../src/domain/result.ts'
import { readCapture } from '../../src/input/capture-settings.ts'
import { captureTable } from '../../src/input/capture-table.ts'
import { readRecords } from '../../src/input/read-records.ts'
import { readStage } from '../../src/input/read-stage.ts'
import { rank } from '../../src/study/rank.ts'
import { reduce } from '../../src/study/reduce.ts'
import { demoCaptures } from './demo-captures.ts'

const folder = 'catalogs-demo/captures'

function reduced(name: string): CaptureDocument {
  const settings = readCapture(readFileSync(`${folder}/${name}.yaml`, 'utf8'), name).value!
  const read = (file: string, of = settings) => {
    const table = captureTable(of, file)
    table.push(readFileSync(`${folder}/${file}`, 'utf8'))
    return table.end().value!
  }
  const { waveform, reading } = read(settings.file)
  const reference =
    settings.reference === null ? null : read(settings.reference, { ...settings, voltage: null }).waveform
  return reduce({ settings, waveform, reading, reference, seed: 1, version: '0', inputs: [] }).document
}

const keys: Readonly<Record<string, string>> = {
  current: 'current_a',
  slope: 'slope_a_per_s',
  peakReverseCurrent: 'peak_reverse_a',
  recoveryTime: 'trr_s',
  charge: 'qrr_c',
  energy: 'energy_j',
  reverse: 'reverse_a',
  storageTime: 'storage_s',
  lifetime: 'tau_s',
}

describe('the demonstration captures', () => {
  it('are exactly what their script writes, each below 150 kB', () => {
    const files = Object.assign({}, ...demoCaptures().map((capture) => capture.files)) as Record<string, string>
    expect(readdirSync(folder).sort()).toEqual(Object.keys(files).sort())
    for (const [file, text] of Object.entries(files)) {
      expect(readFileSync(`${folder}/${file}`, 'utf8') === text, file).toBe(true)
      expect(text.length).toBeLessThan(150_000)
    }
  })

  it.each(demoCaptures().map((capture) => [capture.name, capture] as const))(
    '%s is reduced to its truth with the warnings it is made for',
    (name, { truth, warnings }) => {
      const document = reduced(name)
      expect(document.warnings.map(({ code }) => code)).toEqual(warnings)
      if (truth === null) {
        expect(document.recovery).toBe('none-measurable')
        expect(document.upper_bound!.qrr_c).toBeLessThan(20e-12)
        return
      }
      const skewed = warnings.includes('skew')
      for (const [figure, key] of Object.entries(keys)) {
        if (truth[figure] === undefined || (skewed && figure === 'energy')) continue
        expect(Math.abs((document.row[key] as number) / truth[figure]! - 1), `${name} ${key}`).toBeLessThan(0.05)
      }
    },
  )
})

describe('the bench beside the sheet', () => {
  const records = (file: string) => readRecords(readFileSync(file, 'utf8'), file).value!
  const ranked = (stage: string, change = (text: string) => text): RankResult => {
    const file = `catalogs-demo/bench/${stage}.yaml`
    const bench = readRecords(change(readFileSync('catalogs-demo/bench/records.yaml', 'utf8')), 'records.yaml').value!
    const all = [...bench, ...records('catalogs-demo/rectifiers/larch-600v-8a-soft.yaml')]
    return rank(readStage(readFileSync(file, 'utf8'), file).value!.stage, all, {
      seed: 1,
      draws: 1000,
      version: '0',
      inputs: [],
    })
  }

  it('a 12 mA fixture alone leaves more doubt at 6 A than the sheet, and both together leave least', () => {
    const { candidates } = ranked('press-boost')
    const width = (id: string) => {
      const { low, high } = candidates.find((candidate) => candidate.id === id)!.interval_w!
      return Math.log(high / low)
    }
    expect(width('medlar-both')).toBeLessThan(0.9 * width('medlar-sheet-alone'))
    expect(width('medlar-sheet-alone')).toBeLessThan(0.9 * width('medlar-fixture-alone'))
  })

  it('the capture of unit 3 turns the ranking of the dryer and decides it', () => {
    const before = ranked('dryer-boost')
    expect([before.verdict.best, before.verdict.decided]).toEqual(['bench-unit-3', false])
    const { row, spread } = reduced('clean')
    const measured = `    - {fixture: ramp, current: ${row.current_a} A, slope: ${row.slope_a_per_s} A/s, voltage: 390 V, trr: ${row.trr_s} s, trr_by: line-90-25, qrr: ${row.qrr_c} C, irrm: ${row.peak_reverse_a} A, junction: 25 degC, grade: measured, spread: ${100 * spread.row!} %}\n`
    const after = ranked('dryer-boost', (text) =>
      text.replace(/(.*grade: typical, source: "headline"\}\n)/, `$1${measured}`),
    )
    expect([after.verdict.best, after.verdict.decided]).toEqual(['larch-600v-8a-soft', true])
  })
})
