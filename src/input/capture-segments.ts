import type { CaptureReading, CaptureSettings, Waveform } from '../domain/capture.ts'
import type { CaptureLayout, TableFault } from './capture-layout.ts'
import type { SampleStore } from './capture-samples.ts'
import type { CaptureTable } from './capture-table.ts'

/** Fewer samples than this hold no event. */
const fewest = 20

/** One segment on an even grid, or the mean of all; a fault where the samples are not what they should be. */
export function waveformFrom(
  store: SampleStore,
  breaks: readonly number[],
  layout: CaptureLayout,
  settings: CaptureSettings,
): CaptureTable | TableFault {
  const ends = [0, ...breaks, store.count()]
  const segments = ends.length - 1
  if (typeof settings.segment === 'number' && settings.segment > segments) {
    const found = `segment ${settings.segment} does not exist`
    return malformed(found, segments === 1 ? 'segment 1, the only one' : `1 to ${segments}, or average`, '')
  }
  const chosen = settings.segment === 'average' ? ends.slice(1).map((_, k) => k) : [settings.segment - 1]
  const read: EvenSegment[] = []
  for (const k of chosen) {
    const segment = evenSegment(store, ends[k]!, ends[k + 1]!, settings)
    if ('code' in segment) return segment
    read.push(segment)
  }
  const mean = read.length === 1 ? read[0]! : average(read)
  if ('code' in mean) return mean
  return { waveform: mean.waveform, reading: readingOf(mean, segments, layout, settings) }
}

interface EvenSegment {
  readonly waveform: Waveform
  readonly pairsAveraged: boolean
  readonly timeEvened: boolean
}

function evenSegment(
  store: SampleStore,
  from: number,
  to: number,
  settings: CaptureSettings,
): EvenSegment | TableFault {
  if (to - from < fewest) return malformed(`there are ${to - from} samples`, `at least ${fewest}`, '')
  const current = scale(store.column('current', from, to)!, settings.current.factor)
  const volts = store.column('voltage', from, to)
  const voltage = volts === null ? null : scale(volts, settings.voltage!.factor)
  const time = store.column('time', from, to)
  if (time === null) {
    return {
      waveform: { start: 0, interval: settings.interval!, current, voltage },
      pairsAveraged: false,
      timeEvened: false,
    }
  }
  scale(time, settings.time!.factor)
  const paired = arePairs(time, current)
  const grid = evenGrid(paired ? everySecond(time) : time)
  if ('code' in grid) return grid
  const halved = (values: Float64Array) => (paired ? pairMeans(values) : values)
  return {
    waveform: {
      start: grid.start,
      interval: grid.interval,
      current: halved(current),
      voltage: voltage === null ? null : halved(voltage),
    },
    pairsAveraged: paired,
    timeEvened: grid.evened,
  }
}

function scale(values: Float64Array, factor: number): Float64Array {
  if (factor !== 1) for (let k = 0; k < values.length; k++) values[k] = values[k]! * factor
  return values
}

/**
 * Lowest and highest value of each interval at one time, as peak-detecting oscilloscopes store them: every time stands
 * twice, and the two values are always in the same order. Times doubled by rounding have values in any order.
 */
function arePairs(time: Float64Array, current: Float64Array): boolean {
  if (time.length % 2 === 1) return false
  let rising = 0
  let falling = 0
  for (let k = 0; k < time.length; k += 2) {
    if (time[k] !== time[k + 1] || (k > 0 && time[k] === time[k - 1])) return false
    if (current[k]! <= current[k + 1]!) rising += 1
    if (current[k]! >= current[k + 1]!) falling += 1
  }
  return Math.max(rising, falling) >= 0.99 * (time.length / 2)
}

function everySecond(values: Float64Array): Float64Array {
  return Float64Array.from({ length: values.length / 2 }, (_, k) => values[2 * k]!)
}

function pairMeans(values: Float64Array): Float64Array {
  return Float64Array.from({ length: values.length / 2 }, (_, k) => 0.5 * (values[2 * k]! + values[2 * k + 1]!))
}

