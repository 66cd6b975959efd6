import { createHash } from 'node:crypto'
import { readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { runCheck } from '../../src/commands/check.ts'
import { CommandFailure } from '../../src/commands/failure.ts'
import { runReview } from '../../src/commands/review.ts'
import type { RankResult } from '../../src/domain/result.ts'
import { chargeAtTurnOff, rampRecovery } from '../../src/models/charge-control.ts'
import { renderMarkdown } from '../../src/report/render-markdown.ts'
import { words } from '../../src/report/words/words.ts'
import { recordLedger } from '../../src/study/input-ledger.ts'
import { trend } from '../../src/study/trend.ts'
import { scratchFolder } from '../commands/scratch.ts'
import { recordingSession } from '../commands/session-double.ts'
import { candidateOf, recordOf, records } from '../demo/orchard.ts'
import { record as recordWith } from '../evidence/records.ts'
import { kelvin } from '../stage/samples.ts'
import { alone, settings } from '../study/settings.ts'
import { demoStage, hotStage, idealCooling, missing, placed, rankShelf, sum } from './workbench.ts'

/** The review of the pump's best known parts, written to a file of that ending. */
async function reviewed(ending: string): Promise<string> {
  const output = join(scratchFolder(), `review${ending}`)
  const only = ['alder-200v-16a']
  const options = { output, only, seed: 1, draws: 60, quiet: true }
  await runReview('catalogs-demo/stages/pump-boost.yaml', options, recordingSession())
  return readFileSync(output, 'utf8')
}

describe('review and daily use', () => {
  it('26: the review document holds what a reviewer asks for, with hashes of its inputs, and is the same to the byte when made again', async () => {
    const text = await reviewed('.md')
    const headings = text.replace(/^(?!#).*\n/gm, '')
    const sections = [
      /scope and limits/i,
      /typical and high/i,
      /margin/i,
      /cautions/i,
      /sensitivity/i,
      /assumption ledger/i,
    ]
    expect(missing(headings, ...sections, /equations/i, /open points/i, /input files/i)).toEqual([])
    const hash = createHash('sha256').update(readFileSync('catalogs-demo/rectifiers/alder-200v-16a.yaml')).digest('hex')
    const { stage_loss_w, losses_w } = candidateOf(rankShelf(demoStage('pump-boost')), 'alder-200v-16a')
    const figures = new RegExp(
      `\\| alder-200v-16a \\| ${stage_loss_w!.toFixed(2)} \\|.* ${losses_w.total!.toFixed(2)} \\|`,
    )
    const inputs = [new RegExp(`alder-200v-16a\\.yaml \\| ${hash}`), /\| table 3 \| .*alder-200v-16a\.yaml:15 \|/]
    expect(missing(text, figures, ...inputs, /P\. O\. Lauritzen.*1991, 188-191/)).toEqual([])
    expect((await reviewed('.md')) === text, 'made again').toBe(true)
    const page = await reviewed('.html')
    expect([page.includes(hash), (await reviewed('.html')) === page]).toEqual([true, true])
  })

  it('27: what carries the doubt is listed in order, and the measurement named next narrows the gap as promised', () => {
    const at = demoStage('frost-sensor-boost')
    const before = rankShelf(at, 400)
    const { sensitivity, measure_next } = before.verdict
    const shares = sensitivity!.map(({ share }) => share)
    expect(shares).toEqual(shares.toSorted((a, b) => b - a))
    expect(sum(shares)).toBeCloseTo(1, 1)
    const next = measure_next![0]!
    expect(next).toMatchObject({ id: 'clover-100v-6a', property: 'forward' })
    const place = { name: 'forward row of the bench', file: 'bench.yaml', line: 1, column: 1 }
    const drop = candidateOf(before, next.id).forward_v!
    const row = {
      current: next.current_a,
      drop,
      junction: kelvin(next.junction_c),
      grade: 'measured',
      spread: null,
      source: null,
      place,
    } as const
    const measured = records.map((part) => (part.id === next.id ? { ...part, forward: [...part.forward, row] } : part))
    const width = ({ verdict }: RankResult): number => verdict.gap_high_w! - verdict.gap_low_w!
    expect(width(rankShelf(at, 400, measured)) / width(before)).toBeLessThan(1.1 * Math.sqrt(1 - next.share))
  })

  it('28: along the load both efficiency and watts are given, and the one follows from the other', () => {
    const request = { over: 'load', from: 0.2, to: 1, steps: 3, logarithmic: false } as const
    const parts = ['alder-200v-16a', 'cedar-200v-20a'].map(recordOf)
    const { points } = trend({ ...demoStage('pump-boost'), candidates: null }, parts, request, settings(0))
    for (const { at, candidates } of points)
      for (const { id, efficiency, stage_loss_w } of candidates)
        expect(efficiency, `${id} at ${at}`).toBeCloseTo((600 * at) / (600 * at + stage_loss_w!), 12)
    const [light, , full] = points.map(({ candidates }) => candidates[0]!.stage_loss_w!)
    expect(full! / light!).toBeGreaterThan(2)
  })

  it('29: what is not covered is a fixed list that every result prints in sentences', () => {
    const stages = ['pump-boost', 'pack-buck', 'sprayer-inverting', 'low-line-mains']
    const lists = stages.map((name) => rankShelf(demoStage(name)).not_covered)
    const always = lists[0]!.filter((code) => lists.every((list) => list.includes(code)))
    expect(always).toEqual([
      'loss-feedback',
      'electromagnetic-noise',
      'ringing-loss',
      'snappy-overshoot',
      'gate-loss',
      'capacitor-losses',
      'transient-temperature',
      'ac-resistance',
      'lifetime',
      'price',
    ])
    const result = words(rankShelf(demoStage('pump-boost')))
    expect(result.not_covered.filter((text) => !/^[A-Z].{15,}\.$/.test(text))).toEqual([])
    const page = renderMarkdown(result)
    for (const text of result.not_covered) expect(page).toContain(`- ${text}`)
  })

  it('30: a transistor as rectifier conducts by its body diode in the dead times, and recovers what they have stored', () => {
    const cab = demoStage('tractor-sync-buck')
    const aspen = recordOf('aspen-60v-40a-channel')
    const drawn = (before: number) =>
      candidateOf(rankShelf(cab, 0, [{ ...aspen, deadTime: { before, after: 30e-9 } }]), aspen.id)
    const part = drawn(40e-9)
    const { stored_c, current_a, tau_s } = part.event!
    expect(
      stored_c / (tau_s! * current_a * -Math.expm1(-40e-9 / tau_s!)),
      'built up in 40 ns at the valley',
    ).toBeCloseTo(1, 6)
    const longer = drawn(80e-9)
    expect(longer.event!.qrr_c).toBeGreaterThan(1.3 * part.event!.qrr_c)
    const { valley_a: low, peak_a: high, duty } = part.point!
    const square = (low * low + low * high + high * high) / 3
    const channel = square * 5.2e-3 * (1 + 0.006 * (part.junction_c! - 25)) * (1 - duty - 70e-9 * 200e3)
    // The diode's two dead times at its hot drop, between 0.5 and 1 V.
    const drop = (part.losses_w.conduction! - channel) / ((low * 40e-9 + high * 30e-9) * 200e3)
    expect([drop > 0.5, drop < 1]).toEqual([true, true])
  })

  it('31: a conduction too short to fill the junction leaves less charge to recover', () => {
    // 8 A for 20 ns, 200 A/us, 60 and 20 ns: 136.06 nC stored, 98.5853 nC recovered; steady state: 179.762 nC. By an ODE solver.
    const part = { current: 8, slope: 200e6, lifetime: 60e-9, tailTime: 20e-9 }
    const storedCharge = chargeAtTurnOff({ ...part, peakCurrent: 8, conductionTime: 20e-9 })
    expect(storedCharge).toBeCloseTo(136.06e-9, 10)
    expect(rampRecovery({ ...part, storedCharge }).charge).toBeCloseTo(98.5853e-9, 13)
    expect(rampRecovery({ ...part, storedCharge: 8 * 60e-9 }).charge).toBeCloseTo(179.762e-9, 12)
    const slow = recordWith({ class: 'fast', thermal: idealCooling })
    const { stored_c, current_a, tau_s } = alone({ ...hotStage, frequency: 1e6 }, slow).event!
    expect(stored_c / (current_a * tau_s!), 'half a microsecond in the stage').toBeCloseTo(
      -Math.expm1(-0.5e-6 / tau_s!),
      1,
    )
    expect(stored_c).toBeLessThan(0.9 * current_a * tau_s!)
  })

  it('32: paralleled parts share unequally: the hottest is judged, the rows are those of all', () => {
    const rail = (parallel: string) =>
      rankShelf(demoStage('sprayer-inverting', (text) => text.replace('{parts: 2, imbalance: 10 %}', parallel)))
    const part = (parallel: string, id = 'clover-100v-6a') => candidateOf(rail(parallel), id)
    const [uneven, even] = [part('{parts: 2, imbalance: 10 %}'), part('{parts: 2, imbalance: 0 %}')]
    expect(uneven.event!.current_a / uneven.point!.valley_a).toBeCloseTo(0.55, 9)
    expect(even.event!.current_a / even.point!.valley_a).toBeCloseTo(0.5, 9)
    expect(uneven.junction_c!).toBeGreaterThan(even.junction_c! + 1)
    const [one, two] = ['{parts: 1, imbalance: 0 %}', '{parts: 2, imbalance: 10 %}'].map(
      (each) => part(each, 'reed-100v-5a').losses_w.capacitive!,
    )
    expect(two! / one!).toBeCloseTo(2, 9)
  })

  it('33: a snubber that is given costs C V² f, in the stage and in no row of the rectifier', () => {
    const with330 = rankShelf(demoStage('pack-buck'))
    const without = rankShelf(demoStage('pack-buck', (text) => text.replace(/^snubber.*\n/m, '')))
    for (const { id, snubber_w, stage_loss_w, losses_w } of placed(with330)) {
      expect(snubber_w).toBeCloseTo(330e-12 * 48 ** 2 * 150e3, 12)
      expect(stage_loss_w! - candidateOf(without, id).stage_loss_w!).toBeCloseTo(snubber_w, 9)
      expect(losses_w).toEqual(candidateOf(without, id).losses_w)
    }
  })

  it('34: the junction follows from the chain of thermal resistances, and the mounting they hold for is printed', () => {
    const pump = rankShelf(demoStage('pump-boost'))
    const { losses_w, switch: own, junction_c } = candidateOf(pump, 'alder-200v-16a')
    const rectifier = sum([
      losses_w.conduction,
      losses_w.recovery_rectifier,
      losses_w.leakage,
      losses_w.forward_recovery,
    ])
    const beside = sum([
      losses_w.recovery_switch,
      losses_w.capacitive,
      own.conduction_w,
      own.turn_on_base_w,
      own.turn_off_w,
      own.stored_w,
    ])
    expect(junction_c).toBeCloseTo(45 + 2 * (rectifier + beside) + (1.5 + 0.5) * rectifier, 4)
    expect(own.junction_c).toBeCloseTo(45 + 2 * (rectifier + beside) + 0.9 * beside, 4)
    const sensor = candidateOf(rankShelf(demoStage('frost-sensor-boost')), 'clover-100v-6a')
    const heat = sum([sensor.losses_w.conduction, sensor.losses_w.recovery_rectifier, sensor.losses_w.leakage])
    expect(sensor.junction_c).toBeCloseTo(55 + 48 * heat, 4)
    const mounting = recordLedger(recordOf('clover-100v-6a')).find(({ path }) => path.includes('mounting'))
    expect(mounting!.value).toBe('on 6 cm2 of 70 um copper')
  })

  it('35: a silicon-carbide part on the mains gets a caution about the surge at start-up, and no other does', () => {
    const surge = (name: string, ...candidates: readonly string[]) =>
      words(rankShelf({ ...demoStage(name), candidates })).cautions.find(({ code }) => code === 'surge-silicon-carbide')
    const { text } = surge('cold-store-mains', 'quartz-650v-6a-sic', 'larch-600v-8a-soft')!
    expect(text).toMatch(/start-up.*quartz-650v-6a-sic.*surge/)
    expect(surge('cold-store-mains', 'larch-600v-8a-soft')).toBeUndefined()
    expect(surge('kiln-boost', 'garnet-650v-10a-sic'), 'fed from a battery').toBeUndefined()
  })

  it('36: all errors are told at once, each with its place, what stands there, what is wanted, a hint and a code', async () => {
    const folder = scratchFolder()
    const [file, parts] = [join(folder, 'stage.yaml'), join(folder, 'parts.yaml')]
    writeFileSync(
      file,
      'stage: boost\ninput: {voltage: 48}\noutput: {voltage: 120 V, current: 5,5 A}\nfrequncy: 100 kHz\nfrequency: 100 khz\ninductor: {inductance: 150 uH}\ncooling: {case: 80 degC}\nrecords: [parts.yaml]\n',
    )
    writeFileSync(
      parts,
      'id: a\nclass: schotky\nratings: {reverse_voltage: 100 V, average_current: 5 A, junction: 150 degC}\n',
    )
    const failure = await runCheck([file], {}, recordingSession()).then(
      () => null,
      (error: unknown) => error,
    )
    if (!(failure instanceof CommandFailure)) throw new Error('nothing was refused')
    const told = failure.problems.map(({ file: place, line, column, code, found }) => [
      place.slice(folder.length + 1),
      line,
      column,
      code,
      found,
    ])
    expect(told).toEqual([
      ['parts.yaml', 2, 8, 'word-unknown', 'schotky'],
      ['stage.yaml', 2, 18, 'unit-missing', '48'],
      ['stage.yaml', 3, 35, 'number-decimal-comma', '5,5 A'],
      ['stage.yaml', 4, 1, 'key-unknown', 'frequncy'],
      ['stage.yaml', 5, 12, 'unit-unknown', '100 khz'],
    ])
    const said = Object.fromEntries(failure.problems.map(({ code, expected, hint }) => [code, `${expected} | ${hint}`]))
    expect(said).toMatchObject({
      'word-unknown': expect.stringContaining('"schottky"'),
      'unit-missing': expect.stringContaining('48 V'),
      'number-decimal-comma': expect.stringContaining('after a point'),
      'key-unknown': expect.stringContaining('"frequency"'),
      'unit-unknown': expect.stringContaining('"kHz"'),
    })
  })
})
