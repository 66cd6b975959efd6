/** Inputs of {@link findRoot}. */
export interface FindRootInput {
  readonly f: (x: number) => number
  readonly low: number
  readonly high: number
  /** Absolute tolerance of the root, beside the rounding of the numbers themselves. */
  readonly tolerance: number
  readonly maxIterations: number
}

/** A root, how long it took, and the function's value there. */
export interface FoundRoot {
  readonly root: number
  readonly iterations: number
  readonly residual: number
}

/**
 * Root between two ends of opposite sign: inverse quadratic interpolation or a secant step where they help, else bisection.
 *
 * Valid for: continuous f. Longer than a model because the three points are kept in plain variables.
 *
 * @returns Root, iterations and residual; null without a change of sign. At the limit of iterations the best point so far.
 * @throws Never.
 * @see R. P. Brent, Algorithms for Minimization without Derivatives, 1973, chapter 4.
 * @example findRoot({ f: (x) => x * x - 2, low: 0, high: 2, tolerance: 1e-12, maxIterations: 50 })?.root // 1.41421
 */
export function findRoot({ f, low, high, tolerance, maxIterations }: FindRootInput): FoundRoot | null {
  let a = low
  let b = high
  let fa = f(a)
  let fb = f(b)
  if (fa === 0) return { root: a, iterations: 0, residual: 0 }
  if (fb === 0) return { root: b, iterations: 0, residual: 0 }
  if (!(fa * fb < 0)) return null
  let c = a
  let fc = fa
  let step = b - a
  let previous = step
  for (let iterations = 1; iterations <= maxIterations; iterations++) {
    if (fb > 0 === fc > 0) {
      c = a
      fc = fa
      step = b - a
      previous = step
    }
    if (Math.abs(fc) < Math.abs(fb)) {
      a = b
      b = c
      c = a
      fa = fb
      fb = fc
      fc = fa
    }
    const accuracy = 2 * Number.EPSILON * Math.abs(b) + 0.5 * tolerance
    const half = 0.5 * (c - b)
    if (Math.abs(half) <= accuracy || fb === 0) return { root: b, iterations, residual: fb }
    if (Math.abs(previous) < accuracy || Math.abs(fa) <= Math.abs(fb)) {
      step = half
      previous = half
    } else {
      const s = fb / fa
      let p: number
      let q: number
      if (a === c) {
        p = 2 * half * s
        q = 1 - s
      } else {
        const r = fb / fc
        const t = fa / fc
        p = s * (2 * half * t * (t - r) - (b - a) * (r - 1))
        q = (t - 1) * (r - 1) * (s - 1)
      }
      if (p > 0) q = -q
      else p = -p
      if (2 * p < Math.min(3 * half * q - Math.abs(accuracy * q), Math.abs(previous * q))) {
        previous = step
        step = p / q
      } else {
        step = half
        previous = half
      }
    }
    a = b
    fa = fb
    b += Math.abs(step) > accuracy ? step : half > 0 ? accuracy : -accuracy
    fb = f(b)
  }
  return { root: b, iterations: maxIterations, residual: fb }
}
