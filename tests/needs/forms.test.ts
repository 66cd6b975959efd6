import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import type { OutputOptions } from '../../src/commands/delivery.ts'
import { outcomeOf } from '../../src/commands/outcome.ts'
import { runRank } from '../../src/commands/rank.ts'
import type { TrendRequest } from '../../src/domain/study.ts'
import { renderChart } from '../../src/report/charts/render-chart.ts'
import { renderReviewHtml } from '../../src/report/review/render-review-html.ts'
import { words } from '../../src/report/words/words.ts'
import { review } from '../../src/study/review.ts'
import { trend } from '../../src/study/trend.ts'
import { scratchFolder } from '../commands/scratch.ts'
import { recordingSession } from '../commands/session-double.ts'
import { candidateOf, recordOf, records, warnedAbout } from '../demo/orchard.ts'
import { numbersIn, silicon } from '../stage/samples.ts'
import { alone, ranked, settings, warningCodes } from '../study/settings.ts'
import { demoStage, hotStage, idealCooling, missing, placed, rankShelf, typedParts } from './workbench.ts'

interface Asked extends OutputOptions {
  readonly only?: readonly string[]
  readonly strict?: boolean
  readonly quiet?: boolean
}

/** `ebbwatt rank` of a stage of the demonstration, with what stood on both streams. */
async function rankCommand(name: string, options: Asked = {}) {
  const session = recordingSession()
  const argv = ['rank', name, ...(options.json === true ? ['--json'] : [])]
  const code = await outcomeOf(session, argv, () =>
    runRank(`catalogs-demo/stages/${name}.yaml`, { seed: 1, draws: 50, ...options }, session),
  )
  return { code, out: session.printed.join(''), err: session.told.join('') }
}

async function written(ending: string): Promise<string> {
  const output = join(scratchFolder(), `ranking${ending}`)
  await rankCommand('pump-boost', { output })
  return readFileSync(output, 'utf8')
}

