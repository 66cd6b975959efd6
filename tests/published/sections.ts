import { captureAccuracySection } from '../capture/accuracy.ts'
import { capacitanceRows } from './capacitance-rows.ts'
import { compareRow, type ValidationSection } from './compare.ts'
import { conductionRows } from './conduction-rows.ts'
import { energyRows } from './energy-rows.ts'
import type { PublishedRow } from './figure.ts'
import { heatRows } from './heat-rows.ts'
import { honestySection } from './honesty-section.ts'
import { recoveryRows } from './recovery-rows.ts'
import { stageRows } from './stage-rows.ts'
import { triangleRows } from './triangle-rows.ts'

/** Every published row, in the order of the report. */
export const publishedRows: readonly PublishedRow[] = [
  ...recoveryRows,
  ...triangleRows,
  ...energyRows,
  ...capacitanceRows,
  ...conductionRows,
  ...stageRows,
  ...heatRows,
]

const section = (title: string, text: string, rows: readonly PublishedRow[]): ValidationSection => ({
  title,
  text,
  rows: () => rows.flatMap(compareRow),
})

/** What `npm run validate` prints and the tests gate. */
export const sections: readonly ValidationSection[] = [
  section('Recovery event', 'Charge-control ramp, interval, residue and the definitions of trr.', recoveryRows),
  section(
    'Triangles and step fixtures',
    'Identities used to check a record against itself, and fixtures.',
    triangleRows,
  ),
  section('Energy of one turn-on', 'The ledger and other conventions.', energyRows),
  section('Capacitance and ringing', 'Integrals of the junction capacitance and the undamped loop.', capacitanceRows),
  section('Conduction', 'What the rectifier loses while it conducts.', conductionRows),
  section('Overlap, ripple and line cycle', 'What the stage adds around the rectifier.', stageRows),
  section('Heat and leakage', 'Junction temperature, runaway and derating.', heatRows),
  captureAccuracySection(),
  honestySection(),
]

/** Published rows without a case here, each with its reason. */
export const rowsWithoutCase: Readonly<Record<string, string>> = {
  P34: 'transition-mode boost is not a stage of this tool',
  P37: 'the two points state no current: an exponent for plausibility only, nothing to compute',
  P40: 'a forum calculation with incomplete inputs; here the imbalance is an input, not a prediction',
}

/** Models without a published case, each with its reason and where they are checked instead. */
export const modelsWithoutCase: Readonly<Record<string, string>> = {
  'loop-tail': 'follows from the law of induction and the tail; tests/models/peak-reverse-voltage.test.ts',
  'gate-first-order': 'common practice without a worked example at hand; tests/models/gate-slope.test.ts',
  'parallel-imbalance': 'a definition; tests/models/parallel-sharing.test.ts',
}
