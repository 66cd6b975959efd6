import type { RectifierClass } from './rectifier.ts'

/** A multivariate normal: mean of length n, covariance n × n by rows. */
export interface Gaussian {
  readonly mean: Float64Array
  readonly covariance: Float64Array
}

/** Junction capacitance ready for use: the law C0/(1+v/Vj)^m, or one charge with its square-root scaling. */
export type JunctionCapacitance =
  | { readonly kind: 'law'; readonly zeroBias: number; readonly builtIn: number; readonly grading: number }
  | { readonly kind: 'charge'; readonly charge: number; readonly voltage: number }

/** How a property came about. */
type PropertyOrigin = 'given' | 'class-guess'

/**
 * A record together with its class prior: linear models of its properties with their doubt.
 * Bases, with I0 = rated mean current, a0 = 100 A/µs, T0 = 298.15 K, V0 = rated reverse voltage:
 * - recovery: u = ln tau in mean[0..3], y = ln(tau/tau_rr − 1) in mean[4..7], each over [1, ln(I/I0), ln(a/a0), ln(T/T0)]
 * - forward: V_F = mean[0] + mean[1] ln(I/I0) + mean[2] I/I0 + (T − T0)(mean[3] + mean[4] ln(I/I0) + mean[5] I/I0)
 * - leakage: ln I_R over [1, 1/T0 − 1/T, ln(V/V0)]
 */
export interface CalibratedRectifier {
  readonly id: string
  readonly class: RectifierClass
  readonly storesCharge: boolean
  /** I0. [A] */
  readonly ratedCurrent: number
  /** V0. [V] */
  readonly ratedVoltage: number
  /** Null for classes without stored charge. `unitSpread`: sd of ln, drawn for u and y independently. */
  readonly recovery: {
    readonly posterior: Gaussian
    readonly unitSpread: number
    readonly origin: PropertyOrigin
  } | null
  /** `line`: the record gave the characteristic itself (no small-current rule, no ln term). `unitSpread`: relative. */
  readonly forward: {
    readonly posterior: Gaussian
    readonly unitSpread: number
    readonly line: boolean
    readonly origin: PropertyOrigin
  }
  /** Null where leakage is not used (body diodes). `unitSpread`: sd of ln. */
  readonly leakage: {
    readonly posterior: Gaussian
    readonly unitSpread: number
    readonly origin: PropertyOrigin
    /** Added to ln I_R to reach the guaranteed (or assumed) maximum. */
    readonly maximumShift: number
  } | null
  readonly capacitance: JunctionCapacitance | null
  /** Added to (u, y) to reach the guaranteed maximum; null without a maximum row. */
  readonly maximumRecoveryShift: { readonly lifetime: number; readonly ratio: number } | null
  /** False when no row says anything about y: softness is then unknown. */
  readonly softnessKnown: boolean
}
