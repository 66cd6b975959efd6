import { diffusionLifetime } from '../../src/models/diffusion-storage.ts'
import {
  type StepRecoveryInput,
  simplestLifetime,
  simplestStorageTime,
  stepRecoveryTime,
  stepStorageTime,
} from '../../src/models/step-fixture.ts'
import { type TriangleTimeInput, triangleFromTime } from '../../src/models/triangle.ts'
import { type Figure, line, type PublishedRow, published } from './figure.ts'

function triangle(input: TriangleTimeInput): Readonly<Record<string, number>> {
  const { timeToPeak, tailDuration, peakReverseCurrent, charge } = triangleFromTime(input)
  return { ta: timeToPeak, tb: tailDuration, I_RM: peakReverseCurrent, Qrr: charge }
}

const wrongOption = 'the printed option ignores S; recomputed'
/** A triangle known by its height and base: any split of the base gives the same area. */
function area({ trr, peak }: { readonly trr: number; readonly peak: number }): Readonly<Record<string, number>> {
  return { Qrr: triangleFromTime({ recoveryTime: trr, slope: (2 * peak) / trr, softness: 1 }).charge }
}

function areaCase(trr: number, peak: number, printed: string) {
  const absolute = 0.15 * Number(printed)
  const tolerance = { absolute, because: 'a real tail is no triangle: 15 % before a warning' }
  const figures: Figure[] = [{ quantity: 'Qrr', unit: 'nC', scale: 1e-9, printed, tolerance }]
  return { name: `${trr} ns, ${peak} A`, input: { trr: trr * 1e-9, peak }, figures }
}

function step(input: StepRecoveryInput): Readonly<Record<string, number>> {
  return { ts: stepStorageTime(input), trr: stepRecoveryTime(input) }
}

function stepCase(lifetime: number, tailTime: number, forward: number, reverse: number, printed: readonly string[]) {
  const columns = [
    ['ts', 'ns', 1e-9],
    ['trr', 'ns', 1e-9],
  ] as const
  const times = { lifetime: lifetime * 1e-9, tailTime: tailTime * 1e-9 }
  const input = { ...times, forwardCurrent: forward, reverseCurrent: reverse, until: reverse / 4 }
  return { name: `${lifetime}/${tailTime} ns, ${forward}/${reverse} A`, input, figures: line(columns, printed) }
}

/** How far apart the two lifetimes are that one storage time may mean. */
function lifetimeSpread(input: { readonly forwardCurrent: number; readonly reverseCurrent: number }) {
  const row = { ...input, storageTime: 1e-6 }
  return { ratio: diffusionLifetime(row) / simplestLifetime(row) }
}

