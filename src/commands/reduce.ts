import { basename, dirname, join, relative, sep } from 'node:path'
import type { CaptureDocument, CaptureSettings } from '../domain/capture.ts'
import { readCapture } from '../input/capture-settings.ts'
import { captureText, understoodText } from '../report/capture-text.ts'
import { captureChart } from '../report/charts/capture-chart.ts'
import { renderJson } from '../report/render-json.ts'
import { captureWords } from '../report/words/capture-words.ts'
import { type ReduceResult, reduce, understoodOf } from '../study/reduce.ts'
import { appendRow, checkRecord } from './append-row.ts'
import { chooseDelivery, type Delivery } from './delivery.ts'
import { openDesk, readAt, settleDesk } from './desk.ts'
import { type CaptureFile, readCaptureFile } from './read-capture-file.ts'
import { checkTarget, replaceFile } from './replace-file.ts'
import { breathe, type Session } from './session.ts'
import { studyStage } from './study-stage.ts'

export interface ReduceOptions {
  readonly json?: boolean
  readonly output?: string
  readonly into?: string
  readonly strict?: boolean
  readonly quiet?: boolean
}

const forms = ['table', 'json', 'svg'] as const

/** `ebbwatt reduce CAPTURE`: an oscilloscope capture to a recovery row, shown, drawn, or appended to a record. */
export async function runReduce(path: string, options: ReduceOptions, session: Session): Promise<number> {
  const delivery = chooseDelivery(options, forms)
  const { settings, fingerprint } = readSettings(path, options, session)
  const beside = (file: string) => join(dirname(path), file)
  const files = [path, beside(settings.file), ...(settings.reference === null ? [] : [beside(settings.reference)])]
  if (delivery.target !== null)
    checkTarget(delivery.target, [...files, ...(options.into === undefined ? [] : [options.into])])
  if (options.into !== undefined) checkRecord(options.into, settings.device.id)
  const capture = await readCaptureFile(beside(settings.file), settings, session)
  const reference =
    settings.reference === null
      ? null
      : await readCaptureFile(beside(settings.reference), { ...settings, voltage: null }, session)
  const input = inputFor(
    path,
    files,
    [fingerprint, capture.sha256, reference?.sha256],
    settings,
    capture,
    reference,
    session,
  )
  if (options.quiet !== true) session.tell(`${understoodText(understoodOf(input))}\n`)
  await breathe()
  const result = await studyStage(path, session, () => reduce(input))
  captureWords(result.document)
  const appended =
    options.into === undefined
      ? null
      : appendRow(options.into, result.document, basename(settings.file), capture.sha256)
  deliver(result, delivery, files, session)
  if (appended !== null && options.quiet !== true) session.tell(`appended to ${options.into}: ${appended}\n`)
  return options.strict === true && result.document.warnings.length > 0 ? 4 : 0
}

function readSettings(path: string, options: ReduceOptions, session: Session) {
  const desk = openDesk()
  const settings = readAt(desk, path, readCapture)
  settleDesk(desk, options.quiet === true, session)
  if (settings === null) throw new Error('capture settings without a value and without a problem')
  return { settings, fingerprint: desk.fingerprints.get(path) ?? '' }
}

function inputFor(
  path: string,
  files: readonly string[],
  fingerprints: readonly (string | undefined)[],
  settings: CaptureSettings,
  capture: CaptureFile,
  reference: CaptureFile | null,
  session: Session,
): Parameters<typeof reduce>[0] {
  const inputs = files
    .map((file, k) => ({ path: relative(dirname(path), file).split(sep).join('/'), sha256: fingerprints[k] ?? '' }))
    .sort((one, other) => (one.path < other.path ? -1 : 1))
  return {
    settings,
    waveform: capture.waveform,
    reading: capture.reading,
    reference: reference?.waveform ?? null,
    seed: 1,
    version: session.version,
    inputs,
  }
}

function deliver(result: ReduceResult, delivery: Delivery, inputs: readonly string[], session: Session): void {
  const { target, format, jsonOnStdout } = delivery
  const text = rendered(result, format, target === null ? session.width : 120)
  if (target !== null) replaceFile(target, text, inputs)
  if (target === null || jsonOnStdout) session.print(jsonOnStdout ? renderJson(result.document) : text)
  // a drawing has no room for sentences: figures and cautions are told beside it
  if (format === 'svg') tellCautions(result.document, session)
}

function rendered({ document, trace }: ReduceResult, format: Delivery['format'], width: number): string {
  if (format === 'json') return renderJson(document)
  if (format === 'svg') return captureChart(document, trace)
  return captureText(document, trace, width)
}

function tellCautions({ cautions }: CaptureDocument, session: Session): void {
  for (const { code, text } of cautions) session.tell(`caution  ${code}  ${text}\n`)
}
