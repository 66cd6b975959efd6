/** Inputs of {@link conventionEnergies}: one recovery event. */
export interface ConventionInput {
  /** Blocking voltage. [V] */
  readonly voltage: number
  /** Current at turn-on. [A] */
  readonly current: number
  /** [A] */
  readonly peakReverseCurrent: number
  /** [s] */
  readonly timeToPeak: number
  /** Recovery time; the tail lasts the rest of it. [s] */
  readonly recoveryTime: number
  /** [C] */
  readonly charge: number
}

/** One convention and what it gives for the event. */
export interface ConventionEnergy {
  readonly name: string
  readonly heats: 'rectifier' | 'switch' | 'both'
  /** [J] */
  readonly energy: number
  readonly source: string
}

/** What published conventions call the recovery energy of one and the same event. */
export function conventionEnergies(input: ConventionInput): readonly ConventionEnergy[] {
  const { voltage, current, peakReverseCurrent, timeToPeak, recoveryTime, charge } = input
  const tail = Math.max(0, recoveryTime - timeToPeak)
  const memory = 'common practice, from memory'
  return [
    {
      name: 'V (Qrr + I trr)',
      heats: 'both',
      energy: voltage * (charge + current * recoveryTime),
      source: 'R. W. Erickson & D. Maksimovic, Fundamentals of Power Electronics, from memory',
    },
    { name: 'V Qrr', heats: 'both', energy: voltage * charge, source: memory },
    {
      name: 'V Qrr/2',
      heats: 'rectifier',
      energy: (voltage * charge) / 2,
      source: 'Texas Instruments SLUS593H, Eq. 58',
    },
    { name: 'V I_RM tb/2', heats: 'rectifier', energy: (voltage * peakReverseCurrent * tail) / 2, source: memory },
    { name: 'V Qrr/4', heats: 'rectifier', energy: (voltage * charge) / 4, source: memory },
    {
      name: 'V I_RM tb/6',
      heats: 'rectifier',
      energy: (voltage * peakReverseCurrent * tail) / 6,
      source: 'STMicroelectronics notes on fast diodes, from memory',
    },
  ]
}
