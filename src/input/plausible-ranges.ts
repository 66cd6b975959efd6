import { parseQuantity } from './units/parse-quantity.ts'
import type { QuantityKindName } from './units/quantity-kinds.ts'
import type { Path } from './yaml/path.ts'

type Range = readonly [QuantityKindName, low: string, high: string]

/**
 * What is usual, by the last two keys of a path. Judgement from common practice, no source: wide enough that a
 * warning nearly always means a slip of a prefix. Zero is never warned about.
 */
const ranges: Readonly<Record<string, Range>> = {
  'input.voltage': ['voltage', '1 V', '2 kV'],
  'input.mains': ['voltage', '50 V', '700 V'],
  'input.line': ['frequency', '15 Hz', '1 kHz'],
  'output.voltage': ['voltage', '0.5 V', '5 kV'],
  'output.current': ['current', '1 mA', '2 kA'],
  'output.power': ['power', '10 mW', '1000 kW'],
  'output.capacitance': ['capacitance', '10 nF', '1 F'],
  frequency: ['frequency', '1 kHz', '10 MHz'],
  'inductor.inductance': ['inductance', '10 nH', '1 H'],
  'inductor.resistance': ['resistance', '1 uohm', '100 ohm'],
  'switch.on_resistance': ['resistance', '0.1 mohm', '20 ohm'],
  'switch.slope': ['slope', '1 A/us', '20 A/ns'],
  'switch.voltage_fall': ['time', '0.1 ns', '10 us'],
  'turn_off.voltage_rise': ['time', '0.1 ns', '10 us'],
  'turn_off.current_fall': ['time', '0.1 ns', '10 us'],
  'turn_off.energy': ['energy', '1 nJ', '1 J'],
  'turn_on.energy': ['energy', '1 nJ', '1 J'],
  'switch.stored_energy': ['energy', '0.1 nJ', '10 mJ'],
  loop_inductance: ['inductance', '0.1 nH', '1 uH'],
  'snubber.capacitance': ['capacitance', '1 pF', '1 uF'],
  'cooling.ambient': ['temperature', '-60 degC', '150 degC'],
  'cooling.case': ['temperature', '-60 degC', '200 degC'],
  'cooling.sink_to_ambient': ['thermal_resistance', '5 mK/W', '100 K/W'],
  'limits.junction': ['temperature', '50 degC', '300 degC'],
  'limits.voltage_use': ['share', '10 %', '100 %'],
  'ratings.reverse_voltage': ['voltage', '5 V', '20 kV'],
  'ratings.average_current': ['current', '1 mA', '5 kA'],
  'ratings.junction': ['temperature', '75 degC', '350 degC'],
  'thermal.junction_to_case': ['thermal_resistance', '5 mK/W', '100 K/W'],
  'thermal.junction_to_sink': ['thermal_resistance', '5 mK/W', '100 K/W'],
  'thermal.case_to_sink': ['thermal_resistance', '1 mK/W', '50 K/W'],
  'thermal.junction_to_ambient': ['thermal_resistance', '1 K/W', '1000 K/W'],
  'forward.drop': ['voltage', '50 mV', '20 V'],
  'forward.junction': ['temperature', '-70 degC', '350 degC'],
  'forward_line.threshold': ['voltage', '50 mV', '20 V'],
  'forward_line.resistance': ['resistance', '10 uohm', '50 ohm'],
  'recovery.current': ['current', '0.1 mA', '10 kA'],
  'recovery.slope': ['slope', '0.1 A/us', '50 A/ns'],
  'recovery.voltage': ['voltage', '1 V', '20 kV'],
  'recovery.trr': ['time', '0.5 ns', '100 us'],
  'recovery.qrr': ['charge', '0.1 nC', '100 mC'],
  'recovery.irrm': ['current', '0.1 mA', '10 kA'],
  'recovery.storage': ['time', '0.1 ns', '100 us'],
  'recovery.junction': ['temperature', '-70 degC', '350 degC'],
  'leakage.current': ['current', '1 pA', '5 A'],
  'leakage.junction': ['temperature', '-70 degC', '350 degC'],
  'capacitance.zero_bias': ['capacitance', '0.1 pF', '1 uF'],
  'capacitance.built_in': ['voltage', '0.1 V', '5 V'],
  'points.capacitance': ['capacitance', '0.1 pF', '1 uF'],
  'capacitance.charge': ['charge', '1 pC', '100 uC'],
  'forward_recovery.peak': ['voltage', '0.2 V', '500 V'],
  'forward_recovery.time': ['time', '0.1 ns', '100 us'],
  'duty_profile.load': ['share', '0.01 %', '150 %'],
  'duty_profile.hours': ['hours', '1 s', '8784 h'],
  'duty_profile.ambient': ['temperature', '-60 degC', '150 degC'],
}

interface Bounds {
  readonly low: number
  readonly high: number
  readonly sentence: string
}

/** By parent, then by key; null where nothing is known. Filled as values come: a catalogue asks a million times. */
const known = new Map<string, Map<string, Bounds | null>>()

/** Why a value is unusual there, or null: "values from 10 nH to 1 H are usual". */
export function unusualBecause(path: Path, key: string, value: number): string | null {
  if (value === 0) return null
  const bounds = boundsOf(parentOf(path), key)
  if (bounds === null || (value >= bounds.low && value <= bounds.high)) return null
  return bounds.sentence
}

/** The key that a path ends in, positions in lists left out. */
function parentOf(path: Path): string {
  const last = path[path.length - 1]
  const parent = typeof last === 'number' ? path[path.length - 2] : last
  return typeof parent === 'string' ? parent : ''
}

function boundsOf(parent: string, key: string): Bounds | null {
  let inside = known.get(parent)
  if (inside === undefined) {
    inside = new Map()
    known.set(parent, inside)
  }
  let bounds = inside.get(key)
  if (bounds === undefined) {
    bounds = makeBounds(parent === '' ? key : `${parent}.${key}`)
    inside.set(key, bounds)
  }
  return bounds
}

function makeBounds(name: string): Bounds | null {
  const range = ranges[name]
  if (range === undefined) return null
  const [kind, lowText, highText] = range
  const [low, high] = [lowText, highText].map((text) => Number(parseQuantity(text, { kind, sign: 'any' })))
  // The ends themselves are usual, however their last digit rounds.
  return {
    low: low! * (1 - 1e-9),
    high: high! * (1 + 1e-9),
    sentence: `values from ${lowText} to ${highText} are usual`,
  }
}
