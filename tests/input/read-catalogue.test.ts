import { describe, expect, it } from 'vitest'
import { readCatalogue } from '../../src/input/read-catalogue.ts'
import { type CatalogueMapping, readMapping } from '../../src/input/read-mapping.ts'
import { formatProblem } from '../../src/problems/format-problem.ts'
import { told } from './told.ts'

const mappingText = `catalogue: Orchard supply, spring list
empty: ["-", n/a]
record:
  id: {column: Part}
  class: {column: Family, words: {UFR: ultrafast, SBD: schottky}}
  ratings: {reverse_voltage: {column: VRRM, unit: V}, average_current: {column: IF, unit: A}, junction: 175 degC}
  thermal: {junction_to_case: {column: Rth, unit: K/W}}
  price: {column: Price}
  forward:
    - {current: {column: IF, unit: A}, drop: {column: VF, unit: V}, junction: 25 degC, grade: maximum}
  recovery:
    - {fixture: ramp, current: {column: IF, unit: A}, slope: 200 A/us, trr: {column: trr, unit: ns}, junction: 25 degC, grade: maximum}
    - {fixture: ramp, current: {column: IF, unit: A}, slope: 200 A/us, qrr: {column: Qrr}, junction: 125 degC}
`
const header = 'Part,Family,VRRM,IF,Rth,Price,VF,trr,Qrr'

function mapping(text = mappingText): CatalogueMapping {
  const { value, problems } = readMapping(text, 'map.yaml')
  expect(problems).toEqual([])
  return value!
}
function read(lines: readonly string[], text = mappingText) {
  const { value, problems, warnings } = readCatalogue(lines.join('\n'), 'parts.csv', mapping(text))
  return {
    value,
    problems: problems.map((one) => formatProblem(one)),
    warnings: warnings.map((one) => formatProblem(one)),
  }
}

