import { countOdds } from '../decision/odds.ts'
import type { Caveat } from '../domain/caveat.ts'
import type { Assessment } from './assess-candidate.ts'
import { drawStage, type PartDraws } from './draw-candidate.ts'
import type { Listing } from './list-parts.ts'
import { askFor, type PartSteps, type PartWork } from './part-work.ts'
import type { DrawnStage } from './uncertainty.ts'

/** Parts beyond the list are drawn so many at a time, at most so often, until they win less than this share of the draws. */
const batch = 50
const mostBatches = 10
const smallShare = 0.01

/** The draws of a ranking, and what is to be said about the odds. */
export interface ListedDraws {
  readonly drawn: DrawnStage
  readonly caveats: readonly Caveat[]
}

/**
 * Draws all listed parts. Where a ranking lists only the first of very many, a part beyond the list may still be the
 * cheapest in some draws: further accepted parts are drawn in their order, as rivals of those listed, until a whole batch
 * of them wins almost nothing. What is left of that doubt is stated.
 */
export function* drawListed(
  work: Omit<PartWork, 'kind'>,
  assessments: readonly Assessment[],
  listing: Listing,
): PartSteps<ListedDraws> {
  const settled = assessments.filter(({ point }) => point !== null)
  const parts = yield* drawnParts(
    work,
    settled.map(({ candidate }) => candidate.record),
  )
  if (listing.notListed === null) return { drawn: drawnStage(work, parts), caveats: [] }
  const listed = parts.length
  let last = 1
  for (let round = 0; round < mostBatches && last >= smallShare; round++) {
    const further = listing.next(batch)
    if (further.length === 0) break
    parts.push(...(yield* drawnParts(work, further)))
    last = shareOf(parts, parts.length - further.length)
  }
  const drawn = drawnStage(work, parts)
  if (parts.length === listed) return { drawn, caveats: [] }
  const data = { drawn: parts.filter(({ accepted }) => accepted).length, others: shareOf(parts, listed), last, batch }
  return { drawn, caveats: [{ code: 'odds-beyond-list', candidate: '', data }] }
}

function* drawnParts(work: Omit<PartWork, 'kind'>, parts: PartWork['parts']): PartSteps<PartDraws[]> {
  const drawn = yield* askFor({ ...work, kind: 'draw', parts })
  return drawn.filter((each) => each !== null)
}

function drawnStage({ stage, seed, draws }: Omit<PartWork, 'kind'>, parts: readonly PartDraws[]): DrawnStage {
  return { shared: drawStage(stage, seed, draws), parts, odds: countOdds(parts) }
}

/** Share of the draws won by the parts from a position on. */
function shareOf(parts: readonly PartDraws[], from: number): number {
  return countOdds(parts)
    .slice(from)
    .reduce((sum, { best }) => sum + best, 0)
}
