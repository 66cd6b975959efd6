import { describe, expect, it } from 'vitest'
import type { CaptureSettings } from '../../src/domain/capture.ts'
import { captureTable } from '../../src/input/capture-table.ts'
import { settingsFor } from './synthetic.ts'

const time = { column: 1, factor: 1e-9, unit: 'ns', shunt: null }
const current = { column: 2, factor: 1, unit: 'A', shunt: null }

function read(text: string, change: Partial<CaptureSettings> = {}, piece = text.length) {
  const settings = settingsFor('ramp', { time, current, voltage: null, ...change })
  const table = captureTable(settings, 'x.csv')
  for (let at = 0; at < text.length; at += piece) table.push(text.slice(at, at + piece))
  return table.end()
}

function values(text: string, change: Partial<CaptureSettings> = {}, piece?: number) {
  const { value, problems } = read(text, change, piece)
  if (value === null) throw new Error(JSON.stringify(problems))
  return { ...value.reading, first: value.waveform.start, current: [...value.waveform.current] }
}

function problem(text: string, change: Partial<CaptureSettings> = {}) {
  const { problems } = read(text, change)
  return problems.map(({ code, line, found, expected, hint }) => ({ code, line, found, expected, hint }))
}

const numbers = Array.from({ length: 24 }, (_, k) => k)
const rows = (cell: (k: number) => string) => `${numbers.map(cell).join('\n')}\n`
const wanted = numbers.map((k) => k / 8)

describe('delimiter and decimal sign', () => {
  it.each([
    ['comma and point', rows((k) => `${k}.0,${(k / 8).toFixed(3)}`), ',', 'point'],
    ['semicolon and comma', rows((k) => `${k},0;${(k / 8).toFixed(3).replace('.', ',')}`), ';', 'comma'],
    ['tab and comma', rows((k) => `${k},0\t${(k / 8).toFixed(3).replace('.', ',')}`), 'tab', 'comma'],
    ['semicolon and point', rows((k) => `${k}.0;${(k / 8).toFixed(3)}`), ';', 'point'],
    [
      'quoted decimal commas between commas',
      rows((k) => `"${k},0","${(k / 8).toFixed(3).replace('.', ',')}"`),
      ',',
      'comma',
    ],
  ])('%s is read', (_name, text, delimiter, decimal) => {
    const read = values(text)
    expect([read.delimiter, read.decimal, read.current]).toEqual([delimiter, decimal, wanted])
  })

  it('commas everywhere read both ways are refused, and the way out is named', () => {
    const text = rows((k) => `${k},0,${Math.floor(k / 8)},${String(125 * (k % 8)).padStart(3, '0')}`)
    expect(problem(text)).toEqual([
      {
        code: 'table-malformed',
        line: 0,
        found: '"23,0,2,875" reads as 4 whole numbers or as 2 with a decimal comma',
        expected: 'one reading',
        hint: 'set decimal: point or decimal: comma',
      },
    ])
    expect(values(text, { decimal: 'comma' }).current).toEqual(wanted)
    expect(values(text, { decimal: 'point' }).current).toEqual(numbers.map(() => 0))
  })

  it('a header with a name for each column settles it', () => {
    const body = rows((k) => `${k},0,${Math.floor(k / 8)},${String(125 * (k % 8)).padStart(3, '0')}`)
    expect(values(`t,i\n${body}`).current).toEqual(wanted)
    expect(values(`t,a,i,b\n${body}`).current).toEqual(numbers.map(() => 0))
  })

  it('both decimal signs in one file are refused', () => {
    const text = rows((k) => (k % 2 === 0 ? `${k};1.5` : `${k};1,5`))
    expect(problem(text)[0]!.code).toBe('table-malformed')
  })

  it('U+2212, scientific notation and spaces are read', () => {
    const text = rows((k) => ` ${k} , \u2212${(k / 8).toExponential(4)} `)
    expect(values(text).current).toEqual(wanted.map((value) => -value))
  })

  it.each(['0x10', 'Infinity', 'NaN', '1e400', '', '--', '1.2.3'])(
    'a sample that is "%s" is refused with its line',
    (cell) => {
      const text = rows((k) => (k === 13 ? `${k},${cell}` : `${k},1.5`))
      expect(problem(text)).toMatchObject([{ code: 'table-cell', line: 14 }])
    },
  )
})

