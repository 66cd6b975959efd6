import type { RectifierRecord } from '../domain/rectifier.ts'
import type { Stage } from '../domain/stage.ts'
import { axisValues } from './trend-axis.ts'
import { trendSolver } from './trend-solver.ts'

/** Searched around the stage's own frequency, by this factor either way. */
export const breakEvenReach = 20
const positions = 33

/** Frequency at which both parts cost the stage the same, the one nearest to the stage's own; null where there is none. [Hz] */
export function breakEvenFrequency(
  stage: Stage,
  from: RectifierRecord,
  to: RectifierRecord,
  records: readonly RectifierRecord[],
): number | null {
  if (from.id === to.id) return null
  const request = {
    over: 'frequency' as const,
    from: stage.frequency / breakEvenReach,
    to: stage.frequency * breakEvenReach,
    steps: positions,
    logarithmic: true,
  }
  const solver = trendSolver(stage, records, 'frequency', request.to - request.from)
  const gapAt = (frequency: number): number => {
    const before = solver.spotAt(from, frequency).stageLoss
    const after = solver.spotAt(to, frequency).stageLoss
    return before === null || after === null ? Number.NaN : before - after
  }
  const axis = axisValues(request)
  const gaps = axis.map(gapAt)
  const found: number[] = []
  for (let k = 1; k < axis.length; k++) {
    if (!(gaps[k - 1]! * gaps[k]! < 0)) continue
    const at = solver.crossing(gapAt, axis[k - 1]!, axis[k]!)
    if (at !== null) found.push(at)
  }
  const distance = (at: number): number => Math.abs(Math.log(at / stage.frequency))
  return found.sort((a, b) => distance(a) - distance(b))[0] ?? null
}
