import type { EventWaveform, EvidenceCurve, ReviewResult, RowComparison } from '../../domain/review.ts'
import { lineChart } from '../charts/line-chart.ts'
import { waveformChart } from '../charts/waveform-chart.ts'
import { celsius, quantity, significant } from '../format.ts'
import { type ColumnSpec, numberColumn, tableOf, textColumn } from '../table-view.ts'
import { figureWords } from '../words/review-words.ts'
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

const scales = {
  qrr_c: ['event.qrr_c', 'C'],
  peak_reverse_a: ['event.peak_reverse_a', 'A'],
  trr_s: ['event.trr_s', 's'],
} as const

function rowTable(rows: readonly RowComparison[]): TableBlock {
  const columns: readonly ColumnSpec<RowComparison>[] = [
    textColumn('part', 'key', ({ id }) => id, true),
    textColumn('row', 'row', ({ row }) => row),
    textColumn('grade', 'row', ({ grade }) => grade),
    numberColumn('current', 'A', 'row', ({ current_a }) => current_a),
    numberColumn('slope', 'A/µs', 'row', ({ slope_a_per_s }) => slope_a_per_s, { scale: 1e-6 }),
    numberColumn('junction', '°C', 'row', ({ junction_c }) => junction_c, { decimals: 0 }),
    textColumn('figure', 'row', ({ figure }) => figureWords[scales[figure][0]] ?? figure),
    textColumn('given', 'row', ({ figure, given }) => quantity(given, scales[figure][1])),
    textColumn('fit', 'row', ({ figure, model }) => quantity(model, scales[figure][1])),
    textColumn('fit over given', 'row', ({ given, model }) => significant(model / given)),
  ]
  return tableBlock('Given rows beside the fit', tableOf(columns, rows), {
    long: true,
    note: 'The fit under the condition of the row itself. It is not forced through a row: rows carry reading errors, and the class weighs in where rows are few. A row of grade maximum lies above the typical fit.',
  })
}
