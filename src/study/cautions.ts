import type { RectifierRecord } from '../domain/rectifier.ts'
import type { Caution, SentenceData } from '../domain/result.ts'
import type { Stage } from '../domain/stage.ts'
import { bulkDischargeTime, bulkEnergy } from '../models/bulk-discharge.ts'
import { highestBlockingVoltage, inputsOf } from './stage-inputs.ts'

/** Limits above which a voltage is taken as hazardous: 60 V dc, 42.4 V peak (IEC 61010-1, IEC 62368-1 ES1, from memory). */
const hazardousDc = 60
const hazardousPeak = 42.4

/**
 * The cautions of a stage: none below every limit, all of them above any. No option reaches this rule.
 *
 * @param peaks Computed peak reverse voltages of the candidates, with overshoot; null where there is none. [V]
 */
export function stageCautions(
  stage: Stage,
  parts: readonly RectifierRecord[],
  peaks: readonly (number | null)[],
): Caution[] {
  const mains = stage.input.kind === 'mains'
  const limits = limitsMet(stage, Math.max(0, ...peaks.map((peak) => peak ?? 0)))
  if (!mains && Object.keys(limits.met).length === 0) return []
  const cautions = [caution('lethal-voltage', { voltage: limits.highest, ...limits.met })]
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

/** What is above its limit, by name, and the highest voltage of all. */
function limitsMet(stage: Stage, overshoot: number): { readonly highest: number; readonly met: SentenceData } {
  const mains = stage.input.kind === 'mains'
  const input = mains ? highestMainsPeak(stage) : highestInput(stage)
  const output = stage.output.voltage
  // The switching node swings by the blocking voltage, so the limit for peaks counts there.
  const swing = highestBlockingVoltage(stage)
  const [side, dc] = !mains && input > output ? ['input', input] : ['output', output]
  return {
    highest: Math.max(input, output, swing, overshoot),
    met: {
      ...(dc > hazardousDc ? { side, dc } : {}),
      ...(swing > hazardousPeak ? { swing } : {}),
      ...(overshoot > Math.max(hazardousPeak, swing) ? { overshoot } : {}),
    },
  }
}

function highestInput(stage: Stage): number {
  return Math.max(...inputsOf(stage))
}

function highestMainsPeak(stage: Stage): number {
  return Math.SQRT2 * highestInput(stage)
}

/** The output's capacitor as far as it is known, and the input's where that side is higher, hazardous or both. */
function bulkData(stage: Stage): SentenceData {
  const { voltage, capacitance, bleeder } = stage.output
  const beside = inputMatters(stage) ? { input: highestInput(stage) } : {}
  if (capacitance === null) return { ...beside, output: voltage }
  const stored = { ...beside, voltage, capacitance, energy: bulkEnergy({ capacitance, voltage }) }
  if (bleeder === null) return stored
  const time =
    voltage > hazardousDc ? bulkDischargeTime({ resistance: bleeder, capacitance, from: voltage, to: hazardousDc }) : 0
  return { ...stored, bleeder, time, until: hazardousDc }
}

/** Behind a mains bridge of a boost stands no bulk capacitor: it is at the output. */
function inputMatters(stage: Stage): boolean {
  if (stage.input.kind === 'mains') return false
  const input = highestInput(stage)
  return stage.kind === 'inverting' || input > stage.output.voltage || input > hazardousDc
}
