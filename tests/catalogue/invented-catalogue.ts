import { seededStream } from '../../src/numerics/seeded-stream.ts'

/** Header of the table; catalogs-demo/catalogue/mapping.yaml says what each column is. */
const header = [
  'part,kind,VR [V],IF [A],Tj max [degC],VF 25 [V],VF 125 [V],trr 25 [ns],Qrr 125 [nC],I_RM 125 [A]',
  'IR 125 max [uA],C at 10 V [pF],Rth JC [K/W],price',
].join(',')

interface Kind {
  readonly word: string
  readonly voltages: readonly number[]
  readonly junction: number
  /** Forward voltage at rated current, cold, of a 200 V part. [V] */
  readonly drop: number
  /** Lifetime of a 200 V part, hot. [ns] 0: no stored charge. */
  readonly lifetime: number
  /** Hot leakage per ampere of rating. [µA/A] */
  readonly leakage: number
  /** Capacitance at 10 V per ampere of rating. [pF/A] */
  readonly capacitance: number
}

const kinds: readonly Kind[] = [
  {
    word: 'UF',
    voltages: [150, 200, 300, 400, 600],
    junction: 175,
    drop: 1.0,
    lifetime: 16,
    leakage: 12,
    capacitance: 4,
  },
  { word: 'SU', voltages: [200, 300, 600], junction: 175, drop: 1.08, lifetime: 13, leakage: 10, capacitance: 4 },
  { word: 'FR', voltages: [200, 400, 600, 800], junction: 150, drop: 0.92, lifetime: 90, leakage: 8, capacitance: 3 },
  { word: 'SB', voltages: [60, 100, 150, 200], junction: 150, drop: 0.8, lifetime: 0, leakage: 1500, capacitance: 13 },
  { word: 'SC', voltages: [650, 1200], junction: 175, drop: 1.45, lifetime: 0, leakage: 20, capacitance: 30 },
]
const currents = [2, 3, 5, 6, 8, 10, 12, 16, 20, 30]
const shrubs = [
  'ash',
  'bay',
  'box',
  'broom',
  'furze',
  'heath',
  'holly',
  'ivy',
  'larch',
  'myrtle',
  'oak',
  'osier',
  'sloe',
  'yew',
]

/**
 * An invented table of parts, the same for the same seed and count. Figures hang together as in real tables: Qrr, trr
 * and I_RM belong to one lifetime and the slope of 200 A/µs; higher voltages cost lifetime and forward voltage. About one
 * figure in six is missing ("-"), and one row in `badEvery` has a cell that cannot be read.
 */
export function inventedCatalogue(count: number, seed: number, badEvery = 250): string {
  const { uniform, below } = seededStream(seed, 'catalogue')
  const around = (spread: number): number => Math.exp(spread * (uniform() + uniform() + uniform() - 1.5))
  const maybe = (text: string): string => (uniform() < 1 / 6 ? '-' : text)
  const lines = Array.from({ length: count }, (_, index) => {
    const kind = kinds[below(kinds.length)]!
    const voltage = kind.voltages[below(kind.voltages.length)]!
    const current = currents[below(currents.length)]!
    const quality = around(0.5)
    const drop = kind.drop * (voltage / 200) ** 0.12 * quality ** -0.15 * around(0.05)
    const hot = drop - (kind.word === 'SC' ? -0.25 : 0.17)
    const lifetime = kind.lifetime * (voltage / 200) ** 0.8 * quality * around(0.2)
    const peak = 0.2 * lifetime * 0.75
    const charge = lifetime * peak * 0.8
    const bad = (index + 1) % badEvery === 0
    const stores = kind.lifetime > 0
    return [
      `${shrubs[below(shrubs.length)]}-${voltage}v-${current}a-${String(index + 1).padStart(5, '0')}`,
      kind.word,
      voltage,
      current,
      kind.junction,
      bad && index % 2 === 0 ? `"${drop.toFixed(2).replace('.', ',')}"` : drop.toFixed(2),
      maybe(hot.toFixed(2)),
      stores ? maybe(((lifetime * 0.5 + peak / 0.2) * 0.8).toFixed(0)) : '-',
      bad && index % 2 === 1 ? 'on request' : stores ? maybe(charge.toFixed(1)) : '-',
      stores ? maybe(peak.toFixed(2)) : '-',
      maybe((kind.leakage * current * around(1)).toPrecision(3)),
      maybe((kind.capacitance * current * (200 / voltage) ** 0.5 * around(0.3)).toFixed(0)),
      maybe((14 / current ** 0.8 / 1.6).toFixed(2)),
      maybe((0.12 + 0.025 * current * around(0.4)).toFixed(2)),
    ].join(',')
  })
  return `${[header, ...lines].join('\n')}\n`
}
