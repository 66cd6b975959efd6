import { describe, expect, it } from 'vitest'
import type { RectifierClass, RectifierRecord } from '../../src/domain/rectifier.ts'
import type { Cooling, Stage, StageKind } from '../../src/domain/stage.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { type SeededStream, seededStream } from '../../src/numerics/seeded-stream.ts'
import { ambientForJunction, lowestSettledJunction } from '../../src/stage/ambient-for-junction.ts'
import { blockingVoltageOf, createKernel } from '../../src/stage/create-kernel.ts'
import { type Kernel, rowCount } from '../../src/stage/kernel.ts'
import { holdStart, settle, settleFromHeld } from '../../src/stage/thermal-balance.ts'

/** Draws from stated ranges. */
function chooser(stream: SeededStream) {
  return {
    between: (low: number, high: number) => low + (high - low) * stream.uniform(),
    scaled: (low: number, high: number) => low * (high / low) ** stream.uniform(),
    one: <T>(values: readonly T[]): T => values[stream.below(values.length)]!,
  }
}
type Chooser = ReturnType<typeof chooser>

const classes: readonly RectifierClass[] = [
  ...(['soft-ultrafast', 'ultrafast', 'fast', 'standard'] as const),
  ...(['schottky', 'sic-schottky', 'body-diode'] as const),
]

function randomRecord({ between, scaled, one }: Chooser): RectifierRecord {
  const rectifierClass = one(classes)
  const synchronous = rectifierClass === 'body-diode'
  return {
    id: 'random',
    class: rectifierClass,
    title: null,
    origin: null,
    place: { name: 'random', file: 'random', line: 1, column: 1 },
    ratings: { reverseVoltage: 600, averageCurrent: scaled(2, 30), junction: 448.15 },
    thermal: one([
      { kind: 'case' as const, junctionToCase: between(0.5, 3), caseToSink: 0.5 },
      { kind: 'ambient' as const, junctionToAmbient: between(10, 40), mounting: null },
    ]),
    price: null,
    forward: [],
    forwardLine: null,
    recovery: [],
    leakage: [],
    capacitance: one([null, { kind: 'law' as const, zeroBias: 300e-12, builtIn: 1.2, grading: 0.46 }]),
    forwardRecovery: one([null, { peak: 5, time: 200e-9, slope: 1e8 }]),
    deadTime: synchronous ? { before: 50e-9, after: 80e-9 } : null,
    channel: synchronous ? { onResistance: scaled(5e-3, 50e-3), perKelvin: 0.006 } : null,
  }
}

/** Input and output voltages of each kind. */
const voltages: Readonly<Record<StageKind, readonly [number, number, number, number]>> = {
  boost: [20, 60, 80, 300],
  buck: [30, 400, 5, 25],
  inverting: [20, 60, 20, 200],
  'mains-boost': [100, 240, 380, 420],
}

function randomStage(choice: Chooser, record: RectifierRecord): Stage {
  const { between, scaled, one } = choice
  const kind = one(['boost', 'boost', 'buck', 'inverting', 'mains-boost'] as const)
  const [lowest, highest, low, high] = voltages[kind]
  const voltage = between(lowest, highest)
  return {
    kind,
    title: null,
    input:
      kind === 'mains-boost' ? { kind: 'mains', voltage, lineFrequency: 50, tolerance: 0.1 } : { kind: 'dc', voltage },
    output: {
      voltage: between(low, high),
      current: record.ratings.averageCurrent * between(0.03, 0.6),
      capacitance: null,
      bleeder: null,
    },
    frequency: scaled(2e4, 2e5),
    inductor: { inductance: scaled(20e-6, 1e-3), resistance: scaled(5e-3, 50e-3), coreLoss: 1 },
    switch: {
      onResistance: scaled(5e-3, 80e-3),
      onResistancePerKelvin: 0.006,
      slope: { kind: 'given', slope: scaled(1e8, 1e9) },
      voltageFall: one([0, 1e-8, 3e-8]),
      turnOff: one([null, { kind: 'times' as const, voltageRise: 15e-9, currentFall: 12e-9 }]),
      storedEnergy: 4e-6,
      turnOn: null,
      thermal: one([null, { junctionToSink: between(0.5, 1.5), junctionLimit: null }]),
    },
    loopInductance: one([null, 12e-9]),
    snubberCapacitance: 0,
    cooling: randomCooling(choice, record.thermal!.kind === 'ambient'),
    limits: { junction: 398.15, voltageUse: 0.8 },
    spread: { slope: 0, voltageFall: 0, thermal: 0 },
    fixedLosses: 0,
    dutyProfile: null,
    candidates: null,
    incumbent: null,
    parallel: { parts: one([1, 1, 1, 2]), imbalance: 0.1 },
    assumed: [],
  }
}

