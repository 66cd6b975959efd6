import { errorFunction } from '../numerics/error-function.ts'
import { findRoot } from '../numerics/find-root.ts'
import type { StepFixtureInput, StorageInput } from './step-fixture.ts'

type Currents = Pick<StepFixtureInput, 'forwardCurrent' | 'reverseCurrent'>

/**
 * Storage time of a long-base diode in a resistor-limited fixture, from carrier diffusion.
 *
 * Equation: erf(sqrt(ts/tau)) = I_F/(I_F + I_R).
 *
 * Valid for: a base much longer than the diffusion length, one-sided junction. Deviations: recalled from memory.
 *
 * @returns ts. [s]
 * @throws Never.
 * @see R. H. Kingston, Proc. IRE 42, 1954, 829-834, from memory.
 * @example diffusionStorageTime({ lifetime: 1e-6, forwardCurrent: 1, reverseCurrent: 1 }) // 2.27468e-7
 */
export function diffusionStorageTime(input: Currents & Pick<StepFixtureInput, 'lifetime'>): number {
  return input.lifetime * storagePerLifetime(input)
}

/**
 * Lifetime from the storage time, diffusion form; 3 to 4.5 times the lumped one for usual currents.
 *
 * Equation: tau = ts/x², erf(x) = I_F/(I_F + I_R). Valid for: as {@link diffusionStorageTime}. Deviations: none.
 *
 * @returns tau. [s]
 * @throws Never.
 * @see R. H. Kingston, Proc. IRE 42, 1954, 829-834, from memory.
 * @example diffusionLifetime({ storageTime: 1.14673e-6, forwardCurrent: 0.012, reverseCurrent: 0.025 }) // 1.31029e-5
 */
export function diffusionLifetime(input: StorageInput): number {
  return input.storageTime / storagePerLifetime(input)
}

/** x² with erf(x) = I_F/(I_F + I_R); x < 6 for every ratio that is below 1 in double precision. */
function storagePerLifetime({ forwardCurrent, reverseCurrent }: Currents): number {
  const share = forwardCurrent / (forwardCurrent + reverseCurrent)
  const missing = (x: number) => errorFunction(x) - share
  const found = findRoot({ f: missing, low: 0, high: 6, tolerance: 1e-16, maxIterations: 200 })
  return found === null ? Number.POSITIVE_INFINITY : found.root * found.root
}
