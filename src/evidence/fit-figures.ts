import type { RampFigures, RecoveryPoint } from './invert-pair.ts'
import { type FigureName, type LogFigure, logFigure, type RampReading, steadyEvent } from './recovery-figures.ts'

/** (u, y) from two or more figures of a row, with the covariance that their reading errors leave. */
export interface FittedFigures {
  readonly point: RecoveryPoint
  /** Of (u, y), by rows. */
  readonly covariance: readonly [number, number, number, number]
  /** Sum of squared residuals in standard deviations. */
  readonly misfit: number
}

/** Relative errors of a row. */
export interface FigureErrors {
  readonly figures: Readonly<Record<FigureName, number>>
  /** sd of ln of the current and of the slope at which it was read. */
  readonly current: number
  readonly slope: number
}

const mostSteps = 100
/** Steps of (u, y) shorter than this have the misfit too flat to tell better from worse. */
const shortStep = 1e-4
/** Share of the misfit that its rounding may be, generously: it is a sum of squares of small differences of logarithms. */
const misfitRounding = 1e-6

/**
 * Weighted least squares over the logarithms of the figures, by Gauss-Newton steps that are halved until they help.
 * It goes on to a step that rounding alone keeps from shrinking: a misfit is flat at its least, and a fit that stopped
 * there would be half the digits off, differently on every machine.
 * Two figures are met exactly. The errors of current and slope are common to all figures, so they do not weigh the fit
 * but are carried through it.
 */
export function fitFigures(input: {
  readonly reading: RampReading
  readonly figures: RampFigures
  readonly names: readonly FigureName[]
  readonly errors: FigureErrors
  readonly start: RecoveryPoint
}): FittedFigures {
  let at = evaluate(input, input.start)
  if (input.names.length > 2) {
    for (let iteration = 0; iteration < mostSteps; iteration++) {
      const next = improved(input, at)
      if (next === null) break
      at = next
    }
  }
  return { point: at.point, covariance: covarianceAt(input.names, at, input.errors), misfit: at.misfit }
}

type FitInput = Parameters<typeof fitFigures>[0]

interface Evaluation {
  readonly point: RecoveryPoint
  readonly logs: readonly LogFigure[]
  readonly misfit: number
  /** Normal matrix J' W J. */
  readonly normal: readonly [number, number, number]
  /** Gauss-Newton step of (u, y) from here. */
  readonly step: readonly [number, number]
}

/** Misfit of a point in squared standard deviations, with the normal equations there and the step that they ask for. */
function evaluate({ reading, figures, names, errors }: FitInput, point: RecoveryPoint): Evaluation {
  const event = steadyEvent(reading, point.lifetime, point.ratio)
  const logs = names.map((name) => logFigure(event, reading, name))
  let misfit = 0
  let uu = 0
  let uy = 0
  let yy = 0
  let ru = 0
  let ry = 0
  for (let index = 0; index < names.length; index++) {
    const name = names[index]!
    const log = logs[index]!
    const weight = errors.figures[name] ** -2
    const residual = Math.log(figures[name]!) - log.value
    misfit += weight * residual * residual
    uu += weight * log.byLifetime * log.byLifetime
    uy += weight * log.byLifetime * log.byRatio
    yy += weight * log.byRatio * log.byRatio
    ru += weight * log.byLifetime * residual
    ry += weight * log.byRatio * residual
  }
  const determinant = uu * yy - uy * uy
  const step = [limited((yy * ru - uy * ry) / determinant), limited((uu * ry - uy * ru) / determinant)] as const
  return { point, logs, misfit, normal: [uu, uy, yy], step }
}

/** One step down the misfit; null when there is nothing left to gain. */
function improved(input: FitInput, at: Evaluation): Evaluation | null {
  const [stepLifetime, stepRatio] = at.step
  const length = lengthOf(at)
  for (let part = 1; part > 1e-3; part *= 0.5) {
    const tried = evaluate(input, {
      lifetime: at.point.lifetime + part * stepLifetime,
      ratio: at.point.ratio + part * stepRatio,
    })
    const helps =
      length < shortStep
        ? lengthOf(tried) < length && tried.misfit <= at.misfit * (1 + misfitRounding)
        : tried.misfit < at.misfit
    if (helps) return tried
  }
  return null
}

function lengthOf({ step }: Evaluation): number {
  return Math.abs(step[0]) + Math.abs(step[1])
}

/** A longer step than this only leaves the range in which the model means something. */
function limited(step: number): number {
  return Math.min(Math.max(step, -2), 2)
}

function covarianceAt(names: readonly FigureName[], at: Evaluation, errors: FigureErrors): FittedFigures['covariance'] {
  const [uu, uy, yy] = at.normal
  const determinant = uu * yy - uy * uy
  const inverse = [yy / determinant, -uy / determinant, uu / determinant] as const
  const covariance: [number, number, number, number] = [inverse[0], inverse[1], inverse[1], inverse[2]]
  addCommon(covariance, inverse, names, at.logs, errors, (log) => log.byCurrent * errors.current)
  addCommon(covariance, inverse, names, at.logs, errors, (log) => log.bySlope * errors.slope)
  return covariance
}

/** Adds what one error common to all figures does to (u, y): (J' W J)⁻¹ J' W times its effect on the figures. */
function addCommon(
  covariance: [number, number, number, number],
  inverse: readonly [number, number, number],
  names: readonly FigureName[],
  logs: readonly LogFigure[],
  errors: FigureErrors,
  effect: (log: LogFigure) => number,
): void {
  let right = 0
  let rightRatio = 0
  for (const [index, log] of logs.entries()) {
    const weight = errors.figures[names[index]!] ** -2
    right += weight * log.byLifetime * effect(log)
    rightRatio += weight * log.byRatio * effect(log)
  }
  const lifetime = inverse[0] * right + inverse[1] * rightRatio
  const ratio = inverse[1] * right + inverse[2] * rightRatio
  covariance[0] += lifetime * lifetime
  covariance[1] += lifetime * ratio
  covariance[2] += lifetime * ratio
  covariance[3] += ratio * ratio
}
