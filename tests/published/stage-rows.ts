import { bulkDischargeTime, bulkEnergy } from '../../src/models/bulk-discharge.ts'
import { baseEnergy } from '../../src/models/commutation-energy.ts'
import { type MainsBoostInput, mainsBoostRectifierMean, mainsBoostRectifierRms } from '../../src/models/line-cycle.ts'
import { trapezoidRms } from '../../src/models/trapezoid.ts'
import { gaussLegendre, integrate } from '../../src/numerics/gauss-legendre.ts'
import { boost, conduction, milliwatts } from './conduction-rows.ts'
import { line, type PublishedRow, published } from './figure.ts'

function buckSwitch(input: {
  vin: number
  vout: number
  current: number
  inductance: number
  frequency: number
  resistance: number
}) {
  const duty = input.vout / input.vin
  const ripple = ((input.vin - input.vout) * duty) / (input.inductance * input.frequency)
  const rms = trapezoidRms({ first: input.current - ripple / 2, last: input.current + ripple / 2 })
  return { P: duty * rms * rms * input.resistance, ripple }
}

function overlap(input: { voltage: number; current: number; time: number; frequency: number }) {
  const event = { voltage: input.voltage, current: input.current, slope: input.current / input.time, voltageFall: 0 }
  return { P: input.frequency * baseEnergy(event) }
}

function sinePower(power: number): Readonly<Record<string, number>> {
  const f = (angle: number) => Math.sin(angle) ** power
  return { mean: integrate({ f, low: 0, high: Math.PI, rule: gaussLegendre(256) }) / Math.PI }
}

function mainsCase(power: number, mainsVoltage: number, outputVoltage: number, printed: readonly string[]) {
  const figures = line(
    [
      ['mean', 'A', 1],
      ['rms', 'A', 1],
    ],
    printed,
  )
  return {
    name: `${power} W, ${mainsVoltage} V, ${outputVoltage} V`,
    input: { power, mainsVoltage, outputVoltage },
    figures,
  }
}

/** Overlap, ripple, mains boost and the bulk capacitor: P13, P25, P33, P35, P38. */
export const stageRows: readonly PublishedRow[] = [
  published({
    id: 'P13',
    models: ['haaf-harper-overlap'],
    source: boost,
    standing: 'read',
    compute: overlap,
    cases: [
      {
        name: '12 V, 1.4 A, 6 ns, 1.6 MHz',
        input: { voltage: 12, current: 1.4, time: 6e-9, frequency: 1.6e6 },
        figures: milliwatts('80', { absolute: 5, because: 'printed to 10 mW' }),
      },
      {
        name: '12 V, 1.4 A, 5 ns, 1.6 MHz',
        input: { voltage: 12, current: 1.4, time: 5e-9, frequency: 1.6e6 },
        figures: milliwatts('70', { absolute: 5, because: 'printed to 10 mW' }),
      },
    ],
  }),
  published({
    id: 'P25',
    models: ['an604-trapezoid'],
    source: 'ROHM 64AN035E, 2021',
    standing: 'second-hand',
    compute: buckSwitch,
    cases: [
      {
        name: '12 to 5 V, 3 A, 4.7 µH, 1 MHz, 100 mΩ',
        input: { vin: 12, vout: 5, current: 3, inductance: 4.7e-6, frequency: 1e6, resistance: 0.1 },
        figures: [...milliwatts('376'), { quantity: 'ripple', unit: 'A', scale: 1, printed: '0.6206' }],
      },
    ],
  }),
  published({
    id: 'P33',
    models: ['erickson-line-cycle'],
    source: 'R. W. Erickson & D. Maksimovic, table 18.3; equal to integration',
    standing: 'from memory',
    compute: (input: MainsBoostInput) => ({ mean: mainsBoostRectifierMean(input), rms: mainsBoostRectifierRms(input) }),
    cases: [
      mainsCase(1200, 85, 400, ['3.0000', '7.1303']),
      mainsCase(1200, 230, 400, ['3.0000', '4.3347']),
      mainsCase(300, 90, 390, ['0.76923', '1.75442']),
    ],
  }),
  published({
    id: 'P35',
    models: [],
    source: 'mean of sin^n over the half cycle, own; here the quadrature that line-cycle averages use',
    standing: 'own',
    compute: sinePower,
    cases: (
      [
        [0.4, '.79762'],
        [0.5, '.76276'],
        [0.6, '.73189'],
        [0.8, '.67952'],
        [1, '.63662'],
        [1.5, '.55642'],
      ] as const
    ).map(([input, printed]) => ({
      name: `n ${input}`,
      input,
      figures: line([['mean', '1', 1]], [printed]),
    })),
  }),
  published({
    id: 'P38',
    models: ['haaf-harper-overlap', 'junction-law'],
    source: 'example in the manner of N. Mohan et al.; inputs read, results own',
    standing: 'own',
    compute: (input: {
      voltage: number
      current: number
      time: number
      frequency: number
      share: number
      drop: number
    }) => ({
      'P overlap': overlap(input).P,
      'P diode': conduction({ threshold: input.drop, resistance: 0, current: input.current, share: input.share }).P,
    }),
    cases: [
      {
        name: '40 V, 5 A, 200 kHz, 65 ns; D 0.3, 0.8 V',
        input: { voltage: 40, current: 5, time: 65e-9, frequency: 200e3, share: 0.7, drop: 0.8 },
        figures: line(
          [
            ['P overlap', 'W', 1],
            ['P diode', 'W', 1],
          ],
          ['1.300', '2.800'],
        ),
      },
    ],
  }),
  published({
    id: 'bulk',
    models: ['exponential-discharge'],
    source: 'exponential discharge, own evaluation',
    standing: 'own',
    compute: (input: { resistance: number; capacitance: number; from: number; to: number }) => ({
      t: bulkDischargeTime(input),
      E: bulkEnergy({ capacitance: input.capacitance, voltage: input.from }),
    }),
    cases: [
      {
        name: '10 kΩ, 470 µF, 400 to 60 V',
        input: { resistance: 10e3, capacitance: 470e-6, from: 400, to: 60 },
        figures: line(
          [
            ['t', 's', 1],
            ['E', 'J', 1],
          ],
          ['8.92', '37.6'],
        ),
      },
    ],
  }),
]
