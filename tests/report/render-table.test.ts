import { describe, expect, it } from 'vitest'
import type { AnyResult } from '../../src/domain/study.ts'
import { terminalChart } from '../../src/report/charts/terminal-chart.ts'
import { renderTable } from '../../src/report/render-table.ts'
import { textWidth } from '../../src/report/text-width.ts'
import { words } from '../../src/report/words/words.ts'
import { swapSample, trendSample } from './more-samples.ts'
import { rankSample } from './samples.ts'

const samples: readonly (readonly [string, () => AnyResult])[] = [
  ['rank', rankSample],
  ['trend', trendSample],
  ['swap', swapSample],
]
const plain = (result: AnyResult, width: number) => renderTable(words(result), { width, colour: false })
const squeezed = (text: string) => text.replace(/\s+/g, '')

describe.each(samples)('%s on a terminal', (_, sample) => {
  it('has no line wider than the terminal, from 60 to 200 columns', () => {
    for (let width = 60; width <= 200; width += 7) {
      const widest = Math.max(...plain(sample(), width).split('\n').map(textWidth))
      expect(widest, `at ${width} columns`).toBeLessThanOrEqual(width)
    }
  })

  it('shows every warning, caution and gap in full at any width', () => {
    const result = words(sample())
    for (const width of [60, 80, 120, 200]) {
      const shown = squeezed(plain(sample(), width))
      for (const { text } of [...result.warnings, ...result.cautions]) expect(shown).toContain(squeezed(text))
      for (const text of result.not_covered) expect(shown).toContain(squeezed(text))
    }
  })

  it('is plain text without colour, and the same text with it', () => {
    const coloured = renderTable(words(sample()), { width: 80, colour: true })
    // biome-ignore lint/suspicious/noControlCharactersInRegex: colour codes are what is looked for
    const bare = coloured.replace(/\u001B\[[\d;]*m/g, '')
    expect(bare).not.toBe(coloured)
    expect(bare).toBe(plain(sample(), 80))
    expect(plain(sample(), 80)).not.toContain('\u001B')
  })
})

describe('the ranking', () => {
  it('stacks its columns at 80 and loses none', () => {
    expect(plain(rankSample(), 80).split('Rejected')[0]).toMatchInlineSnapshot(`
      "Orchard pump drive, input stage: rectifiers ranked

      Stage: boost, 48 V in, 120 V out, 600 W, 100 kHz, current falls at 350 A/µs,
        blocks 120 V, continuous conduction
      Event model: charge control; voltage moves after the peak
      Assumed, not given: switch.voltage_fall 20 ns
      Draws: 1000, seed 1

      Ranking
                                       gap
                               stage    to               total  total        Tj
                                loss  best  odds  total    low   high  Tj  high  evi-
      #  part                      W     W  best      W      W      W  °C    °C  dence
      ─  ────────────────────  ─────  ────  ────  ─────  ─────  ─────  ──  ────  ─────
      1  larch-200v-10a-soft   24.22     0  0.83  12.48   9.90  16.20  92   104  B
      2  alder-200v-8a-        26.02  1.80  0.17  14.28  10.10  19.80  92   104  C
         ultrafast

      Losses
                                         recov-                            for-
                                           ery,  recov-                    ward
                                conduc-  recti-    ery,  capaci-  leak-  recov-
                                   tion    fier  switch     tive    age     ery  total
      #  part                         W       W       W        W      W       W      W
      ─  ─────────────────────  ───────  ──────  ──────  ───────  ─────  ──────  ─────
      1  larch-200v-10a-soft       4.56    1.40    6.49     0.03  <0.01       0  12.48
      2  alder-200v-8a-            4.56    1.40    8.29     0.03  <0.01       0  14.28
         ultrafast

      Rest of the stage loss
                                                          switch
                                over-                    conduc-  induc-  snub-
                                  lap  turn-off  stored     tion     tor    ber  fixed
      #  part                       W         W       W        W       W      W      W
      ─  ─────────────────────  ─────  ────────  ──────  ───────  ──────  ─────  ─────
      1  larch-200v-10a-soft     3.80      2.40    0.40     3.90    5.30      0   3.00
      2  alder-200v-8a-          3.80      2.40    0.40     3.90    5.30      0   3.00
         ultrafast

      Part and recovery event at the operating point
                                           volt-
                                             age     peak    V_F
                                          margin  reverse    hot    Qrr  I_RM    soft-
      #  part             class                %        V      V     nC     A     ness
      ─  ───────────────  ──────────────  ──────  ───────  ─────  ─────  ────  ───────
      1  larch-200v-10a-  soft-ultrafast    34.5      131  0.912  225.0  7.62      1.6
         soft
      2  alder-200v-8a-   ultrafast         34.5      131  0.912  310.0  9.90  unknown
         ultrafast

      Efficiency, margin and price
                                              ambient
                                  efficiency   margin
      #  part                              %        K  price
      ─  ───────────────────────  ──────────  ───────  ─────
      1  larch-200v-10a-soft           96.12       31   0.62
      2  alder-200v-8a-ultrafast       95.84       31   0.62
      Ranked by stage loss. Total is the sum of the six loss rows; with the rest it
      makes the stage loss. Low and high hold 90 % of the draws; Tj high is the 95th
      percentile.

      "
    `)
  })

  it('is one table where it fits', () => {
    const rows = plain(rankSample(), 320)
      .split('\n')
      .filter((line) => line.includes('larch-200v-10a-soft') && line.startsWith('1 '))
    expect(rows).toHaveLength(1)
  })

  it('shows "none" for a part without temperature and "unknown" for a softness nobody gave', () => {
    const shown = plain(rankSample(), 200)
    expect(shown).toMatch(/rowan-150v-20a-schottky \(schottky\): \[no-stable-temperature\]/)
    expect(shown).toMatch(/9\.90 +unknown/)
  })

  it('breaks a long id instead of cutting it', () => {
    const sample = rankSample()
    const long = `${'q'.repeat(70)}-end`
    const result = {
      ...sample,
      candidates: sample.candidates.map((part) => (part.rank === 2 ? { ...part, id: long } : part)),
    }
    const shown = plain(result, 60)
    expect(Math.max(...shown.split('\n').map(textWidth))).toBeLessThanOrEqual(60)
    expect([...shown.matchAll(/q/g)].length).toBeGreaterThanOrEqual(70)
    expect(shown).not.toContain('…')
  })

  it('lets no title steer the terminal', () => {
    const sample = rankSample()
    const shown = plain({ ...sample, stage: { ...sample.stage, title: 'a\u001B]0;x\u0007b\r\nc' } }, 80)
    expect(shown).toContain('a\uFFFD]0;x\uFFFDb c: rectifiers ranked')
    // biome-ignore lint/suspicious/noControlCharactersInRegex: no control character but the line end may remain
    expect(shown).not.toMatch(/[\u0000-\u0009\u000B-\u001F\u007F-\u009F]/)
  })

  it('says that no candidate is acceptable', () => {
    const sample = rankSample()
    const candidates = sample.candidates.filter(({ accepted }) => !accepted)
    const shown = plain(
      { ...sample, candidates, verdict: { ...sample.verdict, best: null, runner_up: null, tied: [] } },
      80,
    )
    expect(shown).toContain('No candidate is acceptable.')
    expect(shown).not.toContain('\nRanking\n')
  })
})

describe('the chart in characters', () => {
  it('tells parts apart by letters, without colour', () => {
    expect(terminalChart(trendSample(), 60, false)).toMatchInlineSnapshot(`
      "stage loss (W) against switching frequency (kHz)
      60 ┤
         │
         │
      50 ┤                                                     AAA
         │                                                  AAA
         │                                                AA
      40 ┤                                            AAAA
         │                                         AAA       BBBBB
         │                                     AAAA     BBBBB
      30 ┤                                AAAAA  BBBBBBB
         │                          AAAAA*BBBBBBB
         │    CCCCCCCCCCCCCC***********BB
      20 ┤****BBBBB*********
         │AAAAAAAAA
         │
      10 ┤
         └───────────────────^────────────────────────────────────
          50                                                   300
      A larch-200v-10a-soft, B alder-200v-8a-ultrafast,
      C rowan-150v-20a-schottky, * several, ^ crossing
      "
    `)
  })

  it('fits any width', () => {
    for (let width = 40; width <= 200; width += 16)
      expect(Math.max(...terminalChart(trendSample(), width, false).split('\n').map(textWidth))).toBeLessThanOrEqual(
        width,
      )
  })

  it('says so when no part has a loss anywhere', () => {
    const trend = trendSample()
    const points = trend.points.map((point) => ({
      ...point,
      candidates: point.candidates.map((part) => ({ ...part, stage_loss_w: null })),
    }))
    expect(terminalChart({ ...trend, points }, 80, false)).toBe('No part has a stage loss anywhere along this trend.\n')
  })

  it('draws a trend of a single point', () => {
    const trend = trendSample()
    expect(terminalChart({ ...trend, points: trend.points.slice(0, 1), crossings: [] }, 60, false)).toContain('A')
  })
})
