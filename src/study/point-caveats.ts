import type { Caveat, CaveatCode } from '../domain/caveat.ts'
import { currentFloor } from '../domain/constants.ts'
import type { SentenceData } from '../domain/result.ts'
import { chargeAtTurnOff, recoveryTimeFactor, timeToPeak } from '../models/charge-control.ts'
import { statedSlopeAt } from '../stage/book-instant.ts'
import type { RecoveryEvent } from '../stage/kernel.ts'
import { conductionModeOf, totalPeakReverseCurrent } from '../stage/settled-point.ts'
import { assumedCaseToSink, assumedJunctionToCase, assumedResistances } from '../stage/thermal-network.ts'
import type { Assessment } from './assess-candidate.ts'
import type { Candidate } from './candidate.ts'
import type { NominalPoint } from './nominal-point.ts'
import { highestBlockingVoltage } from './stage-inputs.ts'

/** Softness below which recovery counts as abrupt; common practice, no source. */
const snappySoftness = 0.5
/** Share of an interval from which recovery time is flagged; common practice, no source. */
const longShare = 0.1

/** Everything to be said about one candidate: its record against itself, its fit, its point. */
export function candidateCaveats(assessment: Assessment): Caveat[] {
  const atPoint = pointCaveats(assessment)
  // Once is enough: the point's own softness stands before that of a row somewhere else.
  const told = atPoint.some(({ code }) => code === 'snappy')
  const ofRecord = assessment.candidate.caveats.filter(({ code }) => !told || code !== 'snappy')
  return [...ofRecord, ...assessment.caveats, ...atPoint]
}

/** What a reviewer must know about one candidate at its operating point. */
function pointCaveats({ candidate, point, peakReverseVoltage }: Assessment): Caveat[] {
  const id = candidate.record.id
  const found: Caveat[] = []
  const add = (code: CaveatCode, data: SentenceData): void => {
    found.push({ code, candidate: id, data })
  }
  for (const what of assumedResistances(candidate.stage, candidate.record)) {
    add('thermal-assumed', { what, value: what === 'junction_to_case' ? assumedJunctionToCase : assumedCaseToSink })
  }
  if (point === null || peakReverseVoltage === null) return found
  if (peakReverseVoltage === highestBlockingVoltage(candidate.stage) && !hasOvershootData(candidate)) {
    add('overshoot-not-included', { voltage: peakReverseVoltage })
  }
  if (point.chord) add('forward-chord', {})
  currentCaveats(candidate, point, add)
  timeCaveats(candidate, point, add)
  softnessCaveats(candidate, point, add)
  return found
}

type Add = (code: CaveatCode, data: SentenceData) => void

/** A loop stated as 0 is data: there is nothing to overshoot. Otherwise the ringing needs the capacitance too. */
function hasOvershootData({ stage, rectifier }: Candidate): boolean {
  return stage.loopInductance === 0 || (stage.loopInductance !== null && rectifier.capacitance !== null)
}

function currentCaveats({ kernel }: Candidate, { event }: NominalPoint, add: Add): void {
  const { hot, instant, slope } = event
  if (hot.outcome === 'negative-valley') add('negative-valley', { valley: instant.valley })
  const peak = totalPeakReverseCurrent(kernel, event)
  const current = Math.max(instant.valley, 0)
  if (kernel.gate !== null) {
    const available = kernel.gate.transconductance * (kernel.gate.drive - kernel.gate.threshold)
    if (current + peak > available) add('switch-saturates', { needed: current + peak, available })
  } else if (peak > 3 * current + 5) add('peak-current-unchecked', { peak, current })
  const loop = kernel.loopInductance
  const energy = loop * (peak * (peak / 2 + current))
  const recovery = hot.rectifierEnergy
  const total = kernel.parts > 1 ? recovery + (kernel.parts - 1) * event.other.rectifierEnergy : recovery
  if (energy > 0.2 * total) add('loop-energy', { energy, recovery: total })
  else if (slope * loop > 0.2 * instant.blockingVoltage) add('loop-energy', {})
}

function timeCaveats({ kernel }: Candidate, { event }: NominalPoint, add: Add): void {
  const { hot, instant } = event
  if (hot.outcome === 'residual' || hot.outcome === 'residual-gone') {
    const idle = Math.max(1 - instant.duty - instant.conductionShare, 0) / kernel.frequency
    const needed = idleNeeded(kernel, instant, hot)
    if (idle < needed) add('idle-too-short', { idle, needed })
    return
  }
  if (hot.outcome !== 'hard') return
  const time =
    hot.current / hot.slope +
    hot.timeToPeak +
    recoveryTimeFactor({ definition: { kind: 'line-90-25' }, peakReverseCurrent: hot.peakReverseCurrent }) *
      hot.tailTime
  const intervals = [
    { interval: 'on-time', available: instant.duty / kernel.frequency },
    { interval: 'conduction time', available: instant.conductionShare / kernel.frequency },
  ]
  for (const { interval, available } of intervals) {
    if (time > longShare * available)
      add('recovery-share-of-interval', { interval, time, available, share: time / available })
  }
}

