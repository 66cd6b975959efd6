import type { RectifierRecord } from '../domain/rectifier.ts'
import type { Caution, SentenceData } from '../domain/result.ts'
import type { Stage } from '../domain/stage.ts'
import { bulkDischargeTime, bulkEnergy } from '../models/bulk-discharge.ts'
import { highestBlockingVoltage, inputsOf } from './stage-inputs.ts'

/** Limits above which a voltage is taken as hazardous: 60 V dc, 42.4 V peak (IEC 61010-1, IEC 62368-1 ES1, from memory). */
const hazardousDc = 60
const hazardousPeak = 42.4

/** The cautions of a stage; empty only below both limits. No option reaches this rule. */
export function stageCautions(stage: Stage, parts: readonly RectifierRecord[]): Caution[] {
  const mains = stage.input.kind === 'mains'
  const highest = highestVoltage(stage)
  // The switching node swings by the blocking voltage, so the limit for peaks counts there.
  const hazardous = mains || highest > hazardousDc || highestBlockingVoltage(stage) > hazardousPeak
  if (!hazardous) return []
  const cautions = [caution('lethal-voltage', { voltage: highest })]
  if (mains) cautions.push(caution('mains-fed', { mains: stage.input.voltage, peak: highestMainsPeak(stage) }))
  cautions.push(
    caution('qualified-persons', {}),
    caution('bulk-capacitor', bulkData(stage)),
    caution('isolated-probing', {}),
    caution('fuse-and-insulation', {}),
    caution('estimate-only', {}),
  )
  const carbide = parts.filter((part) => part.class === 'sic-schottky').map(({ id }) => id)
  if (mains && carbide.length > 0) cautions.push(caution('surge-silicon-carbide', { parts: carbide.sort().join(', ') }))
  return cautions
}

export function caution(code: string, data: SentenceData): Caution {
  return { code, text: '', data }
}

function highestVoltage(stage: Stage): number {
  const input = stage.input.kind === 'mains' ? highestMainsPeak(stage) : Math.max(...inputsOf(stage))
  return Math.max(input, stage.output.voltage, highestBlockingVoltage(stage))
}

function highestMainsPeak(stage: Stage): number {
  return Math.SQRT2 * Math.max(...inputsOf(stage))
}

function bulkData(stage: Stage): SentenceData {
  const { voltage, capacitance, bleeder } = stage.output
  if (capacitance === null) return {}
  const stored = { voltage, capacitance, energy: bulkEnergy({ capacitance, voltage }) }
  if (bleeder === null) return stored
  const time =
    voltage > hazardousDc ? bulkDischargeTime({ resistance: bleeder, capacitance, from: voltage, to: hazardousDc }) : 0
  return { ...stored, bleeder, time, until: hazardousDc }
}
