import type { RectifierClass } from '../domain/rectifier.ts'

/** A figure and one standard deviation of what a class shows. */
export type Spread = readonly [centre: number, deviation: number]

/** What is expected of a class before its record is read. */
export interface ClassPrior {
  /** Null without stored charge. */
  readonly recovery: {
    /** tau at I0, a0, 25 °C [s]; deviation of its ln. */
    readonly lifetime: Spread
    /** y = ln(tau/tau_rr − 1) there. */
    readonly ratio: Spread
    /** Coefficient of u = ln tau over ln(T/T0). */
    readonly lifetimeHeat: Spread
    /** Coefficient of y over ln(T/T0). */
    readonly ratioHeat: Spread
  } | null
  readonly forward: {
    /** V_F at I0, 25 °C. [V] */
    readonly level: Spread
    /** Coefficient of ln(I/I0). [V] */
    readonly logarithmic: Spread
    /** Share of the level that is resistive. [1] */
    readonly share: Spread
    /** dV_F/dT at I0. [V/K] */
    readonly perKelvin: Spread
  }
  /** Null where leakage is not used. */
  readonly leakage: {
    /** I_R at V0, 25 °C [A]; deviation of its ln. */
    readonly current: Spread
    /** Activation energy. [eV] */
    readonly activation: Spread
    /** Exponent of the voltage. [1] */
    readonly exponent: Spread
  } | null
}

const pnHeat = { ratioHeat: [0.2, 0.5] } as const
const slowHeat = { lifetimeHeat: [2.0, 0.6], ...pnHeat } as const
const fastHeat = { lifetimeHeat: [2.0, 0.5], ...pnHeat } as const
const pnLogarithmic: Spread = [0.045, 0.02]
const pnLeakage = { current: [0.2e-6, 1.5], activation: [0.65, 0.12], exponent: [0.5, 0.3] } as const

/** Trade figures and judgement, from memory. Not taken from any data sheet; a record's rows override them quickly. */
export const classPriors: Readonly<Record<RectifierClass, ClassPrior>> = {
  standard: {
    recovery: { lifetime: [4e-6, 0.5], ratio: [2.0, 0.5], ...slowHeat },
    forward: { level: [1.0, 0.12], logarithmic: pnLogarithmic, share: [0.2, 0.1], perKelvin: [-1.5e-3, 0.7e-3] },
    leakage: pnLeakage,
  },
  fast: {
    recovery: { lifetime: [350e-9, 0.45], ratio: [1.3, 0.5], ...slowHeat },
    forward: { level: [1.15, 0.15], logarithmic: pnLogarithmic, share: [0.25, 0.1], perKelvin: [-1.5e-3, 0.7e-3] },
    leakage: pnLeakage,
  },
  ultrafast: {
    recovery: { lifetime: [35e-9, 0.45], ratio: [1.0, 0.5], ...fastHeat },
    forward: { level: [1.35, 0.3], logarithmic: pnLogarithmic, share: [0.3, 0.15], perKelvin: [-2e-3, 1e-3] },
    leakage: pnLeakage,
  },
  'soft-ultrafast': {
    recovery: { lifetime: [40e-9, 0.45], ratio: [0.3, 0.5], ...fastHeat },
    forward: { level: [1.6, 0.35], logarithmic: pnLogarithmic, share: [0.3, 0.15], perKelvin: [-2e-3, 1e-3] },
    leakage: pnLeakage,
  },
  'body-diode': {
    recovery: { lifetime: [200e-9, 0.5], ratio: [1.2, 0.5], ...fastHeat },
    forward: { level: [0.9, 0.12], logarithmic: pnLogarithmic, share: [0.2, 0.1], perKelvin: [-2e-3, 1e-3] },
    leakage: null,
  },
  schottky: {
    recovery: null,
    forward: { level: [0.55, 0.12], logarithmic: [0.03, 0.01], share: [0.25, 0.1], perKelvin: [-0.9e-3, 0.5e-3] },
    leakage: { current: [50e-6, 1.5], activation: [0.7, 0.1], exponent: [1, 0.5] },
  },
  'sic-schottky': {
    recovery: null,
    forward: { level: [1.5, 0.15], logarithmic: [0.03, 0.01], share: [0.45, 0.15], perKelvin: [1.8e-3, 0.7e-3] },
    leakage: { current: [2e-6, 1.8], activation: [0.35, 0.15], exponent: [2, 1] },
  },
}

/** The charge model carries the main dependence on current and slope; what is left over has this spread around 0. */
export const residualExponent = 0.15

/** Growth of the resistive part of V_F with temperature, of itself. [1/K] From memory, as the table. */
export const resistivePerKelvin: Spread = [0.004, 0.002]
