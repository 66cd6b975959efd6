import fc from 'fast-check'
import type { RectifierClass, RectifierRecord } from '../../src/domain/rectifier.ts'
import type { Cooling, SlopeSource, Stage } from '../../src/domain/stage.ts'
import { forwardRow, leakageRow, rampRow, stepRow } from '../evidence/records.ts'
import { between, kelvin, stage } from '../stage/samples.ts'

/** A figure over decades, as evenly in its logarithm as people's choices are. */
function decades(low: number, high: number): fc.Arbitrary<number> {
  return between(Math.log(low), Math.log(high)).map(Math.exp)
}

const classes: readonly RectifierClass[] = [
  'standard',
  'fast',
  'ultrafast',
  'soft-ultrafast',
  'body-diode',
  'schottky',
  'sic-schottky',
]

/** Records from nothing but a class to several rows, over three decades of size. */
export function anyRecord(id: string): fc.Arbitrary<RectifierRecord> {
  return fc
    .record({
      kind: fc.constantFrom(...classes),
      current: decades(1, 60),
      voltage: decades(100, 1200),
      rows: fc.integer({ min: 0, max: 3 }),
      charge: decades(0.3, 3),
      synchronous: fc.boolean(),
      extras: fc.boolean(),
      mounting: fc.constantFrom('case', 'ambient', 'none'),
    })
    .map(({ kind, current, voltage, rows, charge, synchronous, extras, mounting }) => {
      const ramp = rampRow({ current, charge: charge * 10e-9 * current, recoveryTime: 40e-9 * charge })
      const hot = rampRow({ current, charge: charge * 20e-9 * current, junction: kelvin(125), grade: 'maximum' })
      const recovery = [ramp, stepRow({ recoveryTime: 30e-9 * charge }), hot].slice(0, rows)
      return {
        ...record(id, kind, current, voltage),
        thermal:
          mounting === 'none'
            ? null
            : mounting === 'case'
              ? { kind: 'case', junctionToCase: 1.5, caseToSink: null }
              : { kind: 'ambient', junctionToAmbient: 20, mounting: null },
        recovery: kind.endsWith('schottky') ? [] : recovery,
        forward: rows > 0 ? [forwardRow({ current, drop: 1.1 })] : [],
        leakage: rows > 1 ? [leakageRow({ voltage, current: 1e-6 * current })] : [],
        capacitance: rows > 0 ? { kind: 'charge', charge: 1e-9 * current, voltage: voltage / 2 } : null,
        forwardRecovery: extras ? { peak: 5, time: 80e-9, slope: 200e6 } : null,
        deadTime: synchronous && kind === 'body-diode' ? { before: 40e-9, after: 30e-9 } : null,
        channel: synchronous && kind === 'body-diode' ? { onResistance: 0.01, perKelvin: 0.006 } : null,
      }
    })
}

function record(id: string, kind: RectifierClass, current: number, voltage: number): RectifierRecord {
  return {
    id,
    class: kind,
    title: null,
    origin: null,
    place: { name: 'record', file: 'test.yaml', line: 1, column: 1 },
    ratings: { reverseVoltage: voltage, averageCurrent: current, junction: kelvin(150) },
    thermal: null,
    price: null,
    forward: [],
    forwardLine: null,
    recovery: [],
    leakage: [],
    capacitance: null,
    forwardRecovery: null,
    deadTime: null,
    channel: null,
  }
}

const slopes: fc.Arbitrary<SlopeSource> = fc.oneof(
  decades(20e6, 5e9).map((slope) => ({ kind: 'given' as const, slope })),
  fc.record({
    kind: fc.constant('gate' as const),
    drive: between(4, 15),
    resistance: decades(1, 50),
    inputCapacitance: decades(0.3e-9, 10e-9),
    transconductance: decades(1, 60),
    threshold: fc.constant(3.5),
    plateau: fc.constantFrom(null, 3.9),
    sourceInductance: fc.constantFrom(0, 5e-9),
  }),
)

const coolings: fc.Arbitrary<Cooling> = fc.oneof(
  between(-20, 110).map((celsius) => ({ kind: 'case' as const, caseTemperature: kelvin(celsius) })),
  fc.record({
    kind: fc.constant('sink' as const),
    ambientTemperature: between(-20, 70).map(kelvin),
    sinkToAmbient: decades(0.2, 20),
    shared: fc.boolean(),
  }),
  between(-20, 70).map((celsius) => ({ kind: 'ambient' as const, ambientTemperature: kelvin(celsius) })),
)

/** Stages of all kinds over three decades of power and frequency, both modes, with and without their optional parts. */
export const anyStage: fc.Arbitrary<Stage> = fc
  .record({
    kind: fc.constantFrom('buck' as const, 'boost' as const, 'inverting' as const, 'mains-boost' as const),
    low: decades(5, 250),
    step: between(1.1, 6),
    current: decades(0.02, 20),
    frequency: decades(10e3, 1e6),
    ripple: decades(0.05, 8),
    resistance: decades(1e-3, 0.2),
    slope: slopes,
    fall: fc.constantFrom(0, 15e-9, 80e-9),
    loop: fc.constantFrom(null, 0, 3e-9, 40e-9),
    cooling: coolings,
    parts: fc.integer({ min: 1, max: 3 }),
    meaning: fc.constantFrom(null, 'yes' as const, 'no' as const, 'unknown' as const),
    thermal: fc.boolean(),
    profile: fc.boolean(),
  })
  .map((d) => {
    const [vin, vout] = voltagesOf(d.kind, d.low, d.step)
    const inductance = (vin * 0.5) / (d.frequency * 2 * d.current * Math.max(vout / vin, 1) * d.ripple)
    return stage({
      kind: d.kind,
      frequency: d.frequency,
      input:
        d.kind === 'mains-boost'
          ? { kind: 'mains', voltage: vin, lineFrequency: 50, tolerance: 0.1 }
          : { kind: 'dc', voltage: vin },
      output: { voltage: vout, current: d.current },
      inductor: { inductance, resistance: d.resistance, coreLoss: 0.5 },
      switch: {
        onResistance: d.resistance,
        slope: d.slope,
        voltageFall: d.fall,
        turnOff: d.profile ? { kind: 'energy', energy: 5e-6 } : null,
        thermal: d.thermal ? { junctionToSink: 0.8, junctionLimit: null } : null,
        turnOn:
          d.meaning === null
            ? null
            : {
                energy: 50e-6,
                current: 5,
                voltage: vout,
                includesRectifier: d.meaning,
                rectifier: d.profile ? 'a' : null,
              },
      },
      loopInductance: d.loop,
      snubberCapacitance: d.profile ? 100e-12 : 0,
      cooling: d.cooling,
      parallel: { parts: d.parts, imbalance: d.parts > 1 ? 0.1 : 0 },
      dutyProfile: d.profile
        ? [
            { load: 1, hours: 1000, ambient: null, input: null },
            { load: 0, hours: 3000, ambient: null, input: null },
          ]
        : null,
    })
  })

function voltagesOf(kind: Stage['kind'], low: number, step: number): readonly [number, number] {
  if (kind === 'buck') return [low * step, low]
  if (kind === 'mains-boost') return [low, low * 1.1 * Math.SQRT2 * (1 + step / 20)]
  return [low, low * step]
}
