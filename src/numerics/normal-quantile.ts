/** Numerator and denominator of one range; eight coefficients each, ascending, rounded to doubles. */
interface Ratio {
  readonly above: readonly number[]
  readonly below: readonly number[]
}

/**
 * Quantile of the standard normal distribution: the x below which a share p of it lies.
 *
 * Rational approximations in three ranges (routine PPND16).
 *
 * Valid for: 0 < p < 1; relative error about 1e-15. p = 0 and 1 give −Infinity and Infinity.
 * Deviations: none.
 *
 * @throws Never; NaN outside 0 ... 1.
 * @see M. J. Wichura, Algorithm AS 241: The percentage points of the normal distribution,
 *   Applied Statistics 37 (1988), 477-484.
 * @example normalQuantile(0.95) // 1.644853626951472
 */
export function normalQuantile(probability: number): number {
  const offset = probability - 0.5
  if (Math.abs(offset) <= 0.425) return offset * evaluateRatio(central, 0.180625 - offset * offset)
  const tail = offset < 0 ? probability : 1 - probability
  if (tail === 0) return offset < 0 ? -Infinity : Infinity
  const depth = Math.sqrt(-Math.log(tail))
  const distance = depth <= 5 ? evaluateRatio(middle, depth - 1.6) : evaluateRatio(far, depth - 5)
  return offset < 0 ? -distance : distance
}

function evaluateRatio({ above, below }: Ratio, r: number): number {
  let numerator = above[7]!
  let denominator = below[7]!
  for (let power = 6; power >= 0; power--) {
    numerator = numerator * r + above[power]!
    denominator = denominator * r + below[power]!
  }
  return numerator / denominator
}

/** |p − 0.5| up to 0.425; r = 0.425² − (p − 0.5)². */
const central: Ratio = {
  above: [
    3.3871328727963665, 133.14166789178438, 1971.5909503065513, 13731.69376550946, 45921.95393154987, 67265.7709270087,
    33430.57558358813, 2509.0809287301227,
  ],
  below: [
    1, 42.31333070160091, 687.1870074920579, 5394.196021424751, 21213.794301586597, 39307.89580009271,
    28729.085735721943, 5226.495278852546,
  ],
}

/** Down to p = exp(−25); r = sqrt(−ln p) − 1.6. */
const middle: Ratio = {
  above: [
    1.4234371107496835, 4.630337846156546, 5.769497221460691, 3.6478483247632045, 1.2704582524523684,
    0.2417807251774506, 0.022723844989269184, 0.0007745450142783414,
  ],
  below: [
    1, 2.053191626637759, 1.6763848301838038, 0.6897673349851, 0.14810397642748008, 0.015198666563616457,
    0.0005475938084995345, 1.0507500716444169e-9,
  ],
}

/** Beyond; r = sqrt(−ln p) − 5. */
const far: Ratio = {
  above: [
    6.657904643501103, 5.463784911164114, 1.7848265399172913, 0.29656057182850487, 0.026532189526576124,
    0.0012426609473880784, 0.000027115555687434876, 2.0103343992922881e-7,
  ],
  below: [
    1, 0.599832206555888, 0.1369298809227358, 0.014875361290850615, 0.0007868691311456133, 0.000018463183175100548,
    1.421511758316446e-7, 2.0442631033899397e-15,
  ],
}
