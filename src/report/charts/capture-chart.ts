import type { CaptureDocument, CaptureTrace } from '../../domain/capture.ts'
import { prefixFor, quantity } from '../format.ts'
import { type LineMark, lineChart } from './line-chart.ts'

/** Points drawn at most; more than pixels bring nothing. */
const most = 700

/** The captured event with its fit as a drawing: samples, fitted ramp and tail, peak and end of the recovery time. */
export function captureChart({ row, device, cautions }: CaptureDocument, trace: CaptureTrace): string {
  const [timeSize, timePrefix] = prefixFor(trace.time[trace.time.length - 1]! - trace.time[0]!, 's')
  const largest = trace.current.reduce((sum, value) => Math.max(sum, Math.abs(value)), 0)
  const [size, prefix] = prefixFor(largest, 'A')
  const every = Math.max(1, Math.ceil(trace.time.length / most))
  const points = (values: Float64Array, unit: number) =>
    Array.from({ length: Math.ceil(values.length / every) }, (_, k) => ({
      x: trace.time[k * every]! / timeSize,
      y: values[k * every]! / unit,
    }))
  const mark = (key: string, text: string): readonly LineMark[] => {
    const at = row[key]
    return typeof at === 'number' ? [{ x: at / timeSize, text: `${text} ${quantity(at, 's')}` }] : []
  }
  return lineChart({
    title: `Recovery captured${device.id === null ? '' : `: ${device.id}`}`,
    x: { title: `time from the zero crossing (${timePrefix}s)` },
    y: { title: `current (${prefix}A)` },
    series: [
      { name: 'samples', points: points(trace.current, size) },
      { name: 'fit', points: points(trace.fitted, size) },
    ],
    marks: [...mark('ta_s', 'peak'), ...mark('storage_s', 'storage'), ...mark('trr_s', 'trr')],
    cautions,
  })
}
