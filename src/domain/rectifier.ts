/** The device classes; each has a prior in evidence/class-priors.ts. */
export type RectifierClass =
  | 'standard'
  | 'fast'
  | 'ultrafast'
  | 'soft-ultrafast'
  | 'body-diode'
  | 'schottky'
  | 'sic-schottky'

/** What a figure of a record is worth: who stands behind it. */
export type Grade = 'measured' | 'typical' | 'maximum' | 'estimated'

/** How the end of the reverse recovery time was defined when it was read. */
export type RecoveryTimeDefinition =
  | { readonly kind: 'line-90-25' }
  | { readonly kind: 'line-75-50' }
  | { readonly kind: 'level-25' }
  | { readonly kind: 'level-10' }
  | { readonly kind: 'level' /** Reverse current at the end. [A] */; readonly until: number }
  | { readonly kind: 'unknown' }

/** Where a row stands in its file, for messages and provenance. */
export interface RowPlace {
  /** Property and 1-based position, e.g. "recovery row 2". */
  readonly name: string
  readonly file: string
  readonly line: number
  readonly column: number
}

/** What every row carries. */
interface Row {
  readonly grade: Grade
  /** Replaces the grade's reading error and unit spread; relative. [1] */
  readonly spread: number | null
  readonly source: string | null
  readonly place: RowPlace
  /** Junction temperature of the reading; null when the record does not say. [K] */
  readonly junction: number | null
}

/** Forward voltage reading. */
export interface ForwardRow extends Row {
  /** [A] */
  readonly current: number
  /** [V] */
  readonly drop: number
}

/** Forward characteristic given as a straight line; null coefficients come from the class. */
export interface ForwardLine extends Row {
  /** [V] */
  readonly threshold: number
  /** [Ω] */
  readonly resistance: number
  /** [V/K] */
  readonly thresholdPerKelvin: number | null
  /** [Ω/K] */
  readonly resistancePerKelvin: number | null
}

/** Recovery reading from a commutation at a set slope. At least one of the four figures is given. */
export interface RampRow extends Row {
  readonly fixture: 'ramp'
  /** [A] */
  readonly current: number | null
  /** |di/dt| at turn-off. [A/s] */
  readonly slope: number | null
  /** Reverse voltage after recovery. [V] */
  readonly voltage: number | null
  /** [s] */
  readonly recoveryTime: number | null
  readonly recoveryTimeBy: RecoveryTimeDefinition
  /** [C] */
  readonly charge: number | null
  /** Magnitude. [A] */
  readonly peakReverseCurrent: number | null
  readonly softness: number | null
  readonly softnessBy: 'times' | 'slopes'
}

/** Recovery reading from a resistor-limited fixture. */
export interface StepRow extends Row {
  readonly fixture: 'step'
  /** [A] */
  readonly current: number
  /** Reverse current that the fixture holds. [A] */
  readonly reverse: number
  /** Reverse current at which trr ends. [A] */
  readonly until: number | null
  /** [s] */
  readonly recoveryTime: number | null
  /** [s] */
  readonly storageTime: number | null
}

export type RecoveryRow = RampRow | StepRow

/** Leakage reading. */
export interface LeakageRow extends Row {
  /** [V] */
  readonly voltage: number
  /** [A] */
  readonly current: number
}

/** Junction capacitance as the record states it. */
export type CapacitanceData =
  | { readonly kind: 'law'; readonly zeroBias: number; readonly builtIn: number; readonly grading: number }
  | { readonly kind: 'points'; readonly points: readonly { readonly voltage: number; readonly capacitance: number }[] }
  | { readonly kind: 'charge'; readonly charge: number; readonly voltage: number }

/** Thermal path of a part as the record states it. */
export type RectifierThermal =
  | { readonly kind: 'case'; readonly junctionToCase: number | null; readonly caseToSink: number | null }
  | { readonly kind: 'ambient'; readonly junctionToAmbient: number; readonly mounting: string | null }

/** A rectifier as its record states it: SI, nothing filled in. */
export interface RectifierRecord {
  readonly id: string
  readonly class: RectifierClass
  readonly title: string | null
  readonly origin: string | null
  readonly place: RowPlace
  readonly ratings: {
    /** Repetitive peak reverse voltage. [V] */
    readonly reverseVoltage: number
    /** Mean forward current. [A] */
    readonly averageCurrent: number
    /** Highest junction temperature. [K] */
    readonly junction: number
  }
  readonly thermal: RectifierThermal | null
  readonly price: number | null
  readonly forward: readonly ForwardRow[]
  readonly forwardLine: ForwardLine | null
  readonly recovery: readonly RecoveryRow[]
  readonly leakage: readonly LeakageRow[]
  readonly capacitance: CapacitanceData | null
  /** Turn-on overshoot: peak [V], time [s], slope of the test [A/s]. */
  readonly forwardRecovery: { readonly peak: number; readonly time: number; readonly slope: number } | null
  /** Intervals in which the body diode carries the current. [s] */
  readonly deadTime: { readonly before: number; readonly after: number } | null
  /** Channel in parallel with a body diode: [Ω] at 25 °C and relative [1/K]. */
  readonly channel: { readonly onResistance: number; readonly perKelvin: number } | null
}

/** Stored minority charge exists in every class but the two Schottky ones. */
export function storesCharge(rectifierClass: RectifierClass): boolean {
  return rectifierClass !== 'schottky' && rectifierClass !== 'sic-schottky'
}
