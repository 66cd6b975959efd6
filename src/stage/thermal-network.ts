import type { RectifierRecord } from '../domain/rectifier.ts'
import type { Stage } from '../domain/stage.ts'
import type { ThermalNetwork } from './kernel.ts'

/** Stand-ins for thermal resistances that a record leaves out; common practice, no source. [K/W] */
export const assumedJunctionToCase = 2
export const assumedCaseToSink = 0.5

/** Highest allowed junction temperature: the lower of the record's rating and the stage's limit. [K] */
export function junctionLimitOf(stage: Stage, record: RectifierRecord): number {
  return Math.min(record.ratings.junction, stage.limits.junction ?? Number.POSITIVE_INFINITY)
}

/** True when stage and record together give a path from junction to surroundings. */
export function hasThermalPath(stage: Stage, record: RectifierRecord): boolean {
  const ambientMounted = record.thermal?.kind === 'ambient'
  if (stage.cooling.kind === 'case') return !ambientMounted
  if (stage.cooling.kind === 'ambient') return ambientMounted
  return true
}

/** Which thermal resistances had to be assumed. */
export function assumedResistances(
  stage: Stage,
  record: RectifierRecord,
): readonly ('junction_to_case' | 'case_to_sink')[] {
  if (record.thermal?.kind === 'ambient' || stage.cooling.kind === 'ambient') return []
  const missing: ('junction_to_case' | 'case_to_sink')[] = []
  if ((record.thermal?.junctionToCase ?? null) === null) missing.push('junction_to_case')
  if (stage.cooling.kind === 'sink' && (record.thermal?.caseToSink ?? null) === null) missing.push('case_to_sink')
  return missing
}

/**
 * The resistances between junctions and surroundings (PHYSICS 5): a fixed case; a sink, with the switch on it when
 * shared; or junction to ambient directly. A fixed case also holds the switch's mounting face.
 */
export function thermalNetwork(stage: Stage, record: RectifierRecord): ThermalNetwork {
  const { cooling } = stage
  const switchThermal = stage.switch.thermal
  const ambientMounted = record.thermal?.kind === 'ambient'
  const junctionToCase =
    record.thermal?.kind === 'case' ? (record.thermal.junctionToCase ?? assumedJunctionToCase) : assumedJunctionToCase
  const caseToSink =
    record.thermal?.kind === 'case' ? (record.thermal.caseToSink ?? assumedCaseToSink) : assumedCaseToSink
  const switchSolved =
    switchThermal !== null && (cooling.kind === 'case' || (cooling.kind === 'sink' && cooling.shared))
  const direct = record.thermal?.kind === 'ambient' ? record.thermal.junctionToAmbient : 0
  return {
    reference: cooling.kind === 'case' ? cooling.caseTemperature : cooling.ambientTemperature,
    junctionSelf: ambientMounted ? direct : cooling.kind === 'case' ? junctionToCase : junctionToCase + caseToSink,
    common: cooling.kind === 'sink' ? cooling.sinkToAmbient : 0,
    switchSelf: switchThermal?.junctionToSink ?? 0,
    rectifierOnSink: !ambientMounted && cooling.kind === 'sink',
    switchSolved,
    switchOnSink: switchSolved && cooling.kind === 'sink',
    factor: 1,
    ceiling: junctionLimitOf(stage, record) + 100,
  }
}
