import type { Fact, Table, Tone } from '../view-types.ts'

/** One numbered section of the review document; both renderers draw the same ones in the same order. */
export interface ReviewSection {
  readonly title: string
  readonly blocks: readonly ReviewBlock[]
}

export type ReviewBlock =
  | { readonly kind: 'text'; readonly text: string; readonly lead?: boolean }
  | { readonly kind: 'facts'; readonly items: readonly Fact[] }
  | TableBlock
  | {
      readonly kind: 'list'
      readonly heading: string | null
      readonly tone: Tone
      readonly items: readonly { readonly lead: string | null; readonly text: string }[]
    }
  /** A drawing; forms that cannot draw print the tables beside it. */
  | { readonly kind: 'figure'; readonly svg: string; readonly caption: string }
  | { readonly kind: 'methods'; readonly items: readonly MethodItem[] }

export interface TableBlock {
  readonly kind: 'table'
  readonly heading: string
  readonly table: Table
  readonly note: string | null
  /** Cells carry their whole value, which the recalculation is held against. */
  readonly exact?: boolean
  /** Many rows: scrolls within itself on a screen. */
  readonly long?: boolean
}

interface MethodItem {
  readonly name: string
  readonly equation: string
  readonly source: string
  readonly note: string
}

export function tableBlock(
  heading: string,
  table: Table,
  more: Partial<Pick<TableBlock, 'note' | 'exact' | 'long'>> = {},
): TableBlock {
  return { kind: 'table', heading, table, note: null, ...more }
}
