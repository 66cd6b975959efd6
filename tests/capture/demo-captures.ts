import type { Waveform } from '../../src/domain/capture.ts'
import { digitised, filtered, rampCapture, rampTruth, stepCourse, stepTruth } from './synthetic.ts'

/**
 * The invented captures of catalogs-demo/captures, with their truth. Every file there is written by
 * make-demo-captures.ts from this list; a test compares the files with it.
 */
export interface DemoCapture {
  readonly name: string
  /** File name to text. */
  readonly files: Readonly<Record<string, string>>
  /** What a perfect reduction would find; null where nothing can be found. */
  readonly truth: Readonly<Record<string, number>> | null
  /** Codes of the warnings that the capture is made for. */
  readonly warnings: readonly string[]
}

const unit3 = { current: 8, slope: 200e6, lifetime: 95e-9, tailTime: 42e-9, voltage: 390, voltageFall: 30e-9 }
const unit5 = { current: 10, slope: 150e6, lifetime: 210e-9, tailTime: 60e-9, voltage: 160, voltageFall: 24e-9 }
const medlar = { current: 0.012, reverse: 0.01, lifetime: 180e-9, tailTime: 55e-9 }

const bench = {
  seed: 11,
  samplesPerRecovery: 300,
  bandwidth: 150e6,
  noise: 0.004,
  offset: 0.006,
  bits: 10,
  before: 150e-9,
  after: 400e-9,
}

const settingsHead = '# yaml-language-server: $schema=../../schemas/capture.schema.json\n'

/** All demo captures. */
export function demoCaptures(): readonly DemoCapture[] {
  return [clean(), noisy(), ringing(), skewed(), stacked(), step(), schottky()]
}

function clean(): DemoCapture {
  const wave = rampCapture(unit3, bench)
  return {
    name: 'clean',
    truth: rampTruth(unit3),
    warnings: [],
    files: {
      'clean.yaml': `${settingsHead}# A well-kept double-pulse bench: coaxial shunt, deskewed probes, stated bandwidth.
capture: ramp
file: clean.csv
columns:
  time: {column: time, unit: ns}
  current: {column: shunt, unit: mV, across: 50 mohm}
  voltage: {column: reverse, unit: V}
bandwidth: 150 MHz
device: {id: bench-unit-3, junction: 25 degC}
`,
      'clean.csv': table({
        head: ['orchard bench,double pulse', 'record 1', '', 'time,shunt,reverse', '(ns),(mV),(V)'],
        columns: [timesOf(wave, 1e-9, 2), scaled(wave.current, 50, 2), scaled(wave.voltage!, 1, 1)],
        delimiter: ',',
      }),
    },
  }
}

function noisy(): DemoCapture {
  const wave = rampCapture(unit3, { ...bench, seed: 12, noise: 0.012, bits: 8, samplesPerRecovery: 220 })
  return {
    name: 'noisy',
    truth: rampTruth(unit3),
    warnings: [],
    files: {
      'noisy.yaml': `${settingsHead}# The same part on a noisy 8-bit oscilloscope that exports decimal commas.
capture: ramp
file: noisy.csv
columns:
  time: {column: 1, unit: us}
  current: {column: 2, unit: A}
  voltage: {column: 3, unit: V}
bandwidth: 150 MHz
device: {id: bench-unit-3, junction: 25 degC}
`,
      'noisy.csv': table({
        head: ['Zeit;Strom;Sperrspannung', 'us;A;V'],
        columns: [timesOf(wave, 1e-6, 6), scaled(wave.current, 1, 3), scaled(wave.voltage!, 1, 1)],
        delimiter: ';',
        comma: true,
      }),
    },
  }
}

function ringing(): DemoCapture {
  const { timeToPeak, peakReverseCurrent } = rampTruth(unit3)
  const ring = (time: number) =>
    time < timeToPeak
      ? 0
      : 0.12 *
        peakReverseCurrent *
        Math.exp(-(time - timeToPeak) / 70e-9) *
        Math.sin(2 * Math.PI * 38e6 * (time - timeToPeak))
  const wave = rampCapture(unit3, { ...bench, seed: 13 }, (course) => (time) => course(time) + ring(time))
  return {
    name: 'ringing',
    truth: rampTruth(unit3),
    warnings: ['ringing'],
    files: {
      'ringing.yaml': `${settingsHead}# A long ground lead: the tail rings at 38 MHz.
capture: ramp
file: ringing.csv
columns:
  time: {column: 1, unit: ns}
  current: {column: 2, unit: A}
  voltage: {column: 3, unit: V}
bandwidth: 150 MHz
device: {id: bench-unit-3, junction: 25 degC}
`,
      'ringing.csv': table({
        head: ['time/ns\ti/A\tvr/V'],
        columns: [timesOf(wave, 1e-9, 2), scaled(wave.current, 1, 3), scaled(wave.voltage!, 1, 1)],
        delimiter: '\t',
      }),
    },
  }
}

function skewed(): DemoCapture {
  const wave = rampCapture(
    unit5,
    { ...bench, seed: 14, before: 300e-9, after: 500e-9 },
    undefined,
    (course) => (time) => course(time - 9e-9),
  )
  return {
    name: 'skewed',
    truth: rampTruth(unit5),
    warnings: ['skew'],
    files: {
      'skewed.yaml': `${settingsHead}# The voltage probe is 9 ns slower than the shunt; current_delay: -9 ns puts it right.
capture: ramp
file: skewed.csv
columns:
  time: {column: 1, unit: s}
  current: {column: 2, unit: A, invert: true}
  voltage: {column: 3, unit: V}
bandwidth: 150 MHz
# current_delay: -9 ns
device: {id: bench-unit-5, junction: 25 degC}
`,
      'skewed.csv': table({
        head: ['t,ch1,ch2'],
        columns: [timesOf(wave, 1, 12, true), scaled(wave.current, -1, 3), scaled(wave.voltage!, 1, 1)],
        delimiter: ',',
      }),
    },
  }
}

