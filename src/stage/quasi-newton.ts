/**
 * Broyden's method for at most three unknowns, with the inverse of the Jacobian updated by rank one. Written out for
 * three: loops over two or three elements cost a seventh of a whole candidate point (tests/bench/points.ts). An
 * unknown that is not solved has residual 0 throughout and then stays where it is.
 *
 * @see C. G. Broyden, A class of methods for solving nonlinear simultaneous equations, Math. Comp. 19 (1965), 577-593.
 */
export interface QuasiNewton {
  /** Inverse of −d residual/d unknown, row by row. */
  readonly inverse: Float64Array
  readonly residual: Float64Array
  readonly step: Float64Array
  readonly previous: Float64Array
}

export function createQuasiNewton(): QuasiNewton {
  return {
    inverse: new Float64Array(9),
    residual: new Float64Array(3),
    step: new Float64Array(3),
    previous: new Float64Array(3),
  }
}

/** Step from residual and inverse; keeps the residual for the update. */
export function placeStep({ inverse: h, residual: r, step, previous }: QuasiNewton): void {
  const a = r[0]!
  const b = r[1]!
  const c = r[2]!
  previous[0] = a
  previous[1] = b
  previous[2] = c
  step[0] = h[0]! * a + h[1]! * b + h[2]! * c
  step[1] = h[3]! * a + h[4]! * b + h[5]! * c
  step[2] = h[6]! * a + h[7]! * b + h[8]! * c
}

/** H += (s − H y) sᵀH / (sᵀ H y) with y the fall of the residual over the step s. */
export function updateInverse({ inverse: h, residual, step, previous }: QuasiNewton): void {
  const ya = previous[0]! - residual[0]!
  const yb = previous[1]! - residual[1]!
  const yc = previous[2]! - residual[2]!
  const pa = h[0]! * ya + h[1]! * yb + h[2]! * yc
  const pb = h[3]! * ya + h[4]! * yb + h[5]! * yc
  const pc = h[6]! * ya + h[7]! * yb + h[8]! * yc
  const sa = step[0]!
  const sb = step[1]!
  const sc = step[2]!
  const denominator = sa * pa + sb * pb + sc * pc
  if (!(Math.abs(denominator) > 1e-300)) return
  const ta = (sa * h[0]! + sb * h[3]! + sc * h[6]!) / denominator
  const tb = (sa * h[1]! + sb * h[4]! + sc * h[7]!) / denominator
  const tc = (sa * h[2]! + sb * h[5]! + sc * h[8]!) / denominator
  const da = sa - pa
  const db = sb - pb
  const dc = sc - pc
  h[0]! += da * ta
  h[1]! += da * tb
  h[2]! += da * tc
  h[3]! += db * ta
  h[4]! += db * tb
  h[5]! += db * tc
  h[6]! += dc * ta
  h[7]! += dc * tb
  h[8]! += dc * tc
}

/** Largest absolute value of three. */
export function largest(values: Float64Array): number {
  return Math.max(Math.abs(values[0]!), Math.abs(values[1]!), Math.abs(values[2]!))
}
