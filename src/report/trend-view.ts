import type { Crossing, SlopeStudy, TrendCandidate, TrendKey, TrendResult } from '../domain/study.ts'
import { closingBlocks, drawsFact, listBlock, stageFacts, titleOf, withCautions } from './common-view.ts'
import { decimalsFor, fixed, quantity } from './format.ts'
import { type ColumnSpec, numberColumn, tableOf, textColumn } from './table-view.ts'
import type { Block, ReportView } from './view-types.ts'
import { edgeWords, limitWords, positionWords, trendAxes } from './words/trend-words.ts'

/** Everything `trend` shows; the chart is drawn beside it by each renderer that can. */
export function trendView(trend: TrendResult): ReportView {
  const blocks: Block[] = [
    { kind: 'facts', items: [...stageFacts(trend.stage), ownPoint, drawsFact(trend)] },
    { kind: 'chart' },
    {
      kind: 'table',
      heading: 'Cheapest along the trend',
      table: tableOf(cheapestColumns(trend.over), trend.points),
      note: null,
    },
    { kind: 'table', heading: 'Part by part', table: tableOf(partColumns(trend), trend.points), note: partNote },
    ...listBlock('Crossings', 'plain', crossingItems(trend)),
    ...listBlock('Limits', 'plain', limitItems(trend)),
    ...listBlock('Slope', 'plain', slopeItems(trend)),
    ...listBlock('Conduction mode', 'plain', modeItems(trend)),
    ...closingBlocks(trend),
  ]
  const points = trend.points.flatMap(({ at, candidates }) => candidates.map((candidate) => ({ at, candidate })))
  const data = withCautions(tableOf(pointColumns(trend.over), points), trend.cautions)
  return { title: titleOf(trend.stage, `trend over ${trendAxes[trend.over].name}`), blocks, data }
}

const ownPoint = {
  label: "The stage's own point",
  text: 'mode and slope above and the warnings below hold there; the tables go along the trend',
}

/** Parts in order with the modes they pass through; parts alike in one item. */
function modeItems({ over, points }: TrendResult) {
  const parts = new Map<string, string[]>()
  for (const { id } of points[0]?.candidates ?? []) {
    const steps: { mode: string; from: number; to: number }[] = []
    for (const { at, candidates } of points) {
      const mode = candidates.find((each) => each.id === id)?.mode ?? null
      const last = steps.at(-1)
      if (mode === null) continue
      if (last?.mode === mode) last.to = at
      else steps.push({ mode, from: at, to: at })
    }
    const text = steps.map(({ mode, from, to }) => modeWords(over, mode, from, to)).join('; ')
    if (text !== '') parts.set(text, [...(parts.get(text) ?? []), id])
  }
  return [...parts].map(([text, ids]) => ({ lead: ids.join(', '), text: `${text}.` }))
}

function modeWords(over: TrendKey, mode: string, from: number, to: number): string {
  const range =
    from === to ? `at ${positionWords(over, from)}` : `from ${positionWords(over, from)} to ${positionWords(over, to)}`
  return `${mode === 'boundary' ? 'at the mode boundary' : mode} ${range}`
}

/** What is said of the slope, and why its peaks stay as they are. */
function slopeItems({ slope }: TrendResult) {
  if (slope === null) return []
  const ringing = {
    lead: null,
    text: 'Overshoot is driven by the voltage_fall of the switch, which is held: the peak reverse voltage from ringing does not move with the slope.',
  }
  return [...slope.map(slopeItem), ringing]
}

const partNote = 'In parentheses: the part is not acceptable there. None: it has no stable temperature.'

type Point = TrendResult['points'][number]

function axisColumn<Row extends { readonly at: number }>(over: TrendKey): ColumnSpec<Row> {
  const { name, unit, scale } = trendAxes[over]
  return numberColumn(name, unit, 'axis', ({ at }: Row) => at, { scale, key: true })
}

