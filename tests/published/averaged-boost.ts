/**
 * Averaged boost with recovered charge, as an exercise of R. W. Erickson & D. Maksimovic states it:
 * V = (Vg − RL Q f/D')/(D' + tr f + RL/(R D')), I = (V/R + Q f)/D', Prec = V (I tr + Q) f.
 * A check beside the engine: the event model is another one (the voltage moves at the end of the recovery).
 */
export function averagedBoost({ duty }: { readonly duty: number }): Readonly<Record<string, number>> {
  const [input, resistance, frequency, charge, time, load] = [24, 0.25, 150e3, 5e-6, 100e-9, 60]
  const rest = 1 - duty
  const Vo = (input - (resistance * charge * frequency) / rest) / (rest + time * frequency + resistance / (load * rest))
  const I = (Vo / load + charge * frequency) / rest
  return { Vo, I, P: Vo * (I * time + charge) * frequency, efficiency: (Vo * Vo) / load / (input * I) }
}
