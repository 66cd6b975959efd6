import { compareIds } from '../decision/order-candidates.ts'
import type { Caveat } from '../domain/caveat.ts'
import type { CandidateResult } from '../domain/result.ts'
import type { Stage } from '../domain/stage.ts'
import type { ProfileResult } from './duty-profile.ts'

/** Where the order of the accepted parts is another one than the ranking: by total, at other mains, at other loads. */
export function orderCaveats(
  stage: Stage,
  candidates: readonly CandidateResult[],
  profiles: ReadonlyMap<string, ProfileResult>,
): Caveat[] {
  const ranked = candidates.filter(({ accepted }) => accepted)
  const order = ranked.map(({ id }) => id)
  const found: Caveat[] = []
  const byTotal = orderBy(ranked, (part) => part.losses_w.total)
  if (differs(order, byTotal))
    found.push({ code: 'order-by-total-differs', candidate: '', data: { order: inWords(byTotal) } })
  ranked[0]?.at_mains?.forEach(({ mains_v }, index) => {
    const there = orderBy(ranked, (part) => part.at_mains?.[index]?.stage_loss_w ?? null)
    if (differs(order, there))
      found.push({ code: 'order-differs-at-mains', candidate: '', data: { mains: mains_v, order: inWords(there) } })
  })
  // A ranking that flips means another best part; lower places swapping at light load would only be noise.
  const flips = new Set<string>()
  stage.dutyProfile?.forEach(({ load }, index) => {
    const cheapest = cheapestAt(ranked, profiles, index)
    if (cheapest === order[0] || cheapest === undefined || flips.has(cheapest)) return
    flips.add(cheapest)
    const there = orderBy(ranked, (part) => profiles.get(part.id)?.losses[index] ?? null)
    found.push({ code: 'order-differs-at-load', candidate: '', data: { load, order: inWords(there) } })
  })
  for (const part of candidates) {
    if (profiles.get(part.id)?.energy === null) found.push({ code: 'profile-unsettled', candidate: part.id, data: {} })
    if ((part.thermal_lost_share ?? 0) > 0)
      found.push({ code: 'thermal-lost', candidate: part.id, data: { share: part.thermal_lost_share! } })
  }
  return found
}

/** Id of the part with the least loss at one load: a year of quarter-hours is not sorted load by load. */
function cheapestAt(
  ranked: readonly CandidateResult[],
  profiles: ReadonlyMap<string, ProfileResult>,
  index: number,
): string | undefined {
  let best: string | undefined
  let least = Number.POSITIVE_INFINITY
  for (const { id } of ranked) {
    const loss = profiles.get(id)?.losses[index] ?? Number.POSITIVE_INFINITY
    if (best === undefined || loss < least || (loss === least && compareIds(id, best) < 0)) {
      best = id
      least = loss
    }
  }
  return best
}

/** Of a long order its beginning. */
function inWords(order: readonly string[]): string {
  return order.length > 8 ? `${order.slice(0, 8).join(', ')}, then ${order.length - 8} more` : order.join(', ')
}

function orderBy(parts: readonly CandidateResult[], loss: (part: CandidateResult) => number | null): string[] {
  const value = (part: CandidateResult): number => loss(part) ?? Number.POSITIVE_INFINITY
  return parts.toSorted((a, b) => compareLosses(value(a), value(b)) || compareIds(a.id, b.id)).map(({ id }) => id)
}

/** Infinity equals itself here: its difference would not be a number. */
function compareLosses(a: number, b: number): number {
  return a < b ? -1 : a > b ? 1 : 0
}

function differs(a: readonly string[], b: readonly string[]): boolean {
  return a.some((id, index) => id !== b[index])
}
