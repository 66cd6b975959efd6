import { recoveredCharge, timeToPeak } from '../../src/models/charge-control.ts'
import { baseEnergy, rectifierEnergy, switchAddedEnergy, tailShare } from '../../src/models/commutation-energy.ts'
import { conventionEnergies } from '../../src/models/energy-conventions.ts'
import { triangleFromTime } from '../../src/models/triangle.ts'
import { type TriangularTailInput, triangularTailEnergies } from '../../src/models/triangular-tail.ts'
import { averagedBoost } from './averaged-boost.ts'
import { line, type PublishedRow, published } from './figure.ts'

interface Event {
  readonly current: number
  readonly slope: number
  readonly lifetime: number
  readonly tailTime: number
  readonly voltage: number
  readonly voltageFall: number
}

function ledger(event: Event): Readonly<Record<string, number>> {
  const time = timeToPeak({ ...event, storedCharge: event.current * event.lifetime })
  const peakReverseCurrent = event.slope * time
  const input = { ...event, timeToPeak: time, peakReverseCurrent, tailShare: tailShare(event) }
  const E_rectifier = rectifierEnergy(input)
  const E_switch_added = switchAddedEnergy(input)
  const whole = event.voltage * (recoveredCharge(input) + event.current * time)
  return { E_rectifier, E_switch_added, E_base: baseEnergy(event), identity: (E_rectifier + E_switch_added) / whole }
}

function ledgerCase(event: Event, printed: readonly string[]) {
  const { current, slope, lifetime, tailTime, voltage, voltageFall } = event
  const columns = [
    ['E_rectifier', 'µJ', 1e-6],
    ['E_switch_added', 'µJ', 1e-6],
    ['E_base', 'µJ', 1e-6],
    ['identity', '1', 1],
  ] as const
  const si = { current, voltage, slope: slope * 1e6, lifetime: lifetime * 1e-9, tailTime: tailTime * 1e-9 }
  const input = { ...si, voltageFall: voltageFall * 1e-9 }
  const name = `${current} A, ${slope} A/µs, ${lifetime}/${tailTime} ns, ${voltage} V, t_fv ${voltageFall} ns`
  return { name, input, figures: line(columns, [...printed, '1.00000000000']) }
}

/** The conventions for one triangular event, by name. */
function conventions(event: { voltage: number; current: number; peak: number; slope: number; softness: number }) {
  const { voltage, current, peak, slope, softness } = event
  const shape = triangleFromTime({ recoveryTime: (peak / slope) * (1 + softness), slope, softness })
  const all = conventionEnergies({ voltage, current, ...shape })
  return Object.fromEntries(all.map(({ name, energy }) => [name, energy]))
}

function whoIsHeated(input: TriangularTailInput): Readonly<Record<string, number>> {
  const { rectifier, switch: heated } = triangularTailEnergies(input)
  return { E_D: rectifier, E_Q: heated, sum: rectifier + heated }
}

/** Areas of linear overlap: 1/2 from the base energy, 1/3 and 1/6 from the triangular tail at I = 0. */
function overlaps(): Readonly<Record<string, number>> {
  const square = baseEnergy({ voltage: 1, current: 1, slope: 1, voltageFall: 0 })
  const tail = triangularTailEnergies({ voltage: 1, current: 0, slope: 1, peakReverseCurrent: 1, softness: 1 })
  return { 'one moves': square, 'both move alike': tail.switch - 0.5, 'both move against': tail.rectifier }
}

const example = { voltage: 400, current: 6, peak: 8, slope: 200e6, softness: 0.5 }

