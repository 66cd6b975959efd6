import { compareIds } from '../decision/order-candidates.ts'
import type { RectifierRecord } from '../domain/rectifier.ts'
import type { NotListed } from '../domain/result.ts'
import { prepareCandidate } from './candidate.ts'
import { judge } from './judge-candidate.ts'
import { askFor, type PartSteps, type PartWork } from './part-work.ts'

/** How many parts a ranking lists where nothing else is asked for; so many or fewer are all listed. */
export const usualListing = 50

/** The parts that a ranking lists: the first of the order that ranking all would give. */
export interface Listing {
  /** By id. */
  readonly parts: readonly RectifierRecord[]
  /** What became of the others; null where all are listed. */
  readonly notListed: NotListed | null
  /** Further accepted parts in their order, at most so many at a time; empty when there are no more. */
  readonly next: (most: number) => readonly RectifierRecord[]
}

/**
 * Chooses the first `top` of the order by stage loss without judging all: every part is solved for its stage loss, then
 * they are judged from the cheapest on until enough are accepted. What costs more than the last of them cannot belong to
 * the list, whether it is acceptable or not, so the list is that of a ranking of all.
 *
 * @param work Its parts stand by id.
 */
export function* listParts(work: Omit<PartWork, 'kind'>, top: number): PartSteps<Listing> {
  const { parts } = work
  if (parts.length <= top) return { parts, notListed: null, next: () => [] }
  const screened = yield* askFor({ ...work, kind: 'screen' })
  const open = screened.flatMap(({ stageLoss }, index) => (stageLoss === null ? [] : [{ stageLoss, index }]))
  // Equal losses stay in the order of their ids.
  open.sort((one, other) => one.stageLoss - other.stageLoss || one.index - other.index)
  const waiting = open.map(({ index }) => index)
  const reasons = screened.map(({ rejected }) => rejected as string | null)
  const next = (most: number): readonly number[] => takeAccepted(work, waiting, reasons, most)
  const accepted = next(top)
  const costlier = waiting.length
  const listed = new Set(accepted)
  // After the accepted parts come the rejected ones by id.
  for (let index = 0; listed.size < top; index++) listed.add(index)
  return {
    parts: parts.filter((_, index) => listed.has(index)),
    notListed: {
      count: parts.length - top,
      costlier,
      rejected: countCodes(reasons.filter((_, index) => !listed.has(index))),
    },
    next: (most) => next(most).map((index) => parts[index]!),
  }
}

/** Judges the waiting parts one after the other until so many are accepted; notes why the others are not. */
function takeAccepted(
  { stage, parts, testRectifiers }: Omit<PartWork, 'kind'>,
  waiting: number[],
  reasons: (string | null)[],
  most: number,
): readonly number[] {
  const accepted: number[] = []
  let taken = 0
  for (; taken < waiting.length && accepted.length < most; taken++) {
    const index = waiting[taken]!
    const [reason] = judge(prepareCandidate(stage, parts[index]!, testRectifiers)).reasons
    if (reason === undefined) accepted.push(index)
    else reasons[index] = reason.code
  }
  waiting.splice(0, taken)
  return accepted
}

function countCodes(codes: readonly (string | null)[]): NotListed['rejected'] {
  const counts = new Map<string, number>()
  for (const code of codes) if (code !== null) counts.set(code, (counts.get(code) ?? 0) + 1)
  return [...counts].map(([code, count]) => ({ code, count })).sort((one, other) => compareIds(one.code, other.code))
}
