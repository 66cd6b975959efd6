import fc from 'fast-check'

const steps = 1_000_000

/** Numbers spread evenly over a range; fc.double is even in its bits, which crowds the values around zero. */
export const evenly = (low: number, high: number): fc.Arbitrary<number> =>
  fc.integer({ min: 0, max: steps }).map((n) => low + ((high - low) * n) / steps)

/** Numbers spread evenly in their logarithm. */
export const spread = (low: number, high: number): fc.Arbitrary<number> =>
  fc.integer({ min: 0, max: steps }).map((n) => low * (high / low) ** (n / steps))
