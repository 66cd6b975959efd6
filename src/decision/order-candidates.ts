/** What the order depends on. */
interface Orderable {
  readonly id: string
  readonly accepted: boolean
  readonly nominalStageLoss: number | null
}

/**
 * Candidates in the order of the result: accepted ones by nominal stage loss, ascending, equal losses by id; then the
 * rejected ones by id. Ids compare by UTF-16 units, so the order is the same in every language.
 *
 * @returns A new array; rank k stands at index k − 1 while `accepted`.
 * @throws Never.
 */
export function orderCandidates<Candidate extends Orderable>(candidates: readonly Candidate[]): Candidate[] {
  return candidates.toSorted((a, b) => {
    if (a.accepted !== b.accepted) return a.accepted ? -1 : 1
    return (a.accepted ? compareLosses(a.nominalStageLoss, b.nominalStageLoss) : 0) || compareIds(a.id, b.id)
  })
}

/** Order of ids: by UTF-16 units. */
export function compareIds(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0
}

function compareLosses(a: number | null, b: number | null): number {
  const first = a ?? Infinity
  const second = b ?? Infinity
  return first < second ? -1 : first > second ? 1 : 0
}
