import { celsiusZero } from '../domain/constants.ts'
import type { RectifierRecord } from '../domain/rectifier.ts'
import type { CandidateResult } from '../domain/result.ts'
import type { ConventionFigure, CurrentCheck, ReviewMethod, ReviewResult } from '../domain/review.ts'
import type { Stage } from '../domain/stage.ts'
import type { StudySettings } from '../domain/study.ts'
import { conventionEnergies } from '../models/energy-conventions.ts'
import { models } from '../models/registry.ts'
import { row } from '../stage/kernel.ts'
import { type Candidate, prepareCandidate } from './candidate.ts'
import { classLedger, guessLedger } from './class-ledger.ts'
import { eventWaveform } from './event-waveform.ts'
import { evidenceCurve } from './evidence-curves.ts'
import { recordLedger, stageLedger } from './input-ledger.ts'
import { judge } from './judge-candidate.ts'
import { chooseCandidates, rank } from './rank.ts'
import { reviewTrend } from './review-trends.ts'
import { rowComparisons } from './row-comparisons.ts'

/** Parts whose events are drawn and set beside other conventions. */
const shownParts = 3

/** The whole of the review document as data: the ranking, four trends, the events, the rows, the inputs. */
export function review(stage: Stage, records: readonly RectifierRecord[], settings: StudySettings): ReviewResult {
  const ranked = rank(stage, records, settings)
  const chosen = chooseCandidates(stage, records)
  const shown = shownOf(ranked.candidates)
  const candidates = chosen.map((record) => prepareCandidate(stage, record, records))
  const trendOver = (over: keyof ReviewResult['trends']) => reviewTrend(stage, records, ranked, over, settings)
  return {
    rank: ranked,
    trends: {
      frequency: trendOver('frequency'),
      load: trendOver('load'),
      slope: trendOver('slope'),
      ambient: trendOver('ambient'),
    },
    waveforms: shown.flatMap(({ id, event }) => eventWaveform(id, event, stage.switch.voltageFall) ?? []),
    evidence: shown.flatMap(({ id, event }) => {
      const candidate = candidates.find(({ record }) => record.id === id)
      return candidate === undefined ? [] : (evidenceCurve(candidate, event) ?? [])
    }),
    rows: candidates.flatMap(rowComparisons),
    conventions: shown.flatMap((part) => conventionsOf(part, stage.frequency)),
    ledger: [
      ...stageLedger(stage),
      ...chosen.flatMap((record) => [...recordLedger(record), ...guessLedger(stage, record)]),
      ...classLedger(chosen),
    ],
    currents: candidates.map(currentCheck),
    methods: models.map(methodOf),
    limits: {
      junction_c: stage.limits.junction === null ? null : stage.limits.junction - celsiusZero,
      voltage_use: stage.limits.voltageUse,
    },
  }
}

/** The best accepted parts; first those that recover, because the others have no event to show. */
function shownOf(candidates: readonly CandidateResult[]): readonly CandidateResult[] {
  const accepted = candidates.filter((candidate) => candidate.accepted)
  return (accepted.length > 0 ? accepted : candidates).filter(recovers).slice(0, shownParts)
}

function recovers({ event }: CandidateResult): boolean {
  return event !== null && event.qrr_c > 0 && event.current_a !== 0
}

function currentCheck(candidate: Candidate): CurrentCheck {
  const { record, kernel } = candidate
  const { point } = judge(candidate)
  return {
    id: record.id,
    mean_a: point === null ? null : point.rows[row.meanRectifierCurrent]!,
    limit_a: record.ratings.averageCurrent * kernel.parts,
    reverse_voltage_v: record.ratings.reverseVoltage,
  }
}

function methodOf({ id, equation, source, bias, validity }: ReviewMethod): ReviewMethod {
  return { id, equation, source, bias, validity }
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