describe('header and columns', () => {
  const body = rows((k) => `${k},0.5,${(k / 8).toFixed(3)}`)

  it('header blocks and unit rows of any length are passed over', () => {
    const block = Array.from({ length: 300 }, (_, k) => `Key ${k},value ${k}`).join('\n')
    const read = values(`${block}\n\ntime,x,probe\n(ns),(V),(A)\n${body}`, { current: { ...current, column: 3 } })
    expect([read.headerRows, read.current]).toEqual([303, wanted])
    expect(read.columns.map(({ header }) => header)).toEqual(['time', 'probe'])
  })

  it('numbers among the keys of a header block are no samples', () => {
    const read = values(
      `Record length,2000\nInterval,4e-10\n5,7\nTime,Current\n${rows((k) => `${k},${(k / 8).toFixed(3)}`)}`,
    )
    expect([read.headerRows, read.current]).toEqual([4, wanted])
  })

  it('columns are found by their header text, in any case', () => {
    const named = { time: { ...time, column: 'TIME' }, current: { ...current, column: 'probe' } }
    expect(values(`time,x,Probe\n${body}`, named).current).toEqual(wanted)
  })

  it('an unknown header text is told with the known ones', () => {
    expect(problem(`time,x,Probe\n${body}`, { current: { ...current, column: 'prob' } })).toEqual([
      {
        code: 'table-column-unknown',
        line: 0,
        found: 'prob',
        expected: 'time, x, Probe',
        hint: 'or give its position, counted from 1',
      },
    ])
  })

  it('a position outside the table is told with the range', () => {
    expect(problem(body, { current: { ...current, column: 7 } })).toMatchObject([
      { code: 'table-column-unknown', found: '7', expected: '1 to 3' },
    ])
  })

  it('units, a shunt and an inverted channel are in the factor', () => {
    const read = values(
      rows((k) => `${k},${(k / 8).toFixed(3)}`),
      { current: { ...current, factor: -20 } },
    )
    expect(read.current).toEqual(wanted.map((value) => -20 * value))
  })
})

describe('time', () => {
  const flat = (stamp: (k: number) => string) => rows((k) => `${stamp(k)},${(k / 8).toFixed(3)}`)

  it('is relative to the trigger', () => {
    const read = values(flat((k) => String(k - 10)))
    expect(read.first).toBeCloseTo(-10e-9, 20)
    expect(read.interval).toBeCloseTo(1e-9, 20)
    expect(read.timeEvened).toBe(false)
  })

  it('that repeats from rounding is evened out', () => {
    const read = values(flat((k) => (0.4 * k).toFixed(0)))
    expect([read.timeEvened, read.pairsAveraged, read.current.length]).toEqual([true, false, 24])
    expect(read.interval).toBeCloseTo(0.4e-9, 11)
  })

  it('that stands twice with lowest and highest value is halved by averaging', () => {
    const text = Array.from({ length: 30 }, (_, k) => `${k},${k - 0.25}\n${k},${k + 0.25}`).join('\n')
    const read = values(text)
    expect(read.pairsAveraged).toBe(true)
    expect(read.current).toEqual(Array.from({ length: 30 }, (_, k) => k))
  })

  it('with a gap is refused', () => {
    expect(problem(flat((k) => String(k < 12 ? k : k + 40)))).toMatchObject([{ code: 'table-malformed' }])
  })

  it('may be missing, the interval stands in the settings', () => {
    const read = values(
      rows((k) => (k / 8).toFixed(3)),
      { time: null, interval: 2e-9, current: { ...current, column: 1 } },
    )
    expect([read.interval, read.current]).toEqual([2e-9, wanted])
  })
})

describe('segments', () => {
  const segment = (offset: number) => rows((k) => `${k},${(k / 8 + offset).toFixed(3)}`)
  const stacked = segment(0) + segment(1) + segment(5)

  it('begin where the time starts again; one is chosen', () => {
    expect(values(stacked).current).toEqual(wanted)
    const second = values(stacked, { segment: 2 })
    expect([second.segments, second.current]).toEqual([3, wanted.map((value) => value + 1)])
  })

  it('are averaged when asked', () => {
    expect(values(stacked, { segment: 'average' }).current).toEqual(wanted.map((value) => value + 2))
  })

  it('begin after a line of text where there is no time column', () => {
    const bare = (offset: number) => `sweep\n${rows((k) => (k / 8 + offset).toFixed(3))}`
    const settings = { time: null, interval: 1e-9, current: { ...current, column: 1 } }
    expect(values(bare(0) + bare(1), { ...settings, segment: 2 }).current).toEqual(wanted.map((value) => value + 1))
  })

  it('that do not exist are refused', () => {
    expect(problem(stacked, { segment: 4 })).toMatchObject([
      { found: 'segment 4 does not exist', expected: '1 to 3, or average' },
    ])
    expect(problem(segment(0), { segment: 2 })).toMatchObject([{ expected: 'segment 1, the only one' }])
  })
})

describe('pieces', () => {
  it('the size of the pieces changes nothing, whatever the line ends', () => {
    for (const end of ['\n', '\r\n', '\r']) {
      const text = ['time,i', ...Array.from({ length: 9000 }, (_, k) => `${k},${(k / 8).toFixed(3)}`), ''].join(end)
      const whole = values(text)
      expect(whole.current.length).toBe(9000)
      for (const piece of [7777, 65_536, 70_001]) expect(values(text, {}, piece)).toEqual(whole)
    }
  })

  it('too few samples, none, and no numbers at all are told apart', () => {
    expect(problem('1,2\n2,3\n3,4\n')).toMatchObject([{ found: 'there are 3 samples', expected: 'at least 20' }])
    expect(problem('a,b\nc,d\n')).toMatchObject([{ code: 'table-malformed', expected: 'rows of samples' }])
    expect(problem('\n\n')).toMatchObject([{ code: 'table-column-unknown' }])
  })
})
