import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { runRank } from '../../src/commands/rank.ts'
import { runReduce } from '../../src/commands/reduce.ts'
import { runReview } from '../../src/commands/review.ts'
import { runSwap } from '../../src/commands/swap.ts'
import { runTrend } from '../../src/commands/trend.ts'
import type { Stage } from '../../src/domain/stage.ts'
import { renderMarkdown } from '../../src/report/render-markdown.ts'
import { words } from '../../src/report/words/words.ts'
import { stageCautions } from '../../src/study/cautions.ts'
import { scratchFolder } from '../commands/scratch.ts'
import { recordingSession } from '../commands/session-double.ts'
import { smallStage } from '../end-to-end/small-stage.ts'
import { demoStage, missing, rankShelf } from './workbench.ts'

/** What each caution has to say, in the words that a person would look for. */
const asked: Readonly<Record<string, RegExp>> = {
  'lethal-voltage': /lethal voltage.*can kill/i,
  'qualified-persons': /qualified persons.*licensed.*local code/i,
  'bulk-capacitor': /bulk capacitor.*isolate, discharge and measure/i,
  'isolated-probing': /differential or isolated probes/i,
  'fuse-and-insulation': /fuse.*insulation.*local code/i,
  'estimate-only': /estimates.*confirm.*on the bench before release/i,
}

type Session = ReturnType<typeof recordingSession>
type Run = (options: object, session: Session) => Promise<number>

const stagePath = 'catalogs-demo/stages/pump-boost.yaml'
const study = { seed: 1, draws: 20, quiet: true, only: ['alder-200v-16a', 'cedar-200v-20a'] }
const runs: Readonly<Record<string, Run>> = {
  rank: (options, session) => runRank(stagePath, { ...study, ...options }, session),
  trend: (options, session) =>
    runTrend(stagePath, { ...study, over: 'load', from: '50 %', to: '100 %', steps: 2, ...options }, session),
  swap: (options, session) => runSwap(stagePath, { ...study, to: 'cedar-200v-20a', ...options }, session),
  review: (options, session) => runReview(stagePath, { ...study, ...options }, session),
  reduce: (options, session) => runReduce('catalogs-demo/captures/clean.yaml', { quiet: true, ...options }, session),
}

/** Markup and line breaks taken away, as a reader sees it. */
const read = (text: string): string => text.replace(/<[^>]*>|[\\*]/g, ' ').replace(/\s+/g, ' ')

/** What a command says on stdout, stderr and in the file it writes. */
async function said(command: string, options: object, ending = '') {
  const session = recordingSession()
  const output = ending === '' ? null : join(scratchFolder(), `out${ending}`)
  await runs[command]!({ ...options, ...(output === null ? {} : { output }) }, session)
  return {
    result: output === null ? session.printed.join('') : readFileSync(output, 'utf8'),
    err: session.told.join(''),
  }
}

const studies = ['rank', 'trend', 'swap']
const forms: readonly (readonly [string, string, object, string])[] = [
  ...studies.flatMap((command) => [
    [command, 'table', {}, ''] as const,
    [command, 'json', { json: true }, ''] as const,
    [command, 'markdown', { markdown: true }, ''] as const,
    [command, 'txt', {}, '.txt'] as const,
    [command, 'html', {}, '.html'] as const,
  ]),
  ['review', 'html', {}, '.html'],
  ['review', 'markdown', {}, '.md'],
  ['reduce', 'table', {}, ''],
  ['reduce', 'json', { json: true }, ''],
]
const besides = [
  ...studies.flatMap((command) => [[command, '.csv'] as const, [command, '.svg'] as const]),
  ['reduce', '.svg'] as const,
]

const cautioned = (stage: Stage): readonly string[] => stageCautions(stage, [], [null]).map(({ code }) => code)
const dc = (kind: Stage['kind'], input: number, output: number): Stage => {
  const base = demoStage('pump-boost')
  return {
    ...base,
    kind,
    input: { kind: 'dc', voltage: input },
    output: { ...base.output, voltage: output },
    dutyProfile: null,
  }
}

