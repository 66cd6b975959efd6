import { describe, expect, it } from 'vitest'
import { parse } from 'yaml'
import { appendRecoveryRow, type RowTexts } from '../../src/input/append-recovery-row.ts'

const row: RowTexts = [
  ['fixture', 'ramp'],
  ['current', '8 A'],
  ['trr', '61.2 ns'],
  ['spread', '3.4 %'],
  ['source', 'bench "a": 3.csv sha256 0123456789ab'],
]
const line =
  '{fixture: ramp, current: 8 A, trr: 61.2 ns, spread: 3.4 %, source: "bench \\"a\\": 3.csv sha256 0123456789ab"}'
const mark = 'sha256 0123456789ab'

function appended(source: string, id: string): string {
  const result = appendRecoveryRow(source, id, row, mark)
  if (typeof result !== 'string') throw new Error(JSON.stringify(result))
  return result
}

/** The rows of a record after appending. */
function rowsOf(text: string, id: string): readonly Record<string, unknown>[] {
  const data = parse(text)
  return [data].flat().find((record) => record.id === id).recovery
}

describe('a row appended to a record', () => {
  it('stands after the last row, and every other byte stays', () => {
    const before = `# head
- id: one            # the first
  recovery:          # readings
    - {fixture: step, trr: 3 ns}   # cold

    # a comment between
    - fixture: ramp
      trr: 5 ns      # last
  price: 1.20

- id: two
  recovery:
  - {trr: 9 ns}
`
    const one = appended(before, 'one')
    expect(one).toBe(before.replace('      trr: 5 ns      # last\n', `      trr: 5 ns      # last\n    - ${line}\n`))
    const two = appended(before, 'two')
    expect(two).toBe(`${before}  - ${line}\n`)
    expect(rowsOf(two, 'two')).toEqual([{ trr: '9 ns' }, Object.fromEntries(row)])
  })

  it('opens the list where there is none, at the end of the record', () => {
    const before = '- id: one\n  title: First   # spaced\n  ratings: {junction: 150 degC}\n\n# about two\n- id: two\n'
    expect(appended(before, 'one')).toBe(
      `- id: one\n  title: First   # spaced\n  ratings: {junction: 150 degC}\n  recovery:\n    - ${line}\n\n# about two\n- id: two\n`,
    )
    expect(appended(before, 'two')).toBe(`${before}  recovery:\n    - ${line}\n`)
  })

  it('works in a file with one record, without a last line break, and with \\r\\n', () => {
    expect(appended('id: one\nclass: fast', 'one')).toBe(`id: one\nclass: fast\nrecovery:\n  - ${line}\n`)
    expect(appended('id: one\r\nclass: fast\r\n', 'one')).toBe(`id: one\r\nclass: fast\r\nrecovery:\r\n  - ${line}\r\n`)
  })

  it.each([
    ['a record in braces', '- {id: one, class: fast}   # short\n- id: two # keep\n'],
    ['a list in brackets', '# head\nid: one\nrecovery: [{trr: 3 ns}] # keep\nclass: fast\n'],
    ['an empty list', 'id: one\nrecovery: [] # keep\nclass: fast\n'],
    ['an empty key', 'id: one\nrecovery: # keep\nclass: fast\n'],
    ['a nested last value', 'id: one\nthermal:\n  junction_to_case: 2 K/W # keep\n  # after\n'],
  ])('%s keeps its comments and order, and gains exactly the row', (_name, before) => {
    const after = appended(before, 'one')
    for (const comment of before.match(/#.*/g) ?? []) expect(after).toContain(comment)
    expect(rowsOf(after, 'one').at(-1)).toEqual(Object.fromEntries(row))
    const strip = (text: string) => [parse(text)].flat().map(({ recovery: _, ...rest }) => JSON.stringify(rest))
    expect(strip(after)).toEqual(strip(before))
  })

  it('is refused for an unknown id, with the known ones, and for a capture that is there', () => {
    const source = '- id: one\n- id: two\n'
    expect(appendRecoveryRow(source, 'three', row, mark)).toEqual({ refused: 'id-unknown', known: ['one', 'two'] })
    expect(appendRecoveryRow(appended(source, 'one'), 'one', row, mark)).toEqual({ refused: 'there-already', line: 3 })
    expect(rowsOf(appended(appended(source, 'one'), 'two'), 'two')).toHaveLength(1)
  })
})
