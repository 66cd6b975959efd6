import { scaledTimeToPeak } from './charge-control.ts'

/** Inputs of {@link residualRecovery}. */
export interface ResidualRecoveryInput {
  /** Slope at which the rectifier's current fell to zero by itself. [A/s] */
  readonly slopeOfDecay: number
  /** Time from that zero crossing to the turn-on of the switch. [s] */
  readonly idleTime: number
  /** |di/dt| of the turn-on. [A/s] */
  readonly slope: number
  /** Carrier lifetime. [s] */
  readonly lifetime: number
  /** Time constant of the recovery tail. [s] */
  readonly tailTime: number
  /** Charge stored at the zero crossing. [C] */
  readonly storedChargeAtZero: number
}

/** What {@link residualRecovery} writes. */
export interface ResidualRecoveryOutput {
  /** [A] */
  peakReverseCurrent: number
  /** [C] */
  charge: number
  /** From the turn-on of the switch to the peak. [s] */
  timeToPeak: number
}

/** Share of the charge at idle time 0 below which nothing is booked. [1] */
export const negligibleResidue = 0.01

/** Recovery of what is left in the rectifier after an idle time in discontinuous conduction. Writes into `out`. */
export function residualRecovery(input: ResidualRecoveryInput, out: ResidualRecoveryOutput): void {
  const { slopeOfDecay, idleTime, slope, lifetime, tailTime, storedChargeAtZero } = input
  const tail = tailTime / lifetime
  const square = lifetime * lifetime
  const timeAtOnce = lifetime * scaledTimeToPeak(0, storedChargeAtZero / (slope * square), tail)
  const chargeAtOnce = slope * timeAtOnce * (0.5 * timeAtOnce + tailTime)
  if (idleTime <= 0) {
    write(out, slope * timeAtOnce, chargeAtOnce, timeAtOnce)
    return
  }
  const softTime = lifetime * scaledTimeToPeak(0, storedChargeAtZero / (slopeOfDecay * square), tail)
  let peak: number
  let charge: number
  let time = 0
  if (idleTime <= softTime) {
    const flowing = slopeOfDecay * idleTime
    const left = chargeLeft(input)
    const crossing = -flowing / slope
    const fromCrossing = lifetime * scaledTimeToPeak(crossing / lifetime, left / (slope * square), tail)
    time = fromCrossing + crossing
    peak = slope * fromCrossing
    charge = 0.5 * time * (peak + flowing) + peak * tailTime
  } else {
    peak = slopeOfDecay * softTime * Math.exp((softTime - idleTime) / tailTime)
    charge = peak * tailTime
  }
  if (charge > 0 && charge >= negligibleResidue * chargeAtOnce) write(out, peak, charge, time)
  else write(out, 0, 0, 0)
}

/** Charge in the rectifier after `idleTime` of soft recovery. */
function chargeLeft({ slopeOfDecay, idleTime, lifetime, storedChargeAtZero }: ResidualRecoveryInput): number {
  const z = idleTime / lifetime
  const decay = Math.exp(-z)
  return Math.max(0, storedChargeAtZero * decay - slopeOfDecay * lifetime * (idleTime + lifetime * Math.expm1(-z)))
}

function write(out: ResidualRecoveryOutput, peakReverseCurrent: number, charge: number, timeToPeak: number): void {
  out.peakReverseCurrent = peakReverseCurrent
  out.charge = charge
  out.timeToPeak = timeToPeak
}
