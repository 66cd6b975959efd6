/**
 * Time to the peak of a ramp event in numbers without dimension: times over tau, charge over a tau².
 *
 * Kernel: called several times per operating point, so it takes plain numbers and allocates nothing.
 * With s = I/(a tau), κ = q0/(a tau²), ρ = tau_rr/tau, z = s + x it solves
 * x = (1 − ρ)(1 − exp(−z)(1 + s − κ)), which says that the charge (1 − ρ) q_M(z) has fallen to ρ x.
 * Each step takes the root of the local parabola (of the tangent where the function is concave). The third (second)
 * derivative has the sign that keeps every step short of the root: it rises to it, needs no bracket, and triples
 * (doubles) its digits. Below z = 1 the residual is a difference of charges, above of times: the form without cancellation.
 *
 * Valid for: any s, κ ≥ 0, 0 ≤ ρ ≤ 1; for s < 0 the answer is at least −s (the junction may be empty at once).
 *
 * @returns x = ta/tau. [1]
 * @throws Never.
 */
export function scaledTimeToPeak(crossing: number, charge: number, tail: number): number {
  const weight = 1 + crossing - charge
  const share = 1 - tail
  let x = crossing < 0 ? -crossing : 0
  for (let iteration = 0; iteration < 60; iteration++) {
    const z = crossing + x
    const excess = exponentialExcess(z)
    // exp(−z) is nothing beside 1 beyond z = 40, and z − excess would lose its digits there
    const grown = z > 40 ? 1 : z - excess
    const decay = 1 - grown
    const missing =
      z < 1
        ? share * (charge * decay + crossing * grown - excess) - tail * x
        : share * (grown - (crossing - charge) * decay) - x
    if (!(missing > 0)) break
    const curvature = share * decay * weight
    // 1 − curvature, without losing the digits of a ramp far shorter than tau
    const rise = tail + share * (grown - decay * (crossing - charge))
    if (curvature > 0) {
      const step = (2 * missing) / (rise + Math.sqrt(rise * rise + 2 * curvature * missing))
      x += step
      // the parabola misses by curvature step³/(6 rise)
      if (curvature * step * step * step <= 1e-16 * x * rise) break
    } else {
      const step = missing / rise
      x += step
      if (-curvature * step * step <= 1e-16 * x * rise) break
    }
  }
  return x
}

/**
 * z − (1 − exp(−z)), to full precision at small z as well, where it is z²/2.
 *
 * @returns Excess of z over 1 − exp(−z). [1]
 * @throws Never.
 */
export function exponentialExcess(z: number): number {
  if (z > 0.05) return z + Math.expm1(-z)
  return (
    0.5 *
    z *
    z *
    (1 - (z / 3) * (1 - (z / 4) * (1 - (z / 5) * (1 - (z / 6) * (1 - (z / 7) * (1 - (z / 8) * (1 - z / 9)))))))
  )
}