describe('above 60 V dc, above 42.4 V peak or fed from the mains', () => {
  it.each(forms)(
    'safety: %s as %s carries every caution in full, --quiet included',
    async (command, _form, options, ending) => {
      const { result } = await said(command, options, ending)
      expect(missing(read(result), ...Object.values(asked))).toEqual([])
    },
  )

  it.each(besides)(
    'safety: %s as %s, which has no room for sentences, tells every caution on stderr, --quiet included',
    async (command, ending) => {
      const { result, err } = await said(command, {}, ending)
      for (const [code, sentence] of Object.entries(asked)) {
        expect(
          err.split('\n').find((line) => line.startsWith(`caution  ${code}  `)),
          code,
        ).toMatch(sentence)
        if (ending === '.csv') expect(result.split('\n')[1]!.split(',').at(-1), code).toContain(code)
      }
      if (ending === '.svg' && command !== 'reduce') expect(missing(result, /lethal/i)).toEqual([])
    },
  )

  it('safety: anything above 60 V dc or 42.4 V peak gets the cautions, and a stage below both gets none', () => {
    expect(cautioned(dc('boost', 12, 24))).toEqual([])
    expect(cautioned(dc('buck', 42.4, 12)), 'the switching node swings by the input').toEqual([])
    expect(cautioned(dc('buck', 42.5, 12))).toEqual(Object.keys(asked))
    expect(cautioned(dc('inverting', 24, 24)), 'it swings by both').toEqual(Object.keys(asked))
    expect(cautioned(dc('boost', 24, 60.1))).toEqual(Object.keys(asked))
    const ringing = words(rankShelf({ ...demoStage('tractor-sync-buck'), candidates: ['sedge-60v-15a'] }))
    expect(ringing.candidates[0]!.event!.peak_reverse_v, 'with its overshoot').toBeGreaterThan(42.4)
    expect(ringing.cautions.length, 'overshoot counts').toBe(Object.keys(asked).length)
  })

  it('safety: a stage harmless with its overshoot has no caution', () => {
    const low = {
      ...demoStage('tractor-sync-buck'),
      input: { kind: 'dc', voltage: 15 },
      output: { voltage: 5, current: 5, capacitance: null, bleeder: null },
      candidates: ['sedge-60v-15a'],
    } as const
    const result = words(rankShelf(low))
    expect(result.candidates[0]!.event!.peak_reverse_v).toBeLessThan(42.4)
    expect(result.cautions).toEqual([])
    expect(missing(renderMarkdown(result), /caution/i, /lethal/i).length, 'nor a word of one in its text').toBe(2)
  })

  it('safety: anything fed from the mains gets them and is called live, whatever its output', () => {
    const fed = words(rankShelf({ ...demoStage('low-line-mains'), candidates: ['hornbeam-600v-8a'] }))
    expect(fed.cautions.map(({ code }) => code)).toEqual([
      'lethal-voltage',
      'mains-fed',
      ...Object.keys(asked).slice(1),
    ])
    const { text } = fed.cautions.find(({ code }) => code === 'mains-fed')!
    // 120 V and 10 % more: 132 V, 186.7 V peak.
    expect(text).toMatch(/fed from the mains \(120 V, up to 187 V peak\).*to be taken as live/)
  })

  it('safety: the bulk capacitor stands there with its time and its energy', () => {
    const { cautions } = words(rankShelf(demoStage('pump-boost')))
    const { text, data } = cautions.find(({ code }) => code === 'bulk-capacitor')!
    expect(data.energy).toBeCloseTo((470e-6 * 120 ** 2) / 2, 9)
    expect(data.time).toBeCloseTo(10e3 * 470e-6 * Math.log(120 / 60), 9)
    expect(text).toMatch(/470 µF at 120 V holds 3\.38 J.*10 kΩ takes 3\.26 s to bring it down to 60 V/)
    const bare = words(
      rankShelf({
        ...demoStage('pump-boost'),
        output: { voltage: 120, current: 5, capacitance: 470e-6, bleeder: null },
      }),
    )
    expect(bare.cautions.find(({ code }) => code === 'bulk-capacitor')!.text).toContain('stay charged for hours')
  })

  it('safety: no option takes a caution away, and a rejected or lost part does not either', async () => {
    const folder = smallStage()
    const codesOf = async (options: object): Promise<readonly string[]> => {
      const session = recordingSession()
      await runRank(join(folder, 'stage.yaml'), { seed: 1, draws: 1, json: true, ...options }, session)
      return JSON.parse(session.printed.join('')).cautions.map(({ code }: { code: string }) => code)
    }
    for (const options of [{}, { quiet: true }, { strict: true }, { only: ['small'] }, { top: 2 }, { seed: 9 }])
      expect(await codesOf(options), JSON.stringify(options)).toEqual(Object.keys(asked))
    const lost = rankShelf({ ...demoStage('pump-boost'), candidates: ['juniper-200v-10a-fast'] })
    expect([lost.candidates[0]!.thermal, lost.cautions.length]).toEqual(['none', Object.keys(asked).length])
  })
})
