/**
 * Free text from a file made harmless for a terminal and for every document: line breaks and tabs become a space,
 * other control characters, direction overrides and lone surrogates the replacement character.
 */
export function visible(text: string): string {
  return text.replace(whitespace, ' ').replace(controls, '\uFFFD')
}

const whitespace = /[\t\n\v\f\r\u0085\u2028\u2029]+/gu
// biome-ignore lint/suspicious/noControlCharactersInRegex: these are the characters to be replaced
const controls = /[\u0000-\u001F\u007F-\u009F\u061C\u200E\u200F\u202A-\u202E\u2066-\u2069\uFEFF\uFFF9-\uFFFB]|\p{Cs}/gu

/** The same for every text inside a plain document of objects and arrays. */
export function visibleDeep<T>(value: T): T {
  if (typeof value === 'string') return visible(value) as T
  if (Array.isArray(value)) return value.map(visibleDeep) as T
  if (value === null || typeof value !== 'object') return value
  return Object.fromEntries(Object.entries(value).map(([key, entry]) => [key, visibleDeep(entry)])) as T
}
