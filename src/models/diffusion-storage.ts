import { errorFunction } from '../numerics/error-function.ts'
import { findRoot } from '../numerics/find-root.ts'
import type { StorageInput } from './step-fixture.ts'

/** Storage time of a long-base diode in a step fixture, diffusion form. [s] */
export function diffusionStorageTime(input: {
  readonly lifetime: number
  readonly forwardCurrent: number
  readonly reverseCurrent: number
}): number {
  return input.lifetime * storagePerLifetime(input)
}

/** Lifetime from storage time, diffusion form. [s] */
export function diffusionLifetime(input: StorageInput): number {
  return input.storageTime / storagePerLifetime(input)
}

/** ts/tau with erf(sqrt(ts/tau)) = I_F/(I_F + I_R). */
function storagePerLifetime(input: { readonly forwardCurrent: number; readonly reverseCurrent: number }): number {
  const share = input.forwardCurrent / (input.forwardCurrent + input.reverseCurrent)
  const found = findRoot({
    f: (x) => errorFunction(x) - share,
    low: 0,
    high: 6,
    tolerance: 1e-16,
    maxIterations: 200,
  })
  return found === null ? Number.POSITIVE_INFINITY : found.root * found.root
}
