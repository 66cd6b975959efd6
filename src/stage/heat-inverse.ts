import { placeSensitivity, sensitivity } from './heat-sensitivity.ts'
import type { Kernel } from './kernel.ts'

/** Closer to running away than this, estimates of the sensitivity are not used. */
const leastMargin = 0.2

/**
 * First guess of the inverse of 1 − d(heatTargets)/dT, from the estimated sensitivities of a single part; else the
 * identity, which makes the first step that of the plain fixed point.
 *
 * @returns Margin to running away: 1 far from it, 0 at the edge of stability; 0 also where it is not known.
 */
export function placeHeatInverse(kernel: Kernel, inverse: Float64Array): number {
  placeIdentity(inverse)
  if (kernel.parts > 1) return 0
  placeSensitivity(kernel)
  const { thermal } = kernel
  const { rectifier, switchByRectifier, switchOwn } = sensitivity
  const common = thermal.common * thermal.factor
  const self = thermal.junctionSelf * thermal.factor
  const sinkByRectifier = common * (rectifier + (thermal.switchOnSink ? switchByRectifier : 0))
  const a = 1 - (thermal.rectifierOnSink ? sinkByRectifier : 0) - self * rectifier
  if (!thermal.switchSolved) {
    if (a > leastMargin) inverse[0] = 1 / a
    return a
  }
  // Heat of either on the common sink warms both.
  const ownSwitch = thermal.switchSelf * thermal.factor
  const sinkBySwitch = thermal.switchOnSink ? common * switchOwn : 0
  const b = thermal.rectifierOnSink ? -sinkBySwitch : 0
  const onSink = common * ((thermal.rectifierOnSink ? rectifier : 0) + (thermal.switchOnSink ? switchByRectifier : 0))
  const c = -onSink - ownSwitch * switchByRectifier
  const d = 1 - sinkBySwitch - ownSwitch * switchOwn
  const determinant = a * d - b * c
  const margin = Math.min(a, d, determinant)
  if (margin > leastMargin) {
    inverse[0] = d / determinant
    inverse[1] = -b / determinant
    inverse[3] = -c / determinant
    inverse[4] = a / determinant
  }
  return margin
}

function placeIdentity(inverse: Float64Array): void {
  for (let k = 0; k < 9; k++) inverse[k] = k % 4 === 0 ? 1 : 0
}
