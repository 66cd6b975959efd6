/**
 * Quantile of a sample: linear between order statistics, at position (n − 1) p counted from 0 (type 7).
 *
 * Valid for: 0 ≤ p ≤ 1; values without NaN; infinite values count as largest or smallest. The values stay untouched.
 *
 * @throws RangeError on an empty sample or a probability outside 0 ... 1.
 * @see R. J. Hyndman, Y. Fan, Sample quantiles in statistical packages, The American Statistician 50 (1996), 361-365.
 * @example quantile(Float64Array.of(4, 1, 3, 2), 0.5) // 2.5
 */
export function quantile(values: Float64Array, probability: number): number {
  if (values.length === 0 || !(probability >= 0 && probability <= 1)) {
    throw new RangeError(`no quantile ${probability} of ${values.length} values`)
  }
  const scratch = values.slice()
  const position = (scratch.length - 1) * probability
  const index = Math.floor(position)
  const lower = selectInPlace(scratch, index)
  const fraction = position - index
  if (fraction === 0) return lower
  let upper = Infinity
  for (let next = index + 1; next < scratch.length; next++) upper = Math.min(upper, scratch[next]!)
  // Two infinite neighbours have no difference.
  return lower === upper ? lower : lower + fraction * (upper - lower)
}

/**
 * Moves the value of rank `index` to its place, smaller ones before it, and returns it: quickselect with the median
 * of three as pivot, which is linear in time for the sorted and the shuffled samples met here.
 */
function selectInPlace(values: Float64Array, index: number): number {
  let left = 0
  let right = values.length - 1
  while (left < right) {
    const pivot = medianOfThree(values[left]!, values[(left + right) >> 1]!, values[right]!)
    let low = left
    let high = right
    while (low <= high) {
      while (values[low]! < pivot) low++
      while (values[high]! > pivot) high--
      if (low <= high) {
        const kept = values[low]!
        values[low++] = values[high]!
        values[high--] = kept
      }
    }
    if (index <= high) right = high
    else if (index >= low) left = low
    else break
  }
  return values[index]!
}

function medianOfThree(a: number, b: number, c: number): number {
  return Math.max(Math.min(a, b), Math.min(Math.max(a, b), c))
}
