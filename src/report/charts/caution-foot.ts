import type { Caution } from '../../domain/result.ts'
import { isHazardous } from '../words/caution-words.ts'
import { element, escapeText, label } from './svg.ts'

/** What a drawing that leaves its document says below: a line to read, and every caution in full as its description. */
export function cautionFoot(
  cautions: readonly Caution[],
  top: number,
): { readonly markup: string; readonly height: number } {
  if (cautions.length === 0) return { markup: '', height: 0 }
  const line = isHazardous(cautions)
    ? 'Hazardous voltage: see the cautions of the result; qualified persons only, local code applies.'
    : 'Estimates from data sheets and models: confirm them on the bench before release.'
  const full = cautions.map(({ text }) => text).join(' ')
  return { markup: element('desc', {}, escapeText(full)) + label(12, top + 14, line, { bold: true }), height: 24 }
}
