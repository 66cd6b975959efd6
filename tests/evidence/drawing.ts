import { choleskyFactor } from '../../src/numerics/cholesky.ts'
import { normalQuantile } from '../../src/numerics/normal-quantile.ts'
import { seededStream } from '../../src/numerics/seeded-stream.ts'

/** Random numbers of one world: the same keys give the same world. */
export interface Drawing {
  readonly normal: () => number
  readonly between: (low: number, high: number) => number
  readonly pick: <T>(choices: readonly T[]) => T
  /** Factor of one reading whose ln has this error. */
  readonly misread: (error: number) => number
  readonly from: (gaussian: { readonly mean: Float64Array; readonly covariance: Float64Array }) => Float64Array
}

export function drawing(...keys: readonly (string | number)[]): Drawing {
  const stream = seededStream(...keys)
  const normal = () => normalQuantile(stream.uniform())
  return {
    normal,
    between: (low, high) => low + (high - low) * stream.uniform(),
    pick: (choices) => choices[stream.below(choices.length)]!,
    misread: (error) => Math.exp(error * normal()),
    from: ({ mean, covariance }) => {
      const n = mean.length
      const factor = choleskyFactor(covariance, n)
      const raw = Array.from({ length: n }, normal)
      return mean.map((centre, i) => raw.reduce((sum, value, j) => sum + factor[i * n + j]! * value, centre))
    },
  }
}
