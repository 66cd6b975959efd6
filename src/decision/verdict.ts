import { type CandidateDraws, isSettled } from './candidate-draws.ts'
import { countOdds, lostShare } from './odds.ts'
import { compareIds, orderCandidates } from './order-candidates.ts'
import { drawInterval } from './summarise-draws.ts'

/** Odds from which a best part counts as decided. */
export const decidedOdds = 0.9
/** Share of draws from above which a part cheaper than the best counts as tied with it. */
const tiedShare = 0.1

/** Who is best and how sure that is. */
export interface Decision {
  /** Rank 1: the accepted candidate with the lowest nominal stage loss. */
  readonly best: string | null
  /** Null without an accepted candidate. */
  readonly decided: boolean | null
  /** Odds of the best. [1] */
  readonly odds: number | null
  /** Those that may as well be the best; empty when decided. By id. */
  readonly tied: readonly string[]
  readonly runnerUp: string | null
  /** Nominal stage loss of the runner-up minus that of the best. [W] */
  readonly gap: number | null
  /** 5th and 95th percentile of the gap, draw by draw, lost draws left out. [W] */
  readonly gapInterval: { readonly low: number; readonly high: number } | null
  /** Share of draws lost by the best or the runner-up. [1] */
  readonly gapLostShare: number
  /** The gap in every draw, NaN where lost: for the sensitivity. Null without a runner-up. [W] */
  readonly gapDraws: Float64Array | null
}

/**
 * The verdict over all candidates.
 *
 * Decided: the best is the cheapest accepted part in at least 0.9 of the draws, its lost draws counted against it; a
 * single accepted part is decided, for nothing competes with it. Tied, while not decided: those cheaper than the best
 * in more than 0.1 of the draws (equal losses count half); if the doubt is spread so thinly that none is, the one
 * most often cheaper.
 *
 * @throws Never.
 */
export function decide(candidates: readonly CandidateDraws[]): Decision {
  const ranked = orderCandidates(candidates).filter((candidate) => candidate.accepted)
  const [best, runnerUp] = ranked
  if (!best) return nobody
  const odds = countOdds(ranked)[0]!.best
  const decided = !runnerUp || odds >= decidedOdds
  const gapDraws = runnerUp ? pairedGap(best.stageLoss, runnerUp.stageLoss) : null
  return {
    best: best.id,
    decided,
    odds,
    tied: decided ? [] : nameTied(best, ranked.slice(1)),
    runnerUp: runnerUp?.id ?? null,
    gap: runnerUp ? runnerUp.nominalStageLoss! - best.nominalStageLoss! : null,
    gapInterval: gapDraws && drawInterval(gapDraws.filter(Number.isFinite)),
    gapLostShare: gapDraws ? lostShare(gapDraws) : 0,
    gapDraws,
  }
}

/**
 * Stage loss of `other` minus that of `one`, draw by draw; NaN where either is lost. [W]
 *
 * @throws Never.
 */
export function pairedGap(one: Float64Array, other: Float64Array): Float64Array {
  return one.map((loss, draw) => (isSettled(loss) && isSettled(other[draw]!) ? other[draw]! - loss : Number.NaN))
}

function nameTied(best: CandidateDraws, others: readonly CandidateDraws[]): string[] {
  const rivals = others.map((rival) => ({ id: rival.id, share: shareCheaper(rival.stageLoss, best.stageLoss) }))
  const tied = rivals.filter((rival) => rival.share > tiedShare)
  if (tied.length > 0) return tied.map((rival) => rival.id).sort(compareIds)
  const nearest = rivals.sort((a, b) => b.share - a.share || compareIds(a.id, b.id))[0]!
  return nearest.share > 0 ? [nearest.id] : []
}

/** Share of draws in which `one` costs less than `other`; half of those where both cost the same and neither is lost. */
function shareCheaper(one: Float64Array, other: Float64Array): number {
  let cheaper = 0
  for (let draw = 0; draw < one.length; draw++) {
    if (one[draw]! < other[draw]!) cheaper++
    else if (one[draw] === other[draw] && isSettled(one[draw]!)) cheaper += 0.5
  }
  return cheaper / one.length
}

const nobody: Decision = {
  best: null,
  decided: null,
  odds: null,
  tied: [],
  runnerUp: null,
  gap: null,
  gapInterval: null,
  gapLostShare: 0,
  gapDraws: null,
}
