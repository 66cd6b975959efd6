import type { CandidateResult } from '../domain/result.ts'
import type { SwapLoad, SwapResult } from '../domain/study.ts'
import { closingBlocks, drawsFact, listBlock, rejectedBlock, stageFacts, titleOf, withCautions } from './common-view.ts'
import { celsius, odds, quantity, significant, withInterval } from './format.ts'
import { rankColumns } from './rank-columns.ts'
import { type ColumnSpec, numberColumn, tableOf, textColumn } from './table-view.ts'
import type { Block, Fact, ReportView, Table } from './view-types.ts'
import { priceWords } from './words/swap-words.ts'

/** Everything `swap` shows, in order. */
export function swapView(swap: SwapResult): ReportView {
  const blocks: Block[] = [
    { kind: 'facts', items: [...stageFacts(swap.stage), drawsFact(swap)] },
    { kind: 'text', heading: 'Verdict', text: swap.verdict_text },
    ...listBlock(
      'Because',
      'plain',
      swap.because.map(({ text }) => ({ lead: null, text })),
    ),
    {
      kind: 'table',
      heading: 'Losses, row by row',
      table: tableOf(differenceColumns(swap), differenceRows(swap)),
      note: differenceNote,
    },
    { kind: 'facts', items: swapFacts(swap) },
    ...loadBlock(swap),
    ...rejectedBlock([swap.from, swap.to]),
    ...closingBlocks(swap),
  ]
  return {
    title: titleOf(swap.stage, `${swap.to.id} in place of ${swap.from.id}`),
    blocks,
    data: withCautions(dataTable(swap), swap.cautions),
  }
}

const differenceNote = 'Nominal figures. Difference is new less old: negative saves.'

interface DifferenceRow {
  readonly name: string
  readonly from: number | null
  readonly to: number | null
  readonly difference: number | null
}

function differenceRows({ from, to, difference_w }: SwapResult): DifferenceRow[] {
  const keys = [
    'conduction',
    'recovery_rectifier',
    'recovery_switch',
    'capacitive',
    'leakage',
    'forward_recovery',
    'total',
  ] as const
  const names = [
    'conduction',
    'recovery, rectifier',
    'recovery, switch',
    'capacitive',
    'leakage',
    'forward recovery',
    'total',
  ]
  return [
    ...keys.map((key, index) => ({
      name: names[index]!,
      from: from.losses_w[key],
      to: to.losses_w[key],
      difference: difference_w[key],
    })),
    { name: 'stage loss', from: from.stage_loss_w, to: to.stage_loss_w, difference: difference_w.stage },
  ]
}

function differenceColumns({ from, to }: SwapResult): readonly ColumnSpec<DifferenceRow>[] {
  const group = 'Losses, row by row'
  return [
    textColumn('row', 'key', ({ name }) => name, true),
    numberColumn(`old: ${from.id}`, 'W', group, (row) => row.from, { family: 'w' }),
    numberColumn(`new: ${to.id}`, 'W', group, (row) => row.to, { family: 'w' }),
    numberColumn('difference', 'W', group, (row) => row.difference, { family: 'w' }),
  ]
}

