/**
 * Signs that people paste and mathjs does not know, each with what it stands for here:
 * minus, no-break and thin spaces, micro in both code points, degree Celsius, ohm in both code points, the kelvin sign.
 */
const folds: readonly (readonly [RegExp, string])[] = [
  [/\u2212/g, '-'],
  [/[\u00a0\u2009\u202f]/g, ' '],
  [/[\u00b5\u03bc]/g, 'u'],
  [/\u00b0C|\u2103/g, 'degC'],
  [/\u00b0K|\u212a/g, 'K'],
  [/[\u03a9\u2126]/g, 'ohm'],
]

const plain = /^[\x20-\x7e]*$/

/** The text in the signs that the number and unit grammar knows. */
export function foldSigns(text: string): string {
  if (plain.test(text)) return text
  return folds.reduce((folded, [sign, meaning]) => folded.replace(sign, meaning), text)
}
