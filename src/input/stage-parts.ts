import type { Cooling, DutyPoint, Stage, StageInput } from '../domain/stage.ts'
import { assume, group, has, plainNumber, quantity, quantityOr, required, rows, type Section, text } from './section.ts'

export function inputFrom(root: Section): StageInput {
  const input = group(root, 'input')
  if (text(root, 'stage') !== 'mains-boost') {
    return { kind: 'dc', voltage: required(input, 'voltage', 'voltage', 'positive') }
  }
  return {
    kind: 'mains',
    voltage: required(input, 'mains', 'voltage', 'positive'),
    lineFrequency: quantityOr(input, 'line', 'frequency', 'positive', '50 Hz'),
    tolerance: quantityOr(input, 'tolerance', 'share', 'not-negative', '10 %'),
  }
}

export function outputFrom(output: Section): Stage['output'] {
  const voltage = required(output, 'voltage', 'voltage', 'positive')
  const power = quantity(output, 'power', 'power', 'positive')
  const current = required(output, 'current', 'current', 'positive')
  return {
    voltage,
    current: power === null ? current : power / voltage,
    capacitance: quantity(output, 'capacitance', 'capacitance', 'not-negative'),
    bleeder: quantity(output, 'bleeder', 'resistance', 'not-negative'),
  }
}

/** The switch shares the sink by default where its own path to the sink is known. */
export function coolingFrom(cooling: Section, switchHasThermal: boolean): Cooling {
  const caseTemperature = quantity(cooling, 'case', 'temperature', 'any')
  const ambientTemperature = required(cooling, 'ambient', 'temperature', 'any')
  const sinkToAmbient = quantity(cooling, 'sink_to_ambient', 'thermal_resistance', 'positive')
  if (caseTemperature !== null) return { kind: 'case', caseTemperature }
  if (sinkToAmbient === null) return { kind: 'ambient', ambientTemperature }
  if (!has(cooling, 'shared')) {
    cooling.reader.assumed.push({ path: 'cooling.shared', value: String(switchHasThermal) })
  }
  const shared = has(cooling, 'shared') ? cooling.data.shared === true : switchHasThermal
  return { kind: 'sink', ambientTemperature, sinkToAmbient, shared }
}

export function limitsFrom(limits: Section): Stage['limits'] {
  return {
    junction: quantity(limits, 'junction', 'temperature', 'any'),
    voltageUse: quantityOr(limits, 'voltage_use', 'share', 'not-negative', '80 %'),
  }
}

export function dutyProfileFrom(root: Section): readonly DutyPoint[] | null {
  if (!Array.isArray(root.data.duty_profile)) return null
  return rows(root, 'duty_profile').map((row) => ({
    load: required(row, 'load', 'share', 'not-negative'),
    hours: required(row, 'hours', 'hours', 'not-negative'),
    ambient: quantity(row, 'ambient', 'temperature', 'any'),
    input: quantity(row, 'input', 'voltage', 'positive'),
  }))
}

/** Without a stated imbalance the parts are not taken to share evenly. */
export function parallelFrom(root: Section): Stage['parallel'] {
  if (!has(root, 'parallel')) return { parts: 1, imbalance: 0 }
  const parallel = group(root, 'parallel')
  const parts = plainNumber(parallel, 'parts') ?? Number.NaN
  const stated = quantity(parallel, 'imbalance', 'share', 'not-negative')
  if (stated !== null) return { parts, imbalance: stated }
  return {
    parts,
    imbalance: parts > 1 && !has(parallel, 'imbalance') ? assume(parallel, 'imbalance', 'share', '10 %') : 0,
  }
}
