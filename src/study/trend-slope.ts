import type { RectifierRecord } from '../domain/rectifier.ts'
import type { Stage } from '../domain/stage.ts'
import type { SlopeStudy } from '../domain/study.ts'
import { highestBetween } from '../stage/ambient-for-junction.ts'
import { statedSlopeAt } from '../stage/book-instant.ts'
import { evaluate } from '../stage/evaluate.ts'
import { row } from '../stage/kernel.ts'
import { totalPeakReverseCurrent } from '../stage/settled-point.ts'
import type { TrendSolver, TrendSpot } from './trend-solver.ts'

/** The knee lies where the turn-on losses are this much above those at the largest admissible slope. */
const kneeShare = 0.05
/** A dip of less than this share of the loss is rounding, not an optimum. */
const leastDip = 1e-6

export interface SlopeInput {
  readonly stage: Stage
  readonly record: RectifierRecord
  readonly solver: TrendSolver
  readonly axis: readonly number[]
  /** This part along the axis. */
  readonly spots: readonly TrendSpot[]
}

/**
 * What raising the turn-on slope gives one part: in watts faster is always cheaper (PHYSICS 2), so the study names the
 * knee, the largest admissible slope and what sets it, and an interior optimum only where there is one.
 */
export function studySlope(input: SlopeInput): SlopeStudy {
  const { record, solver, spots } = input
  const admissible = admissibleRange(input)
  if (admissible === null) {
    return {
      id: record.id,
      knee_a_per_s: null,
      largest_a_per_s: null,
      largest_because: inadmissible(input, spots[0]!) ?? 'range',
      gain_w: null,
      optimum_a_per_s: null,
      optimum_because: null,
    }
  }
  const best = solver.spotAt(record, admissible.to).stageLoss
  const optimum = interiorOptimum(input, admissible)
  return {
    id: record.id,
    knee_a_per_s: kneeWithin(input, admissible),
    largest_a_per_s: admissible.to,
    largest_because: admissible.because,
    gain_w: minus(solver.spotHere(record).stageLoss, best),
    optimum_a_per_s: optimum?.at ?? null,
    optimum_because: optimum?.because ?? null,
  }
}

function minus(a: number | null, b: number | null): number | null {
  return a === null || b === null ? null : a - b
}

/** A temperature may also be lost at another input than the nominal one. */
const heatCodes: readonly string[] = ['junction-over-limit', 'no-stable-temperature', 'runaway-at-maximum-leakage']

/** First rule that a slope breaks: loop, saturation, voltage, temperature; null where it is admissible. */
function inadmissible({ stage }: SlopeInput, { candidate, judgement }: TrendSpot): string | null {
  const { kernel } = candidate
  const { point } = judgement
  if (point === null) return 'temperature'
  const { event } = point
  const current = Math.max(event.instant.valley, 0)
  if (
    kernel.loopInductance > 0 &&
    statedSlopeAt(kernel, current) > event.instant.blockingVoltage / kernel.loopInductance
  )
    return 'loop'
  // Along the axis the slope is given; the gate that bounds the current is the stage's own.
  const gate = stage.switch.slope.kind === 'gate' ? stage.switch.slope : null
  if (
    gate !== null &&
    current + totalPeakReverseCurrent(kernel, event) > gate.transconductance * (gate.drive - gate.threshold)
  )
    return 'saturation'
  const codes = judgement.reasons.map(({ code }) => code)
  if (codes.includes('voltage-margin')) return 'voltage'
  return codes.some((code) => heatCodes.includes(code)) ? 'temperature' : null
}

/** Slopes that a part bears, and what sets the upper end. */
interface AdmissibleRange {
  readonly from: number
  readonly to: number
  readonly because: string
}

/** From the last admissible position down and up to where a rule breaks: too slow a turn-on can be too hot as well. */
function admissibleRange(input: SlopeInput): AdmissibleRange | null {
  const { axis, spots, solver, record } = input
  const holds = (value: number): boolean => inadmissible(input, solver.spotAt(record, value)) === null
  const admitted = spots.map((spot) => inadmissible(input, spot) === null)
  const last = admitted.lastIndexOf(true)
  if (last < 0) return null
  const below = admitted.lastIndexOf(false, last)
  const from = below < 0 ? axis[0]! : solver.edge(holds, axis[below + 1]!, axis[below]!)
  if (last === axis.length - 1) return { from, to: axis[last]!, because: 'range' }
  const to = solver.edge(holds, axis[last]!, axis[last + 1]!)
  return { from, to, because: inadmissible(input, spots[last + 1]!)! }
}

/** The three energies of the turn-on as watts: overlap, rectifier's and switch's share of recovery. */
function turnOnLoss({ judgement }: TrendSpot): number {
  const rows = judgement.point?.rows
  if (rows === undefined) return Number.NaN
  return rows[row.turnOnBase]! + rows[row.recoveryRectifier]! + rows[row.recoverySwitch]!
}

function kneeWithin({ solver, record }: SlopeInput, { from, to }: AdmissibleRange): number | null {
  const goal = turnOnLoss(solver.spotAt(record, to)) * (1 + kneeShare)
  const excess = (value: number): number => turnOnLoss(solver.spotAt(record, value)) - goal
  if (!(excess(from) > 0)) return from
  return solver.crossing(excess, from, to)
}

function interiorOptimum(
  { axis, spots, solver, record }: SlopeInput,
  { from, to }: AdmissibleRange,
): { readonly at: number; readonly because: string } | null {
  const inside = [
    { at: from, loss: solver.spotAt(record, from).stageLoss },
    ...axis.map((at, k) => ({ at, loss: spots[k]!.stageLoss })).filter(({ at }) => at > from && at < to),
    { at: to, loss: solver.spotAt(record, to).stageLoss },
  ]
  let lowest = 0
  inside.forEach(({ loss }, k) => {
    if (loss! < inside[lowest]!.loss!) lowest = k
  })
  const before = inside[lowest - 1]
  const after = inside[lowest + 1]
  if (before === undefined || after === undefined) return null
  const loss = inside[lowest]!.loss!
  if (Math.min(before.loss!, after.loss!) - loss <= leastDip * loss) return null
  const gain = (value: number): number => -(solver.spotAt(record, value).stageLoss ?? Number.POSITIVE_INFINITY)
  const { at } = highestBetween(gain, before.at, after.at)
  const cold = (value: number): number => isothermalLoss(solver, record, at, value)
  // With the temperatures held, a dip that stays comes from how the lifetimes move with the slope.
  const stays = cold(at) < Math.min(cold(before.at), cold(after.at)) - leastDip * loss
  return { at, because: stays ? 'evidence' : 'temperature' }
}

/** Turn-on losses at another slope with the temperatures of `at`. [W] */
function isothermalLoss(solver: TrendSolver, record: RectifierRecord, at: number, value: number): number {
  const held = solver.spotAt(record, at).judgement.point!
  const { kernel } = solver.spotAt(record, value).candidate
  kernel.temperatures[0] = held.junction
  kernel.temperatures[1] = held.switchJunction
  kernel.temperatures[2] = held.junction
  evaluate(kernel)
  return kernel.rows[row.turnOnBase]! + kernel.rows[row.recoveryRectifier]! + kernel.rows[row.recoverySwitch]!
}
