import { describe, expect, it } from 'vitest'
import { readProfile } from '../../src/input/read-profile.ts'
import { readStage } from '../../src/input/read-stage.ts'
import { formatProblem } from '../../src/problems/format-problem.ts'
import { smallStage } from './samples.ts'

const { stage } = readStage(smallStage, 'stage.yaml').value!

function read(...lines: readonly string[]) {
  return readProfile(lines.join('\n'), 'year.csv', stage)
}
function problems(...lines: readonly string[]): readonly string[] {
  const { value, problems } = read(...lines)
  expect(value).toBeNull()
  return problems.map((problem) => formatProblem(problem))
}

describe('a duty profile file', () => {
  it('has its units in the header', () => {
    expect(read('hours [h],load [%],ambient (degC),input V', '1,50,20,48', '0.25,100,,', '').value).toEqual([
      { hours: 1, load: 0.5, ambient: 293.15, input: 48 },
      { hours: 0.25, load: 1, ambient: null, input: null },
    ])
  })

  it('or in its cells, in any order, with any delimiter', () => {
    const points = [
      { hours: 1, load: 0.5, ambient: null, input: null },
      { hours: 1.5, load: 0.2, ambient: null, input: null },
    ]
    expect(read('\ufeffload;hours', '50 %;1 h', '20 %;90 min').value).toEqual(points)
    expect(read('', 'Load [%]\tHours', '50\t1 h', '20\t90 min').value).toEqual(points)
  })

  it('tells every bad cell by row and column', () => {
    expect(problems('hours [h],load [%],input [V]', '1,x,10', '-1,50,48', '1,"5,3",', ',50,48')).toEqual([
      'year.csv:2:2  number-malformed  load: "x" is not a number with a unit; wanted is a percentage such as "80 %"',
      'year.csv:2:3  values-contradict  input: "10" cannot be: a buck needs more than its output, 12 V',
      'year.csv:3:1  number-negative  hours: "-1 h" is negative; wanted is a duration such as "1200 h"',
      'year.csv:4:2  number-decimal-comma  load: "5,3 %" has a comma in its number, which is never guessed at (write the decimals after a point and leave out thousands separators)',
      'year.csv:5:1  number-malformed  hours: "" is not a number with a unit; wanted is a duration such as "1200 h"',
    ])
  })

  it('tells what is wrong with its header before its rows', () => {
    expect(problems('hours [h],laod [%],hours', '1,x,3')).toEqual([
      'year.csv:1:1  key-missing  load: is missing; wanted is a column "load [%]"',
      'year.csv:1:2  key-unknown  "laod [%]" is no key here (did you mean "load"?)',
      'year.csv:1:3  yaml-duplicate-key  "hours" stands here twice; keep one',
    ])
    expect(problems('hours,load', '1,10')).toEqual([
      'year.csv:2:1  unit-missing  hours: "1" has no unit; wanted is a duration such as "1200 h"',
      'year.csv:2:2  unit-missing  load: "10" has no unit; wanted is a percentage such as "80 %"',
    ])
    expect(problems('')).toEqual([
      'year.csv:1:1  file-empty  holds nothing; wanted is a header with hours and load, and rows below it',
    ])
  })

  it('needs hours, and is warned about when it has more than a year', () => {
    expect(problems('hours [h],load [%]', '0,10')).toEqual([
      'year.csv:1:1  values-contradict  hours: "0 h" cannot be: its hours add up to nothing',
    ])
    const { value, warnings } = read('hours [h],load [%]', '9000,10')
    expect(value).toHaveLength(1)
    expect(warnings.map((warning) => formatProblem(warning))).toEqual([
      'year.csv:1:1  value-implausible  hours: "9000 h" is unusual; a year has 8760 h',
    ])
  })

  it('may hold every quarter-hour of a year, which takes at most a few seconds of computing', () => {
    const rows = Array.from({ length: 35_040 }, (_, n) => `0.25,${n % 101},${(n % 50) - 10}.5,${40 + (n % 20)}`)
    const before = process.cpuUsage().user
    const { value } = read('hours [h],load [%],ambient [degC],input [V]', ...rows)
    expect(value).toHaveLength(35_040)
    expect(value!.reduce((sum, { hours }) => sum + hours, 0)).toBe(8760)
    expect((process.cpuUsage().user - before) / 1e6).toBeLessThan(5)
  })
})
