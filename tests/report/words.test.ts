import { describe, expect, it } from 'vitest'
import { caveatCodes } from '../../src/domain/caveat.ts'
import type { RankResult } from '../../src/domain/result.ts'
import { cautionCodes } from '../../src/report/words/caution-words.ts'
import { notCoveredWords } from '../../src/report/words/not-covered-words.ts'
import { reasonCodes } from '../../src/report/words/reason-words.ts'
import { sentence } from '../../src/report/words/sentence.ts'
import { swapBecauseCodes, swapBecauseWords } from '../../src/report/words/swap-words.ts'
import { verdictWords } from '../../src/report/words/verdict-words.ts'
import { cautionText, warningText, words } from '../../src/report/words/words.ts'
import { swapSample } from './more-samples.ts'
import { rankSample } from './samples.ts'

/** A sentence with neither gap, pattern sign nor unfinished end. */
function expectReadable(text: string) {
  expect(text).toMatch(/^[A-Z0-9]/)
  expect(text).toMatch(/[.]$/)
  expect(text).not.toMatch(/[{}[\]|]|undefined|NaN|unknown|null| {2}| [.,;:)]|\( /)
  expect(text.split(' ').length).toBeGreaterThan(2)
}

describe('sentence patterns', () => {
  it('take the first alternative whose numbers are all there', () => {
    expect(sentence('Charge[ {charge:C}| not given].', { charge: 1.9e-7 })).toBe('Charge 190 nC.')
    expect(sentence('Charge[ {charge:C}| not given].', {})).toBe('Charge not given.')
    expect(sentence('At[ {a:A} of {b:A}].', { a: 1 })).toBe('At.')
  })

  it('treat a non-finite number as not there', () => {
    expect(sentence('Peak[ {peak:A}].', { peak: Number.NaN })).toBe('Peak.')
  })

  it('show data as data: braces and brackets in a name do not act', () => {
    expect(sentence('Part[ {name}].', { name: '{x:A} [b|c]' })).toBe('Part {x:A} [b|c].')
  })

  it('do not read inherited properties', () => {
    expect(sentence('Part[ {constructor}].', {})).toBe('Part.')
  })
})

describe('every code is worded', () => {
  it.each(caveatCodes.map((code) => [code]))('warning %s reads without any number', (code) => {
    expectReadable(warningText({ code, data: {} }))
  })

  it.each(cautionCodes.map((code) => [code]))('caution %s reads without any number', (code) => {
    expectReadable(cautionText({ code, data: {} }))
  })

  it.each(reasonCodes.map((code) => [code]))('reason %s reads without any number', (code) => {
    const result = rankSample()
    const [first] = result.candidates
    first!.reasons.push({ code, text: '', value: null, limit: null })
    words(result)
    expectReadable(first!.reasons[0]!.text)
  })

  it.each(swapBecauseCodes.map((code) => [code]))('ground %s of a swap reads without any number', (code) => {
    expectReadable(sentence(swapBecauseWords[code], {}))
  })

  it('nothing that is not covered is worded by its code', () => {
    for (const text of Object.values(notCoveredWords)) expectReadable(text)
  })

  it('a code that nobody worded is spoken, not dropped', () => {
    expect(warningText({ code: 'made-up-code', data: {} })).toBe('Made up code.')
    expect(warningText({ code: 'constructor', data: {} })).toBe('Constructor.')
  })
})

