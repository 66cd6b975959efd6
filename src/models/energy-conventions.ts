/** Inputs of {@link conventionEnergies}: one recovery event. */
export interface ConventionInput {
  /** V, blocking voltage. [V] */
  readonly voltage: number
  /** I, current at turn-on. [A] */
  readonly current: number
  /** I_RM. [A] */
  readonly peakReverseCurrent: number
  /** ta. [s] */
  readonly timeToPeak: number
  /** trr; the tail tb is the rest of it after ta. [s] */
  readonly recoveryTime: number
  /** Qrr. [C] */
  readonly charge: number
}

/** One convention and what it gives for the event. */
export interface ConventionEnergy {
  /** The formula. */
  readonly name: string
  /** Where the convention books it. */
  readonly heats: 'rectifier' | 'switch' | 'both'
  /** [J] */
  readonly energy: number
  readonly source: string
}

/**
 * What published conventions call the recovery energy of one and the same event; they differ more than twentyfold.
 *
 * Equation: each entry's name. None of them is used for a result; they stand beside it as a bracket.
 *
 * Valid for: a comparison at one event. Deviations: none.
 *
 * @returns The conventions, largest claim first for a triangular event. [J]
 * @throws Never.
 * @see The `source` of each entry.
 * @example conventionEnergies({ voltage: 400, current: 6, peakReverseCurrent: 8, timeToPeak: 40e-9, recoveryTime: 60e-9, charge: 240e-9 }).at(0).energy // 2.40000e-4
 */
export function conventionEnergies(input: ConventionInput): readonly ConventionEnergy[] {
  const { voltage, current, peakReverseCurrent, timeToPeak, recoveryTime, charge } = input
  const tail = voltage * peakReverseCurrent * Math.max(0, recoveryTime - timeToPeak)
  return [
    {
      name: 'V (Qrr + I trr)',
      heats: 'both',
      energy: voltage * (charge + current * recoveryTime),
      source: 'R. W. Erickson & D. Maksimovic, Fundamentals of Power Electronics, from memory',
    },
    { name: 'V Qrr', heats: 'both', energy: voltage * charge, source: 'common practice, from memory' },
    {
      name: 'V Qrr/2',
      heats: 'rectifier',
      energy: (voltage * charge) / 2,
      source: 'Texas Instruments SLUS593H, Eq. 58',
    },
    { name: 'V I_RM tb/2', heats: 'rectifier', energy: tail / 2, source: 'common practice, from memory' },
    { name: 'V Qrr/4', heats: 'rectifier', energy: (voltage * charge) / 4, source: 'common practice, from memory' },
    {
      name: 'V I_RM tb/6',
      heats: 'rectifier',
      energy: tail / 6,
      source: 'STMicroelectronics notes on fast diodes, from memory',
    },
  ]
}