describe('a table of parts', () => {
  it('becomes records; what a cell leaves empty is left out of them', () => {
    const { value, warnings } = read([header, 'A1,UFR,200,8,1.5,0.5,1.1,35,90 nC', 'A2,SBD,100,10,-,,0.7,N/A,', ''])
    expect(warnings).toEqual([])
    expect(value).toMatchObject({ rows: 2, badRows: 0 })
    expect(value!.records).toMatchObject([
      {
        id: 'A1',
        class: 'ultrafast',
        place: { file: 'parts.csv', line: 2, column: 1 },
        ratings: { reverseVoltage: 200, averageCurrent: 8, junction: 448.15 },
        thermal: { kind: 'case', junctionToCase: 1.5, caseToSink: null },
        price: 0.5,
        forward: [{ current: 8, drop: 1.1, junction: 298.15, grade: 'maximum', place: { line: 2, column: 4 } }],
        recovery: [
          { current: 8, slope: 2e8, recoveryTime: 35e-9, charge: null, grade: 'maximum' },
          { recoveryTime: null, charge: 90e-9, grade: 'typical' },
        ],
      },
      { id: 'A2', class: 'schottky', thermal: null, price: null, forward: [{ drop: 0.7 }], recovery: [] },
    ])
  })

  it('uses the good rows and tells every bad cell by row and column', () => {
    const { value, problems, warnings } = read([
      header,
      'A1,UFR,200,8,1.5,0.5,1.1,35,90 nC',
      'A3,XYZ,200,8,"1,5",x,abc,35,90',
      'A1,UFR,200,8,1.5,0.5,1.1,35,',
      ',UFR,-,8,1.5,0.5,1.1,0,',
      'A4,UFR,200,8',
    ])
    expect(problems).toEqual([])
    expect(value!.records.map(({ id }) => id)).toEqual(['A1', 'A4'])
    expect(value).toMatchObject({ rows: 5, badRows: 3 })
    expect(`\n${warnings.join('\n')}\n`).toMatchInlineSnapshot(`
      "
      parts.csv:3:2  word-unknown  class: "XYZ" is not one of standard, fast, ultrafast, soft-ultrafast, body-diode, schottky, sic-schottky
      parts.csv:3:5  number-decimal-comma  thermal.junction_to_case: "1,5 K/W" has a comma in its number, which is never guessed at (write the decimals after a point and leave out thousands separators)
      parts.csv:3:6  value-kind  price: "x" stands where a plain number is wanted
      parts.csv:3:7  number-malformed  forward[1].drop: "abc" is not a number with a unit; wanted is a voltage such as "48 V"
      parts.csv:3:9  unit-missing  recovery[2].qrr: "90" has no unit; wanted is a charge such as "190 nC"
      parts.csv:4:1  id-duplicate  id: "A1" is the id of two records; the other stands at parts.csv:2 (the first one is used)
      parts.csv:5:1  key-missing  id: is missing; wanted is an id, once in all files
      parts.csv:5:3  key-missing  ratings.reverse_voltage: is missing; wanted is a voltage such as "48 V"
      parts.csv:5:8  number-zero  recovery[1].trr: "0 ns" is zero; wanted is a time such as "35 ns"
      "
    `)
  })

  it('keeps the place of a reading when one before it is left out', () => {
    const { warnings } = read([header, 'A1,UFR,200,8,1.5,0.5,1.1,-,90'])
    expect(warnings).toEqual([
      'parts.csv:2:9  unit-missing  recovery[1].qrr: "90" has no unit; wanted is a charge such as "190 nC"',
    ])
  })

  it('reads other delimiters, decimal commas, rows above the header and columns by position', () => {
    const text = `catalogue: list with commas
header_row: 3
delimiter: semicolon
decimal: comma
record:
  id: {column: 1}
  class: fast
  ratings: {reverse_voltage: {column: 2, unit: V}, average_current: {column: 3, unit: A}, junction: {column: 4}}
`
    const { value } = read(
      ['exported in spring', '', 'part;V;A;T', 'B1;200;1,5;150 \u00b0C', 'B2;1.200,5;1;150 degC'],
      text,
    )
    expect(value!.records).toMatchObject([
      { id: 'B1', ratings: { reverseVoltage: 200, averageCurrent: 1.5, junction: 423.15 } },
    ])
    expect(value!.badRows).toBe(1)
  })

  it.each([',', ';', '\t'])('finds the delimiter %j by itself, with the others inside quoted text', (sign) => {
    const cells = ['"A;1,2"', 'UFR', '200', '8', '1.5', '0.5', '1.1', '35', '90 nC']
    const { value } = read([header.replaceAll(',', sign), cells.join(sign)])
    expect(value!.records).toMatchObject([{ price: 0.5, forward: [{ drop: 1.1 }] }])
    expect(value!.records[0]!.id).toBe('A;1,2')
  })

  it('is refused as a whole when its columns are not those of the mapping, or it is no table', () => {
    const renamed = read([header.replace('trr', 'tr').replace('VF', 'IF'), 'A1,UFR'])
    expect(`\n${renamed.problems.join('\n')}\n`).toMatchInlineSnapshot(`
      "
      map.yaml:6:81  values-contradict  record.ratings.average_current.column: "IF" cannot be: two columns of the table have this name; write a position such as 4
      map.yaml:10:26  values-contradict  record.forward[1].current.column: "IF" cannot be: two columns of the table have this name; write a position such as 4
      map.yaml:10:55  table-column-unknown  record.forward[1].drop.column: there is no column "VF"; the columns are Part, Family, VRRM, IF, Rth, Price, IF, tr, Qrr (did you mean "IF"?)
      map.yaml:12:41  values-contradict  record.recovery[1].current.column: "IF" cannot be: two columns of the table have this name; write a position such as 4
      map.yaml:12:86  table-column-unknown  record.recovery[1].trr.column: there is no column "trr"; the columns are Part, Family, VRRM, IF, Rth, Price, IF, tr, Qrr (did you mean "tr" or "Qrr"?)
      map.yaml:13:41  values-contradict  record.recovery[2].current.column: "IF" cannot be: two columns of the table have this name; write a position such as 4
      "
    `)
    expect(read(['']).problems).toEqual([
      'parts.csv:1:1  file-empty  holds nothing; wanted is a header in row 1 and rows with parts',
    ])
    expect(read([header, '"A1,UFR']).problems).toEqual([
      'parts.csv:2:1  table-malformed  a quote opens here that is not closed; wanted is quotes in pairs',
    ])
    expect(read([header, 'A\u00001']).problems).toEqual([
      'parts.csv:2:2  file-not-text  is not text in UTF-8: it holds a NUL character; save it as UTF-8 text',
    ])
  })

  it('with 50,000 rows takes at most a few seconds of computing', () => {
    const rows = Array.from(
      { length: 50_000 },
      (_, n) => `P${n},UFR,${200 + n},${5 + (n % 20)},1.5,0.5,1.1,${30 + n},${n + 1} nC`,
    )
    const before = process.cpuUsage().user
    const { value } = readCatalogue([header, ...rows].join('\n'), 'parts.csv', mapping())
    expect(value).toMatchObject({ rows: 50_000, badRows: 0 })
    expect((process.cpuUsage().user - before) / 1e6).toBeLessThan(8)
  })
})

