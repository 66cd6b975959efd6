import type { Problem } from '../../problems/problem.ts'

/** Larger files are refused before anything is parsed. */
const largestFile = 64 * 1024 * 1024
const largestFileText = '64 MB'

/** What can be wrong with a text before its language is looked at: size, emptiness, signs that belong to no text. */
export function checkText(text: string, file: string): Problem | null {
  if (text.length > largestFile) return tooLarge(file, text.length)
  const [nul, half] = [text.indexOf('\u0000'), text.search(halfPair)]
  if (nul === -1 && half === -1) return null
  const at = nul === -1 || (half !== -1 && half < nul) ? half : nul
  const before = text.slice(0, at)
  const line = before.split('\n').length
  const column = at - before.lastIndexOf('\n')
  const found = at === nul ? 'it holds a NUL character' : 'it holds half of a character pair'
  return { code: 'file-not-text', file, line, column, path: '', found, expected: '', hint: 'save it as UTF-8 text' }
}

const halfPair = /\p{Cs}/u

function tooLarge(file: string, length: number): Problem {
  const found = `${Math.ceil(length / 1024 / 1024)} MB`
  return { code: 'file-too-large', file, line: 0, column: 0, path: '', found, expected: largestFileText, hint: '' }
}
