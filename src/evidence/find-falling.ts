import type { CalibratedRectifier } from '../domain/calibrated-rectifier.ts'
import type { Caveat } from '../domain/caveat.ts'
import { referenceSlope, referenceTemperature } from '../domain/constants.ts'
import { predictedMean } from './bayesian-update.ts'
import { recoveryDesigns } from './design-rows.ts'
import { logFigure, steadyEvent } from './recovery-figures.ts'

/** Corners of the range in which the fit is looked at: shares of I0, multiples of a0, rise above T0. */
const currents = [0.25, 1]
const slopes = [1, 5]
const rises = [0, 100]

/** Slow parts saturate at tau I, where one row's rounding can turn the exponent a hair below zero: that is no contradiction. */
const noticeable = 0.05

/** Quantities with which the posterior-mean charge falls somewhere in the usual range: stored charge does not do that. */
export function findFalling(rectifier: CalibratedRectifier): Caveat[] {
  const { recovery } = rectifier
  if (recovery === null || recovery.origin === 'class-guess') return []
  const least = { current: 0, slope: 0, temperature: 0 }
  for (const current of currents) {
    for (const slope of slopes) {
      for (const rise of rises) lower(least, chargeExponents(rectifier, current, slope, referenceTemperature + rise))
    }
  }
  return (['current', 'slope', 'temperature'] as const)
    .filter((quantity) => least[quantity] < -noticeable)
    .map((quantity) => ({ code: 'evidence-falls', candidate: rectifier.id, data: { quantity } }))
}

interface Exponents {
  current: number
  slope: number
  temperature: number
}

function lower(least: Exponents, at: Readonly<Exponents>): void {
  least.current = Math.min(least.current, at.current)
  least.slope = Math.min(least.slope, at.slope)
  least.temperature = Math.min(least.temperature, at.temperature)
}

/** d ln Qrr over d ln I, d ln a and d ln T: the charge model's own dependence plus what u and y add. */
function chargeExponents(rectifier: CalibratedRectifier, share: number, multiple: number, junction: number): Exponents {
  const posterior = rectifier.recovery!.posterior
  const current = share * rectifier.ratedCurrent
  const slope = multiple * referenceSlope
  const [u, y] = recoveryDesigns({ ratedCurrent: rectifier.ratedCurrent, current, slope, junction })
  const reading = { current, slope, recoveryTimeBy: { kind: 'line-90-25' }, softnessBy: 'times' } as const
  const charge = logFigure(
    steadyEvent(reading, predictedMean(posterior, u), predictedMean(posterior, y)),
    reading,
    'charge',
  )
  const through = (index: number) =>
    charge.byLifetime * posterior.mean[index]! + charge.byRatio * posterior.mean[index + 4]!
  return { current: charge.byCurrent + through(1), slope: charge.bySlope + through(2), temperature: through(3) }
}
