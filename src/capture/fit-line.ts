/** A straight line through samples: value at time `at`, and its rise. */
export interface FittedLine {
  readonly at: number
  readonly value: number
  readonly rise: number
  /** Root mean square of what is left. */
  readonly residual: number
  readonly count: number
}

/** Least-squares line through samples `from` to `to` (exclusive); flat where there is only one sample. */
export function fitLine(time: Float64Array, current: Float64Array, from: number, to: number): FittedLine {
  const count = to - from
  let sumTime = 0
  let sumCurrent = 0
  for (let k = from; k < to; k++) {
    sumTime += time[k]!
    sumCurrent += current[k]!
  }
  const at = sumTime / count
  const value = sumCurrent / count
  let square = 0
  let product = 0
  for (let k = from; k < to; k++) {
    const x = time[k]! - at
    square += x * x
    product += x * (current[k]! - value)
  }
  const rise = square > 0 ? product / square : 0
  let left = 0
  for (let k = from; k < to; k++) {
    const r = current[k]! - value - rise * (time[k]! - at)
    left += r * r
  }
  return { at, value, rise, residual: Math.sqrt(left / Math.max(1, count - 2)), count }
}

/** The line's value at a time. */
export function lineAt(line: FittedLine, time: number): number {
  return line.value + line.rise * (time - line.at)
}

/** Time at which the line has a value. */
export function lineReaches(line: FittedLine, value: number): number {
  return line.at + (value - line.value) / line.rise
}

/** A level line: the mean of the samples. */
export function fitLevel(time: Float64Array, current: Float64Array, from: number, to: number): FittedLine {
  const line = fitLine(time, current, from, to)
  const spread = Math.sqrt(line.residual ** 2 + (line.rise * (time[to - 1]! - time[from]!)) ** 2 / 12)
  return { ...line, rise: 0, residual: spread }
}
