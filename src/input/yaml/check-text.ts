import type { Problem } from '../../problems/problem.ts'

/** Larger files are refused before anything is parsed. */
export const largestFile = 64 * 1024 * 1024
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

/** Bytes to text; UTF-8 with or without a byte order mark. */
export function decodeText(bytes: Uint8Array, file: string): string | Problem {
  if (bytes.length > largestFile) return tooLarge(file, bytes.length)
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes)
  } catch {
    // TextDecoder throws a TypeError for bytes that are no UTF-8, and for nothing else here.
    const [line, column] = placeOfBadByte(bytes)
    const found = 'its bytes are no UTF-8'
    return { code: 'file-not-text', file, line, column, path: '', found, expected: '', hint: 'save it as UTF-8 text' }
  }
}

const halfPair = /\p{Cs}/u

function tooLarge(file: string, length: number): Problem {
  const found = `${Math.ceil(length / 1024 / 1024)} MB`
  return { code: 'file-too-large', file, line: 0, column: 0, path: '', found, expected: largestFileText, hint: '' }
}

/** The first place where lenient decoding puts in the replacement character. */
function placeOfBadByte(bytes: Uint8Array): readonly [number, number] {
  const lines = new TextDecoder('utf-8').decode(bytes).split('\n')
  const index = lines.findIndex((line) => line.includes('\ufffd'))
  return index === -1 ? [1, 1] : [index + 1, lines[index]!.indexOf('\ufffd') + 1]
}
