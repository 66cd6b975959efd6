import * as mathjs from 'mathjs'
import { expect, it } from 'vitest'
import { quantities } from '../../src/units/quantities.ts'

const entries = Object.values(quantities)

it('no two quantities share a name or a symbol', () => {
  for (const property of ['name', 'symbol', 'sentence'] as const) {
    expect(new Set(entries.map((entry) => entry[property])).size).toBe(entries.length)
  }
})

it.each(entries)('$name has an SI unit without prefix and one sentence', ({ unit, sentence }) => {
  expect(unit === '1' ? 1 : mathjs.unit(`1 ${unit}`).toSI().toNumeric(unit)).toBe(1)
  expect(sentence).toMatch(/^[A-Z][^.]*\.$/)
})
