import { assessAll, chooseCandidates, rank } from '../../src/study/rank.ts'
import { drawAll } from '../../src/study/uncertainty.ts'
import { type Demo, widen } from './demo.ts'
import { medianSeconds } from './timing.ts'

export const rankCandidates = 20
export const rankDraws = 1000
const settings = { seed: 1, draws: rankDraws, version: 'bench', inputs: [] }

export interface DrawFigures {
  /** Sampling and solving all draws of all candidates. */
  readonly drawsPerSecond: number
  /** What the draws add to a ranking: sampling, solving, odds, intervals, sensitivity, advice. [s] */
  readonly withDoubt: number
  /** The whole of `rank`, from records to result. [s] */
  readonly whole: number
}

export function measureDraws(demo: Demo): DrawFigures {
  const { stage, records } = widen(demo, rankCandidates)
  const assessments = assessAll(stage, chooseCandidates(stage, records), records)
  const drawing = medianSeconds(() => drawAll(stage, assessments, settings.seed, rankDraws))
  const whole = medianSeconds(() => rank(stage, records, settings))
  const nominal = medianSeconds(() => rank(stage, records, { ...settings, draws: 0 }))
  return { drawsPerSecond: (rankCandidates * rankDraws) / drawing, withDoubt: whole - nominal, whole }
}
