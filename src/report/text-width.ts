/** Columns that a text takes in a terminal: combining marks 0, East Asian wide characters and emoji 2, others 1. */
export function textWidth(text: string): number {
  let width = 0
  for (const character of text) width += characterWidth(character.codePointAt(0)!)
  return width
}

function characterWidth(code: number): number {
  if (code < 0x300) return 1
  if (zeroWidth.test(String.fromCodePoint(code)) || (code >= 0xfe00 && code <= 0xfe0f)) return 0
  return wideRanges.some(([from, to]) => code >= from && code <= to) ? 2 : 1
}

const zeroWidth = /^[\p{Mn}\p{Me}\u200B-\u200D]$/u
const wideRanges: readonly (readonly [number, number])[] = [
  [0x1100, 0x115f],
  [0x2e80, 0x303e],
  [0x3041, 0xa4cf],
  [0xac00, 0xd7a3],
  [0xf900, 0xfaff],
  [0xfe30, 0xfe6f],
  [0xff00, 0xff60],
  [0xffe0, 0xffe6],
  [0x1f300, 0x1faff],
  [0x20000, 0x3fffd],
]

/** Lines no wider than `width`, broken at spaces, and inside a word only where it would not fit a line by itself. */
export function wrapText(text: string, width: number): string[] {
  return wrapWords(text.replace(unitGap, '$1\u00A0'), width).map((line) => line.replaceAll('\u00A0', ' '))
}

/** A number is not torn from its unit. */
const unitGap = /(\d) (?=(?:[GMkmµnp]?(?:V|A|W|s|C|F|J|H|Hz|Ω|K)|%|°C|A\/µs|K\/W|kWh)(?![\p{L}\d]))/gu

function wrapWords(text: string, width: number): string[] {
  const lines: string[] = []
  let line = ''
  for (const word of text.split(' ')) {
    for (const piece of pieces(word, width)) {
      const joined = line === '' ? piece : `${line} ${piece}`
      if (line !== '' && textWidth(joined) > width) {
        lines.push(line)
        line = piece
      } else line = joined
    }
  }
  if (line !== '' || lines.length === 0) lines.push(line)
  return lines
}

/** Cuts a word that is wider than a line, after a hyphen where one is near. */
function pieces(word: string, width: number): string[] {
  if (textWidth(word) <= width) return [word]
  const parts: string[] = []
  let part = ''
  for (const character of word) {
    if (textWidth(part + character) > width) {
      const hyphen = part.lastIndexOf('-') + 1
      const cut = hyphen > 0 ? hyphen : part.length
      parts.push(part.slice(0, cut))
      part = part.slice(cut)
    }
    part += character
  }
  return [...parts, part]
}
