/** The engine inside the review document: recalculates from the embedded inputs and fills the what-if box. */
import type { RankResult } from './domain/result.ts'
import type { EventWaveform, ReviewTrendQuantity } from './domain/review.ts'
import type { Stage } from './domain/stage.ts'
import { StudyRefusal } from './domain/study-refusal.ts'
import type { ReviewInputs } from './report/review/render-review-html.ts'
import { sliderSteps } from './report/review/what-if-panel.ts'
import { type WhatIfControl, whatIfControls, whatIfValue } from './report/review/what-if-quantities.ts'
import { exactValues, whatIfMarkup, whatIfTrendMarkup } from './report/review/what-if-result.ts'
import { eventWaveform } from './study/event-waveform.ts'
import { rank } from './study/rank.ts'
import { reviewTrend } from './study/review-trends.ts'
import { stageAt } from './study/stage-variation.ts'

/** As much of a page as is used here: the whole library of types would let pure code reach for a page unseen. */
interface Node {
  hidden: boolean
  disabled: boolean
  open: boolean
  value: string
  innerHTML: string
  textContent: string | null
  readonly dataset: Readonly<Record<string, string | undefined>>
  readonly classList: { toggle(name: string, force: boolean): void }
  addEventListener(kind: string, listener: () => void): void
  querySelector(selector: string): Node | null
  focus(): void
}
/** A cell of a table. */
interface Cell extends Node {
  readonly cellIndex: number
  readonly parentElement: Node | null
  closest(selector: string): { querySelectorAll(selector: string): Iterable<Node> } | null
}
declare const document: {
  querySelectorAll(selector: `${string}[data-value]`): Iterable<Cell>
  getElementById(id: string): Node | null
  querySelectorAll(selector: string): Iterable<Node>
}

/** The stage with its values moved, and what comes of it. */
interface Solved {
  readonly stage: Stage
  readonly result: RankResult
}

/** A burst of moves is answered once, after this pause. [ms] */
const pause = 60
const agreement = 1e-9

const inputs: ReviewInputs = JSON.parse(at('inputs').textContent ?? '')
const settings = { ...inputs.settings, draws: 0 }
const issued = rank(inputs.stage, inputs.records, settings)
const controls = whatIfControls(inputs.stage, issued.stage)
const trends = [...document.querySelectorAll('#what-if-trends details')]
let present: Solved | null = null
let waiting: ReturnType<typeof setTimeout> | undefined

function at(id: string): Node {
  const node = document.getElementById(id)
  if (node === null) throw new Error(`the document has no ${id}`)
  return node
}

for (const control of controls) {
  const [number, range] = [at(`number-${control.over}`), at(`range-${control.over}`)]
  number.addEventListener('input', () => {
    placeSlider(control)
    moved()
  })
  range.addEventListener('input', () => {
    number.value = String(sliderValue(control, Number(range.value)))
    moved()
  })
}
at('back').addEventListener('click', asIssued)
at('banner-back').addEventListener('click', asIssued)
for (const each of trends) each.addEventListener('toggle', () => drawTrend(each))
asIssued()
at('without-script').hidden = true
at('what-if').hidden = false

function moved(): void {
  clearTimeout(waiting)
  waiting = setTimeout(recalculate, pause)
}

/** Puts every control back and says whether this browser reproduces the printed figures. */
function asIssued(): void {
  clearTimeout(waiting)
  for (const control of controls) {
    at(`number-${control.over}`).value = String(control.issued)
    placeSlider(control)
  }
  recalculate()
}

function recalculate(): void {
  const changed = controls.filter(isChanged)
  mark(changed)
  if (changed.length === 0) showIssued()
  else showWhatIf(changed)
}

function showWhatIf(changed: readonly WhatIfControl[]): void {
  const begun = performance.now()
  const unusable = changed.filter(({ over }) => !(shownValue(over) > (over === 'ambient' ? -273.15 : 0)))
  try {
    present = unusable.length > 0 ? null : solve(changed)
  } catch (error) {
    if (!(error instanceof StudyRefusal)) throw error
    const { found, expected, hint } = error.data
    clear(`The stage cannot do this: ${[found, expected, hint].filter(Boolean).join('; ')}.`)
    return
  }
  if (present === null) {
    clear(`${unusable.map(({ name }) => name).join(', ')}: a number above zero is wanted.`)
    return
  }
  at('what-if-result').innerHTML = whatIfMarkup(present.result, issued, firstWaveform(present))
  at('what-if-trends').hidden = false
  at('what-if-state').textContent =
    `What-if, not the issued result. Recalculated in ${Math.round(performance.now() - begun)} ms.`
  for (const each of trends) drawTrend(each)
}

