import type { CalibratedRectifier, Gaussian } from '../domain/calibrated-rectifier.ts'
import { conditioned, type Observation, predictedMean } from './bayesian-update.ts'
import { forwardDesign, leakageDesign, recoveryDesigns } from './design-rows.ts'
import { fitFigures } from './fit-figures.ts'
import { gradeErrors, type Property } from './grades.ts'
import type { RampReading } from './recovery-figures.ts'

/** Where a row would be measured. */
export interface MeasuringCondition {
  /** Recovery: current at turn-off; forward: current. [A] */
  readonly current: number
  /** Recovery only. [A/s] */
  readonly slope: number
  /** [K] */
  readonly junction: number
  /** Leakage: reverse voltage. Recovery is taken to be measured at the voltage of use. [V] */
  readonly voltage: number
}

/** What the doubt would be with one more `measured` row. The mean is left: nobody knows the value yet. */
export interface PosteriorAfterRow {
  readonly posterior: Gaussian
  readonly unitSpread: number
}

/**
 * Covariance of a property's coefficients if one more `measured` row were added: for recovery trr and Qrr together, for
 * forward V_F, for leakage I_R. In linear regression it does not depend on the value that will be read; what the errors
 * of trr and Qrr do to (u, y) is taken at the posterior mean. Null where the part does not have the property.
 */
export function posteriorAfterRow(input: {
  readonly rectifier: CalibratedRectifier
  readonly property: Property
  readonly condition: MeasuringCondition
}): PosteriorAfterRow | null {
  const held = input.rectifier[input.property]
  if (held === null) return null
  const observation = observationOf(input.rectifier, held.posterior, input.property, input.condition)
  const { covariance } = conditioned(held.posterior, [observation])
  return {
    posterior: { mean: held.posterior.mean.slice(), covariance },
    unitSpread: Math.min(held.unitSpread, gradeErrors.measured[input.property].unit),
  }
}

function observationOf(
  rectifier: CalibratedRectifier,
  posterior: Gaussian,
  property: Property,
  at: MeasuringCondition,
): Observation {
  const { reading } = gradeErrors.measured[property]
  switch (property) {
    case 'recovery':
      return recoveryObservation(rectifier, posterior, at, reading)
    case 'forward': {
      const { ratedCurrent } = rectifier
      const design = forwardDesign({
        ratedCurrent,
        current: at.current,
        junction: at.junction,
        line: rectifier.forward.line,
      })
      const drop = predictedMean(posterior, design)
      return { designs: [design], values: [drop], noise: [(reading * drop) ** 2] }
    }
    case 'leakage': {
      const design = leakageDesign({ ratedVoltage: rectifier.ratedVoltage, voltage: at.voltage, junction: at.junction })
      return { designs: [design], values: [predictedMean(posterior, design)], noise: [reading * reading] }
    }
  }
}

function recoveryObservation(
  rectifier: CalibratedRectifier,
  posterior: Gaussian,
  at: MeasuringCondition,
  error: number,
): Observation {
  const designs = recoveryDesigns({ ...at, ratedCurrent: rectifier.ratedCurrent })
  const start = { lifetime: predictedMean(posterior, designs[0]), ratio: predictedMean(posterior, designs[1]) }
  const reading: RampReading = {
    current: at.current,
    slope: at.slope,
    recoveryTimeBy: { kind: 'line-90-25' },
    softnessBy: 'times',
  }
  const { covariance } = fitFigures({
    reading,
    figures: unknownFigures,
    names: ['recoveryTime', 'charge'],
    errors: {
      figures: { recoveryTime: error, charge: error, peakReverseCurrent: error, softness: error },
      current: 0,
      slope: 0,
    },
    start,
  })
  return { designs, values: [start.lifetime, start.ratio], noise: covariance }
}

/** The covariance of an exact pair does not depend on its values; these stand where values would. */
const unknownFigures = { recoveryTime: 1, charge: 1, peakReverseCurrent: null, softness: null }
