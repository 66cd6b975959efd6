import type { RectifierRecord } from '../domain/rectifier.ts'
import type { RankResult } from '../domain/result.ts'
import type { ReviewTrendQuantity } from '../domain/review.ts'
import type { Stage } from '../domain/stage.ts'
import type { StudySettings, TrendRequest, TrendResult } from '../domain/study.ts'
import { trend } from './trend.ts'

/** Parts whose curves are drawn along the axes, best first: more would hide each other. */
const tracedParts = 6
const steps = 17
/** Draws that give a crossing its interval; solving every draw at every position is what takes the time. */
const crossingDraws = 200

/**
 * One of the trends of the review document around where the stage stands; null where the stage has no such axis or no
 * part has a temperature.
 */
export function reviewTrend(
  stage: Stage,
  records: readonly RectifierRecord[],
  ranked: RankResult,
  over: ReviewTrendQuantity,
  settings: StudySettings,
): TrendResult | null {
  const request = requestOf(stage, ranked, over)
  // Where nothing is accepted the rejected ones are the subject.
  const traced = ranked.candidates
    .filter(({ event }) => event !== null)
    .slice(0, tracedParts)
    .map(({ id }) => id)
  if (request === null || traced.length === 0) return null
  const draws = over === 'frequency' ? Math.min(settings.draws, crossingDraws) : 0
  return trend({ ...stage, candidates: traced }, records, request, { ...settings, draws })
}

function requestOf(stage: Stage, ranked: RankResult, over: ReviewTrendQuantity): TrendRequest | null {
  const slope = ranked.stage.slope_a_per_s
  switch (over) {
    case 'frequency':
      return { over, from: stage.frequency / 3, to: stage.frequency * 3, steps, logarithmic: true }
    case 'load':
      return { over, from: 0.1, to: 1, steps: 10, logarithmic: false }
    case 'slope':
      return slope > 0 ? { over, from: slope / 4, to: slope * 4, steps, logarithmic: true } : null
    case 'ambient': {
      if (stage.cooling.kind === 'case') return null
      const { ambientTemperature: here } = stage.cooling
      return { over, from: here - 40, to: here + 60, steps: 21, logarithmic: false }
    }
  }
}
