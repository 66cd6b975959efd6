import type { Grade } from '../domain/rectifier.ts'

/** Properties that have their own reading errors and spread between units. */
export type Property = 'recovery' | 'forward' | 'leakage'

/** Standard deviations: of ln for recovery and leakage, relative for V_F. */
export interface GradeErrors {
  /** How far the printed figure may be from the centre of the population: acts on the data. */
  readonly reading: number
  /** How far one unit lies from that centre: never enters the fit. */
  readonly unit: number
}

/** Judgement, from memory: what a figure of each grade is worth. */
export const gradeErrors: Readonly<Record<Grade, Readonly<Record<Property, GradeErrors>>>> = {
  measured: {
    recovery: { reading: 0.03, unit: 0.1 },
    forward: { reading: 0.01, unit: 0.02 },
    leakage: { reading: 0.1, unit: 0.3 },
  },
  typical: {
    recovery: { reading: 0.05, unit: 0.15 },
    forward: { reading: 0.02, unit: 0.03 },
    leakage: { reading: 0.2, unit: 0.5 },
  },
  maximum: {
    recovery: { reading: 0.25, unit: 0.15 },
    forward: { reading: 0.04, unit: 0.03 },
    leakage: { reading: 0.8, unit: 0.5 },
  },
  estimated: {
    recovery: { reading: 0.3, unit: 0.2 },
    forward: { reading: 0.1, unit: 0.05 },
    leakage: { reading: 0.7, unit: 0.7 },
  },
}

/** Where the population's centre lies below a guaranteed maximum. */
export const maximumShift = {
  /** Taken off u: the centre's lifetime is 0.61 of the maximum's. */
  lifetime: 0.5,
  /** V_F is divided by it. */
  forward: 1.08,
  /** Taken off ln I_R. */
  leakage: 1.6,
} as const

/** No reading is exact: keeps `spread: 0 %` from making the regression singular. */
const leastError = 1e-5

/** Errors of one row: its own `spread` replaces both figures of its grade. */
export function rowErrors(
  row: { readonly grade: Grade; readonly spread: number | null },
  property: Property,
): GradeErrors {
  if (row.spread === null) return gradeErrors[row.grade][property]
  const own = Math.max(row.spread, leastError)
  return { reading: own, unit: own }
}

/** Spread between units of a property: the least of its rows' figures, without a row the estimated one. */
export function unitSpread(
  rows: readonly { readonly grade: Grade; readonly spread: number | null }[],
  property: Property,
): number {
  if (rows.length === 0) return gradeErrors.estimated[property].unit
  return rows.reduce((least, row) => Math.min(least, rowErrors(row, property).unit), Number.POSITIVE_INFINITY)
}
