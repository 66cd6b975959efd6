import type { Stage } from '../../src/domain/stage.ts'
import type { Kernel, row } from '../../src/stage/kernel.ts'
import {
  bisect,
  drop,
  type Event,
  hardEvent,
  leakage,
  lifetimes,
  type Part,
  residualEvent,
  storedCharge,
} from './by-hand.ts'
import { sampledMean } from './sampled-period.ts'

/** A mains boost at one angle of the line, by the dc form (PHYSICS 4). */
export interface Angle {
  readonly vin: number
  readonly mean: number
  readonly duty: number
  /** Share of the period in which the rectifier conducts. */
  readonly share: number
  readonly valley: number
  readonly peak: number
  readonly discontinuous: boolean
}

export interface LineInput {
  readonly at: Stage
  readonly part: Part
  readonly junction: number
  /** Hot. [Ω] */
  readonly onResistance: number
  readonly angles: number
}

export function angleAt(
  { at, part, junction, onResistance: on }: LineInput,
  mains: number,
  crest: number,
  angle: number,
): Angle {
  const { inductance, resistance: coil } = at.inductor
  const vo = at.output.voltage
  const vin = Math.SQRT2 * mains * Math.sin(angle)
  const mean = crest * Math.sin(angle)
  const forward = Math.max(drop(part, mean, junction), 0)
  const duty = (vo + forward + mean * coil - vin) / (vo + forward - mean * on)
  const ripple = ((vin - mean * (on + coil)) * duty) / (inductance * at.frequency)
  if (mean >= ripple / 2)
    return {
      vin,
      mean,
      duty,
      share: 1 - duty,
      valley: mean - ripple / 2,
      peak: mean + ripple / 2,
      discontinuous: false,
    }
  const rising = vin - mean * (on + coil)
  const falling = vo + forward - vin + mean * coil
  const peak = Math.sqrt((2 * mean) / (inductance * at.frequency * (1 / rising + 1 / falling)))
  const scale = peak * inductance * at.frequency
  return { vin, mean, duty: scale / rising, share: scale / falling, valley: 0, peak, discontinuous: true }
}

/** Mean over a quarter of the line period, by the midpoint rule. */
function lineMean(angles: number, f: (angle: number) => number): number {
  let sum = 0
  for (let k = 0; k < angles; k++) sum += f(((k + 0.5) / angles) * (Math.PI / 2))
  return sum / angles
}

/** Crest of the inductor current with which the mean rectifier current is the output's. [A] */
export function crestOf(input: LineInput, mains: number): number {
  const { voltage, current } = input.at.output
  const lossFree = (Math.SQRT2 * voltage * current) / mains
  const short = (crest: number): number =>
    current -
    lineMean(2000, (angle) => {
      const { valley, peak, share } = angleAt(input, mains, crest, angle)
      return ((valley + peak) / 2) * share
    })
  return bisect(short, lossFree * 0.5, lossFree * 1.5)
}

function eventAt({ at, part, junction }: LineInput, here: Angle): Event {
  const slope = (at.switch.slope as { slope: number }).slope
  const { tau, tail } = lifetimes(part, here.valley, slope, junction)
  const charge = storedCharge(here.peak, here.valley, here.share / at.frequency, tau)
  const [voltage, voltageFall] = [at.output.voltage, at.switch.voltageFall]
  if (!here.discontinuous) return hardEvent({ current: here.valley, slope, tau, tail, charge }, voltage, voltageFall)
  const idle = Math.max(1 - here.duty - here.share, 0) / at.frequency
  const decay = (here.peak * at.frequency) / here.share
  return residualEvent({ decay, idle, slope, tau, tail, charge, voltage, voltageFall })
}

/** Half-cycle means of every row that varies over the line. [W] */
export function lineRows(
  input: LineInput,
  mains: number,
  { part: { capacitiveCharge, chargingCost } }: Kernel,
): Record<string, number> {
  const { at, part, junction, onResistance: on } = input
  const crest = crestOf(input, mains)
  const f = at.frequency
  const voltage = at.output.voltage
  const slope = (at.switch.slope as { slope: number }).slope
  const sums: Record<string, number> = {}
  const add = (key: string, value: number): void => {
    sums[key] = (sums[key] ?? 0) + value / input.angles
  }
  lineMean(input.angles, (angle) => {
    const here = angleAt(input, mains, crest, angle)
    const { valley, peak, duty, share } = here
    const square = (valley * valley + valley * peak + peak * peak) / 3
    const event = part.stores ? eventAt(input, here) : { charge: 0, rectifier: 0, switchAdded: 0 }
    add('conduction', sampledMean(peak, valley, (i) => drop(part, i, junction) * i, 60) * share)
    add('recoveryRectifier', event.rectifier * f)
    add('recoverySwitch', event.switchAdded * f)
    add('capacitive', chargingCost * Math.max(0, 1 - event.charge / capacitiveCharge) * f)
    const idle = voltage - here.vin
    const idleLoss = idle * leakage(part, idle, junction) * Math.max(1 - duty - share, 0)
    add('leakage', voltage * leakage(part, voltage, junction) * duty + (here.discontinuous ? idleLoss : 0))
    add('switchConduction', square * duty * on)
    add('inductor', square * (duty + share) * at.inductor.resistance)
    add('turnOnBase', ((voltage * valley) / 2) * (valley / slope + at.switch.voltageFall) * f)
    add('turnOff', ((voltage * peak) / 2) * 22e-9 * f)
    return 0
  })
  sums.meanRectifierCurrent = at.output.current
  return sums
}

export type RowName = keyof typeof row
