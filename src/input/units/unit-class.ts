import { createComplexClass, createFractionClass, createUnitClass } from 'mathjs'

/** The part of mathjs' unit that is used: its dimension, and its size in another unit. */
interface ParsedUnit {
  readonly dimensions: readonly number[]
  readonly units: readonly { readonly unit: { readonly name: string } }[]
  toNumber(unit: string): number
}
interface UnitClass {
  parse(text: string): ParsedUnit
}

declare module 'mathjs' {
  // mathjs exports its factories, but leaves them out of its own types.
  export function createUnitClass(arithmetic: object): UnitClass
  export function createComplexClass(dependencies: object): unknown
  export function createFractionClass(dependencies: object): unknown
}

/**
 * The unit table and unit grammar of mathjs with the arithmetic of plain numbers put in: a third of the code and a
 * twentieth of the start-up of the whole, and the same answers (a test compares every unit with every prefix).
 */
const unitClass = createUnitClass({
  on: undefined,
  config: { number: 'number', predictable: false },
  addScalar: (a: number, b: number) => a + b,
  subtractScalar: (a: number, b: number) => a - b,
  multiplyScalar: (a: number, b: number) => a * b,
  divideScalar: (a: number, b: number) => a / b,
  pow: (base: number, exponent: number) => base ** exponent,
  abs: Math.abs,
  fix: Math.trunc,
  round: Math.round,
  equal: (a: number, b: number) => a === b,
  isNumeric: (value: unknown) => typeof value === 'number',
  format: String,
  number: Number,
  Complex: createComplexClass({}),
  BigNumber: class {},
  Fraction: createFractionClass({}),
})

/** How a unit turns into another: value in the other = number * factor + offset. */
export interface UnitConversion {
  readonly factor: number
  readonly offset: number
}

/** Why a text cannot be turned into the wanted unit. */
export type UnitRefusal =
  | { readonly refused: 'unknown' }
  | { readonly refused: 'dimension'; readonly dimension: string }

/**
 * Units that mathjs knows and this tool does not take: other temperature scales, and volt-amperes, which are no watts.
 */
const notTaken: ReadonlySet<string> = new Set(['degF', 'fahrenheit', 'degR', 'rankine', 'VA', 'VAR'])
const longestUnitText = 32

/** Asks mathjs what `unitText` is, measured in `target`, both as plain text such as "A/us" and "A/s". */
export function convertUnit(unitText: string, target: string): UnitConversion | UnitRefusal {
  const unit = unitText.length > longestUnitText ? null : parseOne(unitText)
  if (unit === null || unit.units.some(({ unit }) => notTaken.has(unit.name))) {
    return { refused: 'unknown' }
  }
  const dimension = String(unit.dimensions)
  if (dimension !== dimensionOf(target)) return { refused: 'dimension', dimension }
  const offset = unitClass.parse(counted(0, unitText)).toNumber(target)
  const factor = unit.toNumber(target) - offset
  // A prefix before a scale with its own zero ("mdegC") is nothing that anyone means.
  const usable = Number.isFinite(factor) && factor > 0 && (offset === 0 || factor === 1)
  return usable ? { factor, offset } : { refused: 'unknown' }
}

/** The dimension of a unit as a text that equals that of every unit of the same dimension. */
export function dimensionOf(unitText: string): string {
  return String(unitClass.parse(counted(1, unitText)).dimensions)
}

function parseOne(unitText: string): ParsedUnit | null {
  try {
    return unitClass.parse(counted(1, unitText))
  } catch {
    // mathjs says "this is no unit" by throwing a plain Error; nothing else is thrown by its parser.
    return null
  }
}

/** "1 V"; "1 /K" for a unit that begins with its denominator. */
function counted(count: number, unitText: string): string {
  return `${count} ${unitText}`
}
