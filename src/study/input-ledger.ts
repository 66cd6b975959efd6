import { celsiusZero } from '../domain/constants.ts'
import type { ForwardLine, ForwardRow, LeakageRow, RecoveryRow, RectifierRecord } from '../domain/rectifier.ts'
import type { LedgerEntry } from '../domain/review.ts'
import type { Stage } from '../domain/stage.ts'

type Figure = readonly [path: string, value: number | string | null, unit: string]

/** Inputs that may be left out, with the value that leaves their effect out; who states just that changes nothing. */
const neutral: Readonly<Record<string, number>> = {
  'inductor.core_loss': 0,
  'snubber.capacitance': 0,
  fixed_losses: 0,
  'parallel.parts': 1,
  'switch.turn_off.energy': 0,
  'switch.stored_energy': 0,
}

/** Every input of the stage with its value, unit and whether it was given or took its default. */
export function stageLedger(stage: Stage): LedgerEntry[] {
  const assumed = new Set(stage.assumed.map(({ path }) => path))
  const origin = (path: string, value: number | string): string => {
    if ([...assumed].some((each) => each === path || path.startsWith(`${each}.`))) return 'default'
    return neutral[path] === value ? `not given, taken as ${value}` : 'given'
  }
  return [...stageFigures(stage), ...switchFigures(stage), ...coolingFigures(stage)]
    .filter((figure): figure is readonly [string, number | string, string] => figure[1] !== null)
    .map(([path, value, unit]) => ({
      subject: 'stage',
      path,
      value,
      unit,
      origin: origin(path, value),
      grade: null,
      source: null,
      place: '',
    }))
}

function stageFigures(stage: Stage): Figure[] {
  const { input, output, inductor, spread, limits, parallel } = stage
  const mains = input.kind === 'mains'
  return [
    ['stage', stage.kind, ''],
    [mains ? 'input.mains' : 'input.voltage', input.voltage, 'V'],
    ['input.line', mains ? input.lineFrequency : null, 'Hz'],
    ['input.tolerance', mains ? input.tolerance : null, '1'],
    ['output.voltage', output.voltage, 'V'],
    ['output.current', output.current, 'A'],
    ['output.capacitance', output.capacitance, 'F'],
    ['output.bleeder', output.bleeder, 'ohm'],
    ['frequency', stage.frequency, 'Hz'],
    ['inductor.inductance', inductor.inductance, 'H'],
    ['inductor.resistance', inductor.resistance, 'ohm'],
    ['inductor.core_loss', inductor.coreLoss, 'W'],
    ['loop_inductance', stage.loopInductance, 'H'],
    ['snubber.capacitance', stage.snubberCapacitance, 'F'],
    ['fixed_losses', stage.fixedLosses, 'W'],
    ['limits.junction', limits.junction === null ? null : limits.junction - celsiusZero, 'degC'],
    ['limits.voltage_use', limits.voltageUse, '1'],
    ['spread.slope', spread.slope, '1'],
    ['spread.voltage_fall', spread.voltageFall, '1'],
    ['spread.thermal', spread.thermal, '1'],
    ['parallel.parts', parallel.parts, '1'],
    ['parallel.imbalance', parallel.parts > 1 ? parallel.imbalance : null, '1'],
  ]
}

function switchFigures({ switch: part }: Stage): Figure[] {
  const { slope, turnOff, turnOn } = part
  const gate = slope.kind === 'gate' ? slope : null
  return [
    ['switch.on_resistance', part.onResistance, 'ohm'],
    ['switch.on_resistance_per_kelvin', part.onResistancePerKelvin, '1/K'],
    ['switch.slope', slope.kind === 'given' ? slope.slope : null, 'A/s'],
    ['switch.gate.drive', gate?.drive ?? null, 'V'],
    ['switch.gate.resistance', gate?.resistance ?? null, 'ohm'],
    ['switch.gate.input_capacitance', gate?.inputCapacitance ?? null, 'F'],
    ['switch.gate.transconductance', gate?.transconductance ?? null, 'A/V'],
    ['switch.gate.threshold', gate?.threshold ?? null, 'V'],
    ['switch.gate.plateau', gate?.plateau ?? null, 'V'],
    ['switch.gate.source_inductance', gate?.sourceInductance ?? null, 'H'],
    ['switch.voltage_fall', part.voltageFall, 's'],
    ['switch.turn_off.voltage_rise', turnOff?.kind === 'times' ? turnOff.voltageRise : null, 's'],
    ['switch.turn_off.current_fall', turnOff?.kind === 'times' ? turnOff.currentFall : null, 's'],
    ['switch.turn_off.energy', turnOff === null ? 0 : turnOff.kind === 'energy' ? turnOff.energy : null, 'J'],
    ['switch.stored_energy', part.storedEnergy, 'J'],
    ['switch.turn_on.energy', turnOn?.energy ?? null, 'J'],
    ['switch.turn_on.current', turnOn?.current ?? null, 'A'],
    ['switch.turn_on.voltage', turnOn?.voltage ?? null, 'V'],
    ['switch.turn_on.includes_rectifier', turnOn?.includesRectifier ?? null, ''],
    ['switch.turn_on.rectifier', turnOn?.rectifier ?? null, ''],
    ['switch.thermal.junction_to_sink', part.thermal?.junctionToSink ?? null, 'K/W'],
    [
      'switch.thermal.junction_limit',
      part.thermal?.junctionLimit == null ? null : part.thermal.junctionLimit - celsiusZero,
      'degC',
    ],
  ]
}

