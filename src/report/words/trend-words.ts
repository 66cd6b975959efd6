import type { TrendKey, TrendResult } from '../../domain/study.ts'
import { celsius, quantity, significant } from '../format.ts'
import { spokenCode } from './sentence.ts'

/** Name, unit and scale of each quantity a trend can run over. */
export const trendAxes: Readonly<
  Record<TrendKey, { readonly name: string; readonly unit: string; readonly scale: number }>
> = {
  frequency_hz: { name: 'switching frequency', unit: 'kHz', scale: 1e-3 },
  load: { name: 'load', unit: '%', scale: 100 },
  slope_a_per_s: { name: 'current slope', unit: 'A/µs', scale: 1e-6 },
  ambient_c: { name: 'ambient', unit: '°C', scale: 1 },
  input_v: { name: 'input', unit: 'V', scale: 1 },
  inductance_h: { name: 'inductance', unit: 'µH', scale: 1e6 },
}

export function axisTitle(over: TrendKey): string {
  return `${trendAxes[over].name} (${trendAxes[over].unit})`
}

/** A position on the axis as text with its unit. */
export function positionWords(over: TrendKey, at: number): string {
  switch (over) {
    case 'frequency_hz':
      return quantity(at, 'Hz')
    case 'load':
      return quantity(at, '%')
    case 'slope_a_per_s':
      return quantity(at, 'A/us')
    case 'ambient_c':
      return Math.abs(at - Math.round(at)) < 1e-9 ? celsius(at) : `${significant(at)} °C`
    case 'input_v':
      return quantity(at, 'V')
    case 'inductance_h':
      return quantity(at, 'H')
  }
}

/** What happens to a part at a limit when the quantity rises past it: it breaks the rule, or ceases to break it. */
const limits: Readonly<Record<string, readonly [string, string]>> = {
  'junction-over-limit': ['exceeds its junction limit', 'comes below its junction limit'],
  'no-stable-temperature': ['loses its stable temperature', 'gains a stable temperature'],
  'cannot-deliver': ['cannot deliver the power', 'can deliver the power'],
  'runaway-at-maximum-leakage': ['runs away at maximum leakage', 'no longer runs away at maximum leakage'],
  'voltage-margin': ['leaves its voltage margin', 'comes within its voltage margin'],
  'average-current': ['exceeds its mean current', 'comes within its mean current'],
  'recovery-too-slow': ['recovers too slowly for its interval', 'recovers within its interval'],
}

export type TrendLimit = TrendResult['limits'][number]

/** What happens at a limit, in a few words that follow the part's name. */
export function limitWords(trend: TrendResult, limit: TrendLimit): string {
  const pair = Object.hasOwn(limits, limit.why) ? limits[limit.why] : undefined
  return pair === undefined ? `meets ${lower(spokenCode(limit.why))}` : pair[ceases(trend, limit) ? 1 : 0]
}

/** Whether the part is worse off below the limit: by its temperature, its acceptance, else its junction and peak voltage. */
function ceases({ points }: TrendResult, { id, at, why }: TrendLimit): boolean {
  const below = points.findLast((point) => point.at <= at)?.candidates.find((part) => part.id === id)
  const above = points.find((point) => point.at > at)?.candidates.find((part) => part.id === id)
  if (below === undefined || above === undefined) return false
  if (why === 'no-stable-temperature' || why === 'cannot-deliver') return below.thermal === 'none'
  if (below.accepted !== above.accepted) return above.accepted
  const worse = why === 'voltage-margin' ? 'peak_reverse_v' : 'junction_c'
  return (below[worse] ?? 0) > (above[worse] ?? 0)
}

const edges: Readonly<Record<string, string>> = {
  voltage: 'the voltage rule, with overshoot',
  loop: 'voltage over loop inductance',
  saturation: 'the saturation of the switch',
  temperature: 'a temperature limit',
  range: 'the end of the range',
  evidence: 'the evidence, whose rows make charge grow faster with the slope than the model alone',
}

/** What sets the largest admissible slope, or an optimum. */
export function edgeWords(because: string): string {
  return Object.hasOwn(edges, because) ? edges[because]! : lower(spokenCode(because))
}

function lower(text: string): string {
  return text.charAt(0).toLowerCase() + text.slice(1).replace(/\.$/, '')
}
