import { findRoot } from '../numerics/find-root.ts'

/** A resistor-limited recovery fixture and the rectifier in it. */
export interface StepFixtureInput {
  /** Carrier lifetime. [s] */
  readonly lifetime: number
  /** Time constant of the recovery tail. [s] */
  readonly tailTime: number
  /** I_F. [A] */
  readonly forwardCurrent: number
  /** I_R that the fixture holds. [A] */
  readonly reverseCurrent: number
}

/**
 * Storage time: how long the fixture's reverse current stays on its plateau; 0 where there is none.
 * @example stepStorageTime({ lifetime: 4e-6, tailTime: 0.4e-6, forwardCurrent: 0.012, reverseCurrent: 0.025 }) // 1.14673e-6
 */
export function stepStorageTime(input: StepFixtureInput): number {
  const { lifetime, tailTime, forwardCurrent, reverseCurrent } = input
  const ratio = ((forwardCurrent + reverseCurrent) * (lifetime - tailTime)) / (reverseCurrent * lifetime)
  return ratio > 1 ? lifetime * Math.log(ratio) : 0
}

/** Inputs of {@link stepRecoveryTime}. */
export interface StepRecoveryInput extends StepFixtureInput {
  /** Reverse current at which the recovery time ends. [A] */
  readonly until: number
}

/**
 * Recovery time of a step fixture to a reverse-current level.
 * @example stepRecoveryTime({ lifetime: 150e-9, tailTime: 20e-9, forwardCurrent: 0.5, reverseCurrent: 1, until: 0.25 }) // 6.70805e-8
 */
export function stepRecoveryTime(input: StepRecoveryInput): number {
  const { lifetime, tailTime, forwardCurrent, reverseCurrent, until } = input
  const unlimited = (forwardCurrent * (lifetime - tailTime)) / tailTime
  const top = Math.min(reverseCurrent, unlimited)
  return stepStorageTime(input) + (top > until ? tailTime * Math.log(top / until) : 0)
}

/** Lifetime and tail time from storage and recovery time of one fixture; null where none fits. */
export function lifetimeFromStep(input: {
  readonly storageTime: number
  readonly recoveryTime: number
  readonly forwardCurrent: number
  readonly reverseCurrent: number
  readonly until: number
}): { readonly lifetime: number; readonly tailTime: number } | null {
  const { storageTime, recoveryTime, forwardCurrent, reverseCurrent, until } = input
  const tailTime = (recoveryTime - storageTime) / Math.log(reverseCurrent / until)
  if (!(storageTime > 0 && tailTime > 0 && reverseCurrent > until)) return null
  const gap = (logarithm: number) =>
    stepStorageTime({ lifetime: Math.exp(logarithm), tailTime, forwardCurrent, reverseCurrent }) - storageTime
  // storage is at least tau ln(1 + IF/IR) + tau ln(1 − tau_rr/tau): this lifetime is surely too long
  const longest = 2 * (tailTime + simplestLifetime(input)) * (1 + reverseCurrent / forwardCurrent)
  const found = findRoot({
    f: gap,
    low: Math.log(tailTime),
    high: Math.log(longest),
    tolerance: 1e-15,
    maxIterations: 200,
  })
  return found === null ? null : { lifetime: Math.exp(found.root), tailTime }
}

/** Currents and storage time of a step fixture. */
export interface StorageInput {
  /** [s] */
  readonly storageTime: number
  /** [A] */
  readonly forwardCurrent: number
  /** [A] */
  readonly reverseCurrent: number
}

/** Lifetime from storage time, lumped charge without a tail. [s] */
export function simplestLifetime(input: StorageInput): number {
  return input.storageTime / Math.log1p(input.forwardCurrent / input.reverseCurrent)
}

/** Storage time, lumped charge without a tail. [s] */
export function simplestStorageTime(input: {
  readonly lifetime: number
  readonly forwardCurrent: number
  readonly reverseCurrent: number
}): number {
  return input.lifetime * Math.log1p(input.forwardCurrent / input.reverseCurrent)
}