/** The event of the best part that recovers hard. */
function firstWaveform({ stage, result }: Solved): EventWaveform | null {
  const waves = result.candidates.map(({ id, event }) => eventWaveform(id, event, stage.switch.voltageFall))
  return waves.find((wave) => wave !== null) ?? null
}

function solve(changed: readonly WhatIfControl[]): Solved {
  const stage = changed.reduce(
    (one: Stage, { over }) => stageAt(one, over, whatIfValue(over, shownValue(over))),
    withProfile(changed),
  )
  return { stage, result: rank(stage, inputs.records, settings) }
}

/** The loads of a year belong to the issued full load. */
function withProfile(changed: readonly WhatIfControl[]): Stage {
  return changed.some(({ over }) => over === 'load') ? { ...inputs.stage, dutyProfile: null } : inputs.stage
}

function showIssued(): void {
  const again = exactValues(rank(inputs.stage, inputs.records, settings))
  const cells = [...document.querySelectorAll('section[id^="section-"] [data-value]')]
  const off = cells.map(({ dataset }, index) => distance(Number(dataset.value), again[index]))
  const worst = off.reduce((most, value, index) => (value > off[most]! ? index : most), 0)
  if (cells.length === again.length && !(off[worst]! > agreement)) {
    clear(
      `At the issued values: this browser recalculated ${again.length} printed figures and found the same, to ${agreement}.`,
    )
    return
  }
  const which =
    cells.length === again.length
      ? `${nameOf(cells[worst]!)} is off by ${off[worst]!.toExponential(1)} of itself, the most of all`
      : `${cells.length} are printed, it finds ${again.length}`
  clear(`This browser does not reproduce the printed figures (${which}); trust the printed ones.`)
}

/** A printed figure by the part and the column it stands in. */
function nameOf(cell: Cell): string {
  const row = cell.parentElement
  const heads = cell.closest('table')?.querySelectorAll('thead th') ?? []
  return [row?.querySelector('th'), [...heads][cell.cellIndex]].map((head) => head?.textContent ?? '').join(', ')
}

function distance(printed: number, again: number | undefined): number {
  if (again === undefined) return Number.POSITIVE_INFINITY
  return printed === again ? 0 : Math.abs(again - printed) / Math.max(Math.abs(printed), Math.abs(again))
}

/** Nothing moved, or nothing that can be solved: the box says why and shows no figures. */
function clear(state: string): void {
  present = null
  at('what-if-state').textContent = state
  at('what-if-result').innerHTML = ''
  at('what-if-trends').hidden = true
}

function drawTrend(details: Node): void {
  const place = details.querySelector('.trend')
  if (place === null || present === null || !details.open) return
  const { stage, result } = present
  const over = details.dataset.over as ReviewTrendQuantity
  const trend = reviewTrend(stage, inputs.records, result, over, settings)
  place.innerHTML = whatIfTrendMarkup(over, trend, result)
}

/** Says everywhere that values are moved: at the control, in the box, in the band that stays in sight. */
function mark(changed: readonly WhatIfControl[]): void {
  const any = changed.length > 0
  for (const control of controls) at(`control-${control.over}`).classList.toggle('changed', changed.includes(control))
  at('back').disabled = !any
  at('banner').hidden = !any
  const list = changed.map(
    ({ over, name, unit, issued: before }) => `${name} ${shownValue(over)} ${unit} (issued ${before} ${unit})`,
  )
  at('banner-text').textContent = any ? `What-if: ${list.join('; ')}. Sections 1 to 16 stay as issued.` : ''
}

function shownValue(over: WhatIfControl['over']): number {
  const { value } = at(`number-${over}`)
  return value === '' ? Number.NaN : Number(value)
}

function isChanged({ over, issued: before }: WhatIfControl): boolean {
  return shownValue(over) !== before
}

function sliderValue({ low, high, logarithmic, issued: before }: WhatIfControl, position: number): number {
  const share = position / sliderSteps
  const value = logarithmic ? low * (high / low) ** share : low + (high - low) * share
  const short = Number(value.toPrecision(4))
  // The slider rests on the issued value where it comes near it.
  return Math.abs(short - before) < (high - low) / sliderSteps / 4 ? before : short
}

function placeSlider({ over, low, high, logarithmic }: WhatIfControl): void {
  const value = Math.min(high, Math.max(low, shownValue(over)))
  const share = logarithmic ? Math.log(value / low) / Math.log(high / low) : (value - low) / (high - low)
  if (Number.isFinite(share)) at(`range-${over}`).value = String(Math.round(share * sliderSteps))
}
