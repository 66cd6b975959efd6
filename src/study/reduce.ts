import { reduceCapture } from '../capture/reduce-capture.ts'
import type {
  CaptureDocument,
  CaptureReading,
  CaptureSettings,
  CaptureTrace,
  ReducedCapture,
  Waveform,
} from '../domain/capture.ts'
import { celsiusZero, referenceTemperature } from '../domain/constants.ts'
import { StudyRefusal } from '../domain/study-refusal.ts'
import { seededStream } from '../numerics/seeded-stream.ts'

/** A capture as read, with everything that decides how it is reduced. */
export interface ReduceInput {
  readonly settings: CaptureSettings
  readonly waveform: Waveform
  readonly reading: CaptureReading
  readonly reference: Waveform | null
  readonly seed: number
  readonly version: string
  readonly inputs: CaptureDocument['inputs']
}

/** Refits behind the spread: its own error is then a seventh of it. */
const refits = 24

/** The document, and the event drawn again for plots. */
export interface ReduceResult {
  readonly document: CaptureDocument
  readonly trace: CaptureTrace
}

/**
 * Reduces a capture to a recovery row with its doubt.
 * @throws StudyRefusal `range-outside` where the record holds no fall from forward to reverse current.
 */
export function reduce(input: ReduceInput): ReduceResult {
  const { settings, waveform, reference, seed } = input
  const uniform = seededStream('reduce', seed, settings.file).uniform
  const reduced = reduceCapture({ settings, waveform, reference, uniform, refits })
  if (reduced === null) {
    const found = 'no fall from forward to reverse current can be fitted'
    throw new StudyRefusal('range-outside', {
      found,
      expected: 'a record with one, its plateau and its tail',
      path: 'file',
    })
  }
  return { document: documentOf(input, reduced), trace: reduced.trace }
}

function documentOf(input: ReduceInput, reduced: ReducedCapture): CaptureDocument {
  const { settings } = input
  const { figures } = reduced
  const none = figures.kind === 'none-measurable'
  const junction = settings.device.junction ?? referenceTemperature
  const keys = keyOf[settings.fixture]
  return {
    format: 1,
    tool: { name: 'ebbwatt', version: input.version },
    seed: input.seed,
    inputs: input.inputs,
    fixture: settings.fixture,
    device: { id: settings.device.id, junction_c: junction - celsiusZero },
    recovery: none ? 'none-measurable' : 'measured',
    row: rowOf(settings, figures),
    upper_bound: none ? { qrr_c: figures.chargeUpperBound, time_s: figures.timeUpperBound } : null,
    charge_by_end:
      figures.kind === 'ramp'
        ? figures.chargeByEnd.map(({ end, charge }) => ({ end: endText(end), qrr_c: charge }))
        : [],
    spread: none
      ? {}
      : {
          ...Object.fromEntries(
            Object.entries(keys).flatMap(([name, key]) =>
              reduced.spread[name] === undefined ? [] : [[key, reduced.spread[name]]],
            ),
          ),
          row: reduced.rowSpread,
        },
    offset_a: reduced.offset,
    noise_a: reduced.noise,
    warnings: reduced.caveats.map(({ code, data }) => ({ code, text: '', data })),
    understood: understoodOf(input),
    cautions: cautionsOf(input, figures),
  }
}

/** Keys of the row by name of the figure. */
const keyOf: Readonly<Record<'ramp' | 'step', Readonly<Record<string, string>>>> = {
  ramp: {
    current: 'current_a',
    slope: 'slope_a_per_s',
    peakReverseCurrent: 'peak_reverse_a',
    timeToPeak: 'ta_s',
    fallTime: 'tb_s',
    recoveryTime: 'trr_s',
    charge: 'qrr_c',
    softness: 'softness',
    softnessBySlopes: 'softness_slopes',
    voltage: 'voltage_v',
    energy: 'energy_j',
  },
  step: {
    current: 'current_a',
    reverse: 'reverse_a',
    storageTime: 'storage_s',
    recoveryTime: 'trr_s',
    until: 'until_a',
    lifetime: 'tau_s',
    tailTime: 'tau_rr_s',
    diffusionLifetime: 'tau_diffusion_s',
  },
}

function rowOf(settings: CaptureSettings, figures: ReducedCapture['figures']): CaptureDocument['row'] {
  const entries = Object.entries(keyOf[settings.fixture]).map(([name, key]) => {
    const value = (figures as unknown as Readonly<Record<string, unknown>>)[name]
    return [key, typeof value === 'number' ? value : null] as const
  })
  const row: Record<string, number | string | null> = {}
  for (const [key, value] of entries) {
    row[key] = value
    if (key === 'trr_s') row.trr_by = settings.recoveryTimeBy.kind
  }
  return row
}

function endText(end: number): string {
  return end === 0 ? 'whole tail' : `${Number((100 * end).toPrecision(6))} % of I_RM`
}

export function understoodOf({ settings, reading, reference }: ReduceInput): CaptureDocument['understood'] {
  const { columns, start, interval, headerRows, pairsAveraged, timeEvened, ...rest } = reading
  return {
    file: settings.file,
    ...rest,
    header_rows: headerRows,
    columns: columns.map(({ role, position, header, unit }) => ({ role, column: position, header, unit })),
    pairs_averaged: pairsAveraged,
    time_evened: timeEvened,
    start_s: start,
    interval_s: interval,
    bandwidth_hz: settings.bandwidth,
    current_delay_s: settings.currentDelay,
    charge_until: settings.chargeUntil,
    reference: reference === null ? null : settings.reference,
    assumed: settings.assumed,
  }
}

/** Limits above which a voltage is taken as hazardous (IEC 61010-1, IEC 62368-1 ES1, from memory). */
const hazardousPeak = 42.4

/**
 * A bench above the limit gets the usual cautions. A ramp without a voltage channel may be at any voltage: it is taken
 * as hazardous, too.
 */
function cautionsOf(
  { settings, waveform }: ReduceInput,
  figures: ReducedCapture['figures'],
): CaptureDocument['cautions'] {
  let highest = 0
  for (const value of waveform.voltage ?? []) highest = Math.max(highest, Math.abs(value))
  const unknown = settings.fixture === 'ramp' && waveform.voltage === null
  if (!unknown && highest <= hazardousPeak) return []
  const voltage = figures.kind === 'ramp' && figures.voltage !== null ? figures.voltage : highest
  const data: CaptureDocument['cautions'][number]['data'] = unknown ? {} : { voltage }
  return codes.map((code) => ({ code, text: '', data: code === 'lethal-voltage' ? data : {} }))
}

const codes = [
  'lethal-voltage',
  'qualified-persons',
  'bulk-capacitor',
  'isolated-probing',
  'fuse-and-insulation',
  'estimate-only',
]
