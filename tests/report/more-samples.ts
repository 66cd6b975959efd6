import type { SwapResult, TrendCandidate, TrendResult } from '../../src/domain/study.ts'
import { rankSample } from './samples.ts'

/** A trend over frequency of three invented parts: two cross, the third loses its temperature half-way. */
export function trendSample(): TrendResult {
  const { format, tool, seed, draws, inputs, stage, warnings, cautions, not_covered } = rankSample()
  const at = (index: number) => 5e4 * 6 ** (index / 12)
  return {
    ...{ format, tool, seed, draws, inputs, stage, warnings, cautions, not_covered },
    over: 'frequency_hz',
    points: Array.from({ length: 13 }, (_, index) => ({
      at: at(index),
      candidates: [
        trendCandidate('larch-200v-10a-soft', 9 + 14e-5 * at(index), index > 9),
        trendCandidate('alder-200v-8a-ultrafast', 15 + 7.5e-5 * at(index), false),
        index > 6
          ? lostTrendCandidate('rowan-150v-20a-schottky')
          : trendCandidate('rowan-150v-20a-schottky', 20 + 3e-5 * at(index), false),
      ],
    })),
    crossings: [{ at: 92307.69, low: 71000, high: 118000, from: 'larch-200v-10a-soft', to: 'alder-200v-8a-ultrafast' }],
    limits: [{ id: 'rowan-150v-20a-schottky', at: 131000, why: 'no-stable-temperature' }],
    slope: null,
  }
}

function trendCandidate(id: string, loss: number, extrapolated: boolean): TrendCandidate {
  return {
    id,
    total_w: loss / 2,
    stage_loss_w: loss,
    junction_c: 50 + loss,
    switch_junction_c: 60 + loss,
    thermal: 'settled',
    efficiency: 600 / (600 + loss),
    accepted: true,
    mode: 'continuous',
    voltage_margin: 0.3,
    peak_reverse_v: 140,
    losses_w: {
      conduction: loss / 8,
      recovery_rectifier: loss / 8,
      recovery_switch: loss / 8,
      capacitive: loss / 8,
      leakage: 0,
      forward_recovery: 0,
      total: loss / 2,
    },
    turn_on_base_w: 3,
    extrapolated,
  }
}

function lostTrendCandidate(id: string): TrendCandidate {
  const nothing = null
  return {
    ...trendCandidate(id, 0, false),
    total_w: nothing,
    stage_loss_w: nothing,
    junction_c: nothing,
    switch_junction_c: nothing,
    thermal: 'none',
    efficiency: nothing,
    accepted: false,
    mode: nothing,
    voltage_margin: nothing,
    peak_reverse_v: nothing,
    turn_on_base_w: nothing,
    losses_w: {
      conduction: nothing,
      recovery_rectifier: nothing,
      recovery_switch: nothing,
      capacitive: nothing,
      leakage: nothing,
      forward_recovery: nothing,
      total: nothing,
    },
  }
}

export function swapSample(): SwapResult {
  const { format, tool, seed, draws, inputs, stage, warnings, cautions, not_covered, candidates } = rankSample()
  const [to, from] = candidates
  return {
    ...{ format, tool, seed, draws, inputs, stage, warnings, not_covered },
    cautions: [...cautions, { code: 'gate-drive-retune', text: '', data: {} }],
    from: from!,
    to: to!,
    difference_w: {
      conduction: 0,
      recovery_rectifier: 0,
      recovery_switch: -1.8,
      capacitive: 0,
      leakage: 0,
      forward_recovery: 0,
      total: -1.8,
      stage: -1.8,
    },
    saves_w: { median: 1.82, low: 0.6, high: 3.1 },
    odds_better: 0.97,
    break_even_hz: 92307.69,
    energy_kwh_per_year: 6.4,
    junction_change_k: -4.2,
    switch_junction_change_k: -2.5,
    price_difference: 0.25,
    runaway_ambient_c: null,
    loads: [
      { load: 1, hours: 1200, from_efficiency: 0.9584, to_efficiency: 0.9612, saves_w: 1.82 },
      { load: 0.3, hours: 5000, from_efficiency: 0.9713, to_efficiency: 0.973, saves_w: 0.41 },
    ],
    verdict: 'justified',
    verdict_text: '',
    because: [{ code: 'saves', text: '', data: { saves: 1.82, low: 0.6, high: 3.1, odds: 0.97 } }],
  }
}
