import type { CandidateResult, RankResult } from '../../domain/result.ts'
import type { ReviewResult } from '../../domain/review.ts'
import { quantity } from '../format.ts'
import { numberColumn, tableOf, textColumn } from '../table-view.ts'
import type { Fact } from '../view-types.ts'
import { partColumns } from './nominal-tables.ts'
import { operatingWaveform } from './operating-waveform.ts'
import { type ReviewSection, type TableBlock, tableBlock } from './review-types.ts'

export function pointSection({ rank }: ReviewResult): ReviewSection {
  const { stage } = rank
  const leader = rank.candidates.find(({ point }) => point !== null)
  const mains = stage.kind === 'mains-boost'
  const facts: Fact[] = [
    { label: 'Topology', text: stage.kind },
    { label: mains ? 'Mains' : 'Input', text: quantity(stage.input_v, 'V') },
    { label: 'Output', text: `${quantity(stage.output_v, 'V')}, ${quantity(stage.output_w, 'W')}` },
    { label: 'Frequency', text: quantity(stage.frequency_hz, 'Hz') },
    { label: 'The rectifier blocks', text: quantity(stage.blocking_v, 'V') },
    { label: 'Current falls at', text: quantity(stage.slope_a_per_s, 'A/us') },
    {
      label: 'Conduction',
      text:
        stage.mode === null ? 'none: no candidate has a temperature' : `${stage.mode}${mains ? ' at the crest' : ''}`,
    },
  ]
  const share = leader?.line?.continuous_share
  if (share !== undefined)
    facts.push({ label: 'Continuous over', text: `${(share * 100).toFixed(0)} % of the half cycle` })
  return {
    title: 'Operating point',
    blocks: [
      { kind: 'facts', items: facts },
      ...(leader?.point == null
        ? []
        : [
            {
              kind: 'figure',
              svg: operatingWaveform(leader.point, stage, leader.id),
              caption: `Inductor and rectifier current with ${leader.id}${mains ? ', at the crest of the mains' : ''}. The recovery event starts from the valley, not from the output current.`,
            } as const,
          ]),
      pointTable(rank),
    ],
  }
}

/** Depends on no draw; recalculated like the ledger. */
export function pointTable({ candidates }: Pick<RankResult, 'candidates'>): TableBlock {
  const amps = (title: string, value: (row: CandidateResult) => number | null) =>
    numberColumn<CandidateResult>(title, 'A', 'point', value, { family: 'amps' })
  return tableBlock(
    'Operating point of each part',
    tableOf(
      [
        ...partColumns,
        textColumn<CandidateResult>('mode', 'point', ({ point }) => point?.mode ?? null),
        numberColumn<CandidateResult>('duty', '%', 'point', ({ point }) => point?.duty ?? null, {
          scale: 100,
          decimals: 1,
        }),
        amps('mean inductor', ({ point }) => point?.mean_a ?? null),
        amps('ripple', ({ point }) => point?.ripple_a ?? null),
        amps('peak', ({ point }) => point?.peak_a ?? null),
        amps('valley, at turn-off', ({ point }) => point?.valley_a ?? null),
        numberColumn<CandidateResult>('slope', 'A/µs', 'point', ({ event }) => event?.slope_a_per_s ?? null, {
          scale: 1e-6,
        }),
        numberColumn<CandidateResult>('blocks', 'V', 'point', ({ event }) => event?.blocking_v ?? null, {
          decimals: 0,
        }),
      ],
      candidates,
    ),
    { exact: true },
  )
}
