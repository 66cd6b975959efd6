import type { RecoveryTimeDefinition } from './rectifier.ts'

/** One channel of the file: where it stands and what one unit of it is worth. */
export interface CaptureColumn {
  /** 1-based position, or the header text of the column. */
  readonly column: number | string
  /** Factor from the file's number to SI (s, A, V); a shunt and a wrong direction are already in it. */
  readonly factor: number
  /** As the settings say it, for "what was understood": "mV across 50 mohm". */
  readonly unit: string
  /** Resistance of the shunt whose voltage the channel shows; null for a probe. [Ω] */
  readonly shunt: number | null
}

/** Settings of one capture: SI, defaults filled in and listed in `assumed`. */
export interface CaptureSettings {
  readonly fixture: 'ramp' | 'step'
  /** As written, relative to the settings file. */
  readonly file: string
  readonly time: CaptureColumn | null
  /** Sample interval where there is no time column. [s] */
  readonly interval: number | null
  readonly current: CaptureColumn
  readonly voltage: CaptureColumn | null
  readonly decimal: 'auto' | 'point' | 'comma'
  /** 1-based segment of a stacked file, or the mean of all. */
  readonly segment: number | 'average'
  readonly recoveryTimeBy: RecoveryTimeDefinition
  /** End of the charge integral, as share of the peak reverse current on the fitted tail. [1] */
  readonly chargeUntil: number
  /** Of probe and oscilloscope together; null when the settings do not say. [Hz] */
  readonly bandwidth: number | null
  /** How much later the current channel arrives than the voltage channel. [s] */
  readonly currentDelay: number
  readonly reference: string | null
  readonly device: { readonly id: string | null /** [K] */; readonly junction: number | null }
  readonly assumed: readonly { readonly path: string; readonly value: string }[]
}

/** One segment of a capture on an even time grid, forward current positive. */
export interface Waveform {
  /** Time of the first sample. [s] */
  readonly start: number
  /** [s] */
  readonly interval: number
  /** [A] */
  readonly current: Float64Array
  /** Reverse voltage of the rectifier, positive while it blocks. [V] */
  readonly voltage: Float64Array | null
}

/** How the file was read; printed before any of it is used. */
export interface CaptureReading {
  readonly delimiter: ',' | ';' | 'tab'
  readonly decimal: 'point' | 'comma'
  /** Rows above the first number. */
  readonly headerRows: number
  readonly columns: readonly {
    readonly role: 'time' | 'current' | 'voltage'
    /** 1-based. */
    readonly position: number
    /** Text found above the numbers, "" when there is none. */
    readonly header: string
    readonly unit: string
  }[]
  readonly segments: number
  readonly segment: number | 'average'
  /** Samples of the waveform used. */
  readonly samples: number
  /** Equal-time pairs of lowest and highest value were averaged. */
  readonly pairsAveraged: boolean
  /** Times repeat or are uneven from rounding; an even grid stands in their place. */
  readonly timeEvened: boolean
  /** [s] */
  readonly start: number
  /** [s] */
  readonly interval: number
}

/** Why a reduced capture deserves less trust. Closed set; report/words/capture-words.ts words each code. */
export const captureCaveatCodes = [
  'bandwidth-too-low',
  'samples-too-few',
  'clipping',
  'residual-offset',
  'ringing',
  'skew',
  'shunt-inductance',
  'tail-truncated',
  'wrong-sign',
  'several-events',
  'plateau-too-short',
  'no-reverse-plateau',
  'reference-not-subtracted',
  'junction-assumed',
] as const
export type CaptureCaveatCode = (typeof captureCaveatCodes)[number]

export interface CaptureCaveat {
  readonly code: CaptureCaveatCode
  readonly data: Readonly<Record<string, string | number>>
}

/** The event drawn again from the fit, for plots: times from the zero crossing. */
export interface CaptureTrace {
  /** [s] */
  readonly time: Float64Array
  /** Baseline removed. [A] */
  readonly current: Float64Array
  /** Fitted ramp or plateau and tail on the same times. [A] */
  readonly fitted: Float64Array
  /** [V] */
  readonly voltage: Float64Array | null
}