function randomCooling({ between, scaled, one }: Chooser, inAir: boolean): Cooling {
  const ambientTemperature = between(290, 330)
  if (inAir) return { kind: 'ambient', ambientTemperature }
  const sink = { kind: 'sink' as const, ambientTemperature, sinkToAmbient: scaled(0.5, 8), shared: one([true, false]) }
  return one<Cooling>([sink, sink, { kind: 'case', caseTemperature: between(310, 380) }])
}

function randomKernel(choice: Chooser): Kernel {
  const record = randomRecord(choice)
  const stage = randomStage(choice, record)
  const { rectifier } = calibrate({ record, blockingVoltage: blockingVoltageOf(stage) })
  return createKernel({ stage, record, rectifier })
}

/** Junction and ledger of the lowest root by the bracketed search alone; null where there is none. */
function settledSlowly(kernel: Kernel): { readonly junction: number; readonly rows: Float64Array } | null {
  const junction = lowestSettledJunction(kernel)
  if (junction === null) return null
  ambientForJunction(kernel, junction)
  return { junction, rows: kernel.rows.slice() }
}

/** Both routes stop at 1e-6 K of the heat balance, which a part close to running away multiplies. */
function compare(kernel: Kernel, solve: (kernel: Kernel) => boolean): boolean {
  const slow = settledSlowly(kernel)
  const settled = solve(kernel)
  expect(settled).toBe(slow !== null)
  if (slow === null) return false
  expect(Math.abs(kernel.temperatures[0]! - slow.junction)).toBeLessThan(3e-5)
  let total = 0
  for (let k = 0; k < rowCount - 1; k++) total += slow.rows[k]!
  for (let k = 0; k < rowCount - 1; k++) {
    expect(Math.abs(kernel.rows[k]! - slow.rows[k]!)).toBeLessThan(1e-6 * slow.rows[k]! + 1e-9 * total)
  }
  return true
}

describe('the fast route to the settled temperature', () => {
  it('finds the root of the bracketed search, from the surroundings, on 300 random stages', () => {
    const choice = chooser(seededStream(11, 'settling'))
    let settled = 0
    for (let world = 0; world < 300; world++) if (compare(randomKernel(choice), settle)) settled++
    // Both outcomes are in the sample.
    expect(settled).toBeGreaterThan(120)
    expect(settled).toBeLessThan(280)
  })

  it('finds it from a held neighbour, also where the neighbour lies beyond the edge of stability', () => {
    const choice = chooser(seededStream(12, 'held'))
    let settled = 0
    for (let world = 0; world < 150; world++) {
      const kernel = randomKernel(choice)
      if (!settle(kernel)) continue
      holdStart(kernel)
      for (const hotter of [0.5, 0.9, 1.2, 1.6]) {
        kernel.thermal.factor = hotter
        kernel.slopeFactor = 1.5 - 0.4 * hotter
        kernel.coefficients[14]! += Math.log(hotter)
        if (compare(kernel, settleFromHeld)) settled++
      }
    }
    expect(settled).toBeGreaterThan(200)
  })

  it('depends on the case alone, not on what was solved before', () => {
    const kernel = randomKernel(chooser(seededStream(3, 'alone')))
    expect(settle(kernel)).toBe(true)
    holdStart(kernel)
    settleFromHeld(kernel)
    const rows = kernel.rows.slice()
    kernel.thermal.factor = 0.7
    settleFromHeld(kernel)
    settle(kernel)
    kernel.thermal.factor = 1
    settleFromHeld(kernel)
    expect(kernel.rows).toEqual(rows)
  })
})
