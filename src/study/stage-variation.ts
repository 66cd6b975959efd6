import { celsiusZero } from '../domain/constants.ts'
import type { Stage } from '../domain/stage.ts'
import type { TrendKey, TrendQuantity } from '../domain/study.ts'
import { StudyRefusal } from '../domain/study-refusal.ts'
import { stageAtLoad } from './duty-profile.ts'

/** Key of a quantity in the document. */
export const trendKeys: Readonly<Record<TrendQuantity, TrendKey>> = {
  frequency: 'frequency_hz',
  load: 'load',
  slope: 'slope_a_per_s',
  ambient: 'ambient_c',
  input: 'input_v',
  inductance: 'inductance_h',
}

/** The same stage with one quantity changed; everything else, the losses given as watts too, stays as stated. */
export function stageAt(stage: Stage, over: TrendQuantity, value: number): Stage {
  switch (over) {
    case 'frequency':
      return { ...stage, frequency: value }
    case 'load':
      return stageAtLoad(stage, value)
    case 'slope':
      return { ...stage, switch: { ...stage.switch, slope: { kind: 'given', slope: value } } }
    case 'ambient':
      return { ...stage, cooling: coolingAt(stage, value) }
    case 'input':
      // At one input alone: a year's higher inputs would hold every position at theirs.
      return { ...stage, input: { ...stage.input, voltage: checkedInput(stage, value) }, dutyProfile: null }
    case 'inductance':
      return { ...stage, inductor: { ...stage.inductor, inductance: value } }
  }
}

/** Where the stage itself stands on a quantity. */
export function presentValue(stage: Stage, over: TrendQuantity): number | null {
  switch (over) {
    case 'frequency':
      return stage.frequency
    case 'load':
      return 1
    case 'slope':
      return stage.switch.slope.kind === 'given' ? stage.switch.slope.slope : null
    case 'ambient':
      return stage.cooling.kind === 'case' ? null : stage.cooling.ambientTemperature
    case 'input':
      return stage.input.voltage
    case 'inductance':
      return stage.inductor.inductance
  }
}

/** A value as the document prints it: only the ambient changes its unit. */
export function documentValue(over: TrendQuantity, value: number): number {
  return over === 'ambient' ? value - celsiusZero : value
}

function coolingAt(stage: Stage, ambientTemperature: number): Stage['cooling'] {
  if (stage.cooling.kind === 'case') {
    throw new StudyRefusal('quantity-not-applicable', {
      path: 'cooling',
      found: 'ambient, with cooling by a fixed case temperature',
      expected: 'frequency, load, slope, input or inductance',
      hint: 'give cooling.ambient and sink_to_ambient instead of cooling.case',
    })
  }
  return { ...stage.cooling, ambientTemperature }
}

/** The legal range of the input is that of the stage file. */
function checkedInput(stage: Stage, voltage: number): number {
  const output = stage.output.voltage
  const highest = stage.input.kind === 'mains' ? Math.SQRT2 * voltage * (1 + stage.input.tolerance) : voltage
  const outside = stage.kind === 'buck' ? voltage <= output : stage.kind !== 'inverting' && highest >= output
  if (outside) {
    throw new StudyRefusal('range-outside', {
      path: 'input',
      found: `${Number(voltage.toPrecision(6))} V`,
      expected: stage.kind === 'buck' ? `above the output of ${output} V` : `a peak below the output of ${output} V`,
      hint: 'choose a range of inputs that the stage can convert',
    })
  }
  return voltage
}
