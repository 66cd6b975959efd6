import { absent, celsius, prefixFor, quantity, significant } from '../format.ts'

const plainUnits = new Set(['1', '1/K', 'V/K', 'ohm/K', 'K/W', 'A/V'])

/** An input as it was given: up to six digits, unlike a result, which shows three. Temperatures come in degrees Celsius. */
export function inputText(value: number | string, unit: string): string {
  if (typeof value === 'string') return value
  if (!Number.isFinite(value)) return absent
  if (unit === 'degC') return `${digits(value)} °C`
  if (unit === 'A/s') return `${digits(value * 1e-6)} A/µs`
  if (unit === '1' || unit === '') return digits(value)
  if (plainUnits.has(unit)) return `${digits(value)} ${shown(unit)}`
  const [size, prefix] = prefixFor(value, unit)
  return `${digits(value / size)} ${prefix}${shown(unit)}`
}

function digits(value: number): string {
  const text = Number(value.toPrecision(6))
  return Math.abs(text) >= 1e-4 && Math.abs(text) < 1e7 ? String(text) : significant(text, 6)
}

function shown(unit: string): string {
  return unit.replace('ohm', 'Ω')
}

/** A result in its own unit, three digits. */
export function resultText(value: number | null, unit: string): string {
  return unit === 'C_' ? celsius(value) : quantity(value, unit)
}
