import { forwardDrop, trapezoidConductionPower } from '../../src/models/forward-drop.ts'
import { capacitiveEnergy } from '../../src/models/junction-capacitance.ts'
import { trapezoidMean, trapezoidRms } from '../../src/models/trapezoid.ts'
import { gaussLegendre, integrate } from '../../src/numerics/gauss-legendre.ts'
import { type Figure, line, type PublishedRow, published } from './figure.ts'

/** A straight forward characteristic, V_T0 + r_T i. */
const straight = (threshold: number, resistance: number) =>
  ({ constant: threshold, logarithmic: 0, linear: resistance, ratedCurrent: 1, line: true }) as const

/** Mean conduction power at one constant current, over the whole period. */
export function conduction(input: {
  threshold: number
  resistance: number
  current: number
  share: number
  frequency?: number
}) {
  const { threshold, resistance, current, share } = input
  return { P: share * trapezoidConductionPower({ ...straight(threshold, resistance), valley: current, peak: current }) }
}

const watts = (printed: string): readonly Figure[] => line([['P', 'W', 1]], [printed])
export const milliwatts = (printed: string, tolerance?: Figure['tolerance']): readonly Figure[] => [
  { quantity: 'P', unit: 'mW', scale: 1e-3, printed, ...(tolerance === undefined ? {} : { tolerance }) },
]

/** Half sine from a rectifier of a resonant stage, mean Io/2 per rectifier over the whole period. */
function halfSine({ output }: { output: number }): Readonly<Record<string, number>> {
  const peak = (Math.PI / 2) * output
  const rule = gaussLegendre(32)
  const mean = (f: (current: number) => number) =>
    integrate({ f: (angle) => f(peak * Math.sin(angle)), low: 0, high: Math.PI, rule }) / (2 * Math.PI)
  const drop = (current: number) => forwardDrop({ ...straight(0.28, 0.022), current })
  return { Irms: Math.sqrt(mean((i) => i * i)), P: mean((i) => i * drop(i)) }
}

export const boost = 'Texas Instruments boost data sheet ZHCSIR2, sec. 10.3.4.1'
const buck = 'Texas Instruments SLUS593H'

