import {
  leakageCriticalTemperature,
  leakageCurrent,
  leakageRunawayLimit,
  leakageSlopeTemperature,
} from '../../src/models/leakage-current.ts'
import { line, type PublishedRow, published } from './figure.ts'

/** Activation Ea/k that makes the Arrhenius form pass two leakage readings. */
function activationThrough(input: { low: number; high: number; cold: number; hot: number }): number {
  return Math.log(input.high / input.low) / (1 / input.cold - 1 / input.hot)
}

const note = 'a note on Schottky runaway, 2008'
const twoReadings = { low: 1e-4, high: 10e-3, cold: 298.15, hot: 358.15 }
const exponent = Math.log(twoReadings.high / twoReadings.low) / (twoReadings.hot - twoReadings.cold)

/** Leakage and heat: P09, P15, P21 to P24, P27, P39. */
export const heatRows: readonly PublishedRow[] = [
  published({
    id: 'P09',
    models: [],
    source: 'Texas Instruments SLUS593H',
    standing: 'read',
    compute: ({
      ambient,
      thermalResistance,
      power,
    }: {
      ambient: number
      thermalResistance: number
      power: number
    }) => ({
      Tj: ambient + thermalResistance * power,
    }),
    cases: [
      {
        name: '1.322 W, 40 K/W, 85 °C',
        input: { ambient: 85, thermalResistance: 40, power: 1.322 },
        figures: [
          {
            quantity: 'Tj',
            unit: '°C',
            scale: 1,
            printed: '139',
            misprint: { right: '137.9', because: 'misprint: 85 + 40 × 1.322; recomputed' },
          },
        ],
      },
    ],
  }),
  published({
    id: 'P15',
    models: [],
    source: 'Texas Instruments boost data sheet ZHCSIR2, sec. 10.3.4.1',
    standing: 'read',
    compute: ({ power, losses }: { power: number; losses: number }) => ({ efficiency: power / (power + losses) }),
    cases: [
      {
        name: '6 W, 856 mW',
        input: { power: 6, losses: 0.856 },
        figures: [
          {
            quantity: 'efficiency',
            unit: '%',
            scale: 0.01,
            printed: '86',
            misprint: { right: '87.5', because: 'misprint: 6/6.856; recomputed' },
          },
        ],
      },
    ],
  }),
  published({
    id: 'P21',
    models: ['an869-runaway'],
    source: 'STMicroelectronics AN869, 2004',
    standing: 'read',
    compute: (input: Parameters<typeof leakageRunawayLimit>[0]) => ({ I_R: leakageRunawayLimit(input) }),
    cases: [
      {
        name: '15 V, d 0.5, 0.055/K, 10.1 K/W',
        input: { voltage: 15, conductionShare: 0.5, coefficient: 0.055, thermalResistance: 10.1 },
        figures: [
          {
            quantity: 'I_R',
            unit: 'mA',
            scale: 1e-3,
            printed: '242',
            tolerance: { absolute: 2.42, because: 'the source rounds c, "about" 0.055/K: 1 %' },
          },
        ],
      },
    ],
  }),
  published({
    id: 'P22',
    models: [],
    source: 'D. De, Basic Electronics, 2010, Example 2-21: balance 10 K above ambient, leakage doubled',
    standing: 'read',
    compute: (input: { conductance: number; rise: number; current: number }) => ({
      V: (input.conductance * input.rise) / (input.current * 2 ** (input.rise / 10)),
    }),
    cases: [
      {
        name: '0.15 mW/K, 25 to 35 °C, 5 µA',
        input: { conductance: 0.15e-3, rise: 10, current: 5e-6 },
        figures: line([['V', 'V', 1]], ['150']),
      },
    ],
  }),
  published({
    id: 'P23',
    models: ['arrhenius-leakage'],
    source: note,
    standing: 'read',
    compute: (input: typeof twoReadings) => {
      // the Arrhenius slope at the temperature where it equals the mean exponent: the geometric mean
      const activation = activationThrough(input)
      const temperature = Math.sqrt(input.cold * input.hot)
      const reference = { activation, exponent: 0, voltage: 1, ratedVoltage: 1, referenceTemperature: input.cold }
      const hot = leakageCurrent({ ...reference, logarithm: Math.log(input.low), temperature: input.hot })
      return { n: leakageSlopeTemperature({ activation, temperature }), 'I_R hot': hot }
    },
    cases: [
      {
        name: '0.1 mA at 25 °C, 10 mA at 85 °C',
        input: twoReadings,
        figures: line(
          [
            ['n', '1/K', 1],
            ['I_R hot', 'mA', 1e-3],
          ],
          ['0.07675', '10.0'],
        ),
      },
    ],
  }),
  published({
    id: 'P24',
    models: ['an869-runaway'],
    source: `${note}; result own`,
    standing: 'read',
    compute: (input: Parameters<typeof leakageCriticalTemperature>[0]) => ({
      T: leakageCriticalTemperature(input) - 273.15,
      'I_R there': leakageRunawayLimit({ ...input, conductionShare: 0 }),
    }),
    cases: [
      {
        name: '25 K/W, 11 V, 0.1 mA at 25 °C',
        input: {
          voltage: 11,
          current: 1e-4,
          referenceTemperature: 298.15,
          coefficient: exponent,
          thermalResistance: 25,
        },
        figures: line(
          [
            ['T', '°C', 1],
            ['I_R there', 'mA', 1e-3],
          ],
          ['105.27', '47.4'],
        ),
      },
    ],
  }),
  published({
    id: 'P27',
    models: [],
    source: 'a derating article: 80 % of the repetitive rating',
    standing: 'read',
    compute: ({ stress, use }: { stress: number; use: number }) => ({ rating: stress / use }),
    cases: [{ name: '32 V stress', input: { stress: 32, use: 0.8 }, figures: line([['rating', 'V', 1]], ['40.0']) }],
  }),
  published({
    id: 'P39',
    models: [],
    source: 'worked snubber example',
    standing: 'read',
    compute: ({ capacitance, voltage, frequency }: { capacitance: number; voltage: number; frequency: number }) => ({
      P: capacitance * voltage * voltage * frequency,
    }),
    cases: [
      {
        name: '100 pF, 400 V, 100 kHz',
        input: { capacitance: 100e-12, voltage: 400, frequency: 100e3 },
        figures: line([['P', 'W', 1]], ['1.6']),
      },
    ],
  }),
]
