import type { RecoveryTimeDefinition } from '../../src/domain/rectifier.ts'
import { chargeAtTurnOff, type RampInput, rampRecovery, recoveryTimeFactor } from '../../src/models/charge-control.ts'
import { type ResidualRecoveryInput, residualRecovery } from '../../src/models/residual-recovery.ts'
import { line, type PublishedRow, published } from './figure.ts'

const ramp =
  'P. O. Lauritzen & C. L. Ma, IEEE Trans. Power Electronics 6(2), 1991; ramp equations from memory, verified against an ODE'

/** Data-sheet numbers: A, A/µs, ns. */
interface Steady {
  readonly current: number
  readonly slope: number
  readonly lifetime: number
  readonly tailTime: number
}

function si(input: Steady): Omit<RampInput, 'storedCharge'> {
  return {
    current: input.current,
    slope: input.slope * 1e6,
    lifetime: input.lifetime * 1e-9,
    tailTime: input.tailTime * 1e-9,
  }
}

function steadyEvent(input: Steady): Readonly<Record<string, number>> {
  const start = si(input)
  const event = rampRecovery({ ...start, storedCharge: start.current * start.lifetime })
  const k = recoveryTimeFactor({ definition: { kind: 'line-90-25' }, peakReverseCurrent: event.peakReverseCurrent })
  const trr = event.timeToPeak + k * start.tailTime
  return {
    I_RM: event.peakReverseCurrent,
    ta: event.timeToPeak,
    trr,
    Qrr: event.charge,
    S: (trr - event.timeToPeak) / event.timeToPeak,
    'tau I / Qrr': (start.current * start.lifetime) / event.charge,
  }
}

interface Interval extends Steady {
  readonly peakCurrent: number
  readonly conductionTime: number
}

function intervalEvent(input: Interval): Readonly<Record<string, number>> {
  const start = si(input)
  const { peakCurrent, conductionTime } = input
  const storedCharge = chargeAtTurnOff({
    peakCurrent,
    conductionTime,
    current: start.current,
    lifetime: start.lifetime,
  })
  const event = rampRecovery({ ...start, storedCharge })
  // power of V Qrr at 400 V and 65 kHz, where the current at turn-off is 0
  return { q0: storedCharge, I_RM: event.peakReverseCurrent, Qrr: event.charge, P: 400 * 65e3 * event.charge }
}

function residue(idleTime: number): Readonly<Record<string, number>> {
  const [slopeOfDecay, lifetime, tailTime] = [5 / 3e-6, 400e-9, 120e-9]
  const storedChargeAtZero = chargeAtTurnOff({ peakCurrent: 5, current: 0, conductionTime: 3e-6, lifetime })
  const input: ResidualRecoveryInput = { slopeOfDecay, idleTime, slope: 300e6, lifetime, tailTime, storedChargeAtZero }
  return { q_r: residualRecovery(input, { peakReverseCurrent: 0, charge: 0, timeToPeak: 0 }).charge }
}

const steadyColumns = [
  ['I_RM', 'A', 1],
  ['ta', 'ns', 1e-9],
  ['trr', 'ns', 1e-9],
  ['Qrr', 'nC', 1e-9],
  ['S', '1', 1],
] as const
const intervalColumns = [
  ['q0', 'nC', 1e-9],
  ['I_RM', 'A', 1],
  ['Qrr', 'nC', 1e-9],
] as const

function steadyCase(current: number, slope: number, lifetime: number, tailTime: number, printed: readonly string[]) {
  const name = `${current} A, ${slope} A/µs, ${lifetime}/${tailTime} ns`
  return { name, input: { current, slope, lifetime, tailTime }, figures: line(steadyColumns, printed) }
}

function intervalCase(
  [peakCurrent, current, conductionTime]: readonly [number, number, number],
  [slope, lifetime, tailTime]: readonly [number, number, number],
  printed: readonly string[],
) {
  const name = `${peakCurrent} to ${current} A in ${conductionTime * 1e9} ns, ${slope} A/µs, ${lifetime}/${tailTime} ns`
  const input = { peakCurrent, current, conductionTime, slope, lifetime, tailTime }
  return { name, input, figures: line(intervalColumns, printed) }
}

