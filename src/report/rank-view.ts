import { storesCharge } from '../domain/rectifier.ts'
import type { CandidateResult, RankResult } from '../domain/result.ts'
import { closingBlocks, drawsFact, listBlock, rejectedBlock, stageFacts, titleOf, withCautions } from './common-view.ts'
import { significant } from './format.ts'
import { rankColumns } from './rank-columns.ts'
import { type ColumnSpec, tableOf, textColumn } from './table-view.ts'
import type { Block, ReportView } from './view-types.ts'
import { type ReasonCode, shortReasons } from './words/reason-words.ts'
import { measureWords } from './words/verdict-words.ts'

/** Everything `rank` shows, in order. */
export function rankView(result: RankResult): ReportView {
  const columns = rankColumns(result)
  const ranked = result.candidates.filter(({ accepted }) => accepted)
  const blocks: Block[] = [{ kind: 'facts', items: [...stageFacts(result.stage), drawsFact(result)] }]
  if (ranked.length > 0)
    blocks.push({ kind: 'table', heading: 'Ranking', table: tableOf(columns, ranked), note: tableNote(ranked) })
  blocks.push(
    ...rejectedBlock(result.candidates),
    ...notListedBlock(result.not_listed),
    { kind: 'text', heading: 'Verdict', text: result.verdict.text },
    ...doubtBlocks(result),
    ...closingBlocks(result),
  )
  const data = tableOf([...columns, ...dataColumns], result.candidates)
  return { title: titleOf(result.stage, 'rectifiers ranked'), blocks, data: withCautions(data, result.cautions) }
}

function tableNote(ranked: readonly CandidateResult[]): string {
  const level = ranked.find(({ interval_w }) => interval_w !== null)?.interval_w?.level
  const interval =
    level === undefined
      ? ''
      : ` Low and high hold ${significant(level * 100)} % of the draws; Tj high is the 95th percentile.`
  return `Ranked by stage loss. Total is the sum of the six loss rows; with the rest it makes the stage loss.${interval}${containedNote(ranked)}${noEventNote(ranked)}${guessNote(ranked)}`
}

/** A 0 that says where the loss stands, not that nobody gave it. */
function containedNote(ranked: readonly CandidateResult[]): string {
  const contained = ranked.some(({ losses_w, event }) => losses_w.capacitive === 0 && (event?.stored_c ?? 0) > 0)
  return contained ? ' Capacitive is 0 where the recovery charge (Qrr) of a part already contains it.' : ''
}

/** Why a part that stores charge recovers nothing here; that a Schottky part does not is said by its class. */
function noEventNote(ranked: readonly CandidateResult[]): string {
  const none = ranked.flatMap(({ id, class: kind, event }) =>
    storesCharge(kind) && event?.none != null ? [`${id} (${event.none})`] : [],
  )
  return none.length > 0 ? ` No hard recovery: ${none.join('; ')}.` : ''
}

/** What the evidence grade D is for. */
function guessNote(ranked: readonly CandidateResult[]): string {
  const guesses = ranked.flatMap(({ id, evidence, evidence_because: because }) =>
    evidence === 'D' && because !== null ? [`${id}: ${because}`] : [],
  )
  return guesses.length > 0 ? ` Evidence D: ${guesses.join('; ')}.` : ''
}

/** The rest of very many, in numbers. */
function notListedBlock(rest: RankResult['not_listed']): Block[] {
  if (rest === null) return []
  const costlier = {
    lead: null,
    text: `${rest.costlier} cost more than the last one listed; they were not judged further. --top lists more.`,
  }
  const rejected = rest.rejected.map(({ code, count }) => ({
    lead: null,
    text: `${count} rejected: ${shortReasons[code as ReasonCode] ?? code}.`,
  }))
  return listBlock(`Not listed: ${rest.count} parts`, 'plain', [...(rest.costlier > 0 ? [costlier] : []), ...rejected])
}

/** What carries the doubt and what to measure. */
function doubtBlocks({ verdict }: RankResult): Block[] {
  const sensitivity = sensitivityItems(verdict.sensitivity ?? [])
  const measure = (verdict.measure_next ?? []).map((next) => ({ lead: null, text: `${capital(measureWords(next))}.` }))
  return [
    ...listBlock('Measure next', 'plain', measure),
    ...listBlock('Sensitivity: share of the variance of the gap', 'plain', sensitivity),
  ]
}

const leastShare = 0.005

function sensitivityItems(shares: readonly { readonly input: string; readonly share: number }[]) {
  const shown = shares.filter(({ share }) => share >= leastShare)
  const items = shown.map(({ input, share }) => ({
    lead: null,
    text: `${inputWords(input)}: ${significant(share * 100, 2)} %`,
  }))
  const rest = shares.length - shown.length
  if (rest === 0) return items
  return [
    ...items,
    { lead: null, text: `${rest === 1 ? 'one more input' : `${rest} more inputs`}: below ${leastShare * 100} % each` },
  ]
}

/** Inputs as an engineer calls them; those of a part name it. */
function inputWords(input: string): string {
  return sharedInputs[input] ?? input.replace(/^forward of /, 'forward voltage of ')
}

const sharedInputs: Readonly<Record<string, string>> = {
  slope: 'current slope of the stage',
  voltage_fall: 'voltage fall time of the switch',
  thermal: 'thermal resistances',
  turn_on: 'what the measured turn-on energy contains',
}

function capital(text: string): string {
  return `${text.charAt(0).toUpperCase()}${text.slice(1)}`
}

/** Further columns of the CSV file, for scripts. */
const dataColumns: readonly ColumnSpec<CandidateResult>[] = [
  textColumn('accepted', 'data', ({ accepted }) => (accepted ? 'yes' : 'no')),
  textColumn('reasons', 'data', ({ reasons }) => reasons.map(({ code }) => code).join(' ')),
  textColumn('thermal', 'data', ({ thermal }) => thermal),
]
