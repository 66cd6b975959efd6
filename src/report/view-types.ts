/** What every renderer draws: blocks in order, tables with their units and digits already decided. */
export interface ReportView {
  readonly title: string
  readonly blocks: readonly Block[]
  /** The one table of the CSV file: every column, plain numbers. */
  readonly data: Table
}

export type Block =
  | { readonly kind: 'facts'; readonly items: readonly Fact[] }
  | { readonly kind: 'table'; readonly heading: string; readonly table: Table; readonly note: string | null }
  /** Where a drawing stands, in forms that can draw. */
  | { readonly kind: 'chart' }
  | { readonly kind: 'text'; readonly heading: string | null; readonly text: string }
  | { readonly kind: 'list'; readonly heading: string; readonly tone: Tone; readonly items: readonly Item[] }

export type Tone = 'plain' | 'warning' | 'caution'

export interface Fact {
  readonly label: string
  readonly text: string
}

/** `lead` names the part or the code the text belongs to. */
interface Item {
  readonly lead: string | null
  readonly text: string
}

export interface Column {
  readonly title: string
  /** Stands in the header, never in a cell. */
  readonly unit: string | null
  readonly numeric: boolean
  /** Columns of one group stay together where a table is divided. */
  readonly group: string
  /** Repeated in every part of a divided table. */
  readonly key: boolean
}

export interface Cell {
  /** As people read it. */
  readonly text: string
  /** In the unit of the column; null where there is none. */
  readonly value: number | string | null
}

export interface Table {
  readonly columns: readonly Column[]
  readonly rows: readonly (readonly Cell[])[]
}
