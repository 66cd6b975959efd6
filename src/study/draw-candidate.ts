import type { CandidateDraws } from '../decision/candidate-draws.ts'
import type { CalibratedRectifier, Gaussian } from '../domain/calibrated-rectifier.ts'
import { currentFloor, referenceSlope, referenceTemperature } from '../domain/constants.ts'
import type { Stage } from '../domain/stage.ts'
import { choleskyFactor } from '../numerics/cholesky.ts'
import { latinHypercube } from '../numerics/latin-hypercube.ts'
import { seededStream } from '../numerics/seeded-stream.ts'
import { nominalCoefficients } from '../stage/create-kernel.ts'
import { holdStart, settle, settleFromHeld } from '../stage/thermal-balance.ts'
import { type Candidate, placeTurnOn } from './candidate.ts'
import { type NominalPoint, stageLossOf, totalLossOf } from './nominal-point.ts'
import { conditionOf } from './point-condition.ts'

/** What the bench will really show of the stage, the same for every candidate in each draw. */
export interface StageDraws {
  readonly slope: Float64Array
  readonly voltageFall: Float64Array
  readonly thermal: Float64Array
  /** Place between the two readings of an unknown turn-on energy, uniform. */
  readonly turnOn: Float64Array
}

/**
 * A candidate's draws with its own uncertain properties at the operating point, for the sensitivity:
 * u and y of recovery, V_F, ln I_R; unit-to-unit spread included.
 */
export interface PartDraws extends CandidateDraws {
  readonly lifetimeLog: Float64Array
  readonly ratioLog: Float64Array
  readonly forward: Float64Array
  readonly leakageLog: Float64Array
}

/** Factors are log-normal around 1 with the stated relative standard deviation, so none turns negative. */
export function drawStage(stage: Stage, seed: number, draws: number): StageDraws {
  const normal = latinHypercube({ draws, dimensions: 3, stream: seededStream(seed, 'stage') })
  const turnOn = latinHypercube({
    draws,
    dimensions: 1,
    stream: seededStream(seed, 'turn-on'),
    distribution: 'uniform',
  })
  const factor = (column: Float64Array, spread: number): Float64Array => column.map((z) => Math.exp(spread * z))
  return {
    slope: factor(normal[0]!, stage.spread.slope),
    voltageFall: factor(normal[1]!, stage.spread.voltageFall),
    thermal: factor(normal[2]!, stage.spread.thermal),
    turnOn: turnOn[0]!,
  }
}

/**
 * Solves one candidate in every draw. Its stream depends on seed and id alone, so neither order nor company matters.
 * The temperature is settled anew each time; a draw without one is lost: its stage loss is infinite.
 */
export function drawCandidate(
  candidate: Candidate,
  point: NominalPoint,
  accepted: boolean,
  stageDraws: StageDraws,
  seed: number,
): PartDraws {
  const { kernel, stage, rectifier, record } = candidate
  const draws = stageDraws.slope.length
  const sampler = partSampler(rectifier, seed, draws)
  const condition = conditionOf(candidate, point)
  const basis = pointBasis(candidate, condition)
  const out: PartDraws = {
    id: record.id,
    accepted,
    nominalStageLoss: stageLossOf(candidate, point.rows),
    stageLoss: new Float64Array(draws),
    total: new Float64Array(draws),
    junction: new Float64Array(draws),
    lifetimeLog: new Float64Array(draws),
    ratioLog: new Float64Array(draws),
    forward: new Float64Array(draws),
    leakageLog: new Float64Array(draws),
  }
  const voltageFall = kernel.voltageFall
  // Every draw starts from the nominal solution, not from the draw before: it depends on itself alone.
  const settleDraw = settle(kernel) ? settleFromHeld : settle
  holdStart(kernel)
  for (let k = 0; k < draws; k++) {
    sampler(k, kernel.coefficients)
    kernel.slopeFactor = stageDraws.slope[k]!
    kernel.voltageFall = voltageFall * stageDraws.voltageFall[k]!
    kernel.thermal.factor = stageDraws.thermal[k]!
    if (candidate.turnOn !== null) placeDrawnTurnOn(candidate, stageDraws.turnOn[k]!)
    const settled = settleDraw(kernel)
    out.stageLoss[k] = settled ? stageLossOf(candidate, kernel.rows) : Number.POSITIVE_INFINITY
    out.total[k] = settled ? totalLossOf(kernel.rows) : 0
    out.junction[k] = settled ? kernel.temperatures[0]! : 0
    readFeatures(out, k, kernel.coefficients, basis)
  }
  kernel.coefficients.set(nominalCoefficients(rectifier))
  kernel.slopeFactor = 1
  kernel.voltageFall = voltageFall
  kernel.thermal.factor = 1
  if (candidate.turnOn !== null) placeTurnOn(kernel, stage, candidate.turnOn.nominal)
  return out
}

