import type { EventWaveform, EvidenceCurve, ReviewResult, RowComparison } from '../../domain/review.ts'
import { lineChart } from '../charts/line-chart.ts'
import { waveformChart } from '../charts/waveform-chart.ts'
import { celsius, quantity } from '../format.ts'
import { type ColumnSpec, numberColumn, tableOf, textColumn } from '../table-view.ts'
import { timeUnit } from './operating-waveform.ts'
import { type ReviewBlock, type ReviewSection, type TableBlock, tableBlock } from './review-types.ts'

export function eventSection(review: ReviewResult): ReviewSection {
  const { waveforms, evidence, rows } = review
  const none = review.rank.candidates
    .filter(({ event }) => event?.none != null)
    .map(({ id, event }) => ({ lead: id, text: `no hard recovery: ${event!.none}.` }))
  return {
    title: 'The recovery event',
    blocks: [
      {
        kind: 'text',
        text:
          waveforms.length === 0
            ? 'No acceptable part recovers hard here, so there is no event to draw.'
            : 'Computed at the operating point: the switch takes the current over at the slope, the rectifier runs on through zero to its peak reverse current, only then the voltage moves and the current dies away.',
      },
      ...waveforms.map(waveformFigure),
      ...evidence.map(evidenceFigure),
      ...(none.length === 0
        ? []
        : [{ kind: 'list', heading: 'Parts without hard recovery', tone: 'plain', items: none } as const]),
      ...(rows.length === 0 ? [] : [rowTable(rows)]),
    ],
  }
}

export function waveformFigure(wave: EventWaveform): ReviewBlock {
  const first = wave.time_s[0] ?? 0
  const [scale, unit] = timeUnit((wave.time_s[wave.time_s.length - 1] ?? 0) - first)
  const trace = (name: string, values: readonly number[]) => ({
    name,
    points: values.map((value, k) => [wave.time_s[k]! * scale, value] as const),
  })
  const svg = waveformChart({
    title: `Recovery of ${wave.id}, computed`,
    time: `time from turn-on (${unit})`,
    panels: [
      { axis: 'current (A)', traces: [trace('rectifier', wave.current_a)] },
      { axis: 'reverse voltage (V)', traces: [trace('voltage', wave.voltage_v)] },
    ],
    panelHeight: 150,
  })
  return {
    kind: 'figure',
    svg,
    caption: `Current and reverse voltage of ${wave.id} at one turn-on of the switch, from the model; nothing measured is in this drawing.`,
  }
}

/** What the rows give and what is read beyond them, apart. */
function evidenceFigure(curve: EvidenceCurve): ReviewBlock {
  const point = (at: EvidenceCurve['points'][number]) => ({
    x: at.slope_a_per_s * 1e-6,
    y: at.qrr_c * 1e9,
    dashed: at.extrapolated,
  })
  const svg = lineChart({
    title: `Recovered charge of ${curve.id} against slope`,
    x: { title: 'current slope (A/µs)', logarithmic: true },
    y: { title: 'Qrr (nC)' },
    series: [{ name: 'fit', points: curve.points.map(point) }],
    given: curve.given.map(({ row, slope_a_per_s, current_a, junction_c, qrr_c }) => ({
      x: slope_a_per_s * 1e-6,
      y: qrr_c * 1e9,
      text: `${row.replace('recovery ', '')}: ${quantity(current_a, 'A')}, ${celsius(junction_c)}`,
    })),
    marks: [
      {
        x: curve.slope_a_per_s * 1e-6,
        text: `operating point: ${quantity(curve.current_a, 'A')}, ${celsius(curve.junction_c)}`,
      },
    ],
    height: 320,
  })
  return {
    kind: 'figure',
    svg,
    caption: `Rings: charges that rows of ${curve.id} state, each at its own current and temperature. Line: the fit at the current and junction of the stage, from the steady state; dashed where it lies beyond the rows.`,
  }
}

interface RowLine {
  readonly row: RowComparison
  readonly given: ReadonlyMap<RowComparison['figure'], RowComparison>
}

/** One line a row, however many figures it states. */
function rowLines(rows: readonly RowComparison[]): readonly RowLine[] {
  const lines = new Map<string, { row: RowComparison; given: Map<RowComparison['figure'], RowComparison> }>()
  for (const row of rows) {
    const key = JSON.stringify([row.id, row.row])
    const line = lines.get(key) ?? { row, given: new Map() }
    line.given.set(row.figure, row)
    lines.set(key, line)
  }
  return [...lines.values()]
}

const figures = [
  ['qrr_c', 'Qrr', 'nC', 1e9],
  ['peak_reverse_a', 'I_RM', 'A', 1],
  ['trr_s', 'trr', 'ns', 1e9],
] as const

function rowTable(rows: readonly RowComparison[]): TableBlock {
  const columns: readonly ColumnSpec<RowLine>[] = [
    textColumn('part', 'key', ({ row }) => row.id, true),
    textColumn('row', 'row', ({ row }) => row.row.replace('recovery ', '')),
    textColumn('grade', 'row', ({ row }) => row.grade),
    textColumn(
      'read at',
      'row',
      ({ row }) =>
        `${quantity(row.current_a, 'A')}, ${quantity(row.slope_a_per_s, 'A/us')}, ${celsius(row.junction_c)}`,
    ),
    ...figures.flatMap(([figure, name, unit, scale]): readonly ColumnSpec<RowLine>[] => [
      numberColumn(`${name} given`, unit, 'row', ({ given }) => given.get(figure)?.given ?? null, {
        scale,
        family: name,
      }),
      numberColumn(`${name} fit`, unit, 'row', ({ given }) => given.get(figure)?.model ?? null, {
        scale,
        family: name,
      }),
    ]),
  ]
  return tableBlock('Given rows beside the fit', tableOf(columns, rowLines(rows)), {
    long: true,
    note: 'The fit under the condition of the row itself. It is not forced through a row: rows carry reading errors, and the class weighs in where rows are few. A row of grade maximum lies above the typical fit.',
  })
}