function coolingFigures({ cooling }: Stage): Figure[] {
  if (cooling.kind === 'case') return [['cooling.case', cooling.caseTemperature - celsiusZero, 'degC']]
  const sink = cooling.kind === 'sink' ? cooling : null
  return [
    ['cooling.ambient', cooling.ambientTemperature - celsiusZero, 'degC'],
    ['cooling.sink_to_ambient', sink?.sinkToAmbient ?? null, 'K/W'],
    ['cooling.shared', sink === null ? null : sink.shared ? 'yes' : 'no', ''],
  ]
}

/** Every figure of a record with the row it stands in, its grade and its source. */
export function recordLedger(record: RectifierRecord): LedgerEntry[] {
  const { ratings, thermal, capacitance, forwardRecovery, deadTime, channel } = record
  const plain = entries(record.id, recordPlace(record), null, record.origin, [
    ['class', record.class, ''],
    ['ratings.reverse_voltage', ratings.reverseVoltage, 'V'],
    ['ratings.average_current', ratings.averageCurrent, 'A'],
    ['ratings.junction', ratings.junction - celsiusZero, 'degC'],
    ['thermal.junction_to_case', thermal?.kind === 'case' ? thermal.junctionToCase : null, 'K/W'],
    ['thermal.case_to_sink', thermal?.kind === 'case' ? thermal.caseToSink : null, 'K/W'],
    ['thermal.junction_to_ambient', thermal?.kind === 'ambient' ? thermal.junctionToAmbient : null, 'K/W'],
    ['thermal.mounting', thermal?.kind === 'ambient' ? thermal.mounting : null, ''],
    ...capacitanceFigures(capacitance),
    ['forward_recovery.peak', forwardRecovery?.peak ?? null, 'V'],
    ['forward_recovery.time', forwardRecovery?.time ?? null, 's'],
    ['forward_recovery.slope', forwardRecovery?.slope ?? null, 'A/s'],
    ['dead_time.before', deadTime?.before ?? null, 's'],
    ['dead_time.after', deadTime?.after ?? null, 's'],
    ['channel.on_resistance', channel?.onResistance ?? null, 'ohm'],
    ['channel.per_kelvin', channel?.perKelvin ?? null, '1/K'],
  ])
  return [
    ...plain,
    ...record.recovery.flatMap((row) => rowEntries(record.id, row, recoveryFigures(row))),
    ...record.forward.flatMap((row) =>
      rowEntries(record.id, row, [
        ['current', row.current, 'A'],
        ['drop', row.drop, 'V'],
      ]),
    ),
    ...(record.forwardLine === null ? [] : rowEntries(record.id, record.forwardLine, lineFigures(record.forwardLine))),
    ...record.leakage.flatMap((row) =>
      rowEntries(record.id, row, [
        ['voltage', row.voltage, 'V'],
        ['current', row.current, 'A'],
      ]),
    ),
  ]
}

function capacitanceFigures(data: RectifierRecord['capacitance']): Figure[] {
  if (data === null) return []
  if (data.kind === 'law') {
    return [
      ['capacitance.zero_bias', data.zeroBias, 'F'],
      ['capacitance.built_in', data.builtIn, 'V'],
      ['capacitance.grading', data.grading, '1'],
    ]
  }
  if (data.kind === 'charge')
    return [
      ['capacitance.charge', data.charge, 'C'],
      ['capacitance.voltage', data.voltage, 'V'],
    ]
  return data.points.map(
    ({ voltage, capacitance }, k) => [`capacitance.points ${k + 1} at ${voltage} V`, capacitance, 'F'] as const,
  )
}

function recoveryFigures(row: RecoveryRow): Figure[] {
  if (row.fixture === 'step') {
    return [
      ['current', row.current, 'A'],
      ['reverse', row.reverse, 'A'],
      ['until', row.until, 'A'],
      ['trr', row.recoveryTime, 's'],
      ['storage', row.storageTime, 's'],
    ]
  }
  return [
    ['current', row.current, 'A'],
    ['slope', row.slope, 'A/s'],
    ['voltage', row.voltage, 'V'],
    ['trr', row.recoveryTime, 's'],
    ['trr_by', row.recoveryTime === null ? null : row.recoveryTimeBy.kind, ''],
    ['qrr', row.charge, 'C'],
    ['irrm', row.peakReverseCurrent, 'A'],
    ['softness', row.softness, '1'],
  ]
}

function lineFigures(line: ForwardLine): Figure[] {
  return [
    ['threshold', line.threshold, 'V'],
    ['resistance', line.resistance, 'ohm'],
    ['threshold_per_kelvin', line.thresholdPerKelvin, 'V/K'],
    ['resistance_per_kelvin', line.resistancePerKelvin, 'ohm/K'],
  ]
}

type AnyRow = RecoveryRow | ForwardRow | ForwardLine | LeakageRow

function rowEntries(subject: string, row: AnyRow, figures: readonly Figure[]): LedgerEntry[] {
  const junction: Figure = ['junction', row.junction === null ? null : row.junction - celsiusZero, 'degC']
  const named = [...figures, junction].map(([path, value, unit]): Figure => [`${row.place.name}: ${path}`, value, unit])
  return entries(subject, `${row.place.file}:${row.place.line}`, row.grade, row.source, named)
}

function entries(
  subject: string,
  place: string,
  grade: string | null,
  source: string | null,
  figures: readonly Figure[],
): LedgerEntry[] {
  return figures.flatMap(([path, value, unit]) =>
    value === null ? [] : [{ subject, path, value, unit, origin: 'given', grade, source, place }],
  )
}

function recordPlace({ place }: RectifierRecord): string {
  return `${place.file}:${place.line}`
}
