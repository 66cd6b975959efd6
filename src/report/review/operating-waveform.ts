import type { PointResult, StageResult } from '../../domain/result.ts'
import { waveformChart } from '../charts/waveform-chart.ts'
import { quantity } from '../format.ts'

/** Two switching periods of the inductor's and the rectifier's current, with the moment the rectifier turns off. */
export function operatingWaveform(point: PointResult, stage: StageResult, part: string): string {
  const period = 1 / stage.frequency_hz
  const share = conductionShare(point)
  const inductor: (readonly [number, number])[] = []
  const rectifier: (readonly [number, number])[] = []
  for (const start of [0, period]) {
    const off = start + point.duty * period
    const end = off + share * period
    inductor.push([start, point.valley_a], [off, point.peak_a], [end, point.valley_a], [start + period, point.valley_a])
    rectifier.push([start, 0], [off, 0], [off, point.peak_a], [end, point.valley_a], [start + period, point.valley_a])
    rectifier.push([start + period, 0])
  }
  const [scale, unit] = timeUnit(2 * period)
  const scaled = (points: readonly (readonly [number, number])[]) => points.map(([t, i]) => [t * scale, i] as const)
  return waveformChart({
    title: `Currents over two switching periods, ${part}`,
    time: `time (${unit})`,
    panels: [
      {
        axis: 'current (A)',
        traces: [
          { name: 'inductor', points: scaled(inductor) },
          { name: 'rectifier', points: scaled(rectifier), dashed: true },
        ],
      },
    ],
    marks: [
      { time: period * scale, text: `switch turns on: the rectifier turns off from ${quantity(point.valley_a, 'A')}` },
      { time: point.duty * period * scale, text: `switch turns off at ${quantity(point.peak_a, 'A')}` },
    ],
    panelHeight: 210,
  })
}

/** Share of the period in which the rectifier conducts: what is left in continuous conduction, else by the mean current. */
function conductionShare({ mode, duty, mean_a, peak_a }: PointResult): number {
  if (mode !== 'discontinuous' || !(peak_a > 0)) return 1 - duty
  return Math.min(1 - duty, Math.max(0, (2 * mean_a) / peak_a - duty))
}

export function timeUnit(span: number): readonly [number, string] {
  if (span >= 1e-3) return [1e3, 'ms']
  return span >= 1e-6 ? [1e6, 'µs'] : [1e9, 'ns']
}
