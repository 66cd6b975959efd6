import type { RectifierRecord } from '../../domain/rectifier.ts'
import type { ReviewResult } from '../../domain/review.ts'
import type { Stage } from '../../domain/stage.ts'
import type { StudySettings } from '../../domain/study.ts'
import { escapeText } from '../charts/svg.ts'
import { blockMarkup } from './block-markup.ts'
import { reviewDocument } from './review-sections.ts'
import { reviewStyle } from './review-style.ts'
import type { ReviewSection } from './review-types.ts'
import { whatIfPanel } from './what-if-panel.ts'

/** What the document recalculates from, in SI. */
export interface ReviewInputs {
  readonly stage: Stage
  readonly records: readonly RectifierRecord[]
  readonly settings: StudySettings
}

/** What the document carries to recalculate. */
export interface ReviewEngine {
  /** The engine bundled for a browser. */
  readonly script: string
  /** sha256 of a text, base64, for the content-security policy. */
  readonly digest: (text: string) => string
}

/** The review document as one HTML file without outside references; it reads whole with scripts off. */
export function renderReviewHtml(review: ReviewResult, inputs: ReviewInputs, engine: ReviewEngine): string {
  const { title, sections } = reviewDocument(review)
  const script = scriptText(engine.script)
  const policy = [
    "default-src 'none'",
    `style-src 'sha256-${engine.digest(reviewStyle)}'`,
    `script-src 'sha256-${engine.digest(script)}'`,
    "base-uri 'none'",
    "form-action 'none'",
  ].join('; ')
  const [decision, cautions, ...rest] = sections
  return [
    '<!DOCTYPE html>',
    '<html lang="en">',
    '<head>',
    '<meta charset="utf-8">',
    `<meta http-equiv="Content-Security-Policy" content="${policy}">`,
    '<meta name="viewport" content="width=device-width, initial-scale=1">',
    `<title>${escapeText(title)}</title>`,
    `<style>${reviewStyle}</style>`,
    '</head>',
    '<body>',
    '<div class="banner" id="banner" role="region" aria-label="What-if in progress" hidden><p id="banner-text"></p><button type="button" id="banner-back">As issued</button></div>',
    `<header><h1>${escapeText(title)}</h1><p class="quiet">Review document of ${escapeText(review.rank.tool.name)} ${escapeText(review.rank.tool.version)}, seed ${review.rank.seed}.</p></header>`,
    '<main>',
    sectionMarkup(decision!, 0),
    sectionMarkup(cautions!, 1),
    contents(sections),
    whatIfPanel(review, inputs.stage),
    ...rest.map((section, index) => sectionMarkup(section, index + 2)),
    '</main>',
    '<footer>Estimates from records and models, to be confirmed on the bench before release. The cautions of section 2 hold for every use of this document.</footer>',
    `<script type="application/json" id="inputs">${dataText(inputs)}</script>`,
    `<script>${script}</script>`,
    '</body>',
    '</html>',
    '',
  ].join('\n')
}

function sectionMarkup({ title, blocks }: ReviewSection, index: number): string {
  const number = index + 1
  return `<section id="section-${number}" aria-labelledby="title-${number}"><h2 id="title-${number}"><span class="label">${number}</span>${escapeText(title)}</h2>\n${blocks.map(blockMarkup).join('\n')}</section>`
}

function contents(sections: readonly ReviewSection[]): string {
  const items = sections.map(({ title }, index) => `<li><a href="#section-${index + 1}">${escapeText(title)}</a></li>`)
  return `<nav aria-label="Contents"><ol>${items.join('')}</ol></nav>`
}

/** JSON that no reader of HTML can take for the end of the element or for markup. */
function dataText(inputs: ReviewInputs): string {
  return JSON.stringify(inputs)
    .replaceAll('<', '\\u003c')
    .replaceAll('>', '\\u003e')
    .replaceAll('&', '\\u0026')
    .replaceAll('\u2028', '\\u2028')
    .replaceAll('\u2029', '\\u2029')
}

/** Program text that cannot end its element early. */
function scriptText(text: string): string {
  return text.trim().replace(/<(?=\/script|!--|script)/gi, '\\x3c')
}
