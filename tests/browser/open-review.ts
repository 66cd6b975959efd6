import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { type Browser, type BrowserContextOptions, chromium, type Page } from 'playwright-core'
import { ebbwatt } from '../end-to-end/run-command.ts'

/** Set by the test runner where a Chromium was found or installed. */
export const chromiumPath = process.env.EBBWATT_CHROMIUM

const quietly = [
  '--headless',
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
]

export function launch(): Promise<Browser> {
  return chromium.launch({ executablePath: chromiumPath!, args: quietly })
}

export interface OpenReview {
  readonly page: Page
  /** Console messages of any kind, page errors and broken policies. */
  readonly complaints: readonly string[]
  readonly requests: readonly string[]
}

/** Opens a document from disk and notes everything it says or asks for. */
export async function openReview(
  browser: Browser,
  file: string,
  options: BrowserContextOptions = {},
): Promise<OpenReview> {
  const page = await browser.newPage({ viewport: { width: 1280, height: 900 }, ...options })
  page.setDefaultTimeout(60_000)
  const complaints: string[] = []
  const requests: string[] = []
  page.on('console', (message) => complaints.push(message.text()))
  page.on('pageerror', (error) => complaints.push(error.message))
  page.on('dialog', (dialog) => {
    complaints.push(`dialog ${dialog.message()}`)
    void dialog.dismiss()
  })
  page.on('request', (request) => requests.push(request.url()))
  await page.goto(`file://${file}`)
  return { page, complaints, requests }
}

/** A folder of its own for the documents of one test file. */
export function reviewFolder() {
  const folder = mkdtempSync(join(tmpdir(), 'ebbwatt-review-'))
  return {
    remove: () => rmSync(folder, { recursive: true, force: true }),
    write: (name: string, text: string) => {
      writeFileSync(join(folder, name), text)
      return join(folder, name)
    },
    review: (stage: string, name: string) => {
      const file = join(folder, name)
      const { code, err } = ebbwatt(['review', stage, '-o', file, '--draws', '200', '--quiet'])
      if (code !== 0 && code !== 3) throw new Error(err)
      return file
    },
  }
}

/** Moves a control as typing does and waits for the answer. */
export async function move(page: Page, over: string, value: string): Promise<void> {
  await page.fill(`#number-${over}`, value)
  await page.waitForFunction(() => /What-if|cannot|wanted/.test(document.getElementById('what-if-state')!.textContent!))
}