describe('cautions name the danger in plain words', () => {
  it('a mains-fed stage says so with its peak', () => {
    expect(cautionText({ code: 'mains-fed', data: { mains: 230, peak: 357.8 } })).toMatchInlineSnapshot(
      `"This stage is fed from the mains (230 V, up to 358 V peak): every part of it, ground of the control included, is to be taken as live, also when it does not switch."`,
    )
  })

  it('the bulk capacitor states its energy and time', () => {
    const data = { capacitance: 470e-6, voltage: 400, energy: 37.6, bleeder: 10e3, time: 8.917, until: 60 }
    expect(cautionText({ code: 'bulk-capacitor', data })).toMatchInlineSnapshot(
      `"Every bulk capacitor stays charged after switching off. The output capacitor of 470 µF at 400 V holds 37.6 J. Its bleeder of 10 kΩ takes 8.92 s to bring it down to 60 V. Isolate, discharge and measure each before touching; a bleeder can have failed."`,
    )
  })

  it('without bleeder or capacitance it says what is missing', () => {
    expect(
      cautionText({ code: 'bulk-capacitor', data: { capacitance: 470e-6, voltage: 400, energy: 37.6 } }),
    ).toContain('No bleeder is given')
    expect(cautionText({ code: 'bulk-capacitor', data: {} })).toContain('Its capacitance is not given')
    const low = { capacitance: 1e-3, voltage: 12, energy: 0.072, bleeder: 1e4, time: 0, until: 60 }
    expect(cautionText({ code: 'bulk-capacitor', data: low })).toContain('stays below 60 V')
  })

  it('speaks of the input capacitor before an output that seems harmless', () => {
    const data = { input: 120, capacitance: 1e-3, voltage: 12, energy: 0.072, bleeder: 1e4, time: 0, until: 60 }
    const text = cautionText({ code: 'bulk-capacitor', data })
    expect(text).toContain('The input capacitor stays charged at 120 V; its capacitance is not given')
    expect(text.indexOf('120 V')).toBeLessThan(text.indexOf('stays below 60 V'))
    expect(cautionText({ code: 'bulk-capacitor', data: { input: 120, output: 12 } })).toContain(
      'output capacitor at 12 V',
    )
  })

  it('a hazardous voltage is said with the limit that it meets', () => {
    const text = (data: Record<string, string | number>) => cautionText({ code: 'lethal-voltage', data })
    expect(text({ voltage: 48, swing: 48 })).toContain('switching node swings to 48 V peak, above 42.4 V peak')
    expect(text({ voltage: 120, side: 'output', dc: 120 })).toContain('its output stands at 120 V dc, above 60 V dc')
    expect(text({ voltage: 59, overshoot: 59 })).toContain('with overshoot the rectifier sees 59 V peak')
  })

  it('work is left to qualified, licensed persons and the local code', () => {
    expect(cautionText({ code: 'qualified-persons', data: {} })).toMatch(/qualified persons.*licensed.*local code/)
  })
})

