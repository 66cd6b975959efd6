/** A matrix that should be a covariance has a clearly negative pivot. */
export class NotCovarianceError extends Error {
  readonly row: number
  readonly pivot: number
  constructor(row: number, pivot: number) {
    super(`not a covariance: pivot ${pivot} in row ${row}`)
    this.row = row
    this.pivot = pivot
  }
}

/** A pivot below this share of its variance is rounding: the direction has no doubt of its own. */
const negligible = 1e-12
/** After a pivot just above that, rounding may leave the next ones this much below zero. */
const rounding = 1e-6

/**
 * Lower triangular L with L Lᵀ = S, for a symmetric positive semi-definite S of size n × n by rows.
 *
 * Only the lower triangle of S is read. A quantity that others determine (zero pivot) gets a zero column, so exact
 * knowledge and repeated quantities are allowed. `into` may be S itself.
 *
 * @returns `into`: L by rows, zero above the diagonal.
 * @throws NotCovarianceError where a pivot is negative beyond rounding.
 * @see A.-L. Cholesky's method; G. H. Golub, C. F. Van Loan, Matrix Computations, ch. 4 (from memory).
 */
export function choleskyFactor(
  matrix: Float64Array,
  size: number,
  into: Float64Array = new Float64Array(size * size),
): Float64Array {
  if (into !== matrix) into.set(matrix)
  for (let column = 0; column < size; column++) {
    const diagonal = column * size + column
    const variance = into[diagonal]!
    let pivot = variance
    for (let k = 0; k < column; k++) pivot -= into[column * size + k]! ** 2
    const floor = negligible * Math.abs(variance)
    if (!(pivot >= -rounding * Math.abs(variance))) throw new NotCovarianceError(column, pivot)
    const root = pivot > floor ? Math.sqrt(pivot) : 0
    into[diagonal] = root
    for (let row = column + 1; row < size; row++) {
      let rest = into[row * size + column]!
      for (let k = 0; k < column; k++) rest -= into[row * size + k]! * into[column * size + k]!
      into[row * size + column] = root > 0 ? rest / root : 0
      into[column * size + row] = 0
    }
  }
  return into
}
