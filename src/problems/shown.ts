const longest = 60

/** A piece of a file as it may stand in a sentence: on one line, of bounded length, without control characters. */
export function shown(value: unknown): string {
  const text = typeof value === 'string' ? value : describe(value)
  const oneLine = text.slice(0, 4 * longest).replace(/[\p{Cc}\p{Cf}\p{Cs}\p{Zl}\p{Zp}]/gu, ' ')
  return oneLine.length > longest ? `${oneLine.slice(0, longest - 3)}...` : oneLine
}

function describe(value: unknown): string {
  if (Array.isArray(value)) return 'a list'
  if (value === null || value === undefined) return 'nothing'
  return typeof value === 'object' ? 'a group of keys' : String(value)
}
