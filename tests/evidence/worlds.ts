import type { CalibratedRectifier } from '../../src/domain/calibrated-rectifier.ts'
import { referenceSlope, referenceTemperature } from '../../src/domain/constants.ts'
import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import { predictedMean } from '../../src/evidence/bayesian-update.ts'
import { classPriors } from '../../src/evidence/class-priors.ts'
import { forwardDesign, leakageDesign, recoveryDesigns } from '../../src/evidence/design-rows.ts'
import { gradeErrors } from '../../src/evidence/grades.ts'
import { invertPair } from '../../src/evidence/invert-pair.ts'
import { priorGaussians } from '../../src/evidence/prior-gaussians.ts'
import { type Drawing, drawing } from './drawing.ts'
import { type Condition, type Figures, lumpedFigures } from './lumped.ts'
import { forwardRow, kelvin, leakageRow, record } from './records.ts'
import { readRow, type Setting, settingOf, type WorldOptions } from './world-rows.ts'

/** A part whose truth is known, and the record that an engineer would have of it. */
export interface World {
  readonly record: RectifierRecord
  /** Where the part is used; rows were read at other reverse voltages. [V] */
  readonly blockingVoltage: number
  /** An operating condition: 60 to 110 °C, one to six times the reference slope. */
  readonly condition: Condition
  /** What the engineer's own unit does there, from the steady state. */
  readonly figures: Figures
  /** V_F of the own unit. [V] */
  readonly dropAt: (current: number, junction: number) => number
  /** Leakage of the own unit. [A] */
  readonly leakageAt: (voltage: number, junction: number) => number
  /** The own unit as a rectifier without doubt; true at `condition` and, in prior worlds, everywhere. */
  readonly truth: CalibratedRectifier
}

const ratedVoltage = 600

/** A world drawn from the stated priors: coefficients, unit, voltage dependence of y, reading errors. */
export function priorWorld(options: WorldOptions): World {
  const draw = drawing('prior', options.seed, options.index)
  const setting = settingOf(options, draw)
  const coefficients = draw.from(priorGaussians(setting.class).recovery!)
  const perLnVoltage = 0.1 * draw.normal()
  const point = (condition: Condition) => {
    const [u, y] = recoveryDesigns({ ...condition, ratedCurrent: setting.ratedCurrent })
    return {
      u: predictedMean({ mean: coefficients, covariance: noDoubt(8) }, u),
      y: predictedMean({ mean: coefficients, covariance: noDoubt(8) }, y),
    }
  }
  const population = (condition: Condition, voltage: number) => {
    const { u, y } = point(condition)
    return lumpedFigures(condition, u, y + perLnVoltage * Math.log(voltage / setting.blockingVoltage))
  }
  const unit = gradeErrors.typical.recovery.unit
  const unitLifetime = unit * draw.normal()
  const unitRatio = unit * draw.normal()
  const own = point(setting.condition)
  const truth = coefficients.slice()
  truth[0] = truth[0]! + unitLifetime
  truth[4] = truth[4]! + unitRatio
  return complete(
    setting,
    draw,
    population,
    lumpedFigures(setting.condition, own.u + unitLifetime, own.y + unitRatio),
    truth,
  )
}

/**
 * A rough world: charge and peak are power laws of I, a and T that are none of the tool's models. The exponents spread
 * around published ratios (Qrr ×1.9 to ×2.9 from 25 to 125 °C, exponent 0.3 in a; PHYSICS section 3).
 */
export function roughWorld(options: WorldOptions): World {
  const draw = drawing('rough', options.seed, options.index)
  const setting = settingOf(options, draw)
  const prior = classPriors[setting.class].recovery!
  const atReference = { current: setting.ratedCurrent, slope: referenceSlope, junction: referenceTemperature }
  const base = lumpedFigures(
    atReference,
    Math.log(prior.lifetime[0]) + prior.lifetime[1] * draw.normal(),
    prior.ratio[0] + prior.ratio[1] * draw.normal(),
  )
  const exponents = { current: draw.between(0.3, 0.65), slope: draw.between(0.2, 0.5), heat: draw.between(2.2, 3.7) }
  // a triangle of fixed softness has I_RM ∝ sqrt(Qrr a); real parts stray from it
  const peak = {
    current: exponents.current / 2 + 0.05 * draw.normal(),
    slope: (1 + exponents.slope) / 2 + 0.05 * draw.normal(),
    heat: exponents.heat / 2 + 0.2 * draw.normal(),
  }
  const population = (condition: Condition): Figures => {
    const charge = base.charge * power(condition, atReference, exponents)
    const peakReverseCurrent = Math.min(
      base.peakReverseCurrent * power(condition, atReference, peak),
      0.95 * Math.sqrt(2 * charge * condition.slope),
    )
    return { charge, peakReverseCurrent, recoveryTime: (2 * charge) / peakReverseCurrent }
  }
  const unit = gradeErrors.typical.recovery.unit
  const centre = population(setting.condition)
  const chargeOfUnit = centre.charge * Math.exp(1.3 * unit * draw.normal())
  const own = {
    ...centre,
    charge: chargeOfUnit,
    peakReverseCurrent: centre.peakReverseCurrent * Math.sqrt(chargeOfUnit / centre.charge),
  }
  return complete(setting, draw, population, own, pointCoefficients(setting.condition, own))
}