function residueCase(idleNanoseconds: number, printed: string) {
  const figures = [{ quantity: 'q_r', unit: 'nC', scale: 1e-9, printed }]
  return { name: `idle ${idleNanoseconds} ns`, input: idleNanoseconds * 1e-9, figures }
}

function factorCase(definition: RecoveryTimeDefinition, printed: string) {
  return { name: definition.kind, input: definition, figures: [{ quantity: 'k', unit: '1', scale: 1, printed }] }
}

/** The recovery event: what P29 stands for. */
export const recoveryRows: readonly PublishedRow[] = [
  published({
    id: 'P29 steady',
    models: ['lauritzen-ma-1991'],
    source: ramp,
    standing: 'own',
    compute: steadyEvent,
    cases: [
      steadyCase(8, 200, 60, 20, ['5.37575', '26.8787', '64.4580', '179.762', '1.39810']),
      steadyCase(1, 50, 150, 30, ['1.95256', '39.0512', '95.4200', '96.7016', '1.44346']),
      steadyCase(20, 500, 400, 120, ['32.1146', '64.2293', '289.705', '4885.11', '3.51048']),
      steadyCase(0.5, 100, 25, 5, ['0.820820', '8.20820', '17.6030', '7.47283', '1.14456']),
    ],
  }),
  published({
    id: 'P29 interval',
    models: ['lauritzen-ma-1991', 'lauritzen-ma-1991-conduction'],
    source: ramp,
    standing: 'own',
    compute: intervalEvent,
    cases: [
      intervalCase([16, 8, 4e-6], [200, 60, 20], ['487.20', '5.40923', '181.334']),
      intervalCase([6, 1, 2e-6], [300, 2000, 500], ['3906.7', '5.71581', '2912.36']),
      intervalCase([5, 0, 3e-6], [300, 400, 120], ['265.41', '1.50694', '184.617']),
      intervalCase([9, 8, 40e-9], [200, 60, 20], ['246.55', '4.15166', '126.124']),
      intervalCase([8, 8, 20e-9], [200, 60, 20], ['136.06', '3.44541', '98.5853']),
      {
        name: 'near boundary: 2.5 A to 0 in 10 µs, 300 A/µs, 3000/800 ns, 400 V, 65 kHz',
        input: { peakCurrent: 2.5, current: 0, conductionTime: 10e-6, slope: 300, lifetime: 3000, tailTime: 800 },
        figures: [
          { quantity: 'Qrr', unit: 'µC', scale: 1e-6, printed: '1.39' },
          { quantity: 'P', unit: 'W', scale: 1, printed: '36' },
        ],
      },
    ],
  }),
  published({
    id: 'P29 residue',
    models: ['lauritzen-ma-1991-residue'],
    source: `${ramp}; extension to an idle time own`,
    standing: 'own',
    compute: residue,
    cases: [
      residueCase(0, '184.6'),
      residueCase(139.7, '120.56'),
      residueCase(279.3, '55.89'),
      residueCase(399.3, '20.56'),
      residueCase(639.3, '2.783'),
    ],
  }),
  published({
    id: 'P29 trr',
    models: ['iec-60747-2'],
    source: 'definitions of IEC 60747-2 on an exponential tail',
    standing: 'own',
    compute: (definition: RecoveryTimeDefinition) => ({
      k: recoveryTimeFactor({ definition, peakReverseCurrent: 4 }),
    }),
    cases: [
      factorCase({ kind: 'line-90-25' }, '1.87896'),
      factorCase({ kind: 'line-75-50' }, '1.50408'),
      factorCase({ kind: 'level-25' }, '1.38629'),
      factorCase({ kind: 'level-10' }, '2.30259'),
      factorCase({ kind: 'level', until: 1 }, '1.38629'),
      factorCase({ kind: 'unknown' }, '1.87896'),
    ],
  }),
]
