import { meaningless } from './meaningless.ts'
import { scaledTimeToPeak } from './ramp-root.ts'

/** Inputs of {@link residualRecovery}. */
export interface ResidualRecoveryInput {
  /** m, slope at which the rectifier's current fell to zero by itself. [A/s] */
  readonly slopeOfDecay: number
  /** t_i, from that zero crossing to the turn-on of the switch. [s] */
  readonly idleTime: number
  /** a, |di/dt| of the turn-on. [A/s] */
  readonly slope: number
  /** tau, carrier lifetime. [s] */
  readonly lifetime: number
  /** tau_rr, time constant of the recovery tail. [s] */
  readonly tailTime: number
  /** q0, charge stored at the zero crossing. [C] */
  readonly storedChargeAtZero: number
}

/** What {@link residualRecovery} writes; all exactly 0 where nothing worth booking is left. */
export interface ResidualRecoveryOutput {
  /** I_RM. [A] */
  peakReverseCurrent: number
  /** q_r, charge that flows after the switch has turned on. [C] */
  charge: number
  /** T1, from the turn-on of the switch to the peak; 0 where the junction has already emptied. [s] */
  timeToPeak: number
}

/** Share of the charge at idle time 0 below which nothing is booked. [1] */
const negligibleResidue = 0.01

/**
 * Hard recovery of what is left in the rectifier in discontinuous conduction, after it has recovered softly into the inductor.
 *
 * Equation: with ta,s the time to the peak at slope m from I = 0: for t_i ≤ ta,s the ramp event from I = −m t_i with the charge
 * left, q_r = (I_RM² − i_s²)/(2a) + I_RM tau_rr; later I_RM = m ta,s exp(−(t_i − ta,s)/tau_rr), q_r = I_RM tau_rr.
 * All three outputs are exactly 0 where q_r is below 1 % of its own value at t_i = 0.
 *
 * Valid for: m, a, tau > 0, 0 < tau_rr ≤ tau, q0 ≥ 0; t_i = 0 is the continuous event with I = 0, without a jump.
 * Deviations: own extension of the ramp event, verified against an ODE; the node's ringing in the idle time is not in it.
 *
 * @returns `out`, which it has written.
 * @throws RangeError when slope, slopeOfDecay, lifetime or tailTime is not positive or the charge is negative.
 * @see P. O. Lauritzen & C. L. Ma, IEEE Trans. Power Electronics 6(2), 1991, 188-191, for the rectifier's equations.
 * @example residualRecovery({ slopeOfDecay: 5 / 3e-6, idleTime: 279.3e-9, slope: 300e6, lifetime: 400e-9, tailTime: 120e-9, storedChargeAtZero: 265.413e-9 }, { peakReverseCurrent: 0, charge: 0, timeToPeak: 0 }).charge // 5.58901e-8
 */
export function residualRecovery(input: ResidualRecoveryInput, out: ResidualRecoveryOutput): ResidualRecoveryOutput {
  check(input)
  const { slopeOfDecay, idleTime, slope, lifetime, tailTime, storedChargeAtZero } = input
  const tail = tailTime / lifetime
  const scaledCharge = storedChargeAtZero / (lifetime * lifetime)
  const timeAtOnce = lifetime * scaledTimeToPeak(0, scaledCharge / slope, tail)
  const chargeAtOnce = slope * timeAtOnce * (0.5 * timeAtOnce + tailTime)
  if (idleTime <= 0) return write(out, slope * timeAtOnce, chargeAtOnce, timeAtOnce)
  const softTime = lifetime * scaledTimeToPeak(0, scaledCharge / slopeOfDecay, tail)
  let peak: number
  let charge: number
  let time = 0
  if (idleTime <= softTime) {
    const flowing = slopeOfDecay * idleTime
    const crossing = -flowing / slope
    const left = chargeLeft(input) / (slope * lifetime * lifetime)
    const fromCrossing = lifetime * scaledTimeToPeak(crossing / lifetime, left, tail)
    time = fromCrossing + crossing
    peak = slope * fromCrossing
    charge = 0.5 * time * (peak + flowing) + peak * tailTime
  } else {
    peak = slopeOfDecay * softTime * Math.exp((softTime - idleTime) / tailTime)
    charge = peak * tailTime
  }
  return charge >= negligibleResidue * chargeAtOnce ? write(out, peak, charge, time) : write(out, 0, 0, 0)
}

/** q_s: charge after the idle time; a rounding below zero is cut off. */
function chargeLeft({ slopeOfDecay, idleTime, lifetime, storedChargeAtZero }: ResidualRecoveryInput): number {
  const z = idleTime / lifetime
  const taken = slopeOfDecay * lifetime * (idleTime + lifetime * Math.expm1(-z))
  return Math.max(0, storedChargeAtZero * Math.exp(-z) - taken)
}

function write(out: ResidualRecoveryOutput, peak: number, charge: number, time: number): ResidualRecoveryOutput {
  out.peakReverseCurrent = peak
  out.charge = charge
  out.timeToPeak = time
  return out
}

function check({ slopeOfDecay, slope, lifetime, tailTime, storedChargeAtZero }: ResidualRecoveryInput): void {
  if (!(slopeOfDecay > 0)) throw meaningless('residualRecovery', 'slopeOfDecay', slopeOfDecay)
  if (!(slope > 0)) throw meaningless('residualRecovery', 'slope', slope)
  if (!(lifetime > 0)) throw meaningless('residualRecovery', 'lifetime', lifetime)
  if (!(tailTime > 0 && tailTime <= lifetime)) throw meaningless('residualRecovery', 'tailTime', tailTime)
  if (!(storedChargeAtZero >= 0)) throw meaningless('residualRecovery', 'storedChargeAtZero', storedChargeAtZero)
}