/** One row a point: who is cheapest there and by how much. */
function cheapestColumns(over: TrendKey): readonly ColumnSpec<Point>[] {
  const group = 'Cheapest along the trend'
  const best = (point: Point) => ranked(point)[0] ?? null
  const second = (point: Point) => ranked(point)[1] ?? null
  return [
    axisColumn(over),
    textColumn('cheapest', group, (point) => best(point)?.id ?? null),
    numberColumn('stage loss', 'W', group, (point) => best(point)?.stage_loss_w ?? null, { family: 'stage' }),
    numberColumn('total', 'W', group, (point) => best(point)?.total_w ?? null, { family: 'stage' }),
    numberColumn('Tj', '°C', group, (point) => best(point)?.junction_c ?? null, { decimals: 0 }),
    ...ownColumns(over, best),
    textColumn('next', group, (point) => second(point)?.id ?? null),
    numberColumn('gap', 'W', group, (point) => gapOf(point), { family: 'stage' }),
    numberColumn('accept\u00ADed', '', group, (point) => ranked(point).length, { decimals: 0 }),
  ]
}

/** Stage loss and junction of every part, a column each. */
function partColumns({ over, points }: TrendResult): readonly ColumnSpec<Point>[] {
  const names = points[0]?.candidates.map(({ id }) => id) ?? []
  const column = (
    id: string,
    unit: string,
    group: string,
    value: (part: TrendCandidate) => number | null,
    decimals?: number,
  ) => {
    const find = (point: Point) => point.candidates.find((candidate) => candidate.id === id)
    const read = (point: Point) => {
      const part = find(point)
      return part === undefined ? null : value(part)
    }
    const digits = decimals ?? decimalsFor(points.map(read))
    // the soft hyphen lets a narrow table break a long id after its hyphens
    const title = id.replaceAll('-', '-\u00AD')
    return numberColumn(title, unit, group, read, {
      decimals: digits,
      words: (point) => bracketed(find(point), read(point), digits),
    })
  }
  return [
    axisColumn(over),
    ...names.map((id) => column(id, 'W', 'Stage loss', ({ stage_loss_w }) => stage_loss_w)),
    ...names.map((id) => column(id, '°C', 'Junction', ({ junction_c }) => junction_c, 0)),
  ]
}

function bracketed(part: TrendCandidate | undefined, value: number | null, decimals: number): string | null {
  if (part === undefined || part.thermal === 'none') return 'none'
  return part.accepted || value === null ? null : `(${fixed(value, decimals)})`
}

/** What the quantity itself asks for, of the cheapest: shares of turn-on and peak voltage, or efficiency. */
function ownColumns(over: TrendKey, best: (point: Point) => TrendCandidate | null): readonly ColumnSpec<Point>[] {
  const group = 'Cheapest along the trend'
  const watts = (title: string, value: (part: TrendCandidate) => number | null) =>
    numberColumn<Point>(title, 'W', group, (point) => of(best(point), value), { family: 'stage' })
  if (over === 'load')
    return [
      numberColumn('effi\u00ADciency', '%', group, (point) => of(best(point), (part) => part.efficiency), {
        scale: 100,
        decimals: 2,
      }),
    ]
  if (over !== 'slope_a_per_s') return []
  return [
    watts('recov\u00ADery, recti\u00ADfier', ({ losses_w }) => losses_w.recovery_rectifier),
    watts('recov\u00ADery, switch', ({ losses_w }) => losses_w.recovery_switch),
    watts('over\u00ADlap, switch', ({ turn_on_base_w }) => turn_on_base_w),
    numberColumn('peak reverse', 'V', group, (point) => of(best(point), (part) => part.peak_reverse_v), {
      decimals: 0,
    }),
  ]
}

function of(part: TrendCandidate | null, value: (part: TrendCandidate) => number | null): number | null {
  return part === null ? null : value(part)
}

function ranked({ candidates }: Point): TrendCandidate[] {
  const usable = candidates.filter(({ accepted, stage_loss_w }) => accepted && stage_loss_w !== null)
  return usable.toSorted((a, b) => a.stage_loss_w! - b.stage_loss_w! || (a.id < b.id ? -1 : 1))
}

function gapOf(point: Point): number | null {
  const [best, second] = ranked(point)
  return best === undefined || second === undefined ? null : second.stage_loss_w! - best.stage_loss_w!
}