/** Time in which a part that recovers softly into the inductor becomes empty: ta,s + 3 tau_rr (PHYSICS 1). [s] */
function idleNeeded(
  { frequency, hotShare }: Candidate['kernel'],
  { peak, conductionShare }: NominalPoint['instant'],
  { lifetime, tailTime }: RecoveryEvent,
): number {
  const peakCurrent = peak * hotShare
  const conductionTime = conductionShare / frequency
  const storedCharge = chargeAtTurnOff({ peakCurrent, current: 0, conductionTime, lifetime })
  return (
    timeToPeak({ current: 0, slope: peakCurrent / conductionTime, lifetime, tailTime, storedCharge }) + 3 * tailTime
  )
}

/** Abrupt recovery at the point, and at a tenth of its current, where many parts are worse. */
function softnessCaveats({ kernel, rectifier }: Candidate, { event }: NominalPoint, add: Add): void {
  if (!rectifier.storesCharge || event.hot.outcome !== 'hard') return
  if (!rectifier.softnessKnown) {
    add('softness-unknown', {})
    return
  }
  for (const share of [1, 0.1]) {
    const current = event.hot.current * share
    const softness = softnessAt(kernel.coefficients, rectifier.ratedCurrent, event.hot, current)
    if (softness < snappySoftness) {
      add('snappy', { softness, current })
      return
    }
  }
}

function softnessAt(c: Float64Array, ratedCurrent: number, hot: RecoveryEvent, current: number): number {
  // Lifetimes move from the event's own by the current's coefficients alone; slope and temperature stay.
  const moved =
    Math.log(Math.max(current / ratedCurrent, currentFloor)) -
    Math.log(Math.max(hot.current / ratedCurrent, currentFloor))
  const lifetime = hot.lifetime * Math.exp(c[1]! * moved)
  const ratio = (hot.lifetime / hot.tailTime - 1) * Math.exp(c[5]! * moved)
  const tailTime = lifetime / (1 + ratio)
  const peak = timeToPeak({ current, slope: hot.slope, lifetime, tailTime, storedCharge: lifetime * current })
  return (
    (recoveryTimeFactor({ definition: { kind: 'line-90-25' }, peakReverseCurrent: hot.slope * peak }) * tailTime) / peak
  )
}

/** What a reviewer must know about the stage itself, from all its candidates. */
export function stageCaveats(assessments: readonly Assessment[]): Caveat[] {
  const first = assessments.find(({ point }) => point !== null)
  if (first?.point == null) return []
  const { candidate, point } = first
  const { stage, kernel } = candidate
  const found: Caveat[] = []
  const add = (code: CaveatCode, data: SentenceData): void => {
    found.push({ code, candidate: '', data })
  }
  const stated = statedSlopeAt(kernel, Math.max(point.event.instant.valley, 0))
  const allowed =
    kernel.loopInductance > 0 ? kernel.instant.blockingVoltage / kernel.loopInductance : Number.POSITIVE_INFINITY
  if (stated > allowed) add('slope-limited', { stated, allowed })
  const { instant } = point
  if (conductionModeOf(instant) === 'boundary')
    add('mode-boundary', { valley: instant.continuousValley, mean: instant.meanCurrent })
  if (!kernel.thermal.switchSolved) add('switch-temperature-assumed', {})
  const limit = stage.switch.thermal?.junctionLimit ?? null
  const hottest = Math.max(...assessments.map((each) => each.point?.switchJunction ?? 0))
  if (kernel.thermal.switchSolved && limit !== null && hottest > limit)
    add('switch-over-limit', { junction: hottest, limit })
  for (const caveat of candidate.turnOn?.caveats ?? []) found.push(caveat)
  return found
}

/** Caveats as warnings of the document, sorted and without repeats. */
export function sortCaveats(caveats: readonly Caveat[]): Caveat[] {
  const key = (caveat: Caveat): string => `${caveat.candidate}\u0000${caveat.code}\u0000${JSON.stringify(caveat.data)}`
  const seen = new Map(caveats.map((caveat) => [key(caveat), caveat]))
  return [...seen.entries()].sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0)).map(([, caveat]) => caveat)
}