/** The even grid behind times that rounding has made uneven. */
function evenGrid(time: Float64Array): { start: number; interval: number; evened: boolean } | TableFault {
  const count = time.length
  const middle = 0.5 * (count - 1)
  let mean = 0
  for (let k = 0; k < count; k++) mean += time[k]! / count
  let product = 0
  for (let k = 0; k < count; k++) product += (k - middle) * (time[k]! - mean)
  // a line through all times: rounding of the first and the last does not tilt it
  const interval = (12 * product) / (count * (count * count - 1))
  const start = mean - middle * interval
  if (!(interval > 0)) return malformed('the time column does not advance', 'rising times', 'check columns.time')
  let quantum = Number.POSITIVE_INFINITY
  let furthest = Math.abs(time[0]! - start)
  for (let k = 1; k < count; k++) {
    const step = time[k]! - time[k - 1]!
    if (step > 1e-9 * interval && step < quantum) quantum = step
    furthest = Math.max(furthest, Math.abs(time[k]! - start - k * interval))
  }
  if (furthest > 1.05 * Math.max(interval, quantum)) {
    const found = `the samples are not evenly spaced (off by ${(furthest / interval).toPrecision(3)} intervals)`
    return malformed(found, 'an even sampling interval, apart from rounding', 'export the record without gaps')
  }
  return { start, interval, evened: furthest > 1e-3 * interval }
}

/** Mean of segments, aligned by their times to the nearest sample. */
function average(segments: readonly EvenSegment[]): EvenSegment | TableFault {
  const first = segments[0]!
  const { start, interval } = first.waveform
  if (segments.some(({ waveform }) => Math.abs(waveform.interval / interval - 1) > 1e-3)) {
    return malformed(
      'the segments have different sampling intervals',
      'equal intervals to average',
      'choose one segment',
    )
  }
  const shifts = segments.map(({ waveform }) => Math.round((start - waveform.start) / interval))
  const from = Math.max(...shifts.map((shift) => Math.max(0, -shift)))
  const to = Math.min(...segments.map(({ waveform }, k) => waveform.current.length - shifts[k]!))
  if (to - from < fewest)
    return malformed('the segments do not overlap in time', 'one trigger for all', 'choose one segment')
  const mean = (read: (waveform: Waveform) => Float64Array) =>
    Float64Array.from({ length: to - from }, (_, k) => {
      let sum = 0
      for (let s = 0; s < segments.length; s++) sum += read(segments[s]!.waveform)[from + k + shifts[s]!]!
      return sum / segments.length
    })
  return {
    waveform: {
      start: start + from * interval,
      interval,
      current: mean((waveform) => waveform.current),
      voltage: first.waveform.voltage === null ? null : mean((waveform) => waveform.voltage!),
    },
    pairsAveraged: segments.some((segment) => segment.pairsAveraged),
    timeEvened: segments.some((segment) => segment.timeEvened),
  }
}

function readingOf(
  segment: EvenSegment,
  segments: number,
  layout: CaptureLayout,
  settings: CaptureSettings,
): CaptureReading {
  const roles = ['time', 'current', 'voltage'] as const
  return {
    delimiter: layout.delimiter === '\t' ? 'tab' : layout.delimiter,
    decimal: layout.decimal,
    headerRows: layout.headerRows,
    columns: roles.flatMap((role) => {
      const position = layout.columns[role]
      return position === null
        ? []
        : [{ role, position: position + 1, header: layout.headers[role], unit: settings[role]!.unit }]
    }),
    segments,
    segment: settings.segment,
    samples: segment.waveform.current.length,
    pairsAveraged: segment.pairsAveraged,
    timeEvened: segment.timeEvened,
    start: segment.waveform.start,
    interval: segment.waveform.interval,
  }
}

function malformed(found: string, expected: string, hint: string): TableFault {
  return { code: 'table-malformed', found, expected, hint, line: 0, path: '' }
}