/** Everything that is one figure. */
function swapFacts(swap: SwapResult): Fact[] {
  const { from, to, saves_w } = swap
  const change = (label: string, before: string, after: string, difference: number | null): Fact => ({
    label,
    text: `${before} to ${after}${difference === null ? '' : ` (${signed(difference)} K)`}`,
  })
  const facts: (Fact | null)[] = [
    saves_w.median === null
      ? null
      : {
          label: 'Saves, median and 90 % of the draws in pairs',
          text: withInterval(saves_w.median, saves_w.low, saves_w.high, 'W'),
        },
    swap.odds_better === null ? null : { label: 'Odds that it saves', text: odds(swap.odds_better) },
    change('Junction of the rectifier', temperature(from), temperature(to), swap.junction_change_k),
    change(
      'Junction of the switch',
      celsius(from.switch.junction_c),
      celsius(to.switch.junction_c),
      swap.switch_junction_change_k,
    ),
    { label: 'Voltage margin', text: `${share(from.voltage_margin)} to ${share(to.voltage_margin)}` },
    {
      label: 'Ambient margin',
      text: `${quantity(from.ambient_margin_k, 'K')} to ${quantity(to.ambient_margin_k, 'K')}`,
    },
    swap.runaway_ambient_c === null || swap.runaway_ambient_c > to.junction_limit_c
      ? null
      : {
          label: 'Runaway of the new part at maximum leakage',
          text: `from ${celsius(swap.runaway_ambient_c)} ambient`,
        },
    swap.break_even_hz === null ? null : { label: 'Break-even', text: quantity(swap.break_even_hz, 'Hz') },
    swap.energy_kwh_per_year === null
      ? null
      : { label: 'Energy saved a year', text: `${significant(swap.energy_kwh_per_year)} kWh` },
    swap.price_difference === null ? null : { label: 'Price difference', text: priceWords(swap.price_difference) },
  ]
  return facts.filter((fact) => fact !== null)
}

function temperature({ thermal, junction_c }: CandidateResult): string {
  return thermal === 'none' ? 'none that is stable' : celsius(junction_c)
}

function share(value: number | null): string {
  return quantity(value, '%')
}

function signed(value: number): string {
  return `${value > 0 ? '+' : ''}${significant(value)}`
}

function loadBlock({ loads }: SwapResult): Block[] {
  if (loads.length === 0) return []
  const group = 'Over the loads'
  const columns: readonly ColumnSpec<SwapLoad>[] = [
    numberColumn('load', '%', 'key', ({ load }) => load, { scale: 100, key: true }),
    numberColumn('hours', 'h', group, ({ hours }) => hours),
    numberColumn('old effi\u00ADciency', '%', group, ({ from_efficiency }) => from_efficiency, {
      scale: 100,
      decimals: 2,
    }),
    numberColumn('new effi\u00ADciency', '%', group, ({ to_efficiency }) => to_efficiency, { scale: 100, decimals: 2 }),
    numberColumn('saves', 'W', group, ({ saves_w }) => saves_w),
  ]
  return [{ kind: 'table', heading: group, table: tableOf(columns, loads), note: null }]
}

/** For the file: the two parts with the columns of a ranking, then what the swap changes. */
function dataTable(swap: SwapResult): Table {
  const pair = { candidates: [{ ...swap.from }, swap.to], verdict: { best: null } }
  const columns = rankColumns(pair).filter(({ title }) => title !== '#' && title !== 'gap to best')
  const of = (value: number | null) => (row: CandidateResult) => (row === swap.to ? value : null)
  const changes: readonly ColumnSpec<CandidateResult>[] = [
    textColumn('verdict', 'swap', (row) => (row === swap.to ? swap.verdict : null)),
    numberColumn('saves', 'W', 'swap', of(swap.saves_w.median)),
    numberColumn('saves low', 'W', 'swap', of(swap.saves_w.low)),
    numberColumn('saves high', 'W', 'swap', of(swap.saves_w.high)),
    numberColumn('odds better', '', 'swap', of(swap.odds_better)),
    numberColumn('break-even', 'Hz', 'swap', of(swap.break_even_hz)),
    numberColumn('energy saved a year', 'kWh', 'swap', of(swap.energy_kwh_per_year)),
    numberColumn('junction change', 'K', 'swap', of(swap.junction_change_k)),
    numberColumn('switch junction change', 'K', 'swap', of(swap.switch_junction_change_k)),
    numberColumn('runaway ambient', '°C', 'swap', of(swap.runaway_ambient_c)),
    numberColumn('price difference', '', 'swap', of(swap.price_difference)),
  ]
  const role = textColumn<CandidateResult>('role', 'key', (row) => (row === swap.to ? 'new' : 'old'))
  return tableOf([role, ...columns, ...changes], pair.candidates)
}