describe('a mapping file', () => {
  it('is checked as a record is, at its own places', () => {
    const bad = mappingText
      .replace('unit: K/W', 'unit: kg')
      .replace('fixture: ramp', 'fixture: rump')
      .replace('slope: 200 A/us', 'slope: 200')
      .replace('SBD: schottky', 'SBD: shottky')
      .replace('UFR: ultrafast, ', '')
    expect(told(readMapping, bad)).toMatchInlineSnapshot(`
      "
      file.yaml:5:10  word-unknown  record.class: "shottky" is not one of standard, fast, ultrafast, soft-ultrafast, body-diode, schottky, sic-schottky (did you mean "schottky"?)
            class: {column: Family, words: {SBD: shottky}}
                   ^
      file.yaml:7:31  unit-dimension  record.thermal.junction_to_case: "1 kg": "kg" makes it a quantity of another kind; wanted is a thermal resistance such as "0.9 K/W"
            thermal: {junction_to_case: {column: Rth, unit: kg}}
                                        ^
      file.yaml:12:17  word-unknown  record.recovery[1].fixture: "rump" is not one of ramp, step (did you mean "ramp"?)
              - {fixture: rump, current: {column: IF, unit: A}, slope: 200, trr: {column: trr, unit: ns}, junction: 25 degC, grade
                          ^^^^
      file.yaml:12:62  unit-missing  record.recovery[1].slope: "200" has no unit; wanted is a slope of current such as "200 A/us"
              - {fixture: rump, current: {column: IF, unit: A}, slope: 200, trr: {column: trr, unit: ns}, junction: 25 degC, grade
                                                                       ^^^
      "
    `)
  })

  it('is told what it lacks and what it cannot have', () => {
    expect(
      told(readMapping, 'catalogue: x\ncolums: 3\nrecord: {id: {colum: 1}, class: fast}\n'),
    ).toMatchInlineSnapshot(`
      "
      file.yaml:2:1  key-unknown  "colums" is no key here (known: catalogue, header_row, delimiter, decimal, empty, record)
          colums: 3
          ^^^^^^
      file.yaml:3:1  key-missing  record.ratings: is missing; wanted is the limits of the part: {reverse_voltage: 600 V, average_current: 8 A, junction: 175 degC}
          record: {id: {colum: 1}, class: fast}
          ^
      file.yaml:3:15  key-unknown  record.id: "colum" is no key here (did you mean "column"?)
          record: {id: {colum: 1}, class: fast}
                        ^^^^^
      "
    `)
  })
})
