import type { Figure, PublishedRow } from './figure.ts'

/** One line of the error table. Numbers in the printed unit. */
export interface Comparison {
  readonly id: string
  readonly quantity: string
  readonly unit: string
  readonly printed: string
  readonly expected: number
  readonly computed: number
  readonly error: number
  readonly tolerance: number
  readonly within: boolean
  readonly because: string
  readonly source: string
}

/** A part of the accuracy report; other measurements of accuracy add theirs to sections.ts. */
export interface ValidationSection {
  readonly title: string
  readonly text: string
  readonly rows: () => readonly Comparison[]
}

/** Compares every figure of every case of a row. */
export function compareRow(row: PublishedRow): readonly Comparison[] {
  return row.evaluate().flatMap(({ name, figures, computed }) =>
    figures.map((figure) => ({
      id: row.id,
      source: `${row.source}${row.standing === 'from memory' ? ', from memory' : ''}`,
      ...compareFigure(name, figure, computed[figure.quantity]),
    })),
  )
}

function compareFigure(name: string, figure: Figure, value: number | undefined): Omit<Comparison, 'id' | 'source'> {
  if (value === undefined) throw new Error(`${name}: nothing computes ${figure.quantity}`)
  const right = figure.misprint?.right ?? figure.printed
  const expected = Number(right)
  const computed = value / figure.scale
  const tolerance = figure.tolerance?.absolute ?? halfLastDigit(right)
  const error = computed - expected
  return {
    quantity: `${figure.quantity}, ${name}`,
    unit: figure.unit,
    printed: figure.printed,
    expected,
    computed,
    error,
    tolerance,
    // one part in 1e12 for the rounding of the comparison itself
    within: Math.abs(error) <= tolerance + 1e-12 * Math.abs(expected),
    because: figure.misprint?.because ?? figure.tolerance?.because ?? 'digits printed',
  }
}

/** Half a unit of the last digit of a number as written, "4.2517" or "1.5e-3". */
export function halfLastDigit(written: string): number {
  const [mantissa = '', exponent = '0'] = written.toLowerCase().split('e')
  const decimals = mantissa.includes('.') ? mantissa.length - mantissa.indexOf('.') - 1 : 0
  return 0.5 * 10 ** (Number(exponent) - decimals)
}
