import { invertPair, type RampFigures } from './invert-pair.ts'
import { type FigureName, logFigure, type RampReading, steadyEvent } from './recovery-figures.ts'

/** Charge and product may always differ by this much: the last digit of what was multiplied. */
const computedWithin = 0.005

/**
 * Whether the charge is only trr × I_RM/2, as many sheets compute it: equal within the last printed digit of the charge.
 */
export function chargeIsComputed({ recoveryTime, peakReverseCurrent, charge }: RampFigures): boolean {
  if (recoveryTime === null || peakReverseCurrent === null || charge === null) return false
  const product = (recoveryTime * peakReverseCurrent) / 2
  return Math.abs(charge - product) <= Math.max(computedWithin * charge, Math.min(halfLastDigit(charge), 0.03 * charge))
}

/** Half of the last digit that the number was printed with, seven digits at most. */
function halfLastDigit(value: number): number {
  const [mantissa, exponent] = value.toExponential(6).split('e')
  const digits = mantissa!.replace(/0+$/, '').replace('.', '').length
  return 0.5 * 10 ** (Number(exponent) + 1 - digits)
}

/** Pairs that predict the third figure, the steadier first. */
const chargeFrom: readonly (readonly [FigureName, FigureName])[] = [
  ['recoveryTime', 'peakReverseCurrent'],
  ['recoveryTime', 'softness'],
  ['peakReverseCurrent', 'softness'],
]

/** Largest relative difference between a third figure and what two others give; 0 where there is no third. */
export function disagreement(reading: RampReading, figures: RampFigures, names: readonly FigureName[]): number {
  const pair =
    names.includes('charge') && chargeFrom.find(([first, second]) => names.includes(first) && names.includes(second))
  const charge = pair ? missBy(reading, figures, pair, 'charge') : 0
  const peakToo = names.includes('recoveryTime') && names.includes('softness') && names.includes('peakReverseCurrent')
  return peakToo
    ? Math.max(charge, missBy(reading, figures, ['recoveryTime', 'softness'], 'peakReverseCurrent'))
    : charge
}

function missBy(
  reading: RampReading,
  figures: RampFigures,
  [first, second]: readonly [FigureName, FigureName],
  third: FigureName,
): number {
  const point = invertPair(reading, figures, first, second)
  if (point === null) return 0
  const predicted = logFigure(steadyEvent(reading, point.lifetime, point.ratio), reading, third).value
  return Math.abs(Math.expm1(Math.log(figures[third]!) - predicted))
}
