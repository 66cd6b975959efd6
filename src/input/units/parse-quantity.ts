import { didYouMean } from '../../problems/nearest.ts'
import type { ProblemCode } from '../../problems/problem.ts'
import { foldSigns } from './fold-signs.ts'
import { type QuantityKindName, type QuantityRule, quantityKinds, wantedQuantity } from './quantity-kinds.ts'
import { convertUnit, dimensionOf, type UnitConversion } from './unit-class.ts'

/** Why a text is not the quantity that is wanted. */
export interface QuantityRefusal {
  readonly refused: true
  readonly code: ProblemCode
  readonly expected: string
  readonly hint: string
}

/** Sign, digits with at most one point, exponent. Each character is looked at once. */
const number = /^[+-]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?/
const longestText = 100
/** Beyond these magnitudes a product of a few quantities would leave the range of doubles. */
const largest = 1e40
const smallest = 1e-40

/**
 * Reads "35 ns", "100 A/µs", "25 °C", "80 %" into the unit of the kind: SI, kelvin, hours for `hours`, 1 for `share`.
 * A number is never guessed at: without a unit, with a decimal comma or in another dimension it is refused.
 */
export function parseQuantity(text: string, rule: QuantityRule): number | QuantityRefusal {
  const { kind, sign } = rule
  const folded = text.length > longestText ? text : foldSigns(text).trim()
  const digits = folded.length > longestText ? undefined : number.exec(folded)?.[0]
  if (digits === undefined) return refuse('number-malformed', kind, folded.startsWith(',') ? commaHint : '')
  const unitText = folded.slice(digits.length).trim()
  const malformed = malformedRest(folded.slice(digits.length), kind)
  if (malformed !== null) return malformed
  const conversion = conversionOf(unitText, kind)
  if ('refused' in conversion) return conversion
  const value = scaled(Number(digits), conversion)
  const typedZero = !/^[^eE]*[1-9]/.test(digits)
  return checked(value, typedZero, kind, sign)
}

export const commaHint = 'write the decimals after a point and leave out thousands separators'

function malformedRest(rest: string, kind: QuantityKindName): QuantityRefusal | null {
  if (rest === '') return refuse('unit-missing', kind, '')
  // a unit that begins with its denominator may be written "1/K"
  if (!/^\s*[.,\d]/.test(rest) || /^\s+1\s*\//.test(rest)) return null
  if (/^\s*,\s*\d/.test(rest)) return refuse('number-decimal-comma', kind, commaHint)
  return refuse('number-malformed', kind, /^\s+\d(?!\s*\/)/.test(rest) ? 'one number without spaces in it' : '')
}

function refuse(code: ProblemCode, kind: QuantityKindName, hint: string): QuantityRefusal {
  return { refused: true, code, expected: wantedQuantity(kind), hint }
}

interface Scale extends UnitConversion {
  /** How many make one, for units that are a whole fraction: dividing by it rounds once, so "90 nC" is 9e-8; else 1. */
  readonly divisor: number
}

/** A zero typed with a minus becomes plain by the addition. */
function scaled(value: number, { factor, offset, divisor }: Scale): number {
  return (divisor === 1 ? value * factor : value / divisor) + offset
}

function checked(
  value: number,
  typedZero: boolean,
  kind: QuantityKindName,
  sign: QuantityRule['sign'],
): number | QuantityRefusal {
  if (!Number.isFinite(value)) return refuse('number-not-finite', kind, '')
  if (kind === 'temperature' && value <= 0) {
    return {
      refused: true,
      code: 'number-out-of-range',
      expected: 'a temperature above absolute zero, -273.15 degC',
      hint: '',
    }
  }
  const magnitude = Math.abs(value)
  if (magnitude > largest || (magnitude < smallest && !typedZero)) {
    return {
      refused: true,
      code: 'number-out-of-range',
      expected: 'magnitudes from 1e-40 to 1e40',
      hint: 'check the unit',
    }
  }
  if (value < 0 && sign !== 'any') return refuse('number-negative', kind, '')
  if (value === 0 && sign === 'positive') return refuse('number-zero', kind, '')
  return value
}

/** mathjs is asked once for each distinct text of a unit; the bound keeps hostile files from filling the memory. */
const known = new Map<QuantityKindName, Map<string, Scale | QuantityRefusal>>()
const mostKnown = 256

function conversionOf(unitText: string, kind: QuantityKindName): Scale | QuantityRefusal {
  let ofKind = known.get(kind)
  if (ofKind === undefined || ofKind.size >= mostKnown) {
    ofKind = new Map()
    known.set(kind, ofKind)
  }
  const remembered = ofKind.get(unitText)
  if (remembered !== undefined) return remembered
  const conversion = findConversion(unitText, kind)
  ofKind.set(unitText, conversion)
  return conversion
}

function findConversion(unitText: string, kind: QuantityKindName): Scale | QuantityRefusal {
  const { target } = quantityKinds[kind]
  const percent = unitText.startsWith('%')
  const rest = (percent ? unitText.slice(1) : unitText).trim().replace(/^1\s*\//, '/')
  // "5 %V" is no voltage: a percentage stands alone or before its denominator
  if (percent && rest !== '' && !rest.startsWith('/')) return unknownUnit(unitText, kind)
  if (rest === '') return target === '' ? asScale(0.01, 0) : otherDimension(unitText, 'a plain ratio', kind)
  if (target === '') {
    const conversion = convertUnit(rest, 'V')
    return 'refused' in conversion && conversion.refused === 'unknown'
      ? unknownUnit(unitText, kind)
      : otherDimension(unitText, nameOfDimension(dimensionOf(rest)), kind)
  }
  const conversion = convertUnit(rest, target)
  if (!('refused' in conversion)) return asScale(conversion.factor * (percent ? 0.01 : 1), conversion.offset)
  if (conversion.refused === 'unknown') return unknownUnit(unitText, kind)
  return otherDimension(unitText, nameOfDimension(conversion.dimension), kind)
}

function asScale(factor: number, offset: number): Scale {
  const inverse = Math.round(1 / factor)
  return { factor, offset, divisor: Math.abs(inverse * factor - 1) < 1e-12 ? inverse : 1 }
}

function unknownUnit(unitText: string, kind: QuantityKindName): QuantityRefusal {
  return refuse('unit-unknown', kind, didYouMean(unitText, quantityKinds[kind].units))
}

function otherDimension(unitText: string, found: string, kind: QuantityKindName): QuantityRefusal {
  return refuse('unit-dimension', kind, `"${unitText}" makes it ${found}`)
}

function nameOfDimension(dimension: string): string {
  const kind = Object.values(quantityKinds).find(({ target }) => target !== '' && dimensionOf(target) === dimension)
  return kind?.name ?? 'a quantity of another kind'
}
