/** Where a value stands in a file: keys, and positions in lists counted from 0. */
export type Path = readonly (string | number)[]

/** "recovery[2].slope": positions in lists are told counted from 1, as people count rows. */
export function pathText(path: Path): string {
  return path.reduce<string>((text, step) => {
    if (typeof step === 'number') return `${text}[${step + 1}]`
    return text === '' ? step : `${text}.${step}`
  }, '')
}