/** The record: typical rows read off with the stated errors, forward and leakage rows too. */
function complete(
  setting: Setting,
  draw: Drawing,
  population: (condition: Condition, voltage: number) => Figures,
  own: Figures,
  ownCoefficients: Float64Array,
): World {
  const { ratedCurrent } = setting
  const recovery = Array.from({ length: setting.rows }, (_, index) => readRow(setting, draw, population, index))
  const priors = priorGaussians(setting.class)
  const forward = draw.from(priors.forward)
  const leakage = draw.from(priors.leakage ?? { mean: new Float64Array(3), covariance: noDoubt(3) })
  const centreDrop = (current: number, junction: number) =>
    predictedMean(
      { mean: forward, covariance: noDoubt(6) },
      forwardDesign({ ratedCurrent, current, junction, line: false }),
    )
  const centreLeakage = (voltage: number, junction: number) =>
    Math.exp(
      predictedMean({ mean: leakage, covariance: noDoubt(3) }, leakageDesign({ ratedVoltage, voltage, junction })),
    )
  const forwardUnit = Math.exp(gradeErrors.typical.forward.unit * draw.normal())
  const leakageUnit = gradeErrors.typical.leakage.unit * draw.normal()
  const junctions = [kelvin(25), kelvin(125)]
  const forwardRows = junctions.map((junction) =>
    forwardRow({
      current: ratedCurrent,
      junction,
      drop: centreDrop(ratedCurrent, junction) * (1 + gradeErrors.typical.forward.reading * draw.normal()),
    }),
  )
  const leakageRows = junctions.map((junction) =>
    leakageRow({
      voltage: ratedVoltage,
      junction,
      current: centreLeakage(ratedVoltage, junction) * draw.misread(gradeErrors.typical.leakage.reading),
    }),
  )
  const ownLeakage = leakage.slice()
  ownLeakage[0] = ownLeakage[0]! + leakageUnit
  return {
    record: record({
      id: `world-part`,
      class: setting.class,
      ratings: { reverseVoltage: ratedVoltage, averageCurrent: ratedCurrent, junction: kelvin(175) },
      recovery,
      forward: forwardRows,
      leakage: leakageRows,
      capacitance: { kind: 'law', zeroBias: 30e-12 * ratedCurrent, builtIn: 0.8, grading: 0.46 },
    }),
    blockingVoltage: setting.blockingVoltage,
    condition: setting.condition,
    figures: own,
    dropAt: (current, junction) => centreDrop(current, junction) * forwardUnit,
    leakageAt: (voltage, junction) => centreLeakage(voltage, junction) * Math.exp(leakageUnit),
    truth: {
      id: 'world-part',
      class: setting.class,
      storesCharge: true,
      ratedCurrent,
      ratedVoltage,
      recovery: { posterior: { mean: ownCoefficients, covariance: noDoubt(8) }, unitSpread: 0, origin: 'given' },
      forward: {
        posterior: { mean: forward.map((c) => c * forwardUnit), covariance: noDoubt(6) },
        unitSpread: 0,
        line: false,
        origin: 'given',
      },
      leakage: priors.leakage && {
        posterior: { mean: ownLeakage, covariance: noDoubt(3) },
        unitSpread: 0,
        origin: 'given',
        maximumShift: 0,
      },
      capacitance: { kind: 'law', zeroBias: 30e-12 * ratedCurrent, builtIn: 0.8, grading: 0.46 },
      maximumRecoveryShift: null,
      softnessKnown: true,
    },
  }
}

/** Coefficients of a rectifier that shows these figures at every condition; right at one. */
function pointCoefficients(condition: Condition, figures: Figures): Float64Array {
  const reading = { ...condition, recoveryTimeBy: { kind: 'line-90-25' }, softnessBy: 'times' } as const
  const point = invertPair(reading, { ...figures, softness: null }, 'charge', 'peakReverseCurrent')!
  return Float64Array.of(point.lifetime, 0, 0, 0, point.ratio, 0, 0, 0)
}

interface Exponents {
  readonly current: number
  readonly slope: number
  readonly heat: number
}

function power(at: Condition, reference: Condition, exponents: Exponents): number {
  return (
    (at.current / reference.current) ** exponents.current *
    (at.slope / reference.slope) ** exponents.slope *
    (at.junction / reference.junction) ** exponents.heat
  )
}

function noDoubt(size: number): Float64Array {
  return new Float64Array(size * size)
}
