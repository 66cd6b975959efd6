import type { ModelEntry, ModelRange } from './model-entry.ts'

const voltage: ModelRange = { input: 'voltage', low: 0, high: 5000, unit: 'V' }
const valley: ModelRange = { input: 'valley', low: 0, high: null, unit: 'A' }

/** Methods of conduction, leakage, drive, sharing and discharge. */
export const operationModels: readonly ModelEntry[] = [
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
