import type { JunctionCapacitance } from '../domain/calibrated-rectifier.ts'
import type { CapacitanceData, RectifierClass, RectifierRecord } from '../domain/rectifier.ts'

/** Built-in voltage where the record gives points only. [V] */
function builtInOf(rectifierClass: RectifierClass): number {
  return rectifierClass === 'sic-schottky' ? 1.2 : 0.8
}

/** Grading where one point is all there is; and how far points may pull it before the law loses its meaning. */
const assumedGrading = 0.46
const steepest = 0.95

/** The record's junction capacitance ready for use; null when it states none that can be used. Capacitance has no prior. */
export function capacitanceEvidence(record: RectifierRecord): JunctionCapacitance | null {
  const data = record.capacitance
  if (data === null) return null
  switch (data.kind) {
    case 'charge':
      return data.voltage > 0 ? data : null
    case 'law':
      return { ...data, builtIn: data.builtIn > 0 ? data.builtIn : builtInOf(record.class) }
    case 'points':
      return throughPoints(data.points, builtInOf(record.class))
  }
}

type Points = Extract<CapacitanceData, { kind: 'points' }>['points']

/** C0 and m by least squares in ln C over ln(1 + V/Vj). */
function throughPoints(points: Points, builtIn: number): JunctionCapacitance | null {
  const usable = points.filter((point) => point.capacitance > 0)
  if (usable.length === 0) return null
  const xs = usable.map((point) => Math.log1p(point.voltage / builtIn))
  const ys = usable.map((point) => Math.log(point.capacitance))
  const meanX = mean(xs)
  const meanY = mean(ys)
  const square = xs.reduce((sum, x) => sum + (x - meanX) ** 2, 0)
  const product = xs.reduce((sum, x, index) => sum + (x - meanX) * (ys[index]! - meanY), 0)
  const grading = square > 1e-9 ? Math.min(Math.max(-product / square, 0), steepest) : assumedGrading
  return { kind: 'law', zeroBias: Math.exp(meanY + grading * meanX), builtIn, grading }
}

function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length
}
