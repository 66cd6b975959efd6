import { provenanceAt } from '../evidence/provenance.ts'
import { slopeAt } from '../stage/book-instant.ts'
import { junctionLimitOf } from '../stage/thermal-network.ts'
import type { Candidate } from './candidate.ts'
import { recoveryTimeOf } from './event-result.ts'
import type { NominalPoint } from './nominal-point.ts'

/** Current, slope and temperature at which the evidence is asked: of one part, the hottest. */
export interface PointCondition {
  readonly current: number
  readonly meanCurrent: number
  readonly slope: number
  readonly junction: number
  readonly voltage: number
}

export function conditionOf(candidate: Candidate, point: NominalPoint): PointCondition {
  const { hot, instant } = point.event
  return {
    current: hot.current,
    meanCurrent: instant.meanCurrent * candidate.kernel.hotShare,
    slope: hot.slope,
    junction: point.junction,
    voltage: instant.blockingVoltage,
  }
}

/** Stands in for the point of a part that has none: what its evidence would be worth at rated current and its limit. */
export function coldCondition({ stage, record, kernel }: Candidate): PointCondition {
  const current = record.ratings.averageCurrent
  const voltage = kernel.instant.blockingVoltage
  return {
    current,
    meanCurrent: current,
    slope: slopeAt(kernel, current),
    junction: junctionLimitOf(stage, record),
    voltage,
  }
}

/** Where each figure of a solved candidate comes from. */
export function originsAt(candidate: Candidate, point: NominalPoint): ReturnType<typeof provenanceAt> {
  const { read: record, rectifier } = candidate
  const { hot } = point.event
  const condition = conditionOf(candidate, point)
  const happens = hot.outcome === 'hard' || hot.outcome === 'residual'
  return provenanceAt({
    record,
    rectifier,
    condition,
    forwardCurrent: condition.meanCurrent,
    blockingVoltage: condition.voltage,
    event: happens
      ? { charge: hot.charge, peakReverseCurrent: hot.peakReverseCurrent, recoveryTime: recoveryTimeOf(hot) }
      : null,
  })
}