function crossingItems({ over, crossings }: TrendResult) {
  const interval = ({ low, high }: Crossing) =>
    low === null || high === null
      ? ''
      : ` (in 90 % of the draws it lies within ${positionWords(over, low)} to ${positionWords(over, high)})`
  return crossings.map((crossing) => ({
    lead: positionWords(over, crossing.at),
    text: `${crossing.from} is cheaper below, ${crossing.to} above${interval(crossing)}.`,
  }))
}

function limitItems(trend: TrendResult) {
  return trend.limits.map((limit) => ({
    lead: positionWords(trend.over, limit.at),
    text: `${limit.id} ${limitWords(trend, limit)}.`,
  }))
}

function slopeItem(study: SlopeStudy) {
  const slope = (value: number) => quantity(value, 'A/us')
  const sentences = [
    study.largest_a_per_s === null
      ? `Not admissible at the lowest slope looked at${study.largest_because === 'range' ? '' : `, because of ${edgeWords(study.largest_because)}`}.`
      : study.largest_because === 'range'
        ? `No limit met up to the end of the range (${slope(study.largest_a_per_s)}).`
        : `Largest admissible slope ${slope(study.largest_a_per_s)}, set by ${edgeWords(study.largest_because)}.`,
    study.knee_a_per_s === null ? '' : `Knee at ${slope(study.knee_a_per_s)}: above it at most 5 % is left to gain.`,
    study.gain_w === null ? '' : `Going from the slope of the stage to the largest ${gainWords(study.gain_w)}.`,
    study.optimum_a_per_s === null
      ? ''
      : `Least loss at ${slope(study.optimum_a_per_s)}, because of ${edgeWords(study.optimum_because ?? '')}.`,
  ]
  return { lead: study.id, text: sentences.filter(Boolean).join(' ') }
}

function gainWords(gain: number): string {
  return gain >= 0 ? `saves ${quantity(gain, 'W')}` : `costs ${quantity(-gain, 'W')}`
}

/** One row a point and part, for the file. */
function pointColumns(
  over: TrendKey,
): readonly ColumnSpec<{ readonly at: number; readonly candidate: TrendCandidate }>[] {
  type Row = { readonly at: number; readonly candidate: TrendCandidate }
  const group = 'data'
  const watts = (title: string, value: (candidate: TrendCandidate) => number | null) =>
    numberColumn(title, 'W', group, ({ candidate }: Row) => value(candidate))
  const { name, unit, scale } = trendAxes[over]
  return [
    numberColumn(name, unit, group, ({ at }: Row) => at, { scale }),
    textColumn('part', group, ({ candidate }: Row) => candidate.id),
    watts('stage loss', ({ stage_loss_w }) => stage_loss_w),
    watts('conduction', ({ losses_w }) => losses_w.conduction),
    watts('recovery, rectifier', ({ losses_w }) => losses_w.recovery_rectifier),
    watts('recovery, switch', ({ losses_w }) => losses_w.recovery_switch),
    watts('capacitive', ({ losses_w }) => losses_w.capacitive),
    watts('leakage', ({ losses_w }) => losses_w.leakage),
    watts('forward recovery', ({ losses_w }) => losses_w.forward_recovery),
    watts('total', ({ total_w }) => total_w),
    watts('overlap, switch', ({ turn_on_base_w }) => turn_on_base_w),
    numberColumn('Tj', '°C', group, ({ candidate }: Row) => candidate.junction_c),
    numberColumn('Tj switch', '°C', group, ({ candidate }: Row) => candidate.switch_junction_c),
    numberColumn('efficiency', '%', group, ({ candidate }: Row) => candidate.efficiency, { scale: 100 }),
    numberColumn('voltage margin', '%', group, ({ candidate }: Row) => candidate.voltage_margin, { scale: 100 }),
    numberColumn('peak reverse voltage', 'V', group, ({ candidate }: Row) => candidate.peak_reverse_v),
    textColumn('mode', group, ({ candidate }: Row) => candidate.mode),
    textColumn('thermal', group, ({ candidate }: Row) => candidate.thermal),
    textColumn('accepted', group, ({ candidate }: Row) => (candidate.accepted ? 'yes' : 'no')),
    textColumn('extrapolated', group, ({ candidate }: Row) => (candidate.extrapolated ? 'yes' : 'no')),
  ]
}
