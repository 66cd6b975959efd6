import fc, { type Arbitrary } from 'fast-check'
import type { FuzzCase } from './fuzz-case.ts'

type Wish = Pick<FuzzCase, 'command' | 'options'>

/** Mostly the document, whose numbers can all be looked at; the other forms now and then. */
const form: Arbitrary<FuzzCase['options']> = fc.oneof(
  { weight: 6, arbitrary: fc.constant({ json: true }) },
  { weight: 1, arbitrary: fc.constant({ csv: true }) },
  { weight: 1, arbitrary: fc.constant({ markdown: true }) },
  { weight: 1, arbitrary: fc.constant({}) },
  { weight: 1, arbitrary: fc.constantFrom({ output: 'out.html' }, { output: 'out.svg' }, { output: 'out.json' }) },
)

const common = fc
  .tuple(form, fc.integer({ min: 0, max: 1000 }), fc.constantFrom(1, 2, 12), fc.boolean(), fc.boolean())
  .map(([chosen, seed, draws, strict, quiet]) => ({ ...chosen, seed, draws, strict, quiet }))

export const rankOptions: Arbitrary<Wish> = common.map((options) => ({ command: 'rank', options }))

/** Ends of a trend that mostly make sense for some stage. */
const ends = fc.constantFrom(
  ...(
    [
      ['frequency', '20 kHz', '400 kHz'],
      ['frequency', '1 Hz', '1e12 Hz'],
      ['load', '1 %', '100 %'],
      ['load', '1e-20 %', '1e20 %'],
      ['slope', '50 A/us', '2000 A/us'],
      ['slope', '1e-9 A/s', '1e30 A/s'],
      ['ambient', '-40 degC', '120 degC'],
      ['ambient', '1 K', '1e6 K'],
      ['input', '10 V', '60 V'],
      ['input', '1e-10 V', '1e10 V'],
      ['inductance', '1 uH', '1 mH'],
      ['inductance', '1e-20 H', '1e20 H'],
    ] as const
  ).map(([over, from, to]) => ({ over, from, to })),
)

export const trendOptions: Arbitrary<Wish> = fc
  .tuple(common, ends, fc.integer({ min: 2, max: 5 }), fc.boolean())
  .map(([options, range, steps, log]) => ({
    command: 'trend',
    options: { ...options, ...range, steps, log: log && range.over !== 'ambient' },
  }))

export function swapOptions(ids: readonly string[]): Arbitrary<Wish> {
  return fc
    .tuple(common, fc.constantFrom(...ids), fc.constantFrom(...ids))
    .map(([options, from, to]) => ({ command: 'swap', options: { ...options, from, to } }))
}

/** A document does much of what the other commands do, so few draws have to do. */
export const reviewOptions: Arbitrary<Wish> = fc
  .tuple(fc.constantFrom('out.html', 'out.md'), fc.integer({ min: 0, max: 1000 }), fc.boolean())
  .map(([output, seed, quiet]) => ({ command: 'review', options: { output, seed, draws: 2, quiet } }))
