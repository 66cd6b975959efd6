import type { CalibratedRectifier, Gaussian } from '../domain/calibrated-rectifier.ts'
import type { Caveat } from '../domain/caveat.ts'
import { celsiusZero, referenceTemperature } from '../domain/constants.ts'
import type { RectifierClass, RectifierRecord } from '../domain/rectifier.ts'
import { capacitiveCharge } from '../models/junction-capacitance.ts'
import { predictedDeviation, predictedMean } from './bayesian-update.ts'
import { classPriors } from './class-priors.ts'
import { forwardDesign, leakageDesign, recoveryDesigns } from './design-rows.ts'
import { maximumShift } from './grades.ts'
import { priorGaussians } from './prior-gaussians.ts'
import { logFigure, steadyEvent } from './recovery-figures.ts'
import type { RowReading } from './row-reading.ts'

/** Standard deviations of the class beyond which a figure is told. */
const implausibleBeyond = 3
/** Range named as expected, in standard deviations. */
const expectedWithin = 2
/** Capacitive charge above this share of a row's Qrr is told. */
const capacitiveShare = 0.3
/** A tail shorter than this share of ta, by the line definition, is abrupt. */
const snappyBelow = 0.5

/** Reverse voltages at which a class is made; outside, class or voltage is probably wrong. From memory. [V] */
const usualVoltage: Partial<Record<RectifierClass, readonly [number, number]>> = {
  schottky: [10, 250],
  'sic-schottky': [300, 3500],
}

/** Every figure of a record against what its class shows, and recovery rows against softness and capacitance. */
export function checkPlausibility(
  record: RectifierRecord,
  rectifier: CalibratedRectifier,
  readings: readonly RowReading[],
): Caveat[] {
  const prior = priorGaussians(record.class)
  return [
    ...checkRatings(record),
    ...(prior.recovery === null
      ? strayRecovery(record)
      : readings.flatMap((reading) => checkRecovery(record.id, prior.recovery!, reading))),
    ...checkForward(record, prior.forward),
    ...(prior.leakage === null ? [] : checkLeakage(record, prior.leakage)),
    ...checkCapacitance(record, rectifier),
    ...checkSoftness(record.id, readings),
  ]
}

function checkRatings(record: RectifierRecord): Caveat[] {
  const usual = usualVoltage[record.class]
  const voltage = record.ratings.reverseVoltage
  if (usual === undefined || (voltage >= usual[0] && voltage <= usual[1])) return []
  return [implausible(record.id, 'The rated reverse voltage', '', `${voltage} V`, `${usual[0]} to ${usual[1]} V`)]
}

/** Without stored charge a recovery row is the charge of a capacitance, or belongs to another class. */
function strayRecovery(record: RectifierRecord): Caveat[] {
  const row = record.recovery[0]
  return row === undefined
    ? []
    : [implausible(record.id, 'A recovery row', row.place.name, 'stated', 'no stored charge, so it is not used')]
}

function checkRecovery(candidate: string, prior: Gaussian, reading: RowReading): Caveat[] {
  const [lifetimeDesign, ratioDesign] = recoveryDesigns(reading.condition)
  const shift = reading.row.grade === 'maximum' ? maximumShift.lifetime : 0
  // what a step fixture tells about a ramp is doubtful by itself: that much is no fault of the row
  const method = reading.row.fixture === 'step' ? reading.observation.noise : []
  const lifetime = expectation(prior, lifetimeDesign, method[0])
  const ratio = expectation(prior, ratioDesign, method[3])
  const { name } = reading.row.place
  const found: Caveat[] = []
  if (lifetime.far(reading.point.lifetime - shift)) {
    const [low, high] = lifetime.range.map((u) => Math.exp(u + shift))
    found.push(
      implausible(
        candidate,
        'The carrier lifetime',
        name,
        time(Math.exp(reading.point.lifetime)),
        `${time(low!)} to ${time(high!)}`,
      ),
    )
  }
  if (reading.tellsRatio && ratio.far(reading.point.ratio)) {
    const [low, high] = ratio.range.map((y) => digits(1 + Math.exp(y)))
    found.push(
      implausible(
        candidate,
        'Lifetime over tail time',
        name,
        digits(1 + Math.exp(reading.point.ratio)),
        `${low} to ${high}`,
      ),
    )
  }
  return found
}

