import { createHash } from 'node:crypto'
import { readFileSync } from 'node:fs'
import { dirname, relative, sep } from 'node:path'
import type { RectifierRecord, RowPlace } from '../domain/rectifier.ts'
import type { ReviewResult } from '../domain/review.ts'
import { type ReviewInputs, renderReviewHtml } from '../report/review/render-review-html.ts'
import { renderReviewMarkdown } from '../report/review/render-review-markdown.ts'
import { review } from '../study/review.ts'
import { chooseDelivery } from './delivery.ts'
import { exitCodeOf } from './exit-code.ts'
import { failure } from './failure.ts'
import { readStudy, type StudyOptions } from './read-study.ts'
import { checkTarget, replaceFile } from './replace-file.ts'
import type { Session } from './session.ts'
import { studyStage } from './study-stage.ts'

/** `ebbwatt review STAGE -o FILE.html|.md` */
export async function runReview(stagePath: string, options: StudyOptions, session: Session): Promise<number> {
  const { output: target, json, csv, markdown, quiet, strict } = options
  if (target === undefined && json !== true && csv !== true && markdown !== true) {
    throw failure({
      code: 'option-unusable',
      path: '-o',
      found: 'no file is named',
      expected: '-o review.html or -o review.md',
    })
  }
  const { format } = chooseDelivery(options, ['html', 'markdown'])
  const { stage, records: read, settings, files } = readStudy(stagePath, options, session)
  if (target !== undefined) checkTarget(target, files)
  const records = withPlaces(read, (place) => ({ ...place, file: seenFrom(stagePath, place.file) }))
  const result = await studyStage(stagePath, session, () => review(stage, records, settings))
  const inputs = { stage, records: embedded(records, result, stage), settings: { ...settings, inputs: [] } }
  const text = format === 'html' ? htmlOf(result, inputs, session) : renderReviewMarkdown(result)
  if (target === undefined) session.print(text)
  else replaceFile(target, text, files)
  if (target !== undefined && quiet !== true) session.tell(`wrote ${target}\n`)
  return exitCodeOf(result.rank.candidates, result.rank.warnings, strict === true)
}

function htmlOf(result: ReviewResult, inputs: ReviewInputs, { root }: Session): string {
  const script = readFileSync(new URL('dist/browser.js', root), 'utf8')
  return renderReviewHtml(result, inputs, {
    script,
    digest: (text) => createHash('sha256').update(text).digest('base64'),
  })
}

/**
 * The candidates and the rectifier of a measured turn-on: what the document needs to recalculate, and no more. The
 * names of rows stay, as figures are traced by them; where each stands in which file is printed once, in the ledger.
 */
function embedded(
  records: readonly RectifierRecord[],
  { rank }: ReviewResult,
  { switch: { turnOn } }: ReviewInputs['stage'],
): readonly RectifierRecord[] {
  const wanted = new Set([...rank.candidates.map(({ id }) => id), turnOn?.rectifier ?? ''])
  const kept = records.filter(({ id }) => wanted.has(id))
  return withPlaces(kept, ({ name }) => ({ name, file: '', line: 0, column: 0 }))
}

/** Places by their path from the stage file, so that the document does not depend on the folder it was made from. */
function seenFrom(stagePath: string, file: string): string {
  return relative(dirname(stagePath), file).split(sep).join('/')
}

/** The same data with every place in it replaced. */
function withPlaces<T>(value: T, replace: (place: RowPlace) => RowPlace): T {
  if (Array.isArray(value)) return value.map((each) => withPlaces(each, replace)) as T
  if (value === null || typeof value !== 'object') return value
  const entries = Object.entries(value).map(([key, each]) => [
    key,
    key === 'place' ? replace(each as RowPlace) : withPlaces(each, replace),
  ])
  return Object.fromEntries(entries) as T
}
