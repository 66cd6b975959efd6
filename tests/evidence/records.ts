import { celsiusZero } from '../../src/domain/constants.ts'
import type {
  ForwardRow,
  LeakageRow,
  RampRow,
  RectifierClass,
  RectifierRecord,
  RowPlace,
  StepRow,
} from '../../src/domain/rectifier.ts'

/** Kelvin from degrees Celsius, for readable test figures. */
export function kelvin(celsius: number): number {
  return celsius + celsiusZero
}

function place(name: string): RowPlace {
  return { name, file: 'test.yaml', line: 1, column: 1 }
}

const rowDefaults = { grade: 'typical', spread: null, source: null, junction: kelvin(25) } as const

/** A record with nothing in it but what is handed in: 8 A, 600 V. */
export function record(fields: Partial<RectifierRecord> & { readonly class?: RectifierClass } = {}): RectifierRecord {
  return {
    id: 'test-part',
    class: 'ultrafast',
    title: null,
    origin: null,
    place: place('record'),
    ratings: { reverseVoltage: 600, averageCurrent: 8, junction: kelvin(175) },
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
    ...fields,
  }
}

/** A typical ramp row at 8 A, 100 A/µs, 400 V, 25 °C without figures. */
export function rampRow(fields: Partial<RampRow> = {}): RampRow {
  return {
    fixture: 'ramp',
    place: place('recovery row 1'),
    ...rowDefaults,
    current: 8,
    slope: 100e6,
    voltage: 400,
    recoveryTime: null,
    recoveryTimeBy: { kind: 'line-90-25' },
    charge: null,
    peakReverseCurrent: null,
    softness: null,
    softnessBy: 'times',
    ...fields,
  }
}

export function stepRow(fields: Partial<StepRow> = {}): StepRow {
  return {
    fixture: 'step',
    place: place('recovery row 1'),
    ...rowDefaults,
    current: 0.5,
    reverse: 1,
    until: 0.25,
    recoveryTime: null,
    storageTime: null,
    ...fields,
  }
}

export function forwardRow(fields: Partial<ForwardRow> = {}): ForwardRow {
  return { place: place('forward row 1'), ...rowDefaults, current: 8, drop: 1.3, ...fields }
}

export function leakageRow(fields: Partial<LeakageRow> = {}): LeakageRow {
  return { place: place('leakage row 1'), ...rowDefaults, voltage: 600, current: 1e-6, ...fields }
}

export { place }
