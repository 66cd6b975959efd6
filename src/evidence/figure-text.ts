const scales = { s: [1e9, 'ns'], C: [1e9, 'nC'], A: [1, 'A'] } as const

/** A figure of a row as short text for a caveat, in the unit that data sheets use for it: figureText('trr', 3.5e-8, 's') is "trr 35 ns". */
export function figureText(symbol: string, value: number, unit: keyof typeof scales): string {
  const [factor, name] = scales[unit]
  return `${symbol} ${Number((value * factor).toPrecision(3))} ${name}`
}
