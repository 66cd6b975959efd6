/// <reference lib="dom" />
import { readFileSync } from 'node:fs'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { RankResult } from '../../src/domain/result.ts'
import { ebbwatt } from '../end-to-end/run-command.ts'
import { chromiumPath, launch, move, openReview, reviewFolder } from './open-review.ts'

const stage = 'catalogs-demo/stages/pump-boost.yaml'
const axe = readFileSync('node_modules/axe-core/axe.min.js', 'utf8')

describe.skipIf(chromiumPath === undefined)('the review document in a browser', () => {
  let browser: Browser
  let file: string
  const folder = reviewFolder()

  beforeAll(async () => {
    browser = await launch()
    file = folder.review(stage, 'pump.html')
  }, 120_000)

  afterAll(async () => {
    await browser?.close()
    folder.remove()
  })

  it('asks for nothing but itself and says nothing to the console', async () => {
    const { page, complaints, requests } = await openReview(browser, file)
    await move(page, 'frequency', '140')
    for (const name of await page.$$('#what-if-trends summary')) await name.click()
    await page.waitForFunction(() => document.querySelectorAll('#what-if-trends svg').length >= 6)
    expect(complaints).toEqual([])
    expect(requests).toEqual([`file://${file}`])
    await page.close()
  })

  it('recalculates the printed figures to 1e-9', async () => {
    const { page } = await openReview(browser, file)
    expect(await page.textContent('#what-if-state')).toMatch(/recalculated \d{3} printed figures and found the same/)
    await page.close()
  })

  it('says so when a printed figure is not what it recalculates', async () => {
    const text = readFileSync(file, 'utf8')
    const first = /data-value="(\d+\.\d{6,})"/.exec(text)![1]!
    const altered = folder.write('altered.html', text.replace(`"${first}"`, `"${Number(first) * (1 + 3e-9)}"`))
    const { page } = await openReview(browser, altered)
    expect(await page.textContent('#what-if-state')).toMatch(
      /does not reproduce the printed figures \([a-z0-9-]+, [a-z ,()%]+ is off by 3\.0e-9 of itself/i,
    )
    await page.close()
  })

  it('recalculates a part that three figures of one row tell about', async () => {
    const row =
      '{fixture: ramp, current: 10 A, slope: 200 A/us, voltage: 160 V, junction: 125 degC, trr: 42 ns, qrr: 95 nC, irrm: 4.5 A, trr_by: line-90-25}'
    folder.write(
      'onyx.yaml',
      `- id: onyx
  class: ultrafast
  ratings: {reverse_voltage: 200 V, average_current: 10 A, junction: 175 degC}
  thermal: {junction_to_case: 2 K/W, case_to_sink: 0.5 K/W}
  recovery: [${row}]
`,
    )
    const path = folder.write(
      'winch.yaml',
      `stage: buck
input: {voltage: 100 V}
output: {voltage: 24 V, current: 8 A}
frequency: 120 kHz
inductor: {inductance: 68 uH}
cooling: {ambient: 50 degC, sink_to_ambient: 3 K/W}
records: [onyx.yaml]
`,
    )
    const { page } = await openReview(browser, folder.review(path, 'winch.html'))
    expect(await page.textContent('#what-if-state')).toContain('found the same, to 1e-9')
    await page.close()
  })

  it('finds at moved values what the command finds for a stage with those values', async () => {
    const moved = folder.write(
      'moved.yaml',
      readFileSync(stage, 'utf8')
        .replace(/^frequency: .*$/m, 'frequency: 140 kHz')
        .replaceAll('../rectifiers', `${process.cwd()}/catalogs-demo/rectifiers`),
    )
    const expected: RankResult = JSON.parse(ebbwatt(['rank', moved, '--json', '--quiet', '--draws', '10']).out)
    const { page } = await openReview(browser, file)
    await move(page, 'frequency', '140')
    const found = await columnOf(page, 'What-if: What the choice costs the stage', 'stage loss (W)')
    const losses = expected.candidates.map(({ stage_loss_w }) => stage_loss_w)
    expect(found.map(({ part }) => part)).toEqual(expected.candidates.map(({ id }) => id))
    for (const [index, { value }] of found.entries()) {
      if (losses[index] === null) expect(value).toBeNaN()
      else expect(Math.abs(value / losses[index]! - 1)).toBeLessThan(1e-9)
    }
    await page.close()
  })

  it('reads whole with scripts off', async () => {
    const { page } = await openReview(browser, file, { javaScriptEnabled: false })
    expect(await page.isVisible('#what-if')).toBe(false)
    expect(await page.isVisible('text=With scripts on')).toBe(true)
    expect(await page.locator('main > section[id^="section-"]').count()).toBe(16)
    expect(await page.locator('main svg').count()).toBeGreaterThan(10)
    await page.close()
  })

  it('is worked by the keyboard alone, marks what is moved and goes back', async () => {
    const { page } = await openReview(browser, file)
    const before = await page.inputValue('#number-frequency')
    expect(await page.isVisible('#banner')).toBe(false)
    await page.focus('#number-frequency')
    await page.keyboard.press('Tab')
    expect(await page.evaluate(() => document.activeElement!.id)).toBe('range-frequency')
    for (let press = 0; press < 20; press++) await page.keyboard.press('ArrowRight')
    await page.waitForSelector('#what-if-result table')
    expect(Number(await page.inputValue('#number-frequency'))).toBeGreaterThan(Number(before))
    expect(await page.textContent('#banner-text')).toMatch(/^What-if: Switching frequency .* kHz \(issued 100 kHz\)/)
    expect(await page.getAttribute('#control-frequency', 'class')).toContain('changed')
    const captions = await page.locator('#what-if-result caption, #what-if-result figcaption').allTextContents()
    expect(captions.length).toBeGreaterThan(6)
    expect(captions.filter((caption) => !caption.startsWith('What-if: '))).toEqual([])
    await page.focus('#back')
    await page.keyboard.press('Enter')
    await page.waitForFunction(() => document.getElementById('what-if-result')!.innerHTML === '')
    expect(await page.inputValue('#number-frequency')).toBe(before)
    expect(await page.isVisible('#banner')).toBe(false)
    expect(await page.textContent('#what-if-state')).toContain('found the same')
    await page.close()
  })

  it('says what a stage cannot do instead of showing figures', async () => {
    const { page, complaints } = await openReview(browser, file)
    await move(page, 'input', '500')
    expect(await page.textContent('#what-if-state')).toContain('The stage cannot do this')
    await page.fill('#number-load', '')
    await page.fill('#number-input', '48')
    await page.waitForFunction(() => /wanted/.test(document.getElementById('what-if-state')!.textContent!))
    expect(await page.innerHTML('#what-if-result')).toBe('')
    expect(complaints).toEqual([])
    await page.close()
  })

  it('answers within half a second', async () => {
    const { page } = await openReview(browser, file)
    const times: number[] = []
    for (const value of ['120', '130', '140', '150', '160']) {
      await page.fill('#number-frequency', value)
      await page.waitForFunction(
        (text) => document.getElementById('banner-text')!.textContent!.includes(` ${text} kHz (`),
        value,
      )
      await page.waitForSelector('#what-if-result table')
      times.push(Number(/in (\d+) ms/.exec((await page.textContent('#what-if-state'))!)![1]))
    }
    expect(Math.min(...times)).toBeLessThan(500)
    await page.close()
  })

  it('prints what was issued, whatever is on the screen', async () => {
    const { page } = await openReview(browser, file)
    const issued = await page.locator('main > section[id^="section-"]').allTextContents()
    await move(page, 'frequency', '140')
    await page.emulateMedia({ media: 'print' })
    expect(await page.isVisible('#what-if')).toBe(false)
    expect(await page.isVisible('#banner')).toBe(false)
    expect(await page.locator('main > section[id^="section-"]').allTextContents()).toEqual(issued)
    const wide = await page.evaluate(() => {
      const width = document.documentElement.clientWidth
      return [...document.querySelectorAll('table, svg')].filter(
        (each) => each.getBoundingClientRect().right > width + 1,
      ).length
    })
    expect(wide).toBe(0)
    const pdf = await page.pdf({ preferCSSPageSize: true })
    expect(pdf.subarray(0, 5).toString()).toBe('%PDF-')
    await page.close()
  })

  it.each(['light', 'dark'] as const)('has no fault that axe finds, %s', { timeout: 180_000 }, async (colorScheme) => {
    const { page } = await openReview(browser, file, { colorScheme })
    await move(page, 'slope', '500')
    await page.click('#what-if-trends summary')
    await page.waitForSelector('#what-if-trends svg')
    await page.evaluate(axe)
    const faults = await page.evaluate(async () => {
      const runner = (globalThis as unknown as { axe: { run(): Promise<{ violations: AxeFault[] }> } }).axe
      const { violations } = await runner.run()
      return violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html} ${nodes[0]?.failureSummary}`)
    })
    expect(faults).toEqual([])
    await page.close()
  })

  it('fits a phone without scrolling sideways', async () => {
    const { page } = await openReview(browser, file, { viewport: { width: 390, height: 844 } })
    await move(page, 'load', '50')
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390)
    await page.close()
  })

  it('shows text from files as text', async () => {
    const hostile = '<img src=x onerror=alert(1)>'
    folder.write(
      'parts.yaml',
      `- id: "${hostile}"
  class: ultrafast
  title: "</script><script>alert(2)</script>"
  origin: "--><svg onload=alert(3)>"
  ratings: {reverse_voltage: 200 V, average_current: 16 A, junction: 175 degC}
  thermal: {junction_to_case: 1.4 K/W}
  recovery: [{fixture: ramp, current: 16 A, slope: 200 A/us, trr: 52 ns, qrr: 190 nC, source: "${hostile}"}]
`,
    )
    const path = folder.write(
      'hostile.yaml',
      `stage: boost
title: "${hostile}"
input: {voltage: 48 V}
output: {voltage: 120 V, current: 5 A}
frequency: 100 kHz
inductor: {inductance: 150 uH}
cooling: {ambient: 40 degC, sink_to_ambient: 2 K/W}
records: [parts.yaml]
`,
    )
    const { page, complaints, requests } = await openReview(browser, folder.review(path, 'hostile.html'))
    await move(page, 'frequency', '140')
    expect(await page.locator('img, svg[onload], script').count()).toBe(2)
    expect(await page.textContent('h1')).toContain(hostile)
    expect(await page.locator('th', { hasText: hostile }).count()).toBeGreaterThan(5)
    expect(complaints).toEqual([])
    expect(requests).toHaveLength(1)
    await page.close()
  })
})

interface AxeFault {
  readonly id: string
  readonly nodes: readonly { readonly html: string; readonly failureSummary: string }[]
}

/** Whole values of one column of a table of the what-if box, with the parts they belong to. */
function columnOf(page: Page, caption: string, title: string): Promise<{ part: string; value: number }[]> {
  return page.evaluate(
    ([wanted, column]) => {
      const tables = [...document.querySelectorAll('#what-if-result table')]
      const table = tables.find((each) => each.querySelector('caption')!.textContent === wanted)!
      const index = [...table.querySelectorAll('thead th')].findIndex((head) => head.textContent === column)
      return [...table.querySelectorAll('tbody tr')].map((row) => ({
        part: row.querySelector('th')!.textContent!,
        value: Number((row.children[index] as HTMLElement).dataset.value),
      }))
    },
    [caption, title] as const,
  )
}
