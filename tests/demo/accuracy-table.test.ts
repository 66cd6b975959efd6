import { readFileSync } from 'node:fs'
import { expect, it } from 'vitest'
import { compareRow } from '../published/compare.ts'
import { publishedRows } from '../published/sections.ts'

const cells = readFileSync('README.md', 'utf8')
  .split('\n')
  .map((line) =>
    line
      .replaceAll('\\|', '¦')
      .replace(/^\| | \|$/g, '')
      .split(' | '),
  )
  .filter((row) => row.length === 9 && !/^(id|---|[CW]\d+)$/.test(row[0]!))

it("the README's accuracy table holds every published figure as it is computed now", () => {
  const rows = publishedRows.flatMap(compareRow)
  expect(cells.map(([id, quantity]) => [id, quantity])).toEqual(
    rows.map(({ id, quantity }) => [id, quantity.replaceAll('|', '¦')]),
  )
  const apart = rows.filter(({ computed }, index) => {
    const printed = Number(cells[index]![4])
    return Math.abs(printed - computed) > 1e-5 * Math.abs(computed)
  })
  expect(apart).toEqual([])
})
