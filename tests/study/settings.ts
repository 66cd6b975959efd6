import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { CandidateResult, RankResult } from '../../src/domain/result.ts'
import type { Stage } from '../../src/domain/stage.ts'
import type { StudySettings } from '../../src/domain/study.ts'
import { rank } from '../../src/study/rank.ts'

export function settings(draws: number, seed = 1): StudySettings {
  return { seed, draws, version: '0', inputs: [] }
}

/** Ranks without draws. */
export function ranked(at: Stage, ...records: readonly RectifierRecord[]): RankResult {
  return rank(at, records, settings(0))
}

/** The one candidate of a stage, without draws. */
export function alone(at: Stage, record: RectifierRecord): CandidateResult {
  return ranked(at, record).candidates[0]!
}

export function reasonCodes({ reasons }: CandidateResult): readonly string[] {
  return reasons.map(({ code }) => code)
}

export function warningCodes(result: RankResult, candidate?: string): readonly string[] {
  return result.warnings
    .filter((each) => candidate === undefined || each.candidate === candidate)
    .map(({ code }) => code)
}
