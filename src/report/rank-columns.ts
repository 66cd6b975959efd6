import type { CandidateResult } from '../domain/result.ts'
import { significant } from './format.ts'
import { type ColumnSpec, numberColumn, textColumn } from './table-view.ts'

type Spec = ColumnSpec<CandidateResult>

/** What the columns need of a result. */
export interface Ranked {
  readonly candidates: readonly CandidateResult[]
  readonly verdict: { readonly best: string | null }
}

/** Columns of the ranked table, in groups that stay together where the table is divided. */
export function rankColumns(result: Ranked): readonly Spec[] {
  return [
    ...keyColumns,
    ...rankingColumns(result),
    ...ledgerColumns,
    ...stageColumns,
    ...eventColumns,
    ...mainsColumns(result.candidates),
    ...yearColumns(result.candidates),
  ]
}

const keyColumns: readonly Spec[] = [
  numberColumn('#', '', 'key', ({ rank }) => rank, {
    decimals: 0,
    key: true,
    words: ({ rank }) => (rank === null ? 'no' : null),
  }),
  textColumn('part', 'key', ({ id }) => id, true),
]

function rankingColumns({ candidates, verdict }: Ranked): readonly Spec[] {
  const best = candidates.find(({ id }) => id === verdict.best)?.stage_loss_w ?? null
  const gap = ({ stage_loss_w: loss }: CandidateResult) => (loss === null || best === null ? null : loss - best)
  const group = 'Ranking'
  return [
    watts('stage loss', group, ({ stage_loss_w }) => stage_loss_w, 'stage'),
    watts('gap to best', group, gap, 'stage'),
    numberColumn('odds best', '', group, ({ odds_best }) => odds_best, { decimals: 2 }),
    watts('total', group, ({ losses_w }) => losses_w.total),
    watts('total low', group, ({ interval_w }) => interval_w?.low ?? null),
    watts('total high', group, ({ interval_w }) => interval_w?.high ?? null),
    numberColumn('Tj', '°C', group, ({ junction_c }) => junction_c, { decimals: 0, words: noTemperature }),
    numberColumn('Tj high', '°C', group, ({ junction_high_c }) => junction_high_c, { decimals: 0 }),
    textColumn('evi\u00ADdence', group, ({ evidence }) => evidence),
  ]
}

/** "none" where there is no stable temperature: not a missing figure but an answer. */
function noTemperature({ thermal }: CandidateResult): string | null {
  return thermal === 'none' ? 'none' : null
}

function watts(title: string, group: string, value: (row: CandidateResult) => number | null, family = 'rows'): Spec {
  return numberColumn(title, 'W', group, value, { family })
}

/** The six rows, counted once; their sum is the total. */
const ledgerColumns: readonly Spec[] = [
  watts('conduc\u00ADtion', 'Losses', ({ losses_w }) => losses_w.conduction),
  watts('recov\u00ADery, recti\u00ADfier', 'Losses', ({ losses_w }) => losses_w.recovery_rectifier),
  watts('recov\u00ADery, switch', 'Losses', ({ losses_w }) => losses_w.recovery_switch),
  watts('capaci\u00ADtive', 'Losses', ({ losses_w }) => losses_w.capacitive),
  watts('leak\u00ADage', 'Losses', ({ losses_w }) => losses_w.leakage),
  watts('for\u00ADward recov\u00ADery', 'Losses', ({ losses_w }) => losses_w.forward_recovery),
  watts('total', 'Losses', ({ losses_w }) => losses_w.total),
]

const stageGroup = 'Rest of the stage loss'

/** What the stage loses beside the rectifier's six rows: with the total they make the stage loss. */
const stageColumns: readonly Spec[] = [
  watts('over\u00ADlap', stageGroup, ({ switch: part }) => part.turn_on_base_w),
  watts('turn-off', stageGroup, ({ switch: part }) => part.turn_off_w),
  watts('stored', stageGroup, ({ switch: part }) => part.stored_w),
  watts('switch conduc\u00ADtion', stageGroup, ({ switch: part }) => part.conduction_w),
  watts('induc\u00ADtor', stageGroup, ({ inductor_w }) => inductor_w),
  watts('snub\u00ADber', stageGroup, ({ snubber_w }) => snubber_w),
  watts('fixed', stageGroup, ({ fixed_w }) => fixed_w),
]

const marginGroup = 'Efficiency, margin and price'
const eventGroup = 'Part and recovery event at the operating point'

const eventColumns: readonly Spec[] = [
  textColumn('class', eventGroup, (row) => row.class),
  numberColumn('volt\u00ADage margin', '%', eventGroup, ({ voltage_margin }) => voltage_margin, {
    scale: 100,
    decimals: 1,
  }),
  numberColumn('peak reverse', 'V', eventGroup, ({ event }) => event?.peak_reverse_v ?? null, { decimals: 0 }),
  numberColumn('V_F hot', 'V', eventGroup, ({ forward_v }) => forward_v, { decimals: 3 }),
  numberColumn('Qrr', 'nC', eventGroup, ({ event }) => event?.qrr_c ?? null, { scale: 1e9 }),
  numberColumn('I_RM', 'A', eventGroup, ({ event }) => event?.peak_reverse_a ?? null),
  numberColumn('soft\u00ADness', '', eventGroup, ({ event }) => event?.softness ?? null, { words: softnessWords }),
]

/** Never a number that nobody gave: unknown, or none where nothing recovers. */
function softnessWords({ event }: CandidateResult): string | null {
  if (event === null) return null
  if (event.none !== null || event.qrr_c === 0) return 'none'
  return event.softness === null ? 'unknown' : significant(event.softness, 2)
}

function mainsColumns(candidates: readonly CandidateResult[]): readonly Spec[] {
  const levels = candidates.find(({ at_mains }) => at_mains !== null)?.at_mains ?? []
  return levels.flatMap(({ mains_v }, index) => {
    const mains = `${Math.round(mains_v)}\u00A0V:`
    const at = (row: CandidateResult) => row.at_mains?.[index] ?? null
    return [
      watts(`${mains} stage loss`, 'Over the mains', (row) => at(row)?.stage_loss_w ?? null, 'stage'),
      watts(`${mains} total`, 'Over the mains', (row) => at(row)?.total_w ?? null),
      numberColumn(`${mains} Tj`, '°C', 'Over the mains', (row) => at(row)?.junction_c ?? null, {
        decimals: 0,
        words: (row) => (at(row)?.thermal === 'none' ? 'none' : null),
      }),
    ]
  })
}

function yearColumns(candidates: readonly CandidateResult[]): readonly Spec[] {
  const group = marginGroup
  const columns: Spec[] = [
    numberColumn('effi\u00ADciency', '%', group, ({ efficiency }) => efficiency, { scale: 100, decimals: 2 }),
    numberColumn('ambi\u00ADent margin', 'K', group, ({ ambient_margin_k }) => ambient_margin_k, { decimals: 0 }),
  ]
  if (candidates.some(({ weighted_w }) => weighted_w !== null))
    columns.push(watts('mean over the profile', group, ({ weighted_w }) => weighted_w, 'stage'))
  if (candidates.some(({ energy_kwh_per_year }) => energy_kwh_per_year !== null))
    columns.push(numberColumn('energy a year', 'kWh', group, ({ energy_kwh_per_year }) => energy_kwh_per_year))
  if (candidates.some(({ price }) => price !== null))
    columns.push(numberColumn('price', '', group, ({ price }) => price, { decimals: 2 }))
  return columns
}
