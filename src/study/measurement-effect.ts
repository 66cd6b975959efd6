import type { MeasurementEffect } from '../decision/measure-next.ts'
import type { CalibratedRectifier, Gaussian } from '../domain/calibrated-rectifier.ts'
import { predictedCovariance, predictedMean } from '../evidence/bayesian-update.ts'
import { forwardDesign, leakageDesign, recoveryDesigns } from '../evidence/design-rows.ts'
import { posteriorAfterRow } from '../evidence/posterior-after-row.ts'
import type { PointCondition } from './point-condition.ts'

export interface MeasurementEffectInput {
  readonly rectifier: CalibratedRectifier
  readonly property: 'recovery' | 'forward' | 'leakage'
  readonly condition: PointCondition
}

/**
 * Covariance of a property at the operating point, unit-to-unit spread included, before and after one more row of grade
 * `measured` there. The columns are those of the draws: (u, y), V_F, or ln I_R.
 */
export function measurementEffect({ rectifier, property, condition }: MeasurementEffectInput): MeasurementEffect {
  const held = rectifier[property]!
  const current = property === 'forward' ? condition.meanCurrent : condition.current
  const after = posteriorAfterRow({ rectifier, property, condition: { ...condition, current } })!
  const designs = designsOf(rectifier, property, condition)
  // Forward voltage varies from unit to unit in proportion, the others in their logarithm.
  const scale = property === 'forward' ? predictedMean(held.posterior, designs[0]!) : 1
  return {
    before: covarianceOf(held.posterior, designs, held.unitSpread * scale),
    after: covarianceOf(after.posterior, designs, after.unitSpread * scale),
  }
}

function designsOf(
  rectifier: CalibratedRectifier,
  property: MeasurementEffectInput['property'],
  at: PointCondition,
): readonly Float64Array[] {
  const { ratedCurrent, ratedVoltage } = rectifier
  if (property === 'recovery') return recoveryDesigns({ ...at, ratedCurrent })
  if (property === 'leakage') return [leakageDesign({ ratedVoltage, voltage: at.voltage, junction: at.junction })]
  return [forwardDesign({ ratedCurrent, current: at.meanCurrent, junction: at.junction, line: rectifier.forward.line })]
}

function covarianceOf(posterior: Gaussian, designs: readonly Float64Array[], unitDeviation: number): Float64Array {
  const size = designs.length
  const out = new Float64Array(size * size)
  designs.forEach((left, i) => {
    designs.forEach((right, j) => {
      out[i * size + j] = predictedCovariance(posterior, left, right) + (i === j ? unitDeviation ** 2 : 0)
    })
  })
  return out
}
