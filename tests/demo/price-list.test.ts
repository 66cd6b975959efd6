import { readFileSync } from 'node:fs'
import { expect, it } from 'vitest'
import { readCatalogue } from '../../src/input/read-catalogue.ts'
import { readMapping } from '../../src/input/read-mapping.ts'

const read = (file: string): string => readFileSync(`catalogs-demo/shop/${file}`, 'utf8')

it('the price list gives every row but the two that are bad on purpose', () => {
  const mapping = readMapping(read('price-list.yaml'), 'price-list.yaml').value!
  const { value, warnings } = readCatalogue(read('price-list.csv'), 'price-list.csv', mapping)
  expect(value).toMatchObject({ rows: 33, badRows: 2 })
  expect(warnings.map(({ line, column, code }) => ({ line, column, code }))).toEqual([
    { line: 7, column: 6, code: 'number-decimal-comma' },
    { line: 13, column: 7, code: 'number-malformed' },
  ])
})
