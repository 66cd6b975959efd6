import fc from 'fast-check'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { Cooling, Stage } from '../../src/domain/stage.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { blockingVoltageOf, createKernel } from '../../src/stage/create-kernel.ts'
import { evaluate } from '../../src/stage/evaluate.ts'
import type { Kernel } from '../../src/stage/kernel.ts'
import { forwardRow, kelvin, leakageRow, place, rampRow, record } from '../evidence/records.ts'

export { kelvin }

type StageFields = Partial<Omit<Stage, 'input' | 'output' | 'inductor' | 'switch'>> & {
  readonly input?: Partial<Stage['input']>
  readonly output?: Partial<Stage['output']>
  readonly inductor?: Partial<Stage['inductor']>
  readonly switch?: Partial<Stage['switch']>
}

const plainSwitch: Stage['switch'] = {
  onResistance: 0.03,
  onResistancePerKelvin: 0.006,
  slope: { kind: 'given', slope: 200e6 },
  voltageFall: 15e-9,
  turnOff: { kind: 'times', voltageRise: 12e-9, currentFall: 10e-9 },
  storedEnergy: 2e-6,
  turnOn: null,
  thermal: { junctionToSink: 0.8, junctionLimit: kelvin(150) },
}

/** A dc boost of 250 V to 400 V, 1 kW, on one sink at 40 °C; or what the fields make of it. */
export function stage(fields: StageFields = {}): Stage {
  const { input, output, inductor, switch: part, ...rest } = fields
  return {
    kind: 'boost',
    title: null,
    frequency: 100e3,
    loopInductance: 8e-9,
    snubberCapacitance: 0,
    cooling: { kind: 'sink', ambientTemperature: kelvin(40), sinkToAmbient: 1, shared: true },
    limits: { junction: kelvin(150), voltageUse: 0.8 },
    spread: { slope: 0.25, voltageFall: 0.25, thermal: 0.1 },
    fixedLosses: 3,
    dutyProfile: null,
    candidates: null,
    incumbent: null,
    parallel: { parts: 1, imbalance: 0 },
    assumed: [],
    ...rest,
    input: { kind: 'dc', voltage: 250, ...input } as Stage['input'],
    output: { voltage: 400, current: 2.5, capacitance: null, bleeder: null, ...output },
    inductor: { inductance: 500e-6, resistance: 0.05, coreLoss: 2, ...inductor },
    switch: { ...plainSwitch, ...part },
  }
}

/** The line-fed boost of 230 V to 400 V, 1 kW. */
export function mainsStage(fields: StageFields = {}): Stage {
  return stage({
    kind: 'mains-boost',
    frequency: 65e3,
    ...fields,
    input: { kind: 'mains', voltage: 230, lineFrequency: 50, tolerance: 0.1, ...fields.input } as Stage['input'],
  })
}

/** An 8 A, 600 V part that stores charge, with one row of each kind. */
export function silicon(fields: Partial<RectifierRecord> = {}): RectifierRecord {
  return record({
    id: 'silicon',
    thermal: { kind: 'case', junctionToCase: 1.8, caseToSink: 0.5 },
    forward: [
      forwardRow({ current: 8, drop: 1.6 }),
      forwardRow({ current: 8, drop: 1.3, junction: kelvin(125), place: place('forward row 2') }),
    ],
    recovery: [
      rampRow({ slope: 200e6, recoveryTime: 40e-9, charge: 90e-9, peakReverseCurrent: 3.9 }),
      rampRow({
        slope: 200e6,
        charge: 190e-9,
        peakReverseCurrent: 5.8,
        junction: kelvin(125),
        place: place('recovery row 2'),
      }),
    ],
    leakage: [leakageRow({ voltage: 600, current: 40e-6, junction: kelvin(125) })],
    capacitance: { kind: 'law', zeroBias: 150e-12, builtIn: 0.8, grading: 0.45 },
    ...fields,
  })
}

/** A silicon-carbide part whose forward characteristic is a given line. */
export function carbide(fields: Partial<RectifierRecord> = {}): RectifierRecord {
  return record({
    id: 'carbide',
    class: 'sic-schottky',
    thermal: { kind: 'case', junctionToCase: 1.5, caseToSink: 0.5 },
    forwardLine: {
      place: place('forward line'),
      threshold: 0.9,
      resistance: 0.08,
      thresholdPerKelvin: -1e-3,
      resistancePerKelvin: 4e-4,
      junction: kelvin(25),
      grade: 'typical',
      spread: null,
      source: null,
    },
    leakage: [leakageRow({ voltage: 600, current: 20e-6, junction: kelvin(125) })],
    capacitance: { kind: 'law', zeroBias: 400e-12, builtIn: 1.2, grading: 0.46 },
    ...fields,
  })
}

/** The kernel of a part in a stage, calibrated for the voltage it blocks there. */
export function kernelOf(at: Stage, part: RectifierRecord): Kernel {
  const { rectifier } = calibrate({ record: part, blockingVoltage: blockingVoltageOf(at) })
  return createKernel({ stage: at, record: part, rectifier })
}

/** Its ledger with every junction held at a temperature; null where the stage cannot deliver. [K] */
export function ledgerAt(kernel: Kernel, junction: number): Kernel | null {
  kernel.temperatures.fill(junction)
  evaluate(kernel)
  return kernel.delivers ? kernel : null
}

/** Every number inside a value, with its path. */
export function numbersIn(value: unknown, path = ''): (readonly [string, number])[] {
  if (typeof value === 'number') return [[path, value]]
  if (value === null || typeof value !== 'object') return []
  return Object.entries(value).flatMap(([key, inner]) => numbersIn(inner, `${path}.${key}`))
}

/** A figure in a range, in steps of a thousandth of it: nobody types 4e-323 s. */
export function between(low: number, high: number): fc.Arbitrary<number> {
  return fc.integer({ min: 0, max: 1000 }).map((k) => low + ((high - low) * k) / 1000)
}

/** A gate drive whose slope is worked out by hand where it is used. */
export const gateDrive = {
  kind: 'gate',
  drive: 12,
  resistance: 20,
  inputCapacitance: 2e-9,
  transconductance: 15,
  threshold: 3.5,
  plateau: null,
  sourceInductance: 1e-9,
} as const

export const sink = (shared: boolean, resistance = 1): Cooling => ({
  kind: 'sink',
  ambientTemperature: kelvin(40),
  sinkToAmbient: resistance,
  shared,
})

/** Hot part without a sink. */
export const onAir = silicon({ thermal: { kind: 'ambient', junctionToAmbient: 9, mounting: null } })

/** So much leakage at 600 V and 125 °C. */
export const leaky = (milliamps: number): RectifierRecord =>
  carbide({ leakage: [leakageRow({ voltage: 600, current: milliamps * 1e-3, junction: kelvin(125) })] })
