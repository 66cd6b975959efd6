import { type CandidateDraws, isSettled } from './candidate-draws.ts'

/** How often one candidate is the cheapest acceptable part. */
export interface Odds {
  readonly id: string
  /** Share of all draws in which it is the cheapest accepted part. [1] */
  readonly best: number
  /** Standard error of `best` from the number of draws. [1] */
  readonly error: number
  /** Share of draws in which it has no stable temperature. [1] */
  readonly lostShare: number
}

/**
 * Odds of each candidate, in the order given; rejected candidates have odds 0 and error 0.
 *
 * A draw goes to the accepted candidate with the lowest stage loss; exact ties share it in equal parts, so neither
 * order nor names matter. A lost draw of a candidate counts against it; a draw lost by all goes to nobody, and the
 * odds add up to 1 minus the share of such draws.
 *
 * The error is that of n independent draws, sqrt(p (1 − p)/(n − 1)): stratified draws never have more variance, so it
 * is an upper bound for them (numerics/latin-hypercube.ts). p is taken as (n p + 1)/(n + 2) there, or a part that
 * happened to win all draws or none would claim to be certain.
 *
 * @throws Never. All arrays have one length.
 * @see P. S. Laplace's rule of succession, for the p of the error.
 */
export function countOdds(candidates: readonly CandidateDraws[]): Odds[] {
  const draws = candidates[0]?.stageLoss.length ?? 0
  const rivals = candidates.filter((candidate) => candidate.accepted)
  const wins = new Map(rivals.map((rival) => [rival.id, 0]))
  for (let draw = 0; draw < draws; draw++) {
    const cheapest = cheapestIn(rivals, draw)
    for (const rival of cheapest) wins.set(rival.id, wins.get(rival.id)! + 1 / cheapest.length)
  }
  return candidates.map(({ id, accepted, stageLoss }) => ({
    id,
    best: accepted && draws > 0 ? wins.get(id)! / draws : 0,
    error: accepted ? standardError(wins.get(id)!, draws) : 0,
    lostShare: lostShare(stageLoss),
  }))
}

/** Share of draws without a stable temperature. [1] */
export function lostShare(stageLoss: Float64Array): number {
  let lost = 0
  for (const loss of stageLoss) if (!isSettled(loss)) lost++
  return stageLoss.length > 0 ? lost / stageLoss.length : 0
}

function cheapestIn(rivals: readonly CandidateDraws[], draw: number): CandidateDraws[] {
  let lowest = Infinity
  for (const rival of rivals) lowest = Math.min(lowest, rival.stageLoss[draw]!)
  return isSettled(lowest) ? rivals.filter((rival) => rival.stageLoss[draw] === lowest) : []
}

function standardError(wins: number, draws: number): number {
  const share = (wins + 1) / (draws + 2)
  return Math.sqrt((share * (1 - share)) / Math.max(1, draws - 1))
}
