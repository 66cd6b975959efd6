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
  const wins = countWins(rivals, draws)
  return candidates.map(({ id, accepted, stageLoss }) => {
    const won = accepted ? wins.get(id)! : 0
    return {
      id,
      best: draws > 0 ? won / draws : 0,
      error: accepted ? standardError(won, draws) : 0,
      lostShare: lostShare(stageLoss),
    }
  })
}

/** Share of draws without a stable temperature. [1] */
export function lostShare(stageLoss: Float64Array): number {
  let lost = 0
  for (const loss of stageLoss) if (!isSettled(loss)) lost++
  return stageLoss.length > 0 ? lost / stageLoss.length : 0
}

/** Draws won by each rival, shared where they tie. */
function countWins(rivals: readonly CandidateDraws[], draws: number): Map<string, number> {
  const wins = new Float64Array(rivals.length)
  for (let draw = 0; draw < draws; draw++) {
    let lowest = Infinity
    let holders = 0
    for (const { stageLoss } of rivals) {
      const loss = stageLoss[draw]!
      holders = loss < lowest ? 1 : holders + (loss === lowest ? 1 : 0)
      lowest = Math.min(lowest, loss)
    }
    if (!isSettled(lowest)) continue
    for (let rival = 0; rival < rivals.length; rival++) {
      if (rivals[rival]!.stageLoss[draw] === lowest) wins[rival] = wins[rival]! + 1 / holders
    }
  }
  return new Map(rivals.map(({ id }, rival) => [id, wins[rival]!]))
}

function standardError(wins: number, draws: number): number {
  const share = (wins + 1) / (draws + 2)
  return Math.sqrt((share * (1 - share)) / Math.max(1, draws - 1))
}
