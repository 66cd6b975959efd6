import { referenceSlope } from '../../src/domain/constants.ts'
import type { RampRow, RectifierClass } from '../../src/domain/rectifier.ts'
import { gradeErrors } from '../../src/evidence/grades.ts'
import type { Drawing } from './drawing.ts'
import type { Condition, Figures } from './lumped.ts'
import { kelvin, rampRow } from './records.ts'

export interface WorldOptions {
  readonly seed: number
  readonly index: number
  readonly class?: RectifierClass
  /** Number of typical recovery rows; drawn from 1 to 4 when left out. */
  readonly rows?: number
}

/** What a world is about before anything random is known of its part. */
export interface Setting {
  readonly class: RectifierClass
  readonly ratedCurrent: number
  readonly blockingVoltage: number
  readonly condition: Condition
  readonly rows: number
}

/** Where the part is used. */
export function settingOf(options: WorldOptions, draw: Drawing): Setting {
  const ratedCurrent = draw.pick([4, 8, 15])
  return {
    class: options.class ?? 'ultrafast',
    ratedCurrent,
    blockingVoltage: 400,
    condition: {
      current: ratedCurrent * draw.between(0.3, 1.2),
      slope: referenceSlope * draw.between(1, 6),
      junction: kelvin(draw.between(60, 110)),
    },
    rows: options.rows ?? draw.pick([1, 2, 3, 4]),
  }
}

const shownFigures = [
  ['recoveryTime'],
  ['recoveryTime', 'charge'],
  ['charge', 'peakReverseCurrent'],
  ['recoveryTime', 'peakReverseCurrent'],
  ['recoveryTime', 'charge', 'peakReverseCurrent'],
] as const

/** One typical row as a data sheet would print it: some of its figures, each misread. */
export function readRow(
  setting: Setting,
  draw: Drawing,
  population: (condition: Condition, voltage: number) => Figures,
  index: number,
): RampRow {
  const condition = {
    current: setting.ratedCurrent * draw.pick([0.5, 1]),
    slope: draw.pick([100e6, 200e6, 300e6]),
    junction: kelvin(draw.pick([25, 25, 100, 125])),
  }
  const voltage = draw.pick([200, 400])
  const figures = population(condition, voltage)
  const { reading } = gradeErrors.typical.recovery
  const shown = draw.pick(shownFigures)
  const fields = Object.fromEntries(shown.map((name) => [name, figures[name] * draw.misread(reading)]))
  const place = { name: `recovery row ${index + 1}`, file: 'world.yaml', line: index + 1, column: 1 }
  return rampRow({ ...condition, voltage, place, ...fields })
}
