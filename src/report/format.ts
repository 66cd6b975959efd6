/** Numbers as people read them: three significant digits, engineering prefixes, a space before the unit. */

const prefixes: readonly (readonly [number, string])[] = [
  [1e9, 'G'],
  [1e6, 'M'],
  [1e3, 'k'],
  [1, ''],
  [1e-3, 'm'],
  [1e-6, 'µ'],
  [1e-9, 'n'],
  [1e-12, 'p'],
]

/** Text that stands where a number does not exist. */
export const absent = '–'

/**
 * A number with three significant digits and no exponent in the range people read; `absent` for null.
 * A number that is exactly shorter stays so: 48, not 48.0.
 */
export function significant(value: number | null, digits = 3): string {
  if (value === null || !Number.isFinite(value)) return absent
  if (value === 0) return '0'
  const magnitude = Math.abs(value)
  if (magnitude >= 1e7 || magnitude < 1e-5) return value.toExponential(digits - 1).replace('e+', 'e')
  const decimals = Math.max(0, digits - 1 - Math.floor(Math.log10(Number(magnitude.toPrecision(digits)))))
  const text = Number(value.toPrecision(digits)).toFixed(Math.min(decimals, 12))
  const short = text.includes('.') ? text.replace(/\.?0+$/, '') : text
  return Math.abs(Number(short) - value) <= 1e-12 * magnitude ? short : text
}

/** "1.80 W (0.60 to 3.10 W)": one unit and one number of decimals for all three; the figure alone without an interval. */
export function withInterval(value: number, low: number | null, high: number | null, unit: string): string {
  if (low === null || high === null) return quantity(value, unit)
  const largest = Math.max(Math.abs(value), Math.abs(low), Math.abs(high))
  const [size, prefix] = prefixFor(largest, unit)
  const decimals = Math.max(0, 2 - Math.floor(Math.log10(largest / size || 1)))
  const text = (number: number) => (number === 0 ? '0' : (number / size).toFixed(decimals))
  const shown = `${prefix}${displayUnit(unit)}`
  return `${text(value)} ${shown} (${text(low)} to ${text(high)} ${shown})`
}

/** A number with fixed decimals. Exactly zero is "0"; what only rounds to zero is "<0.01", so that the two differ. */
export function fixed(value: number | null, decimals: number): string {
  if (value === null || !Number.isFinite(value)) return absent
  if (value === 0) return '0'
  const text = value.toFixed(decimals)
  if (Number(text) !== 0) return text
  const least = (10 ** -decimals).toFixed(decimals)
  return value > 0 ? `<${least}` : `>-${least}`
}

/** Value in SI to a text with an engineering prefix: quantity(1.9e-7, 'C') is "190 nC". */
export function quantity(value: number | null, unit: string): string {
  if (value === null || !Number.isFinite(value)) return absent
  const special = specialUnits[unit]
  if (special) return special(value)
  const [size, prefix] = prefixFor(value, unit)
  return `${significant(value / size)} ${prefix}${displayUnit(unit)}`
}

/** Units that never take a prefix, and those that are a conversion. */
const specialUnits: Readonly<Record<string, (value: number) => string>> = {
  '': (value) => significant(value),
  x: (value) => significant(value),
  '%': (value) => `${significant(value * 100)} %`,
  degC: (value) => celsius(value - 273.15),
  C_: (value) => celsius(value),
  'A/us': (value) => `${significant(value * 1e-6)} A/µs`,
  'K/W': (value) => `${significant(value)} K/W`,
  K: (value) => `${significant(value)} K`,
  kWh: (value) => `${significant(value)} kWh`,
  odds: (value) => odds(value),
  n: (value) => String(Math.round(value)),
}

/** Odds with two digits, never rounded to certainty. */
export function odds(value: number): string {
  if (value > 0.995) return 'above 0.99'
  return value < 0.005 ? 'below 0.01' : value.toFixed(2)
}

/** Temperature already in degrees Celsius, to whole degrees: a junction is not known better. */
export function celsius(value: number | null): string {
  return value === null || !Number.isFinite(value) ? absent : `${fixedWhole(value)} °C`
}

function fixedWhole(value: number): string {
  const text = value.toFixed(0)
  return text === '-0' ? '0' : text
}

/** Largest prefix not above the value as printed; capacitances, charges and times are never given in kilo. */
export function prefixFor(value: number, unit: string): readonly [number, string] {
  const magnitude = Number(Math.abs(value).toPrecision(3))
  const small = unit === 'F' || unit === 'C' || unit === 's' || unit === 'H'
  const usable = small ? prefixes.filter(([size]) => size <= 1) : prefixes
  if (magnitude === 0) return [1, '']
  return usable.find(([size]) => magnitude >= size) ?? usable[usable.length - 1]!
}

function displayUnit(unit: string): string {
  return unit === 'ohm' ? 'Ω' : unit
}

/** Decimals that give the largest of the values about three to four significant digits. */
export function decimalsFor(values: readonly (number | null)[]): number {
  let largest = 0
  for (const value of values) if (value !== null && Number.isFinite(value)) largest = Math.max(largest, Math.abs(value))
  if (largest === 0) return 0
  if (largest >= 1000) return 0
  if (largest >= 100) return 1
  if (largest >= 1) return 2
  return Math.min(8, 2 - Math.floor(Math.log10(largest)))
}
