import type { CandidateResult, RankResult } from '../../domain/result.ts'
import { significant } from '../format.ts'
import { type ColumnSpec, numberColumn, tableOf, textColumn } from '../table-view.ts'
import { type TableBlock, tableBlock } from './review-types.ts'

type Spec = ColumnSpec<CandidateResult>

export const partColumns: readonly Spec[] = [
  numberColumn('rank', '', 'key', ({ rank }) => rank, {
    decimals: 0,
    key: true,
    words: ({ rank }) => (rank === null ? 'rejected' : null),
  }),
  textColumn('part', 'key', ({ id }) => id, true),
]

export function watts(title: string, value: (row: CandidateResult) => number | null, family = 'rows'): Spec {
  return numberColumn(title, 'W', title, value, { family })
}

export function kelvinColumn(title: string, value: (row: CandidateResult) => number | null): Spec {
  return numberColumn(title, '°C', title, value, { decimals: 0, words: noTemperature })
}

/** A limit stands whether or not a part has a temperature. */
export const limitColumn: Spec = numberColumn('limit', '°C', 'limit', ({ junction_limit_c }) => junction_limit_c, {
  decimals: 0,
})

function noTemperature({ thermal }: CandidateResult): string | null {
  return thermal === 'none' ? 'none' : null
}

/**
 * Every figure that does not depend on draws, for the printed document and for its recalculation alike: the two are
 * compared cell by cell.
 */
export function nominalTables({ candidates }: Pick<RankResult, 'candidates'>): readonly TableBlock[] {
  const exact = { exact: true } as const
  const mains = mainsColumns(candidates)
  return [
    tableBlock('Losses caused by the rectifier, nominal', tableOf([...partColumns, ...lossColumns], candidates), {
      ...exact,
      note: 'The total is the sum of the six rows before it, each counted once. Recovery stands in two columns: what heats the rectifier and what it adds in the switch.',
    }),
    tableBlock('What the choice costs the stage', tableOf([...partColumns, ...stageColumns], candidates), {
      ...exact,
      note: 'Ranking is by the stage loss: the total of the rectifier with the losses of switch, inductor, snubber and the fixed ones.',
    }),
    tableBlock('Temperature, efficiency and margin', tableOf([...partColumns, ...heatColumns], candidates), exact),
    tableBlock('The recovery event, energy per turn-on', tableOf([...partColumns, ...eventColumns], candidates), {
      ...exact,
      note: 'Energy of one event; multiplied by the frequency it is a power. For mains the event is that at the crest, while losses are means over the half cycle.',
    }),
    ...(mains.length === 0
      ? []
      : [tableBlock('Over the mains', tableOf([...partColumns, ...mains], candidates), exact)]),
  ]
}

const lossColumns: readonly Spec[] = [
  watts('conduction', ({ losses_w }) => losses_w.conduction),
  watts('recovery, rectifier', ({ losses_w }) => losses_w.recovery_rectifier),
  watts('recovery, switch', ({ losses_w }) => losses_w.recovery_switch),
  watts('capacitive', ({ losses_w }) => losses_w.capacitive),
  watts('leakage', ({ losses_w }) => losses_w.leakage),
  watts('forward recovery', ({ losses_w }) => losses_w.forward_recovery),
  watts('total', ({ losses_w }) => losses_w.total),
]

const stageColumns: readonly Spec[] = [
  watts('rectifier total', ({ losses_w }) => losses_w.total),
  watts('switch, conduction', (row) => row.switch.conduction_w),
  watts('switch, turn-on overlap', (row) => row.switch.turn_on_base_w),
  watts('switch, turn-off', (row) => row.switch.turn_off_w),
  watts('switch, stored', (row) => row.switch.stored_w),
  watts('inductor', ({ inductor_w }) => inductor_w),
  watts('snubber', ({ snubber_w }) => snubber_w),
  watts('fixed', ({ fixed_w }) => fixed_w),
  watts('stage loss', ({ stage_loss_w }) => stage_loss_w),
]

const heatColumns: readonly Spec[] = [
  kelvinColumn('junction', ({ junction_c }) => junction_c),
  limitColumn,
  numberColumn('ambient margin', 'K', 'heat', ({ ambient_margin_k }) => ambient_margin_k, { decimals: 0 }),
  kelvinColumn('switch junction', (row) => row.switch.junction_c),
  numberColumn('efficiency', '%', 'heat', ({ efficiency }) => efficiency, { scale: 100, decimals: 2 }),
  numberColumn('peak reverse', 'V', 'heat', ({ event }) => event?.peak_reverse_v ?? null, { decimals: 0 }),
  numberColumn('voltage margin', '%', 'heat', ({ voltage_margin }) => voltage_margin, { scale: 100, decimals: 1 }),
]

const eventColumns: readonly Spec[] = [
  numberColumn('current', 'A', 'event', ({ event }) => event?.current_a ?? null),
  numberColumn('V_F hot', 'V', 'event', ({ forward_v }) => forward_v, { decimals: 3 }),
  numberColumn('Qrr', 'nC', 'event', ({ event }) => event?.qrr_c ?? null, { scale: 1e9 }),
  numberColumn('I_RM', 'A', 'event', ({ event }) => event?.peak_reverse_a ?? null),
  numberColumn('trr', 'ns', 'event', ({ event }) => event?.trr_s ?? null, { scale: 1e9, decimals: 1 }),
  numberColumn('softness', '', 'event', ({ event }) => event?.softness ?? null, { words: softnessWords }),
  numberColumn('E rectifier', 'µJ', 'event', ({ event }) => event?.rectifier_j ?? null, { scale: 1e6, family: 'uJ' }),
  numberColumn('E switch added', 'µJ', 'event', ({ event }) => event?.switch_added_j ?? null, {
    scale: 1e6,
    family: 'uJ',
  }),
  numberColumn('E overlap', 'µJ', 'event', ({ event }) => event?.base_j ?? null, { scale: 1e6, family: 'uJ' }),
]

function softnessWords({ event }: CandidateResult): string | null {
  if (event === null) return null
  if (event.none !== null || event.qrr_c === 0) return 'none'
  return event.softness === null ? 'unknown' : significant(event.softness, 2)
}

function mainsColumns(candidates: readonly CandidateResult[]): readonly Spec[] {
  const levels = candidates.find(({ at_mains }) => at_mains !== null)?.at_mains ?? []
  return levels.flatMap(({ mains_v }, index) => {
    const at = (row: CandidateResult) => row.at_mains?.[index] ?? null
    const mains = `${Math.round(mains_v)} V:`
    return [
      watts(`${mains} stage loss`, (row) => at(row)?.stage_loss_w ?? null),
      watts(`${mains} total`, (row) => at(row)?.total_w ?? null),
      kelvinColumn(`${mains} junction`, (row) => at(row)?.junction_c ?? null),
    ]
  })
}
