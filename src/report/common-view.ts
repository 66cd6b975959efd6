import type { CandidateResult, Caution, StageResult, Warning } from '../domain/result.ts'
import type { AnyResult } from '../domain/study.ts'
import { celsius, quantity } from './format.ts'
import type { Block, Cell, Fact, Table } from './view-types.ts'

/** Blocks that every result ends with: warnings, cautions, what is not covered. */
export function closingBlocks(result: AnyResult): Block[] {
  return [
    ...warningBlock(result.warnings),
    ...cautionBlock(result.cautions),
    ...listBlock(
      'Not covered',
      'plain',
      result.not_covered.map((text) => ({ lead: null, text })),
    ),
  ]
}

export function listBlock(
  heading: string,
  tone: 'plain' | 'warning' | 'caution',
  items: readonly { readonly lead: string | null; readonly text: string }[],
): Block[] {
  return items.length === 0 ? [] : [{ kind: 'list', heading, tone, items }]
}

/** One item per sentence and code, naming every part it holds for. */
function warningBlock(warnings: readonly Warning[]): Block[] {
  const grouped = new Map<string, { code: string; text: string; parts: string[] }>()
  for (const { code, candidate, text } of warnings) {
    const key = JSON.stringify([code, text])
    const entry = grouped.get(key) ?? { code, text, parts: [] }
    if (candidate !== '' && !entry.parts.includes(candidate)) entry.parts.push(candidate)
    grouped.set(key, entry)
  }
  const items = [...grouped.values()].map(({ code, text, parts }) => ({
    lead: parts.length === 0 ? code : `${code} (${parts.join(', ')})`,
    text,
  }))
  return listBlock('Warnings', 'warning', items)
}

function cautionBlock(cautions: readonly Caution[]): Block[] {
  const items = cautions.map(({ code, text }) => ({ lead: code, text }))
  return listBlock('Cautions', 'caution', items)
}

/** The operating point in one line, the event model, and what was assumed. */
export function stageFacts(stage: StageResult): Fact[] {
  const facts: Fact[] = [
    { label: 'Stage', text: stageLine(stage) },
    { label: 'Event model', text: stage.loss_model },
  ]
  if (stage.assumed.length > 0) {
    const values = stage.assumed.map(({ path, value }) => `${path} ${value}`).join('; ')
    facts.push({ label: 'Assumed, not given', text: values })
  }
  return facts
}

function stageLine(stage: StageResult): string {
  const source =
    stage.kind === 'mains-boost' ? `${quantity(stage.input_v, 'V')} mains` : `${quantity(stage.input_v, 'V')} in`
  const parts = [
    stage.kind,
    source,
    `${quantity(stage.output_v, 'V')} out`,
    quantity(stage.output_w, 'W'),
    quantity(stage.frequency_hz, 'Hz'),
    `current falls at ${quantity(stage.slope_a_per_s, 'A/us')}`,
    `blocks ${quantity(stage.blocking_v, 'V')}`,
  ]
  if (stage.mode !== null) parts.push(stage.mode === 'boundary' ? 'at the mode boundary' : `${stage.mode} conduction`)
  return parts.join(', ')
}

/** What the draws rest on: seed and number, so that the run can be repeated. */
export function drawsFact(result: AnyResult): Fact {
  return { label: 'Draws', text: result.draws > 0 ? `${result.draws}, seed ${result.seed}` : 'none' }
}

export function titleOf(stage: StageResult, what: string): string {
  return stage.title === '' ? what : `${stage.title}: ${what}`
}

/** Adds the column every CSV file ends with. */
export function withCautions(table: Table, cautions: readonly Caution[]): Table {
  const codes = cautions.map(({ code }) => code).join(' ')
  const cell: Cell = { text: codes, value: codes }
  return {
    columns: [...table.columns, { title: 'cautions', unit: null, numeric: false, group: 'cautions', key: false }],
    rows: table.rows.map((row) => [...row, cell]),
  }
}

/** Rejected parts with every reason, and their figures where they have a temperature. */
export function rejectedBlock(candidates: readonly CandidateResult[]): Block[] {
  const items = candidates
    .filter(({ accepted }) => !accepted)
    .map((candidate) => ({
      lead: `${candidate.id} (${candidate.class})`,
      text: [...candidate.reasons.map(({ code, text }) => `[${code}] ${text}`), figures(candidate)]
        .filter(Boolean)
        .join(' '),
    }))
  return listBlock('Rejected', 'plain', items)
}

function figures({ losses_w, stage_loss_w, junction_c, interval_w }: CandidateResult): string {
  if (losses_w.total === null || stage_loss_w === null) return ''
  const high = interval_w === null ? '' : `, high ${quantity(interval_w.high, 'W')}`
  const junction = junction_c === null ? '' : `, junction ${celsius(junction_c)}`
  return `For comparison: stage loss ${quantity(stage_loss_w, 'W')}, total ${quantity(losses_w.total, 'W')}${high}${junction}.`
}