/** Three sweeps one under the other, no time column: the mean of all has less noise than each. */
function stacked(): DemoCapture {
  const sweeps = [21, 22, 23].map((seed) =>
    rampCapture(unit3, { ...bench, seed, noise: 0.012, samplesPerRecovery: 200 }),
  )
  const interval = sweeps[0]!.interval
  const parts = sweeps.map((wave, k) =>
    table({
      head: [`sweep ${k + 1}`, 'i (A);v (V)'],
      columns: [scaled(wave.current, 1, 3), scaled(wave.voltage!, 1, 1)],
      delimiter: ';',
    }),
  )
  return {
    name: 'stacked',
    truth: rampTruth(unit3),
    warnings: [],
    files: {
      'stacked.yaml': `${settingsHead}# Three sweeps stacked in one file without a time column, averaged.
capture: ramp
file: stacked.csv
interval: ${(interval * 1e9).toPrecision(8)} ns
columns:
  current: {column: i (A), unit: A}
  voltage: {column: v (V), unit: V}
segment: average
bandwidth: 150 MHz
device: {id: bench-unit-3, junction: 25 degC}
`,
      'stacked.csv': parts.join(''),
    },
  }
}

function step(): DemoCapture {
  const truth = stepTruth(medlar)
  const edge = 3e-9
  const grid = { start: -120e-9, interval: 0.5e-9, count: 1400 }
  const current = digitised(filtered(stepCourse(medlar, edge), 150e6, grid), { ...bench, seed: 15 }, 'current')
  return {
    name: 'step',
    truth,
    warnings: [],
    files: {
      'step.yaml': `${settingsHead}# Resistor-limited reversal in a 50 ohm pulse fixture: 12 mA forward, 10 mA reverse.
capture: step
file: step.csv
columns:
  time: {column: 1, unit: ns}
  current: {column: 2, unit: mV, across: 50 ohm}
bandwidth: 150 MHz
device: {id: medlar-fixture-alone, junction: 25 degC}
`,
      'step.csv': table({
        head: ['pulse fixture', 'ns,mV'],
        columns: [times(grid, 1e-9, 1), scaled(current, 50_000, 2)],
        delimiter: ',',
      }),
    },
  }
}

/** A Schottky part stores no charge: what flows back is the fixture's edge and the part's capacitance. */
function schottky(): DemoCapture {
  const grid = { start: -40e-9, interval: 0.2e-9, count: 900 }
  const edge = 2.5e-9
  const course = (time: number) => {
    if (time < -edge) return 0.012
    if (time < 0) return (-0.012 * time) / edge
    if (time < 0.35 * edge) return (-0.012 * time) / edge
    return -0.0042 * Math.exp(-(time - 0.35 * edge) / 2.2e-9)
  }
  const short = (time: number) => (time < -edge ? 0.012 : time < edge ? (-0.012 * time) / edge : -0.012)
  const read = (of: (time: number) => number, seed: number) =>
    digitised(filtered(of, 300e6, grid), { ...bench, seed }, 'current')
  const file = (current: Float64Array) =>
    table({ head: ['ns;mV'], columns: [times(grid, 1e-9, 1), scaled(current, 50_000, 2)], delimiter: ';' })
  return {
    name: 'schottky',
    truth: null,
    warnings: [],
    files: {
      'schottky.yaml': `${settingsHead}# A Schottky part in the pulse fixture, with the fixture's own edge for comparison: no charge can be told.
capture: step
file: schottky.csv
columns:
  time: {column: 1, unit: ns}
  current: {column: 2, unit: mV, across: 50 ohm}
bandwidth: 300 MHz
reference: short.csv
device: {id: bench-schottky, junction: 25 degC}
`,
      'schottky.csv': file(read(course, 16)),
      'short.csv': file(read(short, 17)),
    },
  }
}

interface TableText {
  readonly head: readonly string[]
  readonly columns: readonly (readonly string[])[]
  readonly delimiter: string
  readonly comma?: boolean
}

function table({ head, columns, delimiter, comma }: TableText): string {
  const rows = columns[0]!.map((_, k) =>
    columns.map((column) => (comma === true ? column[k]!.replace('.', ',') : column[k]!)).join(delimiter),
  )
  return `${[...head, ...rows].join('\n')}\n`
}

function scaled(values: Float64Array, factor: number, digits: number): readonly string[] {
  return Array.from(values, (value) => (value * factor).toFixed(digits))
}

function timesOf(wave: Waveform, unit: number, digits: number, exponent = false): readonly string[] {
  return times({ start: wave.start, interval: wave.interval, count: wave.current.length }, unit, digits, exponent)
}

function times(
  grid: { readonly start: number; readonly interval: number; readonly count: number },
  unit: number,
  digits: number,
  exponent = false,
): readonly string[] {
  return Array.from({ length: grid.count }, (_, k) => {
    const value = (grid.start + k * grid.interval) / unit
    return exponent ? value.toExponential(7) : value.toFixed(digits)
  })
}
