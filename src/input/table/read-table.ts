import Papa from 'papaparse'

export type Delimiter = ',' | ';' | '\t'

/** What ends the reading of a table early. */
export interface TableFault {
  /** Row of the table, counted from 1. */
  readonly row: number
  readonly found: string
  readonly expected: string
}

/**
 * Hands each row of a CSV text to `onRow`, with its number counted from 1 in the file, empty rows included in the
 * count and left out of the handing. Rows are not kept, so that a large table needs no memory of its own.
 */
export function readTable(
  text: string,
  delimiter: Delimiter,
  onRow: (cells: readonly string[], row: number) => void,
): TableFault | null {
  let row = 0
  let fault: TableFault | null = null
  Papa.parse<string[]>(text, {
    delimiter,
    skipEmptyLines: false,
    step: ({ data, errors }, parser) => {
      row += 1
      const broken = errors.find(({ type }) => type === 'Quotes')
      if (broken !== undefined) {
        fault = { row, found: 'a quote opens here that is not closed', expected: 'quotes in pairs' }
        parser.abort()
      } else if (data.length > 1 || (data[0] ?? '').trim() !== '') onRow(data, row)
    },
  })
  return fault
}

/** The sign that stands most often between the values of a row; a comma where there is none. */
export function findDelimiter(text: string, row: number): Delimiter {
  const line = text.split('\n', row)[row - 1] ?? ''
  const outside = line.replace(/"[^"]*"/g, '')
  const count = (sign: string) => outside.split(sign).length
  const signs: readonly Delimiter[] = [';', '\t', ',']
  return signs.reduce((best, sign) => (count(sign) > count(best) ? sign : best), ',')
}
