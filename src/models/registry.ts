/** Range in which a model's input makes sense; null is open. */
export interface ModelRange {
  /** Name of the input, or of a ratio of inputs. */
  readonly input: string
  readonly low: number | null
  readonly high: number | null
  /** SI unit of the limits. */
  readonly unit: string
}

/** One published or own method: the single place where its range, source and bias stand. */
export interface ModelEntry {
  /** Author-year, standard or document number, or what it is where nobody is to be named. */
  readonly id: string
  /** Module in this folder. */
  readonly file: string
  /** Exported functions that make up the method. */
  readonly functions: readonly string[]
  readonly equation: string
  readonly validity: readonly ModelRange[]
  readonly source: string
  /** What is known to be wrong with it; "none known" where nothing is. */
  readonly bias: string
}

const lifetime: ModelRange = { input: 'lifetime', low: 1e-10, high: 1e-3, unit: 's' }
const slope: ModelRange = { input: 'slope', low: 1e5, high: 1e11, unit: 'A/s' }
const tailRatio: ModelRange = { input: 'tailTime/lifetime', low: 0, high: 1, unit: '1' }
const voltage: ModelRange = { input: 'voltage', low: 0, high: 5000, unit: 'V' }
const softness: ModelRange = { input: 'softness', low: 0, high: null, unit: '1' }
const valley: ModelRange = { input: 'valley', low: 0, high: null, unit: 'A' }
const lauritzenMa = 'P. O. Lauritzen & C. L. Ma, IEEE Trans. Power Electronics 6(2), 1991, 188-191'

