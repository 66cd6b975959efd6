/** Nodes and weights of a quadrature rule on [−1, 1]. */
export interface QuadratureRule {
  readonly nodes: Float64Array
  readonly weights: Float64Array
}

/**
 * Gauss-Legendre rule with n nodes in rising order: exact for polynomials up to degree 2n − 1.
 *
 * Newton's method on the Legendre polynomial from its three-term recurrence, started at cos(π (i + 3/4)/(n + 1/2)).
 *
 * @returns Nodes and weights on [−1, 1].
 * @throws RangeError when n is not a positive whole number.
 * @see M. Abramowitz & I. A. Stegun, Handbook of Mathematical Functions, 1964, 25.4.29, from memory.
 * @example gaussLegendre(2).nodes[1] // 0.577350
 */
export function gaussLegendre(n: number): QuadratureRule {
  if (!(Number.isInteger(n) && n > 0)) throw new RangeError(`gaussLegendre: ${n} nodes are no rule`)
  const nodes = new Float64Array(n)
  const weights = new Float64Array(n)
  for (let i = 0; i < (n + 1) >> 1; i++) {
    let x = Math.cos((Math.PI * (i + 0.75)) / (n + 0.5))
    let derivative = 1
    for (let iteration = 0; iteration < 50; iteration++) {
      let p = 1
      let below = 0
      for (let k = 1; k <= n; k++) {
        const next = ((2 * k - 1) * x * p - (k - 1) * below) / k
        below = p
        p = next
      }
      derivative = (n * (x * p - below)) / (x * x - 1)
      const step = p / derivative
      x -= step
      if (Math.abs(step) <= 1e-15) break
    }
    if (2 * i + 1 === n) x = 0
    const weight = 2 / ((1 - x * x) * derivative * derivative)
    nodes[i] = -x
    nodes[n - 1 - i] = x
    weights[i] = weight
    weights[n - 1 - i] = weight
  }
  return { nodes, weights }
}

/** Inputs of {@link integrate}. */
export interface IntegrateInput {
  readonly f: (x: number) => number
  readonly low: number
  readonly high: number
  readonly rule: QuadratureRule
}

/**
 * Integral of f from low to high by a rule on [−1, 1].
 *
 * @returns Sum of weights and values, scaled to the interval.
 * @throws Never.
 * @example integrate({ f: (x) => x * x, low: 0, high: 3, rule: gaussLegendre(2) }) // 9.00000
 */
export function integrate(input: IntegrateInput): number {
  const middle = 0.5 * (input.low + input.high)
  const half = 0.5 * (input.high - input.low)
  let sum = 0
  for (let i = 0; i < input.rule.nodes.length; i++) {
    sum += input.rule.weights[i]! * input.f(middle + half * input.rule.nodes[i]!)
  }
  return half * sum
}
