import fc from 'fast-check'
import type { CandidateDraws } from '../../src/decision/candidate-draws.ts'

/** A candidate whose draws are given; nominal loss is their first finite one unless said otherwise. */
export function candidate(id: string, losses: readonly number[], fields: Partial<CandidateDraws> = {}): CandidateDraws {
  const stageLoss = Float64Array.from(losses)
  return {
    id,
    accepted: true,
    nominalStageLoss: losses.find(Number.isFinite) ?? null,
    stageLoss,
    total: stageLoss.map((loss) => loss / 2),
    junction: stageLoss.map((loss) => 300 + loss),
    ...fields,
  }
}

/** Sets of candidates with few distinct losses, so that ties and lost draws are frequent. */
export const companies: fc.Arbitrary<CandidateDraws[]> = fc.integer({ min: 1, max: 40 }).chain((draws) => {
  const loss = fc.oneof(
    { weight: 6, arbitrary: fc.integer({ min: 10, max: 16 }) },
    { weight: 1, arbitrary: fc.constant(Infinity) },
  )
  const one = fc.record({
    id: fc.string({ minLength: 1, maxLength: 3 }),
    accepted: fc.boolean(),
    nominal: fc.integer({ min: 10, max: 16 }),
    losses: fc.array(loss, { minLength: draws, maxLength: draws }),
  })
  return fc
    .uniqueArray(one, { minLength: 1, maxLength: 6, selector: ({ id }) => id })
    .map((list) =>
      list.map(({ id, accepted, nominal, losses }) => candidate(id, losses, { accepted, nominalStageLoss: nominal })),
    )
})

/** A company and the same company in another order. */
export const shuffledCompanies = companies.chain((company) =>
  fc.shuffledSubarray(company, { minLength: company.length }).map((shuffled) => ({ company, shuffled })),
)
