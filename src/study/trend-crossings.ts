import { compareIds } from '../decision/order-candidates.ts'
import { drawInterval } from '../decision/summarise-draws.ts'
import type { RectifierRecord } from '../domain/rectifier.ts'
import type { Stage } from '../domain/stage.ts'
import type { Crossing, StudySettings, TrendRequest } from '../domain/study.ts'
import { drawCandidate, drawStage } from './draw-candidate.ts'
import { documentValue } from './stage-variation.ts'
import { axisValues } from './trend-axis.ts'
import type { TrendSolver, TrendSpot } from './trend-solver.ts'

/** Positions at which the draws are solved to find where each of them crosses. */
const drawPositions = 9

export interface CrossingInput {
  readonly stage: Stage
  readonly parts: readonly RectifierRecord[]
  readonly request: TrendRequest
  readonly settings: StudySettings
  readonly solver: TrendSolver
  readonly axis: readonly number[]
  /** One row per position, one column per part. */
  readonly spots: readonly (readonly TrendSpot[])[]
}

/** Every place along the axis where one accepted part becomes cheaper for the stage than another. */
export function findCrossings(input: CrossingInput): Crossing[] {
  const { parts, axis } = input
  const draws = drawLosses(input)
  const found: Crossing[] = []
  parts.forEach((_, a) => {
    for (let b = a + 1; b < parts.length; b++) {
      for (let k = 1; k < axis.length; k++) {
        const crossing = crossingBetween(input, a, b, k, draws)
        if (crossing !== null) found.push(crossing)
      }
    }
  })
  return found.sort((x, y) => x.at - y.at || compareIds(x.from, y.from) || compareIds(x.to, y.to))
}

function crossingBetween(
  input: CrossingInput,
  a: number,
  b: number,
  k: number,
  draws: (index: number) => readonly Float64Array[],
): Crossing | null {
  const { parts, axis, spots, solver, request } = input
  const before = gapOf(spots[k - 1]![a]!, spots[k - 1]![b]!)
  const after = gapOf(spots[k]![a]!, spots[k]![b]!)
  if (before === null || after === null || before === 0 || before * after > 0) return null
  const gapAt = (value: number): number => {
    const first = solver.spotAt(parts[a]!, value).stageLoss
    const second = solver.spotAt(parts[b]!, value).stageLoss
    return first === null || second === null ? Number.NaN : second - first
  }
  const at = solver.crossing(gapAt, axis[k - 1]!, axis[k]!)
  // A rejected part crosses nobody; what a part is elsewhere in the step does not matter.
  if (at === null || !usable(solver.spotAt(parts[a]!, at)) || !usable(solver.spotAt(parts[b]!, at))) return null
  const interval = crossingInterval(request, draws(a), draws(b))
  return {
    at: documentValue(request.over, at),
    low: interval === null ? null : documentValue(request.over, interval.low),
    high: interval === null ? null : documentValue(request.over, interval.high),
    from: parts[before > 0 ? a : b]!.id,
    to: parts[before > 0 ? b : a]!.id,
  }
}

function usable({ judgement }: TrendSpot): boolean {
  return judgement.reasons.length === 0
}

/** Loss of b minus loss of a; null where one has no stable temperature. */
function gapOf(a: TrendSpot, b: TrendSpot): number | null {
  return a.stageLoss !== null && b.stageLoss !== null ? b.stageLoss - a.stageLoss : null
}

/** Draws of a part at a few positions, solved when first asked for; paired across parts and positions. */
function drawLosses({
  stage,
  parts,
  request,
  settings,
  solver,
}: CrossingInput): (index: number) => readonly Float64Array[] {
  const known = new Map<number, readonly Float64Array[]>()
  const shared = settings.draws > 0 ? drawStage(stage, settings.seed, settings.draws) : null
  const positions = axisValues({ ...request, steps: drawPositions })
  return (index) => {
    let columns = known.get(index)
    if (columns === undefined) {
      columns = positions.map((value) => {
        const { candidate, judgement } = solver.spotAt(parts[index]!, value)
        if (judgement.point === null || shared === null) return new Float64Array(settings.draws).fill(Number.NaN)
        return drawCandidate(candidate, judgement.point, true, shared, settings.seed).stageLoss
      })
      known.set(index, columns)
    }
    return columns
  }
}

/**
 * 5th and 95th percentile of where the draws cross, by straight lines between the positions. Draws that do not cross
 * on the axis lie beyond one of its ends; where a percentile falls among them there is no interval to state.
 */
function crossingInterval(
  request: TrendRequest,
  a: readonly Float64Array[],
  b: readonly Float64Array[],
): { readonly low: number; readonly high: number } | null {
  const positions = axisValues({ ...request, steps: drawPositions })
  const draws = a[0]?.length ?? 0
  if (draws === 0) return null
  const at = new Float64Array(draws)
  for (let draw = 0; draw < draws; draw++) at[draw] = crossingOfDraw(positions, (k) => b[k]![draw]! - a[k]![draw]!)
  const interval = drawInterval(at.filter((value) => !Number.isNaN(value)))
  if (interval === null || !Number.isFinite(interval.low) || !Number.isFinite(interval.high)) return null
  return interval
}

function crossingOfDraw(positions: readonly number[], gap: (k: number) => number): number {
  for (let k = 1; k < positions.length; k++) {
    const before = gap(k - 1)
    const after = gap(k)
    if (before * after <= 0 && before !== after) {
      return positions[k - 1]! + ((positions[k]! - positions[k - 1]!) * before) / (before - after)
    }
  }
  // Which end the crossing lies beyond: the one with the smaller gap.
  const first = Math.abs(gap(0))
  const last = Math.abs(gap(positions.length - 1))
  if (Number.isNaN(first) || Number.isNaN(last)) return Number.NaN
  return first < last ? Number.NEGATIVE_INFINITY : Number.POSITIVE_INFINITY
}