/** Every model of this folder; a test holds that each has a published case or a written reason. */
export const models: readonly ModelEntry[] = [
  {
    id: 'lauritzen-ma-1991',
    file: 'charge-control.ts',
    functions: ['timeToPeak', 'recoveredCharge', 'rampRecovery'],
    equation:
      'ta = (tau − tau_rr)(1 − exp(−T1/tau)(1 + (tau I − q0)/(a tau²))), T1 = I/a + ta; Qrr = a ta (ta/2 + tau_rr)',
    validity: [slope, lifetime, tailRatio],
    source: `${lauritzenMa}; ramp equations from memory, verified against an ODE`,
    bias: 'one lumped charge and an exponential tail: snap-off and the slow end of very soft parts are not in it',
  },
  {
    id: 'lauritzen-ma-1991-conduction',
    file: 'charge-control.ts',
    functions: ['chargeAtTurnOff'],
    equation: 'q0 = tau [(I + m tau) − (Ipk + m tau) exp(−t_on/tau)], m = (Ipk − I)/t_on',
    validity: [lifetime],
    source: `${lauritzenMa}; solution own, verified against an ODE`,
    bias: 'forward recovery during the build-up is not in it',
  },
  {
    id: 'lauritzen-ma-1991-residue',
    file: 'residual-recovery.ts',
    functions: ['residualRecovery'],
    equation: 't_i ≤ ta,s: ramp from −m t_i with the charge left; later I_RM = m ta,s exp(−(t_i − ta,s)/tau_rr)',
    validity: [slope, lifetime, tailRatio],
    source: `${lauritzenMa}; extension to an idle time own, verified against an ODE`,
    bias: 'ringing of the node while the inductor idles is not in it',
  },
  {
    id: 'iec-60747-2',
    file: 'charge-control.ts',
    functions: ['recoveryTimeFactor'],
    equation: 'trr = ta + k tau_rr',
    validity: [],
    source: 'IEC 60747-2, definitions of the reverse recovery time by line and by level; values follow from the tail',
    bias: 'exact for an exponential tail only',
  },
  {
    id: 'lauritzen-ma-1991-step',
    file: 'step-fixture.ts',
    functions: ['stepStorageTime', 'stepRecoveryTime', 'lifetimeFromStep'],
    equation: 'ts = tau ln((I_F + I_R)/(I_R (1 + TM/tau))), trr = ts + tau_rr ln(I_R/I_x)',
    validity: [lifetime, tailRatio],
    source: `${lauritzenMa}; solution own`,
    bias: 'lumped charge: diffusion gives lifetimes 3 to 4.5 times longer for the same storage time',
  },
  {
    id: 'streetman-storage',
    file: 'step-fixture.ts',
    functions: ['simplestStorageTime', 'simplestLifetime'],
    equation: 'ts = tau ln(1 + I_F/I_R)',
    validity: [lifetime],
    source: 'B. G. Streetman & S. Banerjee, Solid State Electronic Devices, problem 5.5 in a published solution',
    bias: 'no tail: storage comes out too long',
  },
  {
    id: 'kingston-1954',
    file: 'diffusion-storage.ts',
    functions: ['diffusionStorageTime', 'diffusionLifetime'],
    equation: 'erf(sqrt(ts/tau)) = I_F/(I_F + I_R)',
    validity: [lifetime],
    source: 'R. H. Kingston, Proc. IRE 42, 1954, 829-834, from memory',
    bias: 'long base; a short base stores less',
  },
  {
    id: 'mohan-triangle',
    file: 'triangle.ts',
    functions: ['triangleFromTime', 'triangleFromCharge'],
    equation: 'ta = trr/(1 + S), I_RM = a ta, Qrr = I_RM trr/2',
    validity: [slope, softness],
    source: 'N. Mohan, T. M. Undeland & W. P. Robbins, Power Electronics, from memory',
    bias: 'printed charges lie up to 15 % off their own triangle',
  },
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
  {
    id: 'junction-law',
    file: 'forward-drop.ts',
    functions: ['forwardDrop', 'trapezoidConductionPower', 'forwardDropUsable', 'chordConductionPower'],
    equation: 'V_F = c + l ln(i/I0) + r i/I0; mean of V_F i over a linear current',
    validity: [valley],
    source: 'junction law with series resistance, common practice; STMicroelectronics AN604 for the straight line',
    bias: 'below 0.01 I0 a straight line through the origin',
  },
  {
    id: 'an604-trapezoid',
    file: 'trapezoid.ts',
    functions: ['trapezoidMean', 'trapezoidRms'],
    equation: '(a + b)/2; sqrt((a² + b² + a b)/3)',
    validity: [],
    source: 'STMicroelectronics AN604 rev. 3, 2011, Eq. 15',
    bias: 'none known',
  },
  {
    id: 'arrhenius-leakage',
    file: 'leakage-current.ts',
    functions: ['leakageCurrent', 'leakageSlopeTemperature'],
    equation: 'ln I_R = ln I_R0 + (Ea/k)(1/T0 − 1/T) + n ln(V/V0)',
    validity: [{ input: 'temperature', low: 200, high: 600, unit: 'K' }, voltage],
    source: 'Arrhenius form, common practice',
    bias: 'breakdown is not in it',
  },
  {
    id: 'an869-runaway',
    file: 'leakage-current.ts',
    functions: ['leakageRunawayLimit', 'leakageCriticalTemperature'],
    equation: 'I_R = 1/(V (1 − d) c Rth)',
    validity: [{ input: 'conductionShare', low: 0, high: 1, unit: '1' }, voltage],
    source: 'STMicroelectronics AN869, 2004; critical temperature: a note on Schottky runaway, 2008',
    bias: 'leakage alone; the coupled junction balance decides',
  },
  {
    id: 'gate-first-order',
    file: 'gate-slope.ts',
    functions: ['gateDrivenSlope'],
    equation: 'di/dt = gm (V_drive − V_mid)/(R_g C_iss + gm L_s)',
    validity: [],
    source: 'first-order gate circuit, common practice, no source',
    bias: 'constant transconductance; driver rise time not in it',
  },
  {
    id: 'parallel-imbalance',
    file: 'parallel-sharing.ts',
    functions: ['hottestShare', 'otherShare'],
    equation: '(1 + x)/n; the others share the rest',
    validity: [{ input: 'parts', low: 1, high: null, unit: '1' }],
    source: 'own definition of imbalance',
    bias: 'the imbalance is an input, not a prediction',
  },
  {
    id: 'exponential-discharge',
    file: 'bulk-discharge.ts',
    functions: ['bulkDischargeTime', 'bulkEnergy'],
    equation: 't = R C ln(V0/V); C V²/2',
    validity: [voltage],
    source: 'exponential discharge, textbook',
    bias: 'dielectric absorption lets the voltage come back',
  },
  {
    id: 'erickson-line-cycle',
    file: 'line-cycle.ts',
    functions: ['mainsBoostRectifierMean', 'mainsBoostRectifierRms'],
    equation: 'P/Vo; (P/Vpk) sqrt(16 Vpk/(3 π Vo))',
    validity: [voltage],
    source: 'R. W. Erickson & D. Maksimovic, Fundamentals of Power Electronics, table 18.3, from memory',
    bias: 'no ripple, no drops: a check, not a result',
  },
]