function checkForward(record: RectifierRecord, prior: Gaussian): Caveat[] {
  const line = record.forwardLine
  const ratedCurrent = record.ratings.averageCurrent
  const rows =
    line === null
      ? record.forward
      : [{ ...line, current: ratedCurrent, drop: line.threshold + line.resistance * ratedCurrent }]
  return rows.flatMap((row) => {
    const junction = row.junction ?? referenceTemperature
    const expected = expectation(prior, forwardDesign({ ratedCurrent, current: row.current, junction, line: false }))
    const scale = row.grade === 'maximum' ? maximumShift.forward : 1
    // Between the class's own level and that of its highest voltages any drop is an ordinary one.
    const above = record.class === 'schottky' ? schottkyRise(record.ratings.reverseVoltage) : 0
    const { mean, range } = expected
    const typical = row.drop / scale
    if (!expected.far(typical > mean ? Math.max(typical - above, mean) : typical)) return []
    const [low, high] = [range[0], range[1] + above].map((drop) => digits(Math.max(drop * scale, 0)))
    const condition = `${digits(row.current)} A, ${celsius(junction)}`
    const value = `${digits(row.drop)} V`
    return [implausible(record.id, 'The forward voltage', row.place.name, value, `${low} to ${high} V`, condition)]
  })
}

/**
 * How far the drop of a silicon Schottky part at its rated current lies above its class's 0.55 V: about 0.45 V where it
 * is rated 40 V, 0.9 V where it is rated 200 V (common practice, no source). [V]
 */
function schottkyRise(ratedVoltage: number): number {
  const typical = 0.45 + (0.45 * (Math.min(ratedVoltage, 250) - 40)) / 160
  return Math.max(0, typical - classPriors.schottky.forward.level[0])
}

function checkLeakage(record: RectifierRecord, prior: Gaussian): Caveat[] {
  const ratedVoltage = record.ratings.reverseVoltage
  return record.leakage.flatMap((row) => {
    if (!(row.current > 0 && row.voltage > 0)) return []
    const junction = row.junction ?? referenceTemperature
    const expected = expectation(prior, leakageDesign({ ratedVoltage, voltage: row.voltage, junction }))
    const shift = row.grade === 'maximum' ? maximumShift.leakage : 0
    if (!expected.far(Math.log(row.current) - shift)) return []
    const [low, high] = expected.range.map((ln) => digits(1e6 * Math.exp(ln + shift)))
    const condition = `${digits(row.voltage)} V, ${celsius(junction)}`
    const value = `${digits(1e6 * row.current)} µA`
    return [implausible(record.id, 'The leakage', row.place.name, value, `${low} to ${high} µA`, condition)]
  })
}

function checkCapacitance(record: RectifierRecord, { capacitance }: CalibratedRectifier): Caveat[] {
  if (capacitance === null) return []
  return record.recovery.flatMap((row): Caveat[] => {
    if (row.fixture === 'step' || row.charge === null || row.voltage === null) return []
    const share = capacitiveCharge({ capacitance, voltage: row.voltage }) / row.charge
    return share > capacitiveShare
      ? [{ code: 'capacitance-share', candidate: record.id, data: { share, row: row.place.name } }]
      : []
  })
}

/** Softness at the conditions of the rows that tell it; the most abrupt one is told. */
function checkSoftness(candidate: string, readings: readonly RowReading[]): Caveat[] {
  let least = snappyBelow
  let current = 0
  for (const { tellsRatio, point, condition } of readings) {
    if (!tellsRatio) continue
    const reading = { ...condition, recoveryTimeBy: { kind: 'line-90-25' }, softnessBy: 'times' } as const
    const softness = Math.exp(logFigure(steadyEvent(reading, point.lifetime, point.ratio), reading, 'softness').value)
    if (softness >= least) continue
    least = softness
    current = condition.current
  }
  return least < snappyBelow ? [{ code: 'snappy', candidate, data: { softness: least, current } }] : []
}

function expectation(prior: Gaussian, design: Float64Array, methodVariance = 0) {
  const mean = predictedMean(prior, design)
  const deviation = Math.hypot(predictedDeviation(prior, design), Math.sqrt(methodVariance))
  return {
    mean,
    range: [mean - expectedWithin * deviation, mean + expectedWithin * deviation] as const,
    far: (value: number) => Math.abs(value - mean) > implausibleBeyond * deviation,
  }
}

function implausible(
  candidate: string,
  property: string,
  row: string,
  value: string,
  expected: string,
  condition = '',
): Caveat {
  return { code: 'implausible-for-class', candidate, data: { property, row, value, expected, condition } }
}

function celsius(kelvin: number): string {
  return `${digits(kelvin - celsiusZero)} °C`
}

function time(seconds: number): string {
  return `${digits(seconds * 1e9)} ns`
}

function digits(value: number): string {
  return String(Number(value.toPrecision(3)))
}
