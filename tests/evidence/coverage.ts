import { predictedCovariance, predictedMean } from '../../src/evidence/bayesian-update.ts'
import { calibrate } from '../../src/evidence/calibrate.ts'
import { recoveryDesigns } from '../../src/evidence/design-rows.ts'
import { choleskyFactor } from '../../src/numerics/cholesky.ts'
import { normalQuantile } from '../../src/numerics/normal-quantile.ts'
import { quantile } from '../../src/numerics/quantile.ts'
import { seededStream } from '../../src/numerics/seeded-stream.ts'
import { eventCharge, lumpedFigures } from './lumped.ts'
import type { World } from './worlds.ts'

/** 5th and 95th percentile of what one event costs at the world's condition, for one unit. */
function eventInterval(world: World, draws: number): { readonly low: number; readonly high: number } {
  const { rectifier } = calibrate({ record: world.record, blockingVoltage: world.blockingVoltage })
  const { posterior, unitSpread } = rectifier.recovery!
  const [u, y] = recoveryDesigns({ ...world.condition, ratedCurrent: rectifier.ratedCurrent })
  const cross = predictedCovariance(posterior, u, y)
  const unit = unitSpread * unitSpread
  const covariance = Float64Array.of(
    predictedCovariance(posterior, u, u) + unit,
    cross,
    cross,
    predictedCovariance(posterior, y, y) + unit,
  )
  const factor = choleskyFactor(covariance, 2)
  const stream = seededStream('interval', draws)
  const costs = new Float64Array(draws)
  for (let index = 0; index < draws; index++) {
    const first = normalQuantile(stream.uniform())
    const second = normalQuantile(stream.uniform())
    const lifetime = predictedMean(posterior, u) + factor[0]! * first
    const ratio = predictedMean(posterior, y) + factor[2]! * first + factor[3]! * second
    costs[index] = eventCharge(world.condition, lumpedFigures(world.condition, lifetime, ratio))
  }
  return { low: quantile(costs, 0.05), high: quantile(costs, 0.95) }
}

/** Share of worlds whose truth lies inside the 90 % interval, and the median of high over low. */
export function coverageOf(worlds: readonly World[], draws = 400): { readonly inside: number; readonly ratio: number } {
  let inside = 0
  const ratios = new Float64Array(worlds.length)
  for (const [index, world] of worlds.entries()) {
    const { low, high } = eventInterval(world, draws)
    const truth = eventCharge(world.condition, world.figures)
    if (truth >= low && truth <= high) inside += 1
    ratios[index] = high / low
  }
  return { inside: inside / worlds.length, ratio: quantile(ratios, 0.5) }
}
