import { stringify } from 'yaml'
import type { ForwardLine, RecoveryRow, RectifierRecord } from '../../src/domain/rectifier.ts'

type Written = Readonly<Record<string, unknown>>

/** Records as a YAML file in base units; what is null is left out. */
export function writeRecords(records: readonly RectifierRecord[]): string {
  return stringify(records.map(written))
}

function of(value: number | null, unit: string): string | undefined {
  return value === null ? undefined : `${value} ${unit}`
}

function written(record: RectifierRecord): Written {
  const { ratings, forwardRecovery: turnOn, deadTime, channel } = record
  return {
    id: record.id,
    class: record.class,
    title: record.title ?? undefined,
    origin: record.origin ?? undefined,
    ratings: {
      reverse_voltage: of(ratings.reverseVoltage, 'V'),
      average_current: of(ratings.averageCurrent, 'A'),
      junction: of(ratings.junction, 'K'),
    },
    thermal: thermal(record.thermal),
    price: record.price ?? undefined,
    forward:
      record.forwardLine === null
        ? record.forward.map((row) => ({ current: of(row.current, 'A'), drop: of(row.drop, 'V'), ...basics(row) }))
        : undefined,
    forward_line: record.forwardLine === null ? undefined : line(record.forwardLine),
    recovery: record.recovery.map(recovery),
    leakage: record.leakage.map((row) => ({
      voltage: of(row.voltage, 'V'),
      current: of(row.current, 'A'),
      ...basics(row),
    })),
    capacitance: capacitance(record.capacitance),
    forward_recovery:
      turnOn === null
        ? undefined
        : { peak: of(turnOn.peak, 'V'), time: of(turnOn.time, 's'), slope: of(turnOn.slope, 'A/s') },
    dead_time: deadTime === null ? undefined : { before: of(deadTime.before, 's'), after: of(deadTime.after, 's') },
    channel:
      channel === null
        ? undefined
        : { on_resistance: of(channel.onResistance, 'ohm'), per_kelvin: of(channel.perKelvin, '/K') },
  }
}

function basics({
  grade,
  spread,
  source,
  junction,
}: Pick<ForwardLine, 'grade' | 'spread' | 'source' | 'junction'>): Written {
  return {
    grade,
    spread: spread === null ? undefined : `${spread * 100} %`,
    source: source ?? undefined,
    junction: of(junction, 'K'),
  }
}

function thermal(path: RectifierRecord['thermal']): Written | undefined {
  if (path === null) return undefined
  return path.kind === 'case'
    ? { junction_to_case: of(path.junctionToCase, 'K/W'), case_to_sink: of(path.caseToSink, 'K/W') }
    : { junction_to_ambient: of(path.junctionToAmbient, 'K/W'), mounting: path.mounting ?? undefined }
}

function line(row: ForwardLine): Written {
  return {
    threshold: of(row.threshold, 'V'),
    resistance: of(row.resistance, 'ohm'),
    threshold_per_kelvin: of(row.thresholdPerKelvin, 'V/K'),
    resistance_per_kelvin: of(row.resistancePerKelvin, 'ohm/K'),
    ...basics(row),
  }
}

function recovery(row: RecoveryRow): Written {
  if (row.fixture === 'step') {
    const { fixture, recoveryTime, storageTime, until } = row
    const times = { trr: of(recoveryTime, 's'), until: of(until, 'A'), storage: of(storageTime, 's') }
    return { fixture, current: of(row.current, 'A'), reverse: of(row.reverse, 'A'), ...times, ...basics(row) }
  }
  const by = row.recoveryTimeBy
  return {
    fixture: row.fixture,
    current: of(row.current, 'A'),
    slope: of(row.slope, 'A/s'),
    voltage: of(row.voltage, 'V'),
    trr: of(row.recoveryTime, 's'),
    trr_by: row.recoveryTime === null && row.softness === null ? undefined : by.kind,
    until: by.kind === 'level' ? of(by.until, 'A') : undefined,
    qrr: of(row.charge, 'C'),
    irrm: of(row.peakReverseCurrent, 'A'),
    softness: row.softness ?? undefined,
    softness_by: row.softness === null ? undefined : row.softnessBy,
    ...basics(row),
  }
}

function capacitance(data: RectifierRecord['capacitance']): Written | undefined {
  switch (data?.kind) {
    case undefined:
      return undefined
    case 'law':
      return { zero_bias: of(data.zeroBias, 'F'), built_in: of(data.builtIn, 'V'), grading: data.grading }
    case 'charge':
      return { charge: of(data.charge, 'C'), voltage: of(data.voltage, 'V') }
    case 'points':
      return {
        points: data.points.map((point) => ({
          voltage: of(point.voltage, 'V'),
          capacitance: of(point.capacitance, 'F'),
        })),
      }
  }
}