/** Triangle identities and step fixtures: P01 to P04, P28, P29 step, P41, P42. */
export const triangleRows: readonly PublishedRow[] = [
  published({
    id: 'P01',
    models: ['mohan-triangle'],
    source: 'a power-electronics course quiz with solution, 2016',
    standing: 'read',
    compute: triangle,
    cases: [
      {
        name: '3.9 µs, 50 A/µs, S 0.3',
        input: { recoveryTime: 3.9e-6, slope: 50e6, softness: 0.3 },
        figures: line(
          [
            ['ta', 'µs', 1e-6],
            ['I_RM', 'A', 1],
            ['Qrr', 'µC', 1e-6],
          ],
          ['3', '150', '292.5'],
        ),
      },
    ],
  }),
  published({
    id: 'P02',
    models: ['mohan-triangle'],
    source: 'textbook "Power Diodes and Transistors", Example 1.1 (title page not seen)',
    standing: 'read',
    compute: triangle,
    cases: [
      {
        name: '2.5 µs, 35 A/µs, S 0',
        input: { recoveryTime: 2.5e-6, slope: 35e6, softness: 0 },
        figures: line(
          [
            ['Qrr', 'µC', 1e-6],
            ['I_RM', 'A', 1],
          ],
          ['109.375', '87.5'],
        ),
      },
    ],
  }),
  published({
    id: 'P03',
    models: ['mohan-triangle'],
    source: 'an exercise; low authority',
    standing: 'read',
    compute: triangle,
    cases: [
      {
        name: '5 µs, S 0.5',
        input: { recoveryTime: 5e-6, slope: 1e6, softness: 0.5 },
        figures: line(
          [
            ['ta', 'µs', 1e-6],
            ['tb', 'µs', 1e-6],
          ],
          ['3.33', '1.67'],
        ),
      },
    ],
  }),
  published({
    id: 'P04',
    models: ['mohan-triangle'],
    source: 'an exercise whose printed options are wrong',
    standing: 'read',
    compute: triangle,
    cases: [
      {
        name: '5 µs, 80 A/µs, S 0.5',
        input: { recoveryTime: 5e-6, slope: 80e6, softness: 0.5 },
        figures: [
          { quantity: 'I_RM', unit: 'A', scale: 1, printed: '400', misprint: { right: '266.7', because: wrongOption } },
          {
            quantity: 'Qrr',
            unit: 'µC',
            scale: 1e-6,
            printed: '1000',
            misprint: { right: '666.7', because: wrongOption },
          },
        ],
      },
    ],
  }),
  published({
    id: 'P28',
    models: ['streetman-storage'],
    source: 'solution of B. G. Streetman, Solid State Electronic Devices, problem 5.5; result own',
    standing: 'read',
    compute: (input: { lifetime: number; forwardCurrent: number; reverseCurrent: number }) => ({
      ts: simplestStorageTime(input),
    }),
    cases: [
      {
        name: '167 ns, 10 mA, 20 mA',
        input: { lifetime: 167e-9, forwardCurrent: 10e-3, reverseCurrent: 20e-3 },
        figures: line([['ts', 'ns', 1e-9]], ['67.71']),
      },
    ],
  }),
  published({
    id: 'P29 step',
    models: ['lauritzen-ma-1991-step'],
    source: 'rectifier of P. O. Lauritzen & C. L. Ma, 1991, in a resistor-limited fixture; solution own',
    standing: 'own',
    compute: step,
    cases: [
      stepCase(4000, 400, 0.012, 0.025, ['1146.73', '1701.24']),
      stepCase(150, 20, 0.5, 1, ['39.3546', '67.0805']),
      stepCase(30, 4, 0.5, 1, ['7.87093', '13.4161']),
    ],
  }),
  published({
    id: 'Kingston',
    models: ['kingston-1954', 'streetman-storage'],
    source: 'R. H. Kingston, Proc. IRE 42, 1954; the simplest form beside it',
    standing: 'from memory',
    compute: lifetimeSpread,
    cases: [0.48, 0.5, 1].map((ratio) => ({
      name: `lifetime by diffusion / lumped, I_F/I_R ${ratio}`,
      input: { forwardCurrent: ratio, reverseCurrent: 1 },
      figures: [
        {
          quantity: 'ratio',
          unit: '1',
          scale: 1,
          printed: '3.75',
          tolerance: { absolute: 0.75, because: 'stated as a range, 3 to 4.5' },
        },
      ],
    })),
  }),
  published({
    id: 'P41',
    models: ['mohan-triangle'],
    source: 'temperature ratios 25 to 100 °C of one published fast 1200 V part',
    standing: 'read',
    compute: ({ peak, time }: { peak: number; time: number }) => ({
      'Qrr hot/cold': area({ trr: time, peak }).Qrr! / area({ trr: 1, peak: 1 }).Qrr!,
    }),
    cases: [
      {
        name: 'I_RM ×1.611, trr ×1.857',
        input: { peak: 1.611, time: 1.857 },
        figures: [
          {
            quantity: 'Qrr hot/cold',
            unit: '1',
            scale: 1,
            printed: '2.889',
            tolerance: { absolute: 0.43, because: 'plausibility only: the triangle may be 15 % off' },
          },
        ],
      },
    ],
  }),
  published({
    id: 'P42',
    models: ['mohan-triangle'],
    source: 'three published parts whose sheets print all three figures',
    standing: 'read',
    compute: area,
    cases: [areaCase(70, 18, '630'), areaCase(130, 29, '1820'), areaCase(135, 10, '600')],
  }),
]
