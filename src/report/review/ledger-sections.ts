import type { CandidateResult } from '../../domain/result.ts'
import type { ReviewResult } from '../../domain/review.ts'
import { lossBars } from '../charts/render-chart.ts'
import { numberColumn, tableOf, textColumn } from '../table-view.ts'
import { kelvinColumn, nominalTables, partColumns, watts } from './nominal-tables.ts'
import { type ReviewBlock, type ReviewSection, type TableBlock, tableBlock } from './review-types.ts'

export function ledgerSection({ rank }: ReviewResult): ReviewSection {
  const drawn = rank.candidates.some(({ losses_w }) => losses_w.total !== null)
  return {
    title: 'Ledger of losses',
    blocks: [
      ...(drawn ? [barsFigure(rank.candidates)] : []),
      doubtTable(rank.candidates),
      ...nominalTables(rank),
      ...yearTable(rank.candidates),
    ],
  }
}

function barsFigure(candidates: readonly CandidateResult[]): ReviewBlock {
  return {
    kind: 'figure',
    svg: lossBars(candidates, '', 'issued').trim(),
    caption:
      'Losses that the rectifier causes, in itself and in the switch, stacked; the whisker holds 90 % of the draws.',
  }
}

/** Typical and high side by side. */
function doubtTable(candidates: readonly CandidateResult[]): TableBlock {
  return tableBlock(
    'Typical and high',
    tableOf(
      [
        ...partColumns,
        watts('stage loss', ({ stage_loss_w }) => stage_loss_w, 'stage'),
        numberColumn<CandidateResult>('odds best', '', 'doubt', ({ odds_best }) => odds_best, { decimals: 2 }),
        watts('total', ({ losses_w }) => losses_w.total),
        watts('total low', ({ interval_w }) => interval_w?.low ?? null),
        watts('total high', ({ interval_w }) => interval_w?.high ?? null),
        kelvinColumn('junction', ({ junction_c }) => junction_c),
        kelvinColumn('junction high', ({ junction_high_c }) => junction_high_c),
        numberColumn<CandidateResult>('Qrr', 'nC', 'doubt', ({ event }) => event?.qrr_c ?? null, { scale: 1e9 }),
        numberColumn<CandidateResult>(
          'Qrr at guaranteed maximum',
          'nC',
          'doubt',
          ({ event_maximum }) => event_maximum?.qrr_c ?? null,
          {
            scale: 1e9,
          },
        ),
        textColumn<CandidateResult>('evidence', 'doubt', ({ evidence }) => evidence),
      ],
      candidates,
    ),
    {
      note: 'Low and high are the 5th and 95th percentile of the draws. A guaranteed maximum exists only where the record holds a row of that grade.',
    },
  )
}

function yearTable(candidates: readonly CandidateResult[]): TableBlock[] {
  const profile = candidates.some(({ weighted_w }) => weighted_w !== null)
  const priced = candidates.some(({ price }) => price !== null)
  if (!profile && !priced) return []
  return [
    tableBlock(
      'Over the year, and price',
      tableOf(
        [
          ...partColumns,
          ...(profile
            ? [
                watts('mean over the profile', ({ weighted_w }) => weighted_w),
                numberColumn<CandidateResult>('energy a year', 'kWh', 'year', (row) => row.energy_kwh_per_year),
              ]
            : []),
          ...(priced
            ? [numberColumn<CandidateResult>('price', '', 'year', ({ price }) => price, { decimals: 2 })]
            : []),
        ],
        candidates,
      ),
      { note: 'Price is shown, never ranked by.' },
    ),
  ]
}

export function rejectedSection({ rank }: ReviewResult): ReviewSection {
  const rejected = rank.candidates.filter(({ accepted }) => !accepted)
  return {
    title: 'Rejected parts',
    blocks:
      rejected.length === 0
        ? [{ kind: 'text', text: 'No candidate is rejected.' }]
        : [
            {
              kind: 'list',
              heading: null,
              tone: 'plain',
              items: rejected.map(({ id, class: kind, reasons }) => ({
                lead: `${id} (${kind})`,
                text: reasons.map(({ code, text }) => `[${code}] ${text}`).join(' '),
              })),
            },
            {
              kind: 'text',
              text: 'Their figures stand in the tables of section 5 as far as they exist; they are not ranked.',
            },
          ],
  }
}
