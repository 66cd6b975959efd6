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
    const codesAt = (value: number): ReadonlySet<string> => codesOf(solver.spotAt(record, value))
    for (let k = 1; k < axis.length; k++) {
      const step = { before: codesOf(spots[k - 1]![column]!), after: codesOf(spots[k]![column]!), codesAt }
      const edge = (holds: (value: number) => boolean) => solver.edge(holds, axis[k - 1]!, axis[k]!)
      for (const { at, why } of limitsWithin(step, edge))
        found.push({ id: record.id, at: documentValue(over, at), why })
    }
  })
  return found.sort((a, b) => a.at - b.at || compareIds(a.id, b.id) || compareIds(a.why, b.why))
}

function codesOf({ judgement }: TrendSpot): ReadonlySet<string> {
  return new Set(judgement.reasons.map(({ code }) => code))
}

/** One step of the axis: the rules broken at its ends and anywhere within. */
interface AxisStep {
  readonly before: ReadonlySet<string>
  readonly after: ReadonlySet<string>
  readonly codesAt: (value: number) => ReadonlySet<string>
}

type Edge = (holds: (value: number) => boolean) => number

function limitsWithin({ before, after, codesAt }: AxisStep, edge: Edge): { at: number; why: string }[] {
  const lostBefore = lostCode(before)
  const lostAfter = lostCode(after)
  // Without an operating point no other rule can be judged, so only its loss is an event there.
  if (lostBefore !== undefined && lostAfter !== undefined) return []
  const either = lostBefore ?? lostAfter
  if (either === undefined) {
    const changed = [...new Set([...before, ...after])].filter((code) => before.has(code) !== after.has(code))
    return changed.map((why) => ({ at: edge((value) => codesAt(value).has(why) === before.has(why)), why }))
  }
  // Heat may take the point before the power does: the cause is the one next to the edge, the last that was met.
  let why = either
  const at = edge((value) => {
    const lost = lostCode(codesAt(value))
    why = lost ?? why
    return (lost !== undefined) === (lostBefore !== undefined)
  })
  return [{ at, why }]
}

/** Why there is no operating point at all; undefined where there is one. */
function lostCode(codes: ReadonlySet<string>): string | undefined {
  return ['cannot-deliver', 'no-stable-temperature'].find((code) => codes.has(code))
}
