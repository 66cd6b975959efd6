import fc, { type Arbitrary } from 'fast-check'
import { group, magnitude, quantity, quantityOrZero, temperature } from './random-quantity.ts'

const grade = fc.constantFrom('measured', 'typical', 'maximum', 'estimated')
const ratedJunction = fc.integer({ min: 100, max: 200 }).map((value) => `${value} degC`)
const share = fc.oneof(quantityOrZero('%', 0.1, 30), fc.constantFrom('0 %', '100 %'))
const basics = { grade, spread: share, junction: temperature, source: fc.constantFrom('table 4', 'bench') }

const forwardRow = group({ current: quantity('A', 0.1, 50), drop: quantityOrZero('V', 0.3, 3) }, basics)
const forwardLine = group(
  { threshold: quantityOrZero('V', 0.2, 1.5), resistance: quantityOrZero('mohm', 1, 500) },
  {
    ...basics,
    threshold_per_kelvin: fc.oneof(
      quantity('mV/K', 0.1, 4).map((text) => `-${text}`),
      quantityOrZero('mV/K', 0.1, 4),
    ),
    resistance_per_kelvin: quantityOrZero('mohm/K', 0.001, 1),
  },
)
const trr = quantity('ns', 3, 3000)
const charge = quantity('nC', 1, 5000)
const peak = quantity('A', 0.1, 50)
const softness = fc.oneof(magnitude(0.1, 5), fc.constant(0))
const rampRow = fc
  .tuple(
    group(
      {},
      {
        current: quantity('A', 0.1, 50),
        slope: quantity('A/us', 10, 2000),
        voltage: quantity('V', 10, 800),
        ...basics,
      },
    ),
    fc.constantFrom('trr', 'qrr', 'irrm', 'softness', 'trr qrr', 'trr irrm', 'qrr irrm', 'trr qrr irrm softness'),
    group({ trr, qrr: charge, irrm: peak, softness }),
    fc.constantFrom('line-90-25', 'line-75-50', 'level-25', 'level-10', 'unknown', 'level'),
    fc.constantFrom('times', 'slopes'),
  )
  .map(([conditions, names, figures, by, softnessBy]) => {
    const chosen = Object.fromEntries(names.split(' ').map((name) => [name, figures[name]]))
    const until = by === 'level' ? { until: '0.3 A' } : {}
    const definition = chosen.trr === undefined ? {} : { trr_by: by, ...until }
    const soft = chosen.softness === undefined ? {} : { softness_by: softnessBy }
    return { fixture: 'ramp', ...conditions, ...chosen, ...definition, ...soft }
  })
const stepRow = fc
  .tuple(
    group({ current: quantity('A', 0.01, 5), reverse: quantity('A', 0.5, 5) }, basics),
    fc.constantFrom('trr', 'storage', 'both'),
    quantity('ns', 30, 3000),
    quantityOrZero('ns', 1, 30),
  )
  .map(([conditions, which, time, storage]) => ({
    fixture: 'step',
    ...conditions,
    ...(which === 'storage' ? {} : { trr: time, until: '0.25 A' }),
    ...(which === 'trr' ? {} : { storage }),
  }))
const capacitance = fc.oneof(
  group({
    zero_bias: quantityOrZero('pF', 5, 5000),
    built_in: quantityOrZero('V', 0.3, 2),
    grading: fc.constantFrom(0, 0.3, 0.46, 0.5, 0.95, 0.999),
  }),
  group({
    points: fc.array(group({ voltage: quantityOrZero('V', 1, 600), capacitance: quantityOrZero('pF', 5, 2000) }), {
      minLength: 1,
      maxLength: 4,
    }),
  }),
  group({ charge: quantityOrZero('nC', 1, 500), voltage: quantityOrZero('V', 10, 600) }),
)
const leakage = group({ voltage: quantityOrZero('V', 10, 800), current: quantity('uA', 0.01, 5000) }, basics)
const thermal = fc.oneof(
  group({ junction_to_case: quantity('K/W', 0.2, 5) }, { case_to_sink: quantity('K/W', 0.1, 2) }),
  group({ junction_to_ambient: quantity('K/W', 10, 100) }, { mounting: fc.constant('on 6 cm2 of copper') }),
)

/** A legal record: every class, every kind of row, any of them left out. */
export function randomRecord(id: string): Arbitrary<Record<string, unknown>> {
  return fc
    .tuple(
      group(
        {
          class: fc.constantFrom(
            'standard',
            'fast',
            'ultrafast',
            'soft-ultrafast',
            'body-diode',
            'schottky',
            'sic-schottky',
          ),
          ratings: group({
            reverse_voltage: quantity('V', 200, 5000),
            average_current: quantity('A', 2, 60),
            junction: ratedJunction,
          }),
          thermal,
        },
        {
          price: fc.constantFrom(0, 0.5, 12),
          forward: fc.array(forwardRow, { maxLength: 3 }),
          recovery: fc.array(fc.oneof(rampRow, rampRow, stepRow), { maxLength: 4 }),
          leakage: fc.array(leakage, { maxLength: 2 }),
          capacitance,
          forward_recovery: group({
            peak: quantityOrZero('V', 1, 20),
            time: quantityOrZero('ns', 5, 500),
            slope: quantity('A/us', 10, 1000),
          }),
          dead_time: group({ before: quantityOrZero('ns', 5, 200), after: quantityOrZero('ns', 5, 200) }),
          channel: group({
            on_resistance: quantityOrZero('mohm', 1, 100),
            per_kelvin: quantityOrZero('%/K', 0.1, 1.5),
          }),
        },
      ),
      fc.option(forwardLine),
    )
    .map(([{ forward, ...record }, line]) => ({
      id,
      ...record,
      ...(line === null ? (forward === undefined ? {} : { forward }) : { forward_line: line }),
    }))
}
