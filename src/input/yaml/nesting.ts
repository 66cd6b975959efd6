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

const [tab, lineEnd, carriage, space, dash, colon, question] = [9, 10, 13, 32, 45, 58, 63] as const

/**
 * The line on which more than the most levels open one behind the other, as in "a: a: a: ...", or null; counted from 1.
 * The package takes time with the square of their number, so they are looked for before it begins.
 */
export function lineNestedTooDeep(text: string): number | null {
  let line = 1
  let open = 0
  let word = -1
  for (let index = 0; index < text.length; index++) {
    const sign = text.charCodeAt(index)
    if (sign !== space && sign !== lineEnd && sign !== tab && sign !== carriage) {
      if (word === -1) word = index
      continue
    }
    if (word !== -1) {
      const last = text.charCodeAt(index - 1)
      const opens = last === colon || (word === index - 1 && (last === dash || last === question))
      open = opens ? open + 1 : 0
      if (open > mostLevels) return line
      word = -1
    }
    if (sign === lineEnd) {
      line++
      open = 0
    }
  }
  return null
}
