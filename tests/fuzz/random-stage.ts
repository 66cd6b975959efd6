import fc, { type Arbitrary } from 'fast-check'
import {
  group,
  junctionLimit,
  magnitude,
  quantity,
  quantityOrZero,
  surroundings,
  temperature,
} from './random-quantity.ts'

const share = fc.oneof(quantityOrZero('%', 0.1, 60), fc.constantFrom('0 %', '100 %'))
const gate = group(
  {
    drive: fc.constantFrom('10 V', '12 V', '18 V'),
    resistance: quantityOrZero('ohm', 0.5, 50),
    input_capacitance: quantity('nF', 0.1, 20),
    transconductance: quantity('A/V', 1, 200),
    threshold: quantityOrZero('V', 1, 5),
  },
  { source_inductance: quantityOrZero('nH', 0.1, 20) },
)
const turnOff = fc.oneof(
  group({ voltage_rise: quantityOrZero('ns', 1, 200), current_fall: quantityOrZero('ns', 1, 200) }),
  group({ energy: quantityOrZero('uJ', 0.1, 1000) }),
)
const turnOn = group(
  { energy: quantityOrZero('uJ', 1, 1000), current: quantity('A', 1, 50), voltage: quantity('V', 20, 600) },
  { includes_rectifier: fc.constantFrom('yes', 'no', 'unknown'), rectifier: fc.constantFrom('a', 'b') },
)
const switchPart = fc
  .tuple(
    group(
      {},
      {
        on_resistance: quantityOrZero('mohm', 1, 500),
        on_resistance_per_kelvin: quantityOrZero('%/K', 0.1, 1.5),
        voltage_fall: quantityOrZero('ns', 1, 200),
        turn_off: turnOff,
        turn_on: turnOn,
        stored_energy: quantityOrZero('uJ', 0.1, 20),
        thermal: group({ junction_to_sink: quantity('K/W', 0.1, 3) }, { junction_limit: junctionLimit }),
      },
    ),
    fc.option(fc.oneof(group({ slope: quantity('A/us', 20, 3000) }), group({ gate }))),
  )
  .map(([part, slope]) => ({ ...part, ...slope }))
const cooling = fc.oneof(
  group({ case: surroundings }),
  group({ ambient: surroundings }),
  group({ ambient: surroundings, sink_to_ambient: quantity('K/W', 0.1, 20) }, { shared: fc.boolean() }),
)

/** Input and output that fit each other, so that most stages get as far as the study. */
const ports: Arbitrary<Record<string, unknown>> = fc
  .tuple(
    fc.constantFrom('buck', 'boost', 'inverting', 'mains-boost'),
    magnitude(5, 400),
    magnitude(1.02, 8),
    fc.oneof(group({ current: quantity('A', 0.05, 15) }), group({ power: quantity('W', 1, 1000) })),
    group({}, { capacitance: quantityOrZero('uF', 1, 2000), bleeder: quantityOrZero('kohm', 1, 500) }),
    fc.constantFrom('0 %', '10 %', '20 %'),
    quantity('Hz', 15, 400),
  )
  .map(([stage, low, ratio, load, bulk, tolerance, line]) => {
    const volts = (value: number) => `${Number(value.toPrecision(6))} V`
    if (stage === 'mains-boost') {
      const output = { voltage: volts(low * 1.4143 * 1.2 * ratio), ...load, ...bulk }
      return { stage, input: { mains: volts(low), tolerance, line }, output }
    }
    const [input, output] = stage === 'buck' ? [low * ratio, low] : [low, low * ratio]
    return { stage, input: { voltage: volts(input) }, output: { voltage: volts(output), ...load, ...bulk } }
  })

const rest = group(
  {
    frequency: quantity('kHz', 5, 400),
    inductor: group(
      { inductance: quantity('uH', 1, 2000) },
      { resistance: quantityOrZero('mohm', 1, 500), core_loss: quantityOrZero('W', 0.1, 10) },
    ),
    cooling,
    records: fc.constant(['parts.yaml']),
  },
  {
    title: fc.constantFrom('Orchard', 'ציר 5', '=1+1', '<b>bold</b>', '\u202Eleft'),
    switch: switchPart,
    loop_inductance: quantityOrZero('nH', 0.5, 100),
    snubber: group({ capacitance: quantityOrZero('pF', 10, 500) }),
    limits: group(
      {},
      { junction: junctionLimit, voltage_use: fc.oneof(share, fc.constantFrom('80 %', '90 %', '100 %')) },
    ),
    spread: group({}, { slope: share, voltage_fall: share, thermal: share }),
    fixed_losses: quantityOrZero('W', 0.1, 30),
    duty_profile: fc.array(group({ load: share, hours: quantityOrZero('h', 1, 4000) }, { ambient: temperature }), {
      minLength: 1,
      maxLength: 3,
    }),
    incumbent: fc.constantFrom('a', 'b'),
    parallel: group(
      { parts: fc.integer({ min: 1, max: 4 }) },
      { imbalance: fc.constantFrom('0 %', '10 %', '40 %', '120 %') },
    ),
  },
)

/** A stage over the whole legal range, with parts "a" and "b" on its shelf. */
export const randomStage: Arbitrary<Record<string, unknown>> = fc
  .tuple(ports, rest)
  .map(([one, other]) => ({ ...one, ...other }))
