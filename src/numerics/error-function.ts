/**
 * Error function erf(x) by its series of positive terms (M. Abramowitz & I. A. Stegun, 1964, 7.1.6, from memory).
 */
export function errorFunction(x: number): number {
  const size = Math.abs(x)
  if (size > 6) return Math.sign(x)
  let term = size
  let sum = size
  for (let n = 1; term > 1e-17 * sum; n++) {
    term *= (2 * size * size) / (2 * n + 1)
    sum += term
  }
  return ((Math.sign(x) * 2) / Math.sqrt(Math.PI)) * Math.exp(-size * size) * sum
}
