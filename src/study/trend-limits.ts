import { compareIds } from '../decision/order-candidates.ts'
import type { RectifierRecord } from '../domain/rectifier.ts'
import type { TrendQuantity, TrendResult } from '../domain/study.ts'
import { documentValue } from './stage-variation.ts'
import type { TrendSolver, TrendSpot } from './trend-solver.ts'

export interface LimitInput {
  readonly over: TrendQuantity
  readonly parts: readonly RectifierRecord[]
  readonly solver: TrendSolver
  readonly axis: readonly number[]
  readonly spots: readonly (readonly TrendSpot[])[]
}

/** Where each part starts or ceases to break one of the acceptance rules; `why` is the rule's code. */
export function findLimits({ over, parts, solver, axis, spots }: LimitInput): TrendResult['limits'] {
  const found: { readonly id: string; readonly at: number; readonly why: string }[] = []
  parts.forEach((record, column) => {
    for (let k = 1; k < axis.length; k++) {
      const before = codesOf(spots[k - 1]![column]!)
      const after = codesOf(spots[k]![column]!)
      for (const why of changedCodes(before, after)) {
        const held = before.has(why)
        const holds = (value: number): boolean => codesOf(solver.spotAt(record, value)).has(why) === held
        found.push({ id: record.id, at: documentValue(over, solver.edge(holds, axis[k - 1]!, axis[k]!)), why })
      }
    }
  })
  return found.sort((a, b) => a.at - b.at || compareIds(a.id, b.id) || compareIds(a.why, b.why))
}

function codesOf({ judgement }: TrendSpot): ReadonlySet<string> {
  return new Set(judgement.reasons.map(({ code }) => code))
}

/** Without a temperature no other rule can be judged, so only the loss of the temperature itself is an event there. */
function changedCodes(before: ReadonlySet<string>, after: ReadonlySet<string>): string[] {
  const lost = 'no-stable-temperature'
  if (before.has(lost) !== after.has(lost)) return [lost]
  if (before.has(lost)) return []
  return [...new Set([...before, ...after])].filter((code) => before.has(code) !== after.has(code)).sort()
}
