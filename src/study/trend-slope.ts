import type { RectifierRecord } from '../domain/rectifier.ts'
import type { Stage } from '../domain/stage.ts'
import type { SlopeStudy } from '../domain/study.ts'
import { highestBetween } from '../stage/ambient-for-junction.ts'
import { statedSlopeAt } from '../stage/book-instant.ts'
import { evaluate } from '../stage/evaluate.ts'
import { row } from '../stage/kernel.ts'
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
  const { stage, record, solver, axis } = input
  const largest = largestAdmissible(input)
  const best = largest === null ? null : solver.spotAt(record, largest.at)
  const now = statedSlope(stage, best)
  const here = now === null ? null : solver.spotAt(record, now)
  const optimum = largest === null ? null : interiorOptimum(input, largest.at)
  return {
    id: record.id,
    knee_a_per_s: largest === null ? null : kneeBelow(input, largest.at),
    largest_a_per_s: largest?.at ?? null,
    largest_because: largest?.because ?? inadmissible(solver.spotAt(record, axis[0]!)) ?? 'range',
    gain_w: best?.stageLoss != null && here?.stageLoss != null ? here.stageLoss - best.stageLoss : null,
    optimum_a_per_s: optimum?.at ?? null,
    optimum_because: optimum?.because ?? null,
  }
}

/** First rule that a slope breaks: loop, saturation, voltage, temperature; null where it is admissible. */
function inadmissible({ candidate, judgement }: TrendSpot): string | null {
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
  const gate = candidate.stage.switch.slope.kind === 'gate' ? candidate.stage.switch.slope : null
  if (gate !== null && current + event.hot.peakReverseCurrent > gate.transconductance * (gate.drive - gate.threshold))
    return 'saturation'
  const codes = judgement.reasons.map(({ code }) => code)
  if (codes.includes('voltage-margin')) return 'voltage'
  return codes.some((code) => code === 'junction-over-limit' || code === 'runaway-at-maximum-leakage')
    ? 'temperature'
    : null
}

function largestAdmissible({
  axis,
  spots,
  solver,
  record,
}: SlopeInput): { readonly at: number; readonly because: string } | null {
  if (inadmissible(spots[0]!) !== null) return null
  const first = spots.findIndex((spot) => inadmissible(spot) !== null)
  if (first < 0) return { at: axis[axis.length - 1]!, because: 'range' }
  const at = solver.edge((value) => inadmissible(solver.spotAt(record, value)) === null, axis[first - 1]!, axis[first]!)
  return { at, because: inadmissible(spots[first]!)! }
}

/** The three energies of the turn-on as watts: overlap, rectifier's and switch's share of recovery. */
function turnOnLoss({ judgement }: TrendSpot): number {
  const rows = judgement.point?.rows
  if (rows === undefined) return Number.NaN
  return rows[row.turnOnBase]! + rows[row.recoveryRectifier]! + rows[row.recoverySwitch]!
}

function kneeBelow({ axis, solver, record }: SlopeInput, largest: number): number | null {
  const goal = turnOnLoss(solver.spotAt(record, largest)) * (1 + kneeShare)
  const excess = (value: number): number => turnOnLoss(solver.spotAt(record, value)) - goal
  if (!(excess(axis[0]!) > 0)) return axis[0]!
  return solver.crossing(excess, axis[0]!, largest)
}

function interiorOptimum(
  { axis, spots, solver, record }: SlopeInput,
  largest: number,
): { readonly at: number; readonly because: string } | null {
  const inside = axis
    .map((at, k) => ({ at, loss: spots[k]!.stageLoss }))
    .filter(({ at, loss }) => at <= largest && loss !== null)
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

function statedSlope(stage: Stage, spot: TrendSpot | null): number | null {
  if (stage.switch.slope.kind === 'given') return stage.switch.slope.slope
  return spot?.judgement.point?.event.slope ?? null
}
