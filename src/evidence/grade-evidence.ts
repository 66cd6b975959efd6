import type { CalibratedRectifier } from '../domain/calibrated-rectifier.ts'
import { referenceTemperature } from '../domain/constants.ts'
import type { RampRow, RectifierRecord } from '../domain/rectifier.ts'
import type { EvidenceGrade } from '../domain/result.ts'
import { distanceOutside, factorOutside, type OperatingCondition } from './operating-condition.ts'

/** A measured row counts as "at the point" within these. */
const near = { factor: 1.5, kelvin: 25 } as const
/** Rounding of converted units must not decide. */
const slack = 1e-9

/**
 * How good the evidence for a part is at an operating condition:
 * A a measured row within a factor 1.5 in I and a and 25 K; B two or more rows around it in I, a and T each;
 * C one row, or extrapolation; D recovery, V_F or (Schottky classes) capacitance or leakage is a guess.
 * Schottky classes are graded by their forward rows, in temperature.
 */
export function gradeEvidence(input: {
  /** With the rows alone that the calibration read. */
  readonly record: RectifierRecord
  readonly rectifier: CalibratedRectifier
  readonly condition: OperatingCondition
}): EvidenceGrade {
  const { record, rectifier, condition } = input
  if (guessedFigures(rectifier).length > 0) return 'D'
  return rectifier.storesCharge ? gradeRecovery(record, condition) : gradeForward(record, condition)
}

/** What makes the grade D, in words; null for the other grades, which the rows give. */
export function guessWords(rectifier: CalibratedRectifier): string | null {
  const figures = guessedFigures(rectifier)
  if (figures.length === 0) return null
  return `${figures.join(' and ')} ${figures.length > 1 ? 'are class guesses' : 'is a class guess'}`
}

function guessedFigures({ storesCharge, recovery, forward, capacitance, leakage }: CalibratedRectifier): string[] {
  const figures: string[] = []
  if (storesCharge && recovery?.origin === 'class-guess') figures.push('recovery')
  if (forward.origin === 'class-guess') figures.push('forward voltage')
  if (!storesCharge && capacitance === null) figures.push('capacitance')
  if (!storesCharge && leakage?.origin === 'class-guess') figures.push('leakage')
  return figures
}

/** Rows that state their current and slope; a step fixture has no slope. */
function placedRows(record: RectifierRecord): (RampRow & { readonly current: number; readonly slope: number })[] {
  return record.recovery.flatMap((row) =>
    row.fixture === 'ramp' && row.current !== null && row.slope !== null
      ? [{ ...row, current: row.current, slope: row.slope }]
      : [],
  )
}

function gradeRecovery(record: RectifierRecord, { current, slope, junction }: OperatingCondition): EvidenceGrade {
  const rows = placedRows(record)
  const close = rows.some(
    (row) =>
      row.grade === 'measured' &&
      factorOutside(current, [row.current]) <= near.factor + slack &&
      factorOutside(slope, [row.slope]) <= near.factor + slack &&
      Math.abs(junctionOf(row) - junction) <= near.kelvin + slack,
  )
  if (close) return 'A'
  const around =
    rows.length >= 2 &&
    factorOutside(
      current,
      rows.map((row) => row.current),
    ) <=
      1 + slack &&
    factorOutside(
      slope,
      rows.map((row) => row.slope),
    ) <=
      1 + slack &&
    distanceOutside(junction, rows.map(junctionOf)) <= slack
  return around ? 'B' : 'C'
}

function gradeForward(record: RectifierRecord, { junction }: OperatingCondition): EvidenceGrade {
  const line = record.forwardLine
  const rows = line === null ? record.forward : [line]
  if (rows.some((row) => row.grade === 'measured' && Math.abs(junctionOf(row) - junction) <= near.kelvin + slack))
    return 'A'
  // a line that states how it moves with temperature stands for two of its kind
  if (line !== null) return line.thresholdPerKelvin !== null && line.resistancePerKelvin !== null ? 'B' : 'C'
  return rows.length >= 2 && distanceOutside(junction, rows.map(junctionOf)) <= slack ? 'B' : 'C'
}

function junctionOf(row: { readonly junction: number | null }): number {
  return row.junction ?? referenceTemperature
}
