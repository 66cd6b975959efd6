import type { CandidateResult, RankResult, Reason } from '../../domain/result.ts'
import type { EventWaveform, ReviewTrendQuantity } from '../../domain/review.ts'
import type { TrendResult } from '../../domain/study.ts'
import { lossBars } from '../charts/render-chart.ts'
import { quantity } from '../format.ts'
import { type ColumnSpec, numberColumn, tableOf, textColumn } from '../table-view.ts'
import { visibleDeep } from '../visible.ts'
import { reasonWords } from '../words/reason-words.ts'
import { sentence } from '../words/sentence.ts'
import { blockMarkup } from './block-markup.ts'
import { waveformFigure } from './event-section.ts'
import { nominalTables } from './nominal-tables.ts'
import { operatingWaveform } from './operating-waveform.ts'
import { pointTable } from './point-section.ts'
import { type ReviewBlock, tableBlock } from './review-types.ts'
import { ambientBlocks, frequencyBlocks, loadBlocks, slopeBlocks } from './trend-sections.ts'

/** The tables of a ranking that the printed document holds too, in its order. */
function exactTables(result: RankResult): readonly ReviewBlock[] {
  return [pointTable(result), ...nominalTables(result)]
}

/** Whole values of those tables, in reading order: what print and recalculation are compared by. */
export function exactValues(result: RankResult): readonly number[] {
  return exactTables(result).flatMap((block) =>
    block.kind !== 'table'
      ? []
      : block.table.rows.flatMap((row) =>
          row.flatMap(({ value }, index) =>
            block.table.columns[index]!.numeric && typeof value === 'number' ? [value] : [],
          ),
        ),
  )
}

/** The recalculated ranking beside the issued one. */
export function whatIfMarkup(now: RankResult, issued: RankResult, wave: EventWaveform | null): string {
  const leader = now.candidates.find(({ point }) => point !== null)
  const drawn = now.candidates.some(({ losses_w }) => losses_w.total !== null)
  const blocks: ReviewBlock[] = [
    { kind: 'text', text: decision(now, issued) },
    comparison(now, issued),
    ...(drawn
      ? [
          {
            kind: 'figure',
            svg: lossBars(now.candidates, 'what-if', 'what-if'),
            caption: 'Losses caused by the rectifier at the moved values, nominal.',
          } as const,
        ]
      : []),
    ...(leader?.point == null
      ? []
      : [
          {
            kind: 'figure',
            svg: operatingWaveform(leader.point, now.stage, `${leader.id}, what-if`),
            caption: `Currents at the moved values with ${leader.id}.`,
          } as const,
        ]),
    ...(wave === null ? [] : [waveformFigure(wave)]),
    ...exactTables(now),
  ]
  return blocks.map(whatIfBlock).join('\n')
}

function decision({ candidates }: RankResult, issued: RankResult): string {
  const best = candidates[0]
  if (best === undefined || !best.accepted) return 'At these values no candidate is acceptable.'
  const before = issued.candidates[0]
  const same = before?.id === best.id
  return `At these values ${best.id} costs the stage least: ${quantity(best.stage_loss_w, 'W')}. ${same ? 'It is the cheapest as issued, too' : `As issued the cheapest is ${before?.accepted ? before.id : 'none'}`}.`
}

interface Pair {
  readonly now: CandidateResult
  readonly issued: CandidateResult | undefined
}

function comparison(now: RankResult, issued: RankResult): ReviewBlock {
  const rows = now.candidates.map((part) => ({ now: part, issued: issued.candidates.find(({ id }) => id === part.id) }))
  const rank = (part: CandidateResult | undefined) => (part?.rank == null ? 'rejected' : String(part.rank))
  const columns: readonly ColumnSpec<Pair>[] = [
    textColumn('part', 'key', (row) => row.now.id, true),
    textColumn('rank', 'v', (row) => rank(row.now)),
    textColumn('rank as issued', 'v', (row) => rank(row.issued)),
    numberColumn('stage loss', 'W', 'v', (row) => row.now.stage_loss_w, { family: 'w' }),
    numberColumn('as issued', 'W', 'v', (row) => row.issued?.stage_loss_w ?? null, { family: 'w' }),
    numberColumn('change', 'W', 'v', (row) => difference(row.now.stage_loss_w, row.issued?.stage_loss_w), {
      family: 'w',
    }),
    numberColumn('junction', '°C', 'v', (row) => row.now.junction_c, { decimals: 0 }),
    numberColumn('junction as issued', '°C', 'v', (row) => row.issued?.junction_c ?? null, { decimals: 0 }),
    textColumn('why not', 'v', (row) => row.now.reasons.map(reasonText).join(' ') || null),
  ]
  return tableBlock('Ranking at the moved values, beside the issued one', tableOf(columns, rows))
}

function reasonText({ code, value, limit }: Reason): string {
  const numbers = { ...(value === null ? {} : { value }), ...(limit === null ? {} : { limit }) }
  return isReason(code) ? sentence(reasonWords[code], numbers) : code
}

function isReason(code: string): code is keyof typeof reasonWords {
  return Object.hasOwn(reasonWords, code)
}

function difference(one: number | null, other: number | null | undefined): number | null {
  return one === null || other == null ? null : one - other
}

/** Every heading and caption says that its figures are not the issued ones, also where no colour is seen. */
function whatIfBlock(block: ReviewBlock): string {
  const marked = (text: string) => `What-if: ${text}`
  const plain = visibleDeep(block)
  switch (plain.kind) {
    case 'table':
      return blockMarkup({ ...plain, heading: marked(plain.heading) })
    case 'figure':
      return blockMarkup({ ...plain, caption: marked(plain.caption) })
    case 'list':
      return blockMarkup({ ...plain, heading: plain.heading === null ? null : marked(plain.heading) })
    default:
      return blockMarkup(plain)
  }
}

/** One trend around the moved values. */
export function whatIfTrendMarkup(over: ReviewTrendQuantity, trend: TrendResult | null, now: RankResult): string {
  if (trend === null) return blockMarkup({ kind: 'text', text: 'There is no such axis here.' })
  const blocks = {
    frequency: () => frequencyBlocks(trend),
    ambient: () => ambientBlocks(trend),
    slope: () => slopeBlocks(trend, now.candidates),
    load: () => loadBlocks(trend),
  }[over]()
  return blocks.map(whatIfBlock).join('\n')
}
