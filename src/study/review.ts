import { celsiusZero } from '../domain/constants.ts'
import type { RectifierRecord } from '../domain/rectifier.ts'
import type { CandidateResult } from '../domain/result.ts'
import type { ConventionFigure, ReviewResult } from '../domain/review.ts'
import type { Stage } from '../domain/stage.ts'
import type { StudySettings, TrendQuantity, TrendRequest, TrendResult } from '../domain/study.ts'
import { conventionEnergies } from '../models/energy-conventions.ts'
import { prepareCandidate } from './candidate.ts'
import { eventWaveform } from './event-waveform.ts'
import { recordLedger, stageLedger } from './input-ledger.ts'
import { chooseCandidates, rank } from './rank.ts'
import { rowComparisons } from './row-comparisons.ts'
import { trend } from './trend.ts'

/** Parts whose events are drawn and set beside other conventions. */
const shownParts = 3
/** Parts whose curves are drawn along the axes, best first. */
const tracedParts = 6
const steps = 21

/** The whole of the review document as data: the ranking, four trends, the events, the rows, the inputs. */
export function review(stage: Stage, records: readonly RectifierRecord[], settings: StudySettings): ReviewResult {
  const ranked = rank(stage, records, settings)
  const chosen = chooseCandidates(stage, records)
  const shown = ranked.candidates.filter(({ accepted }) => accepted).slice(0, shownParts)
  // Curves of every part would hide each other; where nothing is accepted the rejected ones are the subject.
  const traced = ranked.candidates
    .filter(({ event }) => event !== null)
    .slice(0, tracedParts)
    .map(({ id }) => id)
  const trendOf = (over: TrendQuantity, from: number, to: number, logarithmic: boolean): TrendResult | null => {
    if (traced.length === 0) return null
    const request: TrendRequest = { over, from, to, steps, logarithmic }
    return trend({ ...stage, candidates: traced }, records, request, { ...settings, draws: 0 })
  }
  const slope = ranked.stage.slope_a_per_s
  const { cooling } = stage
  return {
    rank: ranked,
    trends: {
      frequency: trendOf('frequency', stage.frequency / 3, stage.frequency * 3, true),
      load: trendOf('load', 0.1, 1, false),
      slope: slope > 0 ? trendOf('slope', slope / 4, slope * 4, true) : null,
      ambient:
        cooling.kind === 'case'
          ? null
          : trendOf('ambient', cooling.ambientTemperature - 40, cooling.ambientTemperature + 60, false),
    },
    waveforms: shown.flatMap(({ id, event }) => eventWaveform(id, event, stage.switch.voltageFall) ?? []),
    rows: chosen.flatMap((record) => rowComparisons(prepareCandidate(stage, record, records))),
    conventions: shown.flatMap((part) => conventionsOf(part, stage.frequency)),
    ledger: [...stageLedger(stage), ...chosen.flatMap(recordLedger)],
    limits: {
      junction_c: stage.limits.junction === null ? null : stage.limits.junction - celsiusZero,
      voltage_use: stage.limits.voltageUse,
    },
  }
}

function conventionsOf({ id, event }: CandidateResult, frequency: number): ConventionFigure[] {
  if (event === null || !(event.qrr_c > 0) || event.current_a === 0) return []
  const others = conventionEnergies({
    voltage: event.blocking_v,
    current: event.current_a,
    peakReverseCurrent: event.peak_reverse_a,
    timeToPeak: event.ta_s,
    recoveryTime: event.trr_s,
    charge: event.qrr_c,
  })
  const ours = {
    name: 'this document: V (Qrr + I ta), both shares',
    heats: 'both',
    energy: event.rectifier_j + event.switch_added_j,
    source: 'charge control; voltage moves after the peak',
  }
  return [ours, ...others].map(({ name, heats, energy, source }) => ({
    id,
    name,
    heats,
    energy_j: energy,
    power_w: energy * frequency,
    source,
  }))
}
