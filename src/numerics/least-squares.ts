/** Result of {@link leastSquares}. */
export interface LeastSquaresFit {
  /** One for each column; 0 for a column that repeats earlier ones. */
  readonly coefficients: Float64Array
  /** Number of columns that say something of their own. */
  readonly rank: number
  /** Sum of squares that the fit leaves. */
  readonly residualSquares: number
}

/** What is left of a column after earlier ones, relative to itself, below which it repeats them. */
const dependent = 1e-9

/**
 * Coefficients c that minimise |t − Σ c_j x_j|², for a few columns x_j of any scale.
 *
 * Modified Gram-Schmidt orthogonalisation with the target as last column, which loses no more accuracy than
 * Householder's method; a column that depends on earlier ones (or is zero) takes coefficient 0 instead of failing.
 * For weights, scale the rows of columns and target by their square roots beforehand.
 *
 * @throws Never. Columns and target must have one length and finite values.
 * @see Å. Björck, Solving linear least squares problems by Gram-Schmidt orthogonalization, BIT 7 (1967), 1-21.
 * @example leastSquares([Float64Array.of(1, 1, 1), Float64Array.of(0, 1, 2)], Float64Array.of(1, 3, 5)).coefficients // [1, 2]
 */
export function leastSquares(columns: readonly Float64Array[], target: Float64Array): LeastSquaresFit {
  const width = columns.length
  const basis = columns.map((column) => column.slice())
  const left = target.slice()
  const original = columns.map((column) => Math.sqrt(dot(column, column)))
  const upper = new Float64Array(width * width)
  const projections = new Float64Array(width)
  let rank = 0
  for (let j = 0; j < width; j++) {
    const direction = basis[j]!
    const length = Math.sqrt(dot(direction, direction))
    if (!(length > dependent * original[j]!)) continue
    rank++
    upper[j * width + j] = length
    for (let row = 0; row < direction.length; row++) direction[row] = direction[row]! / length
    for (let k = j + 1; k < width; k++) upper[j * width + k] = removePart(basis[k]!, direction)
    projections[j] = removePart(left, direction)
  }
  return { coefficients: substituteBack(upper, projections), rank, residualSquares: dot(left, left) }
}

/** Subtracts from `column` its part along the unit vector `direction`; returns the length of that part. */
function removePart(column: Float64Array, direction: Float64Array): number {
  const part = dot(column, direction)
  for (let row = 0; row < column.length; row++) column[row] = column[row]! - part * direction[row]!
  return part
}

function substituteBack(upper: Float64Array, projections: Float64Array): Float64Array {
  const width = projections.length
  const coefficients = new Float64Array(width)
  for (let j = width - 1; j >= 0; j--) {
    const pivot = upper[j * width + j]!
    if (pivot === 0) continue
    let rest = projections[j]!
    for (let k = j + 1; k < width; k++) rest -= upper[j * width + k]! * coefficients[k]!
    coefficients[j] = rest / pivot
  }
  return coefficients
}

function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0
  for (let row = 0; row < a.length; row++) sum += a[row]! * b[row]!
  return sum
}
