import type { JunctionCapacitance } from '../domain/calibrated-rectifier.ts'
import { findRoot } from '../numerics/find-root.ts'
import {
  type CapacitanceLaw,
  capacitanceAt,
  capacitanceLaw,
  capacitiveCharge,
  capacitiveEnergy,
} from './junction-capacitance.ts'

/** Inputs of {@link storedChargePeakVoltage}. */
export interface StoredChargePeakInput {
  /** V, blocking voltage. [V] */
  readonly voltage: number
  /** L, inductance of the commutation loop. [H] */
  readonly loopInductance: number
  /** [A] */
  readonly peakReverseCurrent: number
  /** [s] */
  readonly tailTime: number
}

/**
 * Peak reverse voltage that the end of the recovery makes in the loop's inductance.
 *
 * Equation: V + L I_RM/tau_rr, the tail's steepest slope times the inductance.
 *
 * Valid for: the model's exponential tail; a snappy part exceeds it, so it is no bound. Deviations: none.
 *
 * @returns Peak reverse voltage; V where nothing recovers. [V]
 * @throws Never.
 * @see Law of induction; the tail of P. O. Lauritzen & C. L. Ma, 1991.
 * @example storedChargePeakVoltage({ voltage: 400, loopInductance: 20e-9, peakReverseCurrent: 5, tailTime: 20e-9 }) // 405.000
 */
export function storedChargePeakVoltage(input: StoredChargePeakInput): number {
  if (!(input.peakReverseCurrent > 0)) return input.voltage
  return input.voltage + (input.loopInductance * input.peakReverseCurrent) / input.tailTime
}

/** Inputs of {@link ringingPeakVoltage}. */
export interface RingingPeakInput {
  /** V, blocking voltage. [V] */
  readonly voltage: number
  /** t_fv, time in which the switch's voltage falls. [s] */
  readonly voltageFall: number
  /** L. [H] */
  readonly loopInductance: number
  /** C(v) of one part. [F] */
  readonly capacitance: JunctionCapacitance
  /** Equal parts in parallel. */
  readonly parts: number
}

/** Runge-Kutta steps per shortest natural period, and the most taken; a slower fall has an envelope instead. */
const stepsPerPeriod = 64
const mostSteps = 20_000

/**
 * Peak reverse voltage of the ringing of loop inductance and junction capacitance while the switch's voltage falls.
 *
 * Equation: L di/dt = V min(t/t_fv, 1) − v, C(v) dv/dt = i, from rest. The fall is integrated; after it nothing drives the
 * ringing, so the peak follows from L i²/2 + Ec(v) − V Qc(v) = constant, which is the peak of an integration on.
 *
 * Over more than about 300 natural periods of fall the two corners' ringing is added up as if in step (adiabatic envelope).
 *
 * Valid for: V, L > 0, any t_fv ≥ 0, m < 2. Deviations: no damping at all, so it is pessimistic; stored charge is not in it.
 *
 * @returns Peak reverse voltage; V without voltage or inductance. [V]
 * @throws Never.
 * @see Own; checked against an ODE solver of general purpose.
 * @example ringingPeakVoltage({ voltage: 400, voltageFall: 15e-9, loopInductance: 20e-9, capacitance: { kind: 'law', zeroBias: 400e-12, builtIn: 1.2, grading: 0.46 }, parts: 1 }) // 546.459
 */
export function ringingPeakVoltage(input: RingingPeakInput): number {
  const { voltage, voltageFall, loopInductance } = input
  if (!(voltage > 0)) return voltage
  const law = capacitanceLaw(input.capacitance, input.parts)
  const fastest = Math.sqrt(loopInductance * capacitanceAt({ capacitance: law, voltage: 2 * voltage }))
  // without inductance nothing rings; a junction without capacitance follows the switch and stores nothing to ring with
  if (!(fastest > 0)) return voltage
  // a fall this short moves nothing before it is over
  if (voltageFall < 1e-5 * fastest) return peakFrom(input, law, 0, 0)
  const steps = 32 + Math.ceil((stepsPerPeriod * voltageFall) / (2 * Math.PI * fastest))
  return steps > mostSteps ? slowFallPeak(input, law) : peakAfterFall(input, law, steps)
}

/** Highest voltage of the free ringing from a state: nothing drives it, so its energy against V is conserved. */
function peakFrom({ voltage, loopInductance }: RingingPeakInput, law: CapacitanceLaw, v: number, i: number): number {
  const energyAt = (u: number) =>
    capacitiveEnergy({ capacitance: law, voltage: u }) - voltage * capacitiveCharge({ capacitance: law, voltage: u })
  const energy = 0.5 * loopInductance * i * i + energyAt(Math.max(0, v))
  const missing = (u: number) => energyAt(u) - energy
  let high = 2 * voltage
  for (let n = 0; n < 60 && missing(high) < 0; n++) high *= 2
  const found = findRoot({ f: missing, low: voltage, high, tolerance: 1e-13 * voltage, maxIterations: 100 })
  return found?.root ?? voltage
}

/** Ringing of both corners of a slow fall, in step: the first grows as its energy over its frequency stays. */
function slowFallPeak({ voltage, voltageFall, loopInductance }: RingingPeakInput, law: CapacitanceLaw): number {
  const atVoltage = capacitanceAt({ capacitance: law, voltage })
  const first = Math.sqrt(loopInductance * law.zeroBias) * (law.zeroBias / atVoltage) ** 0.75
  const second = Math.sqrt(loopInductance * atVoltage)
  return voltage + (voltage / voltageFall) * (first + second)
}

/** Integrates the fall from rest by the classical Runge-Kutta method. */
function peakAfterFall(input: RingingPeakInput, law: CapacitanceLaw, steps: number): number {
  const { voltage, voltageFall, loopInductance } = input
  const h = voltageFall / steps
  const rate = voltage / voltageFall
  const charging = (v: number) => (v > 0 ? (1 + v / law.builtIn) ** law.grading : 1) / law.zeroBias
  let v = 0
  let i = 0
  for (let n = 0; n < steps; n++) {
    const drive = rate * h * n
    const half = drive + 0.5 * rate * h
    const v1 = i * charging(v)
    const i1 = (drive - v) / loopInductance
    const v2 = (i + 0.5 * h * i1) * charging(v + 0.5 * h * v1)
    const i2 = (half - v - 0.5 * h * v1) / loopInductance
    const v3 = (i + 0.5 * h * i2) * charging(v + 0.5 * h * v2)
    const i3 = (half - v - 0.5 * h * v2) / loopInductance
    const v4 = (i + h * i3) * charging(v + h * v3)
    const i4 = (drive + rate * h - v - h * v3) / loopInductance
    v += (h / 6) * (v1 + 2 * v2 + 2 * v3 + v4)
    i += (h / 6) * (i1 + 2 * i2 + 2 * i3 + i4)
  }
  return peakFrom(input, law, v, i)
}
