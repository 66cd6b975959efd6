import type { JunctionCapacitance } from '../../src/domain/calibrated-rectifier.ts'
import { capacitiveCharge, capacitiveEnergy, chargingCost } from '../../src/models/junction-capacitance.ts'
import { ringingPeakVoltage } from '../../src/models/peak-reverse-voltage.ts'
import { line, type PublishedRow, published } from './figure.ts'

const law = (zeroBias: number, builtIn: number, grading: number): JunctionCapacitance => ({
  kind: 'law',
  zeroBias,
  builtIn,
  grading,
})

function capacitive(input: { capacitance: JunctionCapacitance; voltage: number }): Readonly<Record<string, number>> {
  const Qc = capacitiveCharge(input)
  const cost = chargingCost(input)
  return { Qc, Ec: capacitiveEnergy(input), cost, 'cost/(Qc V)': cost / (Qc * input.voltage) }
}

const chargeAndEnergy = [
  ['Qc', 'nC', 1e-9],
  ['Ec', 'µJ', 1e-6],
] as const

/** Junction capacitance and the ringing it makes with the loop: P11, P36 and the check tables. */
export const capacitanceRows: readonly PublishedRow[] = [
  published({
    id: 'P11',
    models: ['depletion-law'],
    source: 'Texas Instruments SGLS371A, Eq. 11-12',
    standing: 'read',
    compute: (input: { zeroBias: number; voltage: number; frequency: number }) => ({
      P: input.frequency * capacitiveEnergy({ capacitance: law(input.zeroBias, 1, 0), voltage: input.voltage }),
    }),
    cases: [
      {
        name: '300 pF constant, 12.3 V, 300 kHz',
        input: { zeroBias: 300e-12, voltage: 12.3, frequency: 300e3 },
        figures: line([['P', 'mW', 1e-3]], ['6.8']),
      },
    ],
  }),
  published({
    id: 'P36',
    models: ['depletion-law'],
    source: 'abrupt-junction law, own evaluation',
    standing: 'own',
    compute: capacitive,
    cases: [
      {
        name: '800 pF, 1 V, m 0.5, 400 V',
        input: { capacitance: law(800e-12, 1, 0.5), voltage: 400 },
        figures: line([...chargeAndEnergy, ['cost/(Qc V)', '1', 1]], ['30.44', '4.2517', '0.651']),
      },
    ],
  }),
  published({
    id: 'capacitance',
    models: ['depletion-law'],
    source: 'depletion-layer law, own evaluation verified by quadrature',
    standing: 'own',
    compute: capacitive,
    cases: [
      {
        name: '400 pF, 1.2 V, m 0.46, 100 V',
        input: { capacitance: law(400e-12, 1.2, 0.46), voltage: 100 },
        figures: line([...chargeAndEnergy, ['cost', 'µJ', 1e-6]], ['8.85847', '0.334888', '0.550959']),
      },
      {
        name: '400 pF, 1.2 V, m 0.46, 400 V',
        input: { capacitance: law(400e-12, 1.2, 0.46), voltage: 400 },
        figures: line([...chargeAndEnergy, ['cost', 'µJ', 1e-6]], ['19.6182', '2.86104', '4.98625']),
      },
    ],
  }),
  published({
    id: 'ringing',
    models: ['loop-ringing'],
    source: 'own integration of the undamped loop',
    standing: 'own',
    compute: (input: Parameters<typeof ringingPeakVoltage>[0]) => ({ peak: ringingPeakVoltage(input) }),
    cases: [
      {
        name: '48 V, 12 nH, 800 pF/0.8 V/0.46, 8 ns',
        input: {
          voltage: 48,
          voltageFall: 8e-9,
          loopInductance: 12e-9,
          capacitance: law(800e-12, 0.8, 0.46),
          parts: 1,
        },
        figures: line([['peak', 'V', 1]], ['69']),
      },
      {
        name: '400 V, 20 nH, 400 pF/1.2 V/0.46, 15 ns',
        input: {
          voltage: 400,
          voltageFall: 15e-9,
          loopInductance: 20e-9,
          capacitance: law(400e-12, 1.2, 0.46),
          parts: 1,
        },
        figures: line([['peak', 'V', 1]], ['546']),
      },
    ],
  }),
]