/** Where the energy of a turn-on goes: P05, P26, P30 to P32 and the check tables of ledger and conventions. */
export const energyRows: readonly PublishedRow[] = [
  published({
    id: 'ledger',
    models: ['linear-fall-ledger', 'haaf-harper-overlap', 'lauritzen-ma-1991'],
    source: 'own integration of v i over the event; verified against an ODE',
    standing: 'own',
    compute: ledger,
    cases: [
      ledgerCase({ current: 8, slope: 200, lifetime: 60, tailTime: 20, voltage: 400, voltageFall: 15 }, [
        '30.2552',
        '127.661',
        '88.0',
      ]),
      ledgerCase({ current: 12, slope: 350, lifetime: 63.5, tailTime: 18.6, voltage: 120, voltageFall: 18 }, [
        '14.0582',
        '64.8922',
        '37.6457',
      ]),
      ledgerCase({ current: 5, slope: 100, lifetime: 200, tailTime: 50, voltage: 48, voltageFall: 10 }, [
        '14.3622',
        '27.7931',
        '7.2',
      ]),
    ],
  }),
  published({
    id: 'conventions',
    models: ['loss-conventions'],
    source: 'common practice and the sources named beside each convention; values own',
    standing: 'from memory',
    compute: conventions,
    cases: [
      {
        name: '400 V, I_RM 8 A, 200 A/µs, S 0.5, 6 A',
        input: example,
        figures: line(
          ['V Qrr', 'V Qrr/2', 'V I_RM tb/2', 'V Qrr/4', 'V I_RM tb/6', 'V (Qrr + I trr)'].map(
            (name) => [name, 'µJ', 1e-6] as const,
          ),
          ['96', '48', '32', '24', '10.7', '240'],
        ),
      },
    ],
  }),
  published({
    id: 'P05',
    models: ['loss-conventions'],
    source: 'Texas Instruments SLUS593H, Eq. 58',
    standing: 'read',
    compute: ({ charge, voltage, frequency }: { charge: number; voltage: number; frequency: number }) => {
      const event = { voltage, charge, current: 0, peakReverseCurrent: 0, timeToPeak: 0, recoveryTime: 0 }
      const half = conventionEnergies(event).find(({ name }) => name === 'V Qrr/2')
      return { P: half!.energy * frequency }
    },
    cases: [
      {
        name: '30 nC, 24 V, 300 kHz',
        input: { charge: 30e-9, voltage: 24, frequency: 300e3 },
        figures: line([['P', 'W', 1]], ['0.108']),
      },
    ],
  }),
  published({
    id: 'P26 recovery',
    models: ['mohan-triangle', 'loss-conventions'],
    source: 'ROHM 64AN035E, 2021 (for the formula); print recalled',
    standing: 'from memory',
    compute: (input: { peak: number; time: number; voltage: number; frequency: number }) => ({
      P:
        input.voltage *
        input.frequency *
        triangleFromTime({ recoveryTime: input.time, slope: (2 * input.peak) / input.time, softness: 1 }).charge,
    }),
    cases: [
      {
        name: '12 V, 0.3 A, 25 ns, 1 MHz',
        input: { peak: 0.3, time: 25e-9, voltage: 12, frequency: 1e6 },
        figures: line([['P', 'mW', 1e-3]], ['45']),
      },
    ],
  }),
  published({
    id: 'P30',
    models: [],
    source:
      'exercise of R. W. Erickson & D. Maksimovic, boost with recovered charge, averaged: stands beside the engine, whose charge does not raise the currents',
    standing: 'read',
    compute: averagedBoost,
    cases: [
      {
        name: 'D 0.25',
        input: { duty: 0.25 },
        figures: line(
          [
            ['Vo', 'V', 1],
            ['P', 'W', 1],
          ],
          ['30.822', '23.90'],
        ),
      },
      {
        name: 'D 0.5',
        input: { duty: 0.5 },
        figures: line(
          [
            ['Vo', 'V', 1],
            ['I', 'A', 1],
            ['P', 'W', 1],
            ['efficiency', '%', 0.01],
          ],
          ['45.143', '3.005', '35.89', '47.10'],
        ),
      },
      {
        name: 'D 0.75',
        input: { duty: 0.75 },
        figures: line(
          [
            ['Vo', 'V', 1],
            ['P', 'W', 1],
          ],
          ['82.544', '72.44'],
        ),
      },
    ],
  }),
  published({
    id: 'P31',
    models: ['triangular-tail'],
    source: 'STMicroelectronics notes on fast diodes; sum by own identity',
    standing: 'from memory',
    compute: whoIsHeated,
    cases: [
      {
        name: '400 V, 8 A, 200 A/µs, S 0.5, 6 A',
        input: { voltage: 400, current: 6, slope: 200e6, peakReverseCurrent: 8, softness: 0.5 },
        figures: line(
          [
            ['E_D', 'µJ', 1e-6],
            ['E_Q', 'µJ', 1e-6],
            ['sum', 'µJ', 1e-6],
          ],
          ['10.667', '205.33', '216.0'],
        ),
      },
    ],
  }),
  published({
    id: 'P32',
    models: ['haaf-harper-overlap', 'triangular-tail'],
    source: 'P. Haaf & J. Harper, power seminar, Fig. II-1',
    standing: 'read',
    compute: overlaps,
    cases: [
      {
        name: 'share of V I t',
        input: undefined,
        figures: line(
          [
            ['one moves', '1', 1],
            ['both move alike', '1', 1],
            ['both move against', '1', 1],
          ],
          ['0.500000', '0.333333', '0.166667'],
        ),
      },
    ],
  }),
]
