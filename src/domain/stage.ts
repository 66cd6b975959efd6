export type StageKind = 'buck' | 'boost' | 'inverting' | 'mains-boost'
export type ConductionMode = 'continuous' | 'boundary' | 'discontinuous'

/** Where the stage takes its power from. */
export type StageInput =
  | { readonly kind: 'dc'; readonly voltage: number }
  | {
      readonly kind: 'mains'
      /** Root-mean-square. [V] */
      readonly voltage: number
      readonly lineFrequency: number
      /** Relative. [1] */
      readonly tolerance: number
    }

/** How the turn-on di/dt is set. */
export type SlopeSource =
  | { readonly kind: 'given' /** [A/s] */; readonly slope: number }
  | {
      readonly kind: 'gate'
      /** [V] */ readonly drive: number
      /** [Ω] */ readonly resistance: number
      /** [F] */ readonly inputCapacitance: number
      /** [A/V] */ readonly transconductance: number
      /** [V] */ readonly threshold: number
      /** [V] */ readonly plateau: number | null
      /** [H] */ readonly sourceInductance: number
    }

/** Turn-off of the switch: from its times, or measured. */
export type TurnOff =
  | { readonly kind: 'times'; readonly voltageRise: number; readonly currentFall: number }
  | { readonly kind: 'energy'; readonly energy: number }

/** A measured turn-on energy and what it may already contain. */
export interface MeasuredTurnOn {
  readonly energy: number
  readonly current: number
  readonly voltage: number
  readonly includesRectifier: 'yes' | 'no' | 'unknown'
  /** Record id of the rectifier of that measurement. */
  readonly rectifier: string | null
}

export type Cooling =
  | { readonly kind: 'case' /** [K] */; readonly caseTemperature: number }
  | {
      readonly kind: 'sink'
      readonly ambientTemperature: number
      readonly sinkToAmbient: number
      /** The switch sits on the same sink. */
      readonly shared: boolean
    }
  | { readonly kind: 'ambient'; readonly ambientTemperature: number }

/** One load of a year. Null: as in the stage. */
export interface DutyPoint {
  /** Share of full output current. [1] */
  readonly load: number
  readonly hours: number
  /** [K] */
  readonly ambient: number | null
  /** dc volts, or root-mean-square mains volts. */
  readonly input: number | null
}

/** An input that took its default, for the printed list: path in the file and the value as a text with unit. */
export interface AssumedInput {
  readonly path: string
  readonly value: string
}

/** One converter stage: SI, temperatures in kelvin, all defaults filled in and listed in `assumed`. */
export interface Stage {
  readonly kind: StageKind
  readonly title: string | null
  readonly input: StageInput
  readonly output: {
    /** Magnitude. [V] */
    readonly voltage: number
    readonly current: number
    readonly capacitance: number | null
    readonly bleeder: number | null
  }
  /** Switching frequency. [Hz] */
  readonly frequency: number
  readonly inductor: { readonly inductance: number; readonly resistance: number; readonly coreLoss: number }
  readonly switch: {
    /** At 25 °C. [Ω] */
    readonly onResistance: number
    /** Relative. [1/K] */
    readonly onResistancePerKelvin: number
    readonly slope: SlopeSource
    readonly voltageFall: number
    readonly turnOff: TurnOff | null
    readonly storedEnergy: number
    readonly turnOn: MeasuredTurnOn | null
    readonly thermal: { readonly junctionToSink: number; readonly junctionLimit: number | null } | null
  }
  readonly loopInductance: number | null
  /** [F]; 0 when there is none. */
  readonly snubberCapacitance: number
  readonly cooling: Cooling
  readonly limits: { /** [K] */ readonly junction: number | null; readonly voltageUse: number }
  /** One relative standard deviation each. */
  readonly spread: { readonly slope: number; readonly voltageFall: number; readonly thermal: number }
  readonly fixedLosses: number
  readonly dutyProfile: readonly DutyPoint[] | null
  readonly candidates: readonly string[] | null
  readonly incumbent: string | null
  readonly parallel: { readonly parts: number; readonly imbalance: number }
  readonly assumed: readonly AssumedInput[]
}