/** What the rectifier loses while it conducts: P06 to P08, P10, P12, P14, P16 to P20, P26. */
export const conductionRows: readonly PublishedRow[] = [
  published({
    id: 'P06',
    models: ['junction-law'],
    source: `${buck}, design example step 5`,
    standing: 'read',
    compute: conduction,
    cases: [
      {
        name: '8 A, 0.8 V, 2 × 100 ns, 300 kHz',
        input: { threshold: 0.8, resistance: 0, current: 8, share: 2 * 100e-9 * 300e3 },
        figures: watts('0.384'),
      },
    ],
  }),
  published({
    id: 'P07',
    models: ['an604-trapezoid'],
    source: buck,
    standing: 'read',
    compute: ({ current, duty }: { current: number; duty: number }) => ({
      Irms: Math.sqrt(1 - duty) * trapezoidRms({ first: current, last: current }),
    }),
    cases: [{ name: '8 A, D 0.135', input: { current: 8, duty: 0.135 }, figures: line([['Irms', 'A', 1]], ['7.44']) }],
  }),
  published({
    id: 'P08',
    models: ['junction-law'],
    source: buck,
    standing: 'read',
    compute: conduction,
    cases: [
      {
        name: '7.44 A, 8 mΩ, 0.007/K, 125 K',
        input: { threshold: 0, resistance: 8e-3 * (1 + 0.007 * 125), current: 7.44, share: 1 },
        figures: watts('0.83'),
      },
    ],
  }),
  published({
    id: 'P10',
    models: ['junction-law', 'depletion-law'],
    source: 'Texas Instruments SLVSBX7 (2013), Eq. 35',
    standing: 'read',
    compute: (input: {
      vin: number
      vout: number
      drop: number
      current: number
      zeroBias: number
      frequency: number
    }) => {
      const capacitance = { kind: 'law', zeroBias: input.zeroBias, builtIn: 1, grading: 0 } as const
      const share = 1 - input.vout / input.vin
      const stored = capacitiveEnergy({ capacitance, voltage: input.vin + input.drop })
      return {
        P:
          conduction({ threshold: input.drop, resistance: 0, current: input.current, share }).P +
          stored * input.frequency,
      }
    },
    cases: [
      {
        name: '12 to 3.3 V, 5 A, 0.52 V, 300 pF, 400 kHz',
        input: { vin: 12, vout: 3.3, drop: 0.52, current: 5, zeroBias: 300e-12, frequency: 400e3 },
        figures: watts('1.9'),
      },
    ],
  }),
  published({
    id: 'P12',
    models: ['junction-law'],
    source: boost,
    standing: 'read',
    compute: conduction,
    cases: [
      {
        name: '0.45 V, 1.4 A, D 0.623',
        input: { threshold: 0.45, resistance: 0, current: 1.4, share: 1 - 0.623 },
        figures: milliwatts('236', { absolute: 2.4, because: 'rounded inside the source, 1 %' }),
      },
    ],
  }),
  published({
    id: 'P14',
    models: ['junction-law'],
    source: boost,
    standing: 'read',
    compute: conduction,
    cases: [
      {
        name: '1.4 A, D 0.623, 0.25 Ω',
        input: { threshold: 0, resistance: 0.25, current: 1.4, share: 0.623 },
        figures: milliwatts('305'),
      },
    ],
  }),
  published({
    id: 'P16',
    models: ['junction-law'],
    source: 'STMicroelectronics AN604, 2004, p. 2',
    standing: 'read',
    compute: conduction,
    cases: [
      {
        name: '1.15 V, 29 mΩ, 20 A, d 0.5',
        input: { threshold: 1.15, resistance: 29e-3, current: 20, share: 0.5 },
        figures: watts('17.3'),
      },
    ],
  }),
  published({
    id: 'P17, P18',
    models: ['an604-trapezoid'],
    source: 'STMicroelectronics AN604 rev. 3, 2011, Eq. 15',
    standing: 'read',
    compute: ({ first, last, share }: { first: number; last: number; share: number }) => ({
      rms: Math.sqrt(share) * trapezoidRms({ first, last }),
      mean: share * trapezoidMean({ first, last }),
    }),
    cases: [
      {
        name: '11.8 to 4 A, d 0.6',
        input: { first: 11.8, last: 4, share: 0.6 },
        figures: line(
          [
            ['rms', 'A', 1],
            ['mean', 'A', 1],
          ],
          ['6.4', '4.7'],
        ),
      },
    ],
  }),
  published({
    id: 'P19',
    models: ['junction-law'],
    source: 'STMicroelectronics AN604 rev. 3, 2011: table of maxima; line through two of them own',
    standing: 'read',
    compute: ({ threshold, resistance, current }: { threshold: number; resistance: number; current: number }) => ({
      V_F: forwardDrop({ ...straight(threshold, resistance), current }),
    }),
    cases: [
      {
        name: '4 A, 25 °C',
        input: { threshold: 0.4636, resistance: 14.1e-3, current: 4 },
        figures: line([['V_F', 'V', 1]], ['0.52']),
      },
      {
        name: '11.8 A, 25 °C',
        input: { threshold: 0.4636, resistance: 14.1e-3, current: 11.8 },
        figures: line([['V_F', 'V', 1]], ['0.63']),
      },
      {
        name: '4 A, 125 °C',
        input: { threshold: 0.3685, resistance: 15.38e-3, current: 4 },
        figures: line([['V_F', 'V', 1]], ['0.43']),
      },
      {
        name: '11.8 A, 125 °C',
        input: { threshold: 0.3685, resistance: 15.38e-3, current: 11.8 },
        figures: line([['V_F', 'V', 1]], ['0.55']),
      },
    ],
  }),
  published({
    id: 'P20',
    models: ['junction-law'],
    source: 'STMicroelectronics AN3303, Eq. 4-8; here by quadrature over the half sine',
    standing: 'read',
    compute: halfSine,
    cases: [
      {
        name: '0.28 V, 22 mΩ, 12.5 A',
        input: { output: 12.5 },
        figures: line(
          [
            ['Irms', 'A', 1],
            ['P', 'W', 1],
          ],
          ['9.82', '3.87'],
        ),
      },
    ],
  }),
  published({
    id: 'P26 dead time',
    models: ['junction-law'],
    source: 'ROHM 64AN035E, 2021 (for the formula); print recalled',
    standing: 'from memory',
    compute: conduction,
    cases: [
      {
        name: '0.5 V, 3 A, 30 + 30 ns, 1 MHz',
        input: { threshold: 0.5, resistance: 0, current: 3, share: 60e-9 * 1e6 },
        figures: milliwatts('90'),
      },
    ],
  }),
]
