import type { ModelEntry, ModelRange } from './model-entry.ts'

const voltage: ModelRange = { input: 'voltage', low: 0, high: 5000, unit: 'V' }
const slope: ModelRange = { input: 'slope', low: 1e5, high: 1e11, unit: 'A/s' }
const softness: ModelRange = { input: 'softness', low: 0, high: null, unit: '1' }

/** Methods that say where the energy of one turn-on goes and how far the voltage rises. */
export const energyModels: readonly ModelEntry[] = [
  {
    id: 'linear-fall-ledger',
    file: 'commutation-energy.ts',
    functions: ['tailShare', 'rectifierEnergy', 'switchAddedEnergy'],
    equation:
      'E_rectifier = V I_RM tau_rr g, E_switch_added = V (I ta + I_RM ta/2 + I_RM tau_rr (1 − g)), g = (1 − exp(−x))/x, x = t_fv/tau_rr',
    validity: [voltage],
    source: 'own integration of v i over the event, checked against an ODE and quadrature',
    bias: 'loop inductance moves up to L (I_RM²/2 + I I_RM) from the switch to the rectifier',
  },
  {
    id: 'haaf-harper-overlap',
    file: 'commutation-energy.ts',
    functions: ['baseEnergy'],
    equation: 'E_base = V I (I/a + t_fv)/2',
    validity: [voltage, slope],
    source: 'P. Haaf & J. Harper, power seminar on switching losses, Fig. II-1',
    bias: 'straight edges; the output charge of the switch is not in it',
  },
  {
    id: 'loss-conventions',
    file: 'energy-conventions.ts',
    functions: ['conventionEnergies'],
    equation: 'V (Qrr + I trr); V Qrr; V Qrr/2; V I_RM tb/2; V Qrr/4; V I_RM tb/6',
    validity: [],
    source: 'named beside each convention',
    bias: 'they differ more than twentyfold; none is used for a result',
  },
  {
    id: 'triangular-tail',
    file: 'triangular-tail.ts',
    functions: ['triangularTailEnergies'],
    equation: 'E_D = V I_RM² S/(6a), E_Q = V I_RM² (3 + 2S)/(6a) + V I_RM I (S + 2)/(2a)',
    validity: [slope, softness],
    source: 'STMicroelectronics notes on fast diodes, from memory; sum by own identity',
    bias: 'another event model: voltage moves over the whole tail',
  },
  {
    id: 'depletion-law',
    file: 'junction-capacitance.ts',
    functions: ['capacitanceAt', 'capacitanceLaw', 'capacitiveCharge', 'capacitiveEnergy', 'chargingCost'],
    equation: 'C = C0/(1 + v/Vj)^m; Qc = ∫ C dv; Ec = ∫ v C dv; lost in the switch V Qc − Ec',
    validity: [voltage],
    source: 'depletion-layer law, common practice; integrals checked against quadrature',
    bias: 'one charge alone is scaled by the square root of the voltage',
  },
  {
    id: 'loop-tail',
    file: 'peak-reverse-voltage.ts',
    functions: ['storedChargePeakVoltage'],
    equation: 'V + L I_RM/tau_rr',
    validity: [voltage],
    source: 'law of induction at the start of the exponential tail',
    bias: 'a snappy part exceeds it',
  },
  {
    id: 'loop-ringing',
    file: 'peak-reverse-voltage.ts',
    functions: ['ringingPeakVoltage'],
    equation: 'L di/dt = V min(t/t_fv, 1) − v, C(v) dv/dt = i',
    validity: [voltage],
    source: 'own, checked against an ODE solver',
    bias: 'no damping: pessimistic',
  },
]
