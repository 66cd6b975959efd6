import type { CandidateResult } from '../../domain/result.ts'
import type { ReviewResult } from '../../domain/review.ts'
import type { TrendResult } from '../../domain/study.ts'
import { quantity } from '../format.ts'
import { numberColumn, tableOf } from '../table-view.ts'
import { kelvinColumn, limitColumn, partColumns } from './nominal-tables.ts'
import { type ReviewBlock, type ReviewSection, tableBlock } from './review-types.ts'
import { efficiency, junction, sharesFigure, stageLoss, total, trendFigure, trendMarks } from './trend-figures.ts'
import { crossingsList, limitsList, pointsTable, slopeItem } from './trend-tables.ts'

const axisMissing: ReviewBlock = {
  kind: 'text',
  text: 'This stage has no such axis, or no candidate has a temperature.',
}

export function temperatureSection({ rank, trends }: ReviewResult): ReviewSection {
  const table = tableBlock(
    'Junction, typical and high',
    tableOf(
      [
        ...partColumns,
        kelvinColumn('junction', ({ junction_c }) => junction_c),
        kelvinColumn('junction high', ({ junction_high_c }) => junction_high_c),
        limitColumn,
        numberColumn<CandidateResult>('ambient margin', 'K', 'heat', ({ ambient_margin_k }) => ambient_margin_k, {
          decimals: 0,
        }),
        numberColumn<CandidateResult>(
          'draws without a stable temperature',
          '%',
          'heat',
          (row) => row.thermal_lost_share,
          {
            scale: 100,
            decimals: 1,
          },
        ),
      ],
      rank.candidates,
    ),
    {
      note: 'Junction and loss are solved together. The ambient margin is how much warmer the surroundings may get before the junction meets its limit.',
    },
  )
  const { ambient } = trends
  return {
    title: 'Temperature and runaway',
    blocks: [
      table,
      ...(ambient === null
        ? [
            {
              kind: 'text',
              text: 'The case temperature is fixed in the stage, so there is no ambient to move.',
            } as const,
          ]
        : [...ambientBlocks(ambient)]),
    ],
  }
}

export function ambientBlocks(trend: TrendResult): ReviewBlock[] {
  return [
    trendFigure(trend, 'Junction of the rectifier', 'junction (°C)', junction, trendMarks({ ...trend, crossings: [] })),
    trendFigure(trend, 'Total loss caused by the rectifier', 'total (W)', total),
    limitsList(trend),
    pointsTable(trend, 'Junction along the ambient', '°C', junction, 0),
    pointsTable(trend, 'Total along the ambient', 'W', total),
  ]
}

export function frequencySection({ trends: { frequency } }: ReviewResult): ReviewSection {
  return { title: 'Loss against frequency', blocks: frequency === null ? [axisMissing] : frequencyBlocks(frequency) }
}

export function frequencyBlocks(trend: TrendResult): ReviewBlock[] {
  return [
    trendFigure(trend, 'Total loss of the stage', 'stage loss (W)', stageLoss, trendMarks(trend)),
    crossingsList(trend),
    limitsList(trend),
    pointsTable(trend, 'Stage loss along the frequency', 'W', stageLoss),
    pointsTable(trend, 'Total along the frequency', 'W', total),
  ]
}

export function slopeSection({ trends: { slope }, rank }: ReviewResult): ReviewSection {
  const blocks = slope === null ? [axisMissing] : slopeBlocks(slope, rank.candidates)
  return { title: 'Loss against current slope', blocks }
}

export function slopeBlocks(trend: TrendResult, candidates: readonly CandidateResult[]): ReviewBlock[] {
  // A part without stored charge has no shares that the slope could move.
  const shown = candidates.find(({ event }) => (event?.qrr_c ?? 0) > 0) ?? candidates[0]
  return [
    {
      kind: 'text',
      text: `In watts alone a faster slope is cheaper until something else stops it: voltage, loop inductance, the saturation of the switch or a temperature. No noise level is claimed. The stage stands at ${quantity(trend.stage.slope_a_per_s, 'A/us')}.`,
    },
    trendFigure(trend, 'Stage loss', 'stage loss (W)', stageLoss, trendMarks(trend)),
    sharesFigure(trend, shown?.id ?? ''),
    {
      kind: 'list',
      heading: 'Knee and admissible edge',
      tone: 'plain',
      items: (trend.slope ?? []).map(slopeItem),
    },
    pointsTable(trend, 'Stage loss along the slope', 'W', stageLoss),
    pointsTable(trend, 'Peak reverse voltage along the slope', 'V', ({ peak_reverse_v }) => peak_reverse_v, 0),
  ]
}

export function loadSection({ trends: { load } }: ReviewResult): ReviewSection {
  return { title: 'Efficiency and watts against load', blocks: load === null ? [axisMissing] : loadBlocks(load) }
}

export function loadBlocks(trend: TrendResult): ReviewBlock[] {
  return [
    trendFigure(trend, 'Efficiency', 'efficiency (%)', efficiency),
    trendFigure(trend, 'Stage loss', 'stage loss (W)', stageLoss),
    crossingsList(trend),
    pointsTable(trend, 'Efficiency along the load', '%', efficiency, 2),
    pointsTable(trend, 'Stage loss along the load', 'W', stageLoss),
  ]
}
