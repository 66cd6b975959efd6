import type { SentenceData } from '../../domain/result.ts'
import { quantity, significant } from '../format.ts'

/**
 * Fills a sentence with its numbers.
 *
 * `{key}` is a text or plain number, `{key:unit}` a number in SI shown with its unit (`{at:degC}` takes kelvin,
 * `{share:%}` a fraction). `[a|b|c]` stands for the first alternative whose numbers are all there; nothing when none is.
 * So a sentence never shows a gap where a number should be.
 *
 * @example sentence('Charge[ {charge:C}| not given].', { charge: 1.9e-7 }) // "Charge 190 nC."
 */
export function sentence(template: string, data: SentenceData): string {
  return template
    .split(/(\[[^[\]]*\])/)
    .map((part) => (part.startsWith('[') ? alternative(part.slice(1, -1), data) : fill(part, data)))
    .join('')
}

function alternative(text: string, data: SentenceData): string {
  const complete = text.split('|').find((part) => [...part.matchAll(place)].every(([, key]) => present(data, key!)))
  return complete === undefined ? '' : fill(complete, data)
}

const place = /\{([a-zA-Z]+)(?::([^}]*))?\}/g

function present(data: SentenceData, key: string): boolean {
  const value = Object.hasOwn(data, key) ? data[key] : undefined
  return typeof value === 'number' ? Number.isFinite(value) : typeof value === 'string' && value !== ''
}

function fill(text: string, data: SentenceData): string {
  return text.replace(place, (_, key: string, unit?: string) => {
    if (!present(data, key)) return 'unknown'
    const value = data[key]!
    if (typeof value === 'string') return value
    return unit === undefined ? significant(value) : quantity(value, unit)
  })
}

/** A code nobody worded, as words: for lists that other folders may lengthen. */
export function spokenCode(code: string): string {
  const text = code.replaceAll('-', ' ')
  return `${text.charAt(0).toUpperCase()}${text.slice(1)}.`
}
