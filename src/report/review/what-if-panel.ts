import type { ReviewResult } from '../../domain/review.ts'
import type { Stage } from '../../domain/stage.ts'
import { escapeText } from '../charts/svg.ts'
import { type WhatIfControl, whatIfControls } from './what-if-quantities.ts'

/** Steps of a slider from end to end. */
export const sliderSteps = 400

/**
 * The controls that question the result. Hidden until a script runs and on paper, apart from the issued sections, which
 * never change.
 */
export function whatIfPanel({ rank }: ReviewResult, stage: Stage): string {
  const controls = whatIfControls(stage, rank.stage)
  const missing =
    stage.cooling.kind === 'case' ? ' The case temperature is fixed in the stage, so there is no ambient to move.' : ''
  return [
    '<p class="quiet screen-only" id="without-script">With scripts on, this document recalculates: frequency, load, slope, ambient and input can be moved.</p>',
    '<section class="what-if" id="what-if" aria-labelledby="title-what-if" hidden>',
    '<h2 id="title-what-if">What if?</h2>',
    `<p>Move a value and this box recalculates with the engine that made the document. Everything outside this box stays as issued, and so does a print. Figures here are nominal: no draws, so no intervals and no odds.${escapeText(missing)}</p>`,
    `<div class="controls" role="group" aria-label="Values to move">${controls.map(controlMarkup).join('')}</div>`,
    '<p><button type="button" id="back" disabled>As issued</button></p>',
    '<p id="what-if-state" role="status"></p>',
    '<div id="what-if-result"></div>',
    '<div id="what-if-trends" hidden>',
    ...trends.map(
      ([over, name]) =>
        `<details data-over="${over}"><summary>${name} at these values</summary><div class="trend"></div></details>`,
    ),
    '</div>',
    '</section>',
  ].join('\n')
}

const trends = [
  ['frequency', 'Loss against frequency'],
  ['slope', 'Loss against current slope'],
  ['ambient', 'Temperature against ambient'],
  ['load', 'Efficiency and watts against load'],
] as const

function controlMarkup({ over, name, unit, issued, low, high }: WhatIfControl): string {
  const title = escapeText(`${name} (${unit})`)
  return (
    `<div class="control" id="control-${over}"><label for="number-${over}">${title}</label><div class="pair">` +
    `<input type="number" id="number-${over}" value="${issued}" min="${low}" max="${high}" step="any" inputmode="decimal" aria-describedby="issued-${over}">` +
    `<input type="range" id="range-${over}" min="0" max="${sliderSteps}" value="0" aria-label="${title}, slider"></div>` +
    `<span class="issued" id="issued-${over}">as issued ${issued} ${escapeText(unit)}</span></div>`
  )
}
