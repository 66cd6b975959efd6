import { findRoot } from '../numerics/find-root.ts'

/** A resistor-limited recovery fixture and the rectifier in it. */
export interface StepFixtureInput {
  /** tau, carrier lifetime. [s] */
  readonly lifetime: number
  /** tau_rr, time constant of the recovery tail. [s] */
  readonly tailTime: number
  /** I_F, steady forward current. [A] */
  readonly forwardCurrent: number
  /** I_R, reverse current that the fixture holds. [A] */
  readonly reverseCurrent: number
}

/**
 * Storage time: how long the fixture's reverse current stays on its plateau.
 *
 * Equation: ts = tau ln((I_F + I_R)/(I_R (1 + TM/tau))), TM = tau tau_rr/(tau − tau_rr).
 *
 * Valid for: 0 < tau_rr < tau; 0 where TM I_R ≥ tau I_F, which is no plateau. Deviations: none.
 *
 * @returns ts. [s]
 * @throws Never.
 * @see P. O. Lauritzen & C. L. Ma, IEEE Trans. Power Electronics 6(2), 1991, 188-191, for the rectifier; solution own.
 * @example stepStorageTime({ lifetime: 4e-6, tailTime: 0.4e-6, forwardCurrent: 0.012, reverseCurrent: 0.025 }) // 1.14673e-6
 */
export function stepStorageTime(input: StepFixtureInput): number {
  const { lifetime, tailTime, forwardCurrent, reverseCurrent } = input
  const ratio = ((forwardCurrent + reverseCurrent) * (lifetime - tailTime)) / (reverseCurrent * lifetime)
  return ratio > 1 ? lifetime * Math.log(ratio) : 0
}

/** Inputs of {@link stepRecoveryTime}. */
export interface StepRecoveryInput extends StepFixtureInput {
  /** I_x, reverse current at which the recovery time ends. [A] */
  readonly until: number
}

/**
 * Recovery time of a step fixture to a reverse-current level.
 *
 * Equation: trr = ts + tau_rr ln(I_R/I_x); without a plateau the current starts at tau I_F/TM and trr = tau_rr ln(tau I_F/(TM I_x)).
 *
 * Valid for: 0 < tau_rr < tau; a level that is never reached gives ts alone. Deviations: none.
 *
 * @returns trr. [s]
 * @throws Never.
 * @see P. O. Lauritzen & C. L. Ma, 1991, as above; solution own. Fixture: MIL-STD-750 method 4031, condition B.
 * @example stepRecoveryTime({ lifetime: 150e-9, tailTime: 20e-9, forwardCurrent: 0.5, reverseCurrent: 1, until: 0.25 }) // 6.70805e-8
 */
export function stepRecoveryTime(input: StepRecoveryInput): number {
  const { lifetime, tailTime, forwardCurrent, reverseCurrent, until } = input
  const unlimited = (forwardCurrent * (lifetime - tailTime)) / tailTime
  const top = Math.min(reverseCurrent, unlimited)
  return stepStorageTime(input) + (top > until ? tailTime * Math.log(top / until) : 0)
}

/** Currents and storage time of a step fixture. */
export interface StorageInput {
  /** ts. [s] */
  readonly storageTime: number
  /** I_F. [A] */
  readonly forwardCurrent: number
  /** I_R. [A] */
  readonly reverseCurrent: number
}

/** Inputs of {@link lifetimeFromStep}. */
export interface LifetimeFromStepInput extends StorageInput {
  /** trr to the level. [s] */
  readonly recoveryTime: number
  /** I_x. [A] */
  readonly until: number
}

/**
 * Lifetime and tail time from storage and recovery time of one fixture: {@link stepRecoveryTime} turned round.
 *
 * Equation: tau_rr = (trr − ts)/ln(I_R/I_x), then the lifetime whose storage time is ts, by Brent's method over ln tau.
 *
 * Valid for: a fixture with a plateau. Deviations: none.
 *
 * @returns tau and tau_rr [s]; null where no pair fits (no plateau, level not below it, recovery not after storage).
 * @throws Never.
 * @see As {@link stepStorageTime}.
 * @example lifetimeFromStep({ storageTime: 39.35464e-9, recoveryTime: 67.08053e-9, forwardCurrent: 0.5, reverseCurrent: 1, until: 0.25 }).lifetime // 1.50000e-7
 */
export function lifetimeFromStep(
  input: LifetimeFromStepInput,
): { readonly lifetime: number; readonly tailTime: number } | null {
  const { storageTime, recoveryTime, forwardCurrent, reverseCurrent, until } = input
  const tailTime = (recoveryTime - storageTime) / Math.log(reverseCurrent / until)
  if (!(storageTime > 0 && tailTime > 0 && reverseCurrent > until)) return null
  const gap = (logarithm: number) =>
    stepStorageTime({ lifetime: Math.exp(logarithm), tailTime, forwardCurrent, reverseCurrent }) - storageTime
  // for tau ≥ 2 tau_rr: ts ≥ tau ln(1 + I_F/I_R) − 1.39 tau_rr, and 1/ln(1 + r) ≤ 1 + 1/r; so this is surely too long
  const longest = 2 * (tailTime + simplestLifetime(input)) * (1 + reverseCurrent / forwardCurrent)
  const ends = { low: Math.log(tailTime), high: Math.log(longest) }
  const found = findRoot({ f: gap, ...ends, tolerance: 1e-15, maxIterations: 200 })
  return found === null ? null : { lifetime: Math.exp(found.root), tailTime }
}

/**
 * Storage time without a tail: the simplest published form.
 *
 * Equation: ts = tau ln(1 + I_F/I_R). Valid for: any currents > 0. Deviations: none.
 *
 * @returns ts. [s]
 * @throws Never.
 * @see B. G. Streetman & S. Banerjee, Solid State Electronic Devices, problem 5.5 (as solved in a published solution).
 * @example simplestStorageTime({ lifetime: 167e-9, forwardCurrent: 0.01, reverseCurrent: 0.02 }) // 6.77127e-8
 */
export function simplestStorageTime(
  input: Pick<StepFixtureInput, 'lifetime' | 'forwardCurrent' | 'reverseCurrent'>,
): number {
  return input.lifetime * Math.log1p(input.forwardCurrent / input.reverseCurrent)
}

/**
 * Lifetime from the simplest published form of the storage time.
 *
 * Equation: tau = ts/ln(1 + I_F/I_R). Valid for: any currents > 0; a lower bound where there is a tail. Deviations: none.
 *
 * @returns tau. [s]
 * @throws Never.
 * @see As {@link simplestStorageTime}.
 * @example simplestLifetime({ storageTime: 67.7127e-9, forwardCurrent: 0.01, reverseCurrent: 0.02 }) // 1.67000e-7
 */
export function simplestLifetime(input: StorageInput): number {
  return input.storageTime / Math.log1p(input.forwardCurrent / input.reverseCurrent)
}