function placeDrawnTurnOn(candidate: Candidate, place: number): void {
  const { low, high } = candidate.turnOn!
  const { turnOn } = candidate.kernel
  turnOn.energy = low.energy + place * (high.energy - low.energy)
  turnOn.addedShare = low.addedShare + place * (high.addedShare - low.addedShare)
}

/** Writes draw k of all coefficients: posterior by its Cholesky factor, then the unit-to-unit spread. */
function partSampler(
  rectifier: CalibratedRectifier,
  seed: number,
  draws: number,
): (k: number, out: Float64Array) => void {
  const columns = latinHypercube({ draws, dimensions: 21, stream: seededStream(seed, 'part', rectifier.id) })
  const recovery = rectifier.recovery
  const leakage = rectifier.leakage
  const recoveryFactor = recovery === null ? null : factorOf(recovery.posterior)
  const forwardFactor = factorOf(rectifier.forward.posterior)
  const leakageFactor = leakage === null ? null : factorOf(leakage.posterior)
  return (k, out) => {
    if (recovery !== null) {
      sampleInto(out, 0, recovery.posterior, recoveryFactor!, columns, 0, k)
      out[0]! += recovery.unitSpread * columns[17]![k]!
      out[4]! += recovery.unitSpread * columns[18]![k]!
    }
    sampleInto(out, 8, rectifier.forward.posterior, forwardFactor, columns, 8, k)
    const unit = Math.max(1 + rectifier.forward.unitSpread * columns[19]![k]!, 0.05)
    for (let c = 8; c < 14; c++) out[c]! *= unit
    if (leakage !== null) {
      sampleInto(out, 14, leakage.posterior, leakageFactor!, columns, 14, k)
      out[14]! += leakage.unitSpread * columns[20]![k]!
    }
  }
}

function factorOf(posterior: Gaussian): Float64Array {
  return choleskyFactor(posterior.covariance, posterior.mean.length)
}

function sampleInto(
  out: Float64Array,
  offset: number,
  posterior: Gaussian,
  factor: Float64Array,
  columns: readonly Float64Array[],
  first: number,
  k: number,
): void {
  const size = posterior.mean.length
  for (let i = 0; i < size; i++) {
    let value = posterior.mean[i]!
    for (let j = 0; j <= i; j++) value += factor[i * size + j]! * columns[first + j]![k]!
    out[offset + i] = value
  }
}

/** The linear forms that turn coefficients into properties at the operating point. */
interface PointBasis {
  readonly logCurrent: number
  readonly logSlope: number
  readonly logTemperature: number
  readonly logMean: number
  readonly mean: number
  readonly rise: number
  readonly inverse: number
  readonly logVoltage: number
}

function pointBasis({ rectifier }: Candidate, condition: ReturnType<typeof conditionOf>): PointBasis {
  const { ratedCurrent, ratedVoltage } = rectifier
  return {
    logCurrent: Math.log(Math.max(condition.current / ratedCurrent, currentFloor)),
    logSlope: Math.log(condition.slope / referenceSlope),
    logTemperature: Math.log(condition.junction / referenceTemperature),
    logMean: Math.log(Math.max(condition.meanCurrent / ratedCurrent, currentFloor)),
    mean: condition.meanCurrent / ratedCurrent,
    rise: condition.junction - referenceTemperature,
    inverse: 1 / referenceTemperature - 1 / condition.junction,
    logVoltage: Math.log(condition.voltage / ratedVoltage),
  }
}

function readFeatures(out: PartDraws, k: number, c: Float64Array, b: PointBasis): void {
  out.lifetimeLog[k] = c[0]! + c[1]! * b.logCurrent + c[2]! * b.logSlope + c[3]! * b.logTemperature
  out.ratioLog[k] = c[4]! + c[5]! * b.logCurrent + c[6]! * b.logSlope + c[7]! * b.logTemperature
  const cold = c[8]! + c[9]! * b.logMean + c[10]! * b.mean
  out.forward[k] = cold + b.rise * (c[11]! + c[12]! * b.logMean + c[13]! * b.mean)
  out.leakageLog[k] = c[14]! + c[15]! * b.inverse + c[16]! * b.logVoltage
}
