/** Nodes and weights of a quadrature rule on [−1, 1]. */
export interface QuadratureRule {
  readonly nodes: Float64Array
  readonly weights: Float64Array
}

/** Gauss-Legendre rule with n nodes in rising order. */
export function gaussLegendre(n: number): QuadratureRule {
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

/** Integral of f from low to high by a rule. */
export function integrate(input: {
  readonly f: (x: number) => number
  readonly low: number
  readonly high: number
  readonly rule: QuadratureRule
}): number {
  const middle = 0.5 * (input.low + input.high)
  const half = 0.5 * (input.high - input.low)
  let sum = 0
  for (let i = 0; i < input.rule.nodes.length; i++) {
    sum += input.rule.weights[i]! * input.f(middle + half * input.rule.nodes[i]!)
  }
  return half * sum
}
