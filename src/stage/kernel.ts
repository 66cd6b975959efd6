import type { StageKind } from '../domain/stage.ts'

/**
 * The working store of one part at one operating point. Everything the solvers touch is allocated once here and
 * overwritten in place: a draw, a sweep point or a profile row costs no allocation (tests/bench/points.ts).
 */
export interface Kernel {
  // Conditions of the stage, changed by sweeps and draws between solutions.
  kind: StageKind
  /** dc volts, or root-mean-square mains volts. */
  inputVoltage: number
  outputVoltage: number
  outputCurrent: number
  frequency: number
  inductance: number
  inductorResistance: number
  coreLoss: number
  onResistance25: number
  onResistancePerKelvin: number
  /** Turn-on di/dt before the loop's limit; with a gate drive recomputed from the current. [A/s] */
  slope: number
  gate: GateDrive | null
  slopeFactor: number
  voltageFall: number
  loopInductance: number
  turnOff: { kind: 'none' | 'times' | 'energy'; voltageRise: number; currentFall: number; energy: number }
  storedEnergy: number
  turnOn: MeasuredBase
  // Parts in parallel: what one of the hottest and of the others carries.
  parts: number
  hotShare: number
  otherShare: number
  // Heat.
  thermal: ThermalNetwork
  // The part.
  part: PartConstants
  /** 0..7 recovery, 8..13 forward, 14..16 leakage: see CalibratedRectifier. */
  coefficients: Float64Array
  hot: PartState
  other: PartState
  // Results of the last evaluation.
  instant: Instant
  /** Where draws start from: the nominal solution. */
  held: HeldStart
  /** Total turn-on di/dt of this period, and the period's weight in the line cycle. [A/s], [1] */
  turnOnSlope: number
  weight: number
  /** Where the next search for the mean inductor current starts; 0: at the loss-free current. [A] */
  startCurrent: number
  /** ln(blocking voltage/rated voltage). */
  blockingLog: number
  hotEvent: RecoveryEvent
  otherEvent: RecoveryEvent
  rows: Float64Array
  /** [Tj of the hottest part, Tj of the switch, Tj of the other parts] in kelvin. */
  temperatures: Float64Array
  onResistance: number
  /** False when the stage cannot deliver its power at this point. */
  delivers: boolean
  // Line cycle of a mains stage.
  line: LineGrid
}

interface GateDrive {
  readonly drive: number
  readonly resistance: number
  readonly inputCapacitance: number
  readonly transconductance: number
  readonly threshold: number
  readonly plateau: number | null
  readonly sourceInductance: number
}

/** A measured turn-on energy reduced to its base at the test condition; 0 energy when none was given. */
interface MeasuredBase {
  current: number
  voltage: number
  /** Energy without any rectifier at the test condition. [J] */
  energy: number
  /** Share of the rectifier's cost that is added to the switch: 1, or 0 when the given energy already holds it. */
  addedShare: number
}

/** Resistances in K/W; `reference` is ambient or case in kelvin. */
export interface ThermalNetwork {
  reference: number
  junctionSelf: number
  common: number
  switchSelf: number
  rectifierOnSink: boolean
  /** False: the switch's junction is held at `temperatures[1]`. */
  switchSolved: boolean
  switchOnSink: boolean
  factor: number
  /** Search ends here: junction limit + 100 K. */
  ceiling: number
}

/** What does not change with temperature, current or draw. */
export interface PartConstants {
  readonly storesCharge: boolean
  readonly leaks: boolean
  readonly line: boolean
  readonly ratedCurrent: number
  readonly ratedVoltage: number
  capacitiveCharge: number
  chargingCost: number
  readonly forwardRecoveryPeak: number
  readonly forwardRecoveryTime: number
  readonly forwardRecoverySlope: number
  readonly synchronous: boolean
  readonly deadBefore: number
  readonly deadAfter: number
  readonly channelResistance25: number
  readonly channelPerKelvin: number
}

/** Properties of a part at one junction temperature. */
export interface PartState {
  /** Share of current and slope that one of these parts carries, and how many there are. */
  readonly share: number
  readonly count: number
  /** Slope that `slopeLog` = ln(slope/a0) was taken at: the logarithm is the same in most evaluations. [A/s] */
  slope: number
  slopeLog: number
  lifetimeLog: number
  ratioLog: number
  constant: number
  logarithmic: number
  linear: number
  /** ln I_R at the rated voltage. */
  leakageLog: number
  /** At the blocking voltage. [A] */
  leakage: number
  channelResistance: number
  /** Conduction power of one part in this period. [W] */
  conducted: number
  /** V_F left its usable range and the chord stands in for it. */
  chord: boolean
}

/** Currents of one switching period. */
export interface Instant {
  inputVoltage: number
  blockingVoltage: number
  duty: number
  /** D2: share of the period in which the rectifier conducts. */
  conductionShare: number
  meanCurrent: number
  ripple: number
  valley: number
  peak: number
  /** Valley of the continuous solution, negative in discontinuous conduction. */
  continuousValley: number
  discontinuous: boolean
  /** Voltage across the rectifier while the inductor idles. */
  idleVoltage: number
}

/** One hard turn-on as it meets one part. */
export interface RecoveryEvent {
  current: number
  slope: number
  lifetime: number
  tailTime: number
  storedCharge: number
  timeToPeak: number
  peakReverseCurrent: number
  charge: number
  tailShare: number
  /** [J] */
  rectifierEnergy: number
  switchAddedEnergy: number
  outcome: 'hard' | 'residual' | 'residual-gone' | 'no-stored-charge' | 'negative-valley'
}

/** A solution kept as the start of others: temperatures, crest of the line, mean inductor current. */
interface HeldStart {
  readonly temperatures: Float64Array
  crestCurrent: number
  current: number
}

/** Gauss nodes over a quarter of the line period: sine values, weights adding up to 1. */
export interface LineGrid {
  sine: Float64Array
  weight: Float64Array
  count: number
  /** Crest of the inductor's mean current over the line. [A] */
  crestCurrent: number
  /** The crest that solutions start from: scaled when the nodes were laid. [A] */
  startCrest: number
  /** Mean rectifier current of the last booking [A], and the share by which the crest was corrected after it. */
  bookedMean: number
  correction: number
  /** Weight of the angles in continuous conduction. */
  continuousShare: number
}

/** Positions in `Kernel.rows`; all in watts but the last. */
export const row = {
  conduction: 0,
  recoveryRectifier: 1,
  recoverySwitch: 2,
  capacitive: 3,
  leakage: 4,
  forwardRecovery: 5,
  switchConduction: 6,
  turnOnBase: 7,
  turnOff: 8,
  stored: 9,
  inductor: 10,
  hotPart: 11,
  otherPart: 12,
  meanRectifierCurrent: 13,
} as const
export const rowCount = 14

/** Watts that heat the switch: its own rows and what the rectifier adds. */
export function switchPower(rows: Float64Array): number {
  return (
    rows[row.switchConduction]! +
    rows[row.turnOnBase]! +
    rows[row.turnOff]! +
    rows[row.stored]! +
    rows[row.recoverySwitch]! +
    rows[row.capacitive]!
  )
}
