import { expect, it } from 'vitest'
import { widthOf } from '../../src/commands/session.ts'

it.each<[string | undefined, number | undefined, number]>([
  ['80', undefined, 80],
  ['80', 200, 80],
  [undefined, 200, 200],
  [undefined, undefined, 120],
  ['', 0, 120],
  ['39', undefined, 120],
  ['401', 90, 90],
  ['80.5', undefined, 120],
  ['wide', undefined, 120],
])('COLUMNS=%s on a terminal of %s columns fills %s', (asked, terminal, width) => {
  expect(widthOf(asked, terminal)).toBe(width)
})