describe('forms of a result', () => {
  it('37: a script is served: results alone on stdout, one JSON document, exit codes that tell, no colour where none is wanted', async () => {
    const done = await rankCommand('pump-boost', { json: true, only: ['alder-200v-16a'] })
    expect([done.code, JSON.parse(done.out).candidates.length, done.err]).toEqual([0, 1, ''])
    const unknown = await rankCommand('pump-boost', { json: true, only: ['aldr-200v-16a'] })
    expect([unknown.code, JSON.parse(unknown.out).error.problems[0].hint]).toEqual([
      2,
      'did you mean "alder-200v-16a"?',
    ])
    expect(unknown.err).toContain('id-unknown')
    const none = await rankCommand('pump-boost', { json: true, only: ['elm-150v-20a'] })
    expect([none.code, JSON.parse(none.out).candidates[0].id]).toEqual([3, 'elm-150v-20a'])
    const strict = await rankCommand('pump-boost', { json: true, only: ['hazel-200v-16a'], strict: true })
    expect([strict.code, JSON.parse(strict.out).candidates.length]).toEqual([4, 1])
    const { out } = await rankCommand('pump-boost')
    expect(out).not.toContain('\u001B')
    expect(Math.max(...out.split('\n').map((line) => [...line].length)), 'as wide as the session').toBeLessThanOrEqual(
      100,
    )
  })

  it('38: a result comes as CSV with units in its header, JSON, Markdown and one page of HTML without outside references', async () => {
    const csv = await written('.csv')
    const header = csv.split('\n')[0]!
    expect(header).toMatch(/^rank,part,stage loss \(W\),.*Tj \(°C\).*Qrr \(nC\),I_RM \(A\).*,cautions$/)
    const numbers = csv.split('\n')[1]!.split(',').slice(2, 8)
    expect(
      numbers.filter((cell) => !/^-?\d+(\.\d+)?(e-?\d+)?$/.test(cell)),
      'plain numbers, no units in cells',
    ).toEqual([])
    expect(JSON.parse(await written('.json'))).toMatchObject({ format: 1, tool: { name: 'ebbwatt' } })
    expect(missing(await written('.md'), /^# .*\n/, /\n\| rank \| part \|.*\n\| ---: \| --- \|/)).toEqual([])
    const page = await written('.html')
    expect(page.match(/(?:src|href)\s*=|url\((?!#)|@import|https?:\/\/(?!www\.w3\.org\/2000\/svg)/g)).toBeNull()
    expect(missing(page, /^<!DOCTYPE html>/, /default-src 'none'/)).toEqual([])
  })

  it('39: the ranking shows all that a choice is made from, from rank and class to total, high and evidence', async () => {
    const columns = (await written('.csv')).split('\n')[0]!
    const asked = [
      'rank',
      'part',
      'class',
      'voltage margin (%)',
      'V_F hot (V)',
      'Qrr (nC)',
      'I_RM (A)',
      'softness',
      'conduction (W)',
      '"recovery, rectifier (W)"',
      '"recovery, switch (W)"',
      'capacitive (W)',
      'leakage (W)',
      'forward recovery (W)',
      'total (W)',
      'total high (W)',
      'Tj (°C)',
      'Tj high (°C)',
      'evidence',
    ]
    expect(asked.filter((column) => !`,${columns},`.includes(`,${column},`))).toEqual([])
    const page = await written('.md')
    const lacks = (column: string) => !page.includes(`| ${column.replaceAll('"', '').replace('_', '\\_')} |`)
    expect(asked.filter(lacks), 'in Markdown').toEqual([])
  })

  it('40: plots show rows stacked, crossings, loss over slope, temperature to its edge, efficiency, the waveform, and what is extrapolated', () => {
    const at = { ...demoStage('pump-boost'), dutyProfile: null, candidates: ['alder-200v-16a', 'birch-200v-20a-soft'] }
    const bars = renderChart(words(rankShelf(at, 20)))
    const rows = [/>conduction</, />recovery, rectifier</, />recovery, switch</, />capacitive</, />leakage</]
    expect(missing(bars, ...rows, />forward recovery</)).toEqual([])
    const drawn = (request: Omit<TrendRequest, 'steps' | 'logarithmic'>, stage = at) =>
      renderChart(words(trend(stage, records, { ...request, steps: 6, logarithmic: false }, settings(0))))
    const cheaper = />21\.8 %: above it alder-200v-16a is cheaper than birch-200v-20a-soft</
    const far = />dashed: read far beyond the data<[\s\S]*stroke-dasharray/
    expect(missing(drawn({ over: 'load', from: 0.1, to: 1 }), />Efficiency against load</, cheaper, far)).toEqual([])
    const fan = {
      ...demoStage('low-line-mains'),
      dutyProfile: null,
      candidates: ['hornbeam-600v-8a', 'quartz-650v-6a-sic'],
    }
    const crossover = /kHz: above it quartz-650v-6a-sic is cheaper than hornbeam-600v-8a</
    expect(missing(drawn({ over: 'frequency', from: 10e3, to: 60e3 }, fan), crossover)).toEqual([])
    const edge = />81\.\d °C: birch-200v-20a-soft exceeds its junction limit</
    const heated = drawn({ over: 'ambient', from: 300, to: 380 })
    expect(missing(heated, edge, />Junction of the rectifier against ambient</)).toEqual([])
    expect(missing(drawn({ over: 'slope', from: 100e6, to: 2e9 }), />Stage loss against current slope</)).toEqual([])
    const page = renderReviewHtml(
      review({ ...at, candidates: ['alder-200v-16a'] }, records, settings(0)),
      { stage: at, records: [], settings: settings(0) },
      { script: '', digest: () => '' },
    )
    const wave = /Current and reverse voltage of alder-200v-16a at one turn-on of the switch/
    const rings = />row 1: 16(?:\.0)? A, 25 °C</
    expect(
      missing(page, /Shares of turn-on with alder-200v-16a/, wave, rings, /dashed where it lies beyond the rows/),
    ).toEqual([])
  })

  it('41: five or six inputs give a first estimate, with its assumptions printed and a band that is wider for them', () => {
    const quick = demoStage('quick-estimate')
    const tried = ['alder-200v-16a', 'larch-600v-8a-soft', 'nettle-200v-16a']
    const result = rankShelf({ ...quick, candidates: tried }, 300)
    const assumed = Object.fromEntries(result.stage.assumed.map(({ path, value }) => [path, value]))
    expect(assumed).toMatchObject({
      'switch.slope': '300 A/us',
      'switch.voltage_fall': '20 ns',
      'switch.on_resistance': '50 mohm',
    })
    expect(quick.spread).toMatchObject({ slope: 0.5, voltageFall: 0.5 })
    const known = rankShelf(
      { ...quick, spread: { slope: 0.05, voltageFall: 0.05, thermal: 0.05 }, candidates: tried },
      300,
    )
    expect(placed(result).length).toBe(3)
    for (const id of tried) {
      const [wide, narrow] = [result, known].map((each) => candidateOf(each, id).interval_w!)
      expect((wide!.high - wide!.low) / (narrow!.high - narrow!.low), id).toBeGreaterThan(1.02)
    }
  })

  it('42: energy per event and power are never mixed: their keys say which, and the frequency leads from one to the other', () => {
    const pump = rankShelf(demoStage('pump-boost'))
    for (const { event, losses_w, switch: own } of placed(pump)) {
      expect(event!.rectifier_j * 100e3).toBeCloseTo(losses_w.recovery_rectifier!, 9)
      expect(event!.switch_added_j * 100e3).toBeCloseTo(losses_w.recovery_switch!, 9)
      if (event!.none === null) expect(event!.base_j * 100e3).toBeCloseTo(own.turn_on_base_w!, 9)
      expect(Object.keys(event!).filter((key) => key.endsWith('_w'))).toEqual([])
    }
    const keys = numbersIn(candidateOf(pump, 'alder-200v-16a')).map(([path]) => path)
    expect(keys.filter((path) => path.endsWith('_j')).every((path) => /^\.event(_maximum)?\./.test(path))).toBe(true)
    const part = silicon({ capacitance: null, thermal: idealCooling })
    const [slow, fast] = [50e3, 100e3].map((frequency) => alone({ ...hotStage, frequency }, part))
    expect(fast!.event!.rectifier_j / slow!.event!.rectifier_j, 'one event costs what it costs').toBeCloseTo(1, 3)
    expect(fast!.losses_w.recovery_rectifier! / slow!.losses_w.recovery_rectifier!).toBeCloseTo(2, 2)
  })

  it('43: the same input and seed give the same result, and another seed moves the band alone', async () => {
    const [one, two] = [
      await rankCommand('pump-boost', { json: true }),
      await rankCommand('pump-boost', { json: true }),
    ]
    expect(two.out).toBe(one.out)
    const session = recordingSession()
    await runRank('catalogs-demo/stages/pump-boost.yaml', { seed: 2, draws: 50, json: true }, session)
    const [first, other] = [one.out, session.printed.join('')].map((text) => JSON.parse(text).candidates[0])
    expect([other.losses_w, other.junction_c, other.rank]).toEqual([first.losses_w, first.junction_c, first.rank])
    expect(other.interval_w.high).not.toBe(first.interval_w.high)
    expect(Math.abs(other.interval_w.high / first.interval_w.high - 1)).toBeLessThan(0.1)
  })

  it('44: a figure that its class does not show is warned about, and used as it stands', () => {
    const part = (trr: string, drop = '1.6 V') =>
      typedParts(`id: odd
class: ultrafast
ratings: {reverse_voltage: 600 V, average_current: 8 A, junction: 175 degC}
thermal: {junction_to_case: 0.1 K/W}
forward: [{current: 8 A, drop: ${drop}, junction: 25 degC}]
recovery: [{fixture: ramp, current: 8 A, slope: 100 A/us, voltage: 400 V, junction: 25 degC, trr: ${trr}, trr_by: line-90-25}]
`)[0]!
    const slow = ranked(hotStage, part('900 ns'))
    const { data, text } = words(slow).warnings.find(({ code }) => code === 'implausible-for-class')!
    expect(data).toMatchObject({ property: 'The carrier lifetime', row: 'recovery row 1' })
    expect(Number.parseFloat(String(data.value))).toBeGreaterThan(
      10 * Number.parseFloat(String(data.expected).split('to')[1]!),
    )
    expect(text).toMatch(/is far from what its class shows.*Check the value, its unit and the class/)
    expect(slow.candidates[0]!.event!.trr_s, 'read as 900 ns').toBeGreaterThan(400e-9)
    expect(warningCodes(ranked(hotStage, part('40 ns', '0.2 V')))).toContain('implausible-for-class')
    expect(warningCodes(ranked(hotStage, part('40 ns')))).not.toContain('implausible-for-class')
    for (const id of ['larch-600v-8a-soft', 'cedar-200v-20a'])
      expect(warningCodes(ranked(hotStage, { ...recordOf(id), thermal: idealCooling }))).not.toContain(
        'implausible-for-class',
      )
  })

  it('45: recovery that takes a large part of an interval is flagged with its share', () => {
    const quick = { ...hotStage, frequency: 1e6 }
    const part = silicon({ thermal: idealCooling })
    const flagged = ranked(quick, part)
    const { current_a, slope_a_per_s, trr_s } = flagged.candidates[0]!.event!
    const { duty } = flagged.candidates[0]!.point!
    const { data } = flagged.warnings.find(
      ({ code, data: { interval } }) => code === 'recovery-share-of-interval' && interval === 'on-time',
    )!
    expect(data.share, 'fall of the current and trr over the on-time').toBeCloseTo(
      (current_a / slope_a_per_s + trr_s) / (duty / 1e6),
      9,
    )
    expect(warnedAbout(ranked({ ...hotStage, frequency: 50e3 }, part), part.id)).not.toContain(
      'recovery-share-of-interval',
    )
  })
})
