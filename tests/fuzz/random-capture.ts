import fc, { type Arbitrary } from 'fast-check'
import type { FuzzCase } from './fuzz-case.ts'
import { group, magnitude, quantity, temperature } from './random-quantity.ts'

interface Shape {
  readonly forward: number
  readonly peak: number
  readonly samples: number
  readonly interval: number
  readonly noise: number
  readonly tail: number
}

/** A fall from forward to reverse and a tail, in samples; a cheap sine stands for noise. */
function currentAt({ forward, peak, samples, noise, tail }: Shape, k: number): number {
  const [fall, turn] = [samples * 0.3, samples * 0.5]
  const ripple = noise * Math.sin(k * 12.9898) * Math.sin(k * 78.233)
  if (k < fall) return forward + ripple
  if (k < turn) return forward - ((forward + peak) * (k - fall)) / (turn - fall) + ripple
  return -peak * Math.exp(-(k - turn) / (tail * samples)) + ripple
}

const shape = fc.record({
  forward: fc.oneof(magnitude(0.01, 50), fc.constant(0)),
  peak: fc.oneof(magnitude(0.01, 50), fc.constant(0)),
  samples: fc.oneof(
    { weight: 8, arbitrary: fc.integer({ min: 1, max: 400 }) },
    { weight: 1, arbitrary: fc.constant(5000) },
  ),
  interval: magnitude(1e-10, 1e-6),
  noise: fc.oneof(fc.constant(0), magnitude(1e-4, 1)),
  tail: fc.oneof(magnitude(0.005, 0.3), fc.constant(1e9)),
})

const odd = fc.constantFrom(
  '',
  'NaN',
  'Inf',
  '-Infinity',
  '1e999',
  'text',
  '=1+1',
  '1,5',
  '0x10',
  ' ',
  '"',
  '1e-999',
  '9'.repeat(400),
)

interface Layout {
  readonly delimiter: string
  readonly comma: boolean
  readonly header: string
  readonly constant: string | null
  readonly replaced: readonly (readonly [number, string])[]
  readonly ragged: readonly number[]
  readonly sections: number
}

const layout: Arbitrary<Layout> = fc.record({
  delimiter: fc.constantFrom(',', ';', '\t', ' ', '|'),
  comma: fc.boolean(),
  header: fc.constantFrom(
    '',
    't,i,v\n',
    'scope\nmodel,none\n\ntime,current,voltage\n(s),(A),(V)\n',
    '\n\n\n',
    '"open\n',
  ),
  constant: fc.oneof(
    { weight: 9, arbitrary: fc.constant(null) },
    { weight: 1, arbitrary: fc.constantFrom('0', '1', 'NaN') },
  ),
  replaced: fc.oneof(
    { weight: 3, arbitrary: fc.constant([]) },
    { weight: 1, arbitrary: fc.array(fc.tuple(fc.nat(), odd), { maxLength: 5 }) },
  ),
  ragged: fc.oneof(
    { weight: 4, arbitrary: fc.constant([]) },
    { weight: 1, arbitrary: fc.array(fc.nat(), { maxLength: 4 }) },
  ),
  sections: fc.oneof(
    { weight: 8, arbitrary: fc.constant(1) },
    { weight: 1, arbitrary: fc.integer({ min: 0, max: 4 }) },
  ),
})

function samplesText(form: Shape, { delimiter, comma, header, constant, replaced, ragged, sections }: Layout): string {
  const rows: string[] = []
  for (let section = 0; section < sections; section++) {
    for (let k = 0; k < form.samples; k++) {
      const current = currentAt(form, k)
      const voltage = k > form.samples * 0.5 ? 390 : -1
      const cells = [k * form.interval, current, voltage].map((value) => constant ?? String(value))
      rows.push((comma ? cells.map((cell) => cell.replace('.', ',')) : cells).join(delimiter))
    }
  }
  for (const [where, cell] of replaced) {
    if (rows.length === 0) break
    const cells = rows[where % rows.length]!.split(delimiter)
    cells[where % cells.length] = cell
    rows[where % rows.length] = cells.join(delimiter)
  }
  for (const where of ragged) {
    if (rows.length > 0) rows[where % rows.length] = rows[where % rows.length]!.slice(0, where % 9)
  }
  return header + rows.join('\n')
}

const column = fc.oneof(
  { weight: 12, arbitrary: fc.constant(null) },
  { weight: 1, arbitrary: fc.constantFrom<(string | number)[]>(1, 2, 9, 'current', 'nothing', 100_000) },
)

const settings = fc
  .tuple(
    fc.constantFrom('ramp', 'step'),
    column,
    fc.constantFrom('time', 'interval'),
    fc.boolean(),
    group(
      {},
      {
        decimal: fc.constantFrom('auto', 'point', 'comma'),
        segment: fc.constantFrom<(number | string)[]>(1, 2, 'average', 99),
        trr_by: fc.constantFrom('line-90-25', 'line-75-50', 'level-25', 'level-10'),
        charge_until: fc.constantFrom('0 %', '2 %', '10 %', '50 %', '100 %'),
        bandwidth: quantity('MHz', 1, 2000),
        current_delay: fc.constantFrom('0 ns', '1.2 ns', '-9 ns', '1 s', '-1e20 s', '1e-30 s'),
        device: group({}, { id: fc.constant('a'), junction: temperature }),
        reference: fc.constant('samples.csv'),
      },
    ),
    fc.constantFrom(
      { unit: 'A' },
      { unit: 'mV', across: '50 mohm' },
      { unit: 'A', invert: true },
      { unit: 'mV', across: '1e-30 ohm' },
    ),
    quantity('ns', 0.1, 10),
  )
  .map(([capture, wrong, axis, voltage, rest, unit, interval]) => ({
    capture,
    file: 'samples.csv',
    columns: {
      ...(axis === 'time' ? { time: { column: 1, unit: 's' } } : {}),
      current: { column: wrong ?? 2, ...unit },
      ...(voltage ? { voltage: { column: 3, unit: 'V' } } : {}),
    },
    ...(axis === 'interval' ? { interval } : {}),
    ...rest,
  }))

const anyForm = fc.constantFrom<FuzzCase['options'][]>(
  { json: true },
  { json: true },
  { json: true, strict: true },
  {},
  { output: 'out.svg' },
)
const recordText = JSON.stringify({
  id: 'a',
  class: 'fast',
  ratings: { reverse_voltage: '600 V', average_current: '8 A', junction: '150 degC' },
})

/** Samples of every sort with settings of every sort, now and then with a record to append to. */
export const randomCapture: Arbitrary<FuzzCase> = fc
  .tuple(shape, layout, settings, anyForm, fc.boolean())
  .map(([form, table, chosen, options, into]) => ({
    kind: 'random capture',
    files: {
      'capture.yaml': JSON.stringify(chosen),
      'samples.csv': samplesText(form, table),
      ...(into ? { 'record.yaml': `- ${recordText}\n` } : {}),
    },
    command: 'reduce',
    operands: ['capture.yaml'],
    options: into ? { ...options, into: 'record.yaml' } : options,
  }))