describe('the verdict', () => {
  const verdict = (change: Partial<RankResult['verdict']>, odds: number | null = 0.97) => {
    const sample = rankSample()
    const candidates = sample.candidates.map((part) => (part.rank === 1 ? { ...part, odds_best: odds } : part))
    return verdictWords({ ...sample, candidates, verdict: { ...sample.verdict, ...change } })
  }

  it('names winner, gap with its interval and odds when it is decided', () => {
    expect(verdict({ decided: true, tied: [], gap_low_w: 0.6 })).toMatchInlineSnapshot(
      `"larch-200v-10a-soft is the cheapest: 24.2 W stage loss, 1.80 W (0.60 to 3.10 W) below alder-200v-8a-ultrafast; decided with odds 0.97 (±0.01)."`,
    )
  })

  it('names the tie and what to measure when it is not', () => {
    expect(verdict({}, 0.61)).toMatchInlineSnapshot(
      `"Not decided: larch-200v-10a-soft has the lowest stage loss, 24.2 W, but is not distinguishable from alder-200v-8a-ultrafast; it is 1.80 W (-0.60 to 3.10 W) below alder-200v-8a-ultrafast. Its odds of being the cheapest are 0.61 (±0.01). To settle it, measure the recovery of alder-200v-8a-ultrafast at 11.8 A, 350 A/µs and 92 °C (should remove 55 % of the variance of the gap)."`,
    )
  })

  it('never rounds odds up to certainty', () => {
    expect(verdict({ decided: true }, 0.9996)).toContain('above 0.99')
  })

  it('works while odds do not exist', () => {
    expect(
      verdict({ decided: null, tied: [], gap_low_w: null, gap_high_w: null, measure_next: null }, null),
    ).toMatchInlineSnapshot(
      `"larch-200v-10a-soft is the cheapest by nominal figures: 24.2 W stage loss, 1.8 W below alder-200v-8a-ultrafast. How sure this is was not computed."`,
    )
  })

  it('says where the best part has no temperature in many draws', () => {
    const sample = rankSample()
    const lose = (share: number) => sample.candidates.map((part) => ({ ...part, thermal_lost_share: share }))
    const said = (share: number, runner_up: string | null) =>
      verdictWords({ ...sample, candidates: lose(share), verdict: { ...sample.verdict, runner_up } })
    for (const rival of ['alder-200v-8a-ultrafast', null]) {
      expect(said(0.3, rival)).toContain('in 30 % of the draws it has no stable temperature')
      expect(said(0.05, rival)).not.toContain('no stable temperature')
    }
  })

  it('an incumbent left out is not one without a record', () => {
    const text = (data: Record<string, string>) => warningText({ code: 'incumbent-missing', data })
    expect(text({ excluded: 'larch' })).toContain('larch is not among the candidates compared')
    expect(text({ incumbent: 'larch' })).toContain('larch has no record')
  })

  it('says when there is only one, or none', () => {
    expect(verdict({ decided: true, tied: [], runner_up: null, gap_w: null })).toBe(
      'larch-200v-10a-soft is the only acceptable candidate, with 24.2 W stage loss. 2 are rejected, each with its reason.',
    )
    expect(verdict({ best: null })).toBe(
      'No candidate is acceptable. 2 are rejected, each with its reason. Change the stage, its cooling or the candidates.',
    )
  })
})

describe('words(result)', () => {
  it('fills every text field and leaves figures alone', () => {
    const before = rankSample()
    const result = words(rankSample())
    for (const { text } of [...result.warnings, ...result.cautions]) expectReadable(text)
    for (const { reasons } of result.candidates) for (const { text } of reasons) expectReadable(text)
    for (const text of result.not_covered) expectReadable(text)
    expect(result.candidates.map(({ losses_w, rank }) => ({ losses_w, rank }))).toEqual(
      before.candidates.map(({ losses_w, rank }) => ({ losses_w, rank })),
    )
  })

  it('changes nothing in a document already filled', () => {
    const once = words(rankSample())
    expect(words(structuredClone(once))).toEqual(once)
  })

  it.each([
    [
      'justified',
      'Replacing alder-200v-8a-ultrafast by larch-200v-10a-soft is justified: it saves 1.82 W (0.60 to 3.10 W)',
    ],
    ['not-justified', 'is not justified: it saves'],
    ['not-settled', 'is not settled: it saves'],
  ])('words a swap that is %s', (code, text) => {
    const result = words({ ...swapSample(), verdict: code })
    expect(result.verdict_text).toContain(text)
    expectReadable(result.verdict_text)
  })

  it('turns a loss into a cost', () => {
    const result = words({
      ...swapSample(),
      verdict: 'not-justified',
      saves_w: { median: -1.8, low: -3.1, high: -0.6 },
    })
    expect(result.verdict_text).toContain('it costs 1.80 W (0.60 to 3.10 W) more stage loss')
  })
})

describe('the grounds of a swap', () => {
  const ground = (data: Readonly<Record<string, number>>) =>
    words({ ...swapSample(), because: [{ code: 'yearly-energy', text: '', data }] }).because[0]!.text

  it('turn negative energy into a cost', () => {
    expect(ground({ energy: 6.4 })).toBe('Over the duty profile it saves 6.4 kWh a year.')
    expect(ground({ energy: -6.4 })).toBe('Over the duty profile it costs 6.4 kWh more a year.')
  })
})
