import { tableOf, textColumn } from '../table-view.ts'
import { tableBlock } from './review-types.ts'

interface FigureEquation {
  readonly figure: string
  readonly equation: string
  readonly method: string
  readonly moves: string
}

/** How each printed figure is made, by which method of the equations section, and what would change it. */
const figures: readonly FigureEquation[] = [
  {
    figure: 'valley current at turn-off',
    equation: 'mean inductor current − half the ripple; 0 in discontinuous conduction',
    method: 'balance of the inductor, losses of conduction included',
    moves: 'input, output, load, frequency, inductance',
  },
  {
    figure: 'tau, tau_rr',
    equation: 'least squares of the record’s rows with the class prior, over current, slope and temperature',
    method: 'lauritzen-ma-1991, inverted row by row',
    moves: 'rows of recovery, their grades, the class',
  },
  {
    figure: 'Qrr, I_RM, trr',
    equation: 'ta from its root; I_RM = a ta; Qrr = I_RM (ta/2 + tau_rr); trr = ta + 1.879 tau_rr',
    method: 'lauritzen-ma-1991, lauritzen-ma-1991-conduction',
    moves: 'valley current, slope, junction, conduction time, rows of recovery',
  },
  {
    figure: 'recovery, rectifier',
    equation: 'f V I_RM tau_rr g',
    method: 'linear-fall-ledger',
    moves: 'frequency, blocking voltage, slope, voltage fall time, tau_rr',
  },
  {
    figure: 'recovery, switch',
    equation: 'f V (I ta + I_RM ta/2 + I_RM tau_rr (1 − g))',
    method: 'linear-fall-ledger',
    moves: 'frequency, blocking voltage, slope, valley current, tau',
  },
  {
    figure: 'switch, turn-on overlap',
    equation: 'f V I (I/a + t_fv)/2, or the measured turn-on energy scaled by it',
    method: 'haaf-harper-overlap',
    moves: 'slope, voltage fall time, valley current, measured turn-on energy',
  },
  {
    figure: 'conduction',
    equation: 'mean of V_F(i) i over the conduction interval',
    method: 'junction-law',
    moves: 'rows of forward voltage, junction, load',
  },
  {
    figure: 'capacitive',
    equation: 'f (V Qc − Ec) max(0, 1 − Qrr/Qc)',
    method: 'depletion-law',
    moves: 'capacitance of the record, blocking voltage, frequency',
  },
  {
    figure: 'leakage',
    equation: 'V I_R(V, Tj) over the blocking share of the period',
    method: 'arrhenius-leakage',
    moves: 'rows of leakage, junction, blocking voltage',
  },
  {
    figure: 'forward recovery',
    equation: 'f (V_FP − V_F) I_peak t_fr/2',
    method: 'common practice, no source',
    moves: 'forward recovery of the record, peak current, turn-off slope',
  },
  {
    figure: 'junction',
    equation: 'reference temperature + thermal resistance × loss, rectifier and switch solved together',
    method: 'steady state of the thermal chain',
    moves: 'ambient or case, thermal resistances, every loss above',
  },
  {
    figure: 'peak reverse voltage',
    equation: 'the larger of V + L I_RM/tau_rr and the ringing of loop and capacitance',
    method: 'loop-tail, loop-ringing',
    moves: 'loop inductance, slope, capacitance, voltage fall time',
  },
  {
    figure: 'stage loss, efficiency',
    equation: 'rectifier total + switch + inductor + snubber + fixed; Po/(Po + stage loss)',
    method: 'sum, each row counted once',
    moves: 'every row',
  },
]

export const figureEquations = tableBlock(
  'How each figure is computed',
  tableOf(
    [
      textColumn('figure', 'key', ({ figure }: FigureEquation) => figure, true),
      textColumn('equation', 'e', ({ equation }: FigureEquation) => equation),
      textColumn('method (section 14)', 'e', ({ method }: FigureEquation) => method),
      textColumn('what would change it', 'e', ({ moves }: FigureEquation) => moves),
    ],
    figures,
  ),
)
