import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { orderCandidates } from '../../src/decision/order-candidates.ts'
import { shuffledCompanies } from './candidates.ts'

const part = (id: string, nominalStageLoss: number | null, accepted = true) => ({ id, nominalStageLoss, accepted })

describe('orderCandidates', () => {
  it('puts accepted parts by loss, equal ones by id, then rejected ones by id whatever they lose', () => {
    const given = [part('d', 2, false), part('b', 5), part('a', 5), part('c', null, false), part('z', 4)]
    expect(orderCandidates(given).map(({ id }) => id)).toEqual(['z', 'a', 'b', 'c', 'd'])
    expect(given[0]!.id).toBe('d')
  })

  it('orders ids by UTF-16 units: capitals first, no language rules', () => {
    const ids = orderCandidates(['ä', 'b', 'B', 'a10', 'a9'].map((id) => part(id, 1))).map(({ id }) => id)
    expect(ids).toEqual(['B', 'a10', 'a9', 'b', 'ä'])
  })

  it('does not depend on the order given', () => {
    fc.assert(
      fc.property(shuffledCompanies, ({ company, shuffled }) => {
        expect(orderCandidates(shuffled)).toEqual(orderCandidates(company))
      }),
      { seed: 1 },
    )
  })
})
