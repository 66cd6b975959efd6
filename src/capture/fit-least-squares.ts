/** A least-squares problem with few parameters. */
export interface LeastSquaresProblem {
  /** Writes the residuals, each already divided by its standard deviation. */
  readonly residuals: (parameters: Float64Array, out: Float64Array) => void
  readonly count: number
  readonly start: Float64Array
  /** Step of the numerical derivative for each parameter. */
  readonly steps: Float64Array
  readonly iterations: number
}

/**
 * Nonlinear least squares with a damped Gauss-Newton step (Levenberg 1944, Marquardt 1963).
 * Stops where a step no longer lowers the sum of squares by a part in 1e7; the last accepted parameters are returned.
 */
export function fitLeastSquares(problem: LeastSquaresProblem): Float64Array {
  const size = problem.start.length
  let parameters = Float64Array.from(problem.start)
  const residual = new Float64Array(problem.count)
  const shifted = new Float64Array(problem.count)
  const columns = Array.from({ length: size }, () => new Float64Array(problem.count))
  problem.residuals(parameters, residual)
  let cost = sumOfSquares(residual)
  let damping = 1e-3
  for (let iteration = 0; iteration < problem.iterations; iteration++) {
    for (let j = 0; j < size; j++) derivative(problem, parameters, j, residual, columns[j]!)
    const before = cost
    for (let trial = 0; trial < 8; trial++) {
      const step = solveNormal(columns, residual, damping)
      const candidate = parameters.map((value, j) => value - step[j]!)
      problem.residuals(candidate, shifted)
      const reached = sumOfSquares(shifted)
      if (reached < cost) {
        parameters = candidate
        cost = reached
        residual.set(shifted)
        damping = Math.max(1e-9, damping * 0.2)
        break
      }
      damping *= 6
    }
    if (before - cost <= 1e-7 * before) break
  }
  return parameters
}

function derivative(
  problem: LeastSquaresProblem,
  at: Float64Array,
  index: number,
  residual: Float64Array,
  out: Float64Array,
): void {
  const moved = Float64Array.from(at)
  const step = problem.steps[index]!
  moved[index] = moved[index]! + step
  problem.residuals(moved, out)
  for (let k = 0; k < out.length; k++) out[k] = (out[k]! - residual[k]!) / step
}

function sumOfSquares(values: Float64Array): number {
  let sum = 0
  for (let k = 0; k < values.length; k++) sum += values[k]! * values[k]!
  return Number.isFinite(sum) ? sum : Number.POSITIVE_INFINITY
}

/** Solves (JᵀJ + damping diag(JᵀJ)) step = Jᵀr by Gauss elimination; no numbers where the matrix is singular. */
function solveNormal(columns: readonly Float64Array[], residual: Float64Array, damping: number): Float64Array {
  const size = columns.length
  const rows = columns.map((left, i) => {
    const row = new Float64Array(size + 1)
    for (let j = 0; j < size; j++) row[j] = dot(left, columns[j]!) * (i === j ? 1 + damping : 1)
    row[size] = dot(left, residual)
    return row
  })
  for (let i = 0; i < size; i++) {
    const pivotRow = rows[i]!
    const pivot = pivotRow[i]!
    for (let k = i + 1; k < size; k++) {
      const row = rows[k]!
      const factor = row[i]! / pivot
      for (let j = i; j <= size; j++) row[j] = row[j]! - factor * pivotRow[j]!
    }
  }
  const step = new Float64Array(size)
  for (let i = size - 1; i >= 0; i--) {
    let sum = rows[i]![size]!
    for (let j = i + 1; j < size; j++) sum -= rows[i]![j]! * step[j]!
    step[i] = sum / rows[i]![i]!
  }
  return step
}

function dot(left: Float64Array, right: Float64Array): number {
  let sum = 0
  for (let k = 0; k < left.length; k++) sum += left[k]! * right[k]!
  return sum
}
