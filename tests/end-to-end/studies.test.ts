import { writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { ebbwatt } from './run-command.ts'
import { smallStage, smallStageWith } from './small-stage.ts'

const trend = ['trend', 'stage.yaml', '--over']

describe('trend', () => {
  it('follows a quantity in the unit of its key, ends included, and ends with 0', () => {
    const args = [
      ...trend,
      'frequency',
      '--from',
      '50 kHz',
      '--to',
      '200 kHz',
      '--steps',
      '3',
      '--log',
      '--json',
      '--draws',
      '50',
    ]
    const { code, out } = ebbwatt(args, { cwd: smallStage() })
    const result = JSON.parse(out)
    expect(code).toBe(0)
    expect(result.over).toBe('frequency_hz')
    expect(result.points.map(({ at }: { at: number }) => at)).toEqual([50e3, 100e3, 200e3])
  })

  it('ends with 3 where nothing is acceptable anywhere, with the full result', () => {
    const args = [
      ...trend,
      'load',
      '--from',
      '50 %',
      '--to',
      '100 %',
      '--steps',
      '2',
      '--json',
      '--only',
      'small',
      '--draws',
      '50',
    ]
    const { code, out } = ebbwatt(args, { cwd: smallStage() })
    expect(code).toBe(3)
    expect(JSON.parse(out).points).toHaveLength(2)
  })

  it.each([
    [['load', '--from', '10 %', '--to', '9 %'], 'range-reversed  --from: the range runs from "10 %" to "9 %"'],
    [['load', '--from', '10 W', '--to', '9 %'], 'unit-dimension  --from: "10 W": "W" makes it a power'],
    [['load', '--from', '10', '--to', '9 %'], 'unit-missing  --from: "10" has no unit'],
    [['laod', '--from', '1 %', '--to', '9 %'], 'option-unusable  --over: "laod" is no quantity of a trend'],
    [['ambient', '--from', '20 degC', '--to', '60 degC', '--log'], 'option-unusable  --log: '],
    [['ambient', '--from', '20 degC', '--to', '60 degC'], 'command line  quantity-not-applicable  --over: '],
    [['input', '--from', '10 V', '--to', '300 V'], 'range-outside  --to: 300 V '],
  ])('refuses %j', (args, message) => {
    const { code, out, err } = ebbwatt([...trend, ...args], { cwd: smallStage() })
    expect({ code, out }).toEqual({ code: 2, out: '' })
    expect(err).toContain(message)
    expect(err.trim().split('\n')).toHaveLength(1)
  })
})

describe('swap', () => {
  const swap = (...args: readonly string[]) => ebbwatt(['swap', 'stage.yaml', ...args], { cwd: smallStage() })

  it('compares the incumbent with the part named, and differences add up', () => {
    const { code, out } = swap('--to', 'guessed', '--json')
    const { from, to, difference_w } = JSON.parse(out)
    expect({ code, from: from.id, to: to.id }).toEqual({ code: 0, from: 'plain', to: 'guessed' })
    expect(difference_w.total).toBeCloseTo(to.losses_w.total - from.losses_w.total, 12)
    expect(difference_w.stage).toBeCloseTo(to.stage_loss_w - from.stage_loss_w, 12)
  })

  it('saves nothing where a part replaces itself', () => {
    const { code, out } = swap('--from', 'plain', '--to', 'plain', '--json')
    expect(code).toBe(0)
    expect(JSON.parse(out).difference_w).toMatchObject({ total: 0, stage: 0 })
  })

  it('is strict about a class guess in either part', () => {
    expect(swap('--to', 'guessed', '--strict', '--json').code).toBe(4)
  })

  it('names the nearest id for one that is not there', () => {
    const { code, err } = swap('--to', 'gessed')
    expect(code).toBe(2)
    expect(err).toBe('command line  id-unknown  --to: no record has the id "gessed" (did you mean "guessed"?)\n')
  })
})

describe('a stage that cannot be studied', () => {
  it('says that it has no candidate', () => {
    const cwd = smallStage()
    writeFileSync(join(cwd, 'parts'), '[]')
    expect(ebbwatt(['rank', 'stage.yaml'], { cwd }).code).toBe(2)
  })

  it('says with figures that it cannot deliver its power', () => {
    const { code, err } = ebbwatt(['rank', 'stage.yaml'], { cwd: smallStageWith('switch: {on_resistance: 40 ohm}') })
    expect(code).toBe(2)
    expect(err).toContain(
      'stage.yaml  cannot-deliver  the stage cannot deliver this power: 600 W from 48 V; check the output, the resistances and the input',
    )
  })
})

describe('a duty profile in a table of its own', () => {
  it('gives the energy of a year and stands among the inputs', () => {
    const cwd = smallStageWith('duty_profile: {file: year.csv}')
    writeFileSync(join(cwd, 'year.csv'), 'hours [h],load [%]\n1000,100\n3000,40\n')
    const { code, out } = ebbwatt(['rank', 'stage.yaml', '--json', '--only', 'plain'], { cwd })
    const { inputs, candidates } = JSON.parse(out)
    expect(code).toBe(0)
    expect(inputs.map(({ path }: { path: string }) => path)).toEqual(['parts', 'stage.yaml', 'year.csv'])
    expect(candidates[0].energy_kwh_per_year).toBeGreaterThan(0)
  })

  it('is refused cell by cell', () => {
    const cwd = smallStageWith('duty_profile: {file: year.csv}')
    writeFileSync(join(cwd, 'year.csv'), 'hours [h],load [%]\n1000,full\n-3,40\n')
    const { code, out } = ebbwatt(['rank', 'stage.yaml', '--json'], { cwd })
    const { problems } = JSON.parse(out).error
    expect(code).toBe(2)
    expect(problems.map(({ file, line }: { file: string; line: number }) => `${file}:${line}`)).toEqual([
      'year.csv:2',
      'year.csv:3',
    ])
  })
})

const mapping = `catalogue: stock list
record:
  id: {column: Part}
  class: ultrafast
  ratings:
    reverse_voltage: {column: Vr, unit: V}
    average_current: {column: If, unit: A}
    junction: 175 degC
  thermal: {junction_to_case: 1.4 K/W}
`

describe('a catalogue with its mapping', () => {
  function withCatalogue(): string {
    const cwd = smallStage()
    writeFileSync(join(cwd, 'stock.csv'), 'Part,Vr,If\nstock-1,200,16\nstock-2,oops,16\nstock-3,200,20\n')
    writeFileSync(join(cwd, 'map.yaml'), mapping)
    return cwd
  }
  const rank = (...options: readonly string[]) =>
    ebbwatt(['rank', 'stage.yaml', '--json', '--records', 'stock.csv', '--draws', '50', ...options], {
      cwd: withCatalogue(),
    })

  it('uses the good rows, tells the bad cell and counts both', () => {
    const { code, out, err } = rank('--mapping', 'map.yaml')
    expect(code).toBe(0)
    const ids = JSON.parse(out).candidates.map(({ id }: { id: string }) => id)
    expect(ids.toSorted()).toEqual(['guessed', 'plain', 'small', 'stock-1', 'stock-3'])
    expect(err).toContain('stock.csv:3:2  ')
    expect(err).toContain('stock.csv: 3 rows, 2 used, 1 left out')
  })

  it('is refused with --strict for its bad cell', () => {
    const { code, out } = rank('--mapping', 'map.yaml', '--strict')
    expect(code).toBe(2)
    expect(JSON.parse(out).error.problems).toHaveLength(1)
  })

  it('needs its mapping, and says so', () => {
    const { code, err } = rank()
    expect(code).toBe(2)
    expect(err).toBe(
      'command line  option-unusable  --mapping: stock.csv is a table of parts; wanted is --mapping FILE, which says what its columns are\n',
    )
  })

  it('passes the check', () => {
    expect(ebbwatt(['check', 'map.yaml'], { cwd: withCatalogue() })).toMatchObject({
      code: 0,
      out: 'map.yaml: mapping, usable\n',
    })
  })
})
