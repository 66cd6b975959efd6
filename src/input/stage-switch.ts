import type { MeasuredTurnOn, SlopeSource, Stage, TurnOff } from '../domain/stage.ts'
import { assume, group, has, quantity, quantityOr, required, type Section, text } from './section.ts'

/** The switch; an empty section is one of which nothing is known. */
export function switchFrom(section: Section): Stage['switch'] {
  return {
    onResistance: quantityOr(section, 'on_resistance', 'resistance', 'not-negative', '50 mohm'),
    onResistancePerKelvin: quantityOr(section, 'on_resistance_per_kelvin', 'per_kelvin', 'any', '0.6 %/K'),
    slope: slopeFrom(section),
    voltageFall: quantityOr(section, 'voltage_fall', 'time', 'not-negative', '20 ns'),
    turnOff: has(section, 'turn_off') ? turnOffFrom(group(section, 'turn_off')) : null,
    storedEnergy: quantity(section, 'stored_energy', 'energy', 'not-negative') ?? 0,
    turnOn: has(section, 'turn_on') ? turnOnFrom(group(section, 'turn_on')) : null,
    thermal: has(section, 'thermal') ? thermalFrom(group(section, 'thermal')) : null,
  }
}

function slopeFrom(section: Section): SlopeSource {
  const stated = quantity(section, 'slope', 'slope', 'positive')
  if (has(section, 'gate')) return gateFrom(group(section, 'gate'))
  return {
    kind: 'given',
    slope: has(section, 'slope') ? (stated ?? Number.NaN) : assume(section, 'slope', 'slope', '300 A/us'),
  }
}

function gateFrom(gate: Section): SlopeSource {
  return {
    kind: 'gate',
    drive: required(gate, 'drive', 'voltage', 'not-negative'),
    resistance: required(gate, 'resistance', 'resistance', 'not-negative'),
    inputCapacitance: required(gate, 'input_capacitance', 'capacitance', 'not-negative'),
    transconductance: required(gate, 'transconductance', 'transconductance', 'not-negative'),
    threshold: required(gate, 'threshold', 'voltage', 'not-negative'),
    plateau: quantity(gate, 'plateau', 'voltage', 'not-negative'),
    sourceInductance: quantityOr(gate, 'source_inductance', 'inductance', 'not-negative', '0 nH'),
  }
}

function turnOffFrom(section: Section): TurnOff {
  const voltageRise = required(section, 'voltage_rise', 'time', 'not-negative')
  const currentFall = required(section, 'current_fall', 'time', 'not-negative')
  const energy = quantity(section, 'energy', 'energy', 'not-negative')
  return energy === null ? { kind: 'times', voltageRise, currentFall } : { kind: 'energy', energy }
}

function turnOnFrom(section: Section): MeasuredTurnOn {
  const stated = text(section, 'includes_rectifier')
  if (stated === null) section.reader.assumed.push({ path: 'switch.turn_on.includes_rectifier', value: 'unknown' })
  return {
    energy: required(section, 'energy', 'energy', 'not-negative'),
    current: required(section, 'current', 'current', 'positive'),
    voltage: required(section, 'voltage', 'voltage', 'positive'),
    includesRectifier: (stated ?? 'unknown') as MeasuredTurnOn['includesRectifier'],
    rectifier: text(section, 'rectifier'),
  }
}

function thermalFrom(section: Section): Stage['switch']['thermal'] {
  return {
    junctionToSink: required(section, 'junction_to_sink', 'thermal_resistance', 'positive'),
    junctionLimit: quantity(section, 'junction_limit', 'temperature', 'any'),
  }
}

/** A stage of which neither slope nor fall time nor on-resistance is known is a first estimate, with its wide band. */
export function spreadFrom(root: Section): Stage['spread'] {
  const known = group(root, 'switch')
  const firstEstimate = !['slope', 'gate', 'voltage_fall', 'on_resistance'].some((key) => has(known, key))
  const usual = firstEstimate ? '50 %' : '25 %'
  const spread = group(root, 'spread')
  const share = (key: string, otherwise: string) =>
    has(spread, key) ? required(spread, key, 'share', 'not-negative') : assume(spread, key, 'share', otherwise)
  return { slope: share('slope', usual), voltageFall: share('voltage_fall', usual), thermal: share('thermal', '10 %') }
}
