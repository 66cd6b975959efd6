import type { CST } from 'yaml'

/** No file of ours needs more than about eight. */
export const mostLevels = 32

type Token = CST.Token | null | undefined

/** Offset of the first token that lies too deep, or null. Walks with a list of its own, since nesting is the danger. */
export function isNestedTooDeep(root: Token): number | null {
  const waiting: { readonly token: Token; readonly level: number }[] = [{ token: root, level: 0 }]
  while (waiting.length > 0) {
    const { token, level } = waiting.pop()!
    if (token === null || token === undefined) continue
    if (token.type === 'document') {
      waiting.push({ token: token.value, level })
    } else if ('items' in token) {
      if (level >= mostLevels) return token.offset
      for (const item of token.items) {
        waiting.push({ token: item.key, level: level + 1 }, { token: item.value, level: level + 1 })
      }
    }
  }
  return null
}
