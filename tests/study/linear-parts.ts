import type { RectifierRecord } from '../../src/domain/rectifier.ts'
import type { Stage } from '../../src/domain/stage.ts'
import { leakageRow, place } from '../evidence/records.ts'
import { carbide, kelvin, stage } from '../stage/samples.ts'

/** A Schottky whose drop does not move with temperature and that hardly leaks: its loss is a + b f. */
export function linearPart(
  id: string,
  drop: number,
  zeroBias: number,
  fields: Partial<RectifierRecord> = {},
): RectifierRecord {
  return carbide({
    id,
    forwardLine: {
      place: place('forward line'),
      threshold: drop,
      resistance: 0,
      thresholdPerKelvin: 0,
      resistancePerKelvin: 0,
      junction: kelvin(25),
      grade: 'typical',
      spread: null,
      source: null,
    },
    leakage: [leakageRow({ voltage: 600, current: 1e-15, junction: kelvin(125) })],
    capacitance: { kind: 'law', zeroBias, builtIn: 1, grading: 0.5 },
    ...fields,
  })
}

/** No ripple, no resistances: the current does not move with frequency, and neither does anything but the charging. */
export const linearStage: Stage = stage({
  loopInductance: 0,
  input: { voltage: 200 },
  inductor: { inductance: 1e3, resistance: 0, coreLoss: 0 },
  switch: { onResistance: 0, turnOff: null, storedEnergy: 0, thermal: null },
  cooling: { kind: 'case', caseTemperature: kelvin(60) },
})