/** One relative standard deviation by figure name. */
type CaptureSpread = Readonly<Record<string, number>>

/** No stored charge can be told from the fixture's own response. */
export interface NothingMeasurable {
  readonly kind: 'none-measurable'
  readonly fixture: 'ramp' | 'step'
  /** Forward current before the event. [A] */
  readonly current: number
  /** Largest reverse current seen. [A] */
  readonly peakReverseCurrent: number
  /** No more charge than this flowed back. [C] */
  readonly chargeUpperBound: number
  /** No more storage than this fits. [s] */
  readonly timeUpperBound: number
}

/** Figures of a commutation at a set slope. */
interface ReducedRamp {
  readonly kind: 'ramp'
  /** [A] */
  readonly current: number
  /** |di/dt| through zero. [A/s] */
  readonly slope: number
  /** Magnitude. [A] */
  readonly peakReverseCurrent: number
  /** Zero crossing to peak. [s] */
  readonly timeToPeak: number
  /** Peak to the end by the chosen definition. [s] */
  readonly fallTime: number
  /** [s] */
  readonly recoveryTime: number
  /** To the stated end. [C] */
  readonly charge: number
  readonly chargeByEnd: readonly { /** Share of the peak. [1] */ readonly end: number; readonly charge: number }[]
  readonly softness: number
  readonly softnessBySlopes: number
  /** Reverse voltage after the event. [V] */
  readonly voltage: number | null
  /** Reverse voltage times reverse current from the peak to the quiet end. [J] */
  readonly energy: number | null
}

/** Figures of a resistor-limited reversal. */
interface ReducedStep {
  readonly kind: 'step'
  /** [A] */
  readonly current: number
  /** Reverse plateau. [A] */
  readonly reverse: number
  /** Zero crossing to the end of the plateau; null when there is no plateau. [s] */
  readonly storageTime: number | null
  /** [s] */
  readonly recoveryTime: number
  /** Level at which it ends. [A] */
  readonly until: number
  /** By the charge model. [s] */
  readonly lifetime: number
  readonly tailTime: number
  /** By the diffusion form of the storage time; null without a plateau. [s] */
  readonly diffusionLifetime: number | null
}

/** A capture reduced: its figures, how sure they are, what is wrong with it. */
export interface ReducedCapture {
  readonly figures: ReducedRamp | ReducedStep | NothingMeasurable
  readonly spread: CaptureSpread
  /** One relative figure for the record's row. [1] */
  readonly rowSpread: number
  readonly caveats: readonly CaptureCaveat[]
  /** Baseline that was removed. [A] */
  readonly offset: number
  /** Noise of the current channel, one standard deviation. [A] */
  readonly noise: number
  readonly trace: CaptureTrace
}

/** Result of `reduce`: plain SI with the unit in the key, temperatures in degrees Celsius. */
export interface CaptureDocument {
  readonly format: 1
  readonly tool: { readonly name: 'ebbwatt'; readonly version: string }
  readonly seed: number
  readonly inputs: readonly { readonly path: string; readonly sha256: string }[]
  readonly fixture: 'ramp' | 'step'
  readonly device: { readonly id: string | null; readonly junction_c: number }
  readonly recovery: 'measured' | 'none-measurable'
  readonly row: Readonly<Record<string, number | string | null>>
  /** Where no stored charge can be told from the fixture: no more than this. */
  readonly upper_bound: { readonly qrr_c: number; readonly time_s: number } | null
  readonly charge_by_end: readonly { readonly end: string; readonly qrr_c: number }[]
  /** One relative standard deviation by key of the row; `row` is what a record's row gets. */
  readonly spread: Readonly<Record<string, number>>
  readonly offset_a: number
  readonly noise_a: number
  readonly warnings: readonly { readonly code: CaptureCaveatCode; text: string; readonly data: CaptureCaveat['data'] }[]
  readonly understood: Readonly<Record<string, unknown>>
  readonly cautions: readonly { readonly code: string; text: string; readonly data: CaptureCaveat['data'] }[]
}
