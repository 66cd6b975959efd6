import { shown } from './shown.ts'

/**
 * The known words closest to what was typed: equal but for case first, else the fewest edits, at most a third
 * of the word's length (one edit is always allowed), else those that begin like it. Empty when nothing is near.
 */
export function nearestWords(typed: string, known: readonly string[]): readonly string[] {
  if (typed === '' || typed.length > 64) return []
  const folded = fold(typed)
  const sameButCase = known.filter((word) => fold(word) === folded)
  if (sameButCase.length > 0) return sameButCase
  const limit = Math.max(1, Math.floor(typed.length / 3))
  const distances = known.map((word) => ({ word, edits: edits(folded, fold(word), limit) }))
  const least = Math.min(...distances.map(({ edits }) => edits), limit + 1)
  if (least > limit) return known.filter((word) => isBeginning(folded, fold(word)))
  return distances.filter(({ edits }) => edits === least).map(({ word }) => word)
}

/** Three letters or more that a word begins with, or its first part but for one edit: "max", "freq", the "onix" of "onyx-600v". */
function isBeginning(typed: string, word: string): boolean {
  if (typed.length < 3) return false
  const [first = ''] = word.split('_')
  return word.startsWith(typed) || (typed.length > 3 && first !== word && edits(typed, first, 1) <= 1)
}

/** "did you mean "a" or "b"?", or "" when nothing is near. */
export function didYouMean(typed: string, known: readonly string[]): string {
  const near = [...new Set(nearestWords(typed, known))].slice(0, 2)
  return near.length === 0 ? '' : `did you mean ${near.map((word) => `"${shown(word)}"`).join(' or ')}?`
}

/** Case, and the difference between a hyphen, an underscore and a space, count for nothing. */
function fold(word: string): string {
  return word.toLowerCase().replace(/[-_ ]/g, '_')
}

/** Edits between two words, a swap of neighbours counting as one (optimal string alignment). */
function edits(a: string, b: string, limit: number): number {
  if (Math.abs(a.length - b.length) > limit) return limit + 1
  let beforeLast: number[] = []
  let last = Array.from({ length: b.length + 1 }, (_, column) => column)
  for (let row = 1; row <= a.length; row++) {
    const next = [row]
    for (let column = 1; column <= b.length; column++) {
      const same = a[row - 1] === b[column - 1]
      let least = Math.min(last[column]! + 1, next[column - 1]! + 1, last[column - 1]! + (same ? 0 : 1))
      const swapped = row > 1 && column > 1 && a[row - 1] === b[column - 2] && a[row - 2] === b[column - 1]
      if (swapped) least = Math.min(least, beforeLast[column - 2]! + 1)
      next.push(least)
    }
    beforeLast = last
    last = next
  }
  return last[b.length]!
}
